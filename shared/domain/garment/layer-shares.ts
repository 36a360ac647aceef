import type { LevelId } from '../body/types'
import type { Zone } from '../document/commands'
import { layerShares, type LayerShare } from '../textile/contributions'
import type { RingSegment } from '../textile/types'
import { mm, strain, type Mm, type Strain } from '../units/brand'
import type { GarmentSolution } from './types'

/** The layers of a zone as they lie in one ring: what each brings there. */
export interface ZoneShares {
  /** Null where the zone lies on no level of the bodice: it is then looked at by itself, at a strain everybody can picture. */
  readonly level: LevelId | null
  readonly name: string
  /** Levels at which the zone lies. */
  readonly levels: readonly LevelId[]
  readonly segment: RingSegment
  /** Cut width of the segment, mm once round the body. */
  readonly width: Mm
  /** Strain of the garment there. */
  readonly strain: Strain
  readonly shares: readonly LayerShare[]
}

/** Strain at which a zone on no level is shown, and the width taken for it. */
const BY_ITSELF = { strain: strain(0.15), width: mm(100), girth: mm(400) }

/** What the layers of a zone bring at a level: the level asked for where the zone lies there, else the first where it does. Null without such a plan. */
export function zoneShares(
  solution: Pick<GarmentSolution, 'plans' | 'ringInputs' | 'rings'>,
  zone: Zone,
  asked: string | null,
): ZoneShares | null {
  const plan = solution.plans.find((one) => one.zone === zone)
  if (!plan) return null
  const places = solution.rings.flatMap((ring) => {
    const geometry = solution.ringInputs.find((one) => one.level === ring.level)
    const index = geometry?.segments.findIndex((segment) => segment.plan.zone === zone) ?? -1
    const segment = geometry?.segments[index]
    const solved = ring.segments[index]
    return segment && solved ? [{ ring, segment, solved }] : []
  })
  const place = places.find(({ ring }) => ring.level === asked) ?? places.find(({ ring }) => ring.level === 'waist') ?? places[0]
  if (!place) {
    const segment: RingSegment = { id: zone, half: 'front', plan, share: 1 }
    return {
      level: null,
      name: '',
      levels: [],
      segment,
      width: BY_ITSELF.width,
      strain: BY_ITSELF.strain,
      shares: layerShares(segment, BY_ITSELF.width, BY_ITSELF.strain, BY_ITSELF.girth),
    }
  }
  const { ring, segment, solved } = place
  return {
    level: ring.level as LevelId,
    name: ring.name,
    levels: places.map((one) => one.ring.level as LevelId),
    segment,
    width: solved.width,
    strain: solved.strain,
    shares: layerShares(segment, solved.width, solved.strain, ring.girth),
  }
}
