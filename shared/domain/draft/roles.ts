import type { BlockId, EdgeId, LineId, PieceId, SeamLetter } from './types'

/** From the centre front round to the centre back. */
export const BLOCKS: readonly BlockId[] = ['front-centre', 'side-front', 'side-back', 'back-centre']

const BLOCK_NAMES: Readonly<Record<BlockId, string>> = {
  'front-centre': 'Front centre',
  'side-front': 'Side front',
  'side-back': 'Side back',
  'back-centre': 'Back centre',
}

/** The letter of a further seam's edge or of the piece named after it. */
const letterOf = (id: string): SeamLetter | null => (/-[a-d]$/.test(id) ? (id.at(-1) as SeamLetter) : null)

/** The part of the half in which a piece lies; a half of one panel counts to its centre. */
export function blockOf(piece: PieceId): BlockId {
  if (piece === 'front') return 'front-centre'
  if (piece === 'back') return 'back-centre'
  return (letterOf(piece) === null ? piece : piece.slice(0, -2)) as BlockId
}

/** The half in which a piece lies. */
export const halfOf = (piece: PieceId): 'front' | 'back' => (blockOf(piece).includes('front') ? 'front' : 'back')

/** A piece in the trade's words: `Side front`, `Side front A`, `Front`. */
export function pieceWords(piece: PieceId): string {
  if (piece === 'front' || piece === 'back') return piece === 'front' ? 'Front' : 'Back'
  const letter = letterOf(piece)
  const name = BLOCK_NAMES[blockOf(piece)]
  return letter === null ? name : `${name} ${letter.toUpperCase()}`
}

/** A further seam's edge. */
export const lineOf = (letter: SeamLetter): LineId => `seam-${letter}`

/** The edge that an edge is part of where something parts it: `armhole` of `armhole-dart`. */
export function wholeEdge(edge: EdgeId): EdgeId {
  if (edge === 'dart-beyond') return 'dart'
  return edge.replace(/-(dart|princess)$/, '') as EdgeId
}

/** An edge in the trade's words: `princess seam`, `seam A`, `armhole`, `armhole beyond the dart`. */
export function edgeWords(edge: EdgeId): string {
  const letter = letterOf(edge)
  if (letter !== null) return `seam ${letter.toUpperCase()}`
  switch (edge) {
    case 'princess':
    case 'side':
      return `${edge} seam`
    case 'top':
      return 'top edge'
    case 'dart':
      return 'dart, towards the centre'
    case 'dart-beyond':
      return 'dart, towards the side'
    case 'shoulder-princess':
      return 'shoulder beyond the princess seam'
    case 'top-dart':
      return 'top edge beyond the dart'
    default:
      return edge.endsWith('-dart') ? `${wholeEdge(edge)} beyond the dart` : edge
  }
}
