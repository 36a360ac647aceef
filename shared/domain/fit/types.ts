import type { LevelId } from '../body/types'
import type { Mm, Newton, NewtonPerMetre } from '../units/brand'

/** How it felt at a level, in the wearer's words. It never changes a figure. */
export type Feel = 'loose' | 'right' | 'close' | 'hard' | 'hurts'

/** One level of a fitting. */
export interface FittingLevel {
  readonly level: LevelId
  /** The lacing gap that was seen, mm; null where the level closed as drafted, or was not looked at. */
  readonly gap: Mm | null
  readonly feel: Feel | null
  /** A spring scale on a tab of known width, edges brought to the gap. */
  readonly pull: { readonly force: Newton; readonly tab: Mm } | null
}

/** What a fitting says of one level. */
export interface LevelReading {
  readonly level: LevelId
  readonly name: string
  /** Tension that the level's cloth has at the gap seen, by its test, N/m. */
  readonly model: NewtonPerMetre
  /** What was drafted for, N/m. */
  readonly wanted: NewtonPerMetre
  /** Share of the common tension: 1 is in step with the other levels, above is tight. */
  readonly share: number
  /** To let out (above 0) or take in so that it is in step with the others, whole girth, mm; null where the solve says nothing. */
  readonly letOut: Mm | null
  readonly measured: NewtonPerMetre | null
}

export interface FittingReading {
  readonly levels: readonly LevelReading[]
  /** The level that is tightest against the others, when one is tight at all. */
  readonly tightest: LevelId | null
  /** Null where no pull was taken: the stiffness is unknown and stays as it was. */
  readonly stiffness: LearntStiffness | null
}

export interface LearntStiffness {
  readonly factor: number
  readonly uncertainty: number
  readonly pulls: number
  readonly isOdd: boolean
  /** Levels of the plan that was pulled, those without a pull among them: what the factor holds for. */
  readonly levels: readonly LevelId[]
  /** Pulls of another plan, which say nothing here. */
  readonly left: number
}
