import { pathEndTangent, pathStart, pathStartTangent } from '../geometry/path'
import { pointAlong, pointDistance, vectorRight } from '../geometry/point'
import { cubicSegment } from '../geometry/segment'
import type { CubicSegment, Path, Point } from '../geometry/types'
import type { HalfFrame } from './frame'
import type { BodiceStyle } from './types'

/** Share of a seam's chord that its handles take where a plain arc is wanted. */
const ARC_HANDLE = 0.36
/** Handles of a round neckline, as shares of its width and depth: a little fuller than a quarter ellipse. */
const NECKLINE_FULLNESS = 0.58
/** How far the neckline may lean in from the shoulder, as a share of its width. */
const NECKLINE_LEAN = 0.4

/** The styled shoulder of a half: where the neckline and the princess seam meet it. */
export interface Shoulder {
  readonly neck: Point
  readonly princess: Point
  readonly end: Point
  /** Square to the shoulder, into the bodice. */
  readonly down: Point
}

/** The shoulder less what the neckline takes off it; the princess seam meets what is left at its share. */
export function shoulderOf(half: HalfFrame, style: BodiceStyle): Shoulder {
  const left = half.shoulderLength - style.necklineWidth
  const at = (length: number) => pointAlong(half.neckShoulder, half.shoulderAlong, length)
  return {
    neck: at(style.necklineWidth),
    princess: at(style.necklineWidth + left * style.princessAt),
    end: half.shoulderEnd,
    down: vectorRight(half.shoulderAlong),
  }
}

/** The princess seam from the bust to the shoulder: upright at the bust, square to the shoulder, one arc between. */
export function princessAbove(half: HalfFrame, shoulder: Shoulder): CubicSegment {
  const handle = pointDistance(half.princess, shoulder.princess) * ARC_HANDLE
  return cubicSegment(
    half.princess,
    pointAlong(half.princess, { x: 0, y: 1 }, handle),
    pointAlong(shoulder.princess, shoulder.down, handle),
    shoulder.princess,
  )
}

/** The neckline from the shoulder to the centre: square to both, so that it runs on across the shoulder seam and the fold. */
export function necklineCurve(shoulder: Shoulder, centre: Point): CubicSegment {
  const { neck, down } = shoulder
  const width = neck.x - centre.x
  const depth = neck.y - centre.y
  const upper = Math.min((depth * NECKLINE_FULLNESS) / Math.max(-down.y, 1e-6), (width * NECKLINE_LEAN) / Math.max(-down.x, 1e-6))
  return cubicSegment(neck, pointAlong(neck, down, upper), { x: centre.x + width * NECKLINE_FULLNESS, y: centre.y }, centre)
}

/**
 * The hem of one piece between two rails read from the hem up, level and square to both, so that joined hems run on
 * without a corner.
 */
export function hemCurve(left: Path, right: Path): CubicSegment {
  const from = pathStart(left)
  const to = pathStart(right)
  const handle = pointDistance(from, to) / 3
  return cubicSegment(
    from,
    pointAlong(from, vectorRight(pathStartTangent(left)), handle),
    pointAlong(to, vectorRight(pathStartTangent(right)), -handle),
    to,
  )
}

/** Whether two paths meet without a corner. Tolerance in radians. */
export function runsOn(before: Path, after: Path, tolerance: number): boolean {
  const a = pathEndTangent(before)
  const b = pathStartTangent(after)
  return Math.abs(Math.atan2(a.x * b.y - a.y * b.x, a.x * b.x + a.y * b.y)) <= tolerance
}
