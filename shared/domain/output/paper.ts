import { mm } from '../units/brand'
import type { Mm } from '../units/brand'

export type PaperId = 'A4' | 'A3' | 'letter'
export type Orientation = 'portrait' | 'landscape'

/** A paper by its upright size. */
export interface Paper {
  readonly id: PaperId
  readonly name: string
  readonly width: Mm
  readonly height: Mm
}

/** Papers that a print set may be planned on. Sources: ISO 216 (A4, A3); US Letter 8 1/2 by 11 in, ANSI/ASME Y14.1. */
export const PAPERS: Readonly<Record<PaperId, Paper>> = {
  A4: { id: 'A4', name: 'A4', width: mm(210), height: mm(297) },
  A3: { id: 'A3', name: 'A3', width: mm(297), height: mm(420) },
  letter: { id: 'letter', name: 'US Letter', width: mm(215.9), height: mm(279.4) },
}

/** Width and height of a page as it lies in the printer's hand, mm. */
export function pageSize(paper: Paper, orientation: Orientation): { readonly width: Mm; readonly height: Mm } {
  return orientation === 'portrait' ? { width: paper.width, height: paper.height } : { width: paper.height, height: paper.width }
}
