import { pathEnd, pathEndTangent, pathLength, pathReverse } from '../geometry/path'
import { lineSegment } from '../geometry/segment'
import { moveBy, turnAbout } from '../geometry/transform'
import type { Transform } from '../geometry/transform'
import type { Path, Point, Segment } from '../geometry/types'
import { fairBustCorner } from './bust-angle'
import type { BustAngle } from './bust-angle'
import { princessAbove, seamAbove, shoulderOf } from './edges'
import type { Frame, HalfFrame } from './frame'
import { fillEvenly } from './panels'
import type { SeamLine, Zone } from './panels'
import { edgeAcross, heightLine } from './shapes'
import { armholeStretch, cutStretch, necklineStretch, nearestOn, turnArmholeEnd, turnStretch } from './stretches'
import type { Stretch } from './stretches'
import type { BodiceStyle, EdgeNode } from './types'
import { railAboveBust, railOf, railReverse, railThen } from './wedges'
import type { Rail } from './wedges'

const STAYS = moveBy(0, 0)

/** The two edges of a panel from the hem up. */
export interface PanelRails {
  readonly left: Rail
  readonly right: Rail
}

/** Panels with their edges up to the end and what bounds each of them above, from the centre outwards. */
export interface UpperHalf {
  readonly rails: readonly PanelRails[]
  readonly uppers: readonly (readonly Stretch[])[]
}

/** What the upper part of a half is drawn from. */
export interface UpperInput {
  readonly frame: Frame
  readonly style: BodiceStyle
  readonly zone: Zone
  readonly lines: readonly SeamLine[]
  /** Edges of the panels from the hem up to the bust. */
  readonly below: readonly PanelRails[]
  /** The edges above as drawn; not used under a top edge. */
  readonly drawn: DrawnUpper | null
}

const bustOf = (rail: Rail): Point => (rail.nodes.at(-1) as EdgeNode).at

/** Where the bust angle opens: at a share of an edge; the princess seam's end, or a dart's. */
export interface Opening {
  readonly edge: 'neckline' | 'shoulder' | 'armhole'
  readonly share: number
}

/** Edges of a half above the bust as drawn, unturned, the armhole down to the underarm turned back. */
export interface DrawnUpper {
  readonly neckline: Stretch
  readonly shoulder: Stretch
  readonly armhole: Stretch
}

/** Draws the edges above the bust of a half in the frame in which its armhole is drawn. */
export function drawnUpper(half: HalfFrame, zone: Zone, style: BodiceStyle): DrawnUpper {
  const shoulder = shoulderOf(half, style)
  const depth = zone === 'front' ? style.necklineFrontDepth : style.necklineBackDepth
  const centre = { x: half.centreX, y: half.neckCentre.y - depth }
  return {
    neckline: necklineStretch(shoulder, centre, style.neckline[zone]),
    shoulder: {
      edge: 'shoulder',
      id: 'shoulder',
      part: 'whole',
      rail: railOf(['neck', 'tip'], [lineSegment(shoulder.neck, shoulder.end)]),
    },
    armhole: armholeStretch({ ...half, underarm: half.underarmDrawn }, shoulder, STAYS),
  }
}

/** A dart keeps this far from the ends of the edge it opens into, as a share of that edge. */
const DART_FROM_END = 0.12

/** Where a dart from the bust point opens: in the nearest of neckline and armhole. */
export function dartOpening(frame: Frame, drawn: DrawnUpper): Opening {
  const clear = (share: number) => Math.min(1 - DART_FROM_END, Math.max(DART_FROM_END, share))
  // Of a square neckline only the level part: a dart does not open in its corner.
  const cornered = drawn.neckline.rail.nodes.some(({ name }) => name === 'corner')
  const level = cornered
    ? { ...drawn.neckline, rail: { ...drawn.neckline.rail, path: drawn.neckline.rail.path.slice(0, 1) } }
    : drawn.neckline
  const part = cornered ? pathLength(level.rail.path) / pathLength(drawn.neckline.rail.path) : 1
  const [neckline, armhole] = [nearestOn(level, frame.bust.bustPoint), nearestOn(drawn.armhole, frame.bust.bustPoint)]
  return neckline.distance < armhole.distance
    ? { edge: 'neckline', share: clear(neckline.share) * part }
    : { edge: 'armhole', share: clear(armhole.share) }
}

/** Where the half's upper edges part at the bust point: at the princess seam, at a dart, or nowhere. */
export function openingOf(input: Pick<UpperInput, 'frame' | 'style' | 'zone'>, drawn: DrawnUpper): Opening | null {
  const { frame, style, zone } = input
  if (style.panels[zone].princess) {
    const { edge, at } = style.princessEnd[zone]
    return { edge, share: edge === 'shoulder' ? style.princessAt : at }
  }
  return zone === 'front' && frame.bust.angle > 0 ? dartOpening(frame, drawn) : null
}

/** Whether the shoulder is parted: where a princess seam of either half meets it. */
const shoulderParted = ({ panels, princessEnd }: BodiceStyle): boolean =>
  (['front', 'back'] as const).some((zone) => panels[zone].princess && princessEnd[zone].edge === 'shoulder')

function shoulderParts(shoulder: Stretch, style: BodiceStyle): readonly Stretch[] {
  if (!shoulderParted(style)) return [shoulder]
  const [inner, outer] = cutStretch(shoulder, style.princessAt, 'princess')
  return [
    { ...inner, part: 'inner' },
    { ...outer, part: 'outer' },
  ]
}

/** The side panel's princess edge from the hem up: faired at the bust, turned above it. `above` is given unturned. */
function turnedEdge(below: Rail, above: Rail, bust: BustAngle): { readonly rail: Rail; readonly turned: Transform } {
  if (bust.angle === 0)
    return { rail: { path: [...below.path, ...above.path], nodes: [...below.nodes, ...above.nodes.slice(1)] }, turned: STAYS }
  const edge = fairBustCorner(bust, above.path, pathReverse(below.path))
  const downwards = pathReverse(edge.down)
  const names = [...below.nodes.slice(0, -1), { name: 'fairing-below', at: (downwards.at(-1) as Segment).from, level: null }]
  const rail: Rail = { path: downwards, nodes: [...names, below.nodes.at(-1) as EdgeNode] }
  const upNodes = [{ name: 'fairing-above', level: null }, ...above.nodes.slice(1).map(({ name, level }) => ({ name, level }))]
  return {
    turned: edge.turned,
    rail: railThen(
      rail,
      edge.up.map((segment, index) => ({ segment, ...(upNodes[index] as Pick<EdgeNode, 'name' | 'level'>) })),
    ),
  }
}

/** Cuts a stretch at several shares of its length, rising; parts from the centre outwards. */
function cutAll(stretch: Stretch, cuts: readonly { readonly share: number; readonly name: string }[]): readonly Stretch[] {
  const parts: Stretch[] = []
  let rest = stretch
  let done = 0
  for (const { share, name } of cuts) {
    const [before, after] = cutStretch(rest, (share - done) / (1 - done), name)
    parts.push(before)
    rest = after
    done = share
  }
  return [...parts, rest]
}

/** Share of an armhole's length at its across point; 0 where it does not reach that far up. */
function acrossShare({ rail }: Stretch): number {
  const index = rail.nodes.findIndex(({ name }) => name === 'across')
  if (index <= 0) return 0
  return nearestOn({ edge: 'armhole', id: 'armhole', rail }, (rail.nodes[index] as EdgeNode).at).share
}

/** A run of panels between two of centre, princess and side: its upper edges cut where its further seams end. */
function cutBlock(
  stretches: readonly Stretch[],
  edge: 'neckline' | 'armhole',
  lines: readonly SeamLine[],
): { readonly uppers: readonly (readonly Stretch[])[]; readonly ends: readonly { readonly at: Point; readonly along: Point }[] } {
  if (lines.length === 0) return { uppers: [stretches], ends: [] }
  const index = stretches.findIndex((stretch) => stretch.edge === edge)
  const own = stretches[index] as Stretch
  const from = edge === 'armhole' ? acrossShare(own) : 0
  const shares = fillEvenly(
    lines.map(({ further }) => further?.end ?? null),
    from,
    1,
  )
  const parts = cutAll(
    own,
    lines.map(({ id }, place) => ({ share: shares[place] as number, name: id })),
  )
  const ends = parts.slice(0, -1).map(({ rail }) => ({ at: pathEnd(rail.path), along: pathEndTangent(rail.path) }))
  const uppers = parts.map((part, place) => [
    ...(place === 0 ? stretches.slice(0, index) : []),
    part,
    ...(place === parts.length - 1 ? stretches.slice(index + 1) : []),
  ])
  return { uppers, ends }
}

/** A half under shoulders: neckline, shoulder and armhole, parted by its seams; in front turned beyond the bust point. */
export function upperWithShoulders(input: UpperInput): UpperHalf {
  const { frame, style, zone, lines, below } = input
  const half = frame[zone]
  const drawn = input.drawn ?? drawnUpper(half, zone, style)
  const opening = openingOf(input, drawn)
  const princess = lines.findIndex(({ id }) => id === 'princess')
  const shoulders = shoulderParts(drawn.shoulder, style)
  const centreRail = (rail: Rail) => {
    const top = { x: half.centreX, y: (drawn.neckline.rail.nodes[0] as EdgeNode).at.y }
    return railThen(rail, [{ segment: lineSegment(bustOf(rail), top), name: 'neckline' }])
  }
  const sideRail = (rail: Rail) => railThen(rail, [{ segment: lineSegment(bustOf(rail), half.underarm), name: 'underarm' }])

  const turns = zone === 'front' && frame.bust.angle > 0
  if (opening === null) {
    const panel = below[0] as PanelRails
    return {
      rails: [{ left: centreRail(panel.left), right: sideRail(panel.right) }],
      uppers: [named([drawn.neckline, ...shoulders, drawn.armhole])],
    }
  }

  const name = princess >= 0 ? 'princess' : 'dart'
  const cut = cutStretch(drawn[opening.edge], opening.share, name)
  const { path: toEnd } = cut[0].rail
  const bust = princess >= 0 ? bustOf((below[princess] as PanelRails).right) : frame.bust.bustPoint
  const above =
    opening.edge === 'shoulder' ? princessAbove(half, shoulderOf(half, style)) : seamAbove(bust, pathEnd(toEnd), pathEndTangent(toEnd))
  const leg = princess >= 0 ? above : lineSegment(bust, pathEnd(toEnd))
  const turnedRail =
    princess >= 0
      ? turnedEdge(
          (below[princess + 1] as PanelRails).left,
          railOf(['bust', opening.edge], [leg]),
          turns ? frame.bust : { ...frame.bust, angle: 0 },
        )
      : { rail: null, turned: turns ? turnAbout(bust, -frame.bust.angle) : STAYS }
  const { turned } = turnedRail
  const moved = (stretch: Stretch) => (turns ? turnStretch(stretch, turned) : stretch)
  const wholeArmhole = () => (turns ? armholeStretch(half, shoulderOf(half, style), turned) : drawn.armhole)
  const inner: readonly Stretch[] =
    opening.edge === 'neckline'
      ? [cut[0]]
      : opening.edge === 'shoulder'
        ? [drawn.neckline, shoulders[0] as Stretch]
        : [drawn.neckline, ...shoulders, cut[0]]
  const outer: readonly Stretch[] =
    opening.edge === 'neckline'
      ? [moved(cut[1]), ...shoulders.map(moved), wholeArmhole()]
      : opening.edge === 'shoulder'
        ? [moved(shoulders[1] as Stretch), wholeArmhole()]
        : [turns ? turnArmholeEnd(cut[1], turned, half.underarm) : cut[1]]

  if (turnedRail.rail === null) {
    const legs: readonly Stretch[] = [
      { edge: 'dart', id: 'dart', rail: railReverse(railOf(['point', 'mouth'], [leg])) },
      turnStretch({ edge: 'dart', id: 'dart-beyond', rail: railOf(['point', 'mouth'], [leg]) }, turned),
    ]
    const panel = below[0] as PanelRails
    return { rails: [{ left: centreRail(panel.left), right: sideRail(panel.right) }], uppers: [named([...inner, ...legs, ...outer])] }
  }

  const [centreLines, sideLines] = [lines.slice(0, princess), lines.slice(princess + 1)]
  const centreBlock = cutBlock(inner, 'neckline', centreLines)
  const sideBlock = cutBlock(outer, 'armhole', sideLines)
  const further = (rail: Rail, line: number): Rail => {
    const place = line < princess ? centreBlock.ends[line] : sideBlock.ends[line - princess - 1]
    const ends = place as { readonly at: Point; readonly along: Point }
    return railThen(rail, [{ segment: seamAbove(bustOf(rail), ends.at, ends.along), name: line < princess ? 'neckline' : 'armhole' }])
  }
  const rails = below.map(({ left, right }, index): PanelRails => {
    const [leftLine, rightLine] = [index - 1, index]
    return {
      left: leftLine < 0 ? centreRail(left) : leftLine === princess ? (turnedRail.rail as Rail) : further(left, leftLine),
      right:
        rightLine === lines.length
          ? sideRail(right)
          : rightLine === princess
            ? railThen(right, [{ segment: above, name: opening.edge }])
            : further(right, rightLine),
    }
  })
  return { rails, uppers: [...centreBlock.uppers, ...sideBlock.uppers].map(named) }
}

/** Edges of one panel with names of their own: what a dart or the other half's princess seam parts is named after it. */
function named(stretches: readonly Stretch[]): readonly Stretch[] {
  const parted = stretches.some(({ edge }) => edge === 'dart') ? 'dart' : 'princess'
  return stretches.map((stretch, index) => {
    if (stretch.edge === 'dart') return stretch
    const before = stretches.slice(0, index).some(({ edge }) => edge === stretch.edge)
    if (!before) return stretch
    const by = stretch.edge === 'shoulder' ? 'princess' : parted
    return { ...stretch, id: `${stretch.edge}-${by}` as Stretch['id'] }
  })
}

/** A half under a top edge: its seams go on through the level above the bust, the front turned beyond the bust point. */
export function upperStrapless(input: UpperInput, wedgeAbove: (place: 'centre' | 'side' | SeamLine['id']) => number): UpperHalf {
  const { frame, style, zone, lines, below } = input
  const top = style.top as NonNullable<BodiceStyle['top']>
  const half = frame[zone]
  const level = frame.above as NonNullable<Frame['above']>
  const bustHeight = frame.heightOf('bust')
  const turns = zone === 'front' && frame.bust.angle > 0
  const dart = turns && lines.length === 0

  const xs = [wedgeAbove('centre'), ...lines.map(({ x }) => x), half.underarm.x - wedgeAbove('side')]
  const halfWedges = [0, ...lines.map(({ id }) => wedgeAbove(id)), 0]
  const panels = lines.length + 1
  const widths = Array.from(
    { length: panels },
    (_, i) => (xs[i + 1] as number) - (halfWedges[i + 1] as number) - (xs[i] as number) - (halfWedges[i] as number),
  )
  const whole = widths.reduce((sum, width) => sum + width, 0)
  const stations = [0]
  widths.forEach((width) => stations.push((stations.at(-1) as number) + width / whole))
  const line = heightLine(top.form, zone === 'front' ? top.front : top.back, top.side, top.curve)
  const heightAt = (share: number) => bustHeight + line.at(share)
  const slopeAt = (share: number) => line.slope(share) / whole

  const up = (rail: Rail, x: number, height: number): Rail => {
    const from = bustOf(rail)
    const above = railAboveBust(from, { x, y: level.y }, height)
    return { path: above.path, nodes: [rail.nodes.at(-1) as EdgeNode, ...above.nodes] }
  }
  const joined = (rail: Rail, above: Rail): Rail => ({
    path: [...rail.path, ...above.path],
    nodes: [...rail.nodes, ...above.nodes.slice(1)],
  })
  const rails = below.map(({ left, right }, index): PanelRails => {
    const leftUp = up(left, (xs[index] as number) + (halfWedges[index] as number), heightAt(stations[index] as number))
    const rightUp = up(right, (xs[index + 1] as number) - (halfWedges[index + 1] as number), heightAt(stations[index + 1] as number))
    const turn = turns && index > 0 && lines[index - 1]?.id === 'princess'
    return { left: turn ? turnedEdge(left, leftUp, frame.bust).rail : joined(left, leftUp), right: joined(right, rightUp) }
  })
  const across = (left: Path, right: Path, from: number, to: number) =>
    edgeAcross(pathReverse(left), pathReverse(right), [slopeAt(from), slopeAt(to)], false)
  const names = ['centre', ...lines.map(({ id }) => id), 'side']
  const uppers = rails.map(({ left, right }, index): readonly Stretch[] => {
    const [from, to] = [stations[index] as number, stations[index + 1] as number]
    if (!dart) {
      return [
        {
          edge: 'top',
          id: 'top',
          rail: railOf([names[index] as string, names[index + 1] as string], [across(left.path, right.path, from, to)]),
        },
      ]
    }
    const bust = frame.bust.bustPoint
    const share = (bust.x - (xs[0] as number)) / whole
    const leg = lineSegment(bust, { x: bust.x, y: heightAt(share) })
    const turned = turnAbout(bust, -frame.bust.angle)
    const beyond = turnStretch({ edge: 'dart', id: 'dart-beyond', rail: railOf(['point', 'mouth'], [leg]) }, turned)
    return [
      { edge: 'top', id: 'top', rail: railOf(['centre', 'dart'], [across(left.path, [leg], from, share)]) },
      { edge: 'dart', id: 'dart', rail: railReverse(railOf(['point', 'mouth'], [leg])) },
      beyond,
      { edge: 'top', id: 'top-dart', rail: railOf(['dart', 'side'], [across(beyond.rail.path, right.path, share, to)]) },
    ]
  })
  return { rails, uppers }
}
