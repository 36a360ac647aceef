import type { Pascal } from '../units/brand'
import { pascal } from '../units/brand'
import { solveRing } from './ring'
import type { RingGeometry, TextileSettings } from './types'

const HALVINGS = 40

/** Upper end of the pressure a ring puts on its wearer when cut for a hold: at rest or at a deep breath, whichever is more, Pa. Null where the ring has no solution. */
export function upperPressure(geometry: RingGeometry, hold: Pascal, settings: TextileSettings): Pascal | null {
  const solved = solveRing(geometry, { solve: 'cut', hold }, settings)
  return solved.ok ? pascal(Math.max(solved.value.pressureBand.high, solved.value.breathBand.high)) : null
}

/**
 * The hold to solve a cut for under a wearer's cap, Pa: the hold asked for, lowered until the upper end of its band, at rest and at a deep
 * breath, meets the cap. 0 where even a cut without tension passes the cap in a breath; the caution then says so. `cap` null: as asked.
 */
export function cappedHold(hold: Pascal, cap: Pascal | null, geometry: RingGeometry, settings: TextileSettings): Pascal {
  if (cap === null) return hold
  const passes = (asked: number): boolean => {
    const upper = upperPressure(geometry, pascal(asked), settings)
    return upper === null || upper <= cap
  }
  if (passes(hold)) return hold
  let low = 0
  let high: number = hold
  for (let i = 0; i < HALVINGS && high - low > 1e-6; i++) {
    const middle = (low + high) / 2
    if (passes(middle)) low = middle
    else high = middle
  }
  return pascal(low)
}
