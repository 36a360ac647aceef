import type { StretchTest } from '#shared/domain/textile/types'

const WAYS = {
  weights: 'weights on a strip',
  'one load': 'one load on a strip',
  'spring scale': 'spring scale on a strip',
  machine: 'machine, strip',
}

/** What kind of test it was, in a few words. */
export function testKindWords(test: StretchTest): string {
  if (test.kind === 'label') return test.ruler ? 'ruler pull, load assumed' : 'label only, load assumed'
  const { length } = test.specimens
  return `${WAYS[test.way ?? (test.runs ? 'machine' : 'weights')]}, ${length} ${length === 1 ? 'specimen' : 'specimens'}`
}

/** How it was done, as far as it was noted; empty where nothing was. Goes on a sentence. */
export function protocolWords(test: StretchTest, cycles: number | null): string {
  const named = test.method === 'other' ? null : (test.method ?? null)
  const parts = [
    test.kind === 'strip' && (named || test.methodNote) ? `method: ${[named, test.methodNote].filter(Boolean).join(', ')}` : null,
    cycles === null || test.kind === 'label' ? null : `${cycles} ${cycles === 1 ? 'stretch' : 'stretches'} before reading`,
    test.dwell === undefined ? null : `${test.dwell} s at each load`,
    test.rest === undefined ? null : `rested ${test.rest} min`,
    test.kind === 'strip' && test.runs
      ? `read from ${test.runs.map((run) => `${run.name} (${run.rows} rows, ${run.cycles} ${run.cycles === 1 ? 'cycle' : 'cycles'})`).join(', ')}`
      : null,
  ]
  return parts.filter(Boolean).join('; ')
}
