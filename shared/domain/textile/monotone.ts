/** A monotone cubic through knots with strictly rising strain and tension, ready to be evaluated many times. */
export interface MonotoneCurve {
  readonly strains: Float64Array
  readonly tensions: Float64Array
  readonly slopes: Float64Array
}

const endSlope = (h0: number, h1: number, d0: number, d1: number): number => {
  const slope = ((2 * h0 + h1) * d0 - h0 * d1) / (h0 + h1)
  return slope <= 0 ? d0 : Math.min(slope, 3 * d0)
}

/**
 * Tangents at the knots of a monotone cubic, N/m per strain: weighted harmonic means inside, one-sided three-point slopes at the
 * ends, never 0 or negative. At least two knots, strictly rising in both. Source: Fritsch and Butland 1984 (memory).
 */
export function monotoneCurve(knots: readonly { readonly strain: number; readonly tension: number }[]): MonotoneCurve {
  const count = knots.length
  if (count < 2) throw new RangeError('A monotone curve needs two knots')
  const strains = Float64Array.from(knots, (knot) => knot.strain)
  const tensions = Float64Array.from(knots, (knot) => knot.tension)
  const slopes = new Float64Array(count)
  const step = (i: number) => strains[i + 1]! - strains[i]!
  const secant = (i: number) => (tensions[i + 1]! - tensions[i]!) / step(i)
  if (count === 2) return { strains, tensions, slopes: slopes.fill(secant(0)) }
  for (let i = 1; i < count - 1; i++) {
    const w1 = 2 * step(i) + step(i - 1)
    const w2 = step(i) + 2 * step(i - 1)
    slopes[i] = (w1 + w2) / (w1 / secant(i - 1) + w2 / secant(i))
  }
  slopes[0] = endSlope(step(0), step(1), secant(0), secant(1))
  slopes[count - 1] = endSlope(step(count - 2), step(count - 3), secant(count - 2), secant(count - 3))
  return { strains, tensions, slopes }
}

const intervalAt = (curve: MonotoneCurve, strain: number): number => {
  let i = curve.strains.length - 2
  while (i > 0 && curve.strains[i]! > strain) i--
  return i
}

/** Tension at a strain, N/m: 0 at or below the first knot, with the last slope beyond the last. */
export function monotoneTension(curve: MonotoneCurve, strain: number): number {
  const { strains, tensions, slopes } = curve
  const last = strains.length - 1
  if (strain <= strains[0]!) return tensions[0]!
  if (strain >= strains[last]!) return tensions[last]! + slopes[last]! * (strain - strains[last]!)
  const i = intervalAt(curve, strain)
  const h = strains[i + 1]! - strains[i]!
  const t = (strain - strains[i]!) / h
  const s = 1 - t
  return (
    s * s * (1 + 2 * t) * tensions[i]! +
    s * s * t * h * slopes[i]! +
    t * t * (3 - 2 * t) * tensions[i + 1]! -
    t * t * s * h * slopes[i + 1]!
  )
}

/** Slope at a strain, N/m per strain; the first slope at the first knot, 0 below it. */
export function monotoneSlope(curve: MonotoneCurve, strain: number): number {
  const { strains, tensions, slopes } = curve
  const last = strains.length - 1
  if (strain < strains[0]!) return 0
  if (strain >= strains[last]!) return slopes[last]!
  const i = intervalAt(curve, strain)
  const h = strains[i + 1]! - strains[i]!
  const t = (strain - strains[i]!) / h
  const s = 1 - t
  return (6 * s * t * (tensions[i + 1]! - tensions[i]!)) / h + s * (1 - 3 * t) * slopes[i]! + t * (3 * t - 2) * slopes[i + 1]!
}

/** Neighbours that rise by less of the largest tension count as flat and are pooled. */
const LEAST_RISE = 1e-4

/**
 * Brings points in order of strain to knots that rise strictly in both, the origin first: neighbours that fall are pooled to their mean
 * (pool adjacent violators), equal strains likewise.
 */
export function risingKnots(
  points: readonly { readonly strain: number; readonly tension: number }[],
): readonly { readonly strain: number; readonly tension: number }[] {
  const flat = LEAST_RISE * Math.max(0, ...points.map((point) => point.tension))
  const pools: { strain: number; tension: number; count: number }[] = []
  for (const point of [...points].sort((one, other) => one.strain - other.strain)) {
    let pool = { ...point, count: 1 }
    while (pools.length > 0) {
      const before = pools[pools.length - 1]!
      if (pool.tension - before.tension > flat && before.strain < pool.strain) break
      pools.pop()
      const count = before.count + pool.count
      pool = {
        strain: (before.strain * before.count + pool.strain * pool.count) / count,
        tension: (before.tension * before.count + pool.tension * pool.count) / count,
        count,
      }
    }
    if (pool.strain > 0 && pool.tension > flat) pools.push(pool)
  }
  return [{ strain: 0, tension: 0 }, ...pools.map(({ strain, tension }) => ({ strain, tension }))]
}
