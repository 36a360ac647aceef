import type { LevelId } from '../body/types'
import type { DraftPiece, PieceEdge } from '../draft/types'
import { pointDistance } from '../geometry/point'
import type { Path, Point } from '../geometry/types'
import { mm } from '../units/brand'
import type { LaidBone } from '../structure/types'
import { boneOutline } from './bone-outline'
import { insideAtHeight, pointsAlong } from './crossings'
import { LEVEL_NAMES } from './level-names'
import { arrowHead, notchStrokes, pointCross, pullStrokes } from './marks'
import { placePath, placePoint } from './placing'
import { stretchTicks } from './stretch-ticks'
import type { KeepClear } from './stretch-ticks'
import { textWidth } from './text-width'
import { shareInside } from './touching'
import type { DrawingOperation, DrawingRole, Placement } from './types'

/** What a drawing of a piece may show. */
export type ScenePart = 'bones' | 'seam' | 'cutting' | 'notches' | 'arrows' | 'levels' | 'level-names' | 'ticks' | 'points' | 'labels'

export interface SceneOptions {
  /** Shown unless `false`; ticks and points only when `true`. */
  readonly show?: Readonly<Partial<Record<ScenePart, boolean>>>
  /** Bones as they lie; those of other pieces are left out. */
  readonly bones?: readonly LaidBone[]
  /** Worn strain round the body by level, of the piece's own zone. Without it no ticks. */
  readonly strains?: Readonly<Partial<Record<LevelId, number>>>
  /** Lines under the piece's name; without them the words of the cut. */
  readonly lines?: readonly string[]
  /** Size of the name, mm; the lines under it are three quarters of it. Default 7. */
  readonly textSize?: number
}

const shownUnlessAsked: Readonly<Record<ScenePart, boolean>> = {
  bones: true,
  seam: true,
  cutting: true,
  notches: true,
  arrows: true,
  levels: true,
  'level-names': true,
  ticks: false,
  points: false,
  labels: true,
}

const ARROW_HEAD = 6
const PULL_STROKE = 4
const POINT_SIZE = 3
/** A cutting line runs along a fold when both ends of a stroke lie this near to it, mm. */
const ON_FOLD = 0.05

/** `cut 1 on the fold`, `cut 2, a pair`: how often a piece is cut from one layer. */
export function cutWords(piece: Pick<DraftPiece, 'onFold' | 'quantity'>): string {
  if (piece.onFold) return `cut ${piece.quantity} on the fold`
  return piece.quantity === 2 ? 'cut 2, a pair' : `cut ${piece.quantity}`
}

/**
 * The drawing operations of one piece on the drafting plane (mm, y up), in the order in which they are drawn. The board
 * and the print draw the same ones. A fold edge has the role `fold` and the cutting line leaves it out; text stays
 * readable on a mirrored piece. Coordinates are exact: curves stay curves.
 */
export function pieceOperations(piece: DraftPiece, placement: Placement, options: SceneOptions = {}): DrawingOperation[] {
  const shows = (part: ScenePart) => options.show?.[part] ?? shownUnlessAsked[part]
  const textSize = options.textSize ?? 7
  const labels = shows('labels') ? labelLines(piece, options.lines ?? [cutWords(piece)], textSize) : []
  const operations: DrawingOperation[] = []
  const draw = (role: DrawingRole, path: Path, closed = false) => {
    if (path.length > 0) operations.push({ kind: 'path', role, piece: piece.id, path: placePath(path, placement), closed })
  }
  const write = (role: DrawingRole, at: Point, text: string, size: number, align: 'start' | 'middle' | 'end') =>
    operations.push({ kind: 'text', role, piece: piece.id, at, text, size: mm(size), align })

  if (shows('ticks') && options.strains) {
    const clear = [...labels.map((label) => label.box), ...(shows('arrows') ? arrowBoxes(piece) : [])]
    for (const tick of stretchTicks(piece, options.strains, clear)) draw('stretch-tick', [{ kind: 'line', ...tick }])
  }
  if (shows('bones')) for (const bone of options.bones ?? []) if (bone.piece === piece.id) draw('bone', boneOutline(bone), true)
  if (shows('levels')) {
    for (const { level, from, to } of piece.levels) {
      for (const part of besideWords({ from, to }, labels)) draw('level', [{ kind: 'line', ...part }])
      if (shows('level-names')) {
        const start = placement.mirrored === to.x > from.x ? to : from
        const at = placePoint(start, placement)
        write('label-small', { x: at.x + 3, y: at.y + 1.2 }, LEVEL_NAMES[level], textSize / 2, 'start')
      }
    }
  }
  if (shows('cutting')) for (const run of cuttingRuns(piece)) draw('cutting-line', run.path, run.closed)
  if (shows('seam')) {
    for (const run of edgeRuns(piece))
      draw(run.role, run.role === 'fold' && shows('cutting') ? foldToCutting(piece, run.path) : run.path, run.closed)
  }
  if (shows('notches')) {
    for (const edge of piece.edges) for (const notch of edge.notches) for (const stroke of notchStrokes(notch, edge)) draw('notch', stroke)
  }
  if (shows('arrows')) {
    const { stretch } = piece
    const grain = longest(besideWords(piece.grain, labels))
    draw('grain', [{ kind: 'line', ...grain }])
    draw('grain', arrowHead(grain.from, grain.to, ARROW_HEAD))
    draw('grain', arrowHead(grain.to, grain.from, ARROW_HEAD))
    draw('stretch', [{ kind: 'line', from: stretch.from, to: stretch.to }])
    draw('stretch', arrowHead(stretch.from, stretch.to, ARROW_HEAD))
    draw('stretch', arrowHead(stretch.to, stretch.from, ARROW_HEAD))
    for (const stroke of pullStrokes(stretch.from, stretch.to, PULL_STROKE)) draw('stretch', stroke)
    if (shows('labels')) {
      const top = placePoint(grain.from.y > grain.to.y ? grain.from : grain.to, placement)
      write('label-small', { x: top.x + 3, y: top.y - 8 }, 'grain', textSize / 2, 'start')
      const size = textSize / 2
      const middle = placePoint({ x: (stretch.from.x + stretch.to.x) / 2, y: (stretch.from.y + stretch.to.y) / 2 }, placement)
      write('label-small', { x: middle.x + 2, y: middle.y - size - 2.5 }, 'greatest stretch', size, 'start')
    }
  }
  if (shows('labels')) {
    for (const edge of piece.edges) {
      if (edge.kind !== 'fold') continue
      const at = foldLabelPoint(piece, edge)
      const placed = placePoint(at, placement)
      const toRight = placePoint({ x: at.x + 1, y: at.y }, placement).x > placed.x
      write('label-small', { x: placed.x + (toRight ? 3 : -3), y: placed.y }, 'fold', textSize / 2, toRight ? 'start' : 'end')
    }
  }
  if (shows('points')) {
    for (const edge of piece.edges)
      for (const node of edge.nodes) for (const stroke of pointCross(node.at, POINT_SIZE)) draw('point', stroke)
  }
  for (const label of labels) write(label.role, placePoint(label.at, placement), label.text, label.size, 'middle')
  return operations
}

interface LabelLine {
  readonly role: 'label' | 'label-small'
  readonly at: Point
  readonly text: string
  readonly size: number
  readonly box: KeepClear
}

function labelLines(piece: DraftPiece, lines: readonly string[], textSize: number): LabelLine[] {
  let y = piece.labelAt.y
  return [piece.name, ...lines].map((text, i) => {
    const size = i === 0 ? textSize : textSize * 0.75
    if (i > 0) y -= size * 1.45
    const half = textWidth(text, size, i === 0 ? 'semibold' : 'regular') / 2 + 2
    const { x } = piece.labelAt
    return {
      role: i === 0 ? 'label' : 'label-small',
      at: { x, y },
      text,
      size,
      box: { left: x - half, right: x + half, bottom: y - size * 0.5 - 2, top: y + size + 2 },
    }
  })
}

/** The parts of a grain or level line before and behind the words it would run through; the whole of it where there are none. */
function besideWords(
  { from, to }: { readonly from: Point; readonly to: Point },
  labels: readonly LabelLine[],
): { from: Point; to: Point }[] {
  const at = (t: number): Point => ({ x: from.x + (to.x - from.x) * t, y: from.y + (to.y - from.y) * t })
  const struck = labels.flatMap(({ box }) => {
    const share = shareInside(from, to, box)
    return share ? [share] : []
  })
  if (struck.length === 0) return [{ from, to }]
  const first = Math.min(...struck.map(([enter]) => enter))
  const last = Math.max(...struck.map(([, leave]) => leave))
  return [...(first > 0 ? [{ from, to: at(first) }] : []), ...(last < 1 ? [{ from: at(last), to }] : [])]
}

/** An arrow keeps both heads on one shaft: where words part it, its longer part is the arrow. */
const longest = (parts: readonly { from: Point; to: Point }[]): { from: Point; to: Point } =>
  parts.reduce((long, part) => (pointDistance(part.from, part.to) > pointDistance(long.from, long.to) ? part : long))

function arrowBoxes(piece: DraftPiece): KeepClear[] {
  return [piece.grain, piece.stretch].map(({ from, to }) => ({
    left: Math.min(from.x, to.x) - 3,
    right: Math.max(from.x, to.x) + 3,
    bottom: Math.min(from.y, to.y) - 3,
    top: Math.max(from.y, to.y) + 3,
  }))
}

/** Edges of one kind that follow each other, joined: fold or seam line. One closed run when the piece has no fold. */
function edgeRuns(piece: DraftPiece): { role: 'fold' | 'seam-line'; path: Path; closed: boolean }[] {
  const folds = piece.edges.some((edge) => edge.kind === 'fold')
  if (!folds) return [{ role: 'seam-line', path: piece.edges.flatMap((edge) => edge.path), closed: true }]
  const start = piece.edges.findIndex((edge) => edge.kind === 'fold')
  const fromFold = [...piece.edges.slice(start), ...piece.edges.slice(0, start)]
  const runs: { role: 'fold' | 'seam-line'; path: Path; closed: boolean }[] = []
  for (const edge of fromFold) {
    const role = edge.kind === 'fold' ? 'fold' : 'seam-line'
    const last = runs[runs.length - 1]
    if (last?.role === role) last.path = [...last.path, ...edge.path]
    else runs.push({ role, path: edge.path, closed: false })
  }
  return runs
}

/** The cutting line without the strokes that lie on a fold. */
function cuttingRuns(piece: DraftPiece): { path: Path; closed: boolean }[] {
  const folds = foldsOf(piece)
  const points = piece.cuttingLine
  const strokes = points.map((from, i) => ({ from, to: points[(i + 1) % points.length]! }))
  const onFold = strokes.map(({ from, to }) => folds.some((fold) => liesAlong(fold, from) && liesAlong(fold, to)))
  const start = onFold.indexOf(true)
  if (start < 0) return [{ path: strokes.map((stroke) => ({ kind: 'line', ...stroke })), closed: true }]
  const runs: { path: Path; closed: boolean }[] = []
  let run: Path = []
  for (let i = 1; i <= strokes.length; i += 1) {
    const at = (start + i) % strokes.length
    if (!onFold[at]) run = [...run, { kind: 'line', ...strokes[at]! }]
    else if (run.length > 0) {
      runs.push({ path: run, closed: false })
      run = []
    }
  }
  return runs
}

/** A fold is straight: its two ends. */
function foldsOf(piece: DraftPiece): { from: Point; to: Point }[] {
  return piece.edges
    .filter((edge) => edge.kind === 'fold')
    .map(({ path }) => {
      const points = pointsAlong(path)
      return { from: points[0]!, to: points[points.length - 1]! }
    })
}

/** Whether a point lies on the line of a fold, its run through the allowances at both ends counted in. */
function liesAlong({ from, to }: { from: Point; to: Point }, point: Point): boolean {
  const length = Math.hypot(to.x - from.x, to.y - from.y)
  return Math.abs((to.x - from.x) * (point.y - from.y) - (to.y - from.y) * (point.x - from.x)) / length < ON_FOLD
}

/** A fold as the cloth is laid: run on through the allowances to the cutting line. */
function foldToCutting(piece: DraftPiece, path: Path): Path {
  const points = pointsAlong(path)
  const fold = { from: points[0]!, to: points[points.length - 1]! }
  const along = ({ x, y }: Point) => (x - fold.from.x) * (fold.to.x - fold.from.x) + (y - fold.from.y) * (fold.to.y - fold.from.y)
  const on = [fold.from, fold.to, ...piece.cuttingLine.filter((point) => liesAlong(fold, point))].sort((a, b) => along(a) - along(b))
  return [{ kind: 'line', from: on[0]!, to: on[on.length - 1]! }]
}

/** A point of the fold two thirds up, clear of the level lines' names. */
function foldLabelPoint(piece: DraftPiece, edge: PieceEdge): Point {
  const heights = edge.nodes.map((node) => node.at.y)
  const low = Math.min(...heights)
  const y = low + (Math.max(...heights) - low) * 0.62
  const outline = pointsAlong(piece.edges.flatMap((each) => each.path))
  const across = insideAtHeight(outline, y)[0]
  const first = edge.nodes[0]
  return { x: across?.[0] ?? first?.at.x ?? 0, y }
}
