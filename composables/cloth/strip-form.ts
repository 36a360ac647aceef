import { rulerStretch } from '#shared/domain/textile/ruler'
import { typedDirection } from '#shared/domain/textile/direction'
import type { PullWay, StretchReading, StretchTest, TensileRecord, TestProtocol } from '#shared/domain/textile/types'
import { mm, newton, strain } from '#shared/domain/units/brand'
import { GRAM_PER_POUND, STANDARD_GRAVITY } from '#shared/domain/units/convert'
import type { Problem } from '#shared/domain/units/result'
import type { ClothTest } from '#shared/schemas/cloths'
import type { DraftEntry, TestDraft } from '#shared/schemas/test-draft'

export type Entry = DraftEntry
/** A stretch test while it is being entered: load steps down, specimens across. What is unfinished is saved as it stands. */
export type StripForm = TestDraft
export type StripRow = StripForm['rows'][number]
/** A machine's file as it was read: one specimen. */
export type RunEntry = StripForm['runs'][number]

export const empty = (): Entry => ({ value: null, typed: '' })
export const entry = (value: number, typed: string): Entry => ({ value, typed })
const GRAM = STANDARD_GRAVITY / 1000

/** What the form's kinds write into a test. */
const WAYS: Readonly<Record<'strip' | 'one-load' | 'spring' | 'run', PullWay>> = {
  strip: 'weights',
  'one-load': 'one load',
  spring: 'spring scale',
  run: 'machine',
}

/** Loads a fresh form proposes, in the unit that the room weighs in. */
const STEPS = { g: [100, 250, 500, 1000], lb: [0.25, 0.5, 1, 2] } as const

/** A fresh form: three strips 50 mm wide with marks 100 mm apart, as the protocol beside it asks for; loads up and back. */
export function freshStripForm(today: string, inches = false): StripForm {
  const unit = inches ? 'lb' : 'g'
  const steps = STEPS[unit]
  const newtons = unit === 'lb' ? GRAM_PER_POUND * GRAM : GRAM
  const row = (weight: number, on: StretchReading['on']): StripRow => ({
    load: entry(weight * newtons, `${weight} ${unit}`),
    on,
    lengths: three(empty),
  })
  const three = (make: () => Entry) => [make(), make(), make()]
  return {
    kind: 'strip',
    method: 'workroom strip',
    methodNote: '',
    runs: [],
    direction: 'crosswise',
    angle: empty(),
    state: 'dry',
    testedOn: today,
    tester: '',
    cycles: '4',
    dwell: '60',
    rest: '30',
    acceptable: empty(),
    note: '',
    loadUnit: inches ? 'lb' : 'kg',
    hook: entry(0, '0'),
    widths: three(() => entry(50, '50 mm')),
    gauges: three(() => entry(100, '100 mm')),
    rests: three(empty),
    rows: [
      ...steps.map((one) => row(one, 'loading')),
      ...steps
        .slice(1, -1)
        .map((one) => row(one, 'return'))
        .reverse(),
    ],
    stretch: empty(),
    ruler: { rest: empty(), drawn: empty() },
  }
}

const known = (value: number): Entry => entry(value, '')
const noted = (value: number | null | undefined): string => (value === null || value === undefined ? '' : String(value))

/** A saved test in the form again; an unfinished one as it was left. Its loads are the whole pull, so the hook is counted already. */
export function stripFormOf({
  test,
  draft,
  ...about
}: Pick<ClothTest, 'test' | 'draft' | 'testedOn' | 'tester' | 'cycles' | 'note'>): StripForm {
  const form = freshStripForm(about.testedOn)
  if (!test) return { ...form, ...draft }
  const common: StripForm = {
    ...form,
    method: test.method ?? 'workroom strip',
    methodNote: test.methodNote ?? '',
    direction: test.angle === undefined ? test.direction : 'angle',
    angle: test.angle === undefined ? empty() : known(test.angle),
    state: test.state,
    tester: about.tester ?? '',
    cycles: noted(about.cycles),
    dwell: noted(test.dwell),
    rest: noted(test.rest),
    acceptable: test.acceptableStrain === undefined ? empty() : known(test.acceptableStrain),
    note: about.note ?? '',
  }
  if (test.kind === 'label') {
    const { ruler } = test
    return ruler
      ? { ...common, kind: 'ruler', ruler: { rest: known(ruler.rest), drawn: known(ruler.drawn) } }
      : { ...common, kind: 'label', stretch: known(test.stretch) }
  }
  if (test.runs) {
    const { width, gauge } = test.specimens[0]!
    const runs = test.runs.map((run, i): RunEntry => {
      const specimen = test.specimens[i]!
      return { ...run, specimen, rested: specimen.restLength === null ? empty() : known(specimen.restLength) } as unknown as RunEntry
    })
    return { ...common, kind: 'run', runs, widths: form.widths.map(() => known(width)), gauges: form.gauges.map(() => known(gauge)) }
  }
  const keyOf = (reading: StretchReading) => `${reading.on} ${reading.load.toFixed(6)}`
  const steps = new Map<string, StretchReading>()
  for (const specimen of test.specimens)
    for (const reading of specimen.readings) steps.set(keyOf(reading), steps.get(keyOf(reading)) ?? reading)
  return {
    ...common,
    kind: test.way === 'one load' ? 'one-load' : test.way === 'spring scale' ? 'spring' : 'strip',
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
  /** What was typed and cannot be, before it makes a test. */
  readonly problem: Problem | null
  /** From an address such as `specimens.0.readings.2.length` to the field it was typed in. */
  readonly placeOf: (at: string) => StripPlace | null
}

const nowhere = () => null
const lack = (lacking: string): StripReading => ({ test: null, lacking, problem: null, placeOf: nowhere })
const whole = (test: StretchTest, placeOf: StripReading['placeOf'] = nowhere): StripReading => ({
  test,
  lacking: null,
  problem: null,
  placeOf,
})

/** A count that was typed; nothing for anything else. */
export const countOf = (typed: string): number | null =>
  /^\d+([.,]\d+)?$/.test(typed.trim()) ? Number(typed.trim().replace(',', '.')) : null

type Direction = Pick<StretchTest, 'direction' | 'state'> & TestProtocol

function protocolOf(form: StripForm): Direction | null {
  const { value: degrees } = form.angle
  if (form.direction === 'angle' && (degrees === null || degrees < 0 || degrees > 90)) return null
  const dwell = countOf(form.dwell)
  const rest = countOf(form.rest)
  return {
    ...(form.direction === 'angle' ? typedDirection(degrees!) : { direction: form.direction }),
    state: form.state,
    method: form.method,
    ...(form.methodNote.trim() ? { methodNote: form.methodNote.trim() } : {}),
    ...(dwell === null ? {} : { dwell }),
    ...(rest === null ? {} : { rest }),
    ...(form.acceptable.value === null ? {} : { acceptableStrain: strain(form.acceptable.value) }),
  }
}

/** Rows that count: one load takes the first alone. */
export const rowsThatCount = (form: StripForm): readonly number[] =>
  form.kind === 'one-load'
    ? form.rows.flatMap((row, index) => (row.on === 'loading' ? [index] : [])).slice(0, 1)
    : form.rows.map((_, index) => index)

/** Reads the form as a test. Specimens without any length, and loads nobody read, are left out. */
export function readStripForm(form: StripForm): StripReading {
  const about = protocolOf(form)
  if (!about) return lack('Type the angle of the strip, 0 to 90 degrees from the lengthwise.')
  const { direction, state, angle } = about
  const bare = { direction, state, ...(angle === undefined ? {} : { angle }) }
  if (form.kind === 'label')
    return form.stretch.value === null
      ? lack('Type the stretch that the label gives.')
      : whole({ ...bare, kind: 'label', stretch: strain(form.stretch.value) })
  if (form.kind === 'ruler') {
    const { rest, drawn } = form.ruler
    if (rest.value === null || drawn.value === null) return lack('Type the distance of the marks at rest and drawn: the stretch follows.')
    const ruler = { rest: mm(rest.value), drawn: mm(drawn.value) }
    const stretch = rulerStretch(ruler.rest, ruler.drawn)
    if (!stretch.ok) return { test: null, lacking: null, problem: stretch.problem, placeOf: nowhere }
    return whole({ ...bare, kind: 'label', stretch: stretch.value, ruler })
  }
  if (form.kind === 'run') {
    if (form.runs.length === 0) return lack('Choose a file of the machine: figures and curve follow.')
    const records = form.runs.map(({ specimen: _specimen, rested: _rested, ...run }): TensileRecord => run)
    const specimens = form.runs.map(({ specimen, rested }) => ({
      ...specimen,
      restLength: rested.value === null ? null : mm(rested.value),
    }))
    return whole({ ...about, kind: 'strip', way: 'machine', specimens, runs: records })
  }
  return readStrips(form, about)
}

function readStrips(form: StripForm & { readonly kind: string }, about: Direction): StripReading {
  const counted = rowsThatCount(form)
  const used = form.widths
    .map((_, specimen) => specimen)
    .filter((specimen) => counted.some((row) => form.rows[row]!.lengths[specimen]!.value !== null))
  if (used.length === 0) return lack('Type the first length: figures and curve follow as you go.')
  const rowsOf = (specimen: number) =>
    counted.filter((row) => form.rows[row]!.load.value !== null && form.rows[row]!.lengths[specimen]!.value !== null)
  const unmeasured = used.find((specimen) => form.widths[specimen]!.value === null || form.gauges[specimen]!.value === null)
  if (unmeasured !== undefined) return lack(`Specimen ${unmeasured + 1} needs its width and the distance of its marks.`)
  const unloaded = used.find((specimen) => rowsOf(specimen).length === 0)
  if (unloaded !== undefined) return lack(`Specimen ${unloaded + 1} needs the load that its length was read under.`)
  const hook = form.kind === 'spring' ? 0 : (form.hook.value ?? 0)
  const test: StretchTest = {
    ...about,
    kind: 'strip',
    way: WAYS[form.kind as keyof typeof WAYS],
    specimens: used.map((specimen) => ({
      width: mm(form.widths[specimen]!.value!),
      gauge: mm(form.gauges[specimen]!.value!),
      readings: rowsOf(specimen).map((row) => ({
        load: newton(form.rows[row]!.load.value! + hook),
        length: mm(form.rows[row]!.lengths[specimen]!.value!),
        on: form.rows[row]!.on,
      })),
      restLength: form.rests[specimen]!.value === null ? null : mm(form.rests[specimen]!.value!),
    })),
  }
  return whole(test, (at) => {
    const place = /specimens\.(\d+)\.(?:(width|gauge|restLength)|readings\.(\d+)\.(load|length))/.exec(at)
    const specimen = place ? used[Number(place[1])] : undefined
    if (!place || specimen === undefined) return null
    if (place[2]) return { specimen, field: place[2] === 'restLength' ? 'rest' : (place[2] as 'width' | 'gauge'), row: null }
    return { specimen, field: place[4] as 'load' | 'length', row: rowsOf(specimen)[Number(place[3])] ?? null }
  })
}
