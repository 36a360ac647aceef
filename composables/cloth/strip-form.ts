import type {
  ClothDirection,
  ClothState,
  StretchReading,
  StretchSpecimen,
  StretchTest,
  TensileRecord,
  TestMethod,
} from '#shared/domain/textile/types'
import { mm, newton, strain } from '#shared/domain/units/brand'
import type { LoadUnit } from '~/composables/useNumberField'

/** A number as it stands in a form: what was typed, and its value in the domain's unit when it could be read. */
export interface Entry {
  value: number | null
  typed: string
}

export interface StripRow {
  load: Entry
  on: StretchReading['on']
  /** One for each specimen. */
  lengths: Entry[]
}

/** A machine's file as it was read: one specimen. */
export interface RunEntry extends TensileRecord {
  readonly specimen: StretchSpecimen
}

/** A stretch test while it is being entered: load steps down, specimens across. */
export interface StripForm {
  kind: 'strip' | 'run' | 'label'
  method: TestMethod
  runs: RunEntry[]
  direction: ClothDirection
  state: ClothState
  testedOn: string
  tester: string
  cycles: string
  note: string
  loadUnit: LoadUnit
  /** Hook and lower clamp, added to every weight. */
  hook: Entry
  widths: Entry[]
  gauges: Entry[]
  rests: Entry[]
  rows: StripRow[]
  stretch: Entry
  /** A ruler pull: the marks at rest, and drawn by hand. */
  ruler: { rest: Entry; drawn: Entry }
}

export const empty = (): Entry => ({ value: null, typed: '' })
export const entry = (value: number, typed: string): Entry => ({ value, typed })
const GRAM = 0.00980665

/** A fresh form: three strips 50 mm wide with marks 100 mm apart, as the protocol beside it asks for; loads up and back. */
export function freshStripForm(today: string): StripForm {
  const steps: readonly (readonly [number, StretchReading['on']])[] = [
    [100, 'loading'],
    [250, 'loading'],
    [500, 'loading'],
    [1000, 'loading'],
    [500, 'return'],
    [250, 'return'],
  ]
  const three = (make: () => Entry) => [make(), make(), make()]
  return {
    kind: 'strip',
    method: 'workroom strip',
    runs: [],
    direction: 'crosswise',
    state: 'dry',
    testedOn: today,
    tester: '',
    cycles: '4',
    note: '',
    loadUnit: 'kg',
    hook: entry(0, '0'),
    widths: three(() => entry(50, '50 mm')),
    gauges: three(() => entry(100, '100 mm')),
    rests: three(empty),
    rows: steps.map(([grams, on]) => ({ load: entry(grams * GRAM, `${grams} g`), on, lengths: three(empty) })),
    stretch: empty(),
    ruler: { rest: empty(), drawn: empty() },
  }
}

/** A saved test in the form again. Its loads are the whole pull, so the hook is counted already. */
export function stripFormOf(
  test: StretchTest,
  about: { testedOn: string; tester: string | null; cycles: number | null; note: string | null },
): StripForm {
  const form = freshStripForm(about.testedOn)
  const common = {
    ...form,
    kind: test.kind,
    direction: test.direction,
    state: test.state,
    tester: about.tester ?? '',
    cycles: about.cycles === null ? '' : String(about.cycles),
    note: about.note ?? '',
  }
  const known = (value: number) => entry(value, '')
  if (test.kind === 'label') return { ...common, stretch: known(test.stretch) }
  const method = test.method ?? 'workroom strip'
  if (test.runs) {
    const { width, gauge } = test.specimens[0]!
    const runs = test.runs.map((run, i) => ({ ...run, specimen: test.specimens[i]! }))
    return {
      ...common,
      kind: 'run',
      method,
      runs,
      widths: form.widths.map(() => known(width)),
      gauges: form.gauges.map(() => known(gauge)),
    }
  }
  const keyOf = (reading: StretchReading) => `${reading.on} ${reading.load.toFixed(6)}`
  const steps = new Map<string, StretchReading>()
  for (const specimen of test.specimens)
    for (const reading of specimen.readings) steps.set(keyOf(reading), steps.get(keyOf(reading)) ?? reading)
  return {
    ...common,
    method,
    widths: test.specimens.map((specimen) => known(specimen.width)),
    gauges: test.specimens.map((specimen) => known(specimen.gauge)),
    rests: test.specimens.map((specimen) => (specimen.restLength === null ? empty() : known(specimen.restLength))),
    rows: [...steps].map(([key, step]) => ({
      load: known(step.load),
      on: step.on,
      lengths: test.specimens.map((specimen) => {
        const reading = specimen.readings.find((one) => keyOf(one) === key)
        return reading ? known(reading.length) : empty()
      }),
    })),
  }
}

/** Field of the form that an address in the test's body names. */
export interface StripPlace {
  readonly specimen: number
  readonly field: 'width' | 'gauge' | 'rest' | 'load' | 'length'
  readonly row: number | null
}

export interface StripReading {
  readonly test: StretchTest | null
  /** What keeps it from being a test yet, in words; the screen shows it by the figures. */
  readonly lacking: string | null
  /** From an address such as `specimens.0.readings.2.length` to the field it was typed in. */
  readonly placeOf: (at: string) => StripPlace | null
}

/** Reads the form as a test. Specimens without any length, and loads nobody read, are left out. */
export function readStripForm(form: StripForm): StripReading {
  const nowhere = () => null
  if (form.kind === 'label') {
    if (form.stretch.value === null)
      return { test: null, lacking: 'Type the stretch that the label or the hand pull gives.', placeOf: nowhere }
    return {
      test: { kind: 'label', direction: form.direction, state: form.state, stretch: strain(form.stretch.value) },
      lacking: null,
      placeOf: nowhere,
    }
  }
  if (form.kind === 'run') {
    if (form.runs.length === 0) return { test: null, lacking: 'Choose a file of the machine: figures and curve follow.', placeOf: nowhere }
    return {
      test: {
        kind: 'strip',
        direction: form.direction,
        state: form.state,
        method: form.method,
        specimens: form.runs.map((run) => run.specimen),
        runs: form.runs.map(({ specimen: _specimen, ...run }) => run),
      },
      lacking: null,
      placeOf: nowhere,
    }
  }
  const used = form.widths
    .map((_, specimen) => specimen)
    .filter((specimen) => form.rows.some((row) => row.lengths[specimen]!.value !== null))
  if (used.length === 0) return { test: null, lacking: 'Type the first length: figures and curve follow as you go.', placeOf: nowhere }
  const rowsOf = (specimen: number) =>
    form.rows.map((_, row) => row).filter((row) => form.rows[row]!.load.value !== null && form.rows[row]!.lengths[specimen]!.value !== null)
  const bare = used.find((specimen) => form.widths[specimen]!.value === null || form.gauges[specimen]!.value === null)
  if (bare !== undefined)
    return { test: null, lacking: `Specimen ${bare + 1} needs its width and the distance of its marks.`, placeOf: nowhere }
  const test: StretchTest = {
    kind: 'strip',
    direction: form.direction,
    state: form.state,
    method: form.method,
    specimens: used.map((specimen) => ({
      width: mm(form.widths[specimen]!.value!),
      gauge: mm(form.gauges[specimen]!.value!),
      readings: rowsOf(specimen).map((row) => ({
        load: newton(form.rows[row]!.load.value! + (form.hook.value ?? 0)),
        length: mm(form.rows[row]!.lengths[specimen]!.value!),
        on: form.rows[row]!.on,
      })),
      restLength: form.rests[specimen]!.value === null ? null : mm(form.rests[specimen]!.value!),
    })),
  }
  const placeOf = (at: string): StripPlace | null => {
    const found = /specimens\.(\d+)\.(?:(width|gauge|restLength)|readings\.(\d+)\.(load|length))/.exec(at)
    const specimen = found ? used[Number(found[1])] : undefined
    if (!found || specimen === undefined) return null
    if (found[2]) return { specimen, field: found[2] === 'restLength' ? 'rest' : (found[2] as 'width' | 'gauge'), row: null }
    return { specimen, field: found[4] as 'load' | 'length', row: rowsOf(specimen)[Number(found[3])] ?? null }
  }
  return { test, lacking: null, placeOf }
}
