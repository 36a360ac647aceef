import type { Mm, Newton, NewtonPerMetre, Pascal } from '../units/brand'
import { mm, newton, newtonPerMetre, pascal } from '../units/brand'

/** Millimetres in a metre: tension is per metre of cloth, girths are in mm. */
const MM_PER_METRE = 1000

/**
 * Pressure of a ring on the body, Pa: P = T / r with the mean radius r = G / (2 pi). Friction, posture and time are left out; legs under
 * bandages have measured up to 42 % less. Source: Thomas 2003 (World Wide Wounds).
 */
export const ringPressure = (tension: NewtonPerMetre, girth: Mm): Pascal => pascal((tension * 2 * Math.PI * MM_PER_METRE) / girth)

/** Tension that gives a mean pressure on a girth, N/m: T = P G / (2 pi). */
export const holdTension = (pressure: Pascal, girth: Mm): NewtonPerMetre =>
  newtonPerMetre((pressure * girth) / (2 * Math.PI * MM_PER_METRE))

/** Perimeter of an ellipse of half-axes a and b, by the arithmetic-geometric mean; to the last digits. Source: Gauss (memory). */
export function ellipsePerimeter(a: number, b: number): number {
  let x = Math.max(a, b)
  let y = Math.min(a, b)
  if (y <= 0) return 4 * x
  let power = 0.5
  let sum = x * x - power * (x * x - y * y)
  for (let i = 0; i < 40 && Math.abs(x - y) > 1e-16 * x; i++) {
    const gap = (x - y) / 2
    const mean = (x + y) / 2
    y = Math.sqrt(x * y)
    x = mean
    power *= 2
    sum -= power * gap * gap
  }
  return (2 * Math.PI * sum) / x
}

/** Half-axes of an ellipse with this perimeter and breadth over depth, mm: `a` half the breadth, `b` half the depth. */
export function ellipseAxes(girth: Mm, aspect: number): { readonly a: Mm; readonly b: Mm } {
  const b = girth / ellipsePerimeter(aspect, 1)
  return { a: mm(aspect * b), b: mm(b) }
}

/** Pressure at the side of an elliptic body, T a / b², and in front, T b / a², Pa. The greatest and the least where the body is broader than deep. */
export function ellipsePressures(tension: NewtonPerMetre, girth: Mm, aspect: number): { readonly side: Pascal; readonly front: Pascal } {
  const { a, b } = ellipseAxes(girth, aspect)
  return { side: pascal((tension * MM_PER_METRE * a) / (b * b)), front: pascal((tension * MM_PER_METRE * b) / (a * a)) }
}

/** What a flat busk or hard edge of this width carries on each of its edges, N/m: T w / (2 r), r the mean radius. Derived. */
export const hardEdgeLoad = (tension: NewtonPerMetre, width: Mm, girth: Mm): NewtonPerMetre =>
  newtonPerMetre((tension * width * Math.PI) / girth)

/** What one hook or one pair of eyelets carries, N: the tension times the distance to the next, mm. Derived; the ends of a closure carry more. */
export const pullOnClosure = (tension: NewtonPerMetre, pitch: Mm): Newton => newton((tension * pitch) / MM_PER_METRE)
