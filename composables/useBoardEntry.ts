import type { Alteration, MoveAlteration, PointRole } from '#shared/domain/draft/types'
import { sameRole } from '#shared/domain/document/commands'
import type { Mm } from '#shared/domain/units/brand'
import { mm } from '#shared/domain/units/brand'
import { formatLengthNumber } from '#shared/domain/units/format'
import { parseLength } from '#shared/domain/units/parse'
import type { Problem, Result } from '#shared/domain/units/result'
import { succeed } from '#shared/domain/units/result'
import type { BoardUnit } from './useBoardWords'

/** Unit in which small moves are typed when none is written: mm, or inches. */
export const entryUnit = (unit: BoardUnit): 'mm' | 'in' => (unit === 'in' ? 'in' : 'mm')

/** A typed displacement: signed, empty is no displacement. */
export function parseMove(text: string, unit: BoardUnit): Result<{ readonly value: Mm; readonly echo: string }, Problem> {
  if (text.trim() === '') return succeed({ value: mm(0), echo: '0' })
  return parseLength(text, entryUnit(unit), { signed: true })
}

/** A displacement as it is typed: tenths of a mm, thousandths of an inch. */
export const moveText = (value: number, unit: BoardUnit): string => formatLengthNumber(mm(value), entryUnit(unit), unit === 'in' ? 3 : 1)

/** What the alterations that are on move a point by, mm in the piece's frame; with `carry` given only those of that way of carrying. */
export function moveOf(alterations: readonly Alteration[], role: PointRole, carry?: boolean): { readonly dx: number; readonly dy: number } {
  return alterations
    .filter(
      (one): one is MoveAlteration =>
        one.kind === 'move' && one.on && sameRole(one.role, role) && (carry === undefined || one.carry === carry),
    )
    .reduce((sum, { dx, dy }) => ({ dx: sum.dx + dx, dy: sum.dy + dy }), { dx: 0, dy: 0 })
}
