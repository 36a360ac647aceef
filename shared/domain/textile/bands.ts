import type { Pascal } from '../units/brand'
import { pascal } from '../units/brand'
import type { HoldBand } from './types'

/** Upper ends of the hold bands, Pa. Source: Anthropometry, Apparel Sizing and Design, ch. 13, table 13.5 (read). */
export const BAND_LIMITS = { light: pascal(400), easy: pascal(1300), firm: pascal(2000), strong: pascal(3300) } as const

/** At a deep breath: caution from 3300, stop from 4700 Pa, 35 mmHg, where complaints begin. Source: Gau 1998 (read). */
export const BREATH_LIMITS = { caution: pascal(3300), stop: pascal(4700) } as const

/** Peak at the side from which there is a caution, Pa: the end of the strong band. */
export const SIDE_LIMIT = pascal(3300)

/** The band a pressure falls in. A ring is judged at the upper end of its pressure band: a limit reached belongs to the band below it. */
export function holdBand(pressure: Pascal): HoldBand {
  if (pressure < BAND_LIMITS.light) return 'light'
  if (pressure <= BAND_LIMITS.easy) return 'easy'
  if (pressure <= BAND_LIMITS.firm) return 'firm'
  return pressure <= BAND_LIMITS.strong ? 'strong' : 'stop'
}
