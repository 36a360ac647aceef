import { PassThrough } from 'node:stream'
import type { Readable } from 'node:stream'
import { setImmediate as nextTurn } from 'node:timers/promises'
import PDFDocument from 'pdfkit'
import type { Path, Point } from '../../shared/domain/geometry/types'
import { boundsOfPoints } from '../../shared/domain/output/placing'
import type { Bounds } from '../../shared/domain/output/placing'
import type { PrintSet } from '../../shared/domain/output/print-set'
import type { Sheet } from '../../shared/domain/output/sheet'
import type { TextWeight } from '../../shared/domain/output/text-width'
import type { DrawingOperation } from '../../shared/domain/output/types'
import { fontRuns } from './fonts'
import type { PrintFont } from './fonts'
import { LINE_STYLES } from './line-styles'
import type { LineStyle } from './line-styles'

/** PDF points in a millimetre. */
const POINTS = 72 / 25.4
/** Words may reach this many sizes to either side of their point, for leaving out what a page does not show. */
const TEXT_REACH = 20

export interface PatternPdfInput {
  readonly set: PrintSet
  /** Shown as the document's title by readers. No person's name. */
  readonly title: string
  /** Written into the file; the same input with the same time gives the same bytes. */
  readonly createdAt: Date
}

/**
 * A print set as a PDF at true scale, streamed page by page. Between two pages the server answers others; when the reader
 * goes away the rest is not drawn. Readers that heed it print without scaling.
 */
export function renderPatternPdf({ set, title, createdAt }: PatternPdfInput, fonts: readonly PrintFont[]): Readable {
  const { width, height } = set.plan.page
  const { scale } = set
  const document = new PDFDocument({
    autoFirstPage: false,
    size: [width * scale.x * POINTS, height * scale.y * POINTS],
    margin: 0,
    font: '',
    lang: 'en',
    displayTitle: true,
    info: { Title: title, Creator: 'Tenterframe', Producer: 'Tenterframe', CreationDate: createdAt },
  })
  for (const font of fonts) document.registerFont(font.name, font.data)
  askForNoScaling(document)
  const out = new PassThrough()
  document.pipe(out)
  const drawing = set.drawing.map((operation) => ({ operation, bounds: reachOf(operation) }))
  drawSheets(document, set.sheets, drawing, { height, scale, fonts, isOpen: () => !out.destroyed }).catch((error: unknown) =>
    out.destroy(error instanceof Error ? error : new Error(String(error))),
  )
  return out
}

interface Pen {
  readonly height: number
  readonly scale: PrintSet['scale']
  readonly fonts: readonly PrintFont[]
  readonly isOpen: () => boolean
}
type Reached = readonly { readonly operation: DrawingOperation; readonly bounds: Bounds }[]

async function drawSheets(document: PDFKit.PDFDocument, sheets: readonly Sheet[], drawing: Reached, pen: Pen): Promise<void> {
  for (const sheet of sheets) {
    if (!pen.isOpen()) return
    document.addPage()
    drawSheet(document, sheet, drawing, pen)
    await nextTurn()
  }
  document.end()
}

function drawSheet(document: PDFKit.PDFDocument, sheet: Sheet, drawing: Reached, pen: Pen): void {
  if (pen.scale.x !== 1 || pen.scale.y !== 1) document.scale(pen.scale.x, pen.scale.y, {})
  const onPage = ({ x, y }: Point): Point => ({ x: x * POINTS, y: (pen.height - y) * POINTS })
  for (const operation of sheet.under) drawOperation(document, operation, weightOf(operation), onPage, pen.fonts)
  if (sheet.drawing) {
    const { area, at } = sheet.drawing
    const shown = ({ x, y }: Point): Point => onPage({ x: x - area.left + at.x, y: y - area.bottom + at.y })
    const corner = shown({ x: area.left, y: area.top })
    document.save()
    document.rect(corner.x, corner.y, (area.right - area.left) * POINTS, (area.top - area.bottom) * POINTS).clip()
    for (const { operation, bounds } of drawing)
      if (meet(bounds, area)) drawOperation(document, operation, weightOf(operation), shown, pen.fonts)
    document.restore()
  }
  for (const operation of sheet.operations) drawOperation(document, operation, weightOf(operation), onPage, pen.fonts)
}

type Drawable = DrawingOperation | Sheet['operations'][number]

function weightOf(operation: Drawable): TextWeight {
  if (operation.kind === 'path') return 'regular'
  if ('weight' in operation) return operation.weight
  return operation.role === 'label' ? 'semibold' : 'regular'
}

function drawOperation(
  document: PDFKit.PDFDocument,
  operation: Drawable,
  weight: TextWeight,
  place: (point: Point) => Point,
  fonts: readonly PrintFont[],
): void {
  const style = LINE_STYLES[operation.role]
  if (operation.kind === 'path') drawPath(document, operation.path, operation.closed, style, place)
  else drawText(document, operation, weight, style, place, fonts)
}

function drawPath(document: PDFKit.PDFDocument, path: Path, closed: boolean, style: LineStyle, place: (point: Point) => Point): void {
  let pen: Point | null = null
  for (const segment of path) {
    const from = place(segment.from)
    if (!pen || Math.hypot(from.x - pen.x, from.y - pen.y) > 1e-6) document.moveTo(from.x, from.y)
    const to = place(segment.to)
    if (segment.kind === 'line') document.lineTo(to.x, to.y)
    else {
      const [c1, c2] = [place(segment.c1), place(segment.c2)]
      document.bezierCurveTo(c1.x, c1.y, c2.x, c2.y, to.x, to.y)
    }
    pen = to
  }
  if (closed) document.closePath()
  document
    .lineWidth(style.width * POINTS)
    .lineCap('butt')
    .lineJoin('miter')
    .strokeColor(grey(style.grey))
  if (style.dash) document.dash(style.dash.map((length) => length * POINTS) as unknown as number, {})
  if (style.fill === undefined) document.stroke()
  else document.fillColor(grey(style.fill)).fillAndStroke(grey(style.fill), grey(style.grey))
  if (style.dash) document.undash()
}

function drawText(
  document: PDFKit.PDFDocument,
  operation: Extract<Drawable, { kind: 'text' }>,
  weight: TextWeight,
  style: LineStyle,
  place: (point: Point) => Point,
  fonts: readonly PrintFont[],
): void {
  const runs = fontRuns(operation.text, weight, fonts)
  const size = operation.size * POINTS
  const widths = runs.map(({ font, text }) => document.font(font.name).fontSize(size).widthOfString(text))
  const whole = widths.reduce((sum, width) => sum + width, 0)
  const at = place(operation.at)
  let x = at.x - (operation.align === 'start' ? 0 : operation.align === 'middle' ? whole / 2 : whole)
  document.fillColor(grey(style.grey))
  runs.forEach(({ font, text }, i) => {
    document.font(font.name).fontSize(size).text(text, x, at.y, { lineBreak: false, baseline: 'alphabetic' })
    x += widths[i]!
  })
}

const grey = (level: number): [number, number, number] => {
  const value = Math.round(level * 255)
  return [value, value, value]
}

function reachOf(operation: DrawingOperation): Bounds {
  if (operation.kind === 'path')
    return boundsOfPoints(
      operation.path.flatMap((segment) =>
        segment.kind === 'line' ? [segment.from, segment.to] : [segment.from, segment.c1, segment.c2, segment.to],
      ),
    )
  const { at, size } = operation
  return { left: at.x - size * TEXT_REACH, right: at.x + size * TEXT_REACH, bottom: at.y - size, top: at.y + size * 1.5 }
}

const meet = (a: Bounds, b: Bounds) => a.left <= b.right && a.right >= b.left && a.bottom <= b.top && a.top >= b.bottom

/** Readers that heed it print without scaling to the page (ISO 32000-1, viewer preferences, PrintScaling). */
function askForNoScaling(document: PDFKit.PDFDocument): void {
  const root = (document as unknown as { _root: { data: { ViewerPreferences?: { data: Record<string, unknown> } } } })._root
  if (root.data.ViewerPreferences) root.data.ViewerPreferences.data.PrintScaling = 'None'
}
