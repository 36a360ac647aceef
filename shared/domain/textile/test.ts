import type { NewtonPerMetre, Strain } from '../units/brand'
import { newtonPerMetre, strain } from '../units/brand'
import { loadOverWidth } from '../units/convert'
import type { Problem, Result } from '../units/result'
import { fail, succeed } from '../units/result'
import type { StretchFigures, StretchReading, StretchSpecimen, StretchTest } from './types'

/** No cloth of this trade stretches further; a longer reading is a slip of the pen. Common practice. */
export const LARGEST_STRAIN = 6

/** Strain of a strip at a reading, (L - L0) / L0. Source: formulas of the ASTM D3107 and EN 14704-1 kind. */
export const readingStrain = (specimen: StretchSpecimen, reading: StretchReading): Strain =>
  strain((reading.length - specimen.gauge) / specimen.gauge)

/** Tension of a strip at a reading, load over width, N/m. */
export const readingTension = (specimen: StretchSpecimen, reading: StretchReading): NewtonPerMetre =>
  loadOverWidth(reading.load, specimen.width)

/** The reading under the largest load; null for a specimen without any. */
export function largestReading(specimen: StretchSpecimen): StretchReading | null {
  return specimen.readings.reduce<StretchReading | null>((best, reading) => (best && best.load >= reading.load ? best : reading), null)
}

/** Stretch, growth and recovery of one specimen at its largest load; null where it was not read. Source: the same formulas. */
export function specimenFigures(specimen: StretchSpecimen): StretchFigures | null {
  const top = largestReading(specimen)
  if (!top) return null
  const { gauge, restLength } = specimen
  return {
    stretch: readingStrain(specimen, top),
    growth: restLength === null ? null : strain((restLength - gauge) / gauge),
    recovery: restLength === null || top.length <= gauge ? null : (top.length - restLength) / (top.length - gauge),
    testTension: readingTension(specimen, top),
  }
}

const mean = (values: readonly number[]): number => values.reduce((sum, value) => sum + value, 0) / values.length

function meanOf(figures: readonly StretchFigures[], pick: (one: StretchFigures) => number | null): number | null {
  const values = figures.map(pick).filter((value): value is number => value !== null)
  return values.length === 0 ? null : mean(values)
}

/** Figures of a whole test, means over its specimens. A label-only test has a stretch and nothing else. */
export function testFigures(test: StretchTest): StretchFigures {
  if (test.kind === 'label') return { stretch: test.stretch, growth: null, recovery: null, testTension: null }
  const each = test.specimens.map(specimenFigures).filter((one): one is StretchFigures => one !== null)
  const growth = meanOf(each, (one) => one.growth)
  const tension = meanOf(each, (one) => one.testTension)
  return {
    stretch: strain(meanOf(each, (one) => one.stretch) ?? 0),
    growth: growth === null ? null : strain(growth),
    recovery: meanOf(each, (one) => one.recovery),
    testTension: tension === null ? null : newtonPerMetre(tension),
  }
}

/** A point of the load curve as read: which specimen, its strain, its tension. */
export interface TestPoint {
  readonly strain: Strain
  readonly tension: NewtonPerMetre
  readonly specimen: number
}

/**
 * The points a load curve is fitted to. Where every specimen was read on the way back too, the return readings count (a garment holds on the
 * return) together with the turning point, the reading under the largest load; else the loading ones.
 */
export function curvePoints(specimens: readonly StretchSpecimen[]): readonly TestPoint[] {
  const onReturn =
    specimens.length > 0 && specimens.every((one) => one.readings.some((reading) => reading.on === 'return' && reading.load > 0))
  return specimens.flatMap((specimen, index) => {
    const top = largestReading(specimen)
    return specimen.readings
      .filter((reading) => reading.load > 0 && (onReturn ? reading.on === 'return' || reading === top : reading.on === 'loading'))
      .map((reading) => ({ strain: readingStrain(specimen, reading), tension: readingTension(specimen, reading), specimen: index }))
  })
}

const problem = (code: string, message: string, todo: string, at: string): { readonly ok: false; readonly problem: Problem } =>
  fail({ code, message, todo, at })

/** A length may fall by so much of the gauge under a heavier load before it is a slip: reading by eye. Common practice. */
const READING_SLIP = 0.01

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

/** Holds a strip test against what can be: widths, gauges, loads, lengths. The first slip found is the problem. */
export function checkStripTest(specimens: readonly StretchSpecimen[]): Result<true> {
  if (specimens.length === 0)
    return problem('no-specimen', 'The test has no specimen.', 'Enter at least one strip; three say how far they spread.', 'specimens')
  for (const [index, specimen] of specimens.entries()) {
    const name = `Specimen ${index + 1}`
    const at = `specimens.${index}`
    if (!(specimen.width > 0 && Number.isFinite(specimen.width)))
      return problem('width-impossible', `${name} has no width.`, 'Measure the strip across.', `${at}.width`)
    if (!(specimen.gauge > 0 && Number.isFinite(specimen.gauge))) {
      return problem('gauge-impossible', `${name} has no gauge length.`, 'Measure between the marks before any load.', `${at}.gauge`)
    }
    for (const [row, reading] of specimen.readings.entries()) {
      const here = `${at}.readings.${row}`
      if (!(reading.load >= 0 && Number.isFinite(reading.load))) {
        return problem(
          'load-impossible',
          `${name}, reading ${row + 1} has no possible load.`,
          'Enter the weight with hook and clamp.',
          `${here}.load`,
        )
      }
      const at0 = readingStrain(specimen, reading)
      if (!Number.isFinite(at0) || at0 > LARGEST_STRAIN) {
        return problem(
          'reading-impossible',
          `${name}, reading ${row + 1} is longer than cloth can stretch.`,
          'Check the length and its unit.',
          `${here}.length`,
        )
      }
      if (reading.load > 0 && reading.on === 'loading' && at0 <= 0) {
        return problem(
          'reading-shorter',
          `${name}, reading ${row + 1} is no longer than the gauge length although a load pulls.`,
          'Read the length between the marks again, or enter cloth that does not stretch as a rigid width.',
          `${here}.length`,
        )
      }
    }
    const fallen = fallingAt(specimen)
    if (fallen !== null) {
      return problem(
        'length-falls',
        `${name}, reading ${fallen + 1} is shorter than under a lighter load: length cannot fall while the load grows.`,
        'Read the length again, or enter it on the way back if the load was being taken off.',
        `${at}.readings.${fallen}.length`,
      )
    }
    if (specimen.restLength !== null && !(specimen.restLength > 0 && Number.isFinite(specimen.restLength))) {
      return problem(
        'rest-impossible',
        `${name} has no possible rest length.`,
        'Measure between the marks after the rest.',
        `${at}.restLength`,
      )
    }
  }
  if (curvePoints(specimens).filter((point) => point.strain > 0).length === 0) {
    return problem('no-reading', 'The test has no reading under load.', 'Hang a weight and read the length.', 'specimens')
  }
  return succeed(true)
}
