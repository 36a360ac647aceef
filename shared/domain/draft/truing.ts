import { pathEndTangent, pathLength, pathStartTangent } from '../geometry/path'
import { pointScale, pointSubtract, pointTurn, vectorCross, vectorDot } from '../geometry/point'
import type { Point } from '../geometry/types'
import { mm, type Mm } from '../units/brand'
import { applyAlterations } from './alterations'
import { allPieces } from './roles'
import type { Alteration, Draft, DraftPiece, MoveAlteration, PieceEdge, PointRole, SeamComparison, SeamRole } from './types'

/** Mates may differ by this much and still be true, mm. Invariant of the draft. */
export const TRUE_WITHIN = 0.5
/** Edges that are joined by a seam may meet at this angle off straight, degrees. Setting. */
export const CORNER_WITHIN = 3
/** A point off its fold by more than this is said, mm. */
const FOLD_WITHIN = 0.05
/** Rounds in which the end of an edge is moved until its length is the mate's. */
const MOST_ROUNDS = 6

/** How far along a seam one of its named points lies on both mates, mm from the end they are compared from. */
export interface SeamStation {
  readonly node: string
  readonly a: Mm
  readonly b: Mm
}

const edgeAt = (pieces: readonly DraftPiece[], { piece, edge }: SeamRole): PieceEdge | undefined =>
  pieces.find(({ id }) => id === piece)?.edges.find(({ id }) => id === edge)

/** Whether mates run the same way: their first points have one name. */
const runAlike = (a: PieceEdge, b: PieceEdge): boolean => a.nodes[0]?.name === b.nodes[0]?.name

function lengthTo(edge: PieceEdge, node: string, fromEnd: boolean): number | null {
  const index = edge.nodes.findIndex(({ name }) => name === node)
  if (index < 0) return null
  return pathLength(fromEnd ? edge.path.slice(index) : edge.path.slice(0, index))
}

/** A seam compared along its way: every point that both mates have, from the hem or the neck on. */
export function seamStations(pieces: readonly DraftPiece[], { a, b }: SeamComparison): readonly SeamStation[] {
  const first = edgeAt(pieces, a)
  const second = edgeAt(pieces, b)
  if (!first || !second) return []
  const alike = runAlike(first, second)
  return first.nodes.flatMap(({ name }) => {
    const own = lengthTo(first, name, false)
    const other = lengthTo(second, name, !alike)
    return own === null || other === null ? [] : [{ node: name, a: mm(own), b: mm(other) }]
  })
}

/** Two edges that a seam joins into one, and the corner between them. */
export interface EdgeCorner {
  readonly seam: SeamComparison
  readonly node: string
  readonly a: SeamRole
  readonly b: SeamRole
  /** Degrees off straight on: above 0 the joined edge stands out, below it has a notch. */
  readonly angle: number
}

interface CornerSide {
  readonly edge: PieceEdge
  /** The joined edge leaves the seam's end at its own start. */
  readonly leaves: boolean
  /** Radians inside the piece between the seam and the joined edge. */
  readonly inside: number
}

const angleBetween = (from: Point, to: Point): number => Math.atan2(vectorCross(from, to), vectorDot(from, to))

function sideAt(piece: DraftPiece, edge: PieceEdge, node: string): CornerSide | null {
  const index = piece.edges.indexOf(edge)
  const count = piece.edges.length
  const leaves = edge.nodes.at(-1)?.name === node
  if (!leaves && edge.nodes[0]?.name !== node) return null
  const joined = piece.edges[(index + (leaves ? 1 : count - 1)) % count] as PieceEdge
  const [into, out] = leaves
    ? [pathEndTangent(edge.path), pathStartTangent(joined.path)]
    : [pathEndTangent(joined.path), pathStartTangent(edge.path)]
  return { edge: joined, leaves, inside: Math.PI - angleBetween(into, out) }
}

/** Every corner that a seam leaves in an edge it joins, at both its ends. At a centre a point may be asked for. */
export function edgeCorners(pieces: readonly DraftPiece[], seams: readonly SeamComparison[]): readonly EdgeCorner[] {
  return seams.flatMap((seam) => {
    if (seam.a.edge === 'centre') return []
    const [first, second] = [pieces.find(({ id }) => id === seam.a.piece), pieces.find(({ id }) => id === seam.b.piece)]
    const [own, other] = [edgeAt(pieces, seam.a), edgeAt(pieces, seam.b)]
    if (!first || !second || !own || !other) return []
    return [own.nodes[0]!.name, own.nodes.at(-1)!.name].flatMap((node): EdgeCorner[] => {
      const a = sideAt(first, own, node)
      const b = sideAt(second, other, node)
      if (!a || !b || a.edge.id !== b.edge.id) return []
      const angle = ((a.inside + b.inside - Math.PI) * 180) / Math.PI
      return [{ seam, node, a: { piece: first.id, edge: a.edge.id }, b: { piece: second.id, edge: b.edge.id }, angle }]
    })
  })
}

/** A point that left the straight line of its fold. */
export interface BentFold {
  readonly role: PointRole
  /** How far it stands off, mm. */
  readonly off: Mm
}

/** Points of folds that no longer lie on one straight line, against the middle one of its points. */
export function bentFolds(pieces: readonly DraftPiece[]): readonly BentFold[] {
  return pieces.flatMap((piece) =>
    piece.edges.flatMap((edge) => {
      if (edge.kind !== 'fold') return []
      const places = edge.nodes.map(({ at }) => at.x).sort((a, b) => a - b)
      const line = places[places.length >> 1]!
      return edge.nodes.flatMap(({ name, at }) =>
        Math.abs(at.x - line) <= FOLD_WITHIN ? [] : [{ role: { piece: piece.id, edge: edge.id, node: name }, off: mm(at.x - line) }],
      )
    }),
  )
}

/** One action that trues: a change to an alteration that stands, or further ones. */
export type Mend =
  | { readonly kind: 'change'; readonly label: string; readonly id: string; readonly patch: { readonly carry: true } | { readonly dx: Mm } }
  | { readonly kind: 'add'; readonly label: string; readonly alterations: readonly Omit<MoveAlteration, 'id'>[] }

const touches = ({ role }: MoveAlteration, { a, b }: SeamComparison): boolean =>
  [a, b].some(({ piece, edge }) => role.piece === piece && role.edge === edge)
const differenceAfter = (plain: Draft, alterations: readonly Alteration[], name: string): number =>
  applyAlterations(plain, alterations).draft.seams.find((one) => one.name === name)?.difference ?? Infinity

/** The free end of an edge: not the hem, nor where a shoulder meets the princess seam. */
function freeEnd(edge: PieceEdge): 'start' | 'end' {
  const held = new Set(['hem', 'princess', 'centre'])
  return held.has(edge.nodes.at(-1)!.name) ? 'start' : 'end'
}

/**
 * What trues a seam whose mates differ: a move on it that was not carried is carried, if that does it; else the end of its second edge is
 * moved along that edge until both are alike. `plain` is the draft before alterations. Null where the seam is true or nothing helps.
 */
export function mendSeam(plain: Draft, alterations: readonly Alteration[], seam: SeamComparison): Mend | null {
  if (Math.abs(seam.difference) <= TRUE_WITHIN) return null
  for (const one of alterations) {
    if (one.kind !== 'move' || !one.on || one.carry || !touches(one, seam)) continue
    const carried = alterations.map((own) => (own === one ? { ...one, carry: true } : own))
    if (Math.abs(differenceAfter(plain, carried, seam.name)) <= TRUE_WITHIN)
      return { kind: 'change', label: `Carry “${one.name}” to the mate`, id: one.id, patch: { carry: true } }
  }
  return mendByEnd(plain, alterations, seam)
}

function mendByEnd(plain: Draft, alterations: readonly Alteration[], seam: SeamComparison): Mend | null {
  const altered = applyAlterations(plain, alterations).draft
  const pieces = allPieces(altered)
  const edge = edgeAt(pieces, seam.b)
  const piece = pieces.find(({ id }) => id === seam.b.piece)
  if (!edge || !piece) return null
  const end = freeEnd(edge)
  const node = (end === 'end' ? edge.nodes.at(-1) : edge.nodes[0])!.name
  const along = end === 'end' ? pathEndTangent(edge.path) : pointScale(pathStartTangent(edge.path), -1)
  let reach: number = seam.difference
  for (let round = 0; round < MOST_ROUNDS; round++) {
    const by = pointScale(along, reach)
    const move: Omit<MoveAlteration, 'id'> = {
      kind: 'move',
      name: `${seam.name} made true at the ${node.replaceAll('-', ' ')}`,
      role: { ...seamRole(seam.b), node },
      dx: mm(Math.round(by.x * 100) / 100),
      dy: mm(Math.round(by.y * 100) / 100),
      carry: false,
      on: true,
    }
    const left = differenceAfter(plain, [...alterations, { ...move, id: 'mend' }], seam.name)
    if (!Number.isFinite(left)) return null
    if (Math.abs(left) <= TRUE_WITHIN / 2)
      return { kind: 'add', label: `Move the ${node.replaceAll('-', ' ')} of ${piece.name.toLowerCase()}`, alterations: [move] }
    reach += left
  }
  return null
}

const seamRole = ({ piece, edge }: SeamRole): SeamRole => ({ piece, edge })

/**
 * What takes a corner out of a joined edge: the handles beside the seam are turned, half the corner on each side, or all of it where the
 * other side is straight. Null where both are straight lines.
 */
export function mendCorner(pieces: readonly DraftPiece[], corner: EdgeCorner): Mend | null {
  const sides = [corner.a, corner.b].flatMap((role) => {
    const piece = pieces.find(({ id }) => id === role.piece)
    const edge = edgeAt(pieces, role)
    if (!piece || !edge) return []
    const seam = piece.edges.find(({ id }) => id === (role === corner.a ? corner.seam.a.edge : corner.seam.b.edge))
    const at = seam?.nodes.find(({ name }) => name === corner.node)?.at
    if (!at) return []
    const starts = Math.hypot(edge.nodes[0]!.at.x - at.x, edge.nodes[0]!.at.y - at.y) < 1e-6
    const segment = starts ? edge.path[0]! : edge.path.at(-1)!
    if (segment.kind !== 'cubic') return []
    const node = (starts ? edge.nodes[0] : edge.nodes.at(-1))!.name
    return [{ role, at, node, handle: starts ? segment.c1 : segment.c2, starts }]
  })
  if (sides.length === 0) return null
  const turn = (corner.angle * Math.PI) / 180 / sides.length
  return {
    kind: 'add',
    label: 'Run the edge on without a corner',
    alterations: sides.map(({ role, at, node, handle, starts }) => {
      // The outline runs counter-clockwise: an edge that starts at the seam turns with it to come nearer to the seam.
      const to = pointTurn(handle, at, starts ? turn : -turn)
      const by = pointSubtract(to, handle)
      return {
        kind: 'move',
        name: `${corner.seam.name}: ${role.edge} runs on`,
        role: { ...seamRole(role), node, handle: starts ? 'after' : 'before' },
        dx: mm(Math.round(by.x * 100) / 100),
        dy: mm(Math.round(by.y * 100) / 100),
        carry: false,
        on: true,
      } as const
    }),
  }
}

/** What straightens a fold: the move that bent it keeps its height and loses its distance. Null where no single move did it. */
export function mendFold(alterations: readonly Alteration[], { role }: BentFold): Mend | null {
  const one = alterations.find(
    (own): own is MoveAlteration =>
      own.kind === 'move' && own.on && own.role.piece === role.piece && own.role.edge === role.edge && own.role.node === role.node,
  )
  return one ? { kind: 'change', label: 'Bring it back to the fold', id: one.id, patch: { dx: mm(0) } } : null
}
