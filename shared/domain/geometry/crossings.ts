import { segmentPointAt } from './segment'
import { POINT_TOLERANCE } from './tolerances'
import type { Path, Point, Segment } from './types'

function rootsWithin(value: (t: number) => number, stops: readonly number[]): readonly number[] {
  const roots: number[] = []
  for (let index = 1; index < stops.length; index += 1) {
    let low = stops[index - 1] as number
    let high = stops[index] as number
    const atLow = value(low)
    const atHigh = value(high)
    if (Math.abs(atLow) <= POINT_TOLERANCE) roots.push(low)
    else if (Math.abs(atHigh) > POINT_TOLERANCE && atLow * atHigh < 0) {
      for (let round = 0; round < 60 && high - low > 1e-14; round += 1) {
        const middle = (low + high) / 2
        if (value(middle) * atLow > 0) low = middle
        else high = middle
      }
      roots.push((low + high) / 2)
    }
    if (index === stops.length - 1 && Math.abs(atHigh) <= POINT_TOLERANCE) roots.push(high)
  }
  return roots
}

/** Parameters at which y turns, between 0 and 1. */
function turnsOf(segment: Segment): readonly number[] {
  if (segment.kind === 'line') return []
  const d0 = segment.c1.y - segment.from.y
  const d1 = segment.c2.y - segment.c1.y
  const d2 = segment.to.y - segment.c2.y
  const a = d0 - 2 * d1 + d2
  const b = 2 * (d1 - d0)
  const candidates: number[] = []
  if (Math.abs(a) < 1e-12) {
    if (Math.abs(b) > 1e-12) candidates.push(-d0 / b)
  } else {
    const root = b * b - 4 * a * d0
    if (root >= 0) candidates.push((-b - Math.sqrt(root)) / (2 * a), (-b + Math.sqrt(root)) / (2 * a))
  }
  return candidates.filter((t) => t > 0 && t < 1).sort((one, other) => one - other)
}

/** Every point at which a path crosses or touches a height, mm, in order of travel; a level stretch gives its first end. */
export function pathCrossingsAtHeight(path: Path, height: number): readonly Point[] {
  const found: Point[] = []
  for (const segment of path) {
    const stops = [0, ...turnsOf(segment), 1]
    for (const t of rootsWithin((own) => segmentPointAt(segment, own).y - height, stops)) {
      const at = { x: segmentPointAt(segment, t).x, y: height }
      const last = found.at(-1)
      if (last === undefined || Math.abs(last.x - at.x) > POINT_TOLERANCE) found.push(at)
    }
  }
  return found
}
