import { mm } from '../units/brand'
import { fail, succeed } from '../units/result'
import type { Result } from '../units/result'
import type { Orientation, Paper } from './paper'

export interface PrinterCorrection {
  /** Printed over true: .97 when 100 mm measure 97 mm. */
  readonly scale: number
  /** What to print at to be true: 1.0309 then. */
  readonly correction: number
}

/** A print further off than this is a wrong paper setting or a misread rule, not a printer to be corrected. */
export const MOST_SCALE_ERROR = 0.1

/** What a printer makes of a length that should be `nominal` mm and measures `measured` mm. */
export function printerCorrection(nominal: number, measured: number): Result<PrinterCorrection> {
  const scale = measured / nominal
  if (!(Math.abs(scale - 1) <= MOST_SCALE_ERROR + 1e-9))
    return fail({
      code: 'scale-unlikely',
      message: `${measured} mm for a side of ${nominal} mm is more than 10 % off: a wrong setting or a misread rule, not a printer to correct.`,
      todo: 'Measure again, and print at actual size without fitting to the page.',
      at: 'measured',
    })
  return succeed({ scale, correction: 1 / scale })
}

/** A printer that was measured, by its name: how much larger to print across and along its paper to be true. */
export interface CorrectedPrinter {
  readonly name: string
  readonly across: number
  readonly along: number
}

/** The paper in the printer's own millimetres: what is planned on it comes out true once it is printed larger by the correction. */
export function correctedPaper(paper: Paper, printer: CorrectedPrinter | null): Paper {
  if (!printer) return paper
  return { ...paper, width: mm(paper.width / printer.across), height: mm(paper.height / printer.along) }
}

/** By how much a page is printed larger from side to side and up and down: a page that lies has its paper turned. */
export function pageScale(printer: CorrectedPrinter | null, orientation: Orientation): { readonly x: number; readonly y: number } {
  if (!printer) return { x: 1, y: 1 }
  return orientation === 'portrait' ? { x: printer.across, y: printer.along } : { x: printer.along, y: printer.across }
}

/** `corrected for the hall printer: across 1.0120, along 0.9980`. */
export const correctionWords = ({ name, across, along }: CorrectedPrinter): string =>
  `corrected for ${name}: across ${across.toFixed(4)}, along ${along.toFixed(4)}`
