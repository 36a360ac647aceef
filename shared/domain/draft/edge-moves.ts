import { pointAdd } from '../geometry/point'
import { lineSegment } from '../geometry/segment'
import type { Point, Segment } from '../geometry/types'
import type { DraftPiece, PieceEdge, PieceId, PointRole } from './types'

/** A point of a piece found by its role. */
export interface Place {
  readonly piece: DraftPiece
  readonly edge: PieceEdge
  /** Index of the node along the edge. */
  readonly index: number
}

/** Where a role lies; null where the draft has no such point or handle. */
export function placeOf(pieces: readonly DraftPiece[], role: PointRole): Place | null {
  const piece = pieces.find(({ id }) => id === role.piece)
  const edge = piece?.edges.find(({ id }) => id === role.edge)
  const index = edge?.nodes.findIndex(({ name }) => name === role.node) ?? -1
  if (piece === undefined || edge === undefined || index < 0) return null
  if (role.handle === undefined) return { piece, edge, index }
  const segment = edge.path[role.handle === 'before' ? index - 1 : index]
  return segment?.kind === 'cubic' ? { piece, edge, index } : null
}

function shifted(segment: Segment, by: Point, end: 'from' | 'to'): Segment {
  if (segment.kind === 'line') {
    return end === 'from' ? lineSegment(pointAdd(segment.from, by), segment.to) : lineSegment(segment.from, pointAdd(segment.to, by))
  }
  return end === 'from'
    ? { ...segment, from: pointAdd(segment.from, by), c1: pointAdd(segment.c1, by) }
    : { ...segment, to: pointAdd(segment.to, by), c2: pointAdd(segment.c2, by) }
}

/** An edge with one node moved; the handles on both sides of it go along. */
function moveNode(edge: PieceEdge, index: number, by: Point): PieceEdge {
  return {
    ...edge,
    nodes: edge.nodes.map((node, own) => (own === index ? { ...node, at: pointAdd(node.at, by) } : node)),
    path: edge.path.map((segment, own) => {
      if (own === index) return shifted(segment, by, 'from')
      return own === index - 1 ? shifted(segment, by, 'to') : segment
    }),
  }
}

function moveHandle(edge: PieceEdge, index: number, handle: 'before' | 'after', by: Point): PieceEdge {
  const place = handle === 'before' ? index - 1 : index
  return {
    ...edge,
    path: edge.path.map((segment, own) => {
      if (own !== place || segment.kind === 'line') return segment
      return handle === 'before' ? { ...segment, c2: pointAdd(segment.c2, by) } : { ...segment, c1: pointAdd(segment.c1, by) }
    }),
  }
}

/** The edges of a piece with one point moved; a corner is the last node of one edge and the first of the next, and both follow. */
export function moveIn({ piece, edge, index }: Place, handle: PointRole['handle'], by: Point): readonly PieceEdge[] {
  const edges = [...piece.edges]
  const place = edges.indexOf(edge)
  if (handle !== undefined) {
    edges[place] = moveHandle(edge, index, handle, by)
    return edges
  }
  edges[place] = moveNode(edge, index, by)
  if (index === 0) {
    const before = (place + edges.length - 1) % edges.length
    const own = edges[before] as PieceEdge
    edges[before] = moveNode(own, own.nodes.length - 1, by)
  }
  if (index === edge.nodes.length - 1) {
    const after = (place + 1) % edges.length
    edges[after] = moveNode(edges[after] as PieceEdge, 0, by)
  }
  return edges
}

/** The pieces with the edges of one of them replaced. */
export const withEdges = (pieces: readonly DraftPiece[], id: PieceId, edges: readonly PieceEdge[]): readonly DraftPiece[] =>
  pieces.map((piece) => (piece.id === id ? { ...piece, edges } : piece))
