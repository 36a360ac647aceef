import type { LevelId } from '../body/types'
import { monotoneCurve, monotonePath, monotoneValueAt } from '../geometry/monotone'
import { lineSegment, segmentSplitAt } from '../geometry/segment'
import type { Path, Segment } from '../geometry/types'
import type { Frame } from './frame'
import type { BodiceStyle, CentreKind, EdgeNode } from './types'

/** An edge of a piece read from the hem up: `path[i]` runs from `nodes[i]` to `nodes[i + 1]`. */
export interface Rail {
  readonly nodes: readonly EdgeNode[]
  readonly path: Path
}

/** Levels with the hem's, from the hem up to the bust. */
const LEVELS_UP: readonly LevelId[] = ['hip', 'high-hip', 'waist', 'underbust', 'bust']
const NODE_NAMES: Readonly<Record<LevelId, string>> = {
  hip: 'hip',
  'high-hip': 'high-hip',
  waist: 'waist',
  underbust: 'underbust',
  bust: 'bust',
}
/** A level nearer to the hem than this is the hem's own, mm. */
const AT_HEM = 0.01

/** A half's wedge shares with those of a fold or an opening given to the other seams in proportion. */
export function sharesOf(shares: BodiceStyle['frontShares'], centre: CentreKind): BodiceStyle['frontShares'] {
  if (centre === 'seam') return shares
  const rest = shares.princess + shares.side
  return { centre: 0, princess: shares.princess / rest, side: shares.side / rest }
}

/** What the seams take in at each level (negative: let out), mm from where the edge stands at the bust. */
export interface Wedges {
  readonly frontCentre: (level: LevelId) => number
  readonly backCentre: (level: LevelId) => number
  /** On each edge of the seam. */
  readonly frontPrincess: (level: LevelId) => number
  readonly backPrincess: (level: LevelId) => number
  readonly side: (level: LevelId) => number
  /** How far the front's side edge stands from where the front's own width would put it: outwards positive. */
  readonly sideMoved: (level: LevelId) => number
}

/** Wedges by the drafting notes; the gap at a centre edge counts to the half in which it lies. */
export function wedgesOf(frame: Frame, style: BodiceStyle): Wedges {
  const front = sharesOf(style.frontShares, style.centreFront)
  const back = sharesOf(style.backShares, style.centreBack)
  const bust = frame.widthsOf('bust')
  const takenFront = (level: LevelId) => {
    const own = frame.widthsOf(level)
    return bust.front + bust.gapFront / 2 - own.front - own.gapFront / 2
  }
  const takenBack = (level: LevelId) => {
    const own = frame.widthsOf(level)
    return bust.back + bust.gapBack / 2 - own.back - own.gapBack / 2
  }
  return {
    frontCentre: (level) => frame.widthsOf(level).gapFront / 2 + front.centre * takenFront(level),
    backCentre: (level) => frame.widthsOf(level).gapBack / 2 + back.centre * takenBack(level),
    frontPrincess: (level) => (front.princess * takenFront(level)) / 2,
    backPrincess: (level) => (back.princess * takenBack(level)) / 2,
    side: (level) => (front.side * takenFront(level) + back.side * takenBack(level)) / 2,
    sideMoved: (level) => (front.side * takenFront(level) - back.side * takenBack(level)) / 2,
  }
}

/**
 * An edge from the hem up to the bust through its x at each level, as a monotone cubic that stands upright at the bust
 * and at the hip; below the hip it goes on straight down.
 */
export function railBelowBust(frame: Frame, hemHeight: number, xAt: (level: LevelId) => number): Rail {
  const heights = LEVELS_UP.map(frame.heightOf)
  const curve = monotoneCurve(heights, LEVELS_UP.map(xAt), { first: 0, last: 0 })
  const path: Segment[] = []
  const nodes: EdgeNode[] = []
  const hip = heights[0] as number
  const from = { x: monotoneValueAt(curve, hemHeight), y: hemHeight }
  const levelAtHem = LEVELS_UP.find((level) => Math.abs(frame.heightOf(level) - hemHeight) <= AT_HEM) ?? null
  nodes.push({ name: 'hem', at: from, level: levelAtHem })
  if (hemHeight < hip - AT_HEM) {
    const to = { x: xAt('hip'), y: hip }
    path.push(lineSegment(from, to))
    nodes.push({ name: 'hip', at: to, level: 'hip' })
  }
  monotonePath(curve).forEach((segment, index) => {
    const top = LEVELS_UP[index + 1] as LevelId
    if (segment.to.y <= hemHeight + AT_HEM) return
    const share = (hemHeight - segment.from.y) / (segment.to.y - segment.from.y)
    path.push(share > 1e-9 ? segmentSplitAt(segment, share)[1] : segment)
    nodes.push({ name: NODE_NAMES[top], at: segment.to, level: top })
  })
  const first = path[0] as Segment
  nodes[0] = { name: 'hem', at: first.from, level: levelAtHem }
  return { nodes, path }
}

/** A rail carried on by further segments, each with the node at its end. */
export function railThen(
  rail: Rail,
  segments: readonly { readonly segment: Segment; readonly name: string; readonly level?: LevelId }[],
): Rail {
  return {
    path: [...rail.path, ...segments.map(({ segment }) => segment)],
    nodes: [...rail.nodes, ...segments.map(({ segment, name, level }) => ({ name, at: segment.to, level: level ?? null }))],
  }
}
