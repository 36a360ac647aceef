import type { GarmentDocument, LayerChoice } from '../document/types'
import { zoneWords, type Zone } from '../document/commands'
import { planKey } from '../document/plan-key'
import { nearestDirection } from '../textile/direction'
import { stiffened, type Stiffness } from '../textile/stiffness'
import type { ClothState, Layer, LayerCloth, LayerPlan } from '../textile/types'
import { mm, newtonPerMetre, strain } from '../units/brand'
import { fail, succeed, type Result } from '../units/result'
import type { GarmentCloth, GarmentInput, GarmentProblem } from './types'
import { EXTRA_ZONES, type ZonePlans } from './zones'

/**
 * The tested cloth of a layer: the state asked for, else the other one (the plan's cautions say which was used). A typed angle takes the
 * nearest tested direction, in the state asked for where there is one.
 */
function layerClothOf(cloth: GarmentCloth, choice: LayerChoice, state: ClothState): LayerCloth | null {
  if (choice.angle !== undefined) {
    const inState = cloth.directions.filter((one) => one.state === state)
    return nearestDirection(choice.angle, inState.length > 0 ? inState : cloth.directions)?.cloth ?? null
  }
  const inDirection = cloth.directions.filter((one) => one.direction === choice.direction && one.angle === undefined)
  return inDirection.find((one) => one.state === state) ?? inDirection[0] ?? null
}

/** A cloth as a rigid layer needs it: its thickness; its curve is not read. */
function rigidCloth(cloth: GarmentCloth, choice: LayerChoice, state: ClothState): LayerCloth {
  const [tested] = cloth.directions
  const none = newtonPerMetre(0)
  return {
    clothId: cloth.id,
    name: cloth.name,
    direction: choice.direction,
    state,
    curve: { kind: 'cubic', a: none, b: none, knots: [], testedTo: strain(0), residual: 0, spread: 0, specimens: 0, points: [] },
    figures: { stretch: strain(0), growth: null, recovery: null, testTension: null },
    thickness: cloth.thickness ?? tested?.thickness ?? mm(0),
    wearLimit: strain(0),
    pullOnLimit: strain(0),
    testedOn: null,
  }
}

/** The layer plan of a zone from what the drafter chose; a cloth that is missing or untested is a problem with its next step. */
export function planOf(
  zone: Zone,
  choices: readonly LayerChoice[],
  cloths: readonly GarmentCloth[],
  state: ClothState,
  stiffness: Stiffness | null = null,
): Result<LayerPlan, GarmentProblem> {
  if (choices.length === 0) {
    return fail({
      code: 'no-layers',
      step: 'layers',
      message: `The ${zoneWords(zone)} has no layers yet.`,
      todo: 'Add a cloth to the layer plan.',
      at: zone,
    })
  }
  const layers: Layer[] = []
  for (const choice of choices) {
    const cloth = cloths.find((one) => one.id === choice.clothId)
    if (!cloth) {
      return fail({
        code: 'cloth-missing',
        step: 'layers',
        message: `${choice.label} names a cloth that is not in this workroom.`,
        todo: 'Choose another cloth.',
        at: zone,
      })
    }
    const laid = { id: choice.id, label: choice.label, count: choice.count, cutRatio: choice.cutRatio }
    if (choice.rigid) {
      layers.push({ ...laid, cloth: rigidCloth(cloth, choice, state), rigid: true })
      continue
    }
    const tested = layerClothOf(cloth, choice, state)
    if (!tested) {
      return fail({
        code: 'test-missing',
        step: 'cloth',
        message: `${cloth.name} has no stretch test${choice.angle === undefined ? ` ${choice.direction}` : ''}.`,
        todo: 'Pull a strip in that direction, or enter the stretch from the label to go on with an assumed curve.',
        at: cloth.id,
      })
    }
    const asked = choice.angle === undefined ? {} : { askedAngle: choice.angle }
    layers.push({ ...laid, cloth: stiffened(tested, stiffness), ...asked })
  }
  return succeed({ zone, layers, state })
}

/** The learnt stiffness while the layers are those it was learnt in; in others it says nothing. */
export function standingStiffness({ stiffness = null, plans }: Pick<GarmentDocument, 'stiffness' | 'plans'>): Stiffness | null {
  return stiffness && (stiffness.plan === undefined || stiffness.plan === planKey(plans)) ? stiffness : null
}

/** The plans of all zones of a garment: front and back, and those beside them that have layers; cloths taken times a learnt stiffness. */
export function zonePlans(
  document: GarmentDocument,
  cloths: GarmentInput['cloths'],
  stiffness: Stiffness | null,
): Result<ZonePlans, GarmentProblem> {
  const extra = EXTRA_ZONES.filter((zone) => (document.plans[zone]?.length ?? 0) > 0)
  const made: Partial<Record<Zone, LayerPlan>> = {}
  for (const zone of ['front', 'back', ...extra] as const) {
    const plan = planOf(zone, document.plans[zone] ?? [], cloths, document.state, stiffness)
    if (!plan.ok) return plan
    made[zone] = plan.value
  }
  return succeed(made as ZonePlans)
}
