import type { LevelId } from '../body/types'
import { pathReverse } from '../geometry/path'
import { lineSegment, segmentReverse } from '../geometry/segment'
import { moveBy, transformPoint } from '../geometry/transform'
import type { Transform } from '../geometry/transform'
import type { Path, Point, Segment } from '../geometry/types'
import { mm } from '../units/brand'
import { armholeCurve } from './armhole'
import { fairBustCorner } from './bust-angle'
import { hemCurve, necklineCurve, princessAbove, shoulderOf } from './edges'
import type { Shoulder } from './edges'
import type { Frame, HalfFrame } from './frame'
import type { PieceSketch } from './piece'
import { railBelowBust, railThen, wedgesOf } from './wedges'
import type { Rail } from './wedges'
import type { BodiceStyle, CentreKind, EdgeId, EdgeKind, EdgeNode, PieceEdge, PieceId } from './types'

const PIECE_NAMES: Readonly<Record<PieceId, string>> = {
  'front-centre': 'Front centre',
  'side-front': 'Side front',
  'side-back': 'Side back',
  'back-centre': 'Back centre',
}

const STAYS = moveBy(0, 0)

interface EdgePlan {
  readonly id: EdgeId
  readonly rail: Rail
  readonly mate: PieceEdge['mate']
}

const reversed = (rail: Rail): Rail => ({ nodes: [...rail.nodes].reverse(), path: pathReverse(rail.path) })

/** A rail of segments with the names of its nodes in order. */
const railOf = (names: readonly string[], path: Path): Rail => ({
  path,
  nodes: names.map((name, index): EdgeNode => {
    const at = index === 0 ? (path[0] as Segment).from : (path[index - 1] as Segment).to
    return { name, at, level: null }
  }),
})

function centreKind(kind: CentreKind): EdgeKind {
  if (kind === 'fold') return 'fold'
  return kind === 'seam' ? 'seam' : 'opening'
}

function allowanceOf(id: EdgeId, kind: EdgeKind, allowances: BodiceStyle['allowances']): number {
  if (id === 'centre') return kind === 'fold' ? 0 : allowances.centre
  if (id === 'princess' || id === 'side') return allowances.seam
  return allowances[id]
}

function sketch(id: PieceId, plans: readonly EdgePlan[], style: BodiceStyle): PieceSketch {
  const zone = id === 'front-centre' || id === 'side-front' ? 'front' : 'back'
  const centre = zone === 'front' ? style.centreFront : style.centreBack
  const onFold = centre === 'fold' && (id === 'front-centre' || id === 'back-centre')
  const edges = plans.map((plan): PieceEdge => {
    const finished = plan.id === 'neckline' || plan.id === 'armhole' || plan.id === 'hem'
    const kind: EdgeKind = plan.id === 'centre' ? centreKind(centre) : finished ? 'finished' : 'seam'
    return {
      id: plan.id,
      kind,
      nodes: plan.rail.nodes,
      path: plan.rail.path,
      mate: plan.mate,
      allowance: mm(allowanceOf(plan.id, kind, style.allowances)),
      notches: [],
    }
  })
  return { id, name: PIECE_NAMES[id], zone, edges, onFold, quantity: onFold ? 1 : 2 }
}

function centrePiece(
  id: 'front-centre' | 'back-centre',
  half: HalfFrame,
  shoulder: Shoulder,
  rails: { readonly centre: Rail; readonly princess: Rail },
  neckCentre: Point,
  style: BodiceStyle,
): PieceSketch {
  const front = id === 'front-centre'
  const kind = front ? style.centreFront : style.centreBack
  const top = { x: half.centreX, y: neckCentre.y }
  const bust = rails.centre.nodes.at(-1) as EdgeNode
  const centre = railThen(rails.centre, [{ segment: lineSegment(bust.at, top), name: 'neckline' }])
  const princess = railThen(rails.princess, [{ segment: princessAbove(half, shoulder), name: 'shoulder' }])
  return sketch(
    id,
    [
      { id: 'hem', rail: railOf(['centre', 'princess'], [hemCurve(centre.path, princess.path)]), mate: null },
      { id: 'princess', rail: princess, mate: { piece: front ? 'side-front' : 'side-back', edge: 'princess' } },
      {
        id: 'shoulder',
        rail: railOf(['princess', 'neck'], [lineSegment(shoulder.princess, shoulder.neck)]),
        mate: { piece: front ? 'back-centre' : 'front-centre', edge: 'shoulder' },
      },
      { id: 'neckline', rail: railOf(['neck', 'centre'], [necklineCurve(shoulder, top)]), mate: null },
      { id: 'centre', rail: reversed(centre), mate: kind === 'seam' ? { piece: id, edge: 'centre' } : null },
    ],
    style,
  )
}

function sidePiece(
  id: 'side-front' | 'side-back',
  half: HalfFrame,
  shoulder: Shoulder,
  rails: { readonly princess: Rail; readonly side: Rail },
  turned: Transform,
  style: BodiceStyle,
): PieceSketch {
  const front = id === 'side-front'
  const bust = rails.side.nodes.at(-1) as EdgeNode
  const side = railThen(rails.side, [{ segment: lineSegment(bust.at, half.underarm), name: 'underarm' }])
  const armhole = armholeCurve(half, shoulder, turned)
  return sketch(
    id,
    [
      { id: 'hem', rail: railOf(['princess', 'side'], [hemCurve(rails.princess.path, side.path)]), mate: null },
      { id: 'side', rail: side, mate: { piece: front ? 'side-back' : 'side-front', edge: 'side' } },
      {
        id: 'armhole',
        rail: railOf(['underarm', 'across', 'tip'], [segmentReverse(armhole.lower), segmentReverse(armhole.upper)]),
        mate: null,
      },
      {
        id: 'shoulder',
        rail: railOf(['tip', 'princess'], [lineSegment(armhole.upper.from, transformPoint(turned, shoulder.princess))]),
        mate: { piece: front ? 'side-back' : 'side-front', edge: 'shoulder' },
      },
      { id: 'princess', rail: reversed(rails.princess), mate: { piece: front ? 'front-centre' : 'back-centre', edge: 'princess' } },
    ],
    style,
  )
}

/** The side front's princess edge from the hem up: faired at the bust, turned above it. */
function turnedPrincess(below: Rail, above: Segment, frame: Frame): { readonly rail: Rail; readonly turned: Transform } {
  const { bust } = frame
  const edge = fairBustCorner(bust, [above], pathReverse(below.path))
  if (bust.angle === 0) return { rail: railThen(below, [{ segment: above, name: 'shoulder' }]), turned: STAYS }
  const downwards = pathReverse(edge.down)
  const names: EdgeNode[] = [...below.nodes.slice(0, -1), { name: 'fairing-below', at: (downwards.at(-1) as Segment).from, level: null }]
  const bustNode = below.nodes.at(-1) as EdgeNode
  const rail: Rail = { path: downwards, nodes: [...names, bustNode] }
  const [fairing, seam] = edge.up
  return {
    turned: edge.turned,
    rail: railThen(rail, [
      { segment: fairing as Segment, name: 'fairing-above' },
      { segment: seam as Segment, name: 'shoulder' },
    ]),
  }
}

/** The four pieces of a half as edges: the frame's rectangles, their wedges taken out, styled and turned. `hemHeight` in mm over the waist. */
export function sketchPieces(frame: Frame, style: BodiceStyle, hemHeight: number): readonly PieceSketch[] {
  const { front, back } = frame
  const wedges = wedgesOf(frame, style)
  const rail = (xAt: (level: LevelId) => number) => railBelowBust(frame, hemHeight, xAt)
  const frontShoulder = shoulderOf(front, style)
  const backShoulder = shoulderOf(back, style)
  const frontNeck = { x: front.centreX, y: front.neckCentre.y - style.necklineFrontDepth }
  const backNeck = { x: back.centreX, y: back.neckCentre.y - style.necklineBackDepth }
  const sideFront = turnedPrincess(
    rail((level) => front.princess.x + wedges.frontPrincess(level)),
    princessAbove(front, frontShoulder),
    frame,
  )
  const sideBack = railThen(
    rail((level) => back.princess.x + wedges.backPrincess(level)),
    [{ segment: princessAbove(back, backShoulder), name: 'shoulder' }],
  )
  return [
    centrePiece(
      'front-centre',
      front,
      frontShoulder,
      { centre: rail(wedges.frontCentre), princess: rail((level) => front.princess.x - wedges.frontPrincess(level)) },
      frontNeck,
      style,
    ),
    sidePiece(
      'side-front',
      front,
      frontShoulder,
      { princess: sideFront.rail, side: rail((level) => front.underarm.x - wedges.side(level)) },
      sideFront.turned,
      style,
    ),
    sidePiece(
      'side-back',
      back,
      backShoulder,
      { princess: sideBack, side: rail((level) => back.underarm.x - wedges.side(level)) },
      STAYS,
      style,
    ),
    centrePiece(
      'back-centre',
      back,
      backShoulder,
      { centre: rail(wedges.backCentre), princess: rail((level) => back.princess.x - wedges.backPrincess(level)) },
      backNeck,
      style,
    ),
  ]
}
