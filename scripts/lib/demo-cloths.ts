import { typedDirection } from '../../shared/domain/textile/direction'
import { readTensile } from '../../shared/domain/textile/tensile'
import type { ClothDirection, ClothState, StretchTest } from '../../shared/domain/textile/types'
import { mm, newton, strain } from '../../shared/domain/units/brand'
import type { TestDraft } from '../../shared/schemas/test-draft'
import type { ClothFields } from '../../server/db/queries/cloths'

/** Figures of the demo are invented: they are of the order that such cloths have, and were measured on none. */
interface DemoTest {
  readonly direction: ClothDirection
  readonly state: ClothState
  /** T(e) = a e + b e^3, N/m, on the loading side. */
  readonly a: number
  readonly b: number
  /** Largest strain read. */
  readonly to: number
  /** Part of the extension that is still there after the rest. */
  readonly kept: number
}

/** A test of another kind, with what is noted of it. */
interface OtherTest {
  readonly cycles: number | null
  readonly note: string
  readonly testedOn?: string
  readonly test: StretchTest | null
  readonly draft?: TestDraft
}

export interface DemoCloth {
  readonly fields: ClothFields
  readonly tests: readonly DemoTest[]
  readonly others: readonly OtherTest[]
}

const WIDTH = 50
const GAUGE = 100
const STEPS = 5
/** Specimens of one cloth differ by a few parts in a hundred. */
const SPECIMENS = [0.97, 1.04, 1]
/** Specimens keep a little more or less of their stretch. */
const KEPT = [1, 1.2, 0.85]
/** What a return curve lies under the loading one. */
const ON_RETURN = 0.88

const tenth = (value: number) => Math.round(value * 10) / 10
const hundredth = (value: number) => Math.round(value * 100) / 100

/** The strain at which a e + b e³ reaches a tension, by halving. */
function strainUnder(a: number, b: number, tension: number): number {
  let [low, high] = [0, 5]
  for (let i = 0; i < 60; i++) {
    const e = (low + high) / 2
    if (a * e + b * e ** 3 < tension) low = e
    else high = e
  }
  return low
}

/** Three strips as a workroom would note them: the same weights on each, lengths to half a millimetre, read on the way back too. */
export function stripTest({ direction, state, a, b, to, kept }: DemoTest): StretchTest {
  const half = (length: number) => Math.round(2 * length) / 2
  const loads = Array.from({ length: STEPS }, (_, i) => {
    const e = (to * (i + 1)) / STEPS
    return hundredth(((a * e + b * e ** 3) * WIDTH) / 1000)
  })
  return {
    kind: 'strip',
    way: 'weights',
    method: 'workroom strip',
    dwell: 60,
    rest: 30,
    direction,
    state,
    specimens: SPECIMENS.map((factor, index) => {
      const reading = (load: number, on: 'loading' | 'return') => {
        const share = factor * (on === 'return' && load < loads.at(-1)! ? ON_RETURN : 1)
        return { load: newton(load), length: mm(half(GAUGE * (1 + strainUnder(a * share, b * share, (load * 1000) / WIDTH)))), on }
      }
      const top = strainUnder(a * factor, b * factor, (loads.at(-1)! * 1000) / WIDTH)
      return {
        width: mm(WIDTH),
        gauge: mm(GAUGE),
        readings: [...loads.map((load) => reading(load, 'loading')), ...loads.toReversed().map((load) => reading(load, 'return'))],
        restLength: mm(half(GAUGE * (1 + top * kept * KEPT[index]!))),
      }
    }),
  }
}

/** A machine's run of five cycles, 400 rows each, drawn from T(e) = a e + b e³ with a return under it; read like a file. */
function machineTest(direction: ClothDirection, a: number, b: number, to: number): StretchTest {
  const cycles = 5
  const rows = 400
  const each = SPECIMENS.map((factor, index) => {
    const loads: number[] = []
    const extensions: number[] = []
    for (let row = 0; row < cycles * rows; row++) {
      const cycle = Math.floor(row / rows)
      const part = (row % rows) / rows
      const e = to * (1 - Math.abs(2 * part - 1)) + 0.003 * cycle
      const softened = 1 - 0.02 * cycle
      const tension = (a * e + b * e ** 3) * factor * softened * (part > 0.5 ? ON_RETURN : 1)
      loads.push((tension * WIDTH) / 1000)
      extensions.push(e * GAUGE)
    }
    const read = readTensile({ loads, extensions }, { width: mm(WIDTH), gauge: mm(GAUGE) })
    if (!read.ok) throw new Error(read.problem.message)
    const { specimen, earlier, ...said } = read.value
    return {
      specimen: { ...specimen, restLength: mm(tenth(GAUGE * (1 + to * 0.03))) },
      run: { name: `run-${index + 1}.csv`, ...said, earlier },
    }
  })
  return {
    kind: 'strip',
    way: 'machine',
    method: 'EN ISO 20932-1',
    methodNote: 'invented, no laboratory',
    rest: 30,
    direction,
    state: 'dry',
    specimens: each.map((one) => one.specimen),
    runs: each.map((one) => one.run),
  }
}

/** One load read on a strip cut at an angle. */
const oneLoadTest = (angle: number, stretch: number): StretchTest => ({
  ...typedDirection(angle),
  kind: 'strip',
  way: 'one load',
  method: 'other',
  methodNote: 'one weight of 1 kg',
  dwell: 60,
  rest: 30,
  state: 'dry',
  specimens: SPECIMENS.map((factor) => ({
    width: mm(WIDTH),
    gauge: mm(GAUGE),
    readings: [{ load: newton(hundredth(9.81)), length: mm(tenth(GAUGE * (1 + stretch / factor))), on: 'loading' }],
    restLength: mm(tenth(GAUGE * (1 + stretch * 0.04))),
  })),
})

/** Marks drawn along a ruler by hand. */
const rulerTest = (direction: ClothDirection, rest: number, drawn: number): StretchTest => ({
  kind: 'label',
  direction,
  state: 'dry',
  stretch: strain((drawn - rest) / rest),
  ruler: { rest: mm(rest), drawn: mm(drawn) },
})

const labelTest = (direction: ClothDirection, stretch: number): StretchTest => ({
  kind: 'label',
  direction,
  state: 'dry',
  stretch: strain(stretch),
})

/** A wet test that was left off after its first weight. */
const leftOff = (): TestDraft => {
  const nothing = { value: null, typed: '' }
  const three = (typed: string, value: number | null = null) => [0, 1, 2].map(() => ({ value, typed }))
  const gram = 0.00980665
  const step = (grams: number, on: 'loading' | 'return', lengths: readonly string[]) => ({
    load: { value: grams * gram, typed: `${grams} g` },
    on,
    lengths: [0, 1, 2].map((one) => (lengths[one] ? { value: Number.parseFloat(lengths[one]), typed: lengths[one] } : nothing)),
  })
  return {
    kind: 'strip',
    method: 'workroom strip',
    methodNote: '',
    direction: 'crosswise',
    angle: nothing,
    state: 'wet',
    testedOn: '2026-11-27',
    tester: 'Dario Anselm',
    cycles: '4',
    dwell: '60',
    rest: '30',
    acceptable: nothing,
    note: 'Weights wanted for the fitting; two more loads to hang.',
    loadUnit: 'g',
    hook: { value: 35 * gram, typed: '35 g' },
    widths: three('50 mm', WIDTH),
    gauges: three('100 mm', GAUGE),
    rests: three(''),
    rows: [
      step(100, 'loading', ['109 mm', '108.5 mm', '109.5 mm']),
      step(250, 'loading', ['121 mm']),
      step(500, 'loading', []),
      step(250, 'return', []),
    ],
    runs: [],
    stretch: nothing,
    ruler: { rest: nothing, drawn: nothing },
  }
}

const cloth = (
  code: string,
  name: string,
  composition: string,
  mass: number,
  thickness: number,
  width: number,
  tests: readonly DemoTest[],
  extra: Partial<ClothFields> & { others?: readonly OtherTest[] } = {},
): DemoCloth => {
  const { others = [], ...fields } = extra
  return {
    fields: {
      code,
      name,
      composition,
      mass,
      thickness,
      width,
      lot: null,
      supplier: 'Halden Cloth Yard',
      note: 'Invented for the demo.',
      ...fields,
    },
    tests,
    others,
  }
}

const both = (
  state: ClothState,
  across: Omit<DemoTest, 'direction' | 'state'>,
  along: Omit<DemoTest, 'direction' | 'state'>,
): DemoTest[] => [
  { direction: 'crosswise', state, ...across },
  { direction: 'lengthwise', state, ...along },
]

export const DEMO_CLOTHS: readonly DemoCloth[] = [
  cloth(
    'SH-14',
    'Satin shell, reed green',
    '78 % polyamide, 22 % elastane',
    210,
    0.52,
    1500,
    [
      ...both('dry', { a: 340, b: 420, to: 0.7, kept: 0.03 }, { a: 460, b: 700, to: 0.5, kept: 0.04 }),
      ...both('wet', { a: 300, b: 380, to: 0.72, kept: 0.05 }, { a: 410, b: 640, to: 0.52, kept: 0.06 }),
    ],
    {
      lot: '2611-A',
      others: [{ cycles: 3, note: 'Cut for the slanting side piece. Invented for the demo.', test: oneLoadTest(30, 0.46) }],
    },
  ),
  cloth(
    'SH-09',
    'Matt shell, slate',
    '80 % polyamide, 20 % elastane',
    190,
    0.48,
    1520,
    [...both('dry', { a: 300, b: 350, to: 0.75, kept: 0.03 }, { a: 380, b: 560, to: 0.55, kept: 0.04 })],
    { lot: '2609-C', others: [{ cycles: null, note: 'Invented for the demo.', testedOn: '2026-11-27', test: null, draft: leftOff() }] },
  ),
  cloth(
    'PN-30',
    'Power net, firm',
    '70 % polyamide, 30 % elastane',
    185,
    0.42,
    1480,
    [
      ...both('dry', { a: 620, b: 1100, to: 0.6, kept: 0.02 }, { a: 900, b: 1900, to: 0.45, kept: 0.02 }),
      ...both('wet', { a: 570, b: 1000, to: 0.6, kept: 0.03 }, { a: 830, b: 1750, to: 0.45, kept: 0.03 }),
    ],
    { lot: '2604-F' },
  ),
  cloth(
    'PN-12',
    'Power net, light',
    '82 % polyamide, 18 % elastane',
    95,
    0.28,
    1480,
    [...both('dry', { a: 240, b: 380, to: 0.75, kept: 0.03 }, { a: 310, b: 520, to: 0.6, kept: 0.03 })],
    {
      lot: '2602-B',
      others: [{ cycles: null, note: 'Files of a machine, invented for the demo.', test: machineTest('bias', 180, 260, 0.8) }],
    },
  ),
  cloth(
    'LN-05',
    'Stretch lining, sand',
    '88 % polyester, 12 % elastane',
    120,
    0.32,
    1500,
    [
      ...both('dry', { a: 150, b: 160, to: 0.8, kept: 0.04 }, { a: 200, b: 260, to: 0.6, kept: 0.05 }),
      ...both('wet', { a: 140, b: 150, to: 0.8, kept: 0.05 }, { a: 185, b: 240, to: 0.6, kept: 0.06 }),
    ],
    { lot: '2605-A' },
  ),
  cloth(
    'MU-02',
    'Mock-up knit, unbleached',
    '92 % cotton, 8 % elastane',
    170,
    0.55,
    1600,
    [...both('dry', { a: 110, b: 120, to: 0.8, kept: 0.09 }, { a: 160, b: 220, to: 0.6, kept: 0.1 })],
    { others: [{ cycles: null, note: 'Pinched and drawn along a ruler. Invented for the demo.', test: rulerTest('bias', 101.6, 177.8) }] },
  ),
  cloth('VL-21', 'Stretch velvet, plum', '93 % polyester, 7 % elastane', 290, 1.1, 1450, [], {
    others: [{ cycles: null, note: 'From the label.', test: labelTest('crosswise', 0.45) }],
    supplier: 'Corder and Vale',
    note: 'Only the label is known: pull a strip before it is cut. Invented for the demo.',
  }),
]
