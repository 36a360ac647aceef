import type { DraftBody, LevelId } from '../body/types'
import type { Path, Point } from '../geometry/types'
import type { Mm } from '../units/brand'

export type PieceId = 'front-centre' | 'side-front' | 'side-back' | 'back-centre'
export type EdgeId = 'centre' | 'neckline' | 'shoulder' | 'armhole' | 'princess' | 'side' | 'hem'

export type CentreKind = 'fold' | 'seam' | 'lacing'
export type EdgeKind = 'seam' | 'fold' | 'opening' | 'finished'

/** What the drafter chooses about the bodice, apart from the body and the ease. */
export interface BodiceStyle {
  readonly centreFront: CentreKind
  readonly centreBack: CentreKind
  /** Level at which the bodice ends, and how far below it (negative: above). */
  readonly hem: { readonly level: 'waist' | 'high-hip' | 'hip'; readonly below: Mm }
  /** Lowered from the neck base at the centre; 0 is the neck base itself. */
  readonly necklineFrontDepth: Mm
  readonly necklineBackDepth: Mm
  /** Taken off the shoulder at the neck. */
  readonly necklineWidth: Mm
  /** Where the princess seam meets the shoulder: share of it from the neck. */
  readonly princessAt: number
  /** Wedge shares of the half front; a fold or lacing centre takes 0 whatever stands here. Sum 1. */
  readonly frontShares: { readonly centre: number; readonly princess: number; readonly side: number }
  readonly backShares: { readonly centre: number; readonly princess: number; readonly side: number }
  /** v: multiplies every height; 1 where bones hold the length. */
  readonly verticalFactor: number
  /** Degrees; null takes the angle that the lengths ask for. */
  readonly bustAngle: number | null
  readonly underarmDrop: Mm
  readonly allowances: Readonly<Record<'seam' | 'centre' | 'shoulder' | 'neckline' | 'armhole' | 'hem', Mm>>
}

/** Half widths on the pieces at one level, cloth and rigid parts, without the gap. */
export interface LevelWidths {
  readonly level: LevelId
  readonly front: Mm
  readonly back: Mm
  /** Whole gap at the centre front or back; an edge with a gap lies at x = gap / 2. */
  readonly gapFront: Mm
  readonly gapBack: Mm
}

export interface DraftInput {
  readonly body: DraftBody
  readonly style: BodiceStyle
  /** One entry for each body level: bust, underbust, waist, high hip, hip. */
  readonly widths: readonly LevelWidths[]
}

/** A named point of an edge. Its identity is piece, edge and name, never an index. */
export interface EdgeNode {
  /** `neck`, `tip`, `underarm`, `bust`, `waist`, `across`, `hem`, ... unique along the edge. */
  readonly name: string
  readonly at: Point
  readonly level: LevelId | null
}

export interface Notch {
  readonly at: Point
  /** Unit vector into the piece. */
  readonly inward: Point
  readonly kind: 'single' | 'double'
  /** Pairs the notch with its fellow on the mate. */
  readonly pair: string
}

/** One edge of a piece. `path[i]` runs from `nodes[i]` to `nodes[i + 1]`; edges follow each other counter-clockwise. */
export interface PieceEdge {
  readonly id: EdgeId
  readonly kind: EdgeKind
  readonly nodes: readonly EdgeNode[]
  readonly path: Path
  readonly mate: { readonly piece: PieceId; readonly edge: EdgeId } | null
  readonly allowance: Mm
  readonly notches: readonly Notch[]
}

/**
 * A piece as cut for one half of the body. Frame: x away from the body's centre line, y up, waist at 0; front and back
 * pieces both have their centre on the left. The other half mirrors it.
 */
export interface DraftPiece {
  readonly id: PieceId
  readonly name: string
  readonly zone: 'front' | 'back'
  readonly edges: readonly PieceEdge[]
  readonly grain: { readonly from: Point; readonly to: Point }
  /** Direction of greatest stretch, round the body. */
  readonly stretch: { readonly from: Point; readonly to: Point }
  /** Where each level crosses the piece. */
  readonly levels: readonly { readonly level: LevelId; readonly from: Point; readonly to: Point; readonly width: Mm }[]
  readonly labelAt: Point
  readonly onFold: boolean
  /** Pieces to cut of one layer: 1 on the fold, else 2 (a pair). */
  readonly quantity: number
  /** Offset outline, closed, counter-clockwise. */
  readonly cuttingLine: readonly Point[]
}

/** A seam of two mates and how they compare. */
export interface SeamComparison {
  readonly name: string
  readonly a: { readonly piece: PieceId; readonly edge: EdgeId; readonly length: Mm }
  readonly b: { readonly piece: PieceId; readonly edge: EdgeId; readonly length: Mm }
  /** a - b. */
  readonly difference: Mm
}

/** What the draft had to decide or hold, each said on the screen with its millimetres. */
export interface DraftFinding {
  readonly code:
    | 'bust-angle-negative'
    | 'bust-angle-large'
    | 'bust-angle-held'
    | 'bust-level-moved'
    | 'across-front-held'
    | 'across-back-held'
    | 'armhole-aim-off'
    | 'side-seam-moved'
    | 'piece-narrow'
  readonly piece: PieceId | null
  readonly edge: EdgeId | null
  readonly value: number
  readonly unit: 'mm' | 'degree'
  readonly message: string
}

export interface Draft {
  readonly pieces: readonly DraftPiece[]
  readonly seams: readonly SeamComparison[]
  readonly findings: readonly DraftFinding[]
  /** Degrees. */
  readonly bustAngle: number
  readonly armhole: { readonly length: Mm; readonly aim: Mm }
  /** Frame points before styling, for measuring the draft back as a body (invariant 7). */
  readonly frame: Readonly<Record<string, Point>>
}

/** A point or curve handle named by role. */
export interface PointRole {
  readonly piece: PieceId
  readonly edge: EdgeId
  readonly node: string
  /** The curve handle before or after the node along the edge; absent for the node itself. */
  readonly handle?: 'before' | 'after'
}

export type { Alteration, GirthAlteration, LengthAlteration, MoveAlteration, SeamRole } from './alteration'
