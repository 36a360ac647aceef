import type { DraftPiece } from '../draft/types'
import { layoutPieces } from './layout'
import { boundsOfPoints, joinBounds, placePoint, type Bounds } from './placing'
import { cutLines, type PrintedLines, type PrintFacts } from './print-words'
import { pieceOperations } from './scene'
import type { DrawingOperation, Placement } from './types'

/** One piece as a drawing program gets it: its operations in layers by role. */
export interface ExchangePiece {
  readonly id: string
  readonly name: string
  readonly placement: Placement
  readonly operations: readonly DrawingOperation[]
}

/** A pattern as one drawing, true size on the drafting plane. */
export interface ExchangeDrawing {
  readonly pieces: readonly ExchangePiece[]
  readonly bounds: Bounds
}

/** Way between the pieces, mm. */
const SPACING = 20
/** Room round the drawing, mm. */
const BORDER = 10

/** Pieces in wearing order, labelled as on a print. Without stretch ticks: those are the wearer's. */
export function exchangeDrawing(facts: PrintFacts, pieces: readonly DraftPiece[], lines: PrintedLines): ExchangeDrawing {
  const placements = layoutPieces(pieces, 'wearing', SPACING)
  const drawn = placements.map((placement) => {
    const piece = pieces.find(({ id }) => id === placement.piece)!
    const operations = pieceOperations(piece, placement, {
      show: { seam: lines !== 'cutting', cutting: lines !== 'seam' },
      bones: facts.bones ?? [],
      lines: [...cutLines(piece, facts), `${facts.garmentCode} · ${facts.version}`],
      textSize: 5,
    })
    return { id: piece.id, name: piece.name, placement, operations }
  })
  const outlines = placements.map((placement) =>
    boundsOfPoints(pieces.find(({ id }) => id === placement.piece)!.cuttingLine.map((point) => placePoint(point, placement))),
  )
  const inner = outlines.length > 0 ? joinBounds(outlines) : { left: 0, right: 0, bottom: 0, top: 0 }
  return {
    pieces: drawn,
    bounds: { left: inner.left - BORDER, right: inner.right + BORDER, bottom: inner.bottom - BORDER, top: inner.top + BORDER },
  }
}
