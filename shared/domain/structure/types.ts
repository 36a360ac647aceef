import type { LevelId } from '../body/types'
import type { EdgeId, PieceId } from '../draft/types'
import type { Path, Point } from '../geometry/types'
import type { Mm } from '../units/brand'

export type StockKind = 'flat-steel' | 'spiral-steel' | 'plastic' | 'wire'

/** What bones are cut from. */
export interface BoneStock {
  readonly id: string
  readonly name: string
  readonly kind: StockKind
  readonly width: Mm
  readonly thickness: Mm
  /** Young's modulus, GPa; a measured stiffness goes before it. */
  readonly modulus: number
  /** Bending stiffness across its thickness where it was measured, N m²; null computes it. */
  readonly stiffness: number | null
  readonly rusts: boolean
  /** Least radius to which it bends within the cloth, edgeways, mm. */
  readonly leastRadius: Mm
  /** Lengths it is bought in, mm; empty: cut from the roll. */
  readonly lengths: readonly Mm[]
}

/** Where a bone ends: so far inside the edge it runs towards, or above (below 0: under) a level. */
export type BoneEnd =
  { readonly kind: 'edge'; readonly clear: Mm } | { readonly kind: 'level'; readonly level: LevelId; readonly above: Mm }

/** Where a bone lies, by roles, so that it survives a redraft. */
export type BonePlace =
  /** Along a seam, within one of its edges. */
  | { readonly kind: 'seam'; readonly piece: PieceId; readonly edge: EdgeId }
  /** Up a panel at a share of its width from the edge nearer the centre, 0 to 1. */
  | { readonly kind: 'panel'; readonly piece: PieceId; readonly at: number }
  /** From one share of the width at a level to another at another, straight or bowed (mm, towards the side above 0). */
  | {
      readonly kind: 'free'
      readonly piece: PieceId
      readonly from: { readonly level: LevelId; readonly at: number }
      readonly to: { readonly level: LevelId; readonly at: number }
      readonly bow: Mm
    }

/** A bone or wire as the drafter places it. Once in each half of the body, unless it lies on a centre fold or centre seam. */
export interface Bone {
  readonly id: string
  readonly name: string
  /** Id of the stock. */
  readonly stock: string
  readonly place: BonePlace
  readonly bottom: BoneEnd
  readonly top: BoneEnd
  /** Id of the one layer that its channel is sewn to; null: through all of them. */
  readonly channelOn: string | null
  /** The layers between which it lies, counted from the outside: after how many of them. Null: inside all. */
  readonly under: number | null
  readonly on: boolean
}

/** A closure at a centre, beyond what the style says of its kind. */
export interface ClosureChoice {
  /** Rigid width of it, both sides together, mm. */
  readonly rigid: Mm
  /** Distance between hooks, studs or eyelets, mm. */
  readonly pitch: Mm
  /** Eyelets closer at the waist, mm; lacing only. */
  readonly waistPitch: Mm
  /** Cord left free at each end, mm; lacing only. */
  readonly ends: Mm
}

/** Everything of a garment that is stiff: kept in its document. */
export interface StructureChoice {
  readonly bones: readonly Bone[]
  readonly closures: { readonly front: ClosureChoice | null; readonly back: ClosureChoice | null }
  /** Stocks of the workroom that its bones use, as they were when the bones were laid. */
  readonly stock?: readonly BoneStock[]
}

/** Why a bone cannot lie where it is asked for. */
export interface BoneFault {
  readonly bone: string
  readonly code: 'piece-gone' | 'level-missing' | 'too-short' | 'stock-gone'
  readonly message: string
  readonly todo: string
}

/** How a bone crosses a level. */
export interface BoneCrossing {
  readonly level: LevelId
  readonly at: Point
  /** Radians off upright. */
  readonly tilt: number
  /** Channel width over the cosine of its tilt, mm: what it takes of the level, once. */
  readonly width: Mm
}

/** A bone as it lies on a draft. Frame of its piece, mm, from the bottom up. */
export interface LaidBone {
  readonly id: string
  readonly name: string
  readonly stock: BoneStock
  readonly piece: PieceId
  readonly zone: 'front' | 'back'
  readonly path: Path
  /** Of the channel, along the curve. */
  readonly channel: Mm
  readonly channelWidth: Mm
  /** To cut: the channel less the clearance at both tips. */
  readonly cut: Mm
  /** How often it is cut: 1 at a centre, else 2. */
  readonly count: 1 | 2
  /** Lies in a seam whose other edge is in this half as well: front and back take half each. */
  readonly inSideSeam: boolean
  readonly crossings: readonly BoneCrossing[]
  /** Tightest radius of its curve within the cloth, mm. Infinite for a straight one. */
  readonly radius: number
  readonly channelOn: string | null
  readonly under: number | null
}
