import type { ClothDirection, ClothState, StretchTest } from '../../shared/domain/textile/types'
import { mm, newton, strain } from '../../shared/domain/units/brand'
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

export interface DemoCloth {
  readonly fields: ClothFields
  readonly tests: readonly DemoTest[]
  readonly label?: { readonly direction: ClothDirection; readonly stretch: number }
}

const WIDTH = 50
const GAUGE = 100
const STEPS = 5
/** Specimens of one cloth differ by a few parts in a hundred. */
const SPECIMENS = [0.97, 1.04, 1]
/** What a return curve lies under the loading one. */
const ON_RETURN = 0.88

const tenth = (value: number) => Math.round(value * 10) / 10
const hundredth = (value: number) => Math.round(value * 100) / 100

/** Three strips as a workroom would note them: loads at even steps of length, lengths to half a millimetre, read on the way back too. */
export function stripTest({ direction, state, a, b, to, kept }: DemoTest): StretchTest {
  return {
    kind: 'strip',
    direction,
    state,
    specimens: SPECIMENS.map((factor) => {
      const reading = (step: number, on: 'loading' | 'return') => {
        const e = (to * step) / STEPS
        const tension = (a * e + b * e ** 3) * factor * (on === 'return' && step < STEPS ? ON_RETURN : 1)
        return { load: newton(hundredth((tension * WIDTH) / 1000)), length: mm(Math.round(2 * GAUGE * (1 + e)) / 2), on }
      }
      const steps = Array.from({ length: STEPS }, (_, i) => i + 1)
      return {
        width: mm(WIDTH),
        gauge: mm(GAUGE),
        readings: [...steps.map((step) => reading(step, 'loading')), ...steps.toReversed().map((step) => reading(step, 'return'))],
        restLength: mm(tenth(GAUGE * (1 + to * kept))),
      }
    }),
  }
}

export const labelTest = (direction: ClothDirection, stretch: number): StretchTest => ({
  kind: 'label',
  direction,
  state: 'dry',
  stretch: strain(stretch),
})

const cloth = (
  code: string,
  name: string,
  composition: string,
  mass: number,
  thickness: number,
  width: number,
  tests: readonly DemoTest[],
  extra: Partial<ClothFields> & { label?: DemoCloth['label'] } = {},
): DemoCloth => {
  const { label, ...fields } = extra
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
    ...(label ? { label } : {}),
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
    { lot: '2611-A' },
  ),
  cloth(
    'SH-09',
    'Matt shell, slate',
    '80 % polyamide, 20 % elastane',
    190,
    0.48,
    1520,
    [...both('dry', { a: 300, b: 350, to: 0.75, kept: 0.03 }, { a: 380, b: 560, to: 0.55, kept: 0.04 })],
    { lot: '2609-C' },
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
    { lot: '2602-B' },
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
  cloth('MU-02', 'Mock-up knit, unbleached', '92 % cotton, 8 % elastane', 170, 0.55, 1600, [
    ...both('dry', { a: 110, b: 120, to: 0.8, kept: 0.09 }, { a: 160, b: 220, to: 0.6, kept: 0.1 }),
  ]),
  cloth('VL-21', 'Stretch velvet, plum', '93 % polyester, 7 % elastane', 290, 1.1, 1450, [], {
    label: { direction: 'crosswise', stretch: 0.45 },
    supplier: 'Corder and Vale',
    note: 'Only the label is known: pull a strip before it is cut. Invented for the demo.',
  }),
]
