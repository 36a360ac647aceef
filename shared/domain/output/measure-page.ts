import { MM_PER_INCH } from '../units/convert'
import type { Point } from '../geometry/types'
import { fail, succeed } from '../units/result'
import type { Result } from '../units/result'
import { paragraph, tableRow } from './flow'
import type { Flow } from './flow'
import { ACTUAL_SIZE } from './print-words'
import { rectangle, stroke, words } from './sheet'
import type { Sheet, SheetOperation } from './sheet'
import type { TilePlan } from './tiles'

/** Sides of the two squares by which a print is measured, mm. */
export const METRIC_SQUARE = 100
export const INCH_SQUARE = 4 * MM_PER_INCH

const GAP = 9
const SIZE = 3.4

interface Square {
  readonly side: number
  readonly step: number
  readonly label: string
}
const squares: readonly Square[] = [
  { side: METRIC_SQUARE, step: 10, label: '100 mm' },
  { side: INCH_SQUARE, step: MM_PER_INCH / 4, label: '4 in' },
]

/** Pages with the 100 mm and the 4 in square and what to print at when they come out wrong: one page where both fit. */
export function measurePages(plan: Pick<TilePlan, 'page' | 'margin'>): Result<readonly Sheet[]> {
  const { page, margin } = plan
  const [left, right, top] = [margin, page.width - margin, page.height - margin]
  let flow: Flow = { left, width: right - left, y: top, operations: [] }
  flow = paragraph(flow, 'Measure this page first', { size: 6, weight: 'semibold', after: 1 })
  flow = paragraph(flow, `${ACTUAL_SIZE} The sides of the squares must measure 100 mm and 4 in.`, { size: SIZE, after: 4 })
  const room = { width: right - left, height: flow.y - margin }
  if (room.width < INCH_SQUARE || room.height < INCH_SQUARE)
    return fail({
      code: 'paper-too-small',
      message: 'The squares for measuring the print do not fit within the margins.',
      todo: 'Take smaller margins, or a larger paper.',
      at: 'margin',
    })
  const beside = room.width >= METRIC_SQUARE + GAP + INCH_SQUARE
  const stacked = room.height >= METRIC_SQUARE + GAP + INCH_SQUARE
  const first = { x: left, y: flow.y - METRIC_SQUARE }
  const second = beside
    ? { x: left + METRIC_SQUARE + GAP, y: flow.y - INCH_SQUARE }
    : stacked
      ? { x: left, y: first.y - GAP - INCH_SQUARE }
      : null
  const onFirst = [...flow.operations, ...square(squares[0]!, first), ...(second ? square(squares[1]!, second) : [])]
  const correctionLeft = beside ? left + METRIC_SQUARE + GAP + INCH_SQUARE + GAP : left + INCH_SQUARE + GAP
  const table = correctionTable({ left: correctionLeft, width: right - correctionLeft, y: flow.y, operations: [] }, margin)
  const sheets: Sheet[] = [{ kind: 'measure', name: 'Measure', under: [], drawing: null, operations: [...onFirst, ...table] }]
  if (!second) {
    const operations = [...flow.operations, ...square(squares[1]!, { x: left, y: flow.y - INCH_SQUARE })]
    sheets.push({ kind: 'measure', name: 'Measure, inches', under: [], drawing: null, operations })
  }
  return succeed(sheets)
}

function square({ side, step, label }: Square, at: Point): SheetOperation[] {
  const ticks = Math.round(side / step)
  const inner = Array.from({ length: ticks - 1 }, (_, i) => (i + 1) * step)
  return [
    rectangle('frame', { left: at.x, bottom: at.y, right: at.x + side, top: at.y + side }),
    ...inner.flatMap((along, i) => {
      const length = (i + 1) % (label === '4 in' ? 4 : 5) === 0 ? 4 : 2
      return [
        stroke('frame', { x: at.x + along, y: at.y }, { x: at.x + along, y: at.y + length }),
        stroke('frame', { x: at.x, y: at.y + along }, { x: at.x + length, y: at.y + along }),
      ]
    }),
    words('text', { x: at.x + side / 2, y: at.y + side / 2 - 3 }, label, 9, 'middle', 'semibold'),
    words('quiet', { x: at.x + side / 2, y: at.y + side / 2 - 9 }, 'each side', SIZE, 'middle'),
  ]
}

/** Widths under this leave no room for the table, mm. */
const LEAST_TABLE = 34

function correctionTable(flow: Flow, bottom: number): readonly SheetOperation[] {
  if (flow.width < LEAST_TABLE) return []
  let table = paragraph(flow, 'When the 100 mm side measures', { size: SIZE, weight: 'semibold' })
  table = paragraph(table, 'something else, print again at this scale.', { size: SIZE, after: 2 })
  const columns = [
    { share: 0.5, align: 'end' },
    { share: 0.5, align: 'end' },
  ] as const
  for (const measured of [95, 96, 97, 98, 99, 100, 101, 102, 103]) {
    const row = tableRow(table, columns, [`${measured} mm`, `${((METRIC_SQUARE / measured) * 100).toFixed(2)} %`], SIZE)
    if (row.y < bottom) break
    table = row
  }
  return table.operations
}
