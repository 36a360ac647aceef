import type { Mm } from '../units/brand'

/** Measurements carry their ISO 8559-1 name in the catalogue; the key is what is stored. */
export type MeasurementKey =
  | 'bustGirth'
  | 'underbustGirth'
  | 'waistGirth'
  | 'navelWaistGirth'
  | 'highHipGirth'
  | 'hipGirth'
  | 'upperBustGirth'
  | 'neckBaseGirth'
  | 'shoulderLength'
  | 'shoulderSlope'
  | 'acrossBack'
  | 'acrossFront'
  | 'backWaistLength'
  | 'frontWaistLength'
  | 'neckShoulderToBustPoint'
  | 'sideWaistLength'
  | 'waistToHip'
  | 'bustPointDistance'
  | 'bustPointToUnderbust'
  | 'frontBustArc'
  | 'armscyeGirth'
  | 'trunkGirth'
  | 'shoulderGirth'
  | 'headGirth'
  | 'handGirth'
  | 'thighGirth'
  | 'upperArmGirth'
  | 'elbowGirth'
  | 'wristGirth'
  | 'armLength'
  | 'bustBreadth'
  | 'bustDepth'
  | 'waistBreadth'
  | 'waistDepth'
  | 'hipBreadth'
  | 'hipDepth'
  | 'stature'
  | 'mass'
  | 'age'

/**
 * One measured value. Lengths in mm; `shoulderSlope` in degrees, `mass` in kg, `age` in years.
 * `typed` keeps what the person wrote, for the echo.
 */
export interface MeasuredValue {
  readonly value: number
  readonly typed?: string
}

export type MeasuredValues = Readonly<Partial<Record<MeasurementKey, MeasuredValue>>>

/** A body complete enough to draft: every value present, each marked measured or estimated. Lengths mm, slope degrees. */
export interface DraftBody {
  readonly values: Readonly<Record<DraftBodyKey, number>>
  readonly estimated: readonly DraftBodyKey[]
}

export type DraftBodyKey =
  | 'bustGirth'
  | 'underbustGirth'
  | 'waistGirth'
  | 'highHipGirth'
  | 'hipGirth'
  | 'neckBaseGirth'
  | 'shoulderLength'
  | 'shoulderSlope'
  | 'acrossBack'
  | 'acrossFront'
  | 'backWaistLength'
  | 'frontWaistLength'
  | 'neckShoulderToBustPoint'
  | 'sideWaistLength'
  | 'waistToHip'
  | 'bustPointDistance'
  | 'bustPointToUnderbust'
  | 'armscyeGirth'

/** What the wearer's record says that changes limits. Health data: owner and drafter only. */
export interface WearerFlags {
  readonly pregnancy: boolean
  readonly nursing: boolean
  readonly reflux: boolean
  readonly breathing: boolean
  readonly circulation: boolean
  readonly child: boolean
  /** A licensed practitioner's agreement is recorded. */
  readonly practitionerAgreed: boolean
  /** Whole years; null when not known. */
  readonly age: number | null
}

/** Levels of every body, and the top edge of a strapless bodice, which lies above the bust. */
export type LevelId = 'top-edge' | 'bust' | 'underbust' | 'waist' | 'high-hip' | 'hip'

/** A horizontal level of the body: its height over the waist line and its girth. */
export interface BodyLevel {
  readonly id: LevelId
  readonly name: string
  readonly y: Mm
  readonly girth: Mm
  readonly girthEstimated: boolean
  /** Set when a level had to be moved to be drawn, e.g. the bust under the underarm. */
  readonly movedBy: Mm
}
