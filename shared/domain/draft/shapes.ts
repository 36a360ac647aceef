import { pathStart, pathStartTangent } from '../geometry/path'
import { pointAlong, pointDistance, vectorRight, vectorTurn } from '../geometry/point'
import { cubicSegment } from '../geometry/segment'
import type { CubicSegment, Path } from '../geometry/types'
import type { EdgeShape } from './types'

/** A height across a half: `at` by share of its width from the centre (mm), `slope` its change by share. */
export interface HeightLine {
  readonly at: (share: number) => number
  readonly slope: (share: number) => number
}

/** Power of a pointed edge from straight to hollow: above 1, so that it runs level into the side seam and on beyond it. */
const POINTED_LEAST = 1.2
const POINTED_MORE = 1.3

/** The power with which a pointed edge leaves its point. */
export const pointedPower = (curve: number): number => POINTED_LEAST + POINTED_MORE * curve

/**
 * A height from `centre` to `side` (both mm): level, to a point at the centre, or rounded. Every form runs level into the
 * side seam, so that front and back meet there without a corner.
 */
export function heightLine(form: EdgeShape['form'], centre: number, side: number, curve: number): HeightLine {
  const rise = centre - side
  if (form === 'straight' || rise === 0) return { at: () => side, slope: () => 0 }
  if (form === 'rounded') {
    return { at: (s) => side + rise * (1 - s * s * (3 - 2 * s)), slope: (s) => -rise * 6 * s * (1 - s) }
  }
  const power = pointedPower(curve)
  const left = (s: number) => Math.max(0, 1 - s)
  return { at: (s) => side + rise * left(s) ** power, slope: (s) => -rise * power * left(s) ** (power - 1) }
}

/** Longest handle of an edge that is level at both ends, mm: on a wide panel it turns square to a slanting seam near to it. */
const LEVEL_HANDLE = 60

/**
 * An edge across one panel from the start of its left rail to the start of its right one, both read into the piece. It
 * stands square to both but for `slopes`, its rise by millimetre there: on both mates of a seam the same, so that the
 * joined edge has no corner. `up`: the rails are read upwards (a hem), else downwards (a top edge).
 */
export function edgeAcross(left: Path, right: Path, slopes: readonly [left: number, right: number], up: boolean): CubicSegment {
  const from = pathStart(left)
  const to = pathStart(right)
  const third = pointDistance(from, to) / 3
  const handle = slopes[0] === 0 && slopes[1] === 0 ? Math.min(third, LEVEL_HANDLE) : third
  const along = (rail: Path, slope: number) => {
    const inwards = pathStartTangent(rail)
    const square = vectorRight(up ? inwards : { x: -inwards.x, y: -inwards.y })
    return slope === 0 ? square : vectorTurn(square, Math.atan(slope))
  }
  return cubicSegment(from, pointAlong(from, along(left, slopes[0]), handle), pointAlong(to, along(right, slopes[1]), -handle), to)
}
