import { pointAdd, pointAlong, pointDistance, pointScale, pointSubtract, vectorLeft, vectorRight, vectorUnit } from '../geometry/point'
import { cubicSegment, lineSegment } from '../geometry/segment'
import type { CubicSegment, Point } from '../geometry/types'
import type { HalfFrame } from './frame'
import type { BodiceStyle, NecklineForm } from './types'
import { railOf } from './wedges'
import type { Rail } from './wedges'

/** Share of a seam's chord that its handles take where a plain arc is wanted. */
const ARC_HANDLE = 0.36
/** Handles of a round neckline, as shares of its width and depth: a little fuller than a quarter ellipse. */
const NECKLINE_FULLNESS = 0.58
/** How far the neckline may lean in from the shoulder, as a share of its width. */
const NECKLINE_LEAN = 0.4

/** The styled shoulder of a half: where the neckline and the princess seam meet it. */
export interface Shoulder {
  readonly neck: Point
  readonly princess: Point
  readonly end: Point
  /** Square to the shoulder, into the bodice. */
  readonly down: Point
}

/** The shoulder less what the neckline takes off it; the princess seam meets what is left at its share. */
export function shoulderOf(half: HalfFrame, style: BodiceStyle): Shoulder {
  const left = half.shoulderLength - style.necklineWidth
  const at = (length: number) => pointAlong(half.neckShoulder, half.shoulderAlong, length)
  return {
    neck: at(style.necklineWidth),
    princess: at(style.necklineWidth + left * style.princessAt),
    end: half.shoulderEnd,
    down: vectorRight(half.shoulderAlong),
  }
}

/** The princess seam from the bust to the shoulder: upright at the bust, square to the shoulder, one arc between. */
export function princessAbove(half: HalfFrame, shoulder: Shoulder): CubicSegment {
  const handle = pointDistance(half.princess, shoulder.princess) * ARC_HANDLE
  return cubicSegment(
    half.princess,
    pointAlong(half.princess, { x: 0, y: 1 }, handle),
    pointAlong(shoulder.princess, shoulder.down, handle),
    shoulder.princess,
  )
}

/** How far out the corner of a square neckline stands, as a share of the neckline's width at the shoulder. */
const SQUARE_CORNER = 0.84
/** Handles of a V neckline at the shoulder, as a share of its length. */
const V_HANDLE = 0.22

/**
 * The neckline from the centre to the shoulder. It leaves the shoulder square, so that it runs on across the shoulder seam,
 * and meets the centre square but for a V.
 */
export function necklineRail(shoulder: Shoulder, centre: Point, form: NecklineForm): Rail {
  const { neck, down } = shoulder
  const width = neck.x - centre.x
  const depth = neck.y - centre.y
  const upper = Math.min((depth * NECKLINE_FULLNESS) / Math.max(-down.y, 1e-6), (width * NECKLINE_LEAN) / Math.max(-down.x, 1e-6))
  if (form === 'square') {
    const corner = { x: centre.x + width * SQUARE_CORNER, y: centre.y }
    const side = cubicSegment(
      corner,
      { x: corner.x, y: corner.y + depth * 0.4 },
      pointAlong(neck, down, Math.min(upper, depth * 0.3)),
      neck,
    )
    return railOf(['centre', 'corner', 'neck'], [lineSegment(centre, corner), side])
  }
  if (form === 'v') {
    const length = pointDistance(centre, neck)
    const handle = pointAlong(neck, down, Math.min(upper, length * V_HANDLE))
    const towards = vectorUnit({ x: handle.x - centre.x, y: handle.y - centre.y })
    return railOf(['centre', 'neck'], [cubicSegment(centre, pointAlong(centre, towards, length * 0.4), handle, neck)])
  }
  const round = cubicSegment(centre, { x: centre.x + width * NECKLINE_FULLNESS, y: centre.y }, pointAlong(neck, down, upper), neck)
  return railOf(['centre', 'neck'], [round])
}

/** How much more a seam keeps to its own direction than it turns square to the edge where it ends. */
const OWN_DIRECTION = 2

/**
 * A seam from the bust to where it ends on an edge above: upright at the bust, arriving between its own direction and square
 * to that edge. `along` is the edge's direction there, from the centre outwards.
 */
export function seamAbove(from: Point, to: Point, along: Point): CubicSegment {
  const handle = pointDistance(from, to) * ARC_HANDLE
  const arrive = vectorUnit(pointAdd(pointScale(vectorUnit(pointSubtract(to, from)), OWN_DIRECTION), vectorLeft(along)))
  return cubicSegment(from, pointAlong(from, { x: 0, y: 1 }, handle), pointAlong(to, arrive, -handle), to)
}
