import type { Point } from '../geometry/types'
import { insideAtHeight } from './crossings'
import type { Bounds } from './placing'

/** Whether a straight stroke has a point in a rectangle, edges counted in. */
export const strokeTouches = (from: Point, to: Point, box: Bounds): boolean => shareInside(from, to, box) !== null

/** The share of a straight stroke that lies in a rectangle, as its two ends from 0 to 1; null when none does. Liang and Barsky's clipping. */
export function shareInside(from: Point, to: Point, box: Bounds): readonly [number, number] | null {
  if (from.x < box.left && to.x < box.left) return null
  if (from.x > box.right && to.x > box.right) return null
  if (from.y < box.bottom && to.y < box.bottom) return null
  if (from.y > box.top && to.y > box.top) return null
  const dx = to.x - from.x
  const dy = to.y - from.y
  let [enter, leave] = [0, 1]
  for (const [direction, room] of [
    [-dx, from.x - box.left],
    [dx, box.right - from.x],
    [-dy, from.y - box.bottom],
    [dy, box.top - from.y],
  ] as const) {
    if (direction === 0) {
      if (room < 0) return null
      continue
    }
    const t = room / direction
    if (direction < 0) enter = Math.max(enter, t)
    else leave = Math.min(leave, t)
    if (enter > leave) return null
  }
  return [enter, leave]
}

/** Whether a closed polygon, its inside counted in, has a point in a rectangle: a sheet with nothing but cloth is not blank. */
export function polygonTouches(polygon: readonly Point[], box: Bounds): boolean {
  const crosses = polygon.some((from, i) => strokeTouches(from, polygon[(i + 1) % polygon.length]!, box))
  if (crosses) return true
  const middle = { x: (box.left + box.right) / 2, y: (box.bottom + box.top) / 2 }
  return insideAtHeight(polygon, middle.y).some(([left, right]) => middle.x > left && middle.x < right)
}
