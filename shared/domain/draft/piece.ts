import type { LevelId } from '../body/types'
import { pathCrossingsAtHeight } from '../geometry/crossings'
import { outlineOffset } from '../geometry/offset'
import { pathEnd, pathFlatten, pathStart } from '../geometry/path'
import { pointAlong, pointDistance } from '../geometry/point'
import { polygonArea, polygonIsSimple } from '../geometry/polygon'
import type { Polygon } from '../geometry/polygon'
import { segmentTangentAt } from '../geometry/segment'
import type { Path, Point } from '../geometry/types'
import { mm } from '../units/brand'
import type { DraftPiece, PieceEdge } from './types'

/** A level and its height on the pieces, mm over the waist. */
export interface LevelHeight {
  readonly level: LevelId
  readonly y: number
}

/** What a piece is before anything is read off it. */
export type PieceSketch = Pick<DraftPiece, 'id' | 'name' | 'zone' | 'edges' | 'onFold' | 'quantity'>

/** The two edges between which a level crosses a piece: towards the centre the last, away from it the one after the hem. */
export const edgesAcross = (edges: readonly PieceEdge[]): readonly [left: PieceEdge, right: PieceEdge] => [
  edges.at(-1) as PieceEdge,
  edges[1] as PieceEdge,
]

function crossing(edge: PieceEdge, { level, y }: LevelHeight): Point | null {
  const found = pathCrossingsAtHeight(edge.path, y)
  const node = edge.nodes.find((own) => own.level === level)
  // Above the bust an edge may be turned: the level runs to where it lies along the seam.
  if (level === 'top-edge' && node !== undefined) return node.at
  if (node === undefined || found.length < 2) return found[0] ?? null
  return found.reduce((best, at) => (pointDistance(at, node.at) < pointDistance(best, node.at) ? at : best))
}

/** Where each level crosses a piece, from edge to edge, and how wide the piece is there. A level that misses an edge is left out. */
export function levelsAcross(edges: readonly PieceEdge[], heights: readonly LevelHeight[]): DraftPiece['levels'] {
  const [left, right] = edgesAcross(edges)
  return heights.flatMap((height) => {
    const from = crossing(left, height)
    const to = crossing(right, height)
    if (from === null || to === null) return []
    const width = height.level === 'top-edge' ? pointDistance(from, to) - dartOpening(edges, height.y) : to.x - from.x
    return [{ level: height.level, from, to, width: mm(width) }]
  })
}

/** How wide a dart stands open at a height above its point, mm; 0 without one. */
function dartOpening(edges: readonly PieceEdge[], y: number): number {
  const [inner, outer] = [edges.find(({ id }) => id === 'dart'), edges.find(({ id }) => id === 'dart-beyond')]
  if (inner === undefined || outer === undefined) return 0
  const [point, mouth, other] = [pathStart(inner.path), pathEnd(inner.path), pathStart(outer.path)]
  return (pointDistance(mouth, other) * Math.max(0, y - point.y)) / pointDistance(point, mouth)
}

/** The outline of a piece as a polygon, counter-clockwise, corners once. */
export function pieceOutline(edges: readonly PieceEdge[], tolerance?: number): Polygon {
  return edges.flatMap((edge) => pathFlatten(edge.path, tolerance).slice(0, -1))
}

/** Whether the outline of a piece is one closed, counter-clockwise loop that never crosses itself. */
export function outlineIsSound(edges: readonly PieceEdge[]): boolean {
  const outline = pieceOutline(edges)
  if (!outline.every(({ x, y }) => Number.isFinite(x) && Number.isFinite(y))) return false
  return polygonArea(outline) > 0 && polygonIsSimple(outline)
}

/** An edge's line starts and ends along its own tangents for this long, mm, so that corners are mitred square to the true curve. */
const TRUE_END = 0.3

function pointsWithTrueEnds(path: Path): readonly Point[] {
  const points = pathFlatten(path)
  const [first, last] = [path[0], path.at(-1)]
  const start = first?.kind === 'cubic' ? [pointAlong(first.from, segmentTangentAt(first, 0), TRUE_END)] : []
  const end = last?.kind === 'cubic' ? [pointAlong(last.to, segmentTangentAt(last, 1), -TRUE_END)] : []
  return [...points.slice(0, 1), ...start, ...points.slice(1, -1), ...end, ...points.slice(-1)]
}

/** The cutting line: each edge outwards by its own allowance, corners mitred, those of the hem right for turning, folds left. */
export function cuttingLineOf(edges: readonly PieceEdge[]): readonly Point[] {
  const runs = edges.map((edge) => ({ points: pointsWithTrueEnds(edge.path), allowance: edge.allowance, turned: edge.id === 'hem' }))
  return outlineOffset(runs) ?? []
}

function middleAt(edges: readonly PieceEdge[], y: number): { readonly x: number; readonly width: number } | null {
  const [left, right] = edgesAcross(edges)
  const from = pathCrossingsAtHeight(left.path, y)[0]
  const to = pathCrossingsAtHeight(right.path, y)[0]
  return from === undefined || to === undefined ? null : { x: (from.x + to.x) / 2, width: to.x - from.x }
}

/** Grain line, arrow of greatest stretch and place of the label, within the piece, clear of the level lines. */
function marksOf(edges: readonly PieceEdge[], heights: readonly LevelHeight[]): Pick<DraftPiece, 'grain' | 'stretch' | 'labelAt'> {
  const bottom = Math.max(...(edges[0] as PieceEdge).nodes.map(({ at }) => at.y))
  const heightOf = (level: LevelId) => Math.max(bottom, heights.find((own) => own.level === level)?.y ?? bottom)
  const [top, underbust, waist] = [heightOf('bust'), heightOf('underbust'), heightOf('waist')]
  const at = (share: number) => bottom + (top - bottom) * share
  const middles = [0.1, 0.35, 0.6, 0.85].map((share) => middleAt(edges, at(share))).filter((middle) => middle !== null)
  const x = middles.reduce((sum, middle) => sum + middle.x, 0) / Math.max(1, middles.length)
  const y = (underbust + waist) / 2
  const arrow = middleAt(edges, y) ?? { x, width: 40 }
  return {
    grain: { from: { x, y: at(0.08) }, to: { x, y: at(0.92) } },
    stretch: { from: { x: arrow.x - arrow.width * 0.3, y }, to: { x: arrow.x + arrow.width * 0.3, y } },
    labelAt: { x, y: (top + underbust) / 2 },
  }
}

/** A piece with its level crossings, cutting line, grain line, arrow and label place; notches are set when its mates stand. */
export function readPiece(sketch: PieceSketch, heights: readonly LevelHeight[]): DraftPiece {
  return {
    ...sketch,
    ...marksOf(sketch.edges, heights),
    levels: levelsAcross(sketch.edges, heights),
    cuttingLine: cuttingLineOf(sketch.edges),
  }
}
