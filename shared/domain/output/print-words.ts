import type { LevelId } from '../body/types'
import type { Caution } from '../cautions/types'
import { blockOf, wholeEdge } from '../draft/roles'
import type { DraftPiece, EdgeId } from '../draft/types'
import type { LaidBone } from '../structure/types'
import type { HoldBand } from '../textile/types'
import { formatLength } from '../units/format'
import type { Mm } from '../units/brand'
import type { CorrectedPrinter } from './printer-correction'

/**
 * What a print set says beside the drawing. There is no field for a client's or wearer's name, a body girth or a wearer's
 * condition: these papers go to makers.
 */
export interface PrintFacts {
  readonly garmentCode: string
  /** The version as the workroom calls it, e.g. `version 3`. */
  readonly version: string
  /** The day of the print as the workroom writes it. */
  readonly printedOn: string
  readonly unit: 'cm' | 'in'
  /** Layers as they are cut, by zone. */
  readonly layers: readonly { readonly zone: PrintZone; readonly label: string; readonly cloth: string; readonly count: number }[]
  /** Cut girths, cloth and rigid widths without the gap, with the word for the hold. */
  readonly rings: readonly { readonly name: string; readonly cut: Mm; readonly hold: HoldBand }[]
  /** Open cautions; only the maker's words are printed. */
  readonly cautions: readonly Pick<Caution, 'severity' | 'makerMessage'>[]
  /** Bones as they lie on the pieces. */
  readonly bones?: readonly LaidBone[]
  /** The printer whose error is taken out, said on every tile; null prints as it is. */
  readonly printer?: CorrectedPrinter | null
  /** Worn strain by zone and level; given, the pieces carry stretch ticks. */
  readonly strains?: Readonly<Record<'front' | 'back', Readonly<Partial<Record<LevelId, number>>>>>
}

/** Zones that have pieces of their own. */
export type PrintZone = 'front' | 'side' | 'back'

/** Layers of a piece: those of the side where the side has its own, else of its half. */
export function layersOf(piece: Pick<DraftPiece, 'id' | 'zone'>, facts: Pick<PrintFacts, 'layers'>): PrintFacts['layers'] {
  const side = blockOf(piece.id).startsWith('side-') ? facts.layers.filter((layer) => layer.zone === 'side') : []
  return side.length > 0 ? side : facts.layers.filter((layer) => layer.zone === piece.zone)
}

/** Which outlines a print shows. */
export type PrintedLines = 'both' | 'seam' | 'cutting'

/** Stands on every overview. Local codes and licensed practice go first. */
export const SAFETY_LINE =
  'This garment is no medical device and no buoyancy aid. Cap every bone. Whoever wears it must be able to leave it alone and quickly, and takes it off when numb, breathless or in pain. Local codes and licensed practice go first.'

export const ACTUAL_SIZE = 'Print at actual size (100 %), without fitting to the page.'

/** How many of a piece are cut from each layer: `cut 2 shell`, one line a layer, the fold said once. */
export function cutLines(piece: Pick<DraftPiece, 'id' | 'zone' | 'quantity' | 'onFold'>, facts: Pick<PrintFacts, 'layers'>): string[] {
  const layers = layersOf(piece, facts).filter((layer) => layer.count > 0)
  const cut = layers.map((layer) => `cut ${layer.count * piece.quantity} ${layer.label.toLowerCase()}`)
  const how = piece.onFold ? 'on the fold' : piece.quantity === 2 ? 'in pairs' : ''
  const counted = cut.length > 0 ? cut : [`cut ${piece.quantity} of each layer`]
  return how ? [...counted, how] : counted
}

/** An edge as it stands in a list of edges: parts of one by its whole, seams with a letter together. */
function edgeName(edge: EdgeId): string {
  const whole = wholeEdge(edge)
  if (whole.startsWith('seam-')) return 'further seams'
  return whole === 'top' ? 'top edge' : whole
}

/** The allowances drawn, by width: `1.0 cm princess, side; 2.0 cm hem`. Empty when no edge has one. */
export function allowanceWords(pieces: readonly DraftPiece[], unit: 'cm' | 'in'): string {
  const edges = new Map<number, Set<string>>()
  for (const edge of pieces.flatMap((piece) => piece.edges)) {
    if (edge.kind === 'fold' || edge.allowance <= 0) continue
    edges.set(edge.allowance, (edges.get(edge.allowance) ?? new Set()).add(edgeName(edge.id)))
  }
  return [...edges]
    .sort(([a], [b]) => a - b)
    .map(([allowance, ids]) => `${formatLength(allowance as Mm, unit)} ${[...ids].sort().join(', ')}`)
    .join('; ')
}

/** One or two sentences on what the outlines hold: how wide the allowances are, or that there are none. */
export function allowanceState(pieces: readonly DraftPiece[], unit: 'cm' | 'in', lines: PrintedLines): string {
  const planned = allowanceWords(pieces, unit)
  if (!planned) return 'None planned: the line is the seam line; add the allowance when cutting.'
  if (lines === 'seam') return `Not drawn: the line is the seam line; when cutting add ${planned}.`
  return `Drawn: ${planned}. Cut on the solid line${lines === 'both' ? ', sew on the dashed line' : ''}.`
}
