import type { DraftPiece, PieceId } from '../draft/types'
import { mm } from '../units/brand'
import { fail, succeed } from '../units/result'
import type { Result } from '../units/result'
import { insideAtHeight, pointsAlong } from './crossings'
import { layoutPieces } from './layout'
import { measurePages } from './measure-page'
import { overviewPages } from './overview-page'
import { isRoll, LONGEST_PAGE, paperOf, PAPERS } from './paper'
import type { Orientation, Paper, PaperId } from './paper'
import { boundsOfPoints, joinBounds, placedBounds, placePoint } from './placing'
import { correctedPaper, pageScale } from './printer-correction'
import { cutLines } from './print-words'
import type { PrintedLines, PrintFacts } from './print-words'
import { pieceOperations } from './scene'
import { movedOperation } from './sheet'
import type { Sheet } from './sheet'
import { wrapText } from './text-width'
import { STRIP, strokesOf, tilePage } from './tile-page'
import { planTiles } from './tiles'
import type { TilePlan } from './tiles'
import type { DrawingOperation, Placement } from './types'

export interface PrintOptions {
  readonly paper: PaperId
  /** Sides of a typed paper, mm. */
  readonly width?: number
  readonly height?: number
  readonly orientation: Orientation | 'auto'
  /** mm. */
  readonly margin: number
  /** mm; 0 sets the pages edge to edge. */
  readonly overlap: number
  /** Which outlines are drawn; both when left out. */
  readonly lines?: PrintedLines
  /** Pushed together to save paper, or in wearing order; pushed together when left out. */
  readonly layout?: 'packed' | 'wearing'
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
  /** By how much every page is printed larger to take out the printer's error; 1 without one. */
  readonly scale: { readonly x: number; readonly y: number }
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
  const known = paperOf(options.paper, options.width, options.height)
  if (!known.ok) return known
  const paper = correctedPaper(known.value, facts.printer ?? null)
  const laid = isRoll(paper.id) ? onRoll(chosen, paper, options) : fewestTiles(chosen, paper, options)
  if (!laid.ok) return laid
  const { plan, placements } = laid.value
  const lines = options.lines ?? 'both'
  const byId = new Map(chosen.map((piece) => [piece.id as string, piece]))
  const drawing = placements.flatMap((placement) => {
    const piece = byId.get(placement.piece)!
    const label = pieceLabel(piece, facts)
    const strains = facts.strains?.[piece.zone]
    const show = { seam: lines !== 'cutting', cutting: lines !== 'seam', ticks: strains !== undefined }
    return pieceOperations(piece, placement, { ...label, show, bones: facts.bones ?? [], ...(strains ? { strains } : {}) })
  })
  const wordPlan = isRoll(paper.id) ? { ...plan, page: STAMP, margin: STAMP_MARGIN } : plan
  const measured = measurePages(wordPlan)
  if (!measured.ok) return measured
  const overview = overviewPages({ plan: wordPlan, facts, lines, pieces: chosen, outlines: outlinesOf(chosen, placements) })
  const strokes = strokesOf(drawing)
  const tiles = plan.tiles.map((tile, i) => tilePage(plan, tile, facts, i + 1, strokes))
  const pagesOfWords = [...overview, ...measured.value]
  const sheets = isRoll(paper.id) ? tiles.map((tile) => stamped(tile, pagesOfWords, plan)) : [...pagesOfWords, ...tiles]
  return succeed({ plan, placements, drawing, scale: pageScale(facts.printer ?? null, plan.orientation), sheets })
}

/** Pages of words as they stand side by side at the foot of a roll: A4. */
const STAMP = { width: PAPERS.A4.width, height: PAPERS.A4.height }
const STAMP_MARGIN = 10

/** A roll's one long page with the pages of words at its foot. */
function stamped(tile: Sheet, pages: readonly Sheet[], plan: TilePlan): Sheet {
  const stamps = pages.flatMap((page, index) =>
    page.operations.map((operation) => movedOperation(operation, plan.margin + index * STAMP.width - STAMP_MARGIN, plan.margin + STRIP)),
  )
  return { ...tile, operations: [...tile.operations, ...stamps] }
}

/** Pieces in rows across a roll, on one page as long as they need. */
function onRoll(pieces: readonly DraftPiece[], roll: Paper, options: PrintOptions): Result<Laid> {
  const across = roll.width - 2 * options.margin
  const placements = layoutPieces(pieces, options.layout ?? 'packed', options.spacing ?? 8, across)
  const outlines = outlinesOf(pieces, placements)
  const bounds = boundsOfPoints(outlines.flat())
  const foot = STRIP + STAMP.height
  const length = bounds.top - bounds.bottom + 2 * options.margin + foot + ROLL_SPARE
  if (bounds.right - bounds.left > across || length > LONGEST_PAGE)
    return fail({
      code: 'roll-too-small',
      message:
        length > LONGEST_PAGE
          ? 'The pieces would take a page longer than readers of PDF open (5.08 m).'
          : `The pieces are wider than the ${roll.name}.`,
      todo: 'Choose a wider roll or tiles, or print fewer pieces at once.',
      at: 'paper',
    })
  const plan = planTiles(
    outlines,
    { ...roll, height: mm(length) },
    { margin: options.margin, overlap: 0, orientation: 'portrait', strip: foot },
  )
  return plan.ok ? succeed({ plan: plan.value, placements }) : plan
}

/** So that a roll's page is never a hair shorter than its drawing, mm. */
const ROLL_SPARE = 1

interface Laid {
  readonly plan: TilePlan
  readonly placements: readonly Placement[]
}

function outlinesOf(pieces: readonly DraftPiece[], placements: readonly Placement[]) {
  return placements.map((placement) =>
    pieces.find((piece) => piece.id === placement.piece)!.cuttingLine.map((point) => placePoint(point, placement)),
  )
}

/** Tries the wearing order pushed together and in narrower rows, and keeps the layout with the fewest tiles; asked for in wearing order it stays so. */
function fewestTiles(pieces: readonly DraftPiece[], paper: Paper, options: PrintOptions): Result<Laid> {
  const spacing = options.spacing ?? 8
  const oneRow = layoutPieces(pieces, options.layout ?? 'packed', spacing)
  const bounds = joinBounds(
    oneRow.map((placement) =>
      placedBounds(
        pieces.find((piece) => piece.id === placement.piece)!,
        placement,
      ),
    ),
  )
  const width = bounds.right - bounds.left
  const layouts =
    options.layout === 'wearing'
      ? [oneRow]
      : [Infinity, 0.78, 0.55, 0.3].map((share) => layoutPieces(pieces, 'packed', spacing, width * share))
  let best: Result<Laid> | null = null
  for (const placements of layouts) {
    const plan = planTiles(outlinesOf(pieces, placements), paper, { ...options, strip: STRIP })
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
