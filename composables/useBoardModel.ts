import { sameRole } from '#shared/domain/document/commands'
import type { Draft, DraftPiece, EdgeId, PieceEdge, PieceId, PointRole, SeamComparison } from '#shared/domain/draft/types'
import type { Path, Point, Segment } from '#shared/domain/geometry/types'
import { insideAtHeight, pointsAlong } from '#shared/domain/output/crossings'
import { layoutPieces } from '#shared/domain/output/layout'
import { boundsOfPoints, placePoint, placedBounds } from '#shared/domain/output/placing'
import type { Placement } from '#shared/domain/output/types'

/** Room between two pieces on the board, mm, and the least that is left before they are laid out again. */
export const PIECE_SPACING = 45
const SPACING_LEAST = 8
/** Two points this near are one corner, mm. */
const SAME_PLACE = 0.01

/** A point or handle as it lies on the drafting plane; a handle knows its node's place. */
export interface BoardPoint {
  readonly role: PointRole
  readonly at: Point
  readonly anchor: Point | null
}

export const roleKey = ({ piece, edge, node, handle }: PointRole): string => [piece, edge, node, handle ?? ''].join('/')
export const isNear = (a: Point, b: Point, within = SAME_PLACE): boolean => Math.hypot(a.x - b.x, a.y - b.y) <= within

/** Handles of an edge, in the piece's frame: `after` its node where a curve leaves it, `before` where one arrives. */
function edgeHandles(piece: DraftPiece, edge: PieceEdge): BoardPoint[] {
  return edge.path.flatMap((segment, index): BoardPoint[] => {
    const [start, end] = [edge.nodes[index], edge.nodes[index + 1]]
    if (segment.kind !== 'cubic' || !start || !end) return []
    const of = { piece: piece.id, edge: edge.id }
    return [
      { role: { ...of, node: start.name, handle: 'after' }, at: segment.c1, anchor: segment.from },
      { role: { ...of, node: end.name, handle: 'before' }, at: segment.c2, anchor: segment.to },
    ]
  })
}

/** Every point and handle of a piece, in its own frame, edge after edge. */
export function piecePoints(piece: DraftPiece): BoardPoint[] {
  return piece.edges.flatMap((edge) => [
    ...edge.nodes.map((node): BoardPoint => ({ role: { piece: piece.id, edge: edge.id, node: node.name }, at: node.at, anchor: null })),
    ...edgeHandles(piece, edge),
  ])
}

/** Every point and handle of a draft on the drafting plane. */
export function boardPoints(draft: Draft, placements: readonly Placement[]): BoardPoint[] {
  return draft.pieces.flatMap((piece) => {
    const placement = placements.find((each) => each.piece === piece.id)
    if (!placement) return []
    return piecePoints(piece).map(({ role, at, anchor }) => ({
      role,
      at: placePoint(at, placement),
      anchor: anchor && placePoint(anchor, placement),
    }))
  })
}

/**
 * The point under a place of the plane: the nearest within `radius` mm, handles of the chosen edge first. Where edges meet in a corner the
 * chosen edge's own point is taken, and with `cycle` the next edge's.
 */
export function pointUnder(
  points: readonly BoardPoint[],
  at: Point,
  radius: number,
  selection: PointRole | null,
  cycle = false,
): PointRole | null {
  const near = points
    .map((point) => ({ point, distance: Math.hypot(point.at.x - at.x, point.at.y - at.y) }))
    .filter(({ distance }) => distance <= radius)
    .sort((a, b) => a.distance - b.distance)
  const nearest = near.find(({ point }) => point.role.handle && onEdge(point.role, selection)) ?? near[0]
  if (!nearest) return null
  const there = near
    .map(({ point }) => point)
    .filter((point) => !!point.role.handle === !!nearest.point.role.handle && isNear(point.at, nearest.point.at))
  const chosen = there.findIndex((point) => selection !== null && sameRole(point.role, selection))
  if (chosen >= 0) return there[(chosen + (cycle ? 1 : 0)) % there.length]!.role
  return (there.find((point) => onEdge(point.role, selection)) ?? there[0]!).role
}

const onEdge = (role: PointRole, other: PointRole | null): boolean =>
  other !== null && role.piece === other.piece && role.edge === other.edge

export interface EdgeHit {
  readonly piece: PieceId
  readonly edge: EdgeId
  /** Node of the edge nearest to the place. */
  readonly node: string
}

/** The edge whose line runs within `radius` mm of a place of the plane. */
export function edgeUnder(draft: Draft, placements: readonly Placement[], at: Point, radius: number): EdgeHit | null {
  let best: { hit: EdgeHit; distance: number } | null = null
  for (const piece of draft.pieces) {
    const placement = placements.find((each) => each.piece === piece.id)
    if (!placement) continue
    for (const edge of piece.edges) {
      const line = pointsAlong(edge.path).map((point) => placePoint(point, placement))
      const distance = line.slice(1).reduce((least, point, index) => Math.min(least, distanceToStroke(at, line[index]!, point)), Infinity)
      if (distance > radius || (best && distance >= best.distance)) continue
      const node = [...edge.nodes].sort(
        (a, b) => distanceTo(placePoint(a.at, placement), at) - distanceTo(placePoint(b.at, placement), at),
      )[0]
      if (node) best = { hit: { piece: piece.id, edge: edge.id, node: node.name }, distance }
    }
  }
  return best?.hit ?? null
}

/** The piece that covers a place of the plane. */
export function pieceUnder(draft: Draft, placements: readonly Placement[], at: Point): PieceId | null {
  const found = draft.pieces.find((piece) => {
    const placement = placements.find((each) => each.piece === piece.id)
    if (!placement) return false
    const outline = pointsAlong(piece.edges.flatMap((edge) => edge.path)).map((point) => placePoint(point, placement))
    return insideAtHeight(outline, at.y).some(([left, right]) => at.x >= left && at.x <= right)
  })
  return found?.id ?? null
}

const distanceTo = (a: Point, b: Point): number => Math.hypot(a.x - b.x, a.y - b.y)

function distanceToStroke(point: Point, from: Point, to: Point): number {
  const [dx, dy] = [to.x - from.x, to.y - from.y]
  const t = Math.min(1, Math.max(0, ((point.x - from.x) * dx + (point.y - from.y) * dy) / Math.max(dx * dx + dy * dy, 1e-12)))
  return Math.hypot(from.x + t * dx - point.x, from.y + t * dy - point.y)
}

/** A displacement on the plane as the piece's own frame has it: mirrored pieces turn it round. */
export const toPieceMove = (placement: Placement | undefined, dx: number, dy: number): { readonly dx: number; readonly dy: number } => ({
  dx: placement?.mirrored && dx !== 0 ? -dx : dx,
  dy,
})

/** How far one press of an arrow key moves a point, mm. */
export const NUDGE = 0.5
export const NUDGE_LARGE = 5

/** What an arrow key asks for on the plane, mm; null for any other key. */
export function arrowMove(key: string, large: boolean): { readonly dx: number; readonly dy: number } | null {
  const step = large ? NUDGE_LARGE : NUDGE
  switch (key) {
    case 'ArrowLeft':
      return { dx: -step, dy: 0 }
    case 'ArrowRight':
      return { dx: step, dy: 0 }
    case 'ArrowUp':
      return { dx: 0, dy: step }
    case 'ArrowDown':
      return { dx: 0, dy: -step }
    default:
      return null
  }
}

/**
 * Segments that a move would change, moved, in the piece's frame: a point carries the handles at it and both edges of a corner, a handle
 * only itself. A picture for the drag; the alteration itself is computed by the draft.
 */
export function movedSegments(piece: DraftPiece, role: PointRole, dx: number, dy: number): Path {
  const shift = (point: Point): Point => ({ x: point.x + dx, y: point.y + dy })
  const place = piecePoints(piece).find((point) => sameRole(point.role, role))?.at
  if (!place) return []
  return piece.edges.flatMap((edge) =>
    edge.path.flatMap((segment, index): Segment[] => {
      const own = edge.id === role.edge
      const [startName, endName] = [edge.nodes[index]?.name, edge.nodes[index + 1]?.name]
      if (role.handle) {
        if (!own || segment.kind !== 'cubic') return []
        if (role.handle === 'after' && startName === role.node) return [{ ...segment, c1: shift(segment.c1) }]
        if (role.handle === 'before' && endName === role.node) return [{ ...segment, c2: shift(segment.c2) }]
        return []
      }
      const atStart = own ? startName === role.node : isNear(segment.from, place)
      const atEnd = own ? endName === role.node : isNear(segment.to, place)
      if (!atStart && !atEnd) return []
      const from = atStart ? shift(segment.from) : segment.from
      const to = atEnd ? shift(segment.to) : segment.to
      if (segment.kind === 'line') return [{ kind: 'line', from, to }]
      return [{ kind: 'cubic', from, to, c1: atStart ? shift(segment.c1) : segment.c1, c2: atEnd ? shift(segment.c2) : segment.c2 }]
    }),
  )
}

/** The seam an edge belongs to, with its own length first. */
export function seamOfEdge(
  draft: Draft,
  piece: PieceId,
  edge: EdgeId,
): { readonly seam: SeamComparison; readonly length: number; readonly mateLength: number } | null {
  for (const seam of draft.seams) {
    if (seam.a.piece === piece && seam.a.edge === edge) return { seam, length: seam.a.length, mateLength: seam.b.length }
    if (seam.b.piece === piece && seam.b.edge === edge) return { seam, length: seam.b.length, mateLength: seam.a.length }
  }
  return null
}

/**
 * Placements in wearing order that stay where they were while pieces change a little, so that nothing jumps under the hand; laid out again
 * when pieces come or go, or come nearer than 8 mm to each other.
 */
export function steadyPlacements(draft: Draft, before: readonly Placement[]): Placement[] {
  const fresh = layoutPieces(draft.pieces, 'wearing', PIECE_SPACING)
  const kept = fresh.map((placement) => before.find((old) => old.piece === placement.piece && old.mirrored === placement.mirrored))
  if (before.length !== fresh.length || kept.some((placement) => !placement)) return fresh
  const bounds = fresh.map((placement, index) =>
    placedBounds(
      draft.pieces.find((piece) => piece.id === placement.piece)!,
      kept[index]!,
    ),
  )
  const crowded = bounds.some((own, index) => index > 0 && own.left - bounds[index - 1]!.right < SPACING_LEAST)
  const strewn = bounds.some((own, index) => index > 0 && own.left - bounds[index - 1]!.right > PIECE_SPACING * 3)
  return crowded || strewn ? fresh : kept.map((placement) => placement!)
}

/** Height of each level line on the plane, mm, from the pieces that it crosses. */
export function levelLines(draft: Draft): { readonly level: DraftPiece['levels'][number]['level']; readonly y: number }[] {
  const heights = new Map<DraftPiece['levels'][number]['level'], number[]>()
  for (const piece of draft.pieces)
    for (const { level, from, to } of piece.levels) heights.set(level, [...(heights.get(level) ?? []), from.y, to.y])
  return [...heights].map(([level, ys]) => ({ level, y: ys.reduce((sum, y) => sum + y, 0) / ys.length })).sort((a, b) => b.y - a.y)
}

/** Bounds of all pieces as they lie, mm; null for a draft without pieces. */
export function draftBounds(draft: Draft, placements: readonly Placement[]) {
  const corners = draft.pieces.flatMap((piece) => {
    const placement = placements.find((each) => each.piece === piece.id)
    if (!placement) return []
    const { left, right, top, bottom } = placedBounds(piece, placement)
    return [
      { x: left, y: bottom },
      { x: right, y: top },
    ]
  })
  return corners.length ? boundsOfPoints(corners) : null
}
