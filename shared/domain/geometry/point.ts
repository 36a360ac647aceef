import type { Point } from './types'

/** A point or a vector, mm. */
export const point = (x: number, y: number): Point => ({ x, y })

/** a + b. */
export const pointAdd = (a: Point, b: Point): Point => ({ x: a.x + b.x, y: a.y + b.y })

/** a - b: the vector from b to a. */
export const pointSubtract = (a: Point, b: Point): Point => ({ x: a.x - b.x, y: a.y - b.y })

/** a times a number. */
export const pointScale = (a: Point, factor: number): Point => ({ x: a.x * factor, y: a.y * factor })

/** From `from`, the distance along `direction` (which need not be a unit vector: it is counted in its own lengths). */
export const pointAlong = (from: Point, direction: Point, distance: number): Point => ({
  x: from.x + direction.x * distance,
  y: from.y + direction.y * distance,
})

/** The point at share t of the way from a to b. */
export const pointBetween = (a: Point, b: Point, t: number): Point => ({ x: a.x + (b.x - a.x) * t, y: a.y + (b.y - a.y) * t })

export const vectorDot = (a: Point, b: Point): number => a.x * b.x + a.y * b.y

/** Positive where b lies counter-clockwise of a. */
export const vectorCross = (a: Point, b: Point): number => a.x * b.y - a.y * b.x

export const vectorLength = (a: Point): number => Math.sqrt(a.x * a.x + a.y * a.y)

/** Straight distance, mm. */
export const pointDistance = (a: Point, b: Point): number => Math.sqrt((b.x - a.x) * (b.x - a.x) + (b.y - a.y) * (b.y - a.y))

/** Unit vector; the zero vector stays zero. */
export function vectorUnit(a: Point): Point {
  const length = vectorLength(a)
  return length === 0 ? { x: 0, y: 0 } : { x: a.x / length, y: a.y / length }
}

/** Quarter turn clockwise: of a direction of travel it is the side on the right, which is outwards of a counter-clockwise outline. */
export const vectorRight = (a: Point): Point => ({ x: a.y, y: -a.x })

/** Quarter turn counter-clockwise: inwards of a counter-clockwise outline. */
export const vectorLeft = (a: Point): Point => ({ x: -a.y, y: a.x })

/** Turned by radians, counter-clockwise positive, about the origin. */
export function vectorTurn(a: Point, angle: number): Point {
  const cos = Math.cos(angle)
  const sin = Math.sin(angle)
  return { x: a.x * cos - a.y * sin, y: a.x * sin + a.y * cos }
}

/** Turned by radians, counter-clockwise positive, about `pivot`. */
export function pointTurn(a: Point, pivot: Point, angle: number): Point {
  return pointAdd(pivot, vectorTurn(pointSubtract(a, pivot), angle))
}

/** Where the line through a along u meets the line through b along v, as lengths of u and of v; null when they are parallel. */
export function linesMeet(a: Point, u: Point, b: Point, v: Point): { readonly alongU: number; readonly alongV: number } | null {
  const cross = vectorCross(u, v)
  if (Math.abs(cross) < 1e-12 * vectorLength(u) * vectorLength(v) || cross === 0) return null
  const between = pointSubtract(b, a)
  return { alongU: vectorCross(between, v) / cross, alongV: vectorCross(between, u) / cross }
}
