import { z } from 'zod'
import type { TilePlan } from '../domain/output/tiles'
import type { Point } from '../domain/geometry/types'
import { figure, length, mirrors, point } from './base'

export const paperId = z.enum(['A4', 'A3', 'letter'])

export const tileOptions = z.object({
  orientation: z.enum(['portrait', 'landscape', 'auto']).default('auto'),
  margin: z.coerce.number().min(0).max(60).default(10),
  overlap: z.coerce.number().min(0).max(80).default(10),
})

export const printQuery = tileOptions.extend({
  paper: paperId.default('A4'),
  /** `seam` leaves the allowances off, `cut` prints both lines. */
  lines: z.enum(['both', 'seam', 'cutting']).default('both'),
})
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
