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
  /** Its allowance is turned under along it: the lines beside it are mirrored across it, so that they lie on each other once it is turned. */
  readonly turned?: boolean
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
  readonly turned: boolean
}

function sidesOf({ points, allowance, turned = false }: OffsetRun): readonly Side[] {
  const sides: Side[] = []
  for (let index = 1; index < points.length; index += 1) {
    const from = points[index - 1] as Point
    const to = points[index] as Point
    if (pointDistance(from, to) <= POINT_TOLERANCE) continue
    const along = vectorUnit(pointSubtract(to, from))
    sides.push({ from, to, along, out: vectorRight(along), allowance, turned })
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
 * The corner where a turned edge meets another: the other's cutting line up to the turned edge's own line, then mirrored across it out to
 * the turned edge's cutting line. Null where a mitre has to do.
 */
function turnedCorner(before: Side, after: Side, reach: number): readonly Point[] | null {
  if (before.turned === after.turned) return null
  const [plain, hem] = before.turned ? [after, before] : [before, after]
  // Without an allowance beside it there is nothing to lie on: a fold, where the hem runs on into its own mirror image.
  if (!(hem.allowance > 0) || !(plain.allowance > 0)) return null
  const at = after.from
  // Into the piece along the plain edge, and its mirror image across the hem, out of the piece.
  const inwards = before.turned ? plain.along : { x: -plain.along.x, y: -plain.along.y }
  const share = 2 * vectorDot(inwards, hem.along)
  const outwards = { x: share * hem.along.x - inwards.x, y: share * hem.along.y - inwards.y }
  const onPlain = pointAlong(at, plain.out, plain.allowance)
  const onHem = pointAlong(at, hem.out, hem.allowance)
  const first = linesMeet(onPlain, plain.along, at, hem.along)
  if (first === null) return null
  const turn = pointAlong(onPlain, plain.along, first.alongU)
  const second = linesMeet(turn, outwards, onHem, hem.along)
  if (second === null || second.alongU <= 0) return null
  const end = pointAlong(turn, outwards, second.alongU)
  if (pointDistance(at, turn) > reach || pointDistance(at, end) > reach) return null
  return before.turned ? [end, turn] : [turn, end]
}

/**
 * Where two runs meet at a corner that turns outwards and one of them, wider offset than the other, has to end before the
 * corner: the line of the next run, drawn on backwards, cuts the one before. Null where it does not within the limit.
 */
function cutBack(line: readonly Point[], from: Point, along: Point, at: Point, reach: number): readonly Point[] | null {
  const aside = (own: Point) => vectorCross(along, pointSubtract(own, from))
  for (let index = line.length - 1; index > 0; index -= 1) {
    const [a, b] = [line[index - 1] as Point, line[index] as Point]
    const [before, after] = [aside(a), aside(b)]
    if (before === after || before * after > 0) continue
    const t = before / (before - after)
    const meet = { x: a.x + (b.x - a.x) * t, y: a.y + (b.y - a.y) * t }
    return pointDistance(at, meet) <= reach ? [...line.slice(0, index), meet] : null
  }
  return null
}

/**
 * The closed outline outside `runs`, each by its own allowance, corners mitred; a mitre longer than `mitreLimit`
 * allowances is cut off straight. Runs follow each other counter-clockwise and close. Where the allowance of a hollow
 * runs into itself the loops are taken out, so the line never crosses itself. Counter-clockwise; null when nothing is left.
 */
export function outlineOffset(runs: readonly OffsetRun[], mitreLimit = MITRE_LIMIT): Polygon | null {
  const parts = runs.map(sidesOf).filter((sides) => sides.length > 0)
  if (parts.reduce((sum, sides) => sum + sides.length, 0) < 3) return null
  const lines: (readonly Point[])[] = parts.map((sides) =>
    sides.slice(1).flatMap((after, index) => corner(sides[index] as Side, after, mitreLimit)),
  )
  const joints: (readonly Point[])[] = parts.map((sides, index) => {
    const next = (index + 1) % parts.length
    const [before, after] = [sides.at(-1) as Side, (parts[next] as readonly Side[])[0] as Side]
    const [first, second] = [pointAlong(after.from, before.out, before.allowance), pointAlong(after.from, after.out, after.allowance)]
    const meet = linesMeet(first, before.along, second, after.along)
    const turn = vectorCross(before.along, after.along)
    const reach = Math.max(before.allowance, after.allowance) * mitreLimit
    if (meet !== null && turn >= NEARLY_STRAIGHT && meet.alongU < -pointDistance(before.from, before.to)) {
      const cut = cutBack([...(lines[index] as readonly Point[]), first], second, after.along, after.from, reach)
      if (cut !== null) {
        lines[index] = cut
        return []
      }
    }
    if (meet !== null && turn >= NEARLY_STRAIGHT && meet.alongV > pointDistance(after.from, after.to)) {
      const backwards = [second, ...(lines[next] as readonly Point[])].reverse()
      const cut = cutBack(backwards, first, before.along, after.from, reach)
      if (cut !== null) {
        lines[next] = [...cut].reverse()
        return []
      }
    }
    return (turn >= NEARLY_STRAIGHT ? turnedCorner(before, after, reach) : null) ?? corner(before, after, mitreLimit)
  })
  const raw = lines.flatMap((line, index) => [...line, ...(joints[index] as readonly Point[])])
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
