import type { MeasuredValues, MeasurementKey } from './types'

/** How one measurement that nobody took is estimated. Lengths mm, slope degrees. */
interface BodyEstimate {
  readonly needs: readonly MeasurementKey[]
  /** In words and figures, as it is shown. */
  readonly formula: string
  readonly source: string
  readonly work: (...given: number[]) => number
}

/** From the bust point down to the natural waist, on the front of the body, mm. Assumption of the drafting notes. */
const BUST_POINT_TO_WAIST = 157

const ASSUMED = 'assumption of the draft'
const CHART = 'line through the ready size chart'

/** Neck base girth by regression on ANSUR II (2012) women, mm. */
export const estimateNeckBaseGirth = (bustGirth: number, hipGirth: number, stature: number): number =>
  108.3 + 0.1124 * bustGirth + 0.0439 * hipGirth + 0.0685 * stature

/** Estimates of what a measuring leaves out. Each is shown as an estimate wherever it is used. */
const BODY_ESTIMATES = {
  frontWaistLength: {
    needs: ['neckShoulderToBustPoint'],
    formula: `neck-shoulder point to bust point + ${BUST_POINT_TO_WAIST} mm`,
    source: ASSUMED,
    work: (length) => length + BUST_POINT_TO_WAIST,
  },
  neckShoulderToBustPoint: {
    needs: ['frontWaistLength'],
    formula: `front waist length − ${BUST_POINT_TO_WAIST} mm`,
    source: ASSUMED,
    work: (length) => length - BUST_POINT_TO_WAIST,
  },
  bustPointDistance: {
    needs: ['bustGirth'],
    formula: '.215 × bust girth',
    source: 'tables from memory give .21 to .22',
    work: (bust) => 0.215 * bust,
  },
  bustPointToUnderbust: { needs: [], formula: '75 mm, assumed', source: ASSUMED, work: () => 75 },
  shoulderSlope: { needs: [], formula: '21°, assumed', source: 'handbooks from memory say 18 to 25', work: () => 21 },
  acrossFront: {
    needs: ['bustGirth', 'acrossBack'],
    formula: '.356 × bust girth + 9.4 mm, at most across back − 20 mm',
    source: CHART,
    work: (bust, back) => Math.min(0.356 * bust + 9.4, back - 20),
  },
  highHipGirth: {
    needs: ['waistGirth', 'hipGirth'],
    formula: 'waist + .62 × (hip − waist)',
    source: CHART,
    work: (waist, hip) => waist + 0.62 * (hip - waist),
  },
  armscyeGirth: { needs: ['bustGirth'], formula: '.41 × bust girth', source: ASSUMED, work: (bust) => 0.41 * bust },
  neckBaseGirth: {
    needs: ['bustGirth', 'hipGirth', 'stature'],
    formula: '108.3 mm + .1124 × bust girth + .0439 × hip girth + .0685 × stature',
    source: 'regression on ANSUR II (2012) women',
    work: estimateNeckBaseGirth,
  },
} as const satisfies Partial<Record<MeasurementKey, BodyEstimate>>

export type EstimatedKey = keyof typeof BODY_ESTIMATES

/** A measured value that can be used: finite and above zero; else nothing. */
export function measuredValue(measured: MeasuredValues, key: MeasurementKey): number | undefined {
  const own = measured[key]?.value
  return own !== undefined && Number.isFinite(own) && own > 0 ? own : undefined
}

export interface Estimate {
  /** mm, or degrees for the shoulder slope. */
  readonly value: number
  readonly formula: string
  readonly source: string
}

/** What stands in for a measurement that nobody took; null where there is no estimate, or what it hangs on is not measured either. */
export function estimateOf(key: MeasurementKey, measured: MeasuredValues): Estimate | null {
  const entry = (BODY_ESTIMATES as Partial<Record<MeasurementKey, BodyEstimate>>)[key]
  if (!entry) return null
  const given = entry.needs.map((one) => measuredValue(measured, one))
  if (!given.every((one) => one !== undefined)) return null
  return { value: entry.work(...given), formula: entry.formula, source: entry.source }
}
