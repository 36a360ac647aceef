import type { Point } from '../geometry/types'
import { moveIn, placeOf, withEdges } from './edge-moves'
import type { DraftPiece, GirthAlteration, PointRole, SeamRole } from './types'

interface EdgeMove {
  readonly role: PointRole
  readonly by: Point
}

/** Which way is out of a piece at one of its points: right where the point lies on the right edge of its level. */
function outwards(piece: DraftPiece, at: Point, level: string): 1 | -1 {
  const crossing = piece.levels.find((one) => one.level === level)
  const left = crossing?.from.x ?? at.x
  const right = crossing?.to.x ?? at.x
  return Math.abs(at.x - right) <= Math.abs(at.x - left) ? 1 : -1
}

function moveAt(
  pieces: readonly DraftPiece[],
  { piece, edge }: SeamRole,
  level: GirthAlteration['level'],
  outward: number,
): EdgeMove | null {
  const own = pieces.find(({ id }) => id === piece)
  const node = own?.edges.find(({ id }) => id === edge)?.nodes.find((one) => one.level === level)
  if (own === undefined || node === undefined) return null
  return { role: { piece, edge, node: node.name }, by: { x: outward * outwards(own, node.at, level), y: 0 } }
}

/**
 * The moves of a let-out or take-in: each chosen seam gets an equal part of the whole girth, half of it on each of its edges. A seam of two
 * pieces lies twice round the body (four edges), a centre seam once (two). Null where a seam or its point at the level is not in the draft:
 * nothing goes over to another seam. Millimetres.
 */
export function girthMoves(pieces: readonly DraftPiece[], { level, amount, seams }: GirthAlteration): readonly EdgeMove[] | null {
  const moves: EdgeMove[] = []
  for (const seam of seams) {
    const edge = pieces.find(({ id }) => id === seam.piece)?.edges.find(({ id }) => id === seam.edge)
    if (!edge || edge.kind === 'fold') return null
    const { mate } = edge
    const isPaired = mate !== null && (mate.piece !== seam.piece || mate.edge !== seam.edge)
    const each = amount / seams.length / (isPaired ? 4 : 2)
    const own = moveAt(pieces, seam, level, each)
    const other = isPaired ? moveAt(pieces, mate, level, each) : null
    if (own === null || (isPaired && other === null)) return null
    moves.push(own, ...(other === null ? [] : [other]))
  }
  return moves.length === 0 ? null : moves
}

/** The pieces with moves applied; each role has to be there. */
export function withMoves(pieces: readonly DraftPiece[], moves: readonly EdgeMove[]): readonly DraftPiece[] {
  return moves.reduce((now, { role, by }) => {
    const place = placeOf(now, role)
    return place === null ? now : withEdges(now, role.piece, moveIn(place, undefined, by))
  }, pieces)
}
