import type { ClothDirection, LayerCloth } from './types'

/** Degrees from the lengthwise of the directions that have a name. */
export const DIRECTION_ANGLE: Readonly<Record<ClothDirection, number>> = { lengthwise: 0, bias: 45, crosswise: 90 }

/** Angles nearer than this are the same direction, degrees. A strip is not cut truer. A setting without a source. */
export const SAME_ANGLE = 0.5

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
export function nearestDirection<T extends Pick<LayerCloth, 'direction' | 'figures'>>(
  angle: number,
  tested: readonly T[],
): NearestDirection<T> | null {
  let best: NearestDirection<T> | null = null
  for (const cloth of tested) {
    const own = DIRECTION_ANGLE[cloth.direction]
    const off = Math.abs(own - angle)
    if (best && (off > best.off || (off === best.off && cloth.figures.stretch >= best.cloth.figures.stretch))) continue
    best = { cloth, angle: own, off }
  }
  return best
}
