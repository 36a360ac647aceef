import type { BlockId, Draft, DraftPiece, EdgeId, HalfPieceId, LineId, PieceId, SeamLetter } from './types'

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

const RIGHT = 'right-'

/** Whether a piece is one of a right half that differs. */
export const isRight = (piece: PieceId): boolean => piece.startsWith(RIGHT)

/** A piece's role in its half, whichever that is. */
export const roleInHalf = (piece: PieceId): HalfPieceId => (isRight(piece) ? piece.slice(RIGHT.length) : piece) as HalfPieceId

/** The same role in the right half. */
export const inRightHalf = (piece: PieceId): PieceId => `right-${roleInHalf(piece)}`

/** The part of the half in which a piece lies; a half of one panel counts to its centre. */
export function blockOf(piece: PieceId): BlockId {
  const own = roleInHalf(piece)
  if (own === 'front') return 'front-centre'
  if (own === 'back') return 'back-centre'
  return (letterOf(own) === null ? own : own.slice(0, -2)) as BlockId
}

/** The half in which a piece lies. */
export const halfOf = (piece: PieceId): 'front' | 'back' => (blockOf(piece).includes('front') ? 'front' : 'back')

/** A piece in the trade's words: `Side front`, `Side front A`, `Front`, `Right side front`. */
export function pieceWords(piece: PieceId): string {
  if (isRight(piece)) return `Right ${lowerFirst(pieceWords(roleInHalf(piece)))}`
  if (piece === 'front' || piece === 'back') return piece === 'front' ? 'Front' : 'Back'
  const letter = letterOf(piece)
  const name = BLOCK_NAMES[blockOf(piece)]
  return letter === null ? name : `${name} ${letter.toUpperCase()}`
}

/** Words within a sentence. */
export const lowerFirst = (words: string): string => words.replace(/^./, (first) => first.toLowerCase())

/** Every piece that is cut: of the drawn half, and of a right half that differs. Drafts kept before there was one have none. */
export const allPieces = ({ pieces, right }: Pick<Draft, 'pieces'> & Partial<Pick<Draft, 'right'>>): readonly DraftPiece[] => [
  ...pieces,
  ...(right ?? []),
]

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
