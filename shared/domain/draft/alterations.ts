import { pathEndTangent, pathStartTangent } from '../geometry/path'
import { pointAdd, vectorDot, vectorRight, vectorUnit } from '../geometry/point'
import { lineSegment } from '../geometry/segment'
import type { Path, Point, Segment } from '../geometry/types'
import { mm } from '../units/brand'
import type { Problem } from '../units/result'
import { armholeLength, levelHeightsOf, readFindings } from './bodice'
import { outlineIsSound, readPiece } from './piece'
import { compareSeams, matesTravelAlike, withNotches } from './seams'
import type { Alteration, Draft, DraftPiece, PieceEdge, PieceId, PointRole } from './types'

/** What became of one alteration. */
export interface AlterationEffect {
  readonly id: string
  readonly state: 'applied' | 'off' | 'parked' | 'refused'
  /** Roles that moved with it: its own, and the mate's when it was carried. */
  readonly moved: readonly PointRole[]
  /** Carried was asked for and the mate has no such point: the seam's difference then says so. */
  readonly notCarried: boolean
  /** Why it was refused. */
  readonly problem: Problem | null
}

/** A draft with its alterations. */
export interface AlteredDraft {
  readonly draft: Draft
  /** Alterations whose role is gone: kept, not applied. */
  readonly parked: readonly Alteration[]
  /** One for each alteration, in order. */
  readonly effects: readonly AlterationEffect[]
}

interface Place {
  readonly piece: DraftPiece
  readonly edge: PieceEdge
  /** Index of the node along the edge. */
  readonly index: number
}

function placeOf(pieces: readonly DraftPiece[], role: PointRole): Place | null {
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
function moveIn({ piece, edge, index }: Place, handle: PointRole['handle'], by: Point): readonly PieceEdge[] {
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

/** Direction of travel along an edge at a node; between two segments the mean of both. */
function alongAt(path: Path, index: number): Point {
  const before = path[index - 1]
  const after = path[index]
  const into = before === undefined ? null : pathEndTangent([before])
  const out = after === undefined ? null : pathStartTangent([after])
  if (into === null) return out ?? { x: 0, y: 1 }
  return out === null ? into : vectorUnit(pointAdd(into, out))
}

/** The mate's same point and the same move there: as far outwards, as far along the seam. */
function carried(
  pieces: readonly DraftPiece[],
  place: Place,
  role: PointRole,
  by: Point,
): { readonly role: PointRole; readonly by: Point } | null {
  const { mate } = place.edge
  if (mate === null || (mate.piece === role.piece && mate.edge === role.edge)) return null
  const alike = matesTravelAlike(role.piece, role.edge)
  const turned = { before: 'after', after: 'before' } as const
  const handle = role.handle === undefined || alike ? role.handle : turned[role.handle]
  const mateRole: PointRole = { piece: mate.piece, edge: mate.edge, node: role.node, ...(handle === undefined ? {} : { handle }) }
  const matePlace = placeOf(pieces, mateRole)
  if (matePlace === null) return null
  const own = alongAt(place.edge.path, place.index)
  const there = alongAt(matePlace.edge.path, matePlace.index)
  const along = vectorDot(by, own) * (alike ? 1 : -1)
  const outwards = vectorDot(by, vectorRight(own))
  const normal = vectorRight(there)
  return { role: mateRole, by: { x: there.x * along + normal.x * outwards, y: there.y * along + normal.y * outwards } }
}

const replaced = (pieces: readonly DraftPiece[], id: PieceId, edges: readonly PieceEdge[]): readonly DraftPiece[] =>
  pieces.map((piece) => (piece.id === id ? { ...piece, edges } : piece))

const effect = (id: string, state: AlterationEffect['state'], rest: Partial<AlterationEffect> = {}): AlterationEffect => ({
  id,
  state,
  moved: [],
  notCarried: false,
  problem: null,
  ...rest,
})

function applyOne(
  pieces: readonly DraftPiece[],
  alteration: Alteration,
): { readonly pieces: readonly DraftPiece[]; readonly effect: AlterationEffect } {
  const { id, role } = alteration
  if (!alteration.on) return { pieces, effect: effect(id, 'off') }
  const place = placeOf(pieces, role)
  if (place === null) return { pieces, effect: effect(id, 'parked') }
  const by = { x: alteration.dx, y: alteration.dy }
  const mate = alteration.carry ? carried(pieces, place, role, by) : null
  let next = replaced(pieces, role.piece, moveIn(place, role.handle, by))
  if (mate !== null) next = replaced(next, mate.role.piece, moveIn(placeOf(next, mate.role) as Place, mate.role.handle, mate.by))
  const touched = [role.piece, ...(mate === null ? [] : [mate.role.piece])]
  const crossed = next.find((piece) => touched.includes(piece.id) && !outlineIsSound(piece.edges))
  if (crossed !== undefined || !Number.isFinite(by.x) || !Number.isFinite(by.y)) {
    const piece = crossed ?? place.piece
    const problem: Problem = {
      code: 'alteration-crosses',
      message: `“${alteration.name}” would make the outline of ${piece.name.toLowerCase()} cross itself.`,
      todo: 'Move the point less far, or switch the alteration off.',
      at: piece.id,
    }
    return { pieces, effect: effect(id, 'refused', { problem }) }
  }
  const seam = place.edge.mate !== null && place.edge.mate.piece !== role.piece
  return {
    pieces: next,
    effect: effect(id, 'applied', {
      moved: mate === null ? [role] : [role, mate.role],
      notCarried: alteration.carry && seam && mate === null,
    }),
  }
}

/**
 * A draft with named moves of points and handles, in order. A role that the draft no longer has parks its alteration; a
 * move that would make an outline cross itself is refused and says which piece. Seams, levels, notches, cutting lines,
 * the armhole and what is said of it are read again; levels keep their heights. The draft given stays as it is.
 */
export function applyAlterations(draft: Draft, alterations: readonly Alteration[]): AlteredDraft {
  let pieces = draft.pieces
  const effects: AlterationEffect[] = []
  for (const alteration of alterations) {
    const step = applyOne(pieces, alteration)
    pieces = step.pieces
    effects.push(step.effect)
  }
  const parked = alterations.filter((_, index) => effects[index]?.state === 'parked')
  if (pieces === draft.pieces) return { draft, parked, effects }
  const heights = levelHeightsOf(draft)
  const read = withNotches(pieces.map((piece, index) => (piece === draft.pieces[index] ? piece : readPiece(piece, heights))))
  const stays = draft.findings.filter(({ code }) => code !== 'armhole-aim-off' && code !== 'piece-narrow')
  return {
    draft: {
      ...draft,
      pieces: read,
      seams: compareSeams(read),
      findings: [...stays, ...readFindings(read, draft.armhole.aim)],
      armhole: { length: mm(armholeLength(read)), aim: draft.armhole.aim },
    },
    parked,
    effects,
  }
}
