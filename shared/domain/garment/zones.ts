import type { LevelId } from '../body/types'
import type { ExtraZone } from '../document/types'
import type { Draft, PieceId } from '../draft/types'
import type { LayerPlan } from '../textile/types'

/** The plan of each zone that has one; front and back always have. */
export type ZonePlans = { readonly front: LayerPlan; readonly back: LayerPlan } & { readonly [Zone in ExtraZone]?: LayerPlan }

/** The order in which zones beside front and back are read: one before another goes over it where both reach. */
export const EXTRA_ZONES: readonly ExtraZone[] = ['waistPanel', 'cups', 'side', 'yoke', 'sleeve']

const HALF_PIECES = { front: ['front-centre', 'side-front'], back: ['back-centre', 'side-back'] } as const satisfies Readonly<
  Record<'front' | 'back', readonly PieceId[]>
>

/** Where a zone lies on the pieces of the bodice. Yoke and sleeve lie on no level of it. */
const REACHES: Readonly<Record<ExtraZone, (piece: PieceId, level: LevelId) => boolean>> = {
  waistPanel: (_piece, level) => level === 'waist',
  cups: (piece, level) => level === 'bust' && (piece === 'front-centre' || piece === 'side-front'),
  side: (piece) => piece === 'side-front' || piece === 'side-back',
  yoke: () => false,
  sleeve: () => false,
}

/** How a zone stands in the draft: with pieces of its own, as part of pieces, or on no level. */
export const zoneStanding = (zone: ExtraZone): 'pieces' | 'part' | 'none' =>
  zone === 'side' ? 'pieces' : zone === 'yoke' || zone === 'sleeve' ? 'none' : 'part'

/** Part of a half at the bust that is the piece next to its centre. */
export interface BustSplit {
  readonly front: number
  readonly back: number
}

/** Halves divided evenly, until a draft says more. */
export const EVEN_SPLIT: BustSplit = { front: 0.5, back: 0.5 }

/** A segment of a ring before it has a plan: the pieces it runs over, of one half, and its share of the half's free arc. */
export interface ZoneSegment {
  readonly half: 'front' | 'back'
  readonly zone: 'front' | 'back' | ExtraZone
  readonly pieces: readonly PieceId[]
  readonly share: number
}

/** The zone whose layers a piece has at a level. */
export function zoneAt(plans: Readonly<Partial<Record<ExtraZone, unknown>>>, piece: PieceId, level: LevelId): ZoneSegment['zone'] {
  const half = piece === 'front-centre' || piece === 'side-front' ? 'front' : 'back'
  return EXTRA_ZONES.find((zone) => plans[zone] !== undefined && REACHES[zone](piece, level)) ?? half
}

/** The segments of a level: one for each half, or one for each piece where the pieces of a half have different layers. */
export function zoneSegments(
  plans: Readonly<Partial<Record<ExtraZone, unknown>>>,
  level: LevelId,
  split: BustSplit,
): readonly ZoneSegment[] {
  return (['front', 'back'] as const).flatMap((half): readonly ZoneSegment[] => {
    const [centre, side] = HALF_PIECES[half]
    const [zone, other] = [zoneAt(plans, centre, level), zoneAt(plans, side, level)]
    if (zone === other) return [{ half, zone, pieces: [centre, side], share: 1 }]
    return [
      { half, zone, pieces: [centre], share: split[half] },
      { half, zone: other, pieces: [side], share: 1 - split[half] },
    ]
  })
}

/** Whether any level has a half of two zones, so that its division at the bust is asked for. */
export const dividesHalves = (plans: Readonly<Partial<Record<ExtraZone, unknown>>>): boolean => plans.side !== undefined

/** How the pieces divide each half at the bust. */
export function bustSplit(draft: Draft): BustSplit {
  const width = (id: PieceId) =>
    draft.pieces.find((piece) => piece.id === id)?.levels.find((crossing) => crossing.level === 'bust')?.width ?? 0
  const share = (half: 'front' | 'back') => {
    const [centre, side] = HALF_PIECES[half].map(width) as [number, number]
    return centre + side > 0 ? centre / (centre + side) : EVEN_SPLIT[half]
  }
  return { front: share('front'), back: share('back') }
}
