import type { Pascal } from '../units/brand'
import { pascal } from '../units/brand'
import { solveRing } from './ring'
import type { RingGeometry, TextileSettings } from './types'

/** How near the upper end comes to the cap, and the hold to the one that meets it, Pa. Always from below. */
const TOLERANCE = 1e-3
const MOST_STEPS = 60

/** Upper end of the pressure a ring puts on its wearer when cut for a hold: at rest or at a deep breath, whichever is more, Pa; infinite where rigid layers stop the breath. Null where the ring has no solution. */
export function upperPressure(geometry: RingGeometry, hold: Pascal, settings: TextileSettings): Pascal | null {
  const solved = solveRing(geometry, { solve: 'cut', hold }, settings)
  if (!solved.ok) return null
  return pascal(solved.value.breathShort ? Infinity : Math.max(solved.value.pressureBand.high, solved.value.breathBand.high))
}

/**
 * The hold to solve a cut for under a wearer's cap, Pa: the hold asked for, lowered until the upper end of its band, at rest and at a deep
 * breath, meets the cap. 0 where even a cut without tension passes the cap in a breath; the caution then says so. `cap` null: as asked.
 */
export function cappedHold(hold: Pascal, cap: Pascal | null, geometry: RingGeometry, settings: TextileSettings): Pascal {
  if (cap === null) return hold
  const over = (asked: number): number => (upperPressure(geometry, pascal(asked), settings) ?? 0) - cap
  let high: number = hold
  let overHigh = over(high)
  if (overHigh <= 0) return hold
  let low = 0
  let overLow = over(low)
  if (overLow > 0) return pascal(0)
  for (let i = 0; i < MOST_STEPS && overLow < -TOLERANCE && high - low > TOLERANCE; i++) {
    const secant = low + ((high - low) * -overLow) / (overHigh - overLow)
    const next = i % 3 === 2 ? (low + high) / 2 : secant
    const at = over(next)
    if (at <= 0) {
      low = next
      overLow = at
    } else {
      high = next
      overHigh = at
    }
  }
  return pascal(low)
}
