import { fail, succeed } from '../units/result'
import type { Result } from '../units/result'
import { estimateOf, measuredValue, type EstimatedKey } from './estimates'
import type { DraftBody, DraftBodyKey, MeasuredValues, MeasurementKey } from './types'

const NEEDED_WORDS: Readonly<
  Record<Exclude<DraftBodyKey, 'shoulderSlope' | 'bustPointDistance' | 'bustPointToUnderbust' | 'armscyeGirth'>, string>
> = {
  bustGirth: 'bust girth',
  underbustGirth: 'underbust girth',
  waistGirth: 'waist girth (natural)',
  highHipGirth: 'high hip girth',
  hipGirth: 'hip girth',
  neckBaseGirth: 'neck base girth',
  shoulderLength: 'shoulder length',
  acrossBack: 'across back',
  acrossFront: 'across front',
  backWaistLength: 'back waist length',
  frontWaistLength: 'front waist length',
  neckShoulderToBustPoint: 'neck-shoulder point to bust point',
  sideWaistLength: 'side waist length',
  waistToHip: 'waist to hip',
}

const ALWAYS_MEASURED = [
  'bustGirth',
  'underbustGirth',
  'waistGirth',
  'hipGirth',
  'shoulderLength',
  'acrossBack',
  'backWaistLength',
  'sideWaistLength',
  'waistToHip',
] as const satisfies readonly (keyof typeof NEEDED_WORDS)[]

type NeededKey = keyof typeof NEEDED_WORDS

function missingFrom(value: (key: MeasurementKey) => number | undefined): readonly NeededKey[] {
  const missing: NeededKey[] = ALWAYS_MEASURED.filter((key) => value(key) === undefined)
  if (value('frontWaistLength') === undefined && value('neckShoulderToBustPoint') === undefined) missing.push('neckShoulderToBustPoint')
  if (value('neckBaseGirth') === undefined && value('stature') === undefined) missing.push('neckBaseGirth')
  return missing
}

/**
 * A body complete enough to draft: what is measured, and estimates for the rest, named in `estimated`. Lengths mm, slope
 * degrees. The waist is the natural waist; one measured at the navel does not stand in for it. What has no sound estimate
 * is asked for: the problem names it (`at` holds the keys, with commas).
 */
export function completeBody(measured: MeasuredValues): Result<DraftBody> {
  const value = (key: MeasurementKey): number | undefined => measuredValue(measured, key)
  if (value('waistGirth') === undefined && value('navelWaistGirth') !== undefined) {
    return fail({
      code: 'natural-waist-missing',
      message: 'Only the waist at the navel is measured; the draft hangs from the natural waist.',
      todo: 'Tie a tape where the body bends sideways and measure the waist girth there.',
      at: 'waistGirth',
    })
  }
  const missing = missingFrom(value)
  if (missing.length > 0) {
    return fail({
      code: 'measurement-missing',
      message: `Not measured yet: ${missing.map((key) => NEEDED_WORDS[key]).join(', ')}.`,
      todo: 'Measure these before drafting.',
      at: missing.join(','),
    })
  }
  const estimated: DraftBodyKey[] = []
  const take = (key: DraftBodyKey & EstimatedKey): number => {
    const own = value(key)
    if (own !== undefined) return own
    estimated.push(key)
    return estimateOf(key, measured)!.value
  }
  const needed = (key: NeededKey): number => value(key) as number
  return succeed({
    values: {
      bustGirth: needed('bustGirth'),
      underbustGirth: needed('underbustGirth'),
      waistGirth: needed('waistGirth'),
      highHipGirth: take('highHipGirth'),
      hipGirth: needed('hipGirth'),
      neckBaseGirth: take('neckBaseGirth'),
      shoulderLength: needed('shoulderLength'),
      shoulderSlope: take('shoulderSlope'),
      acrossBack: needed('acrossBack'),
      acrossFront: take('acrossFront'),
      backWaistLength: needed('backWaistLength'),
      frontWaistLength: take('frontWaistLength'),
      neckShoulderToBustPoint: take('neckShoulderToBustPoint'),
      sideWaistLength: needed('sideWaistLength'),
      waistToHip: needed('waistToHip'),
      bustPointDistance: take('bustPointDistance'),
      bustPointToUnderbust: take('bustPointToUnderbust'),
      armscyeGirth: take('armscyeGirth'),
    },
    estimated,
  })
}
