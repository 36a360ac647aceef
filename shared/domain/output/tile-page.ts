import { pathFlatten } from '../geometry/path'
import type { Point } from '../geometry/types'
import type { Bounds } from './placing'
import type { PrintFacts } from './print-words'
import { correctionWords } from './printer-correction'
import { stroke, words } from './sheet'
import type { Sheet, SheetOperation } from './sheet'
import { textWidth } from './text-width'
import { strokeTouches } from './touching'
import type { DrawingOperation } from './types'
import type { Join, Tile, TilePlan, TileSide } from './tiles'

/** Height kept at the foot of each tile for its name, mm; the tile below covers it when taped. */
export const STRIP = 7

const NAME_SIZE = 16
const STRIP_SIZE = 2.9
const JOIN_SIZE = 3
/** Half the length of a join mark's strokes, mm. */
const MARK = 5

const sideWords: Readonly<Record<TileSide, string>> = { left: 'left', top: 'above', right: 'right', bottom: 'below' }

/**
 * The page of one tile: its part of the drawing, the join lines with their marks, the neighbour's name at each join, its
 * own name pale in the corner and again at the foot with garment code and version. `strokes` are what the names keep
 * clear of where they can.
 */
export function tilePage(
  plan: TilePlan,
  tile: Tile,
  facts: Pick<PrintFacts, 'garmentCode' | 'version' | 'printer'>,
  number: number,
  strokes: readonly Stroke[],
): Sheet {
  const { area, cell } = tile
  const origin = { x: plan.margin, y: plan.margin + plan.strip }
  const onPage = (point: Point): Point => ({ x: point.x - area.left + origin.x, y: point.y - area.bottom + origin.y })
  const corner = onPage({ x: cell.left, y: cell.top })
  return {
    kind: 'tile',
    name: tile.name,
    under: [words('pale', { x: corner.x + 8, y: corner.y - 8 - NAME_SIZE * 0.73 }, tile.name, NAME_SIZE, 'start', 'semibold')],
    drawing: { area, at: origin },
    operations: [...tile.joins.flatMap((join) => joinOperations(join, onPage, strokes)), ...stripOperations(plan, tile, facts, number)],
  }
}

/** A straight stroke of the drawing, on the drafting plane. */
export interface Stroke {
  readonly from: Point
  readonly to: Point
}

/** The strokes of a drawing, curves as chords, words as three lines through them: to set other words clear of them. */
export function strokesOf(drawing: readonly DrawingOperation[]): Stroke[] {
  return drawing.flatMap((operation) => {
    if (operation.kind === 'text') {
      const { at, align, size, text } = operation
      const width = textWidth(text, size, operation.role === 'label' ? 'semibold' : 'regular')
      const left = at.x - (align === 'start' ? 0 : align === 'middle' ? width / 2 : width)
      return [0, 0.35, 0.7].map((share) => ({ from: { x: left, y: at.y + size * share }, to: { x: left + width, y: at.y + size * share } }))
    }
    const points = pathFlatten(operation.path, CHORD_TOLERANCE)
    return points.slice(1).map((to, i) => ({ from: points[i]!, to }))
  })
}

const CHORD_TOLERANCE = 0.5

function joinOperations(join: Join, onPage: (point: Point) => Point, strokes: readonly Stroke[]): SheetOperation[] {
  const marks = join.marks
    .map(onPage)
    .flatMap(({ x, y }) => [
      stroke('join-mark', { x: x - MARK, y }, { x: x + MARK, y }),
      stroke('join-mark', { x, y: y - MARK }, { x, y: y + MARK }),
      lozenge({ x, y }, MARK * 0.5),
    ])
  const text = `joins ${join.neighbour}`
  const { box } = clearest(join, textWidth(text, JOIN_SIZE, 'semibold'), strokes)
  const name = words('quiet', onPage({ x: box.left, y: box.bottom }), text, JOIN_SIZE, 'start', 'semibold')
  return [stroke('join', onPage(join.from), onPage(join.to)), ...marks, name]
}

/** Shares of the join line at which its name may stand, the best first. */
const NAME_AT = [0.5, 0.42, 0.58, 0.35, 0.65, 0.3, 0.7, 0.1, 0.9]

/** Where a join's name crosses fewest strokes of the drawing: its box inside the tile, on the drafting plane. */
function clearest(join: Join, width: number, strokes: readonly Stroke[]): { box: Bounds; crossed: number } {
  let best: { box: Bounds; crossed: number } | null = null
  for (const t of NAME_AT) {
    const at = { x: join.from.x + (join.to.x - join.from.x) * t, y: join.from.y + (join.to.y - join.from.y) * t }
    const box = boxBeside(join.side, at, width)
    const crossed = strokes.filter(({ from, to }) => strokeTouches(from, to, box)).length
    if (!best || crossed < best.crossed) best = { box, crossed }
    if (crossed === 0) break
  }
  return best!
}

function boxBeside(side: TileSide, { x, y }: Point, width: number): Bounds {
  const height = JOIN_SIZE * 0.73
  const left = side === 'left' ? x + 2 : side === 'right' ? x - 2 - width : x - width / 2
  const bottom = side === 'top' ? y - 2 - height : side === 'bottom' ? y + 2 : y - height / 2
  return { left, bottom, right: left + width, top: bottom + height }
}

function lozenge({ x, y }: Point, half: number): SheetOperation {
  const corners = [
    { x: x - half, y },
    { x, y: y + half },
    { x: x + half, y },
    { x, y: y - half },
  ]
  return {
    kind: 'path',
    role: 'join-mark',
    path: corners.map((from, i) => ({ kind: 'line', from, to: corners[(i + 1) % 4]! })),
    closed: true,
  }
}

function stripOperations(
  plan: TilePlan,
  tile: Tile,
  facts: Pick<PrintFacts, 'garmentCode' | 'version' | 'printer'>,
  number: number,
): SheetOperation[] {
  const [left, right] = [plan.margin, plan.page.width - plan.margin]
  const baseline = plan.margin + 1.6
  const joins = tile.joins.map((join) => `${sideWords[join.side]} ${join.neighbour}`).join(' · ')
  const end = `${facts.garmentCode} · ${facts.version} · tile ${number} of ${plan.tiles.length}${facts.printer ? ` · ${correctionWords(facts.printer)}` : ''}`
  const nameWidth = textWidth(tile.name, 4, 'semibold')
  const room = right - left - nameWidth - 4 - textWidth(end, STRIP_SIZE) - 4
  return [
    words('text', { x: left, y: baseline }, tile.name, 4, 'start', 'semibold'),
    ...(textWidth(joins, STRIP_SIZE) <= room ? [words('quiet', { x: left + nameWidth + 4, y: baseline }, joins, STRIP_SIZE)] : []),
    words('text', { x: right, y: baseline }, end, STRIP_SIZE, 'end'),
  ]
}
