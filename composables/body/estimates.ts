import { measurementEntry } from '#shared/domain/body/catalogue'
import {
  BUST_POINT_TO_UNDERBUST,
  estimateAcrossFront,
  estimateArmscyeGirth,
  estimateBustPointDistance,
  estimateFrontWaistLength,
  estimateHighHipGirth,
  estimateNeckBaseGirth,
  estimateNeckShoulderToBustPoint,
  SHOULDER_SLOPE,
} from '#shared/domain/body/estimates'
import type { MeasuredValues, MeasurementKey } from '#shared/domain/body/types'
import { mm } from '#shared/domain/units/brand'
import { fixedDecimal, formatDegrees, formatLength, formatMass } from '#shared/domain/units/format'

export interface Estimate {
  readonly value: number
  /** How it is worked out, in words and figures. */
  readonly formula: string
}

/** What stands in for a measurement nobody has taken, once what it hangs on is there; always shown as an estimate. */
export function estimateOf(key: MeasurementKey, values: MeasuredValues): Estimate | null {
  const at = (one: MeasurementKey) => values[one]?.value
  const of = (needs: readonly MeasurementKey[], formula: string, work: (given: number[]) => number): Estimate | null => {
    const given = needs.map(at)
    return given.every((one): one is number => one !== undefined) ? { value: work(given), formula } : null
  }
  switch (key) {
    case 'frontWaistLength':
      return of(['neckShoulderToBustPoint'], 'neck-shoulder point to bust point + 157 mm', ([length]) => estimateFrontWaistLength(length!))
    case 'neckShoulderToBustPoint':
      return of(['frontWaistLength'], 'front waist length − 157 mm', ([length]) => estimateNeckShoulderToBustPoint(length!))
    case 'bustPointDistance':
      return of(['bustGirth'], '.215 × bust girth', ([bust]) => estimateBustPointDistance(bust!))
    case 'bustPointToUnderbust':
      return { value: BUST_POINT_TO_UNDERBUST, formula: '75 mm, assumed' }
    case 'shoulderSlope':
      return { value: SHOULDER_SLOPE, formula: '21°, assumed' }
    case 'acrossFront':
      return of(['bustGirth', 'acrossBack'], '.356 × bust girth + 9.4 mm, at most across back − 20 mm', ([bust, back]) =>
        estimateAcrossFront(bust!, back!),
      )
    case 'highHipGirth':
      return of(['waistGirth', 'hipGirth'], 'waist + .62 × (hip − waist)', ([waist, hip]) => estimateHighHipGirth(waist!, hip!))
    case 'armscyeGirth':
      return of(['bustGirth'], '.41 × bust girth', ([bust]) => estimateArmscyeGirth(bust!))
    case 'neckBaseGirth':
      return of(['bustGirth', 'hipGirth', 'stature'], 'line through surveyed bust, hip and stature', ([bust, hip, stature]) =>
        estimateNeckBaseGirth(bust!, hip!, stature!),
      )
    default:
      return null
  }
}

/** A stored measurement as the person reads it. */
export function sayMeasured(key: MeasurementKey, value: number, unit: 'cm' | 'in'): string {
  switch (measurementEntry(key).unit) {
    case 'length':
      return formatLength(mm(value), unit)
    case 'degree':
      return formatDegrees(value)
    case 'mass':
      return formatMass(value)
    case 'year':
      return `${fixedDecimal(value, 0)} years`
  }
}
