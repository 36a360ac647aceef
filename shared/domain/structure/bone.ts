import type { LevelId } from '../body/types'
import { pieceWords } from '../draft/roles'
import type { DraftPiece, PieceEdge } from '../draft/types'
import { monotoneCurve, monotonePath, monotoneValueAt } from '../geometry/monotone'
import { pathFlatten, pathLength, pathReverse, pathSplitAt } from '../geometry/path'
import { pointDistance } from '../geometry/point'
import { cubicSegment, segmentCurvatureAt, segmentLength, segmentPointAt, segmentTangentAt } from '../geometry/segment'
import type { Path, Point } from '../geometry/types'
import { mm } from '../units/brand'
import { fail, succeed, type Result } from '../units/result'
import { channelWidth, TIP_CLEARANCE } from './stock'
import type { Bone, BoneCrossing, BoneEnd, BoneFault, BoneStock, LaidBone } from './types'

/** A channel shorter than this holds nothing, mm. Setting. */
export const LEAST_CHANNEL = 30
/** Chords of an outline leave it by no more than this, mm. */
const OUTLINE_CHORDS = 0.05

type Laid = Result<LaidBone, BoneFault & { readonly code: BoneFault['code'] }>

const fault = (bone: Bone, code: BoneFault['code'], message: string, todo: string): Laid =>
  fail({ bone: bone.id, code, message: `${bone.name}: ${message}`, todo })

/** Edge read from the bottom up. */
function upwards(edge: PieceEdge): Path {
  const first = edge.nodes[0]!.at
  const last = edge.nodes.at(-1)!.at
  return first.y <= last.y ? edge.path : pathReverse(edge.path)
}

const outlines = new WeakMap<DraftPiece['edges'], readonly Point[]>()

/** Outline of a piece in chords; remembered by its edges, which never change. */
function outlineOf({ edges }: DraftPiece): readonly Point[] {
  const known = outlines.get(edges)
  if (known) return known
  const made = edges.flatMap((edge) => pathFlatten(edge.path, OUTLINE_CHORDS).slice(0, -1))
  outlines.set(edges, made)
  return made
}

/** Heights at which a line x(y) leaves an outline under and over a height inside it; null where that height is not inside. */
function meets(outline: readonly Point[], xAt: (y: number) => number, middle: number): readonly [number, number] | null {
  let [bottom, top] = [-Infinity, Infinity]
  let before = outline.at(-1)!
  let side = before.x - xAt(before.y)
  let crossedAbove = 0
  for (const at of outline) {
    const here = at.x - xAt(at.y)
    if (side < 0 !== here < 0) {
      let [low, high] = [0, 1]
      for (let i = 0; i < 24; i++) {
        const t = (low + high) / 2
        const y = before.y + (at.y - before.y) * t
        const own = before.x + (at.x - before.x) * t - xAt(y)
        if (own < 0 === side < 0) low = t
        else high = t
      }
      const y = before.y + (at.y - before.y) * low
      if (y > middle) {
        crossedAbove++
        top = Math.min(top, y)
      } else bottom = Math.max(bottom, y)
    }
    before = at
    side = here
  }
  return crossedAbove % 2 === 1 && Number.isFinite(bottom) ? [bottom, top] : null
}

/** A line up a panel at a share of its width, from edge to edge of the piece: through every level, straight on beyond them. */
function panelLine(piece: DraftPiece, share: number): Path | null {
  const levels = [...piece.levels].sort((a, b) => a.from.y - b.from.y).filter(({ level }) => level !== 'top-edge')
  if (levels.length < 2) return null
  const at = ({ from, to }: (typeof levels)[number]): Point => ({
    x: from.x + (to.x - from.x) * share,
    y: from.y + (to.y - from.y) * share,
  })
  const points = levels.map(at)
  const curve = monotoneCurve(
    points.map(({ y }) => y),
    points.map(({ x }) => x),
  )
  const middle = (points[0]!.y + points.at(-1)!.y) / 2
  const ends = meets(outlineOf(piece), (y) => monotoneValueAt(curve, y), middle)
  if (ends === null) return null
  const [bottom, top] = ends
  const heights = [bottom, ...points.map(({ y }) => y).filter((y) => y > bottom + 1 && y < top - 1), top]
  return monotonePath(
    monotoneCurve(
      heights,
      heights.map((y) => monotoneValueAt(curve, y)),
    ),
  )
}

/** A line between two shares of two levels, straight or bowed towards the side. */
function freeLine(piece: DraftPiece, place: Extract<Bone['place'], { kind: 'free' }>): Path | LevelId {
  const pointAt = ({ level, at }: { readonly level: LevelId; readonly at: number }): Point | null => {
    const crossing = piece.levels.find((one) => one.level === level)
    return crossing
      ? { x: crossing.from.x + (crossing.to.x - crossing.from.x) * at, y: crossing.from.y + (crossing.to.y - crossing.from.y) * at }
      : null
  }
  const [a, b] = [pointAt(place.from), pointAt(place.to)]
  if (a === null) return place.from.level
  if (b === null) return place.to.level
  const [from, to] = a.y <= b.y ? [a, b] : [b, a]
  // A cubic whose middle lies `bow` off the chord: handles at 4/3 of it.
  const length = Math.max(pointDistance(from, to), 1e-6)
  const off = { x: ((to.y - from.y) / length) * place.bow * (4 / 3), y: (-(to.x - from.x) / length) * place.bow * (4 / 3) }
  const third = (t: number): Point => ({ x: from.x + (to.x - from.x) * t + off.x, y: from.y + (to.y - from.y) * t + off.y })
  return [cubicSegment(from, third(1 / 3), third(2 / 3), to)]
}

/** Lengths along a line at which a bone begins and ends; null where a level it ends at does not cross the line. */
function endAt(line: Path, piece: DraftPiece, end: BoneEnd, which: 'bottom' | 'top'): number | null {
  const whole = pathLength(line)
  if (end.kind === 'edge') return which === 'bottom' ? end.clear : whole - end.clear
  const level = piece.levels.find((one) => one.level === end.level)
  if (!level) return null
  const y = (level.from.y + level.to.y) / 2 + end.above
  const place = placeAtHeight(line, y)
  if (!place) return null
  return pathLength(line.slice(0, place.index)) + segmentLength(line[place.index]!, place.t)
}

/** Where a line that rises meets a height: the first of its segments that does, by halves. */
function placeAtHeight(line: Path, y: number): { readonly index: number; readonly t: number } | null {
  for (const [index, segment] of line.entries()) {
    const [from, to] = [segment.from.y - y, segment.to.y - y]
    if (from * to > 0) continue
    let [low, high] = [0, 1]
    for (let i = 0; i < 40; i++) {
      const t = (low + high) / 2
      if ((segmentPointAt(segment, t).y - y) * (from === 0 ? -to : from) > 0) low = t
      else high = t
    }
    return { index, t: from === 0 ? 0 : (low + high) / 2 }
  }
  return null
}

/** The tightest radius of a path, mm. */
export function tightestRadius(path: Path): number {
  let most = 0
  for (const segment of path) for (let i = 0; i <= 16; i++) most = Math.max(most, Math.abs(segmentCurvatureAt(segment, i / 16)))
  return most > 1e-9 ? 1 / most : Infinity
}

/** A bone that ends this near to a level stiffens it, mm. Setting. */
const STIFFENS_WITHIN = 5

/** The end of a line that lies nearly at a height. */
function endNear(line: Path, y: number): { readonly index: number; readonly t: number } | null {
  if (Math.abs(line[0]!.from.y - y) <= STIFFENS_WITHIN) return { index: 0, t: 0 }
  return Math.abs(line.at(-1)!.to.y - y) <= STIFFENS_WITHIN ? { index: line.length - 1, t: 1 } : null
}

function crossingsOf(piece: DraftPiece, path: Path, channel: number): readonly BoneCrossing[] {
  return piece.levels.flatMap(({ level, from, to }) => {
    const y = (from.y + to.y) / 2
    const place = placeAtHeight(path, y) ?? endNear(path, y)
    if (!place) return []
    const segment = path[place.index]!
    const tangent = segmentTangentAt(segment, place.t)
    const tilt = Math.atan2(Math.abs(tangent.x), Math.abs(tangent.y))
    return [{ level, at: segmentPointAt(segment, place.t), tilt, width: mm(channel / Math.max(Math.cos(tilt), 0.2)) }]
  })
}

/**
 * A bone laid on the pieces of a draft: its curve, channel and cut length, how it crosses the levels. The piece or seam it names has to be
 * there; it never goes over to a neighbour. Millimetres.
 */
export function layBone(bone: Bone, pieces: readonly DraftPiece[], stock: readonly BoneStock[]): Laid {
  const own = stock.find(({ id }) => id === bone.stock)
  if (!own) return fault(bone, 'stock-gone', 'its stock is not in the list.', 'Choose another stock.')
  const { place } = bone
  const piece = pieces.find(({ id }) => id === place.piece)
  const edge = place.kind === 'seam' ? piece?.edges.find(({ id }) => id === place.edge) : undefined
  if (!piece || (place.kind === 'seam' && !edge))
    return fault(
      bone,
      'piece-gone',
      `${pieceWords(place.piece).toLowerCase()} or its seam is not in this draft.`,
      'Lay it on a piece that is there, or take it off.',
    )
  const line = place.kind === 'seam' ? upwards(edge!) : place.kind === 'panel' ? panelLine(piece, place.at) : freeLine(piece, place)
  if (typeof line === 'string' || line === null)
    return fault(bone, 'level-missing', 'a level it runs to does not cross its piece.', 'Choose another level, or another place.')
  const [from, to] = [endAt(line, piece, bone.bottom, 'bottom'), endAt(line, piece, bone.top, 'top')]
  if (from === null || to === null)
    return fault(bone, 'level-missing', 'a level it ends at does not cross it.', 'Let it end inside the edge, or at another level.')
  const whole = pathLength(line)
  const [start, end] = [Math.max(0, from), Math.min(whole, to)]
  if (end - start < LEAST_CHANNEL)
    return fault(
      bone,
      'too-short',
      `only ${Math.max(0, end - start).toFixed(0)} mm are left for it; ${LEAST_CHANNEL} mm is the least.`,
      'Bring its ends nearer to the edges, or leave it out.',
    )
  const path = cutOut(line, start, end)
  const channel = channelWidth(own)
  const mate = edge?.mate ?? null
  const atCentre = (place.kind === 'seam' && edge!.id === 'centre') || (place.kind === 'panel' && piece.onFold && place.at <= 0) || false
  // A piece cut once by itself is one of a half that differs from the other.
  const once = atCentre || (piece.quantity === 1 && !piece.onFold)
  const length = pathLength(path)
  return succeed({
    id: bone.id,
    name: bone.name,
    stock: own,
    piece: piece.id,
    zone: piece.zone,
    path,
    channel: mm(length),
    channelWidth: channel,
    cut: mm(Math.max(0, length - 2 * TIP_CLEARANCE)),
    count: once ? 1 : 2,
    inSideSeam: place.kind === 'seam' && edge!.id === 'side' && mate !== null,
    crossings: crossingsOf(piece, path, channel),
    radius: tightestRadius(path),
    channelOn: bone.channelOn,
    under: bone.under,
  })
}

function cutOut(path: Path, start: number, end: number): Path {
  const whole = pathLength(path)
  const upper = start > 1e-6 ? pathSplitAt(path, start)[1] : path
  return end < whole - 1e-6 ? pathSplitAt(upper, end - start)[0] : upper
}
