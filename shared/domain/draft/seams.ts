import { pathLength, pathPointAt, pathTangentAt } from '../geometry/path'
import { vectorLeft } from '../geometry/point'
import { mm } from '../units/brand'
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

/** The seams between the four pieces of a half; `a` is travelled from the hem up, or from the side to the neck. */
export const SEAMS: readonly Seam[] = [
  {
    id: 'front-princess',
    name: 'Front princess seam',
    a: { piece: 'front-centre', edge: 'princess' },
    b: { piece: 'side-front', edge: 'princess' },
    sameWay: false,
    notch: 'single',
  },
  {
    id: 'side',
    name: 'Side seam',
    a: { piece: 'side-front', edge: 'side' },
    b: { piece: 'side-back', edge: 'side' },
    sameWay: true,
    notch: 'single',
  },
  {
    id: 'back-princess',
    name: 'Back princess seam',
    a: { piece: 'back-centre', edge: 'princess' },
    b: { piece: 'side-back', edge: 'princess' },
    sameWay: false,
    notch: 'double',
  },
  {
    id: 'shoulder-centre',
    name: 'Shoulder seam at the neck',
    a: { piece: 'front-centre', edge: 'shoulder' },
    b: { piece: 'back-centre', edge: 'shoulder' },
    sameWay: true,
    notch: 'single',
  },
  {
    id: 'shoulder-side',
    name: 'Shoulder seam at the arm',
    a: { piece: 'side-front', edge: 'shoulder' },
    b: { piece: 'side-back', edge: 'shoulder' },
    sameWay: true,
    notch: 'single',
  },
]

/** Whether mates are travelled the same way (front and back lie with the centre on the same side) or against each other. */
export function matesTravelAlike(piece: PieceId, edge: EdgeId): boolean {
  return SEAMS.find((seam) => [seam.a, seam.b].some((own) => own.piece === piece && own.edge === edge))?.sameWay ?? false
}

/** An edge of a piece; that it is there is the draft's own promise. */
export function edgeOf(pieces: readonly DraftPiece[], piece: PieceId, edge: EdgeId): PieceEdge {
  const own = pieces.find(({ id }) => id === piece)?.edges.find(({ id }) => id === edge)
  if (own === undefined) throw new Error(`The draft has no ${edge} edge on ${piece}`)
  return own
}

/** Every seam with the length of both mates along the seam line, mm, and their difference. */
export function compareSeams(pieces: readonly DraftPiece[]): readonly SeamComparison[] {
  return SEAMS.map(({ name, a, b }) => {
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
  for (const { id, a, b, sameWay, notch } of SEAMS) {
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
