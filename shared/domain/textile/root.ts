const RELATIVE = 4e-16
const MOST_STEPS = 200

/**
 * Root of a rising function between `low` (value <= 0) and `high` (value >= 0): Newton's steps, each kept inside the bracket, bisection where
 * they leave it. To the last digits of a double.
 */
export function risingRoot(value: (x: number) => number, slope: (x: number) => number, low: number, high: number, start: number): number {
  let lo = low
  let hi = high
  let x = start > lo && start < hi ? start : (lo + hi) / 2
  for (let i = 0; i < MOST_STEPS; i++) {
    const f = value(x)
    if (f === 0) return x
    if (f < 0) lo = x
    else hi = x
    const newton = x - f / slope(x)
    const next = newton > lo && newton < hi ? newton : (lo + hi) / 2
    if (Math.abs(next - x) <= RELATIVE * Math.abs(next) || hi - lo <= RELATIVE * Math.abs(hi)) return next
    x = next
  }
  return x
}

/** The x at or above `floor` where a rising, unbounded function of it reaches `target`; `floor` when it already does there. */
export function inverseOfRising(value: (x: number) => number, slope: (x: number) => number, target: number, floor: number): number {
  if (!(target > value(floor))) return floor
  let step = 0.25
  while (value(floor + step) < target) step *= 2
  return risingRoot((x) => value(x) - target, slope, floor, floor + step, floor + step)
}
