import type { Mm, Newton, NewtonPerMetre, Pascal } from './brand'
import { newtonToKilogramForce, mmToCm, mmToInch, pascalToKilopascal, pascalToMmHg, tensionToNewtonPerCm } from './convert'

/** U+2212, the minus that is as wide as a digit. */
export const MINUS = '\u2212'
/** Inches are shown to the nearest sixteenth, as tapes are ruled. */
export const INCH_PARTS = 16

/** A decimal with a point and a proper minus, at most `digits` behind the point, trailing zeros left out. Never minus zero. */
export function plainDecimal(value: number, digits: number): string {
  const fixed = Math.abs(value).toFixed(digits)
  const trimmed = fixed.includes('.') ? fixed.replace(/\.?0+$/, '') : fixed
  return value < 0 && trimmed !== '0' ? `${MINUS}${trimmed}` : trimmed
}

/** A decimal with exactly `digits` behind the point and a proper minus. Never minus zero. */
export function fixedDecimal(value: number, digits: number): string {
  const fixed = Math.abs(value).toFixed(digits)
  return value < 0 && Number(fixed) !== 0 ? `${MINUS}${fixed}` : fixed
}

function inchFraction(inches: number): string {
  const parts = Math.round(Math.abs(inches) * INCH_PARTS)
  const whole = Math.floor(parts / INCH_PARTS)
  let top = parts % INCH_PARTS
  let bottom = INCH_PARTS
  while (top > 0 && top % 2 === 0) {
    top /= 2
    bottom /= 2
  }
  const sign = inches < 0 && parts > 0 ? MINUS : ''
  if (top === 0) return `${sign}${whole}`
  return whole === 0 ? `${sign}${top}/${bottom}` : `${sign}${whole} ${top}/${bottom}`
}

/** The number of a length without its unit; see `formatLength`. */
export function formatLengthNumber(length: Mm, unit: 'cm' | 'in' | 'mm', digits?: number): string {
  if (unit === 'in') return digits === undefined ? inchFraction(mmToInch(length)) : fixedDecimal(mmToInch(length), digits)
  return unit === 'cm' ? fixedDecimal(mmToCm(length), digits ?? 1) : fixedDecimal(length, digits ?? 0)
}

/**
 * A length as the person reads it. Without `digits`: cm to one decimal, mm whole, inches as a fraction to the nearest sixteenth
 * (at most 0.8 mm off). With `digits`: decimals, inches too.
 */
export const formatLength = (length: Mm, unit: 'cm' | 'in' | 'mm', digits?: number): string =>
  `${formatLengthNumber(length, unit, digits)} ${unit}`

/** A pressure in one unit, kPa to two decimals or mmHg to one. */
export const formatPressureIn = (pressure: Pascal, unit: 'kPa' | 'mmHg', digits?: number): string =>
  unit === 'kPa'
    ? `${fixedDecimal(pascalToKilopascal(pressure), digits ?? 2)} kPa`
    : `${fixedDecimal(pascalToMmHg(pressure), digits ?? 1)} mmHg`

/** A pressure in both units the trade reads: `0.90 kPa (6.8 mmHg)`. */
export const formatPressure = (pressure: Pascal): string => `${formatPressureIn(pressure, 'kPa')} (${formatPressureIn(pressure, 'mmHg')})`

/** A tension, force per width of cloth, in N/cm. */
export const formatTension = (tension: NewtonPerMetre, digits = 2): string => `${fixedDecimal(tensionToNewtonPerCm(tension), digits)} N/cm`

/** A load in N, or as the weight that pulls as hard. */
export const formatLoad = (load: Newton, unit: 'N' | 'kg' = 'N', digits = 2): string =>
  unit === 'N' ? `${fixedDecimal(load, digits)} N` : `${fixedDecimal(newtonToKilogramForce(load), digits)} kg`

/** A ratio as a percentage: .25 gives `25 %`. */
export const formatPercent = (ratio: number, digits = 0): string => `${fixedDecimal(ratio * 100, digits)} %`

/** Degrees to one decimal. */
export const formatDegrees = (degrees: number, digits = 1): string => `${fixedDecimal(degrees, digits)}°`

/** A mass in kg. */
export const formatMass = (kilograms: number, digits = 1): string => `${fixedDecimal(kilograms, digits)} kg`
