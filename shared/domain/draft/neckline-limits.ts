import { pathFlatten } from '../geometry/path'
import { pointDistance } from '../geometry/point'
import type { Path } from '../geometry/types'
import type { Problem } from '../units/result'
import { princessAbove, seamAbove, shoulderOf } from './edges'
import type { Frame } from './frame'
import { drawnUpper } from './opening'
import type { DrawnUpper } from './opening'
import type { Zone } from './panels'
import { cutStretch } from './stretches'
import type { BodiceStyle } from './types'

/** Cloth left between a neckline and what it must not touch, mm: the armhole, and a princess seam that does not end in it. */
const NECKLINE_TO_ARMHOLE = 25
const NECKLINE_TO_PRINCESS = 10
/** How near two paths come to each other, mm; to a few tenths. */
function nearest(one: Path, other: Path): number {
  const [a, b] = [pathFlatten(one, 0.5), pathFlatten(other, 0.1)]
  let least = Infinity
  a.forEach((at, index) => {
    const before = a[index - 1]
    if (before === undefined) return
    for (const place of b) {
      const length = pointDistance(before, at)
      const t = Math.min(
        1,
        Math.max(0, ((place.x - before.x) * (at.x - before.x) + (place.y - before.y) * (at.y - before.y)) / (length * length)),
      )
      least = Math.min(least, Math.hypot(place.x - before.x - (at.x - before.x) * t, place.y - before.y - (at.y - before.y) * t))
    }
  })
  return least
}

/** The princess seam above the bust as drawn, unturned. */
function princessDrawn(frame: Frame, style: BodiceStyle, zone: Zone, drawn: DrawnUpper): Path | null {
  if (!style.panels[zone].princess) return null
  const { edge, at } = style.princessEnd[zone]
  const half = frame[zone]
  if (edge === 'shoulder') return [princessAbove(half, shoulderOf(half, style))]
  const end = cutStretch(drawn[edge], at, 'princess')[0].rail.path.at(-1)
  if (end === undefined) return null
  const along = {
    x: end.to.x - (end.kind === 'cubic' ? end.c2.x : end.from.x),
    y: end.to.y - (end.kind === 'cubic' ? end.c2.y : end.from.y),
  }
  return [seamAbove(half.princess, end.to, along)]
}

/** How much cloth a neckline leaves beyond what it must, the least of both limits, mm; negative: too little. */
function necklineRoom(frame: Frame, style: BodiceStyle, zone: Zone, drawn = drawnUpper(frame[zone], zone, style)): number {
  const beside = nearest(drawn.neckline.rail.path, drawn.armhole.rail.path) - NECKLINE_TO_ARMHOLE
  if (style.princessEnd[zone].edge === 'neckline') return beside
  const princess = princessDrawn(frame, style, zone, drawn)
  return princess === null ? beside : Math.min(beside, nearest(drawn.neckline.rail.path, princess) - NECKLINE_TO_PRINCESS)
}

/** A neckline that comes too near to the armhole or the princess seam, with the nearest measure that does not. */
export function necklineProblem(frame: Frame, style: BodiceStyle, zone: Zone, drawn: DrawnUpper): Problem | null {
  if (necklineRoom(frame, style, zone, drawn) >= 0) return null
  const key = zone === 'front' ? 'necklineFrontDepth' : 'necklineBackDepth'
  const found = (['necklineWidth', key] as const).flatMap((at) => {
    for (let value = Math.floor(style[at]); value >= 0; value -= 2) {
      if (necklineRoom(frame, { ...style, [at]: value }, zone) >= 0) return [{ at, value }]
    }
    return []
  })[0]
  return {
    code: 'neckline-near-edge',
    message: `The ${zone} neckline comes too near to the armhole or the princess seam.`,
    todo:
      found === undefined
        ? `Take a narrower and higher ${zone} neckline, or let the princess seam end elsewhere.`
        : `The nearest ${found.at === key ? 'depth' : 'width taken off the shoulder'} that works is ${found.value} mm.`,
    at: `style.${found?.at ?? key}`,
  }
}
