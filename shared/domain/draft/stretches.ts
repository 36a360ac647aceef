import { pathEnd, pathFlatten, pathLength, pathPlaceAt, pathSplitAt, pathTransform } from '../geometry/path'
import { pointDistance } from '../geometry/point'
import { cubicSegment } from '../geometry/segment'
import { transformPoint } from '../geometry/transform'
import type { Transform } from '../geometry/transform'
import type { Point, Segment } from '../geometry/types'
import { armholeCurve } from './armhole'
import { necklineRail } from './edges'
import type { Shoulder } from './edges'
import type { HalfFrame } from './frame'
import type { EdgeId, EdgeNode, NecklineForm } from './types'
import { railOf } from './wedges'
import type { Rail } from './wedges'

/** One of the edges that bound a half above, from the centre outwards: what is left of it between two seams. */
export interface Stretch {
  readonly edge: 'neckline' | 'shoulder' | 'armhole' | 'dart' | 'top'
  readonly id: EdgeId
  readonly rail: Rail
  /** Of a shoulder: which part of it, so that front and back find each other. */
  readonly part?: 'inner' | 'outer' | 'whole'
}

/** Cuts keep this far from the nodes of an edge, mm: no part without length. */
const FROM_NODE = 0.5

/** A length along a rail moved off its nodes. */
function clearOfNodes(rail: Rail, length: number): number {
  const whole = pathLength(rail.path)
  let run = 0
  let own = Math.min(Math.max(length, FROM_NODE), whole - FROM_NODE)
  for (const segment of rail.path) {
    run += pathLength([segment])
    if (run < whole - FROM_NODE && Math.abs(own - run) < FROM_NODE) own = run + FROM_NODE
  }
  return own
}

/** Both parts of a stretch cut at a share of its length, the cut's node called `name`. */
export function cutStretch(stretch: Stretch, share: number, name: string): readonly [Stretch, Stretch] {
  const { rail } = stretch
  const length = clearOfNodes(rail, pathLength(rail.path) * share)
  const { index } = pathPlaceAt(rail.path, length)
  const [before, after] = pathSplitAt(rail.path, length)
  const node: EdgeNode = { name, at: pathEnd(before), level: null }
  return [
    { ...stretch, rail: { path: before, nodes: [...rail.nodes.slice(0, index + 1), node] } },
    { ...stretch, rail: { path: after, nodes: [node, ...rail.nodes.slice(index + 1)] } },
  ]
}

/** A stretch where it lies on the cloth once turned. */
export const turnStretch = (stretch: Stretch, turned: Transform): Stretch => ({
  ...stretch,
  rail: {
    path: pathTransform(stretch.rail.path, turned),
    nodes: stretch.rail.nodes.map((node) => ({ ...node, at: transformPoint(turned, node.at) })),
  },
})

/** The armhole of a half from the shoulder end to the underarm; `turned` carries all of it but the underarm. */
export function armholeStretch(half: HalfFrame, shoulder: Shoulder, turned: Transform): Stretch {
  const { upper, lower } = armholeCurve(half, shoulder, turned)
  return { edge: 'armhole', id: 'armhole', rail: railOf(['tip', 'across', 'underarm'], [upper, lower]) }
}

/**
 * The lower part of an armhole that a seam or dart has parted, turned; its end stays at the underarm, square to the side
 * seam, with a handle that may grow with the room that the turn leaves it.
 */
export function turnArmholeEnd(stretch: Stretch, turned: Transform, underarm: Point): Stretch {
  const moved = turnStretch(stretch, turned)
  const last = moved.rail.path.at(-1) as Segment
  const reach = pointDistance(last.from, underarm)
  const handle = last.kind === 'cubic' ? Math.max(pointDistance(last.c2, last.to), 0.22 * reach) : reach / 3
  const start = last.kind === 'cubic' ? last.c1 : last.from
  const end = cubicSegment(
    last.from,
    start,
    { x: underarm.x - Math.min(handle, 0.6 * Math.abs(underarm.x - last.from.x)), y: underarm.y },
    underarm,
  )
  return {
    ...moved,
    rail: {
      path: [...moved.rail.path.slice(0, -1), end],
      nodes: [...moved.rail.nodes.slice(0, -1), { ...(moved.rail.nodes.at(-1) as EdgeNode), at: underarm }],
    },
  }
}

/** The neckline of a half from the centre to the shoulder, unturned. */
export function necklineStretch(shoulder: Shoulder, centre: Point, form: NecklineForm): Stretch {
  return { edge: 'neckline', id: 'neckline', rail: necklineRail(shoulder, centre, form) }
}

/** The place of a stretch nearest to a point, as a share of its length, and how far it is, mm; to a millimetre. */
export function nearestOn({ rail }: Stretch, from: Point): { readonly share: number; readonly distance: number } {
  const points = pathFlatten(rail.path, 0.2)
  let run = 0
  let best = { length: 0, distance: Infinity }
  points.forEach((to, index) => {
    const before = points[index - 1]
    if (before === undefined) return
    const step = pointDistance(before, to)
    const t = Math.min(1, Math.max(0, ((from.x - before.x) * (to.x - before.x) + (from.y - before.y) * (to.y - before.y)) / (step * step)))
    const distance = pointDistance(from, { x: before.x + (to.x - before.x) * t, y: before.y + (to.y - before.y) * t })
    if (distance < best.distance) best = { length: run + step * t, distance }
    run += step
  })
  return { share: best.length / run, distance: best.distance }
}
