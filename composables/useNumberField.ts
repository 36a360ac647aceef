import type { Mm, Newton, NewtonPerMetre, Pascal } from '#shared/domain/units/brand'
import { mmToCm, newtonToKilogramForce } from '#shared/domain/units/convert'
import {
  formatDegrees,
  formatLength,
  formatMass,
  formatPercent,
  formatPressureIn,
  formatTension,
  plainDecimal,
} from '#shared/domain/units/format'
import type { ParseProblem, Parsed } from '#shared/domain/units/parse'
import { parseLength, parseLoad, parseMass, parsePercent, parsePlain, parsePressure, parseTension } from '#shared/domain/units/parse'
import type { Result } from '#shared/domain/units/result'

/** Largest difference at which typed text still stands for a stored value: below what any tape or scale shows. */
const SAME = 1e-6

/** What a number field holds. Values are in the domain's unit: mm (`signed` takes amounts below 0), N, kg, a ratio, degrees, a count, years, Pa, N/m; `plain` any number. */
export type NumberKind = 'length' | 'signed' | 'load' | 'mass' | 'percent' | 'degree' | 'count' | 'year' | 'pressure' | 'tension' | 'plain'
export type LengthUnit = 'cm' | 'in' | 'mm'
export type LoadUnit = 'N' | 'g' | 'kg' | 'lb'

export interface NumberFieldUnits {
  readonly length: LengthUnit
  readonly load: LoadUnit
}

/** Reads what was typed, by kind, in the person's units. */
export function readNumber(text: string, kind: NumberKind, units: NumberFieldUnits): Result<Parsed<number>, ParseProblem> {
  switch (kind) {
    case 'length':
      return parseLength(text, units.length)
    case 'signed':
      return parseLength(text, units.length, { signed: true })
    case 'load':
      return parseLoad(text, units.load)
    case 'mass':
      return parseMass(text, 'kg')
    case 'percent':
      return parsePercent(text)
    case 'pressure':
      return parsePressure(text)
    case 'tension':
      return parseTension(text)
    case 'plain': {
      const parsed = parsePercent(text)
      return parsed.ok ? { ok: true, value: { value: parsed.value.value * 100, echo: plainDecimal(parsed.value.value * 100, 4) } } : parsed
    }
    default:
      return parsePlain(text, kind)
  }
}

/** A length no coarser than a tape shows it: 0.55 mm of thickness and 92.75 cm of girth must not read as 1 mm and 92.8 cm. */
function writeLength(value: Mm, unit: LengthUnit): string {
  if (unit === 'mm') return `${plainDecimal(value, 2)} mm`
  const tenths = formatLength(value, unit)
  const exact = unit === 'in' || Math.abs(value - Math.round(value)) < SAME
  return exact ? tenths : `${plainDecimal(mmToCm(value), 3)} cm`
}

/** A stored value as the person reads it, with its unit. */
export function writeNumber(value: number, kind: NumberKind, units: NumberFieldUnits): string {
  switch (kind) {
    case 'length':
    case 'signed':
      return writeLength(value as Mm, units.length)
    case 'load':
      if (units.load === 'N') return `${plainDecimal(value, 3)} N`
      if (units.load === 'lb') return `${plainDecimal(newtonToKilogramForce(value as Newton) / 0.45359237, 3)} lb`
      return units.load === 'g'
        ? `${plainDecimal(newtonToKilogramForce(value as Newton) * 1000, 1)} g`
        : `${plainDecimal(newtonToKilogramForce(value as Newton), 4)} kg`
    case 'mass':
      return formatMass(value)
    case 'percent':
      return formatPercent(value, 1)
    case 'degree':
      return formatDegrees(value)
    case 'pressure':
      return formatPressureIn(value as Pascal, 'kPa')
    case 'tension':
      return formatTension(value as NewtonPerMetre)
    case 'year':
      return `${plainDecimal(value, 1)} years`
    default:
      return plainDecimal(value, 4)
  }
}

/** Whether the text, read in these units, gives the value: text typed before a change of unit may not. */
export function standsFor(text: string, value: number | null, kind: NumberKind, units: NumberFieldUnits): boolean {
  if (text.trim() === '') return value === null
  const parsed = readNumber(text, kind, units)
  return value !== null && parsed.ok && Math.abs(parsed.value.value - value) <= SAME * Math.max(1, Math.abs(value))
}
