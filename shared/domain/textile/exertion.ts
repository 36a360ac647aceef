import type { Mm } from '../units/brand'
import { mm } from '../units/brand'
import { BREATH_BY_LEVEL, type DefaultLevel } from './defaults'

/** What the garment is worn for, by how deep it makes its wearer breathe. */
export type Activity = 'at rest' | 'walking' | 'singing' | 'dancing' | 'sport'

export const ACTIVITIES: readonly Activity[] = ['at rest', 'walking', 'singing', 'dancing', 'sport']

/**
 * How much more than a deep breath at rest the girth grows, as a factor on it. Assumptions without a source, a setting: no series was found
 * that measures the girth of a body in these activities.
 */
export const EXERTION_FACTOR: Readonly<Record<Activity, number>> = {
  'at rest': 1,
  walking: 1,
  singing: 1.25,
  dancing: 1.25,
  sport: 1.5,
}

/** Added to the girth of a level by the deepest breath of an activity, mm: the breath at rest, from memory, times an assumed factor. */
export const breathOf = (level: DefaultLevel, activity: Activity = 'at rest'): Mm => mm(BREATH_BY_LEVEL[level] * EXERTION_FACTOR[activity])
