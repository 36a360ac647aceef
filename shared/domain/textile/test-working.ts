import type { Working, WorkingInput } from '../units/working'
import { PULL_ON_SHARE, WEAR_SHARE } from './cloth'
import { ENOUGH_SPECIMENS, FEW_SPECIMENS_SPREAD, LARGEST_RESIDUAL } from './curve'
import { ASSUMED_TENSION, ASSUMED_TENSION_LOW } from './load-curve'
import { testRepeats, type Repeat } from './repeats'
import { largestReading, testReadings } from './test'
import type { LayerCloth, LoadCurve, StretchFigures, StretchReading, StretchSpecimen, StretchTest } from './types'

/** The figures of a test that open their working. */
export type TestFigure = 'stretch' | 'growth' | 'recovery' | 'testTension'

const SOURCE = 'formulas of the ASTM D3107 and EN 14704-1 kind (read)'
const PERCENT = 100

const TEST_LOAD = 'The test load is the largest that every specimen was read at; where they share none, each one’s own largest.'

const FORMULA: Readonly<Record<TestFigure, { readonly title: string; readonly formula: string; readonly notes: readonly string[] }>> = {
  stretch: {
    title: 'Stretch at the test load',
    formula: 'stretch = 100 (L - L0) / L0',
    notes: [TEST_LOAD, 'Read after the hold at each load: read at once it is less, because the cloth goes on giving.'],
  },
  growth: {
    title: 'Growth after the rest',
    formula: 'growth = 100 (Lr - L0) / L0',
    notes: ['Minutes of load stand here for hours of wear: in wear it grows more.'],
  },
  recovery: {
    title: 'Recovery after the rest',
    formula: 'recovery = 100 (Lmax - Lr) / (Lmax - L0)',
    notes: ['Minutes of load stand here for hours of wear: in wear it recovers less.'],
  },
  testTension: {
    title: 'Tension at the test load',
    formula: 'T = F / w',
    notes: [
      TEST_LOAD,
      'A free strip narrows as it is pulled and boned cloth cannot: in the garment the tension is 1.1 to 1.3 times higher.',
      'In hours a worn garment gives up about a quarter of its tension.',
    ],
  },
}

type InputSymbol = 'L0' | 'L' | 'Lmax' | 'Lr' | 'F' | 'w'

const NEEDS: Readonly<Record<TestFigure, readonly InputSymbol[]>> = {
  stretch: ['L0', 'L'],
  growth: ['L0', 'Lr'],
  recovery: ['L0', 'Lmax', 'Lr'],
  testTension: ['F', 'w'],
}

type Read = (one: StretchSpecimen, at: StretchReading | null) => number | null
const READ: Readonly<Record<InputSymbol, { readonly label: string; readonly unit: 'mm' | 'N'; readonly of: Read }>> = {
  L0: { label: 'between the marks at rest', unit: 'mm', of: (one) => one.gauge },
  L: { label: 'at the test load', unit: 'mm', of: (_, at) => at?.length ?? null },
  Lmax: { label: 'at its largest load', unit: 'mm', of: (one) => largestReading(one)?.length ?? null },
  Lr: { label: 'after the rest', unit: 'mm', of: (one) => one.restLength },
  F: { label: 'test load, hook and clamp counted', unit: 'N', of: (_, at) => at?.load ?? null },
  w: { label: 'width of the strip', unit: 'mm', of: (one) => one.width },
}
function spreadNotes(repeat: Repeat | null, scale: number, unit: string): readonly string[] {
  if (!repeat || repeat.deviation === null) return ['One specimen was read: how far the lot spreads is not known from it.']
  const said = (value: number) => `${(value * scale).toFixed(unit === '%' ? 1 : 2)} ${unit}`
  return [
    `The mean of ${repeat.count} specimens, between ${said(repeat.least)} and ${said(repeat.most)}; standard deviation ${said(repeat.deviation)}.`,
  ]
}

function labelWorking(test: Extract<StretchTest, { readonly kind: 'label' }>): Working {
  const { ruler } = test
  return {
    title: ruler ? 'Stretch of a ruler pull' : 'Stretch, as the label says',
    formula: ruler ? 'stretch = 100 (L - L0) / L0' : 'no test: the stretch is taken as given',
    inputs: ruler
      ? [
          { symbol: 'L0', label: 'between the marks at rest', value: ruler.rest, unit: 'mm', from: 'measured' },
          { symbol: 'L', label: 'drawn by hand', value: ruler.drawn, unit: 'mm', from: 'measured' },
        ]
      : [{ symbol: 'e', label: 'stretch from the label', value: test.stretch * PERCENT, unit: 'percent', from: 'assumed' }],
    result: { value: test.stretch * PERCENT, unit: 'percent' },
    source: ruler ? 'the trade’s ruler test (read); the hand’s load is unknown' : 'the label; the load is unknown',
    notes: [
      `Between ${ASSUMED_TENSION_LOW / 100} and ${ASSUMED_TENSION / 100} N/cm is assumed at that stretch; the cut is solved at ${ASSUMED_TENSION / 100}, so it presses no more than asked.`,
      'Pull a strip to know the hold.',
    ],
  }
}

/** The working behind a figure of a stretch test, means over the specimens, with their spread; null where it was not read. */
export function testWorking(test: StretchTest, figures: StretchFigures, figure: TestFigure): Working | null {
  const value = figures[figure]
  if (value === null) return null
  if (test.kind === 'label') return figure === 'stretch' ? labelWorking(test) : null
  const { title, formula, notes } = FORMULA[figure]
  const at = testReadings(test.specimens)
  const inputs = NEEDS[figure].flatMap((symbol) =>
    test.specimens.flatMap((specimen, index): readonly WorkingInput[] => {
      const read = READ[symbol].of(specimen, at[index]!)
      const { label, unit } = READ[symbol]
      return read === null
        ? []
        : [{ symbol: `${symbol} ${index + 1}`, label: `${label}, specimen ${index + 1}`, value: read, unit, from: 'measured' }]
    }),
  )
  const inPercent = figure !== 'testTension'
  const repeat = testRepeats(test)[figure]
  return {
    title,
    formula,
    inputs,
    result: { value: inPercent ? value * PERCENT : value, unit: inPercent ? 'percent' : 'N/m' },
    source: SOURCE,
    notes: [...spreadNotes(repeat, inPercent ? PERCENT : 1 / 100, inPercent ? '%' : 'N/cm'), ...notes],
  }
}

/** The figures of a load curve and its limits that open their working. */
export type CurveFigure = 'residual' | 'spread' | 'testedTo' | 'wearLimit' | 'pullOnLimit'

const ratioInput = (symbol: string, label: string, value: number, from: WorkingInput['from']): WorkingInput => ({
  symbol,
  label,
  value,
  unit: 'ratio',
  from,
})

const countInput = (symbol: string, label: string, value: number): WorkingInput => ({
  symbol,
  label,
  value,
  unit: 'count',
  from: 'measured',
})

function spreadWorking(curve: LoadCurve): Working {
  const few = curve.specimens < ENOUGH_SPECIMENS
  return {
    title: 'Spread of the cloth',
    formula: few ? 's as set for fewer than three specimens' : 's = standard deviation / mean of the specimens’ tensions',
    inputs: [
      countInput('n', 'specimens', curve.specimens),
      ...(few ? [ratioInput('s', 'for fewer than three', curve.spread, 'setting')] : []),
    ],
    result: { value: curve.spread * PERCENT, unit: 'percent' },
    source: few
      ? `a setting of the workroom, ${FEW_SPECIMENS_SPREAD * PERCENT} % unless tightened; without a source`
      : 'derived: root mean square of its values at a quarter, half, three quarters and all of the strain that every specimen reached',
    notes: [
      'The band of a hold or a cut is the ring solved with every curve times 1 - 2 s and times 1 + 2 s.',
      'It holds the spread of the cloth only, not the errors of the model.',
    ],
  }
}

/** Strains nearer than this are the same. */
const SAME = 1e-9

/** The working behind the residual, the spread, the tested range and the two strain limits of a tested cloth. */
export function curveFigureWorking(
  cloth: Pick<LayerCloth, 'curve' | 'figures' | 'wearLimit' | 'pullOnLimit'>,
  figure: CurveFigure,
): Working {
  const { curve, figures } = cloth
  const stretch = ratioInput('e', 'tested stretch', figures.stretch, curve.kind === 'assumed' ? 'assumed' : 'measured')
  const tested = ratioInput('e max', 'tested to', curve.testedTo, curve.kind === 'assumed' ? 'assumed' : 'measured')
  const range = 'Beyond the tested range the curve goes on, and every figure that uses it says extrapolated.'
  switch (figure) {
    case 'spread':
      return spreadWorking(curve)
    case 'residual':
      return {
        title: 'Residual of the load curve',
        formula: 'root mean square of (curve - reading) / largest tension read',
        inputs: [countInput('n', 'readings', curve.points.length), countInput('specimens', 'specimens', curve.specimens)],
        result: { value: curve.residual * PERCENT, unit: 'percent' },
        source: `derived; above ${LARGEST_RESIDUAL * PERCENT} % of a e + b e³ a monotone cubic through the means is taken (a setting)`,
        notes: ['It holds the scatter between specimens too: three unlike specimens leave a residual under the best of curves.'],
      }
    case 'testedTo':
      return {
        title: 'Tested range',
        formula: 'e max = largest (L - L0) / L0 read under load',
        inputs: [stretch],
        result: { value: curve.testedTo * PERCENT, unit: 'percent' },
        source: SOURCE,
        notes: [range],
      }
    case 'wearLimit': {
      const found = Math.abs(cloth.wearLimit - WEAR_SHARE * figures.stretch) > SAME
      return {
        title: 'Wear limit',
        formula: found ? 'u = min(strain up to which recovery is acceptable, e max)' : `u = ${WEAR_SHARE} e`,
        inputs: found ? [ratioInput('u', 'recovery acceptable up to', cloth.wearLimit, 'measured'), tested] : [stretch],
        result: { value: cloth.wearLimit * PERCENT, unit: 'percent' },
        source: found ? 'the workroom’s own test' : 'a setting without a source; common practice',
        notes: ['A cut is never solved beyond it, whatever hold is asked for.'],
      }
    }
    case 'pullOnLimit':
      return {
        title: 'Pull-on limit',
        formula: `p = min(${PULL_ON_SHARE} e, e max)`,
        inputs: [stretch, tested],
        result: { value: cloth.pullOnLimit * PERCENT, unit: 'percent' },
        source: 'a setting without a source; common practice',
        notes: ['For the seconds of getting in and out. Seams that run along a level may stretch less.'],
      }
  }
}
