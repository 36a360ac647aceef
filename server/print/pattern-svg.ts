import type { Path, Point } from '../../shared/domain/geometry/types'
import type { ExchangeDrawing, ExchangePiece } from '../../shared/domain/output/exchange'
import type { DrawingOperation, DrawingRole } from '../../shared/domain/output/types'
import type { PrintFont } from './fonts'
import { textOutline } from './glyph-paths'
import { LINE_STYLES, type LineStyle } from './line-styles'

const number = (value: number) => String(Math.round(value * 10_000) / 10_000)
const escaped = (text: string) => text.replaceAll('&', '&amp;').replaceAll('<', '&lt;').replaceAll('>', '&gt;').replaceAll('"', '&quot;')
const grey = (level: number) => {
  const value = Math.round(level * 255)
    .toString(16)
    .padStart(2, '0')
  return `#${value}${value}${value}`
}

/** What the layers of a piece are called. */
const LAYER_NAMES: Readonly<Record<DrawingRole, string>> = {
  'cutting-line': 'cutting line',
  'seam-line': 'seam line',
  fold: 'fold',
  notch: 'notches',
  grain: 'grain line',
  stretch: 'greatest stretch',
  level: 'level lines',
  bone: 'bones',
  'stretch-tick': 'stretch ticks',
  point: 'points',
  label: 'piece name',
  'label-small': 'labels',
}

/** Path data; y turned down. Curves stay curves. */
function pathData(path: Path, closed: boolean, place: (point: Point) => Point): string {
  let pen: Point | null = null
  let data = ''
  const at = (point: Point) => {
    const { x, y } = place(point)
    return `${number(x)} ${number(y)}`
  }
  for (const segment of path) {
    if (!pen || Math.hypot(segment.from.x - pen.x, segment.from.y - pen.y) > 1e-6) data += `M${at(segment.from)}`
    data += segment.kind === 'line' ? `L${at(segment.to)}` : `C${at(segment.c1)} ${at(segment.c2)} ${at(segment.to)}`
    pen = segment.to
  }
  return closed ? `${data}Z` : data
}

const strokeOf = ({ width, grey: level, dash, fill }: LineStyle) =>
  `fill="${fill === undefined ? 'none' : grey(fill)}" stroke="${grey(level)}" stroke-width="${width}"${dash ? ` stroke-dasharray="${dash.join(' ')}"` : ''}`

/**
 * A pattern as SVG in millimetres: the user unit is 1 mm and the page says its size in mm. A group a piece, in it a group a layer with
 * its name. Words are outlines, their text kept beside them. The same input gives the same bytes.
 */
export function patternSvg(drawing: ExchangeDrawing, title: string, fonts: readonly PrintFont[]): string {
  const { bounds } = drawing
  const [width, height] = [bounds.right - bounds.left, bounds.top - bounds.bottom]
  const place = ({ x, y }: Point): Point => ({ x: x - bounds.left, y: bounds.top - y })
  const pieces = drawing.pieces.map((piece) => pieceGroup(piece, place, fonts))
  return [
    '<?xml version="1.0" encoding="UTF-8"?>',
    `<svg xmlns="http://www.w3.org/2000/svg" width="${number(width)}mm" height="${number(height)}mm" viewBox="0 0 ${number(width)} ${number(height)}">`,
    `<title>${escaped(title)}</title>`,
    '<desc>1 user unit is 1 mm.</desc>',
    ...pieces,
    '</svg>',
    '',
  ].join('\n')
}

function pieceGroup(piece: ExchangePiece, place: (point: Point) => Point, fonts: readonly PrintFont[]): string {
  const layers = new Map<DrawingRole, string[]>()
  for (const operation of piece.operations) {
    const own = layers.get(operation.role) ?? []
    own.push(
      operation.kind === 'path' ? `<path d="${pathData(operation.path, operation.closed, place)}"/>` : label(operation, place, fonts),
    )
    layers.set(operation.role, own)
  }
  const groups = [...layers].map(([role, content]) => {
    const style = LINE_STYLES[role]
    const paint = role === 'label' || role === 'label-small' ? `fill="${grey(style.grey)}"` : strokeOf(style)
    return [`<g id="${piece.id}-${role}" ${paint}>`, `<title>${LAYER_NAMES[role]}</title>`, ...content, '</g>'].join('\n')
  })
  return [`<g id="${piece.id}">`, `<title>${escaped(piece.name)}</title>`, ...groups, '</g>'].join('\n')
}

function label(
  operation: Extract<DrawingOperation, { kind: 'text' }>,
  place: (point: Point) => Point,
  fonts: readonly PrintFont[],
): string {
  const { path, width } = textOutline(operation.text, operation.size, operation.role === 'label' ? 'semibold' : 'regular', fonts)
  const at = place(operation.at)
  const x = at.x - (operation.align === 'start' ? 0 : operation.align === 'middle' ? width / 2 : width)
  return `<path aria-label="${escaped(operation.text)}" transform="translate(${number(x)} ${number(at.y)})" d="${path}"/>`
}
