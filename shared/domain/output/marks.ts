import type { Notch, PieceEdge } from '../draft/types'
import type { Path, Point, Segment } from '../geometry/types'

const NOTCH_WITHOUT_ALLOWANCE = 5
const DOUBLE_NOTCH_APART = 4

const line = (from: Point, to: Point): Segment => ({ kind: 'line', from, to })
const along = (from: Point, direction: Point, distance: number): Point => ({
  x: from.x + direction.x * distance,
  y: from.y + direction.y * distance,
})

/**
 * The strokes of a notch in the piece's frame: from the seam line square across the allowance to the cutting line, twice
 * for a double one (4 mm apart). Where the edge has no allowance the stroke runs 5 mm into the piece.
 */
export function notchStrokes(notch: Notch, edge: PieceEdge): readonly Path[] {
  const length = edge.allowance > 0 ? -edge.allowance : NOTCH_WITHOUT_ALLOWANCE
  const edgewise = { x: -notch.inward.y, y: notch.inward.x }
  const starts = notch.kind === 'single' ? [0] : [-DOUBLE_NOTCH_APART / 2, DOUBLE_NOTCH_APART / 2]
  return starts.map((shift) => {
    const start = along(notch.at, edgewise, shift)
    return [line(start, along(start, notch.inward, length))]
  })
}

/** An open arrow head of two strokes at `tip`, looking from `from`; `size` mm long. */
export function arrowHead(from: Point, tip: Point, size: number): Path {
  const length = Math.hypot(tip.x - from.x, tip.y - from.y)
  if (length === 0) return []
  const back = { x: (from.x - tip.x) / length, y: (from.y - tip.y) / length }
  const side = { x: -back.y, y: back.x }
  const neck = along(tip, back, size)
  return [line(along(neck, side, size * 0.4), tip), line(tip, along(neck, side, -size * 0.4))]
}

/** Three strokes across an arrow, a quarter from its end: cloth that is ruled and pulled. The middle stays free for a grain line. */
export function pullStrokes(from: Point, to: Point, size: number): readonly Path[] {
  const length = Math.hypot(to.x - from.x, to.y - from.y)
  if (length === 0) return []
  const ahead = { x: (to.x - from.x) / length, y: (to.y - from.y) / length }
  const side = { x: -ahead.y, y: ahead.x }
  const middle = along(from, ahead, length * 0.75)
  return [-1, 0, 1].map((step) => {
    const centre = along(middle, ahead, step * size)
    return [line(along(centre, side, size / 2), along(centre, side, -size / 2))]
  })
}

/** A small upright cross that marks a point, `size` mm wide. */
export function pointCross(at: Point, size: number): readonly Path[] {
  const half = size / 2
  return [
    [line({ x: at.x - half, y: at.y }, { x: at.x + half, y: at.y })],
    [line({ x: at.x, y: at.y - half }, { x: at.x, y: at.y + half })],
  ]
}
