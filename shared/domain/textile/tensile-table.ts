/** Units that machines write beside load and extension, and their factor to N and mm. A percentage is of the clamp distance. */
const LOAD_UNITS = { N: 1, kN: 1000, cN: 0.01, kgf: 9.80665, gf: 0.00980665, lbf: 4.4482216152605 } as const
const LENGTH_UNITS = { mm: 1, cm: 10, m: 1000, in: 25.4, '%': null } as const
export type TensileLoadUnit = keyof typeof LOAD_UNITS
export type TensileLengthUnit = keyof typeof LENGTH_UNITS
export const TENSILE_LOAD_UNITS = Object.keys(LOAD_UNITS) as readonly TensileLoadUnit[]
export const TENSILE_LENGTH_UNITS = Object.keys(LENGTH_UNITS) as readonly TensileLengthUnit[]

/** Which columns hold load and extension, and their units; null where it has to be asked. */
export interface TensileColumns {
  readonly load: number | null
  readonly loadUnit: TensileLoadUnit | null
  readonly extension: number | null
  readonly lengthUnit: TensileLengthUnit | null
}

const LOAD_WORDS = /\b(load|force|pull)\b/i
const LENGTH_WORDS = /\b(extension|elongation|displacement|travel|strain|stretch)\b/i

/** The unit written in a heading, in brackets, after a slash or as its last word: `Load (N)`, `extension / mm`, `Force kgf`. */
function unitIn<U extends string>(heading: string, units: readonly U[]): U | null {
  const found = [/[([]\s*([^)\]]+?)\s*[)\]]/, /\/\s*(\S+)\s*$/, /\s(\S+)\s*$/].map((form) => form.exec(heading)?.[1]).find(Boolean)
  const said = (found ?? '').toLowerCase()
  const same: Readonly<Record<string, string>> = {
    inch: 'in',
    inches: 'in',
    '"': 'in',
    kg: 'kgf',
    g: 'gf',
    lb: 'lbf',
    lbs: 'lbf',
    percent: '%',
  }
  return units.find((unit) => unit.toLowerCase() === (same[said] ?? said)) ?? null
}

/** A unit named twice counts when both names agree. */
const agreed = <U extends string>(one: U | null, other: U | null): U | null => (one && other && one !== other ? null : (one ?? other))

/**
 * Reads headings, and a row of units below them where there is one. What is not recognised, or said in two
 * ways, is left to be asked.
 */
export function recogniseColumns(headings: readonly string[], below: readonly string[] = []): TensileColumns {
  const find = (words: RegExp) => {
    const at = headings.findIndex((heading) => words.test(heading))
    return at < 0 ? null : at
  }
  const load = find(LOAD_WORDS)
  const extension = find(LENGTH_WORDS)
  const unitOf = <U extends string>(at: number | null, units: readonly U[]) =>
    at === null ? null : agreed(unitIn(headings[at]!, units), unitIn(` ${below[at] ?? ''}`, units))
  return { load, loadUnit: unitOf(load, TENSILE_LOAD_UNITS), extension, lengthUnit: unitOf(extension, TENSILE_LENGTH_UNITS) }
}

/** A number as machines write it, with a decimal point or a decimal comma, and the other one between thousands; NaN for anything else. */
export function machineNumber(text: string): number {
  const plain = text.trim()
  if (plain === '') return Number.NaN
  const comma = plain.lastIndexOf(',')
  const point = plain.lastIndexOf('.')
  if (comma < 0) return Number(plain)
  if (point < 0) return Number(plain.replace(',', '.'))
  return Number(comma > point ? plain.replaceAll('.', '').replace(',', '.') : plain.replaceAll(',', ''))
}

/** Load in N. */
export const machineLoad = (value: number, unit: TensileLoadUnit): number => value * LOAD_UNITS[unit]

/** Extension in mm; a percentage is of the clamp distance. */
export const machineExtension = (value: number, unit: TensileLengthUnit, gauge: number): number =>
  unit === '%' ? (value / 100) * gauge : value * LENGTH_UNITS[unit]
