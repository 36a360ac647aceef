import { booleanOpD, ClipType, FillRule } from 'clipper2-ts'
import { linesMeet, pointAlong, pointDistance, pointSubtract, vectorCross, vectorDot, vectorRight, vectorUnit } from './point'
import { polygonArea } from './polygon'
import type { Polygon } from './polygon'
import { MITRE_LIMIT, POINT_TOLERANCE } from './tolerances'
import type { Point } from './types'

/** A stretch of an outline with one allowance: its points with both ends, in counter-clockwise order. */
export interface OffsetRun {
  readonly points: readonly Point[]
  /** Distance outwards, mm; 0 keeps the line where it is. */
  readonly allowance: number
}

/** Decimals of a millimetre that the clipping keeps. */
const CLIPPING_PRECISION = 4
const NEARLY_STRAIGHT = 0.02

interface Side {
  readonly from: Point
  readonly to: Point
  readonly along: Point
  readonly out: Point
  readonly allowance: number
}

function sidesOf(runs: readonly OffsetRun[]): readonly Side[] {
  const sides: Side[] = []
  for (const run of runs) {
    for (let index = 1; index < run.points.length; index += 1) {
      const from = run.points[index - 1] as Point
      const to = run.points[index] as Point
      if (pointDistance(from, to) <= POINT_TOLERANCE) continue
      const along = vectorUnit(pointSubtract(to, from))
      sides.push({ from, to, along, out: vectorRight(along), allowance: run.allowance })
    }
  }
  return sides
}

/** What the offset line does at the corner from `before` to `after`. */
function corner(before: Side, after: Side, mitreLimit: number): readonly Point[] {
  const at = after.from
  const first = pointAlong(at, before.out, before.allowance)
  const second = pointAlong(at, after.out, after.allowance)
  if (pointDistance(first, second) <= POINT_TOLERANCE) return [first]
  const turn = vectorCross(before.along, after.along)
  const straightOn = vectorDot(before.along, after.along) > 0
  if (Math.abs(turn) < NEARLY_STRAIGHT && straightOn && before.allowance !== after.allowance) return [first, second]
  const meet = linesMeet(first, before.along, second, after.along)
  if (meet === null) return [first, second]
  const mitre = pointAlong(first, before.along, meet.alongU)
  if (turn >= 0) {
    const reach = Math.max(before.allowance, after.allowance) * mitreLimit
    return pointDistance(at, mitre) <= reach ? [mitre] : [first, second]
  }
  const short = -meet.alongU <= pointDistance(before.from, before.to) && meet.alongV <= pointDistance(after.from, after.to)
  return short && straightOn ? [mitre] : [first, at, second]
}

/**
 * The closed outline outside `runs`, each by its own allowance, corners mitred; a mitre longer than `mitreLimit`
 * allowances is cut off straight. Runs follow each other counter-clockwise and close. Where the allowance of a hollow
 * runs into itself the loops are taken out, so the line never crosses itself. Counter-clockwise; null when nothing is left.
 */
export function outlineOffset(runs: readonly OffsetRun[], mitreLimit = MITRE_LIMIT): Polygon | null {
  const sides = sidesOf(runs)
  if (sides.length < 3) return null
  const raw: Point[] = []
  sides.forEach((after, index) => {
    const before = sides.at(index - 1) as Side
    raw.push(...corner(before, after, mitreLimit))
  })
  const loops = booleanOpD(ClipType.Union, [raw], null, FillRule.Positive, CLIPPING_PRECISION)
  let largest: Polygon | null = null
  let area = 0
  for (const loop of loops) {
    const own = polygonArea(loop)
    if (own > area) {
      area = own
      largest = loop.map(({ x, y }) => ({ x, y }))
    }
  }
  return largest
}
