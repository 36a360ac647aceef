import type { DraftBody, LevelId } from '../body/types'
import type { Path, Point } from '../geometry/types'
import type { Mm } from '../units/brand'

/** Seams beyond the princess seam are lettered; a letter stays with its seam whatever is added beside it. */
export type SeamLetter = 'a' | 'b' | 'c' | 'd'

/** The two parts of each half: from the centre to the princess seam, and from there to the side seam. */
export type BlockId = 'front-centre' | 'side-front' | 'side-back' | 'back-centre'

/**
 * A piece by its role. A half of one panel is `front` or `back`. A further seam beside the centre has its letter on the
 * piece away from the centre, one beside the side seam on the piece towards it: the pieces at centre and side keep theirs.
 */
export type HalfPieceId = BlockId | 'front' | 'back' | `${BlockId}-${SeamLetter}`

/** A piece of the drawn half, or of a right half that differs from it. */
export type PieceId = HalfPieceId | `right-${HalfPieceId}`

/** Seams from hem to top that part the pieces of a half. */
export type LineId = 'princess' | `seam-${SeamLetter}`

/**
 * An edge by its role. Where the princess seam of the other half or a dart parts an edge of one piece, what lies beyond
 * it from the centre is named after what parts it; `dart` is the dart's leg towards the centre, `dart-beyond` the other.
 */
export type EdgeId =
  | 'centre'
  | 'neckline'
  | 'shoulder'
  | 'armhole'
  | 'side'
  | 'hem'
  | 'top'
  | LineId
  | 'shoulder-princess'
  | 'dart'
  | 'dart-beyond'
  | 'neckline-dart'
  | 'shoulder-dart'
  | 'armhole-dart'
  | 'top-dart'

/** How a centre is closed: a fold or seam does not open. */
export type CentreKind = 'fold' | 'seam' | 'zip' | 'hook-tape' | 'hooks' | 'busk' | 'lacing'
export type EdgeKind = 'seam' | 'fold' | 'opening' | 'finished'

/** Wedge shares of one half over its centre, princess and side seam; sum 1. */
export interface SeamShares {
  readonly centre: number
  readonly princess: number
  readonly side: number
}

/** A seam beyond the princess seam. */
export interface FurtherSeam {
  readonly id: SeamLetter
  /** Between which it stands: centre and princess seam, or princess and side seam. */
  readonly beside: 'centre' | 'side'
  /** Share of the half's width at the bust from its centre edge; null divides evenly. */
  readonly at: number | null
  /** Share of the neckline (from the centre) or armhole (from the shoulder) where it ends; null divides evenly. Not used under a top edge. */
  readonly end: number | null
  /** Wedge share, taken from the other seams in proportion. */
  readonly share: number
  /** Share where the half is let out; null: the same. */
  readonly letOut: number | null
}

/** The panels of one half. Without a princess seam the half is one panel. */
export interface HalfPanels {
  readonly princess: boolean
  /** From the centre outwards, those beside the centre first. */
  readonly further: readonly FurtherSeam[]
}

/** Where a princess seam ends. `at`: share of the armhole from the shoulder, or of the neckline from the centre; on the shoulder `princessAt` says where. */
export interface PrincessEnd {
  readonly edge: 'shoulder' | 'armhole' | 'neckline'
  readonly at: number
}

/** A hem or top edge that is not level: how far it lies from its level at the centre front and back and at the side seam. */
export interface EdgeShape {
  /** `pointed` leaves a corner at the centre unless that is as high as the side; `rounded` is square to the centre. */
  readonly form: 'straight' | 'pointed' | 'rounded'
  /** Lower at the centre front and back, mm. Negative: higher. */
  readonly front: Mm
  readonly back: Mm
  /** Lower at the side seam, front and back alike, mm. */
  readonly side: Mm
  /** 0 as straight as it can run on across the side seam, 1 hollowed out. Only of `pointed`. */
  readonly curve: number
}

/** The top edge of a strapless bodice, heights over the bust line, mm. `form` and `curve` as of a hem. */
export interface TopEdge {
  readonly form: EdgeShape['form']
  readonly front: Mm
  readonly back: Mm
  readonly side: Mm
  readonly curve: number
}

export type NecklineForm = 'round' | 'square' | 'v'

/** What may be otherwise in the right half: its division, its seams' ends, its neckline's form and its strap. The centres are shared. */
export type RightHalf = Pick<BodiceStyle, 'panels' | 'princessAt' | 'princessEnd' | 'backPrincessAt' | 'neckline' | 'necklineWidth'>

/** What the drafter chooses about the bodice, apart from the body and the ease. */
export interface BodiceStyle {
  readonly centreFront: CentreKind
  readonly centreBack: CentreKind
  /** Null: the right half mirrors the left. */
  readonly right: RightHalf | null
  readonly panels: { readonly front: HalfPanels; readonly back: HalfPanels }
  /** Level at which the bodice ends, and how far below it (negative: above). */
  readonly hem: { readonly level: 'underbust' | 'waist' | 'high-hip' | 'hip'; readonly below: Mm }
  readonly hemShape: EdgeShape
  readonly neckline: { readonly front: NecklineForm; readonly back: NecklineForm }
  /** Lowered from the neck base at the centre; 0 is the neck base itself. */
  readonly necklineFrontDepth: Mm
  readonly necklineBackDepth: Mm
  /** Taken off the shoulder at the neck; what is left is the strap. */
  readonly necklineWidth: Mm
  /** Null: with shoulders. */
  readonly top: TopEdge | null
  /** Where a princess seam meets the shoulder: share of it from the neck. */
  readonly princessAt: number
  readonly princessEnd: { readonly front: PrincessEnd; readonly back: PrincessEnd }
  /** Where the back princess seam stands at the bust: share of the half back's width from its centre edge. */
  readonly backPrincessAt: number
  /** Wedge shares; a fold takes 0 whatever stands here, so does an opening unless `openingsTake` says so. Each sums to 1. */
  readonly frontShares: SeamShares
  readonly backShares: SeamShares
  /** Shares where a level is wider than the bust; null: those above. */
  readonly letOut: { readonly front: SeamShares | null; readonly back: SeamShares | null }
  readonly openingsTake: { readonly front: boolean; readonly back: boolean }
  /** v: multiplies every height; 1 where bones hold the length. */
  readonly verticalFactor: number
  /** Degrees; null takes the angle that the lengths ask for. */
  readonly bustAngle: number | null
  /** `auto`: in the princess seam; without one a dart, or eased where the front is at most 10 mm longer. */
  readonly bustAs: 'auto' | 'seam' | 'dart' | 'ease'
  readonly underarmDrop: Mm
  readonly allowances: Readonly<Record<'seam' | 'centre' | 'opening' | 'shoulder' | 'neckline' | 'armhole' | 'hem', Mm>>
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

/** Half widths on the pieces at a level above the bust, without the gap. */
export interface AboveWidths {
  /** Height over the waist on the body, mm. */
  readonly y: Mm
  readonly front: Mm
  readonly back: Mm
}

export interface DraftInput {
  readonly body: DraftBody
  readonly style: BodiceStyle
  /** One entry for each body level: bust, underbust, waist, high hip, hip. */
  readonly widths: readonly LevelWidths[]
  /** Half widths on the pieces at the level above the bust that a strapless bodice hangs from; the gaps are those of the bust. */
  readonly above?: AboveWidths
  /** What the centres take of the wedge, from another half that this one meets there; absent: by the style's own shares. */
  readonly centreShares?: Readonly<Record<'front' | 'back', { readonly takeIn: number; readonly letOut: number }>> | undefined
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
    | 'bust-angle-eased'
    | 'bust-angle-dart'
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
  /** The pieces of the half that is drawn: of both halves, or of the left one where the right one differs. */
  readonly pieces: readonly DraftPiece[]
  /** The pieces of a right half that differs, drawn in the same frame; on the cloth they lie mirrored. */
  readonly right: readonly DraftPiece[] | null
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
