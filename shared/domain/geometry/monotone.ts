import { cubicSegment } from './segment'
import type { Path } from './types'

/** Slopes below this are level. */
const FLAT = 1e-12

/** x as a function of height: a cubic between each two heights. */
export interface MonotoneCurve {
  /** Rising heights, mm. */
  readonly heights: readonly number[]
  readonly values: readonly number[]
  /** Slopes dx/dy at the heights. */
  readonly slopes: readonly number[]
}

/**
 * A cubic interpolant that rises and falls only where its values do. Heights must rise. Slopes at either end may be
 * held; without, they are the end secants; a held slope that would leave the values is cut down. Source: Fritsch and Carlson, Monotone piecewise cubic interpolation, SIAM J. Numer. Anal. 17 (1980).
 */
export function monotoneCurve(
  heights: readonly number[],
  values: readonly number[],
  held: { readonly first?: number; readonly last?: number } = {},
): MonotoneCurve {
  if (heights.length < 2 || heights.length !== values.length) throw new Error('A curve needs two heights or more, with a value each')
  const steps = heights.slice(1).map((height, index) => height - (heights[index] as number))
  if (steps.some((step) => !(step > 0))) throw new Error('Heights must rise')
  const secants = steps.map((step, index) => ((values[index + 1] as number) - (values[index] as number)) / step)
  const slopes = heights.map((_, index) => {
    if (index === 0) return held.first ?? (secants[0] as number)
    if (index === heights.length - 1) return held.last ?? (secants.at(-1) as number)
    const before = secants[index - 1] as number
    const after = secants[index] as number
    if (before * after <= 0) return 0
    const stepBefore = steps[index - 1] as number
    const stepAfter = steps[index] as number
    return (before * stepAfter + after * stepBefore) / (stepBefore + stepAfter)
  })
  secants.forEach((secant, index) => {
    if (Math.abs(secant) < FLAT) {
      slopes[index] = 0
      slopes[index + 1] = 0
      return
    }
    const a = (slopes[index] as number) / secant
    const b = (slopes[index + 1] as number) / secant
    const reach = Math.hypot(a, b)
    if (reach <= 3) return
    slopes[index] = (3 * a * secant) / reach
    slopes[index + 1] = (3 * b * secant) / reach
  })
  return { heights, values, slopes }
}

/** The value at a height; beyond either end the curve goes on straight with its end slope. */
export function monotoneValueAt(curve: MonotoneCurve, height: number): number {
  const { heights, values, slopes } = curve
  const last = heights.length - 1
  if (height <= (heights[0] as number)) return (values[0] as number) + (slopes[0] as number) * (height - (heights[0] as number))
  if (height >= (heights[last] as number)) return (values[last] as number) + (slopes[last] as number) * (height - (heights[last] as number))
  const index = heights.findIndex((own, place) => place < last && height <= (heights[place + 1] as number) && height >= own)
  const step = (heights[index + 1] as number) - (heights[index] as number)
  const t = (height - (heights[index] as number)) / step
  const s = 1 - t
  return (
    (1 + 2 * t) * s * s * (values[index] as number) +
    t * s * s * step * (slopes[index] as number) +
    t * t * (3 - 2 * t) * (values[index + 1] as number) -
    t * t * s * step * (slopes[index + 1] as number)
  )
}

/** The curve as Béziers from the lowest height up, exactly; y runs evenly along each of them. */
export function monotonePath(curve: MonotoneCurve): Path {
  return curve.heights.slice(1).map((top, index) => {
    const bottom = curve.heights[index] as number
    const third = (top - bottom) / 3
    const from = { x: curve.values[index] as number, y: bottom }
    const to = { x: curve.values[index + 1] as number, y: top }
    return cubicSegment(
      from,
      { x: from.x + (curve.slopes[index] as number) * third, y: bottom + third },
      { x: to.x - (curve.slopes[index + 1] as number) * third, y: top - third },
      to,
    )
  })
}
