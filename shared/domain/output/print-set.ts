import type { DraftPiece, PieceId } from '../draft/types'
import { fail, succeed } from '../units/result'
import type { Result } from '../units/result'
import { insideAtHeight, pointsAlong } from './crossings'
import { layoutPieces } from './layout'
import { measurePages } from './measure-page'
import { overviewPages } from './overview-page'
import { PAPERS } from './paper'
import type { Orientation, PaperId } from './paper'
import { joinBounds, placedBounds, placePoint } from './placing'
import { cutLines } from './print-words'
import type { PrintedLines, PrintFacts } from './print-words'
import { pieceOperations } from './scene'
import type { Sheet } from './sheet'
import { wrapText } from './text-width'
import { STRIP, strokesOf, tilePage } from './tile-page'
import { planTiles } from './tiles'
import type { TilePlan } from './tiles'
import type { DrawingOperation, Placement } from './types'

export interface PrintOptions {
  readonly paper: PaperId
  readonly orientation: Orientation | 'auto'
  /** mm. */
  readonly margin: number
  /** mm. */
  readonly overlap: number
  /** Which outlines are drawn; both when left out. */
  readonly lines?: PrintedLines
  /** All when left out. */
  readonly only?: readonly PieceId[]
  /** Least way between two cutting lines, mm; default 8. */
  readonly spacing?: number
}

/** Everything that is printed of a pattern: pages, and the drawing that tiles show parts of. */
export interface PrintSet {
  readonly plan: TilePlan
  readonly placements: readonly Placement[]
  /** On the drafting plane, true size. */
  readonly drawing: readonly DrawingOperation[]
  /** Overview, measuring page, then tiles in taping order. */
  readonly sheets: readonly Sheet[]
}

/** Common practice of desktop printers: no ink within 4 to 6 mm of the edge. */
export const DEFAULT_PRINT: Readonly<PrintOptions> = { paper: 'A4', orientation: 'auto', margin: 10, overlap: 10 }

/**
 * Plans the print of a version: lays the pieces so that fewest pages are needed, cuts the drawing into tiles and sets the
 * pages of words. Pure; the same input gives the same sheets.
 */
export function printSet(facts: PrintFacts, pieces: readonly DraftPiece[], options: PrintOptions): Result<PrintSet> {
  const chosen = options.only ? pieces.filter((piece) => options.only!.includes(piece.id)) : pieces
  if (chosen.length === 0)
    return fail({ code: 'nothing-to-print', message: 'There is no piece to print.', todo: 'Draft or choose the pieces first.' })
  const laid = fewestTiles(chosen, options)
  if (!laid.ok) return laid
  const { plan, placements } = laid.value
  const measured = measurePages(plan)
  if (!measured.ok) return measured
  const lines = options.lines ?? 'both'
  const byId = new Map(chosen.map((piece) => [piece.id as string, piece]))
  const drawing = placements.flatMap((placement) => {
    const piece = byId.get(placement.piece)!
    const label = pieceLabel(piece, facts)
    const strains = facts.strains?.[piece.zone]
    const show = { seam: lines !== 'cutting', cutting: lines !== 'seam', ticks: strains !== undefined }
    return pieceOperations(piece, placement, { ...label, show, ...(strains ? { strains } : {}) })
  })
  const overview = overviewPages({ plan, facts, lines, pieces: chosen, outlines: outlinesOf(chosen, placements) })
  const strokes = strokesOf(drawing)
  const tiles = plan.tiles.map((tile, i) => tilePage(plan, tile, facts, i + 1, strokes))
  return succeed({ plan, placements, drawing, sheets: [...overview, ...measured.value, ...tiles] })
}

function outlinesOf(pieces: readonly DraftPiece[], placements: readonly Placement[]) {
  return placements.map((placement) =>
    pieces.find((piece) => piece.id === placement.piece)!.cuttingLine.map((point) => placePoint(point, placement)),
  )
}

/** Tries the wearing order pushed together and in narrower rows, and keeps the layout with the fewest tiles. */
function fewestTiles(pieces: readonly DraftPiece[], options: PrintOptions): Result<{ plan: TilePlan; placements: readonly Placement[] }> {
  const spacing = options.spacing ?? 8
  const oneRow = layoutPieces(pieces, 'packed', spacing)
  const bounds = joinBounds(
    oneRow.map((placement) =>
      placedBounds(
        pieces.find((piece) => piece.id === placement.piece)!,
        placement,
      ),
    ),
  )
  const width = bounds.right - bounds.left
  const layouts = [Infinity, 0.78, 0.55, 0.3].map((share) => layoutPieces(pieces, 'packed', spacing, width * share))
  let best: Result<{ plan: TilePlan; placements: readonly Placement[] }> | null = null
  for (const placements of layouts) {
    const plan = planTiles(outlinesOf(pieces, placements), PAPERS[options.paper], { ...options, strip: STRIP })
    if (!plan.ok) {
      best ??= plan
      continue
    }
    if (!best?.ok || plan.value.tiles.length < best.value.plan.tiles.length) best = succeed({ plan: plan.value, placements })
  }
  return best!
}

const LABEL_SIZE = 7
const LEAST_LABEL_SIZE = 4.5

/** The words on a piece, broken to the cloth beside its label point. */
function pieceLabel(piece: DraftPiece, facts: PrintFacts): { lines: readonly string[]; textSize: number } {
  const outline = pointsAlong(piece.edges.flatMap((edge) => edge.path))
  const { x, y } = piece.labelAt
  const across = insideAtHeight(outline, y).find(([left, right]) => x > left && x < right)
  const room = across ? 2 * Math.min(x - across[0], across[1] - x) - 8 : 60
  const textSize = Math.max(LEAST_LABEL_SIZE, Math.min(LABEL_SIZE, room / 10))
  const lines = [...cutLines(piece, facts), `${facts.garmentCode} · ${facts.version}`]
  return { textSize, lines: lines.flatMap((line) => wrapText(line, textSize * 0.75, room)) }
}
