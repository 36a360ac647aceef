import type { NewtonPerMetre, Strain } from '../units/brand'
import { newtonPerMetre, strain } from '../units/brand'
import type { MonotoneCurve } from './monotone'
import { monotoneCurve, monotoneSlope, monotoneTension } from './monotone'
import { inverseOfRising } from './root'
import type { LoadCurve } from './types'

/** Tension at which a stretch known from a label or a hand pull is taken to have been read, highest: the cut cannot press more than asked. A setting without a source. */
export const ASSUMED_TENSION = newtonPerMetre(500)
/** The lowest such tension: the lower end of the hold that is shown for an assumed cloth. A setting without a source. */
export const ASSUMED_TENSION_LOW = newtonPerMetre(100)

const monotones = new WeakMap<LoadCurve, MonotoneCurve>()

/** The monotone cubic of a curve of that kind, worked out once for each curve. */
export function monotoneOf(curve: LoadCurve): MonotoneCurve {
  let made = monotones.get(curve)
  if (!made) {
    made = monotoneCurve(curve.knots)
    monotones.set(curve, made)
  }
  return made
}

/** Tension of a cloth at a strain, N/m: 0 when slack, a e + b e³ or the monotone cubic else. Beyond `testedTo` it is extrapolated. */
export function tensionAt(curve: LoadCurve, at: number): NewtonPerMetre {
  if (!(at > 0)) return newtonPerMetre(0)
  if (curve.kind === 'monotone') return newtonPerMetre(monotoneTension(monotoneOf(curve), at))
  return newtonPerMetre((curve.a + curve.b * at * at) * at)
}

/** Slope of the load curve at a strain, N/m per unit of strain; the slope to the right at 0. */
export function slopeAt(curve: LoadCurve, at: number): NewtonPerMetre {
  if (at < 0) return newtonPerMetre(0)
  if (curve.kind === 'monotone') return newtonPerMetre(monotoneSlope(monotoneOf(curve), at))
  return newtonPerMetre(curve.a + 3 * curve.b * at * at)
}

/** Strain of a cloth under a tension: the inverse of `tensionAt`; 0 for no tension. */
export function strainAt(curve: LoadCurve, tension: number): Strain {
  return strain(
    inverseOfRising(
      (at) => tensionAt(curve, at),
      (at) => slopeAt(curve, at),
      tension,
      0,
    ),
  )
}

/** The same curve with every tension times `factor`, over 0. */
export function scaleCurve(curve: LoadCurve, factor: number): LoadCurve {
  const scaled = <P extends { readonly tension: NewtonPerMetre }>(point: P): P => ({
    ...point,
    tension: newtonPerMetre(point.tension * factor),
  })
  return {
    ...curve,
    a: newtonPerMetre(curve.a * factor),
    b: newtonPerMetre(curve.b * factor),
    knots: curve.knots.map(scaled),
    points: curve.points.map(scaled),
  }
}

/** The least factor a band puts on a curve, so that a cloth with a very large spread still has a curve. */
const LEAST_FACTOR = 0.02

/**
 * The factors between which a curve's tensions lie: 1 - 2 s to 1 + 2 s of its spread s; for an assumed curve from the lowest tension its
 * stretch may have been read at to the curve itself.
 */
export function bandFactors(curve: LoadCurve): { readonly low: number; readonly high: number } {
  if (curve.kind === 'assumed') return { low: ASSUMED_TENSION_LOW / ASSUMED_TENSION, high: 1 }
  return { low: Math.max(LEAST_FACTOR, 1 - 2 * curve.spread), high: 1 + 2 * curve.spread }
}
