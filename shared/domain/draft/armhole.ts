import { linesMeet, pointAlong, pointDistance, vectorDot, vectorUnit } from '../geometry/point'
import { cubicSegment, segmentCurvatureAt } from '../geometry/segment'
import { transformPoint } from '../geometry/transform'
import type { Transform } from '../geometry/transform'
import type { CubicSegment, Point } from '../geometry/types'
import type { HalfFrame } from './frame'
import type { Shoulder } from './edges'

/** Handles as shares of the way to where the end tangents meet; tried in all pairs. */
const HANDLE_SHARES: readonly number[] = [0.5, 0.58, 0.66, 0.74, 0.82, 0.9]
const CURVATURE_SAMPLES = 16
/** Handles where the end tangents do not meet ahead, as a share of the chord. */
const PLAIN_HANDLE = 0.33

/**
 * A curve between two points with given directions of travel whose sharpest bend is the gentlest that a single cubic
 * allows: an armhole is scooped, never cornered.
 */
export function gentlestCurve(from: Point, leaving: Point, to: Point, arriving: Point): CubicSegment {
  const meet = linesMeet(from, leaving, to, { x: -arriving.x, y: -arriving.y })
  const chord = pointDistance(from, to)
  const plain = cubicSegment(from, pointAlong(from, leaving, chord * PLAIN_HANDLE), pointAlong(to, arriving, -chord * PLAIN_HANDLE), to)
  if (meet === null || meet.alongU <= chord * 0.02 || meet.alongV <= chord * 0.02 || meet.alongU > 3 * chord || meet.alongV > 3 * chord) {
    return plain
  }
  let best = plain
  let least = Infinity
  for (const first of HANDLE_SHARES) {
    for (const second of HANDLE_SHARES) {
      const curve = cubicSegment(from, pointAlong(from, leaving, meet.alongU * first), pointAlong(to, arriving, -meet.alongV * second), to)
      let sharpest = 0
      for (let sample = 0; sample <= CURVATURE_SAMPLES && sharpest < least; sample += 1) {
        sharpest = Math.max(sharpest, Math.abs(segmentCurvatureAt(curve, sample / CURVATURE_SAMPLES)))
      }
      if (sharpest < least) {
        least = sharpest
        best = curve
      }
    }
  }
  return best
}

/** The armhole from the shoulder end through the across point to the underarm. */
export interface ArmholeCurve {
  readonly upper: CubicSegment
  readonly lower: CubicSegment
}

/**
 * Draws the armhole: square to the shoulder, upright at the across point where that is its innermost place, square to
 * the side seam. `turned` carries shoulder end and across point to where they lie on the cloth (in front turned about
 * the bust point); the underarm stays.
 */
export function armholeCurve(half: HalfFrame, shoulder: Shoulder, turned: Transform): ArmholeCurve {
  const { shoulderEnd, across, underarmDrawn, underarm } = half
  const inward = (across.x - shoulderEnd.x) / (across.y - shoulderEnd.y)
  const outward = (underarmDrawn.x - across.x) / (underarmDrawn.y - across.y)
  // dx/dy of the armhole at the across point: upright where the curve turns there, else between both chords.
  const slope = inward * outward <= 0 ? 0 : (2 * inward * outward) / (inward + outward)
  const vector = (direction: Point): Point =>
    vectorUnit({
      x: turned.a * direction.x + turned.c * direction.y,
      y: turned.b * direction.x + turned.d * direction.y,
    })
  const end = transformPoint(turned, shoulderEnd)
  const middle = transformPoint(turned, across)
  const drawn = vectorUnit({ x: -slope, y: -1 })
  const through = vector(drawn)
  const leaving = vector(shoulder.down)
  const chord = pointDistance(end, middle)
  const lean = Math.max(0.2, vectorDot(leaving, through))
  const scoop = gentlestCurve(across, drawn, underarmDrawn, { x: 1, y: 0 })
  // Turned, the scoop's end must bend further: its handle may grow with the room that the turn leaves it.
  const room = linesMeet(middle, through, underarm, { x: -1, y: 0 })?.alongV ?? 0
  const endHandle = Math.max(pointDistance(scoop.c2, scoop.to), Math.min(0.22 * pointDistance(middle, underarm), 0.6 * room))
  return {
    upper: cubicSegment(end, pointAlong(end, leaving, chord * PLAIN_HANDLE * lean), pointAlong(middle, through, -chord * 0.4), middle),
    lower: cubicSegment(
      middle,
      pointAlong(middle, through, pointDistance(scoop.from, scoop.c1)),
      { x: underarm.x - endHandle, y: underarm.y },
      underarm,
    ),
  }
}
