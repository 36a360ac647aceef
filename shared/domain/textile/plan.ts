import type { Mm, NewtonPerMetre, Strain } from '../units/brand'
import { mm, newtonPerMetre, strain } from '../units/brand'
import { slopeOfStack, stackOf, strainOfStack, tensionOfStack } from './stack'
import type { LayerPlan } from './types'

/** Whether any layer of the plan can pull: a plan without layers has no tension at any strain. */
export const planPulls = (plan: LayerPlan): boolean => stackOf(plan).pulls

/** Tension of a plan at the garment's strain e, N/m: the layers lie side by side and their tensions add; a slack layer gives nothing. */
export const planTensionAt = (plan: LayerPlan, e: number): NewtonPerMetre => newtonPerMetre(tensionOfStack(stackOf(plan), e))

/** Slope of a plan's tension, N/m per strain. */
export const planSlopeAt = (plan: LayerPlan, e: number): NewtonPerMetre => newtonPerMetre(slopeOfStack(stackOf(plan), e))

/** The garment's strain under a tension; the free strain for none, the stop of its rigid layers for all that reach it. The plan must pull or have a rigid layer. */
export function planStrainAt(plan: LayerPlan, tension: number): Strain {
  const stack = stackOf(plan)
  if (!stack.pulls && stack.stop === Infinity) throw new RangeError('A plan without pull has no strain under a tension')
  return strain(strainOfStack(stack, tension))
}

/** e0 = min r - 1: up to this strain no layer pulls. Negative where a layer is cut smaller than the reference. */
export const planFreeStrain = (plan: LayerPlan): Strain => strain(stackOf(plan).free)

/** Strain at which the plan's rigid layers stop it: min r - 1 over them. Infinite without one. */
export const planStop = (plan: LayerPlan): Strain => strain(stackOf(plan).stop)

const leastOver = (plan: LayerPlan, limit: (layer: LayerPlan['layers'][number]) => number): number =>
  plan.layers.reduce(
    (least, layer) => (layer.count > 0 && !layer.rigid ? Math.min(least, layer.cutRatio * (1 + limit(layer)) - 1) : least),
    Infinity,
  )

/** Wear limit of a plan: min over its layers that stretch of r (1 + u) - 1. Infinite where none does. */
export const planWearLimit = (plan: LayerPlan): Strain => strain(leastOver(plan, (layer) => layer.cloth.wearLimit))

/** Pull-on limit of a plan: min over its layers that stretch of r (1 + p) - 1. Infinite where none does. */
export const planPullOnLimit = (plan: LayerPlan): Strain => strain(leastOver(plan, (layer) => layer.cloth.pullOnLimit))

/** Thickness of a plan, mm: its layers flat on each other. */
export const planThickness = (plan: LayerPlan): Mm =>
  mm(plan.layers.reduce((sum, layer) => sum + Math.max(0, layer.count) * layer.cloth.thickness, 0))

/** Strain of one layer when the garment's strain is e: (1 + e) / r - 1. Negative: slack. */
export const layerStrain = (cutRatio: number, e: number): Strain => strain((1 + e) / cutRatio - 1)

/** Whether a plan at strain e asks any layer for more than its tested range. */
export const isExtrapolated = (plan: LayerPlan, e: number): boolean =>
  plan.layers.some((layer) => layer.count > 0 && !layer.rigid && layerStrain(layer.cutRatio, e) > layer.cloth.curve.testedTo * (1 + 1e-12))

/** Whether a plan holds a cloth of which only a stretch is known. */
export const isAssumed = (plan: LayerPlan): boolean =>
  plan.layers.some((layer) => layer.count > 0 && !layer.rigid && layer.cloth.curve.kind === 'assumed')

/**
 * Turn of cloth q = 1 + 2 pi z / (G + pi t) for a layer drafted as a piece of its own: cut q times as wide, z its distance from the plan's
 * middle surface, outwards positive. Layers are listed from the outside in. Girth and thickness mm. Derived.
 */
export function turnOfCloth(plan: LayerPlan, index: number, girth: Mm): number {
  const layer = plan.layers[index]
  if (!layer) throw new RangeError('No such layer')
  const thickness = planThickness(plan)
  const outside = plan.layers.slice(0, index).reduce((sum, one) => sum + one.count * one.cloth.thickness, 0)
  const z = thickness / 2 - outside - (layer.count * layer.cloth.thickness) / 2
  return 1 + (2 * Math.PI * z) / (girth + Math.PI * thickness)
}
