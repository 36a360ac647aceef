import { defineCaution } from './define'
import type { CautionFigure } from './define'

const MAKER = 'A measurement is being checked.'

/** A measurement by its name; `shown` and the limits in the words and units of the screen or the default ones. */
export interface MeasurementFacts {
  readonly name: string
  readonly value: number
  readonly unit: CautionFigure['unit']
  readonly shown: string
}

/** Outside the published adult range. Never blocks. */
export const measurementOutsideRange = defineCaution<
  MeasurementFacts & { readonly limit: number; readonly range: string; readonly from: string }
>('measurement-outside-range', {
  severity: 'caution',
  message: ({ name, shown, range }) => `${name} ${shown} is outside the usual ${range}.`,
  maker: MAKER,
  figure: ({ value, unit }) => ({ value, unit }),
  limit: ({ limit, unit }) => ({ value: limit, unit }),
  source: 'ANSUR II women and ANSUR 1988 women, P1 to P99 widened by half their span; from memory where the catalogue says so',
  todo: 'Measure again; if it stands, keep it.',
  private: true,
})

/** Two measurements that contradict each other. Never blocks. */
export const measurementsContradict = defineCaution<{
  readonly message: string
  readonly value: number
  readonly unit: CautionFigure['unit']
  readonly limit: number
  readonly source: string
}>('measurements-contradict', {
  severity: 'caution',
  message: ({ message }) => message,
  maker: MAKER,
  figure: ({ value, unit }) => ({ value, unit }),
  limit: ({ limit, unit }) => ({ value: limit, unit }),
  source: 'ANSUR II women, differences P1 to P99 widened; from memory where no survey has the pair',
  todo: 'Measure both again; if they stand, keep them.',
  private: true,
})

/** A change since the last measuring that is larger than the observer error by far. Never blocks. */
export const measurementChanged = defineCaution<
  MeasurementFacts & { readonly change: number; readonly limit: number; readonly shownChange: string }
>('measurement-changed', {
  severity: 'caution',
  message: ({ name, shown, shownChange }) => `${name} ${shown} is ${shownChange} than at the last measuring.`,
  maker: MAKER,
  figure: ({ change, unit }) => ({ value: change, unit }),
  limit: ({ limit, unit }) => ({ value: limit, unit }),
  source: 'observer error about 12 mm for girths, 5 to 8 mm for lengths: from memory, order of magnitude',
  todo: 'Measure again; a body changes, and so does a tape that slips.',
  private: true,
})
