import type { Point } from '../geometry/types'
import type { Mm } from '../units/brand'
import { fail, succeed } from '../units/result'
import type { Problem, Result } from '../units/result'
import { pageSize } from './paper'
import type { Orientation, Paper } from './paper'
import { boundsOfPoints } from './placing'
import type { Bounds } from './placing'
import { polygonTouches } from './touching'

export type TileSide = 'left' | 'top' | 'right' | 'bottom'

/** A side on which a tile meets another: the join line and its marks lie at the same place of the drawing on both. */
export interface Join {
  readonly side: TileSide
  /** Name of the tile that it meets. */
  readonly neighbour: string
  /** The join line on the drafting plane, in the middle of the overlap. */
  readonly from: Point
  readonly to: Point
  /** Where the join marks lie, on the join line. */
  readonly marks: readonly Point[]
}

/** One page of the drawing. Rows are lettered from the top, columns numbered from the left: `B3`. */
export interface Tile {
  readonly name: string
  readonly row: number
  readonly column: number
  /** What is printed of the drafting plane: the page within its margins, above the strip at the foot. */
  readonly area: Bounds
  /** What is seen of it once taped: the area up to the join lines. The cells of all tiles lie edge to edge. */
  readonly cell: Bounds
  readonly joins: readonly Join[]
}

/** How a drawing is cut into pages. Lengths mm. */
export interface TilePlan {
  readonly paper: Paper
  readonly orientation: Orientation
  readonly page: { readonly width: Mm; readonly height: Mm }
  readonly margin: number
  readonly overlap: number
  readonly strip: number
  readonly rows: number
  readonly columns: number
  /** Pages to print, row by row from the top: the order in which they are taped. */
  readonly tiles: readonly Tile[]
  /** Names of pages with nothing on them, left out of the print. */
  readonly blank: readonly string[]
  readonly drawing: Bounds
  /** What all pages together would show. */
  readonly whole: Bounds
}

export interface TileOptions {
  /** Blank border of the page, mm. */
  readonly margin: number
  /** What neighbouring pages both show, mm. */
  readonly overlap: number
  /** `auto` takes the way with fewer pages, upright when equal. */
  readonly orientation: Orientation | 'auto'
  /** Height kept at the foot of each page for its name, mm; default 0. */
  readonly strip?: number
}

/** Least side of the part of a page that shows the drawing, mm: common practice, smaller ones cannot be taped true. */
export const LEAST_TILE_SIDE = 60
/** Least that each page must add to the one before, mm. */
export const LEAST_STEP = 40
/** More pages than this are a mistake in the scale or the paper. */
export const MOST_TILES = 400
/** A drawing that reaches over the edge of a page by less than this, mm, does not ask for another. */
const REACH = 1e-6

/** `A1`, `B3`, ... `Z9`, `AA1`: row letter from the top, column number from the left, both counted from 0. */
export function tileName(row: number, column: number): string {
  let letters = ''
  for (let rest = row + 1; rest > 0; rest = Math.floor((rest - 1) / 26)) letters = String.fromCharCode(65 + ((rest - 1) % 26)) + letters
  return `${letters}${column + 1}`
}

/**
 * Plans the pages for a drawing whose pieces have these outlines (closed, mm on the drafting plane). Every point of the
 * drawing lies in exactly one cell of the plan (edges in two); pages that meet no piece are left out. The grid may be
 * shifted within its spare room when that saves pages, else it is centred.
 */
export function planTiles(outlines: readonly (readonly Point[])[], paper: Paper, options: TileOptions): Result<TilePlan> {
  const points = outlines.flat()
  if (points.length === 0 || points.some(({ x, y }) => !Number.isFinite(x) || !Number.isFinite(y)))
    return fail({ code: 'nothing-to-print', message: 'There is no piece to print.', todo: 'Draft the pieces first.' })
  const drawing = boundsOfPoints(points)
  if (options.orientation !== 'auto') return planOne(outlines, drawing, paper, options.orientation, options)
  const upright = planOne(outlines, drawing, paper, 'portrait', options)
  const lying = planOne(outlines, drawing, paper, 'landscape', options)
  if (!upright.ok) return lying.ok ? lying : upright
  return lying.ok && lying.value.tiles.length < upright.value.tiles.length ? lying : upright
}

function planOne(
  outlines: readonly (readonly Point[])[],
  drawing: Bounds,
  paper: Paper,
  orientation: Orientation,
  options: TileOptions,
): Result<TilePlan> {
  const { margin, overlap } = options
  const strip = options.strip ?? 0
  const page = pageSize(paper, orientation)
  const width = page.width - 2 * margin
  const height = page.height - 2 * margin - strip
  const problem = paperProblem(paper, page, width, height, margin, overlap, strip)
  if (problem) return fail(problem)

  const columns = count(drawing.right - drawing.left, width, overlap)
  const rows = count(drawing.top - drawing.bottom, height, overlap)
  if (columns * rows > MOST_TILES)
    return fail({
      code: 'too-many-tiles',
      message: `The drawing would take ${columns * rows} pages of ${paper.name}; at most ${MOST_TILES} are planned.`,
      todo: 'Choose a larger paper, or print fewer pieces at once.',
      at: 'paper',
    })
  const size = { width: columns * width - (columns - 1) * overlap, height: rows * height - (rows - 1) * overlap }
  const spare = { x: size.width - (drawing.right - drawing.left), y: size.height - (drawing.top - drawing.bottom) }
  const grids = SHIFTS.flatMap((sx) => SHIFTS.map((sy) => ({ left: drawing.left - spare.x * sx, top: drawing.top + spare.y * sy })))
  const boxes = outlines.map((outline) => (outline.length > 0 ? boundsOfPoints(outline) : drawing))
  let best: { cells: readonly Omit<Tile, 'joins'>[]; grid: { left: number; top: number } } | null = null
  for (const grid of grids) {
    const cells = cellsOf(grid, rows, columns, width, height, overlap).filter(({ cell }) => {
      const inner = shrunk(cell)
      return outlines.some((outline, i) => overlaps(boxes[i]!, inner) && polygonTouches(outline, inner))
    })
    if (!best || cells.length < best.cells.length) best = { cells, grid }
  }
  const { cells, grid } = best!
  const names = new Set(cells.map((tile) => tile.name))
  const all = Array.from({ length: rows * columns }, (_, i) => tileName(Math.floor(i / columns), i % columns))
  return succeed({
    paper,
    orientation,
    page,
    margin,
    overlap,
    strip,
    rows,
    columns,
    tiles: cells.map((tile) => ({ ...tile, joins: joinsOf(tile, names) })),
    blank: all.filter((name) => !names.has(name)),
    drawing,
    whole: { left: grid.left, top: grid.top, right: grid.left + size.width, bottom: grid.top - size.height },
  })
}

/** Shares of the spare room left of and above the drawing, centred first. */
const SHIFTS = [0.5, 0, 0.25, 0.75, 1]

const overlaps = (a: Bounds, b: Bounds) => a.left <= b.right && a.right >= b.left && a.bottom <= b.top && a.top >= b.bottom

/** A cell that the drawing only touches along its edge is blank. */
const shrunk = ({ left, bottom, right, top }: Bounds): Bounds => ({
  left: left + REACH,
  bottom: bottom + REACH,
  right: right - REACH,
  top: top - REACH,
})

function count(length: number, side: number, overlap: number): number {
  return length <= side + REACH ? 1 : 1 + Math.ceil((length - side - REACH) / (side - overlap))
}

function paperProblem(
  paper: Paper,
  page: { readonly width: number; readonly height: number },
  width: number,
  height: number,
  margin: number,
  overlap: number,
  strip: number,
): Problem | null {
  if (!(margin >= 0)) return { code: 'margin-unclear', message: 'The margin must be 0 mm or more.', todo: 'Enter 10 mm.', at: 'margin' }
  if (!(overlap >= 0)) return { code: 'overlap-unclear', message: 'The overlap must be 0 mm or more.', todo: 'Enter 10 mm.', at: 'overlap' }
  if (width < LEAST_TILE_SIDE || height < LEAST_TILE_SIDE) {
    const most = Math.floor(Math.min(page.width - LEAST_TILE_SIDE, page.height - strip - LEAST_TILE_SIDE) / 2)
    return {
      code: 'paper-too-small',
      message: `Margins of ${margin} mm leave too little of ${paper.name} to print on.`,
      todo: `Take margins of at most ${most} mm, or a larger paper.`,
      at: 'margin',
    }
  }
  if (width - overlap < LEAST_STEP || height - overlap < LEAST_STEP)
    return {
      code: 'overlap-too-large',
      message: `An overlap of ${overlap} mm leaves too little of each page.`,
      todo: `Take an overlap of at most ${Math.floor(Math.min(width, height) - LEAST_STEP)} mm.`,
      at: 'overlap',
    }
  return null
}

function cellsOf(
  grid: { left: number; top: number },
  rows: number,
  columns: number,
  width: number,
  height: number,
  overlap: number,
): Omit<Tile, 'joins'>[] {
  return Array.from({ length: rows * columns }, (_, i) => {
    const [row, column] = [Math.floor(i / columns), i % columns]
    const left = grid.left + column * (width - overlap)
    const top = grid.top - row * (height - overlap)
    const area = { left, top, right: left + width, bottom: top - height }
    const half = overlap / 2
    return {
      name: tileName(row, column),
      row,
      column,
      area,
      cell: {
        left: column === 0 ? area.left : area.left + half,
        right: column === columns - 1 ? area.right : area.right - half,
        top: row === 0 ? area.top : area.top - half,
        bottom: row === rows - 1 ? area.bottom : area.bottom + half,
      },
    }
  })
}

function joinsOf({ row, column, cell }: Omit<Tile, 'joins'>, names: ReadonlySet<string>): Join[] {
  const corner = {
    topLeft: { x: cell.left, y: cell.top },
    topRight: { x: cell.right, y: cell.top },
    bottomLeft: { x: cell.left, y: cell.bottom },
    bottomRight: { x: cell.right, y: cell.bottom },
  }
  const sides: readonly { side: TileSide; neighbour: string; from: Point; to: Point }[] = [
    { side: 'left', neighbour: tileName(row, column - 1), from: corner.topLeft, to: corner.bottomLeft },
    { side: 'top', neighbour: tileName(row - 1, column), from: corner.topLeft, to: corner.topRight },
    { side: 'right', neighbour: tileName(row, column + 1), from: corner.topRight, to: corner.bottomRight },
    { side: 'bottom', neighbour: tileName(row + 1, column), from: corner.bottomLeft, to: corner.bottomRight },
  ]
  return sides
    .filter(({ side, neighbour }) => (side !== 'left' || column > 0) && (side !== 'top' || row > 0) && names.has(neighbour))
    .map((join) => ({ ...join, marks: [0.2, 0.8].map((t) => between(join.from, join.to, t)) }))
}

const between = (from: Point, to: Point, t: number): Point => ({ x: from.x + (to.x - from.x) * t, y: from.y + (to.y - from.y) * t })
