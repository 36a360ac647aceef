import type { Mm, Newton, NewtonPerMetre, Pascal, Strain } from '../units/brand'

export type ClothDirection = 'lengthwise' | 'crosswise' | 'bias'
export type ClothState = 'dry' | 'wet'

/** One reading of a strip under load: L at the load, after the dwell. */
export interface StretchReading {
  readonly load: Newton
  readonly length: Mm
  /** `return` when the load was being taken off: a garment holds on the return. */
  readonly on: 'loading' | 'return'
}

export interface StretchSpecimen {
  readonly width: Mm
  readonly gauge: Mm
  readonly readings: readonly StretchReading[]
  /** Length after release and rest; null when it was not read. */
  readonly restLength: Mm | null
}

/** How a strip was pulled, by the name of the method. */
export type TestMethod = 'workroom strip' | 'EN ISO 20932-1' | 'ASTM D2594' | 'ASTM D3107' | 'ASTM D4964' | 'other'

/** What is kept of a machine's file beside the readings taken from it. */
export interface TensileRecord {
  readonly name: string
  readonly rows: number
  readonly cycles: number
  readonly hasReturn: boolean
  /** Loadings before the last, for drawing. */
  readonly earlier: readonly (readonly { readonly strain: Strain; readonly tension: NewtonPerMetre }[])[]
}

/** What pulled the strip. */
export type PullWay = 'weights' | 'one load' | 'spring scale' | 'machine'

/** How a test was done, as far as it was noted. Of it only the angle and the acceptable strain are computed with. */
export interface TestProtocol {
  readonly method?: TestMethod
  readonly methodNote?: string
  /** Seconds each load was held before its length was read. */
  readonly dwell?: number
  /** Minutes from the release to the last reading. */
  readonly rest?: number
  /** Typed direction of the strip, degrees from the lengthwise, 0 to 90; `direction` is then the name nearest to it. */
  readonly angle?: number
  /** The strain up to which the workroom still found the recovery acceptable, by letting strips go from further and further. */
  readonly acceptableStrain?: Strain
}

/** A stretch test of one cloth in one direction and state, as the workroom entered it. */
export type StretchTest = TestProtocol &
  (
    | {
        readonly kind: 'strip'
        readonly direction: ClothDirection
        readonly state: ClothState
        readonly specimens: readonly StretchSpecimen[]
        /** Absent in tests older than the choice. */
        readonly way?: PullWay
        /** One for each specimen where they were read from a tensile machine's files. */
        readonly runs?: readonly TensileRecord[]
      }
    | {
        /** Only a stretch percentage is known (label, ruler pull): the assumed case. */
        readonly kind: 'label'
        readonly direction: ClothDirection
        readonly state: ClothState
        readonly stretch: Strain
        /** Marks of a ruler pull, at rest and drawn by hand; the stretch follows from them. */
        readonly ruler?: { readonly rest: Mm; readonly drawn: Mm }
      }
  )

/**
 * Load curve T(e) of one cloth in one direction. `cubic`: a e + b e^3 with a, b >= 0. `monotone`: monotone cubic through
 * `knots` (first knot is the origin), going on with its last slope. `assumed`: as cubic, from a stretch percentage only.
 */
export interface LoadCurve {
  readonly kind: 'cubic' | 'monotone' | 'assumed'
  readonly a: NewtonPerMetre
  readonly b: NewtonPerMetre
  readonly knots: readonly { readonly strain: Strain; readonly tension: NewtonPerMetre }[]
  readonly testedTo: Strain
  /** Root mean square residual over the largest tension; 0 for assumed. */
  readonly residual: number
  /** Standard deviation over mean of the specimens' tensions; .15 with fewer than three specimens. */
  readonly spread: number
  readonly specimens: number
  /** The readings the curve was fitted to, for drawing. */
  readonly points: readonly { readonly strain: Strain; readonly tension: NewtonPerMetre; readonly specimen: number }[]
}

/** What a test says of a cloth, beside its curve. Ratios; null where it was not read. */
export interface StretchFigures {
  readonly stretch: Strain
  readonly growth: Strain | null
  readonly recovery: number | null
  readonly testTension: NewtonPerMetre | null
}

/** A cloth as a layer needs it: one direction, one state. */
export interface LayerCloth {
  readonly clothId: string
  readonly name: string
  readonly direction: ClothDirection
  /** Degrees from the lengthwise where the strip was cut at a typed angle; `direction` is then the name nearest to it. */
  readonly angle?: number
  readonly state: ClothState
  readonly curve: LoadCurve
  readonly figures: StretchFigures
  readonly thickness: Mm
  /** u: the strain at which recovery is still acceptable, else half the tested stretch. */
  readonly wearLimit: Strain
  /** p: for the seconds of getting in; .9 of the tested stretch. */
  readonly pullOnLimit: Strain
  readonly testedOn: string | null
}

export interface Layer {
  readonly id: string
  readonly label: string
  readonly cloth: LayerCloth
  readonly count: number
  /** r: cut width over the reference cut width; 1 unless meant. */
  readonly cutRatio: number
  /** A layer without stretch: it lies loose up to r - 1 and gives no further. Its load curve is not read. */
  readonly rigid?: boolean
  /** Typed direction, degrees from the lengthwise; the cloth's direction is the tested one nearest to it. */
  readonly askedAngle?: number
}

/** Layers lying side by side in one zone; their tensions add. */
export interface LayerPlan {
  readonly zone: string
  readonly layers: readonly Layer[]
  /** The state that was asked for; a layer whose cloth was not tested in it is told. */
  readonly state?: ClothState
}

/** Rigid width sewn to one layer alone, the others floating over it: a channel on the lining. Once round the body, within its segment. */
export interface SewnRigid {
  /** Id of the layer. */
  readonly layer: string
  readonly width: Mm
}

export interface RingSegment {
  readonly id: string
  readonly half: 'front' | 'back'
  readonly plan: LayerPlan
  /** Part of the half's free arc; the shares of one half sum to 1. */
  readonly share: number
  readonly sewn?: readonly SewnRigid[]
}

/** Everything a ring needs besides the mode of its solve. Widths go once round the body (both halves of it). */
export interface RingGeometry {
  readonly level: string
  readonly name: string
  readonly girth: Mm
  /** f: part of the girth in front of the side lines. */
  readonly frontShare: number
  readonly segments: readonly RingSegment[]
  readonly rigidFront: Mm
  readonly rigidBack: Mm
  readonly gapFront: Mm
  readonly gapBack: Mm
  readonly squeeze: Mm
  /** Breadth over depth of the body at the level. */
  readonly aspect: number
  readonly aspectEstimated: boolean
  /** Added to the girth at a deep breath. */
  readonly breath: Mm
}

export type RingMode =
  | { readonly solve: 'cut'; readonly hold: Pascal }
  | { readonly solve: 'tension'; readonly widths: readonly Mm[] }
  | { readonly solve: 'gap'; readonly widths: readonly Mm[]; readonly tension: NewtonPerMetre; readonly gapIn: 'front' | 'back' }

export type Governs = 'hold' | 'stretch' | 'reduction'
export type HoldBand = 'light' | 'easy' | 'firm' | 'strong' | 'stop'

export interface Interval {
  readonly low: number
  readonly high: number
}

export interface RingSegmentSolution {
  readonly id: string
  readonly half: 'front' | 'back'
  readonly zone: string
  /** Cut width round the body, both sides. */
  readonly width: Mm
  readonly strain: Strain
}

export interface RingSolution {
  readonly level: string
  readonly name: string
  readonly mode: RingMode['solve']
  readonly girth: Mm
  /** Girth after the squeeze, plus pi t: what the middle surface goes round. */
  readonly surface: Mm
  readonly tension: NewtonPerMetre
  readonly segments: readonly RingSegmentSolution[]
  readonly rigidFront: Mm
  readonly rigidBack: Mm
  readonly gapFront: Mm
  readonly gapBack: Mm
  /** Cloth and rigid widths on the pieces, without the gap. */
  readonly cut: Mm
  readonly thickness: Mm
  /** cut / girth, a figure to show. */
  readonly k: number
  /** 100 (1 - (cut + gap) / G). */
  readonly negativeEase: number
  readonly pressure: Pascal
  readonly pressureBand: Interval
  readonly cutBand: Interval
  readonly band: HoldBand
  /** At a deep breath, gap and cut unchanged. */
  readonly breathPressure: Pascal
  /** The same with every curve at the ends of its spread: a wearer's cap is held against its upper end. */
  readonly breathBand: Interval
  /** Above 0 where rigid layers stop the ring by so many mm before the breath is full: the pressure there is a least one. */
  readonly breathShort?: Mm
  readonly sidePressure: Pascal
  readonly frontPressure: Pascal
  /** Null unless the cut was solved from a hold. */
  readonly governs: Governs | null
  readonly hold: Pascal | null
  readonly assumed: boolean
  readonly extrapolated: boolean
  /** Millimetres by which the ring lies loose on the body; 0 when under tension. */
  readonly slack: Mm
  readonly aspect: number
  readonly aspectEstimated: boolean
}

/** Limits and defaults of a workroom; a workroom may tighten limits, never loosen them. */
export interface TextileSettings {
  readonly largestReduction: number
  readonly defaultHold: Pascal
  readonly fewSpecimensSpread: number
  readonly lacingGapLow: Mm
  readonly lacingGapHigh: Mm
}
