import type { Alteration, DraftPiece, EdgeId, EdgeNode, PieceEdge, PieceId, PointRole, SeamComparison } from '#shared/domain/draft/types'
import { edgeWords, lowerFirst, pieceWords } from '#shared/domain/draft/roles'
import { TRUE_WITHIN } from '#shared/domain/draft/truing'
import type { Mm } from '#shared/domain/units/brand'
import { formatLength } from '#shared/domain/units/format'

export type BoardUnit = 'cm' | 'in'

export const pieceName = (piece: PieceId): string => lowerFirst(pieceWords(piece))

/** An edge in the trade's words; a centre says which one. */
export function edgeName(piece: Pick<DraftPiece, 'zone'>, edge: EdgeId): string {
  if (edge === 'centre') return piece.zone === 'front' ? 'centre front' : 'centre back'
  return edgeWords(edge)
}

export const nodeName = (node: string): string => node.replaceAll('-', ' ')

/** `at underarm`, `curve after underarm`. */
export function pointName(role: Pick<PointRole, 'node' | 'handle'>): string {
  return role.handle ? `curve ${role.handle} ${nodeName(role.node)}` : nodeName(role.node)
}

export const EDGE_KIND_WORDS: Readonly<Record<PieceEdge['kind'], string>> = {
  seam: 'seam',
  fold: 'on the fold',
  opening: 'opening',
  finished: 'finished edge',
}

/** Small lengths and differences: tenths of a mm, or thousandths of an inch. */
export const fineLength = (length: number, unit: BoardUnit): string =>
  formatLength(length as Mm, unit === 'in' ? 'in' : 'mm', unit === 'in' ? 3 : 1)

export const isTrue = (seam: Pick<SeamComparison, 'difference'>): boolean => Math.abs(seam.difference) <= TRUE_WITHIN

/** `true`, or `off by 1.2 mm`. */
export const seamState = (difference: number, unit: BoardUnit): string =>
  Math.abs(difference) <= TRUE_WITHIN ? 'true' : `off by ${fineLength(Math.abs(difference), unit)}`

/** `out 4.0 mm, up 1.5 mm`: a displacement in the piece's frame. */
export function moveWords(dx: number, dy: number, unit: BoardUnit): string {
  const parts = [
    dx === 0 ? null : `${dx > 0 ? 'out' : 'in'} ${fineLength(Math.abs(dx), unit)}`,
    dy === 0 ? null : `${dy > 0 ? 'up' : 'down'} ${fineLength(Math.abs(dy), unit)}`,
  ].filter((part) => part !== null)
  return parts.length ? parts.join(', ') : 'not moved'
}

/** Points of an edge with the handles beside them, in the order in which they lie along it. */
export function edgePoints(edge: PieceEdge): { readonly node: EdgeNode; readonly handles: readonly ('before' | 'after')[] }[] {
  return edge.nodes.map((node, index) => ({
    node,
    handles: [
      edge.path[index - 1]?.kind === 'cubic' ? ('before' as const) : null,
      edge.path[index]?.kind === 'cubic' ? ('after' as const) : null,
    ].filter((handle) => handle !== null),
  }))
}

/** What an alteration does, with its amount. */
export function alterationWords(alteration: Alteration, unit: BoardUnit): string {
  switch (alteration.kind) {
    case 'move':
      return `${moveWords(alteration.dx, alteration.dy, unit)}${alteration.carry ? ', carried to the mate' : ''}`
    case 'girth':
      return `${alteration.amount < 0 ? 'taken in' : 'let out'} ${fineLength(Math.abs(alteration.amount), unit)} in all`
    case 'length':
      return `${fineLength(Math.abs(alteration.by), unit)} ${alteration.by < 0 ? 'shorter' : 'longer'}`
  }
}
