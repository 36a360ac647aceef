import { pathEnd, pathEndTangent } from '../geometry/path'
import { lineSegment } from '../geometry/segment'
import { moveBy, turnAbout } from '../geometry/transform'
import type { Point } from '../geometry/types'
import { princessAbove, seamAbove, shoulderOf } from './edges'
import { drawnUpper, openingOf } from './opening'
import { bustOf, turnedEdge } from './panel-rails'
import type { PanelRails, UpperHalf, UpperInput } from './panel-rails'
import { fillEvenly } from './panels'
import type { SeamLine } from './panels'
import { armholeStretch, cutStretch, nearestOn, turnArmholeEnd, turnStretch } from './stretches'
import type { Stretch } from './stretches'
import type { BodiceStyle, EdgeNode } from './types'
import { railOf, railReverse, railThen } from './wedges'
import type { Rail } from './wedges'

const STAYS = moveBy(0, 0)

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
