import type { LevelId } from '../body/types'
import type { ExtraZone } from '../document/types'
import { blockOf, halfOf } from '../draft/roles'
import type { BlockId, Draft, PieceId } from '../draft/types'
import type { LayerPlan } from '../textile/types'

/** The plan of each zone that has one; front and back always have. */
export type ZonePlans = { readonly front: LayerPlan; readonly back: LayerPlan } & { readonly [Zone in ExtraZone]?: LayerPlan }

/** The order in which zones beside front and back are read: one before another goes over it where both reach. */
export const EXTRA_ZONES: readonly ExtraZone[] = ['waistPanel', 'cups', 'side', 'yoke', 'sleeve']

/** The parts of each half, from its centre outwards: the pieces up to the princess seam and those beyond it. */
const HALF_PIECES = { front: ['front-centre', 'side-front'], back: ['back-centre', 'side-back'] } as const satisfies Readonly<
  Record<'front' | 'back', readonly BlockId[]>
>

/** Where a zone lies on the pieces of the bodice. Yoke and sleeve lie on no level of it. */
const REACHES: Readonly<Record<ExtraZone, (part: BlockId, level: LevelId) => boolean>> = {
  waistPanel: (_part, level) => level === 'waist',
  cups: (part, level) => level === 'bust' && halfOf(part) === 'front',
  side: (part) => part === 'side-front' || part === 'side-back',
  yoke: () => false,
  sleeve: () => false,
}

/** How a zone stands in the draft: with pieces of its own, as part of pieces, or on no level. */
export const zoneStanding = (zone: ExtraZone): 'pieces' | 'part' | 'none' =>
  zone === 'side' ? 'pieces' : zone === 'yoke' || zone === 'sleeve' ? 'none' : 'part'

/** Part of a half at the bust that lies between its centre and the princess seam; 1 where the half is one panel. */
export interface BustSplit {
  readonly front: number
  readonly back: number
}

/** Halves divided evenly, until a draft says more. */
export const EVEN_SPLIT: BustSplit = { front: 0.5, back: 0.5 }

/** A segment of a ring before it has a plan: the parts of a half it runs over, and its share of the half's free arc. */
export interface ZoneSegment {
  readonly half: 'front' | 'back'
  readonly zone: 'front' | 'back' | ExtraZone
  readonly pieces: readonly BlockId[]
  readonly share: number
}

/** The zone whose layers a piece has at a level. */
export function zoneAt(plans: Readonly<Partial<Record<ExtraZone, unknown>>>, piece: PieceId, level: LevelId): ZoneSegment['zone'] {
  return EXTRA_ZONES.find((zone) => plans[zone] !== undefined && REACHES[zone](blockOf(piece), level)) ?? halfOf(piece)
}

/** The segments of a level: one for each half, or one for each part where the parts of a half have different layers and both have pieces. */
export function zoneSegments(
  plans: Readonly<Partial<Record<ExtraZone, unknown>>>,
  level: LevelId,
  split: BustSplit,
): readonly ZoneSegment[] {
  return (['front', 'back'] as const).flatMap((half): readonly ZoneSegment[] => {
    const [centre, side] = HALF_PIECES[half]
    const [zone, other] = [zoneAt(plans, centre, level), zoneAt(plans, side, level)]
    if (zone === other || split[half] >= 1) return [{ half, zone, pieces: [centre, side], share: 1 }]
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
  const width = (part: BlockId) =>
    draft.pieces
      .filter((piece) => blockOf(piece.id) === part)
      .reduce((sum, piece) => sum + (piece.levels.find((crossing) => crossing.level === 'bust')?.width ?? 0), 0)
  const share = (half: 'front' | 'back') => {
    const [centre, side] = HALF_PIECES[half].map(width) as [number, number]
    return centre + side > 0 ? centre / (centre + side) : EVEN_SPLIT[half]
  }
  return { front: share('front'), back: share('back') }
}
