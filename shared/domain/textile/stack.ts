import { bandFactors, monotoneOf } from './load-curve'
import type { MonotoneCurve } from './monotone'
import { monotoneSlope, monotoneTension } from './monotone'
import type { LayerPlan } from './types'

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
  readonly pulls: boolean
}

interface StackTerm {
  readonly factor: number
  readonly ratio: number
  readonly a: number
  readonly b: number
  readonly monotone: MonotoneCurve | null
}

const made: Readonly<Record<BandSide, WeakMap<LayerPlan, Stack>>> = { low: new WeakMap(), mean: new WeakMap(), high: new WeakMap() }

/** The stack of a plan at one end of its band; worked out once for each plan. */
export function stackOf(plan: LayerPlan, side: BandSide = 'mean'): Stack {
  const known = made[side].get(plan)
  if (known) return known
  let a = 0
  let b = 0
  let free = Infinity
  const terms: StackTerm[] = []
  for (const { cloth, count, cutRatio } of plan.layers) {
    if (!(count > 0)) continue
    const { curve } = cloth
    const factor = count * (side === 'mean' ? 1 : bandFactors(curve)[side])
    if (cutRatio === 1 && curve.kind !== 'monotone') {
      a += factor * curve.a
      b += factor * curve.b
    } else {
      terms.push({ factor, ratio: cutRatio, a: curve.a, b: curve.b, monotone: curve.kind === 'monotone' ? monotoneOf(curve) : null })
    }
    free = Math.min(free, cutRatio - 1)
  }
  const stack = {
    a,
    b,
    terms,
    free: Number.isFinite(free) ? free : 0,
    pulls: a > 0 || b > 0 || terms.some((term) => term.monotone !== null || term.a > 0 || term.b > 0),
  }
  made[side].set(plan, stack)
  return stack
}

/** Tension of a stack at the garment's strain e, N/m: sum of n T((1 + e) / r - 1), slack layers giving nothing. */
export function tensionOfStack(stack: Stack, e: number): number {
  let sum = e > 0 ? (stack.a + stack.b * e * e) * e : 0
  for (const term of stack.terms) {
    const x = (1 + e) / term.ratio - 1
    if (x > 0) sum += term.factor * (term.monotone ? monotoneTension(term.monotone, x) : (term.a + term.b * x * x) * x)
  }
  return sum
}

/** Slope of a stack at e, N/m per strain; the slope to the right where a layer begins to pull. */
export function slopeOfStack(stack: Stack, e: number): number {
  let sum = e >= 0 ? stack.a + 3 * stack.b * e * e : 0
  for (const term of stack.terms) {
    const x = (1 + e) / term.ratio - 1
    if (x >= 0) sum += (term.factor / term.ratio) * (term.monotone ? monotoneSlope(term.monotone, x) : term.a + 3 * term.b * x * x)
  }
  return sum
}

const RELATIVE = 4e-16
const MOST_STEPS = 200

/**
 * Strain of a stack under a tension: the inverse of `tensionOfStack`, the free strain for no tension. Newton's steps from the upper end of a
 * bracket, bisection where they leave it. The stack must pull.
 */
export function strainOfStack(stack: Stack, tension: number): number {
  if (!(tension > 0)) return stack.free
  let lo = stack.free
  let hi: number
  if (stack.terms.length === 0) {
    hi = Math.min(stack.a > 0 ? tension / stack.a : Infinity, stack.b > 0 ? Math.cbrt(tension / stack.b) : Infinity)
  } else {
    let step = 0.25
    while (tensionOfStack(stack, lo + step) < tension) step *= 2
    hi = lo + step
  }
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
