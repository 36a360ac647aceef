import { plainDecimal } from '../units/format'
import type { ClothDirection, LayerCloth } from './types'

/** Degrees from the lengthwise of the directions that have a name. */
export const DIRECTION_ANGLE: Readonly<Record<ClothDirection, number>> = { lengthwise: 0, bias: 45, crosswise: 90 }

/** Angles nearer than this are the same direction, degrees. A strip is not cut truer. A setting without a source. */
export const SAME_ANGLE = 0.5

/** A strip's direction: one with a name, or a typed angle with the name nearest to it. Degrees from the lengthwise. */
export interface StripDirection {
  readonly direction: ClothDirection
  readonly angle?: number
}

/** Degrees of a strip's direction from the lengthwise. */
export const angleOf = ({ direction, angle }: StripDirection): number => angle ?? DIRECTION_ANGLE[direction]

/** A strip's direction from a typed angle, degrees from the lengthwise, 0 to 90: the name nearest to it, and the angle unless it is that name's own. */
export function typedDirection(angle: number): StripDirection {
  const names = Object.entries(DIRECTION_ANGLE) as [ClothDirection, number][]
  const [direction, own] = names.reduce((best, one) => (Math.abs(one[1] - angle) < Math.abs(best[1] - angle) ? one : best))
  return Math.abs(own - angle) <= SAME_ANGLE ? { direction } : { direction, angle }
}

/** A strip's direction in words: its name, or its angle from the lengthwise. */
export const directionWords = ({ direction, angle }: StripDirection): string =>
  angle === undefined ? direction : `${plainDecimal(angle, 1)}° from the lengthwise`

/** What tells the tested directions of one cloth apart: the name, or the angle. */
export const directionKey = ({ direction, angle }: StripDirection): string => (angle === undefined ? direction : String(angle))

/** A direction that was taken for the one asked for. Degrees from the lengthwise. */
export interface NearestDirection<T> {
  readonly cloth: T
  readonly angle: number
  /** How far the one taken is from the one asked for; 0 where it is the same. */
  readonly off: number
}

/**
 * The tested direction nearest to an angle, degrees from the lengthwise, 0 to 90: a cloth is taken to pull alike to both sides of its grain.
 * Between two equally near ones the one that stretches less, because the cut then cannot press more than asked. Null without a
 * tested one.
 */
export function nearestDirection<T extends Pick<LayerCloth, 'direction' | 'angle' | 'figures'>>(
  angle: number,
  tested: readonly T[],
): NearestDirection<T> | null {
  let best: NearestDirection<T> | null = null
  for (const cloth of tested) {
    const own = angleOf(cloth)
    const off = Math.abs(own - angle)
    if (best && (off > best.off || (off === best.off && cloth.figures.stretch >= best.cloth.figures.stretch))) continue
    best = { cloth, angle: own, off }
  }
  return best
}
