import { cautions } from '../cautions/registry'
import type { Caution } from '../cautions/types'
import type { Mm, Pascal } from '../units/brand'
import { mm, pascal } from '../units/brand'
import { mmHgToPascal } from '../units/convert'
import type { WearerFlags } from './types'

/** Under this from bust to hip in pregnancy, and over the breast while nursing, Pa. Practice made careful: the end of the light band. */
export const TENDER_CAP = pascal(400)
/** At most this for reflux, breathing or circulation trouble and children, Pa: the end of the easy band. */
export const CAREFUL_CAP = pascal(1300)
/** At the waist where no age is known, mmHg. */
export const UNKNOWN_AGE_MMHG = 15
/** A measuring older than this in pregnancy is asked for again, days. A setting. */
export const PREGNANCY_MEASURING_DAYS = 14

/** "Over the breast": every ring from the top edge to the underbust. */
export const BREAST_LEVELS: readonly string[] = ['top-edge', 'upper-bust', 'bust', 'underbust']

/** Tolerable waistband pressure by age in whole years, Pa: -.287 age + 32.37 mmHg; 15 mmHg where no age is known. Never below 0. Source: J. Home Econ. Jpn series (read). */
export function waistLimit(age: number | null): Pascal {
  return mmHgToPascal(age === null ? UNKNOWN_AGE_MMHG : Math.max(0, -0.287 * age + 32.37))
}

/** What a wearer's record allows at one level. */
export interface WearerLimits {
  /** Highest pressure, at rest and at a deep breath, at the upper end of its band, Pa; null: no cap. */
  readonly cap: Pascal | null
  /** Why, in words for owner and drafter only; empty without a cap. */
  readonly why: readonly string[]
  /** False: no bone, wire or hard edge at this level. */
  readonly rigidAllowed: boolean
}

/** The lowest cap that a wearer's flags and age put on a level, and why. `level` is the ring's level. */
export function wearerLimits(flags: WearerFlags, level: string): WearerLimits {
  const caps: { readonly cap: Pascal; readonly why: string }[] = []
  const overBreast = BREAST_LEVELS.includes(level)
  if (flags.pregnancy) caps.push({ cap: TENDER_CAP, why: 'pregnancy' })
  if (flags.nursing && overBreast) caps.push({ cap: TENDER_CAP, why: 'nursing' })
  if (flags.reflux) caps.push({ cap: CAREFUL_CAP, why: 'reflux' })
  if (flags.breathing) caps.push({ cap: CAREFUL_CAP, why: 'breathing' })
  if (flags.circulation) caps.push({ cap: CAREFUL_CAP, why: 'circulation' })
  if (flags.child) caps.push({ cap: CAREFUL_CAP, why: 'child' })
  if (level === 'waist') caps.push({ cap: waistLimit(flags.age), why: flags.age === null ? 'age not known' : `age ${flags.age}` })
  const cap = caps.reduce<Pascal | null>((least, one) => (least === null || one.cap < least ? one.cap : least), null)
  return { cap, why: caps.filter((one) => one.cap === cap).map((one) => one.why), rigidAllowed: !(flags.nursing && overBreast) }
}

/** Flags that ask for a licensed practitioner's agreement, in words for owner and drafter. */
export function flagsInWords(flags: WearerFlags): readonly string[] {
  return (['pregnancy', 'nursing', 'reflux', 'breathing', 'circulation', 'child'] as const).filter((flag) => flags[flag])
}

/** Whether any flag stands. Age alone is none. */
export const isFlagged = (flags: WearerFlags): boolean => flagsInWords(flags).length > 0

/** What a ring says that a wearer's limits are held against: upper ends of its bands, Pa, rigid widths all round, mm. */
export interface WornRing {
  readonly level: string
  readonly name: string
  readonly upperAtRest: Pascal
  readonly upperInBreath: Pascal
  /** By how much rigid layers stop the ring before a breath is full, mm; the hold then has no upper end. */
  readonly breathShort?: Mm
  readonly rigid: Mm
}

/** Part of a cap that a ring may pass it by: the cut is solved to meet the cap, and the widths on the pieces settle within .5 % of the tension. */
const CAP_TOLERANCE = 0.005

/** Stops and cautions of a wearer's limits on the rings of a garment. `measuringDays`: age of the measuring, null when not known. */
export function wearerCautions(flags: WearerFlags, rings: readonly WornRing[], measuringDays: number | null): readonly Caution[] {
  const found: Caution[] = []
  if (isFlagged(flags) && !flags.practitionerAgreed) {
    found.push(cautions.wearerNotAgreed({ kind: 'garment' }, { why: flagsInWords(flags).join(', ') }))
  }
  if (flags.pregnancy && measuringDays !== null && measuringDays > PREGNANCY_MEASURING_DAYS) {
    found.push(cautions.wearerMeasuringOld({ kind: 'garment' }, { days: measuringDays, limit: PREGNANCY_MEASURING_DAYS }))
  }
  if (flags.age === null && rings.some((ring) => ring.level === 'waist')) {
    found.push(cautions.wearerAgeUnknown({ kind: 'ring', level: 'waist' }, {}))
  }
  if (flags.child) found.push(cautions.cordsNearChildren({ kind: 'garment' }, {}))
  for (const ring of rings) {
    const place = { kind: 'ring', level: ring.level } as const
    const limits = wearerLimits(flags, ring.level)
    if (limits.cap !== null) {
      const why = limits.why.join(', ')
      if (ring.upperAtRest > limits.cap * (1 + CAP_TOLERANCE)) {
        found.push(cautions.wearerCapAtRest(place, { ring: ring.name, pressure: ring.upperAtRest, limit: limits.cap, why }))
      }
      if (ring.upperInBreath > limits.cap * (1 + CAP_TOLERANCE)) {
        found.push(cautions.wearerCapInBreath(place, { ring: ring.name, pressure: ring.upperInBreath, limit: limits.cap, why }))
      }
    }
    if (limits.cap !== null && ring.breathShort) {
      found.push(cautions.wearerBreathStopped(place, { ring: ring.name, short: ring.breathShort }))
    }
    if (!limits.rigidAllowed && ring.rigid > mm(0))
      found.push(cautions.wearerRigidOverBreast(place, { ring: ring.name, rigid: ring.rigid }))
  }
  return found
}
