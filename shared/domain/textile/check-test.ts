import type { Problem, Result } from '../units/result'
import { fail, succeed } from '../units/result'
import { plainDecimal } from '../units/format'
import { curvePoints, readingStrain, readingTension } from './test'
import type { StretchSpecimen } from './types'

/** No cloth of this trade stretches further; a longer reading is a slip of the pen. Common practice. */
export const LARGEST_STRAIN = 6
/** No stretch cloth of this trade carries more without tearing, N/m: a load above it was typed in another unit. Common practice. */
export const LARGEST_TENSION = 20_000
/** A length may fall by so much of the gauge under a heavier load before it is a slip: reading by eye. Common practice. */
export const READING_SLIP = 0.01
/** Strips of one test that differ by more in width or gauge were typed in different units. Common practice. */
export const STRIPS_ALIKE = 4
/** A strip may shrink by so much of its gauge when it dries or relaxes; below it the length was read or typed wrongly. Common practice. */
export const LARGEST_SHRINKAGE = 0.1

type Refused = { readonly ok: false; readonly problem: Problem }
const problem = (code: string, message: string, todo: string, at: string): Refused => fail({ code, message, todo, at })

/** The first loading reading that is shorter than one under a lighter load, by its place; null where lengths rise with their loads. */
function fallingAt(specimen: StretchSpecimen): number | null {
  const loading = specimen.readings
    .map((reading, place) => ({ reading, place }))
    .filter(({ reading }) => reading.on === 'loading')
    .sort((a, b) => a.reading.load - b.reading.load)
  let longest = -Infinity
  for (const { reading, place } of loading) {
    if (reading.length < longest - READING_SLIP * specimen.gauge) return place
    longest = Math.max(longest, reading.length)
  }
  return null
}

/** The unit in which a length would be possible that is far too short in millimetres; null where none is. */
function meantUnit(length: number, gauge: number): string | null {
  const fits = (factor: number) => length * factor >= gauge && length * factor <= gauge * (1 + LARGEST_STRAIN)
  if (length > 0.5 * gauge) return null
  return fits(10) ? 'cm' : fits(25.4) ? 'inches' : null
}

function checkReadings(specimen: StretchSpecimen, name: string, at: string): Refused | null {
  for (const [row, reading] of specimen.readings.entries()) {
    const here = `${at}.readings.${row}`
    const said = `${name}, reading ${row + 1}`
    if (!(reading.load >= 0 && Number.isFinite(reading.load)))
      return problem('load-impossible', `${said} has no possible load.`, 'Enter the weight with hook and clamp.', `${here}.load`)
    if (readingTension(specimen, reading) > LARGEST_TENSION)
      return problem(
        'units-mixed',
        `${said} has a load of ${plainDecimal(reading.load, 0)} N, which would tear a strip ${plainDecimal(specimen.width, 1)} mm wide.`,
        'Type the unit with the figure: kilograms and grams, or the strip’s width, may be mixed up.',
        `${here}.load`,
      )
    const strain = readingStrain(specimen, reading)
    if (!Number.isFinite(strain) || strain > LARGEST_STRAIN)
      return problem('reading-impossible', `${said} is longer than cloth can stretch.`, 'Check the length and its unit.', `${here}.length`)
    const unit = reading.load > 0 ? meantUnit(reading.length, specimen.gauge) : null
    if (unit)
      return problem(
        'units-mixed',
        `${said} is ${plainDecimal(reading.length, 2)} mm, and the marks were ${plainDecimal(specimen.gauge, 2)} mm apart: it looks like ${unit}.`,
        `Type the length with its unit, such as ${plainDecimal(reading.length, 2)} ${unit === 'cm' ? 'cm' : 'in'}.`,
        `${here}.length`,
      )
    if (reading.load > 0 && reading.on === 'loading' && strain <= 0)
      return problem(
        'reading-shorter',
        `${said} is no longer than the gauge length although a load pulls.`,
        'Read the length between the marks again, or enter cloth that does not stretch as a rigid width.',
        `${here}.length`,
      )
  }
  const fallen = fallingAt(specimen)
  return fallen === null
    ? null
    : problem(
        'length-falls',
        `${name}, reading ${fallen + 1} is shorter than under a lighter load: length cannot fall while the load grows.`,
        'Read the length again, or enter it on the way back if the load was being taken off.',
        `${at}.readings.${fallen}.length`,
      )
}

function checkRest({ restLength, gauge, readings }: StretchSpecimen, name: string, at: string): Refused | null {
  if (restLength === null) return null
  const here = `${at}.restLength`
  if (!(restLength > 0 && Number.isFinite(restLength)))
    return problem('rest-impossible', `${name} has no possible rest length.`, 'Measure between the marks after the rest.', here)
  if (restLength < gauge * (1 - LARGEST_SHRINKAGE))
    return problem(
      'rest-shorter',
      `${name} got shorter: ${plainDecimal(restLength, 2)} mm after the rest, ${plainDecimal(gauge, 2)} mm before any load.`,
      'Measure between the marks again; if a wet strip shrank, take the length of the wet strip as the gauge.',
      here,
    )
  const longest = Math.max(...readings.map((one) => one.length))
  if (restLength > longest + READING_SLIP * gauge)
    return problem(
      'rest-longer',
      `${name} is longer after the rest than under its largest load.`,
      'Measure between the marks again, or check the lengths under load.',
      here,
    )
  return null
}

/** Strips of one test are cut alike: one far wider or longer than the first was typed in another unit. */
function checkAlike(specimens: readonly StretchSpecimen[]): Refused | null {
  for (const [field, more, less] of [
    ['width', 'wide', 'narrow'],
    ['gauge', 'long between its marks', 'short between its marks'],
  ] as const) {
    const first = specimens[0]![field]
    const odd = specimens.findIndex((one) => one[field] > first * STRIPS_ALIKE || one[field] * STRIPS_ALIKE < first)
    if (odd < 0) continue
    const own = specimens[odd]![field]
    const times = plainDecimal(Math.max(own / first, first / own), 1)
    return problem(
      'units-mixed',
      `Specimen ${odd + 1} is ${times} times as ${own > first ? more : less} as specimen 1: units look mixed.`,
      'Type the unit with the figure, such as 50 mm or 2 in.',
      `specimens.${odd}.${field}`,
    )
  }
  return null
}

/**
 * Holds a strip test against what can be: widths, gauges, loads, lengths, rest lengths, and strips that are alike. The first slip found is
 * the problem; `at` is its field.
 */
export function checkStripTest(specimens: readonly StretchSpecimen[]): Result<true> {
  if (specimens.length === 0)
    return problem('no-specimen', 'The test has no specimen.', 'Enter at least one strip; three say how far they spread.', 'specimens')
  for (const [index, { width, gauge }] of specimens.entries()) {
    const name = `Specimen ${index + 1}`
    if (!(width > 0 && Number.isFinite(width)))
      return problem('width-impossible', `${name} has no width.`, 'Measure the strip across.', `specimens.${index}.width`)
    if (!(gauge > 0 && Number.isFinite(gauge)))
      return problem(
        'gauge-impossible',
        `${name} has no gauge length.`,
        'Measure between the marks before any load.',
        `specimens.${index}.gauge`,
      )
  }
  const unlike = checkAlike(specimens)
  if (unlike) return unlike
  for (const [index, specimen] of specimens.entries()) {
    const name = `Specimen ${index + 1}`
    const at = `specimens.${index}`
    const slip = checkReadings(specimen, name, at) ?? checkRest(specimen, name, at)
    if (slip) return slip
  }
  if (curvePoints(specimens).filter((point) => point.strain > 0).length === 0)
    return problem('no-reading', 'The test has no reading under load.', 'Hang a weight and read the length.', 'specimens')
  return succeed(true)
}
