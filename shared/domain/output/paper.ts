import { mm } from '../units/brand'
import type { Mm } from '../units/brand'
import { fail, succeed, type Result } from '../units/result'

export const PAPER_IDS = ['A4', 'A3', 'A2', 'A1', 'A0', 'letter', 'legal', 'tabloid', 'typed', 'roll-841', 'roll-914', 'roll-36in'] as const
export type PaperId = (typeof PAPER_IDS)[number]
export type Orientation = 'portrait' | 'landscape'

/** A paper by its upright size. */
export interface Paper {
  readonly id: PaperId
  readonly name: string
  readonly width: Mm
  /** Of a roll: as long as what is printed on it; 0 until that is known. */
  readonly height: Mm
}

/**
 * Papers that a print set may be planned on. Sources: ISO 216 (A series); US Letter, Legal and Tabloid 8 1/2 by 11, 8 1/2 by 14, 11 by 17 in,
 * ANSI/ASME Y14.1; rolls by their widths as sold (841 and 914 mm, 36 in).
 */
export const PAPERS: Readonly<Record<Exclude<PaperId, 'typed'>, Paper>> = {
  A4: { id: 'A4', name: 'A4', width: mm(210), height: mm(297) },
  A3: { id: 'A3', name: 'A3', width: mm(297), height: mm(420) },
  A2: { id: 'A2', name: 'A2', width: mm(420), height: mm(594) },
  A1: { id: 'A1', name: 'A1', width: mm(594), height: mm(841) },
  A0: { id: 'A0', name: 'A0', width: mm(841), height: mm(1189) },
  letter: { id: 'letter', name: 'US Letter', width: mm(215.9), height: mm(279.4) },
  legal: { id: 'legal', name: 'US Legal', width: mm(215.9), height: mm(355.6) },
  tabloid: { id: 'tabloid', name: 'US Tabloid', width: mm(279.4), height: mm(431.8) },
  'roll-841': { id: 'roll-841', name: 'roll of 841 mm', width: mm(841), height: mm(0) },
  'roll-914': { id: 'roll-914', name: 'roll of 914 mm', width: mm(914), height: mm(0) },
  'roll-36in': { id: 'roll-36in', name: 'roll of 36 in', width: mm(914.4), height: mm(0) },
}

export const isRoll = (id: PaperId): boolean => id.startsWith('roll-')

/** The longest page that readers of PDF open, mm: 14,400 points (ISO 32000-1, annex C). */
export const LONGEST_PAGE = 5080
/** Sides of a typed paper, mm. */
export const TYPED_SIDES = { least: 120, most: 2000 }

/** A paper by its id; a typed one needs its two sides, mm. */
export function paperOf(id: PaperId, width?: number, height?: number): Result<Paper> {
  if (id !== 'typed') return succeed(PAPERS[id])
  for (const [at, side] of [
    ['width', width],
    ['height', height],
  ] as const) {
    if (side === undefined || !(side >= TYPED_SIDES.least && side <= TYPED_SIDES.most))
      return fail({
        code: 'paper-size-unlikely',
        message: 'A paper of this size cannot be planned.',
        todo: `Type sides from ${TYPED_SIDES.least} to ${TYPED_SIDES.most} mm.`,
        at,
      })
  }
  const size = `${Number(width!.toFixed(1))} × ${Number(height!.toFixed(1))} mm`
  return succeed({ id, name: size, width: mm(width!), height: mm(height!) })
}

/** Width and height of a page as it lies in the printer's hand, mm. */
export function pageSize(paper: Paper, orientation: Orientation): { readonly width: Mm; readonly height: Mm } {
  return orientation === 'portrait' ? { width: paper.width, height: paper.height } : { width: paper.height, height: paper.width }
}
