import type { Path, Point } from '../../shared/domain/geometry/types'
import type { Sheet } from '../../shared/domain/output/sheet'
import type { TextWeight } from '../../shared/domain/output/text-width'
import type { DrawingOperation } from '../../shared/domain/output/types'
import { fontRuns } from './fonts'
import type { PrintFont } from './fonts'
import { LINE_STYLES } from './line-styles'
import type { LineStyle } from './line-styles'

/** PDF points in a millimetre. */
export const POINTS = 72 / 25.4

/** What a page or the drawing of the pieces is made of. */
export type Drawable = DrawingOperation | Sheet['operations'][number]

/** Draws one operation on the page that the document is at; `place` takes millimetres to its points, y down. */
export function drawOperation(
  document: PDFKit.PDFDocument,
  operation: Drawable,
  place: (point: Point) => Point,
  fonts: readonly PrintFont[],
): void {
  const style = LINE_STYLES[operation.role]
  if (operation.kind === 'path') drawPath(document, operation.path, operation.closed, style, place)
  else drawText(document, operation, style, place, fonts)
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
  style: LineStyle,
  place: (point: Point) => Point,
  fonts: readonly PrintFont[],
): void {
  const runs = fontRuns(operation.text, weightOf(operation), fonts)
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

function weightOf(operation: Extract<Drawable, { kind: 'text' }>): TextWeight {
  if ('weight' in operation) return operation.weight
  return operation.role === 'label' ? 'semibold' : 'regular'
}

const grey = (level: number): [number, number, number] => {
  const value = Math.round(level * 255)
  return [value, value, value]
}
