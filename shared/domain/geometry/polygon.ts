import { vectorCross, pointSubtract } from './point'
import type { Point } from './types'

/** A closed polygon without the first point repeated. */
export type Polygon = readonly Point[]

const cornerOf = (polygon: Polygon, index: number): Point => polygon[index % polygon.length] as Point

/** Signed area, mm²: positive counter-clockwise. */
export function polygonArea(polygon: Polygon): number {
  let twice = 0
  for (let index = 0; index < polygon.length; index += 1) twice += vectorCross(cornerOf(polygon, index), cornerOf(polygon, index + 1))
  return twice / 2
}

/** Least box around the points, mm. Of no points it is empty at the origin. */
export function pointsBounds(points: readonly Point[]): {
  readonly minX: number
  readonly minY: number
  readonly maxX: number
  readonly maxY: number
} {
  if (points.length === 0) return { minX: 0, minY: 0, maxX: 0, maxY: 0 }
  let [minX, minY, maxX, maxY] = [Infinity, Infinity, -Infinity, -Infinity]
  for (const { x, y } of points) {
    minX = Math.min(minX, x)
    minY = Math.min(minY, y)
    maxX = Math.max(maxX, x)
    maxY = Math.max(maxY, y)
  }
  return { minX, minY, maxX, maxY }
}

/** Whether a point lies inside; on the outline itself the answer is either. */
export function polygonContains(polygon: Polygon, at: Point): boolean {
  let inside = false
  for (let index = 0; index < polygon.length; index += 1) {
    const a = cornerOf(polygon, index)
    const b = cornerOf(polygon, index + 1)
    if (a.y > at.y !== b.y > at.y && at.x < a.x + ((at.y - a.y) * (b.x - a.x)) / (b.y - a.y)) inside = !inside
  }
  return inside
}

const side = (a: Point, b: Point, c: Point): number => vectorCross(pointSubtract(b, a), pointSubtract(c, a))

function liesWithin(a: Point, b: Point, c: Point): boolean {
  return Math.min(a.x, b.x) <= c.x && c.x <= Math.max(a.x, b.x) && Math.min(a.y, b.y) <= c.y && c.y <= Math.max(a.y, b.y)
}

function sidesMeet(a: Point, b: Point, c: Point, d: Point): boolean {
  const c1 = side(a, b, c)
  const c2 = side(a, b, d)
  const d1 = side(c, d, a)
  const d2 = side(c, d, b)
  if (((c1 > 0 && c2 < 0) || (c1 < 0 && c2 > 0)) && ((d1 > 0 && d2 < 0) || (d1 < 0 && d2 > 0))) return true
  return (
    (c1 === 0 && liesWithin(a, b, c)) ||
    (c2 === 0 && liesWithin(a, b, d)) ||
    (d1 === 0 && liesWithin(c, d, a)) ||
    (d2 === 0 && liesWithin(c, d, b))
  )
}

/**
 * Whether the outline neither crosses nor touches itself. Sides are sorted by their lowest x, so that only those that
 * overlap in x are compared. Fewer than three corners is not simple.
 */
export function polygonIsSimple(polygon: Polygon): boolean {
  const count = polygon.length
  if (count < 3) return false
  const sides = polygon.map((from, index) => {
    const to = cornerOf(polygon, index + 1)
    return {
      index,
      from,
      to,
      minX: Math.min(from.x, to.x),
      maxX: Math.max(from.x, to.x),
      minY: Math.min(from.y, to.y),
      maxY: Math.max(from.y, to.y),
    }
  })
  sides.sort((a, b) => a.minX - b.minX)
  for (let first = 0; first < count; first += 1) {
    const a = sides[first] as (typeof sides)[number]
    for (let second = first + 1; second < count; second += 1) {
      const b = sides[second] as (typeof sides)[number]
      if (b.minX > a.maxX) break
      if (b.minY > a.maxY || b.maxY < a.minY) continue
      const apart = Math.abs(a.index - b.index)
      if (apart === 1 || apart === count - 1) {
        if (count > 3 && foldsBack(a, b, count)) return false
        continue
      }
      if (sidesMeet(a.from, a.to, b.from, b.to)) return false
    }
  }
  return true
}

/** Neighbouring sides that run back over each other. */
function foldsBack(a: { index: number; from: Point; to: Point }, b: { index: number; from: Point; to: Point }, count: number): boolean {
  const [first, second] = (a.index + 1) % count === b.index ? [a, b] : [b, a]
  const u = pointSubtract(first.to, first.from)
  const v = pointSubtract(second.to, second.from)
  return vectorCross(u, v) === 0 && u.x * v.x + u.y * v.y < 0
}
