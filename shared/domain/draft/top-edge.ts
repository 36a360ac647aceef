import { pathReverse } from '../geometry/path'
import { lineSegment } from '../geometry/segment'
import { turnAbout } from '../geometry/transform'
import type { Path } from '../geometry/types'
import type { Frame } from './frame'
import { bustOf, turnedEdge } from './panel-rails'
import type { PanelRails, UpperHalf, UpperInput } from './panel-rails'
import type { SeamLine } from './panels'
import { edgeAcross, heightLine } from './shapes'
import { turnStretch } from './stretches'
import type { Stretch } from './stretches'
import type { BodiceStyle, EdgeNode } from './types'
import { railAboveBust, railOf, railReverse } from './wedges'
import type { Rail } from './wedges'

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
