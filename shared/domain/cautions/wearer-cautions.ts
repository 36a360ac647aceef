import type { Pascal } from '../units/brand'
import { formatPressure } from '../units/format'
import type { CautionFigure } from './define'
import { defineCaution } from './define'

const MAKER = 'Limit set for this wearer.'
const PRACTICE = 'practice of the trade made careful; a licensed practitioner’s word and local rules go first'
const pa = (value: number): CautionFigure => ({ value, unit: 'Pa' })

/** A ring against a wearer's cap; `why` names the flags in words for owner and drafter. */
export interface CapFacts {
  readonly ring: string
  readonly pressure: Pascal
  readonly limit: Pascal
  readonly why: string
}

/** Pressure at rest above the wearer's cap. */
export const wearerCapAtRest = defineCaution<CapFacts>('wearer-cap-at-rest', {
  severity: 'stop',
  message: ({ ring, pressure, limit, why }) =>
    `${ring} may press up to ${formatPressure(pressure)}; this wearer’s limit is ${formatPressure(limit)} (${why}).`,
  maker: MAKER,
  figure: ({ pressure }) => pa(pressure),
  limit: ({ limit }) => pa(limit),
  source: PRACTICE,
  todo: 'Cut the ring larger or take a lighter layer plan; the limit stands whoever asks.',
  clearable: false,
  private: true,
})

/** Pressure at a deep breath above the wearer's cap. */
export const wearerCapInBreath = defineCaution<CapFacts>('wearer-cap-in-breath', {
  severity: 'stop',
  message: ({ ring, pressure, limit, why }) =>
    `${ring} may press up to ${formatPressure(pressure)} at a deep breath; this wearer’s limit is ${formatPressure(limit)} (${why}).`,
  maker: MAKER,
  figure: ({ pressure }) => pa(pressure),
  limit: ({ limit }) => pa(limit),
  source: PRACTICE,
  todo: 'Take a lighter layer plan, so that a breath adds less; the limit stands whoever asks.',
  clearable: false,
  private: true,
})

/** Rigid layers stop the breath of a wearer with a cap: the hold then has no upper end. */
export const wearerBreathStopped = defineCaution<{ readonly ring: string; readonly short: number }>('wearer-breath-stopped', {
  severity: 'stop',
  message: ({ ring, short }) => `${ring}: rigid layers stop this wearer’s breath ${short.toFixed(1)} mm before it is full.`,
  maker: MAKER,
  figure: ({ short }) => ({ value: short, unit: 'mm' }),
  limit: () => ({ value: 0, unit: 'mm' }),
  source: PRACTICE,
  todo: 'Let that ring stretch, or cut its rigid layers larger; the limit stands whoever asks.',
  clearable: false,
  private: true,
})

/** The hold asked for was lowered to a wearer's cap before the cut was solved. */
export const holdLowered = defineCaution<{ readonly ring: string; readonly hold: Pascal; readonly asked: Pascal }>('hold-lowered', {
  severity: 'note',
  message: ({ ring, hold, asked }) =>
    `${ring}: the hold asked for, ${formatPressure(asked)}, was lowered to ${formatPressure(hold)} for this wearer’s limit.`,
  maker: MAKER,
  figure: ({ hold }) => pa(hold),
  limit: ({ asked }) => pa(asked),
  source: PRACTICE,
  todo: 'Leave it; the upper end of the hold now meets the limit, at a deep breath too.',
  private: true,
})

/** A flagged wearer without the recorded agreement of a licensed practitioner. */
export const wearerNotAgreed = defineCaution<{ readonly why: string }>('wearer-not-agreed', {
  severity: 'stop',
  message: ({ why }) => `No licensed practitioner’s agreement is recorded (${why}).`,
  maker: MAKER,
  source: PRACTICE,
  todo: 'Ask the wearer to speak with a licensed practitioner, and record the agreement before anything is cut.',
  clearable: false,
  private: true,
})

/** A bone, wire or hard edge over the breast of a nursing wearer. */
export const wearerRigidOverBreast = defineCaution<{ readonly ring: string; readonly rigid: number }>('wearer-rigid-over-breast', {
  severity: 'stop',
  message: ({ ring }) => `${ring}: no bone, wire or hard edge over the breast while nursing.`,
  maker: MAKER,
  figure: ({ rigid }) => ({ value: rigid, unit: 'mm' }),
  limit: () => ({ value: 0, unit: 'mm' }),
  source: PRACTICE,
  todo: 'Take the rigid width out of the rings from the top edge to the underbust.',
  clearable: false,
  private: true,
})

/** A measuring too old for a pregnancy. */
export const wearerMeasuringOld = defineCaution<{ readonly days: number; readonly limit: number }>('wearer-measuring-old', {
  severity: 'caution',
  message: ({ days, limit }) => `The measuring is ${days} days old; measure again after ${limit} days in pregnancy.`,
  maker: 'The measuring is being renewed.',
  figure: ({ days }) => ({ value: days, unit: 'count' }),
  limit: ({ limit }) => ({ value: limit, unit: 'count' }),
  source: 'workroom rule without a source',
  todo: 'Measure again before cutting.',
  private: true,
})

/** No age is known, so the waist is held to the lowest limit. */
export const wearerAgeUnknown = defineCaution<Record<string, never>>('wearer-age-unknown', {
  severity: 'note',
  message: () => 'The wearer’s age is not known: the waist is held to 15 mmHg.',
  maker: MAKER,
  source: 'tolerable waistband pressure by age, J. Home Econ. Jpn series (read)',
  todo: 'Enter the age if the wearer is willing to give it.',
  private: true,
})
