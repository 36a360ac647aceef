import { checkMeasuring } from '../body/plausibility'
import { isFlagged, wearerCautions } from '../body/wearer'
import { cautions, orderCautions } from '../cautions/registry'
import type { Caution } from '../cautions/types'
import type { AlterationEffect } from '../draft/alterations'
import { zoneWords } from '../document/commands'
import { planKey } from '../document/plan-key'
import { isOddStiffness } from '../textile/stiffness'
import { textileCautions } from '../textile/cautions'
import type { LayerCloth, RingGeometry } from '../textile/types'
import { mm, pascal } from '../units/brand'
import { draftCautions } from './draft-cautions'
import { entryCautions } from './passes'
import { standingStiffness } from './plans'
import { structureCautions } from './structure'
import type { GarmentInput, GarmentSolution } from './types'
import { EXTRA_ZONES, zoneStanding } from './zones'

const MILLISECONDS_PER_DAY = 86_400_000

/** Whole days from one ISO date to another. */
const daysBetween = (from: string, to: string): number =>
  Math.floor((Date.parse(to.slice(0, 10)) - Date.parse(from.slice(0, 10))) / MILLISECONDS_PER_DAY)

/** Directions of the cloths in use, in the state in which each is used where it was tested so. */
function directionsUsed(input: GarmentInput, solution: Pick<GarmentSolution, 'plans'>): readonly LayerCloth[] {
  const used = new Set(solution.plans.flatMap((plan) => plan.layers.map((layer) => layer.cloth.clothId)))
  return input.cloths.filter((cloth) => used.has(cloth.id)).flatMap((cloth) => cloth.directions)
}

function stiffnessCautions(document: GarmentInput['document']): readonly Caution[] {
  if (!document.stiffness) return []
  const { factor, learntOn } = document.stiffness
  const place = { kind: 'garment' } as const
  if (standingStiffness(document) === null) return [cautions.stiffnessElsewhere(place, { factor, learntOn })]
  return [
    cautions.stiffnessLearnt(place, { factor, learntOn }),
    ...(isOddStiffness(factor) ? [cautions.stiffnessOdd(place, { factor, learntOn })] : []),
  ]
}

/** Rigid widths sewn to single layers, once round. */
const sewnOf = (geometry: RingGeometry): number =>
  geometry.segments.reduce((sum, segment) => sum + (segment.sewn ?? []).reduce((all, one) => all + one.width, 0), 0)

/** Zones whose layers the draft does not part from the others, and alterations that came from other layers in millimetres. */
function planChoiceCautions(document: GarmentInput['document']): readonly Caution[] {
  const zones = EXTRA_ZONES.filter((zone) => (document.plans[zone]?.length ?? 0) > 0 && zoneStanding(zone) !== 'pieces').map((zone) =>
    cautions.zoneNotDrafted({ kind: 'plan', zone }, { zone: zoneWords(zone), part: zoneStanding(zone) === 'part' }),
  )
  const standing = document.alterations.filter((one) => one.on).length
  const copied = standing > 0 && document.alteredIn !== undefined && document.alteredIn !== planKey(document.plans)
  return [...zones, ...(copied ? [cautions.alterationsCopied({ kind: 'garment' }, { count: standing })] : [])]
}

/** Every caution of a solved garment, stops first: body, wearer, cloth and rings, draft, openings. */
export function garmentCautions(
  input: GarmentInput,
  solution: Omit<GarmentSolution, 'cautions'>,
  effects: readonly AlterationEffect[],
): readonly Caution[] {
  const { document, wearer, settings, today } = input
  const judged = solution.rings.map((ring, index) => ({
    geometry: solution.ringInputs[index]!,
    solution: ring,
    asked: document.levels.find((level) => level.level === ring.level)?.hold ?? pascal(0),
  }))
  const worn = solution.rings.map((ring, index) => ({
    level: ring.level,
    name: ring.name,
    upperAtRest: pascal(ring.pressureBand.high),
    upperInBreath: pascal(ring.breathBand.high),
    rigid: mm(ring.rigidFront + ring.rigidBack + sewnOf(solution.ringInputs[index]!)),
    ...(ring.breathShort ? { breathShort: ring.breathShort } : {}),
  }))
  return orderCautions([
    ...checkMeasuring(input.measured, null, { child: wearer.child }),
    ...wearerCautions(wearer, worn, input.measuredOn === null ? null : daysBetween(input.measuredOn, today)),
    ...entryCautions(input, solution.passes),
    ...stiffnessCautions(document),
    ...planChoiceCautions(document),
    ...textileCautions({
      rings: judged,
      plans: solution.plans,
      directions: directionsUsed(input, solution),
      state: document.state,
      use: document.use,
      flagged: isFlagged(wearer),
      settings,
      today,
    }),
    ...structureCautions({ document, draft: solution.draft, rings: solution.rings, plans: solution.plans }),
    ...draftCautions({
      draft: solution.draft,
      alterations: document.alterations,
      effects,
      settled: solution.settled,
      rounds: solution.rounds,
    }),
  ])
}
