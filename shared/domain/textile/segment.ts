import type { Mm, Strain } from '../units/brand'
import { mm, strain } from '../units/brand'
import type { BandSide, Stack } from './stack'
import { sewnWidth, stackOf, stackWithSewn, strainOfStack } from './stack'
import type { Layer, RingSegment } from './types'

/** Whether any layer of the segment carries a rigid width of its own. */
export const hasSewn = (segment: RingSegment): boolean =>
  segment.sewn !== undefined && segment.sewn.some((one) => one.width > 0 && segment.plan.layers.some((layer) => layer.id === one.layer))

/** The stack of a segment cut `width` mm wide; the width matters only where rigid widths are sewn to single layers. */
export const stackOfSegment = (segment: RingSegment, width: number, side: BandSide = 'mean'): Stack =>
  hasSewn(segment) ? stackWithSewn(segment.plan, segment.sewn!, width, side) : stackOf(segment.plan, side)

/** Width at which the rigid width sewn to a layer fills that layer, mm: the greatest rho / r. A cut has to be wider. */
export function filledWidth(segment: RingSegment): Mm {
  if (!hasSewn(segment)) return mm(0)
  return mm(
    segment.plan.layers.reduce(
      (most, layer) => (layer.count > 0 && !layer.rigid ? Math.max(most, sewnWidth(segment.sewn, layer.id) / layer.cutRatio) : most),
      0,
    ),
  )
}

/** Part by which a width has to be more than what fills a layer. */
const ABOVE_FILLED = 1e-9
/** Part of its arc by which a width may miss it: what a double still tells. */
const NEAR = 1e-15
const MOST_STEPS = 200

/**
 * Width of a segment that goes round its arc under a tension: w (1 + e(T, w)) = arc. Divided out where no rigid width is sewn to a single
 * layer; in a bracket that every step narrows where one is, because the strain then hangs on the width. 0 for no arc; null where the arc
 * is no longer than the rigid width sewn into a layer. Lengths mm, tension N/m.
 */
export function widthUnder(segment: RingSegment, arc: number, tension: number, side: BandSide = 'mean'): number | null {
  if (!(arc > 0)) return 0
  if (!hasSewn(segment)) return arc / (1 + strainOfStack(stackOf(segment.plan, side), tension))
  const reach = (width: number): number => width * (1 + strainOfStack(stackOfSegment(segment, width, side), tension))
  const filled = filledWidth(segment)
  let low = filled * (1 + ABOVE_FILLED)
  let high = arc / (1 + stackOf(segment.plan, side).free)
  if (!(low < high)) return null
  let under = reach(low) - arc
  if (under >= 0) return null
  let over = Math.max(reach(high) - arc, 0)
  let last = 0
  for (let i = 0; i < MOST_STEPS && over > 0; i++) {
    const chord = low - (under * (high - low)) / (over - under)
    const next = chord > low && chord < high && i % 8 < 7 ? chord : (low + high) / 2
    const miss = reach(next) - arc
    if (Math.abs(miss) <= NEAR * arc || high - low <= NEAR * high) return next
    if (miss < 0) {
      low = next
      under = miss
      if (last < 0) over /= 2
      last = -1
    } else {
      high = next
      over = miss
      if (last > 0) under /= 2
      last = 1
    }
  }
  return high
}

/** Strain of one layer of a segment of this width when the garment's strain is e: ((1 + e) w - rho) / (r w - rho) - 1. Negative: slack. */
export function layerStrainIn(segment: RingSegment, layer: Layer, width: number, e: number): Strain {
  const share = width > 0 ? sewnWidth(segment.sewn, layer.id) / width : 0
  return strain((e + 1 - layer.cutRatio) / (layer.cutRatio - share))
}

/** Least over the layers that stretch of (rho + (r w - rho)(1 + limit)) / w - 1. */
function leastLimit(segment: RingSegment, width: number, limit: (layer: Layer) => number): Strain {
  return strain(
    segment.plan.layers.reduce((least, layer) => {
      if (!(layer.count > 0) || layer.rigid) return least
      const share = width > 0 ? sewnWidth(segment.sewn, layer.id) / width : 0
      return Math.min(least, share + (layer.cutRatio - share) * (1 + limit(layer)) - 1)
    }, Infinity),
  )
}

/** Wear limit of a segment of this width, as the garment's strain; infinite where no layer stretches. */
export const segmentWearLimit = (segment: RingSegment, width: number): Strain =>
  leastLimit(segment, width, (layer) => layer.cloth.wearLimit)

/** Pull-on limit of a segment of this width, as the garment's strain; infinite where no layer stretches. */
export const segmentPullOnLimit = (segment: RingSegment, width: number): Strain =>
  leastLimit(segment, width, (layer) => layer.cloth.pullOnLimit)

/**
 * Width at which a segment that goes round its arc is just at its wear limit: w (1 + limit(w)) = arc. It is the widest that the least of
 * its layers allows. Null where the arc is no longer than the rigid width sewn into a layer.
 */
export function widthAtWearLimit(segment: RingSegment, arc: number): number | null {
  let width = 0
  for (const layer of segment.plan.layers) {
    if (!(layer.count > 0) || layer.rigid) continue
    const rho = sewnWidth(segment.sewn, layer.id)
    width = Math.max(width, (arc - rho + rho * (1 + layer.cloth.wearLimit)) / (layer.cutRatio * (1 + layer.cloth.wearLimit)))
  }
  return width > filledWidth(segment) * (1 + ABOVE_FILLED) ? width : null
}

/** Whether a segment of this width at strain e asks any layer for more than its tested range. */
export const isSegmentExtrapolated = (segment: RingSegment, width: number, e: number): boolean =>
  segment.plan.layers.some(
    (layer) => layer.count > 0 && !layer.rigid && layerStrainIn(segment, layer, width, e) > layer.cloth.curve.testedTo * (1 + 1e-12),
  )
