import { newtonPerMetre } from '../units/brand'
import type { LayerCloth } from './types'

/** Cloth that pulls in the garment `factor` times as hard as in its test: learnt from a fitting, kept with the garment, droppable. */
export interface Stiffness {
  readonly factor: number
  /** Standard error of the factor, a part of it. */
  readonly uncertainty: number
  /** Day of the fitting, ISO. */
  readonly learntOn: string
  /** The layers it was learnt in, as the document writes them; it holds for these alone. Absent: learnt before this was kept. */
  readonly plan?: string
  /** Levels that have those layers; absent: all. */
  readonly levels?: readonly string[]
}

/** A learnt factor outside is odd: the test, the pull or the plan is not what was thought. Source: setting. */
export const isOddStiffness = (factor: number): boolean => factor < 0.5 || factor > 2

/**
 * The cloth with its curve taken times the factor; the factor's uncertainty joins the spread of the specimens as errors that do not hang
 * together do. Strain limits and figures of the test stay; so do the readings.
 */
export function stiffened(cloth: LayerCloth, stiffness: Stiffness | null): LayerCloth {
  if (stiffness === null) return cloth
  const { curve } = cloth
  const { factor, uncertainty } = stiffness
  return {
    ...cloth,
    curve: {
      ...curve,
      a: newtonPerMetre(curve.a * factor),
      b: newtonPerMetre(curve.b * factor),
      knots: curve.knots.map((knot) => ({ ...knot, tension: newtonPerMetre(knot.tension * factor) })),
      spread: Math.hypot(curve.spread, uncertainty),
    },
  }
}
