import type { Path, Point } from '../geometry/types'

/** Chords a cubic is walked with where a crossing is only drawn, never measured. */
const CHORDS = 24

/** Points along a path, close enough to draw by (24 chords a curve); lengths are never read from them. */
export function pointsAlong(path: Path): Point[] {
  const points: Point[] = []
  for (const segment of path) {
    if (points.length === 0) points.push(segment.from)
    if (segment.kind === 'line') points.push(segment.to)
    else {
      const { from, c1, c2, to } = segment
      for (let i = 1; i <= CHORDS; i += 1) {
        const t = i / CHORDS
        const s = 1 - t
        const [a, b, c, d] = [s * s * s, 3 * s * s * t, 3 * s * t * t, t * t * t]
        points.push({ x: a * from.x + b * c1.x + c * c2.x + d * to.x, y: a * from.y + b * c1.y + c * c2.y + d * to.y })
      }
    }
  }
  return points
}

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
