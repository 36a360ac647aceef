import type { DraftPiece } from '../draft/types'
import { pathTransform } from '../geometry/path'
import type { Path, Point } from '../geometry/types'
import type { Placement } from './types'

/** An upright rectangle on the drafting plane, mm, y up. */
export interface Bounds {
  readonly left: number
  readonly bottom: number
  readonly right: number
  readonly top: number
}

/** A point of a piece's own frame where the placement lays it on the drafting plane, mm. */
export function placePoint(point: Point, placement: Placement): Point {
  return { x: (placement.mirrored ? -point.x : point.x) + placement.offset.x, y: point.y + placement.offset.y }
}

/** A direction of a piece's own frame as the placement turns it: mirrored or as it is, never moved. */
export function placeDirection(direction: Point, placement: Placement): Point {
  return placement.mirrored ? { x: -direction.x, y: direction.y } : direction
}

/** A path where the placement lays it, mm. It keeps its direction of travel; mirrored, a counter-clockwise loop runs clockwise. */
export function placePath(path: Path, placement: Placement): Path {
  const { offset, mirrored } = placement
  return pathTransform(path, { a: mirrored ? -1 : 1, b: 0, c: 0, d: 1, e: offset.x, f: offset.y })
}

/** The seam outline of a piece as one closed path on the drafting plane, edge after edge: for fills and hit tests. */
export function placedOutline(piece: DraftPiece, placement: Placement): Path {
  return placePath(
    piece.edges.flatMap((edge) => edge.path),
    placement,
  )
}

/** Smallest upright rectangle round some points, mm. Throws on an empty list. */
export function boundsOfPoints(points: readonly Point[]): Bounds {
  const first = points[0]
  if (!first) throw new Error('bounds of no points')
  let { x: left, y: bottom, x: right, y: top } = first
  for (const { x, y } of points) {
    left = Math.min(left, x)
    right = Math.max(right, x)
    bottom = Math.min(bottom, y)
    top = Math.max(top, y)
  }
  return { left, bottom, right, top }
}

/** Smallest upright rectangle round a placed piece's cutting line, mm. */
export function placedBounds(piece: DraftPiece, placement: Placement): Bounds {
  return boundsOfPoints(piece.cuttingLine.map((point) => placePoint(point, placement)))
}

/** Smallest upright rectangle round several, mm. Throws on an empty list. */
export function joinBounds(all: readonly Bounds[]): Bounds {
  return boundsOfPoints(
    all.flatMap(({ left, bottom, right, top }) => [
      { x: left, y: bottom },
      { x: right, y: top },
    ]),
  )
}
