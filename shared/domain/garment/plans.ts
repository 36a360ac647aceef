import type { LayerChoice } from '../document/types'
import { stiffened, type Stiffness } from '../textile/stiffness'
import type { ClothState, Layer, LayerCloth, LayerPlan } from '../textile/types'
import { fail, succeed, type Result } from '../units/result'
import type { GarmentCloth, GarmentProblem } from './types'

/** The tested cloth of a layer: the state asked for, else the other one (the plan's cautions say which was used). */
function layerClothOf(cloth: GarmentCloth, choice: LayerChoice, state: ClothState): LayerCloth | null {
  const inDirection = cloth.directions.filter((one) => one.direction === choice.direction)
  return inDirection.find((one) => one.state === state) ?? inDirection[0] ?? null
}

/** The layer plan of a zone from what the drafter chose; a cloth that is missing or untested is a problem with its next step. */
export function planOf(
  zone: 'front' | 'back',
  choices: readonly LayerChoice[],
  cloths: readonly GarmentCloth[],
  state: ClothState,
  stiffness: Stiffness | null = null,
): Result<LayerPlan, GarmentProblem> {
  if (choices.length === 0) {
    return fail({
      code: 'no-layers',
      step: 'layers',
      message: `The ${zone} has no layers yet.`,
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
    const tested = layerClothOf(cloth, choice, state)
    if (!tested) {
      return fail({
        code: 'test-missing',
        step: 'cloth',
        message: `${cloth.name} has no stretch test ${choice.direction}.`,
        todo: 'Pull a strip in that direction, or enter the stretch from the label to go on with an assumed curve.',
        at: cloth.id,
      })
    }
    layers.push({ id: choice.id, label: choice.label, cloth: stiffened(tested, stiffness), count: choice.count, cutRatio: choice.cutRatio })
  }
  return succeed({ zone, layers })
}
