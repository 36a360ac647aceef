import { POINT_TOLERANCE, FLATTEN_TOLERANCE } from './tolerances'
import {
  segmentFlatten,
  segmentLength,
  segmentParameterAt,
  segmentPointAt,
  segmentReverse,
  segmentSplitAt,
  segmentTangentAt,
  segmentTransform,
} from './segment'
import { mirrorAcross } from './transform'
import type { Transform } from './transform'
import type { Path, Point, Segment } from './types'

/** A path is never empty where it is asked for a point: an empty one is a programmer's error. */
function segmentOf(path: Path, index: number): Segment {
  const segment = path.at(index)
  if (segment === undefined) throw new Error('The path has no segment')
  return segment
}

/** First point. */
export const pathStart = (path: Path): Point => segmentOf(path, 0).from

/** Last point. */
export const pathEnd = (path: Path): Point => segmentOf(path, -1).to

/** Length along the curve, mm, to 1e-6 mm a segment. */
export const pathLength = (path: Path): number => path.reduce((sum, segment) => sum + segmentLength(segment), 0)

/** Where a length from the start lies: segment and parameter. Lengths outside give the ends. */
export function pathPlaceAt(path: Path, length: number): { readonly index: number; readonly t: number } {
  let left = length
  for (let index = 0; index < path.length; index += 1) {
    const own = segmentLength(segmentOf(path, index))
    if (left <= own || index === path.length - 1) return { index, t: segmentParameterAt(segmentOf(path, index), left) }
    left -= own
  }
  throw new Error('The path has no segment')
}

/** The point at a length from the start, mm. */
export function pathPointAt(path: Path, length: number): Point {
  const place = pathPlaceAt(path, length)
  return segmentPointAt(segmentOf(path, place.index), place.t)
}

/** Unit direction of travel at a length from the start. */
export function pathTangentAt(path: Path, length: number): Point {
  const place = pathPlaceAt(path, length)
  return segmentTangentAt(segmentOf(path, place.index), place.t)
}

/** Direction of travel at the start. */
export const pathStartTangent = (path: Path): Point => segmentTangentAt(segmentOf(path, 0), 0)

/** Direction of travel at the end. */
export const pathEndTangent = (path: Path): Point => segmentTangentAt(segmentOf(path, -1), 1)

/** Both parts of a path cut at a length from its start; a part without length is empty. */
export function pathSplitAt(path: Path, length: number): readonly [Path, Path] {
  const place = pathPlaceAt(path, length)
  const [first, second] = segmentSplitAt(segmentOf(path, place.index), place.t)
  const before = path.slice(0, place.index)
  const after = path.slice(place.index + 1)
  if (place.t <= 0) return [before, path.slice(place.index)]
  if (place.t >= 1) return [path.slice(0, place.index + 1), after]
  return [
    [...before, first],
    [second, ...after],
  ]
}

/** The same curve travelled the other way. */
export const pathReverse = (path: Path): Path => path.map(segmentReverse).reverse()

/** The image of a path under an affine map. */
export const pathTransform = (path: Path, map: Transform): Path => path.map((segment) => segmentTransform(segment, map))

/** Mirrored across the vertical line at x; twice gives the path back. */
export const pathMirror = (path: Path, x = 0): Path => pathTransform(path, mirrorAcross(x))

/** Points along a path with both ends, nowhere further than `tolerance` mm from the curve; equal neighbours are one point. */
export function pathFlatten(path: Path, tolerance = FLATTEN_TOLERANCE): readonly Point[] {
  const points: Point[] = []
  for (const segment of path) {
    for (const at of segmentFlatten(segment, tolerance)) {
      const last = points.at(-1)
      if (last === undefined || Math.abs(last.x - at.x) > POINT_TOLERANCE || Math.abs(last.y - at.y) > POINT_TOLERANCE) points.push(at)
    }
  }
  return points
}
