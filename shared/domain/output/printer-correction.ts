import { fail, succeed } from '../units/result'
import type { Result } from '../units/result'

export interface PrinterCorrection {
  /** Printed over true: .97 when 100 mm measure 97 mm. */
  readonly scale: number
  /** What to print at to be true: 1.0309 then. */
  readonly correction: number
}

/** A print further off than this is a wrong paper setting or a misread rule, not a printer to be corrected. */
export const MOST_SCALE_ERROR = 0.15

/** What a printer makes of a length that should be `nominal` mm and measures `measured` mm. */
export function printerCorrection(nominal: number, measured: number): Result<PrinterCorrection> {
  const scale = measured / nominal
  if (!(Math.abs(scale - 1) <= MOST_SCALE_ERROR))
    return fail({
      code: 'scale-unlikely',
      message: `${measured} mm for a side of ${nominal} mm is too far off to correct.`,
      todo: 'Measure again, and print at actual size without fitting to the page.',
      at: 'measured',
    })
  return succeed({ scale, correction: 1 / scale })
}
