import { z } from 'zod'
import { clothState, specimen, tensileRecord, testMethod } from './textile'

/** A number as it stands in a form: what was typed, and its value in the domain's unit when it could be read. */
const entry = z.object({ value: z.number().finite().nullable(), typed: z.string().max(80) })
const short = z.string().max(200)

/**
 * A stretch test while it is being entered, whatever stands in its fields: load steps down, specimens across. Kept as it is, so that an
 * unfinished test opens as it was left.
 */
export const testDraft = z.object({
  kind: z.enum(['strip', 'one-load', 'spring', 'run', 'ruler', 'label']),
  method: testMethod,
  methodNote: short,
  direction: z.enum(['lengthwise', 'crosswise', 'bias', 'angle']),
  angle: entry,
  state: clothState,
  testedOn: short,
  tester: short,
  /** Stretches before reading, seconds at each load, minutes of rest. */
  cycles: short,
  dwell: short,
  rest: short,
  /** Strain up to which the recovery was found acceptable. */
  acceptable: entry,
  note: z.string().max(4000),
  loadUnit: z.enum(['N', 'g', 'kg', 'lb']),
  /** Hook and lower clamp, added to every weight. */
  hook: entry,
  widths: z.array(entry).min(1).max(20),
  gauges: z.array(entry).min(1).max(20),
  rests: z.array(entry).min(1).max(20),
  rows: z.array(z.object({ load: entry, on: z.enum(['loading', 'return']), lengths: z.array(entry).min(1).max(20) })).max(200),
  /** Machine's files as they were read, a specimen each, with the length after the rest. */
  runs: z.array(tensileRecord.extend({ specimen, rested: entry })).max(20),
  /** A stretch from a label. */
  stretch: entry,
  /** A ruler pull: the marks at rest, and drawn by hand. */
  ruler: z.object({ rest: entry, drawn: entry }),
})
export type TestDraft = z.output<typeof testDraft>
export type DraftEntry = z.output<typeof entry>
