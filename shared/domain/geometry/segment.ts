import { pointAdd, pointBetween, pointDistance, pointScale, pointSubtract, vectorLength, vectorUnit } from './point'
import { FLATTEN_TOLERANCE, LENGTH_TOLERANCE, POINT_TOLERANCE } from './tolerances'
import { transformPoint } from './transform'
import type { Transform } from './transform'
import type { CubicSegment, LineSegment, Point, Segment } from './types'

/** A straight segment. */
export const lineSegment = (from: Point, to: Point): LineSegment => ({ kind: 'line', from, to })

/** A cubic Bézier segment with its two handles. */
export const cubicSegment = (from: Point, c1: Point, c2: Point, to: Point): CubicSegment => ({ kind: 'cubic', from, c1, c2, to })

/** The point at parameter t, 0 to 1. */
export function segmentPointAt(segment: Segment, t: number): Point {
  if (segment.kind === 'line') return pointBetween(segment.from, segment.to, t)
  const s = 1 - t
  const w0 = s * s * s
  const w1 = 3 * s * s * t
  const w2 = 3 * s * t * t
  const w3 = t * t * t
  return {
    x: w0 * segment.from.x + w1 * segment.c1.x + w2 * segment.c2.x + w3 * segment.to.x,
    y: w0 * segment.from.y + w1 * segment.c1.y + w2 * segment.c2.y + w3 * segment.to.y,
  }
}

/** Derivative by the parameter at t, mm per unit of t. */
export function segmentDerivativeAt(segment: Segment, t: number): Point {
  if (segment.kind === 'line') return pointSubtract(segment.to, segment.from)
  const s = 1 - t
  const w0 = 3 * s * s
  const w1 = 6 * s * t
  const w2 = 3 * t * t
  const { from, c1, c2, to } = segment
  return {
    x: w0 * (c1.x - from.x) + w1 * (c2.x - c1.x) + w2 * (to.x - c2.x),
    y: w0 * (c1.y - from.y) + w1 * (c2.y - c1.y) + w2 * (to.y - c2.y),
  }
}

/** Unit direction of travel at t. Where a handle lies on its end, the next point that differs gives the direction. */
export function segmentTangentAt(segment: Segment, t: number): Point {
  const derivative = segmentDerivativeAt(segment, t)
  if (vectorLength(derivative) > POINT_TOLERANCE || segment.kind === 'line') return vectorUnit(derivative)
  const { from, c1, c2, to } = segment
  const chord = t < 0.5 ? [pointSubtract(c2, from), pointSubtract(to, from)] : [pointSubtract(to, c1), pointSubtract(to, from)]
  return vectorUnit(chord.find((vector) => vectorLength(vector) > POINT_TOLERANCE) ?? derivative)
}

/** Signed curvature at t, 1/mm: positive where the segment bends to the left. */
export function segmentCurvatureAt(segment: Segment, t: number): number {
  if (segment.kind === 'line') return 0
  const { from, c1, c2, to } = segment
  const d = segmentDerivativeAt(segment, t)
  const s = 1 - t
  const ddx = 6 * s * (c2.x - 2 * c1.x + from.x) + 6 * t * (to.x - 2 * c2.x + c1.x)
  const ddy = 6 * s * (c2.y - 2 * c1.y + from.y) + 6 * t * (to.y - 2 * c2.y + c1.y)
  const speed = vectorLength(d)
  return speed === 0 ? 0 : (d.x * ddy - d.y * ddx) / (speed * speed * speed)
}

/** Both parts of a segment cut at t; they follow the same curve. */
export function segmentSplitAt(segment: Segment, t: number): readonly [Segment, Segment] {
  if (segment.kind === 'line') {
    const at = pointBetween(segment.from, segment.to, t)
    return [lineSegment(segment.from, at), lineSegment(at, segment.to)]
  }
  const p01 = pointBetween(segment.from, segment.c1, t)
  const p12 = pointBetween(segment.c1, segment.c2, t)
  const p23 = pointBetween(segment.c2, segment.to, t)
  const p012 = pointBetween(p01, p12, t)
  const p123 = pointBetween(p12, p23, t)
  const at = pointBetween(p012, p123, t)
  return [cubicSegment(segment.from, p01, p012, at), cubicSegment(at, p123, p23, segment.to)]
}

/** The same curve travelled the other way. */
export function segmentReverse(segment: Segment): Segment {
  return segment.kind === 'line' ? lineSegment(segment.to, segment.from) : cubicSegment(segment.to, segment.c2, segment.c1, segment.from)
}

/** The image of a segment under an affine map. */
export function segmentTransform(segment: Segment, map: Transform): Segment {
  return segment.kind === 'line'
    ? lineSegment(transformPoint(map, segment.from), transformPoint(map, segment.to))
    : cubicSegment(
        transformPoint(map, segment.from),
        transformPoint(map, segment.c1),
        transformPoint(map, segment.c2),
        transformPoint(map, segment.to),
      )
}

/** Nodes and weights of the eight-point Gauss-Legendre rule on -1..1 (positive half; the rule is even). */
const GAUSS: readonly (readonly [node: number, weight: number])[] = [
  [0.1834346424956498, 0.362683783378362],
  [0.525532409916329, 0.3137066458778873],
  [0.7966664774136267, 0.2223810344533745],
  [0.9602898564975363, 0.1012285362903763],
]
const DEEPEST_HALVING = 24

function speedIntegral(segment: CubicSegment, t0: number, t1: number): number {
  const { from, c1, c2, to } = segment
  const [ax, ay, bx, by, cx, cy] = [c1.x - from.x, c1.y - from.y, c2.x - c1.x, c2.y - c1.y, to.x - c2.x, to.y - c2.y]
  // Written out: this is the innermost loop of every draft.
  const speed = (t: number): number => {
    const s = 1 - t
    const [u, v, w] = [s * s, 2 * s * t, t * t]
    const x = u * ax + v * bx + w * cx
    const y = u * ay + v * by + w * cy
    return 3 * Math.sqrt(x * x + y * y)
  }
  const half = (t1 - t0) / 2
  const middle = (t0 + t1) / 2
  let sum = 0
  for (const [node, weight] of GAUSS) sum += weight * (speed(middle - half * node) + speed(middle + half * node))
  return sum * half
}

function refinedIntegral(segment: CubicSegment, t0: number, t1: number, whole: number, tolerance: number, depth: number): number {
  const middle = (t0 + t1) / 2
  const first = speedIntegral(segment, t0, middle)
  const second = speedIntegral(segment, middle, t1)
  if (depth >= DEEPEST_HALVING || Math.abs(first + second - whole) <= tolerance) return first + second
  return (
    refinedIntegral(segment, t0, middle, first, tolerance / 2, depth + 1) +
    refinedIntegral(segment, middle, t1, second, tolerance / 2, depth + 1)
  )
}

/** Length from t = 0 to `toT`, mm, to `LENGTH_TOLERANCE`: Gauss-Legendre over halves until two estimates agree. */
export function segmentLength(segment: Segment, toT = 1): number {
  if (segment.kind === 'line') return pointDistance(segment.from, segment.to) * toT
  if (toT <= 0) return 0
  return refinedIntegral(segment, 0, toT, speedIntegral(segment, 0, toT), LENGTH_TOLERANCE / 8, 0)
}

/** The parameter at a length from the start, mm; lengths outside the segment give its ends. */
export function segmentParameterAt(segment: Segment, length: number): number {
  const whole = segmentLength(segment)
  if (length <= 0 || whole === 0) return 0
  if (length >= whole) return 1
  if (segment.kind === 'line') return length / whole
  let low = 0
  let high = 1
  let t = length / whole
  for (let round = 0; round < 60; round += 1) {
    const error = segmentLength(segment, t) - length
    if (Math.abs(error) < LENGTH_TOLERANCE / 4) return t
    if (error > 0) high = t
    else low = t
    const speed = vectorLength(segmentDerivativeAt(segment, t))
    const next = speed > 0 ? t - error / speed : low
    t = next > low && next < high ? next : (low + high) / 2
  }
  return t
}

/** Points along a segment with both ends, nowhere further than `tolerance` from the curve (bound by its second derivative). */
export function segmentFlatten(segment: Segment, tolerance = FLATTEN_TOLERANCE): readonly Point[] {
  if (segment.kind === 'line') return [segment.from, segment.to]
  const { from, c1, c2, to } = segment
  const bend1 = vectorLength(pointAdd(pointSubtract(from, pointScale(c1, 2)), c2))
  const bend2 = vectorLength(pointAdd(pointSubtract(c1, pointScale(c2, 2)), to))
  const count = Math.max(1, Math.ceil(Math.sqrt((0.75 * Math.max(bend1, bend2)) / tolerance)))
  const points: Point[] = [from]
  for (let index = 1; index < count; index += 1) points.push(segmentPointAt(segment, index / count))
  points.push(to)
  return points
}
