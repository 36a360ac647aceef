import type { LevelId } from '../body/types'
import { monotoneCurve, monotonePath, monotoneValueAt } from '../geometry/monotone'
import type { MonotoneCurve } from '../geometry/monotone'
import { pathReverse } from '../geometry/path'
import { lineSegment, segmentSplitAt } from '../geometry/segment'
import type { Path, Point, Segment } from '../geometry/types'
import type { Frame } from './frame'
import { sharesByPlace } from './panels'
import type { WedgePlace, Zone } from './panels'
import type { BodiceStyle, EdgeNode } from './types'

/** An edge of a piece read from the hem up: `path[i]` runs from `nodes[i]` to `nodes[i + 1]`. */
export interface Rail {
  readonly nodes: readonly EdgeNode[]
  readonly path: Path
}

/** Levels with the hem's, from the hem up to the bust. */
const LEVELS_UP: readonly LevelId[] = ['hip', 'high-hip', 'waist', 'underbust', 'bust']
/** A level nearer to the hem than this is the hem's own, mm. */
const AT_HEM = 0.01

/** What a half takes in (negative: lets out) against its bust width, mm; `above` is the level above the bust. */
type Taken = (level: LevelId | 'above') => number

/** How far each edge stands from where it would at the bust width, mm. */
export interface Wedges {
  /**
   * An inner seam's half wedge, on each of its edges; a centre edge's distance from the body's centre, its gap counted in;
   * the side seam's wedge, half of it on each edge.
   */
  readonly at: (zone: Zone, place: WedgePlace, level: LevelId | 'above') => number
  /** How far the front's side edge stands from where the front's own width would put it: outwards positive. */
  readonly sideMoved: (level: LevelId) => number
}

/** Wedges by the drafting notes; the gap at a centre edge counts to the half in which it lies. */
export function wedgesOf(frame: Frame, style: BodiceStyle): Wedges {
  const bust = frame.widthsOf('bust')
  const gapOf = (zone: Zone, level: LevelId | 'above') => {
    const own = level === 'above' ? bust : frame.widthsOf(level)
    return (zone === 'front' ? own.gapFront : own.gapBack) / 2
  }
  const taken: Readonly<Record<Zone, Taken>> = {
    front: (level) => {
      if (level === 'above') return frame.above?.takenFront ?? 0
      return bust.front + gapOf('front', 'bust') - frame.widthsOf(level).front - gapOf('front', level)
    },
    back: (level) => {
      if (level === 'above') return frame.above?.takenBack ?? 0
      return bust.back + gapOf('back', 'bust') - frame.widthsOf(level).back - gapOf('back', level)
    },
  }
  const shares = {
    front: sharesByPlace('front', style, frame.centreShares?.front),
    back: sharesByPlace('back', style, frame.centreShares?.back),
  }
  const wedge = (zone: Zone, place: WedgePlace, level: LevelId | 'above') => {
    const own = taken[zone](level)
    return (shares[zone][own < 0 ? 'letOut' : 'takeIn'].get(place) ?? 0) * own
  }
  return {
    at: (zone, place, level) => {
      if (place === 'centre') return gapOf(zone, level) + wedge(zone, 'centre', level)
      if (place === 'side') return (wedge('front', 'side', level) + wedge('back', 'side', level)) / 2
      return wedge(zone, place, level) / 2
    },
    sideMoved: (level) => (wedge('front', 'side', level) - wedge('back', 'side', level)) / 2,
  }
}

/** An edge from the hip up to the bust through its x at each level: a monotone cubic that stands upright at both. */
export function curveBelowBust(frame: Frame, xAt: (level: LevelId) => number): MonotoneCurve {
  return monotoneCurve(LEVELS_UP.map(frame.heightOf), LEVELS_UP.map(xAt), { first: 0, last: 0 })
}

/** An edge from the hem up to the bust; below the hip it goes on straight down. `hemHeight` in mm over the waist. */
export function railBelowBust(curve: MonotoneCurve, hemHeight: number): Rail {
  const path: Segment[] = []
  const nodes: EdgeNode[] = []
  const hip = curve.heights[0] as number
  const levelAtHem = LEVELS_UP.find((_, index) => Math.abs((curve.heights[index] as number) - hemHeight) <= AT_HEM) ?? null
  nodes.push({ name: 'hem', at: { x: monotoneValueAt(curve, hemHeight), y: hemHeight }, level: levelAtHem })
  if (hemHeight < hip - AT_HEM) {
    const to = { x: curve.values[0] as number, y: hip }
    path.push(lineSegment({ x: monotoneValueAt(curve, hemHeight), y: hemHeight }, to))
    nodes.push({ name: 'hip', at: to, level: 'hip' })
  }
  monotonePath(curve).forEach((segment, index) => {
    const top = LEVELS_UP[index + 1] as LevelId
    if (segment.to.y <= hemHeight + AT_HEM) return
    const share = (hemHeight - segment.from.y) / (segment.to.y - segment.from.y)
    path.push(share > 1e-9 ? segmentSplitAt(segment, share)[1] : segment)
    nodes.push({ name: top, at: segment.to, level: top })
  })
  const first = path[0] as Segment
  nodes[0] = { name: 'hem', at: first.from, level: levelAtHem }
  return { nodes, path }
}

/**
 * The part of an edge from the bust up to a top edge, through its x at the level above the bust: upright at the bust, straight
 * on above that level. The bust's own node is not among the nodes.
 */
export function railAboveBust(from: Point, above: Point, height: number): Rail {
  const curve = monotoneCurve([from.y, above.y], [from.x, above.x], { first: 0 })
  const whole = monotonePath(curve)[0] as Segment
  if (height <= above.y + AT_HEM) {
    const share = Math.min(1, (height - from.y) / (above.y - from.y))
    const segment = share >= 1 ? whole : segmentSplitAt(whole, share)[0]
    return { path: [segment], nodes: [{ name: 'top', at: segment.to, level: share >= 1 ? 'top-edge' : null }] }
  }
  const top = { x: monotoneValueAt(curve, height), y: height }
  return {
    path: [whole, lineSegment(whole.to, top)],
    nodes: [
      { name: 'above-bust', at: whole.to, level: 'top-edge' },
      { name: 'top', at: top, level: null },
    ],
  }
}

/** A rail carried on by further segments, each with the node at its end. */
export function railThen(
  rail: Rail,
  segments: readonly { readonly segment: Segment; readonly name: string; readonly level?: LevelId | null }[],
): Rail {
  return {
    path: [...rail.path, ...segments.map(({ segment }) => segment)],
    nodes: [...rail.nodes, ...segments.map(({ segment, name, level }) => ({ name, at: segment.to, level: level ?? null }))],
  }
}

/** The same edge travelled the other way. */
export const railReverse = (rail: Rail): Rail => ({ nodes: [...rail.nodes].reverse(), path: pathReverse(rail.path) })

/** A rail from segments with the names of its nodes in order. */
export const railOf = (names: readonly string[], path: Path): Rail => ({
  path,
  nodes: names.map((name, index): EdgeNode => {
    const at = index === 0 ? (path[0] as Segment).from : (path[index - 1] as Segment).to
    return { name, at, level: null }
  }),
})
