import { z } from 'zod'
import { PAPER_IDS } from '../domain/output/paper'
import type { TilePlan } from '../domain/output/tiles'
import type { Point } from '../domain/geometry/types'
import { figure, length, mirrors, point } from './base'

export const paperId = z.enum(PAPER_IDS)

export const tileOptions = z.object({
  orientation: z.enum(['portrait', 'landscape', 'auto']).default('auto'),
  margin: z.coerce.number().min(0).max(60).default(10),
  overlap: z.coerce.number().min(0).max(80).default(10),
})

export const printQuery = tileOptions.extend({
  paper: paperId.default('A4'),
  /** `seam` leaves the allowances off, `cut` prints both lines. */
  lines: z.enum(['both', 'seam', 'cutting']).default('both'),
  /** Sides of a typed paper, mm. */
  width: z.coerce.number().min(1).max(5000).optional(),
  height: z.coerce.number().min(1).max(5000).optional(),
  layout: z.enum(['packed', 'wearing']).default('packed'),
  /** Ids of the pieces, parted by commas; all when left out. */
  pieces: z.string().max(600).optional(),
  /** A printer that was measured. */
  printer: z.string().uuid().optional(),
})
/** Files for other programs: which outlines they hold. */
export const exchangeQuery = z.object({ lines: z.enum(['both', 'seam', 'cutting']).default('both') })
export type PrintQuery = z.output<typeof printQuery>

const bounds = z.object({ left: figure(), bottom: figure(), right: figure(), top: figure() })
const join = z.object({
  side: z.enum(['left', 'top', 'right', 'bottom']),
  neighbour: z.string(),
  from: point,
  to: point,
  marks: z.array(point),
})

const pages = z.object({
  paper: z.object({ id: paperId, name: z.string(), width: length(), height: length() }),
  orientation: z.enum(['portrait', 'landscape']),
  page: z.object({ width: length(), height: length() }),
  margin: z.number(),
  overlap: z.number(),
  strip: z.number(),
  rows: z.number().int(),
  columns: z.number().int(),
  tiles: z.array(
    z.object({ name: z.string(), row: z.number().int(), column: z.number().int(), area: bounds, cell: bounds, joins: z.array(join) }),
  ),
  blank: z.array(z.string()),
  drawing: bounds,
  whole: bounds,
})
export const tilePlan = mirrors<TilePlan>()(pages)

/** How a version will print: its pages, and the pieces' cutting lines as they lie on them. */
export interface TileMap extends TilePlan {
  readonly outlines: readonly (readonly Point[])[]
}
export const tileMap = mirrors<TileMap>()(pages.extend({ outlines: z.array(z.array(point)) }))

/** What the 100 mm square measures on a printer's paper, across it and along it, mm. */
export const printerBody = z.object({
  name: z.string().trim().min(1, 'Name the printer.').max(60),
  acrossMm: figure(1, 1000),
  alongMm: figure(1, 1000),
})
export const printer = printerBody.extend({ id: z.string(), measuredOn: z.string() })
export type PrinterView = z.output<typeof printer>
