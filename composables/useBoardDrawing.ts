import type { Path, Point } from '#shared/domain/geometry/types'
import { insideAtHeight } from '#shared/domain/output/crossings'
import type { Bounds } from '#shared/domain/output/placing'
import type { DrawingOperation, DrawingRole } from '#shared/domain/output/types'
import { dotStep, toPlane, toScreen } from './useBoardView'
import type { BoardView, ScreenSize } from './useBoardView'

/** The colours of the page as the canvas needs them, read from the tokens so that light and dark share the drawing. */
export type BoardPalette = Readonly<
  Record<'chalk' | 'selvage' | 'selvage-deep' | 'thread' | 'oakgall' | 'walnut' | 'woad' | 'woad-pale' | 'madder', string>
>

const TOKENS = ['chalk', 'selvage', 'selvage-deep', 'thread', 'oakgall', 'walnut', 'woad', 'woad-pale', 'madder'] as const

export function readPalette(element: Element): BoardPalette {
  const style = getComputedStyle(element)
  return Object.fromEntries(
    TOKENS.map((token) => [token, `rgb(${style.getPropertyValue(`--${token}`).trim() || '120 120 120'})`]),
  ) as BoardPalette
}

type Pen = CanvasRenderingContext2D

interface Line {
  readonly colour: keyof BoardPalette
  readonly width: number
  readonly dash: readonly number[]
}

/** Each role has its own line: weight and dash tell it apart without colour. */
const LINES: Readonly<Partial<Record<DrawingRole, Line>>> = {
  'seam-line': { colour: 'oakgall', width: 1.6, dash: [] },
  'cutting-line': { colour: 'walnut', width: 0.9, dash: [] },
  fold: { colour: 'oakgall', width: 1.6, dash: [12, 3, 2, 3] },
  notch: { colour: 'oakgall', width: 1.4, dash: [] },
  grain: { colour: 'walnut', width: 1, dash: [] },
  stretch: { colour: 'walnut', width: 1, dash: [] },
  'stretch-tick': { colour: 'walnut', width: 0.9, dash: [] },
}

export function tracePath(pen: Pen, view: BoardView, path: Path, closed = false) {
  let last: Point | null = null
  for (const segment of path) {
    const from = toScreen(view, segment.from)
    if (!last || Math.hypot(last.x - segment.from.x, last.y - segment.from.y) > 1e-6) pen.moveTo(from.x, from.y)
    const to = toScreen(view, segment.to)
    if (segment.kind === 'line') pen.lineTo(to.x, to.y)
    else {
      const [c1, c2] = [toScreen(view, segment.c1), toScreen(view, segment.c2)]
      pen.bezierCurveTo(c1.x, c1.y, c2.x, c2.y, to.x, to.y)
    }
    last = segment.to
  }
  if (closed) pen.closePath()
}

/** Dots of the drafting paper over the whole screen, every tenth a little stronger. */
export function drawPaper(pen: Pen, view: BoardView, size: ScreenSize, unit: 'cm' | 'in', palette: BoardPalette) {
  const step = dotStep(view.scale, unit)
  const [topLeft, bottomRight] = [toPlane(view, { x: 0, y: 0 }), toPlane(view, { x: size.width, y: size.height })]
  pen.fillStyle = palette.thread
  for (let column = Math.floor(topLeft.x / step); column * step <= bottomRight.x; column += 1) {
    for (let row = Math.floor(bottomRight.y / step); row * step <= topLeft.y; row += 1) {
      const at = toScreen(view, { x: column * step, y: row * step })
      const half = column % 4 === 0 && row % 4 === 0 ? 1.3 : 0.8
      pen.fillRect(at.x - half, at.y - half, 2 * half, 2 * half)
    }
  }
}

export function fillOutline(pen: Pen, view: BoardView, outline: Path, colour: string) {
  pen.beginPath()
  tracePath(pen, view, outline, true)
  pen.fillStyle = colour
  pen.fill()
}

/** Solid parts of one role: bone channels. */
export function fillRole(pen: Pen, view: BoardView, operations: readonly DrawingOperation[], role: DrawingRole, colour: string) {
  pen.beginPath()
  for (const operation of operations) if (operation.kind === 'path' && operation.role === role) tracePath(pen, view, operation.path, true)
  pen.fillStyle = colour
  pen.fill()
}

/** All lines of one role in one stroke. */
export function strokeRole(pen: Pen, view: BoardView, operations: readonly DrawingOperation[], role: DrawingRole, palette: BoardPalette) {
  const line = LINES[role]
  if (!line) return
  pen.beginPath()
  for (const operation of operations)
    if (operation.kind === 'path' && operation.role === role) tracePath(pen, view, operation.path, operation.closed)
  pen.strokeStyle = palette[line.colour]
  pen.lineWidth = line.width
  pen.lineJoin = 'round'
  pen.setLineDash([...line.dash])
  pen.stroke()
  pen.setLineDash([])
}

/** Labels keep a readable size at any zoom and clear a little cloth round them. */
const NAME_PX = { least: 12, most: 12 }
const SMALL_PX = { least: 10.5, most: 11.5 }
/** A name that does not fit its piece stands this far under it, px. */
const NAME_UNDER = 15

/** A piece as it is labelled: its operations, its outline as points of the plane, its bounds with the allowance. */
export interface LabelledPiece {
  readonly operations: readonly DrawingOperation[]
  readonly points: readonly Point[]
  readonly bounds: Bounds
}

type Text = Extract<DrawingOperation, { kind: 'text' }>

/** Sets the pen to the size of a text, one step smaller where it would touch the outline, and says where it then lies, px. */
function layText(pen: Pen, view: BoardView, operation: Text, outline: readonly Point[]) {
  const name = operation.role === 'label'
  const limits = name ? NAME_PX : SMALL_PX
  const wished = Math.min(Math.max(operation.size * view.scale, limits.least), limits.most)
  const at = toScreen(view, operation.at)
  const lay = (px: number) => {
    pen.font = `${name ? 600 : 400} ${px}px Inter, system-ui, sans-serif`
    const width = pen.measureText(operation.text).width
    const left = operation.align === 'middle' ? at.x - width / 2 : operation.align === 'end' ? at.x - width : at.x
    const heights = [0, 0.4, 0.75].map((part) => operation.at.y + (part * px) / view.scale)
    const clear = heights.every((height) => isClear(view, outline, height, left - 3, left + width + 3))
    return { px, width, left, y: at.y, clear }
  }
  const first = lay(wished)
  return first.clear ? first : lay(limits.least)
}

/**
 * Names of pieces always: in the pieces where all of them fit, else under them. Smaller words only where they lie clear of the outline.
 */
export function writeLabels(pen: Pen, view: BoardView, pieces: readonly LabelledPiece[], palette: BoardPalette, ground: string) {
  pen.textBaseline = 'alphabetic'
  pen.textAlign = 'left'
  const texts = pieces.flatMap(({ operations, points, bounds }) =>
    operations.flatMap((operation) => (operation.kind === 'text' ? [{ operation, points, bounds }] : [])),
  )
  const inside = texts.every(({ operation, points }) => operation.role !== 'label' || layText(pen, view, operation, points).clear)
  const written: Words[] = []
  for (const { operation, points, bounds } of texts) {
    const { px, width, left, y, clear } = layText(pen, view, operation, points)
    if (operation.role === 'label' && !inside) {
      const under = toScreen(view, { x: (bounds.left + bounds.right) / 2, y: bounds.bottom })
      const place = freeRow(written, { left: under.x - width / 2, width, y: under.y + NAME_UNDER, height: px * 1.25 })
      written.push(place)
      pen.fillStyle = palette.oakgall
      pen.fillText(operation.text, place.left, place.y)
    } else if (clear) {
      pen.fillStyle = ground
      pen.fillRect(left - 2, y - px * 0.95, width + 4, px * 1.25)
      pen.fillStyle = operation.role === 'label' ? palette.oakgall : palette.walnut
      pen.fillText(operation.text, left, y)
    }
  }
}

/** Words as they stand on the screen, px; `y` is their base line. */
interface Words {
  readonly left: number
  readonly width: number
  readonly y: number
  readonly height: number
}

const BETWEEN_WORDS = 6

/** The same words one line lower for every name already written that they would run into. */
function freeRow(written: readonly Words[], words: Words): Words {
  const meets = (one: Words, y: number) =>
    Math.abs(one.y - y) < words.height &&
    one.left < words.left + words.width + BETWEEN_WORDS &&
    words.left < one.left + one.width + BETWEEN_WORDS
  let { y } = words
  while (written.some((one) => meets(one, y))) y += words.height
  return { ...words, y }
}

function isClear(view: BoardView, outline: readonly Point[], height: number, left: number, right: number): boolean {
  return insideAtHeight(outline, height).some(([from, to]) => view.x + from * view.scale <= left && view.x + to * view.scale >= right)
}

export function drawLevels(pen: Pen, view: BoardView, size: ScreenSize, heights: readonly number[], palette: BoardPalette, from: number) {
  pen.beginPath()
  for (const height of heights) {
    const y = Math.round(toScreen(view, { x: 0, y: height }).y) + 0.5
    pen.moveTo(from, y)
    pen.lineTo(size.width, y)
  }
  pen.strokeStyle = palette.walnut
  pen.lineWidth = 1
  pen.setLineDash([1.5, 4])
  pen.stroke()
  pen.setLineDash([])
}

export interface DrawnPoint {
  readonly at: Point
  readonly anchor: Point | null
  readonly state: 'rest' | 'near' | 'chosen'
}

/** Points are rounds, curve handles squares on an arm from their point; the chosen one is full. */
export function drawPoints(pen: Pen, view: BoardView, points: readonly DrawnPoint[], palette: BoardPalette) {
  for (const { at, anchor, state } of points) {
    const place = toScreen(view, at)
    const chosen = state === 'chosen'
    pen.strokeStyle = state === 'rest' && !anchor ? palette.oakgall : palette.woad
    pen.fillStyle = chosen ? palette.woad : palette.chalk
    pen.lineWidth = state === 'near' ? 2.2 : 1.4
    if (anchor) {
      const root = toScreen(view, anchor)
      pen.beginPath()
      pen.moveTo(root.x, root.y)
      pen.lineTo(place.x, place.y)
      pen.stroke()
      const half = chosen ? 5 : 3.6
      pen.beginPath()
      pen.rect(place.x - half, place.y - half, 2 * half, 2 * half)
    } else {
      pen.beginPath()
      pen.arc(place.x, place.y, chosen ? 5.4 : state === 'near' ? 5 : 3.4, 0, 2 * Math.PI)
    }
    pen.fill()
    pen.stroke()
    if (!chosen) continue
    pen.beginPath()
    pen.arc(place.x, place.y, 10, 0, 2 * Math.PI)
    pen.lineWidth = 1.6
    pen.stroke()
  }
}
