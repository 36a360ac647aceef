import type { Point } from './types'

/** Affine map: x' = a x + c y + e, y' = b x + d y + f. Lengths keep only under moves, turns and mirrors. */
export interface Transform {
  readonly a: number
  readonly b: number
  readonly c: number
  readonly d: number
  readonly e: number
  readonly f: number
}

/** Moves by dx, dy in mm. */
export const moveBy = (dx: number, dy: number): Transform => ({ a: 1, b: 0, c: 0, d: 1, e: dx, f: dy })

/** Turns about `pivot` by radians, counter-clockwise positive. */
export function turnAbout(pivot: Point, angle: number): Transform {
  const cos = Math.cos(angle)
  const sin = Math.sin(angle)
  return { a: cos, b: sin, c: -sin, d: cos, e: pivot.x - cos * pivot.x + sin * pivot.y, f: pivot.y - sin * pivot.x - cos * pivot.y }
}

/** Mirrors across the vertical line at `x`; it turns a counter-clockwise outline into a clockwise one. */
export const mirrorAcross = (x = 0): Transform => ({ a: -1, b: 0, c: 0, d: 1, e: 2 * x, f: 0 })

/** First `first`, then `then`. */
export function transformThen(first: Transform, then: Transform): Transform {
  return {
    a: then.a * first.a + then.c * first.b,
    b: then.b * first.a + then.d * first.b,
    c: then.a * first.c + then.c * first.d,
    d: then.b * first.c + then.d * first.d,
    e: then.a * first.e + then.c * first.f + then.e,
    f: then.b * first.e + then.d * first.f + then.f,
  }
}

/** The image of a point. */
export function transformPoint(map: Transform, at: Point): Point {
  return { x: map.a * at.x + map.c * at.y + map.e, y: map.b * at.x + map.d * at.y + map.f }
}
