import type { LevelId } from '../body/types'
import { monotoneValueAt } from '../geometry/monotone'
import type { MonotoneCurve } from '../geometry/monotone'
import { mm } from '../units/brand'
import type { Frame } from './frame'
import { drawnUpper } from './opening'
import type { DrawnUpper } from './opening'
import type { PanelRails, UpperHalf } from './panel-rails'
import { pieceIdsOf, seamLines } from './panels'
import type { SeamLine, Zone } from './panels'
import type { PieceSketch } from './piece'
import { pieceWords } from './roles'
import { edgeAcross, heightLine } from './shapes'
import type { Stretch } from './stretches'
import { upperStrapless } from './top-edge'
import { upperWithShoulders } from './upper'
import { curveBelowBust, railBelowBust, railOf, railReverse, wedgesOf } from './wedges'
import type { Rail, Wedges } from './wedges'
import type { BodiceStyle, CentreKind, EdgeId, EdgeKind, PieceEdge, PieceId } from './types'

function centreKind(kind: CentreKind): EdgeKind {
  if (kind === 'fold') return 'fold'
  return kind === 'seam' ? 'seam' : 'opening'
}

/** The two edges of a panel below the bust as curves of their x. */
interface PanelCurves {
  readonly left: MonotoneCurve
  readonly right: MonotoneCurve
}

function panelCurves(frame: Frame, zone: Zone, lines: readonly SeamLine[], wedges: Wedges): readonly PanelCurves[] {
  const half = frame[zone]
  const curve = (xAt: (level: LevelId) => number) => curveBelowBust(frame, xAt)
  const seam = ({ id, x }: SeamLine, sign: 1 | -1) => curve((level) => x + sign * wedges.at(zone, id, level))
  const centre = curve((level) => wedges.at(zone, 'centre', level))
  const side = curve((level) => half.underarm.x - wedges.at(zone, 'side', level))
  return [...lines, null].map((line, index) => ({
    left: index === 0 ? centre : seam(lines[index - 1] as SeamLine, 1),
    right: line === null ? side : seam(line, -1),
  }))
}

/** The hem of a half: its rails cut at their own heights, and its edge panel by panel. */
function hemmed(
  curves: readonly PanelCurves[],
  zone: Zone,
  style: BodiceStyle,
  hemHeight: number,
  names: readonly string[],
): { readonly rails: readonly PanelRails[]; readonly hems: readonly Rail[] } {
  const { form, front, back, side, curve } = style.hemShape
  const drop = heightLine(form, zone === 'front' ? front : back, form === 'straight' ? 0 : side, curve)
  const widths = curves.map(({ left, right }) => monotoneValueAt(right, hemHeight) - monotoneValueAt(left, hemHeight))
  const whole = widths.reduce((sum, width) => sum + width, 0)
  const stations = [0]
  widths.forEach((width) => stations.push((stations.at(-1) as number) + width / whole))
  const heightAt = (index: number) => hemHeight - drop.at(stations[index] as number)
  const slopeAt = (index: number) => -drop.slope(stations[index] as number) / whole
  const rails = curves.map(({ left, right }, index) => ({
    left: railBelowBust(left, heightAt(index)),
    right: railBelowBust(right, heightAt(index + 1)),
  }))
  const hems = rails.map(({ left, right }, index) =>
    railOf(
      [names[index] as string, names[index + 1] as string],
      [edgeAcross(left.path, right.path, [slopeAt(index), slopeAt(index + 1)], true)],
    ),
  )
  return { rails, hems }
}

const KINDS: Readonly<Record<Stretch['edge'], EdgeKind>> = {
  neckline: 'finished',
  armhole: 'finished',
  top: 'finished',
  shoulder: 'seam',
  dart: 'seam',
}

/** A shoulder's part and its place, for the other half to find. */
interface ShoulderPlace {
  readonly part: NonNullable<Stretch['part']>
  readonly piece: PieceId
  readonly edge: EdgeId
}

interface HalfSketch {
  readonly pieces: readonly PieceSketch[]
  readonly shoulders: readonly ShoulderPlace[]
}

/** The edges above the bust of both halves as drawn; null under a top edge. */
export type DrawnHalves = Readonly<Record<Zone, DrawnUpper>> | null

/** Draws the edges above the bust of both halves. */
export const drawnHalves = (frame: Frame, style: BodiceStyle): DrawnHalves =>
  style.top === null ? { front: drawnUpper(frame.front, 'front', style), back: drawnUpper(frame.back, 'back', style) } : null

function sketchHalf(
  frame: Frame,
  style: BodiceStyle,
  hemHeight: number,
  zone: Zone,
  wedges: Wedges,
  otherSide: PieceId,
  drawn: DrawnUpper | null,
): HalfSketch {
  const { allowances } = style
  const kind = zone === 'front' ? style.centreFront : style.centreBack
  const lines = seamLines(frame[zone], style.panels[zone])
  const ids = pieceIdsOf(zone, lines)
  const names: readonly EdgeId[] = ['centre', ...lines.map(({ id }) => id), 'side']
  const { rails: below, hems } = hemmed(panelCurves(frame, zone, lines, wedges), zone, style, hemHeight, names)
  const input = { frame, style, zone, lines, below, drawn }
  const upper: UpperHalf =
    style.top === null ? upperWithShoulders(input) : upperStrapless(input, (place) => wedges.at(zone, place, 'above'))

  const shoulders: ShoulderPlace[] = []
  const pieces = ids.map((id, index): PieceSketch => {
    const onFold = index === 0 && kind === 'fold'
    const { left, right } = upper.rails[index] as PanelRails
    const edge = (own: EdgeId, edgeKind: EdgeKind, rail: Rail, mate: PieceEdge['mate'], allowance: number): PieceEdge => ({
      id: own,
      kind: edgeKind,
      nodes: rail.nodes,
      path: rail.path,
      mate,
      allowance: mm(allowance),
      notches: [],
    })
    const line = (place: number, rail: Rail): PieceEdge => {
      const own = names[place] as EdgeId
      if (own === 'centre') {
        const edgeKind = centreKind(kind)
        const allowance = edgeKind === 'fold' ? 0 : edgeKind === 'seam' ? allowances.centre : allowances.opening
        return edge(own, edgeKind, rail, kind === 'seam' ? { piece: id, edge: 'centre' } : null, allowance)
      }
      const mate = own === 'side' ? otherSide : (ids[place === index ? index - 1 : index + 1] as PieceId)
      return edge(own, 'seam', rail, { piece: mate, edge: own }, allowances.seam)
    }
    const above = (upper.uppers[index] as readonly Stretch[]).map((stretch): PieceEdge => {
      if (stretch.part !== undefined) shoulders.push({ part: stretch.part, piece: id, edge: stretch.id })
      const mate = stretch.edge === 'dart' ? ({ piece: id, edge: stretch.id === 'dart' ? 'dart-beyond' : 'dart' } as const) : null
      const allowance = stretch.edge === 'dart' ? allowances.seam : stretch.edge === 'top' ? allowances.neckline : allowances[stretch.edge]
      return edge(stretch.id, KINDS[stretch.edge], railReverse(stretch.rail), mate, allowance)
    })
    return {
      id,
      name: pieceWords(id),
      zone,
      edges: [
        edge('hem', 'finished', hems[index] as Rail, null, allowances.hem),
        line(index + 1, right),
        ...above.reverse(),
        line(index, railReverse(left)),
      ],
      onFold,
      quantity: onFold ? 1 : 2,
    }
  })
  return { pieces, shoulders }
}

/** The pieces of one half with their shoulders joined to those of the other. */
function joined({ pieces, shoulders }: HalfSketch, other: HalfSketch): readonly PieceSketch[] {
  const mates = new Map(
    shoulders.map(({ part, piece, edge }) => [`${piece} ${edge}`, other.shoulders.find((own) => own.part === part) ?? null]),
  )
  return pieces.map((piece) => ({
    ...piece,
    edges: piece.edges.map((edge) => {
      const mate = mates.get(`${piece.id} ${edge.id}`)
      return mate === undefined || mate === null ? edge : { ...edge, mate: { piece: mate.piece, edge: mate.edge } }
    }),
  }))
}

/**
 * The pieces of a half of the body as edges, from the centre front round to the centre back: the frame's rectangles, their
 * wedges taken out, styled and turned. Every piece has its hem first, then the edge away from the centre, what bounds it
 * above, and last the edge towards the centre. `hemHeight` in mm over the waist.
 */
export function sketchPieces(
  frame: Frame,
  style: BodiceStyle,
  hemHeight: number,
  drawn = drawnHalves(frame, style),
): readonly PieceSketch[] {
  const wedges = wedgesOf(frame, style)
  const sideOf = (zone: Zone) => (style.panels[zone].princess ? (zone === 'front' ? 'side-front' : 'side-back') : zone)
  const front = sketchHalf(frame, style, hemHeight, 'front', wedges, sideOf('back'), drawn?.front ?? null)
  const back = sketchHalf(frame, style, hemHeight, 'back', wedges, sideOf('front'), drawn?.back ?? null)
  return [...joined(front, back), ...[...joined(back, front)].reverse()]
}
