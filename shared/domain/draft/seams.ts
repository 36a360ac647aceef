import { pathLength, pathPointAt, pathTangentAt } from '../geometry/path'
import { vectorLeft } from '../geometry/point'
import { mm } from '../units/brand'
import { edgeWords, wholeEdge } from './roles'
import type { DraftPiece, EdgeId, Notch, PieceEdge, PieceId, SeamComparison } from './types'

/** A seam of the bodice: both mates, and whether their edges are travelled the same way. */
interface Seam {
  readonly id: string
  readonly name: string
  readonly a: { readonly piece: PieceId; readonly edge: EdgeId }
  readonly b: { readonly piece: PieceId; readonly edge: EdgeId }
  readonly sameWay: boolean
  readonly notch: Notch['kind']
}

/** Whether mates are travelled the same way (front and back lie with the centre on the same side) or against each other. */
export const matesTravelAlike = (edge: EdgeId): boolean => edge === 'side' || wholeEdge(edge) === 'shoulder'

function shoulderSeam(edge: PieceEdge): Pick<Seam, 'id' | 'name'> {
  const inner = startsAtNeck(edge)
  const outer = edge.nodes.some(({ name }) => name === 'tip')
  if (inner && outer) return { id: 'shoulder', name: 'Shoulder seam' }
  return inner ? { id: 'shoulder-centre', name: 'Shoulder seam at the neck' } : { id: 'shoulder-side', name: 'Shoulder seam at the arm' }
}

function seamWords(piece: DraftPiece, edge: PieceEdge): Pick<Seam, 'id' | 'name'> {
  if (edge.id === 'side') return { id: 'side', name: 'Side seam' }
  if (edge.id === 'dart') return { id: 'dart', name: 'Bust dart' }
  if (wholeEdge(edge.id) === 'shoulder') return shoulderSeam(edge)
  const half = piece.zone === 'front' ? 'Front' : 'Back'
  return { id: `${piece.zone}-${edge.id}`, name: `${half} ${edgeWords(edge.id)}` }
}

/**
 * The seams of the bodice by the mates of its edges: those of the front from the centre outwards, the side, those of the back,
 * the shoulders, the dart. `a` is the front's edge, or that of the piece nearer to the centre.
 */
function seamsOf(pieces: readonly DraftPiece[]): readonly Seam[] {
  const seam = (piece: DraftPiece, edge: PieceEdge): Seam => {
    const { id, name } = seamWords(piece, edge)
    const inBack = piece.zone === 'back'
    return {
      id,
      name,
      a: { piece: piece.id, edge: edge.id },
      b: edge.mate as Seam['b'],
      sameWay: matesTravelAlike(edge.id),
      notch: inBack ? 'double' : 'single',
    }
  }
  const owned = pieces.flatMap((piece) => piece.edges.map((edge) => ({ piece, edge })))
  const fromTo = (zone: DraftPiece['zone']) => {
    const own = owned.filter(
      ({ piece, edge }) => piece.zone === zone && edge === piece.edges[1] && edge.id !== 'side' && edge.mate !== null,
    )
    return zone === 'front' ? own : own.reverse()
  }
  const inFront = (test: (edge: PieceEdge) => boolean) =>
    owned.filter(({ piece, edge }) => piece.zone === 'front' && edge.mate !== null && test(edge))
  return [
    ...fromTo('front'),
    ...inFront(({ id }) => id === 'side'),
    ...fromTo('back'),
    ...inFront((edge) => wholeEdge(edge.id) === 'shoulder').sort(
      (one, other) => Number(startsAtNeck(other.edge)) - Number(startsAtNeck(one.edge)),
    ),
    ...inFront(({ id }) => id === 'dart'),
  ].map(({ piece, edge }) => seam(piece, edge))
}

const startsAtNeck = (edge: PieceEdge): boolean => edge.nodes.some(({ name }) => name === 'neck')

/** An edge of a piece; that it is there is the draft's own promise. */
export function edgeOf(pieces: readonly DraftPiece[], piece: PieceId, edge: EdgeId): PieceEdge {
  const own = pieces.find(({ id }) => id === piece)?.edges.find(({ id }) => id === edge)
  if (own === undefined) throw new Error(`The draft has no ${edge} edge on ${piece}`)
  return own
}

/** Every seam with the length of both mates along the seam line, mm, and their difference. */
export function compareSeams(pieces: readonly DraftPiece[]): readonly SeamComparison[] {
  return seamsOf(pieces).map(({ name, a, b }) => {
    const first = pathLength(edgeOf(pieces, a.piece, a.edge).path)
    const second = pathLength(edgeOf(pieces, b.piece, b.edge).path)
    return { name, a: { ...a, length: mm(first) }, b: { ...b, length: mm(second) }, difference: mm(first - second) }
  })
}

/** A notch keeps this far from the ends of its edge, mm. */
const NOTCH_FROM_END = 12

function stationsOf(edge: PieceEdge): readonly { readonly name: string; readonly length: number }[] {
  const whole = pathLength(edge.path)
  const lengthTo = (name: string): number | null => {
    const index = edge.nodes.findIndex((node) => node.name === name)
    return index < 0 ? null : pathLength(edge.path.slice(0, index))
  }
  const bust = lengthTo('bust')
  const stations = [
    { name: 'waist', length: lengthTo('waist') },
    { name: 'bust', length: bust },
    { name: 'upper', length: bust === null || whole - bust < 100 ? null : (bust + whole) / 2 },
  ]
  return stations.flatMap(({ name, length }) =>
    length === null || length < NOTCH_FROM_END || length > whole - NOTCH_FROM_END ? [] : [{ name, length }],
  )
}

function notchAt(edge: PieceEdge, length: number, kind: Notch['kind'], pair: string): Notch {
  return { at: pathPointAt(edge.path, length), inward: vectorLeft(pathTangentAt(edge.path, length)), kind, pair }
}

/** The pieces with their notches: at the same length from the hem on both mates, single in front and at the side, double at the back. */
export function withNotches(pieces: readonly DraftPiece[]): readonly DraftPiece[] {
  const found = new Map<string, Notch[]>()
  const add = (piece: PieceId, edge: EdgeId, notch: Notch) => {
    const key = `${piece} ${edge}`
    found.set(key, [...(found.get(key) ?? []), notch])
  }
  for (const { id, a, b, sameWay, notch } of seamsOf(pieces)) {
    const first = edgeOf(pieces, a.piece, a.edge)
    const second = edgeOf(pieces, b.piece, b.edge)
    const whole = pathLength(second.path)
    for (const station of stationsOf(first)) {
      if (station.length > whole) continue
      const pair = `${id}-${station.name}`
      add(a.piece, a.edge, notchAt(first, station.length, notch, pair))
      add(b.piece, b.edge, notchAt(second, sameWay ? station.length : whole - station.length, notch, pair))
    }
  }
  return pieces.map((piece) => ({
    ...piece,
    edges: piece.edges.map((edge) => ({ ...edge, notches: found.get(`${piece.id} ${edge.id}`) ?? [] })),
  }))
}
