import type { Mm, Newton, NewtonPerMetre, Pascal, Strain } from './brand'
import { mm, newton, newtonPerMetre, pascal, strain } from './brand'
import {
  GRAM_PER_POUND,
  MM_PER_INCH,
  OUNCE_PER_POUND,
  PASCAL_PER_MMHG,
  POUND_PER_STONE,
  gramForcePerCm,
  poundForcePerInch,
  STANDARD_GRAVITY,
} from './convert'
import { plainDecimal } from './format'
import type { ParseProblem, ParsedTerm } from './parse-number'
import { parseTerms } from './parse-number'
import type { Result } from './result'
import { fail, succeed } from './result'

export type { ParseProblem, ParseProblemCode } from './parse-number'

/** What was understood: the value in the domain's unit, and an echo to show beside the field. */
export interface Parsed<T> {
  readonly value: T
  readonly echo: string
}

/** Whether a minus is allowed: displacements may be negative, measurements may not. */
export interface ParseOptions {
  readonly signed?: boolean
}

interface UnitTable {
  /** By what is typed, lower case: the unit's name in the echo and its factor to the base unit. */
  readonly units: Readonly<Record<string, { readonly name: string; readonly factor: number; readonly next?: string }>>
  readonly base: { readonly name: string; readonly digits: number }
  readonly known: string
  readonly example: string
  /** Largest value that can be meant, in the base unit. */
  readonly largest: number
}

const spellings = <V>(names: string, entry: V): Record<string, V> => Object.fromEntries(names.split(' ').map((name) => [name, entry]))

const LENGTH: UnitTable = {
  units: {
    ...spellings('mm millimetre millimetres millimeter millimeters', { name: 'mm', factor: 1 }),
    ...spellings('cm centimetre centimetres centimeter centimeters', { name: 'cm', factor: 10 }),
    ...spellings('m metre metres meter meters', { name: 'm', factor: 1000, next: 'cm' }),
    ...spellings('in inch inches "', { name: 'in', factor: MM_PER_INCH }),
    ...spellings("ft foot feet '", { name: 'ft', factor: 12 * MM_PER_INCH, next: 'in' }),
    ...spellings('yd yard yards', { name: 'yd', factor: 36 * MM_PER_INCH, next: 'in' }),
  },
  base: { name: 'mm', digits: 2 },
  known: 'mm, cm, m, in and ft',
  example: '92.5 cm or 36 1/2 in',
  largest: 1_000_000,
}

const GRAM_NEWTON = STANDARD_GRAVITY / 1000

const LOAD: UnitTable = {
  units: {
    ...spellings('n newton newtons', { name: 'N', factor: 1 }),
    ...spellings('cn', { name: 'cN', factor: 0.01 }),
    ...spellings('mn', { name: 'mN', factor: 0.001 }),
    ...spellings('kn', { name: 'kN', factor: 1000 }),
    ...spellings('g gf gram grams', { name: 'g', factor: GRAM_NEWTON }),
    ...spellings('kg kgf kilogram kilograms kilo kilos', { name: 'kg', factor: STANDARD_GRAVITY, next: 'g' }),
    ...spellings('lb lbs lbf pound pounds', { name: 'lb', factor: GRAM_PER_POUND * GRAM_NEWTON, next: 'oz' }),
    ...spellings('oz ounce ounces', { name: 'oz', factor: (GRAM_PER_POUND / OUNCE_PER_POUND) * GRAM_NEWTON }),
  },
  base: { name: 'N', digits: 3 },
  known: 'N, cN, g, kg, lb and oz',
  example: '500 g or 4.9 N',
  largest: 100_000,
}

const MASS: UnitTable = {
  units: {
    ...spellings('g gram grams', { name: 'g', factor: 0.001 }),
    ...spellings('kg kilogram kilograms kilo kilos', { name: 'kg', factor: 1, next: 'g' }),
    ...spellings('lb lbs pound pounds', { name: 'lb', factor: GRAM_PER_POUND / 1000, next: 'oz' }),
    ...spellings('oz ounce ounces', { name: 'oz', factor: GRAM_PER_POUND / OUNCE_PER_POUND / 1000 }),
    ...spellings('st stone stones', { name: 'st', factor: (POUND_PER_STONE * GRAM_PER_POUND) / 1000, next: 'lb' }),
  },
  base: { name: 'kg', digits: 2 },
  known: 'kg, g, lb, oz and st',
  example: '62.5 kg or 138 lb',
  largest: 1000,
}

const PERCENT: UnitTable = {
  units: spellings('% percent', { name: '%', factor: 1 }),
  base: { name: '%', digits: 2 },
  known: '%',
  example: '50 %',
  largest: 1000,
}

const PRESSURE: UnitTable = {
  units: {
    ...spellings('pa pascal pascals', { name: 'Pa', factor: 1 }),
    ...spellings('hpa', { name: 'hPa', factor: 100 }),
    ...spellings('kpa', { name: 'kPa', factor: 1000 }),
    ...spellings('mmhg', { name: 'mmHg', factor: PASCAL_PER_MMHG }),
  },
  base: { name: 'Pa', digits: 1 },
  known: 'kPa, Pa and mmHg',
  example: '1.3 kPa or 10 mmHg',
  largest: 1_000_000,
}

const TENSION: UnitTable = {
  units: {
    ...spellings('n/m', { name: 'N/m', factor: 1 }),
    ...spellings('n/cm', { name: 'N/cm', factor: 100 }),
    ...spellings('cn/cm', { name: 'cN/cm', factor: 1 }),
    ...spellings('g/cm gf/cm', { name: 'g/cm', factor: gramForcePerCm(1) }),
    ...spellings('lb/in lbf/in', { name: 'lb/in', factor: poundForcePerInch(1) }),
  },
  base: { name: 'N/m', digits: 2 },
  known: 'N/cm, N/m, g/cm and lb/in',
  example: '1.5 N/cm',
  largest: 1_000_000,
}

const COUNT: UnitTable = { units: {}, base: { name: '', digits: 0 }, known: 'none', example: '2', largest: 10_000 }
const DEGREE: UnitTable = {
  units: spellings('° deg degree degrees', { name: '°', factor: 1 }),
  base: { name: '°', digits: 2 },
  known: '°',
  example: '21°',
  largest: 360,
}
const YEAR: UnitTable = {
  units: spellings('y yr yrs year years', { name: 'years', factor: 1 }),
  base: { name: 'years', digits: 1 },
  known: 'years',
  example: '34',
  largest: 130,
}

const refuse = (code: ParseProblem['code'], message: string, todo: string): { readonly ok: false; readonly problem: ParseProblem } =>
  fail({ code, message, todo })

function parseQuantity(text: string, table: UnitTable, bare: string, options: ParseOptions): Result<Parsed<number>, ParseProblem> {
  const terms = parseTerms(text, table.example, options.signed)
  if (!terms.ok) return terms
  let total = 0
  let previous: { readonly name: string; readonly factor: number; readonly next?: string } | undefined
  const echoed: string[] = []
  for (const term of terms.value as readonly ParsedTerm[]) {
    const spelled = term.unit !== '' ? term.unit : (previous?.next ?? (previous ? '' : bare.toLowerCase()))
    const unit =
      table.units[spelled] ??
      (spelled === '' && table.units !== undefined && bare === '' && !previous ? { name: '', factor: 1 } : undefined)
    if (!unit) {
      if (term.unit === '') {
        return refuse('not-a-number', `“${text.trim()}” holds more than one number.`, `Write one value, such as ${table.example}.`)
      }
      return refuse(
        'unknown-unit',
        `The unit “${term.unit}” is not known here.`,
        `Known units are ${table.known}. Write, for example, ${table.example}.`,
      )
    }
    if (previous && previous.next !== unit.name) {
      return refuse(
        'mixed-units',
        `“${text.trim()}” mixes ${previous.name} and ${unit.name}.`,
        `Write it in one unit, such as ${table.example}.`,
      )
    }
    total += term.value * unit.factor
    echoed.push(`${plainDecimal(term.value, 4)}${unit.name === '%' || unit.name === '' || unit.name === '°' ? '' : ' '}${unit.name}`)
    previous = unit
  }
  if (Math.abs(total) > table.largest) {
    return refuse(
      'impossible-number',
      `${echoed.join(' ')} is more than can be meant here.`,
      `Check the number and its unit; write, for example, ${table.example}.`,
    )
  }
  const inBase = `${plainDecimal(total, table.base.digits)} ${table.base.name}`.trim()
  const said = echoed.join(' ')
  return succeed({ value: total, echo: previous?.name === table.base.name ? said : `${said} = ${inBase}` })
}

const branded = <T>(parsed: Result<Parsed<number>, ParseProblem>, brand: (value: number) => T): Result<Parsed<T>, ParseProblem> =>
  parsed.ok ? succeed({ value: brand(parsed.value.value), echo: parsed.value.echo }) : parsed

/**
 * A typed length to mm. Understands `36 1/2 in`, `36½"`, `36-1/2`, `92,5`, `92.5 cm`, `925 mm`, `3' 2"`; a number without a unit is
 * read in `unit`. A single comma with exactly three digits behind it is asked back.
 */
export const parseLength = (text: string, unit: 'cm' | 'mm' | 'in', options: ParseOptions = {}): Result<Parsed<Mm>, ParseProblem> =>
  branded(parseQuantity(text, LENGTH, unit, options), mm)

/** A typed load or hanging weight to N; masses pull with standard gravity. */
export const parseLoad = (
  text: string,
  unit: 'N' | 'cN' | 'g' | 'kg' | 'lb' | 'oz' = 'N',
  options: ParseOptions = {},
): Result<Parsed<Newton>, ParseProblem> => branded(parseQuantity(text, LOAD, unit, options), newton)

/** A typed mass to kg. */
export const parseMass = (text: string, unit: 'kg' | 'g' | 'lb' = 'kg', options: ParseOptions = {}): Result<Parsed<number>, ParseProblem> =>
  parseQuantity(text, MASS, unit, options)

/** A typed percentage to a ratio: `50` and `50 %` give .5. */
export const parsePercent = (text: string, options: ParseOptions = {}): Result<Parsed<Strain>, ParseProblem> =>
  branded(parseQuantity(text, PERCENT, '%', options), (value) => strain(value / 100))

/** A typed pressure to Pa. */
export const parsePressure = (
  text: string,
  unit: 'kPa' | 'Pa' | 'mmHg' = 'kPa',
  options: ParseOptions = {},
): Result<Parsed<Pascal>, ParseProblem> => branded(parseQuantity(text, PRESSURE, unit, options), pascal)

/** A typed tension, force per width of cloth, to N/m. */
export const parseTension = (
  text: string,
  unit: 'N/cm' | 'N/m' = 'N/cm',
  options: ParseOptions = {},
): Result<Parsed<NewtonPerMetre>, ParseProblem> => branded(parseQuantity(text, TENSION, unit, options), newtonPerMetre)

/** A typed plain number: a count (whole), degrees, or years. */
export function parsePlain(
  text: string,
  kind: 'count' | 'degree' | 'year',
  options: ParseOptions = {},
): Result<Parsed<number>, ParseProblem> {
  const table = kind === 'count' ? COUNT : kind === 'degree' ? DEGREE : YEAR
  const parsed = parseQuantity(text, table, kind === 'count' ? '' : table.base.name, options)
  if (parsed.ok && kind === 'count' && !Number.isInteger(parsed.value.value)) {
    return refuse('not-whole', `${parsed.value.echo} is not a whole number.`, 'Write a whole number, such as 2.')
  }
  return parsed
}
