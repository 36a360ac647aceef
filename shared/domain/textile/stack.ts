import { bandFactors, monotoneOf } from './load-curve'
import type { MonotoneCurve } from './monotone'
import { monotoneSlope, monotoneTension } from './monotone'
import type { LayerPlan, SewnRigid } from './types'

/** Which end of the spread the curves are taken at. */
export type BandSide = 'low' | 'mean' | 'high'

/**
 * A layer plan made ready for many evaluations: layers of cut ratio 1 with cubic curves are one polynomial, the others are terms of their
 * own.
 */
export interface Stack {
  readonly a: number
  readonly b: number
  readonly terms: readonly StackTerm[]
  /** e0 = min r - 1: strain at which the first layer is drawn. */
  readonly free: number
  /** Strain at which a rigid layer stops it: min r - 1 over the rigid layers; infinite without one. */
  readonly stop: number
  /** Whether any layer has a load curve to pull with. */
  readonly pulls: boolean
}

interface StackTerm {
  readonly factor: number
  /** Garment's strain from which the layer is drawn, r - 1. */
  readonly from: number
  /** Strain of the layer for one of the garment's: 1 / r, or 1 / (r - rho / w) where a rigid width rho is sewn to it. */
  readonly gain: number
  readonly a: number
  readonly b: number
  readonly monotone: MonotoneCurve | null
}

const made: Readonly<Record<BandSide, WeakMap<LayerPlan, Stack>>> = { low: new WeakMap(), mean: new WeakMap(), high: new WeakMap() }

/** The stack of a plan at one end of its band; worked out once for each plan. */
export function stackOf(plan: LayerPlan, side: BandSide = 'mean'): Stack {
  const known = made[side].get(plan)
  if (known) return known
  const stack = makeStack(plan, side, () => 0)
  made[side].set(plan, stack)
  return stack
}

/**
 * The stack of a plan whose layers carry rigid widths of their own, at the reference width w: e_i = ((1 + e) w - rho) / (r w - rho) - 1.
 * The width has to be more than rho / r for each of them.
 */
export function stackWithSewn(plan: LayerPlan, sewn: readonly SewnRigid[], width: number, side: BandSide = 'mean'): Stack {
  return makeStack(plan, side, (layer) => sewnWidth(sewn, layer) / width)
}

/** Rigid width sewn to one layer, mm; 0 for none. */
export const sewnWidth = (sewn: readonly SewnRigid[] | undefined, layer: string): number =>
  sewn?.reduce((sum, one) => (one.layer === layer ? sum + one.width : sum), 0) ?? 0

function makeStack(plan: LayerPlan, side: BandSide, sewnShare: (layer: string) => number): Stack {
  let a = 0
  let b = 0
  let free = Infinity
  let stop = Infinity
  const terms: StackTerm[] = []
  for (const { id, cloth, count, cutRatio, rigid } of plan.layers) {
    if (!(count > 0)) continue
    free = Math.min(free, cutRatio - 1)
    if (rigid) {
      stop = Math.min(stop, cutRatio - 1)
      continue
    }
    const { curve } = cloth
    const factor = count * (side === 'mean' ? 1 : bandFactors(curve)[side])
    const share = sewnShare(id)
    if (cutRatio === 1 && share === 0 && curve.kind !== 'monotone') {
      a += factor * curve.a
      b += factor * curve.b
    } else {
      const monotone = curve.kind === 'monotone' ? monotoneOf(curve) : null
      terms.push({ factor, from: cutRatio - 1, gain: 1 / (cutRatio - share), a: curve.a, b: curve.b, monotone })
    }
  }
  return {
    a,
    b,
    terms,
    free: Number.isFinite(free) ? free : 0,
    stop,
    pulls: a > 0 || b > 0 || terms.some((term) => term.monotone !== null || term.a > 0 || term.b > 0),
  }
}

/** Whether the stack gives between its free strain and its stop. */
export const stackStretches = (stack: Stack): boolean => stack.pulls && stack.stop > stack.free

/** How far past its stop a strain is still read as on it. */
const AT_STOP = 1e-12

/** Tension of a stack at the garment's strain e, N/m: sum of n T(e_i), slack layers giving nothing; infinite past the stop of a rigid layer. */
export function tensionOfStack(stack: Stack, e: number): number {
  if (e > stack.stop + AT_STOP) return Infinity
  let sum = e > 0 ? (stack.a + stack.b * e * e) * e : 0
  for (const term of stack.terms) {
    const x = (e - term.from) * term.gain
    if (x > 0) sum += term.factor * (term.monotone ? monotoneTension(term.monotone, x) : (term.a + term.b * x * x) * x)
  }
  return sum
}

/** Slope of a stack at e, N/m per strain; the slope to the right where a layer begins to pull. Rigid layers are left out. */
export function slopeOfStack(stack: Stack, e: number): number {
  let sum = e >= 0 ? stack.a + 3 * stack.b * e * e : 0
  for (const term of stack.terms) {
    const x = (e - term.from) * term.gain
    if (x >= 0) sum += term.factor * term.gain * (term.monotone ? monotoneSlope(term.monotone, x) : term.a + 3 * term.b * x * x)
  }
  return sum
}

const RELATIVE = 4e-16
const MOST_STEPS = 200

/**
 * Strain of a stack under a tension: the inverse of `tensionOfStack`, the free strain for no tension, the stop for any tension that reaches
 * it. Newton's steps from the upper end of a bracket, bisection where they leave it. The stack must pull or have a stop.
 */
export function strainOfStack(stack: Stack, tension: number): number {
  if (!(tension > 0)) return stack.free
  if (stack.stop < Infinity && (!stack.pulls || tensionOfStack(stack, stack.stop) <= tension)) return stack.stop
  let lo = stack.free
  let hi: number
  if (stack.terms.length === 0) {
    hi = Math.min(stack.a > 0 ? tension / stack.a : Infinity, stack.b > 0 ? Math.cbrt(tension / stack.b) : Infinity)
  } else {
    let step = 0.25
    while (tensionOfStack(stack, lo + step) < tension) step *= 2
    hi = lo + step
  }
  hi = Math.min(hi, stack.stop)
  let e = hi
  for (let i = 0; i < MOST_STEPS; i++) {
    const miss = tensionOfStack(stack, e) - tension
    if (miss === 0) return e
    if (miss < 0) lo = e
    else hi = e
    const newton = e - miss / slopeOfStack(stack, e)
    const next = newton >= lo && newton <= hi ? newton : (lo + hi) / 2
    if (Math.abs(next - e) <= RELATIVE * (1 + Math.abs(next))) return next
    e = next
  }
  return e
}

/** Slope of the inverse of a stack at a tension, strain per N/m; 0 where a rigid layer has stopped it. */
export function giveOfStack(stack: Stack, tension: number): number {
  const e = strainOfStack(stack, tension)
  return e >= stack.stop ? 0 : 1 / slopeOfStack(stack, e)
}
