import type { Draft, DraftPiece, EdgeId, PieceId, SeamComparison } from '../../../shared/domain/draft/types'
import { mm } from '../../../shared/domain/units/brand'
import { printPieces } from '../../fixtures/print-pieces'

const seam = (name: string, a: [PieceId, EdgeId, number], b: [PieceId, EdgeId, number]): SeamComparison => ({
  name,
  a: { piece: a[0], edge: a[1], length: mm(a[2]) },
  b: { piece: b[0], edge: b[1], length: mm(b[2]) },
  difference: mm(a[2] - b[2]),
})

/** An invented draft of four drawn pieces: shapes to lay out and touch. Seam lengths are invented too. */
export function drawnDraft(change: (piece: DraftPiece) => DraftPiece = (piece) => piece): Draft {
  return {
    pieces: printPieces().map(change),
    right: null,
    seams: [
      seam('front princess', ['front-centre', 'princess', 524.2], ['side-front', 'princess', 525.4]),
      seam('side', ['side-front', 'side', 331.6], ['side-back', 'side', 331.4]),
      seam('back princess', ['side-back', 'princess', 505.1], ['back-centre', 'princess', 505.1]),
    ],
    findings: [],
    bustAngle: 18,
    armhole: { length: mm(402), aim: mm(398) },
    frame: {},
  }
}
