import { pathFlatten } from '../geometry/path'
import type { Path, Point } from '../geometry/types'

/** Chords keep this close to their curve where it is only looked at, mm. */
const DRAWN_TOLERANCE = 0.1

/** Points along a path, close enough to draw and to point at (0.1 mm); lengths are never read from them. */
export const pointsAlong = (path: Path): readonly Point[] => pathFlatten(path, DRAWN_TOLERANCE)

/**
 * Where the level line at height y lies inside a closed polygon: pairs of x from left to right, mm. A height that only
 * touches a corner counts with the part above it.
 */
export function insideAtHeight(polygon: readonly Point[], y: number): readonly (readonly [number, number])[] {
  const crossings: number[] = []
  polygon.forEach((from, i) => {
    const to = polygon[(i + 1) % polygon.length]!
    if (from.y <= y === to.y <= y) return
    crossings.push(from.x + ((y - from.y) / (to.y - from.y)) * (to.x - from.x))
  })
  crossings.sort((a, b) => a - b)
  const pairs: (readonly [number, number])[] = []
  for (let i = 0; i + 1 < crossings.length; i += 2) pairs.push([crossings[i]!, crossings[i + 1]!])
  return pairs
}
