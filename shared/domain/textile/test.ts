import type { NewtonPerMetre, Strain } from '../units/brand'
import { newtonPerMetre, strain } from '../units/brand'
import { loadOverWidth } from '../units/convert'
import type { StretchFigures, StretchReading, StretchSpecimen, StretchTest } from './types'

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

/** Loads of several specimens so near to each other are one test load: weights and scales are read no truer. Common practice. */
export const SAME_LOAD = 0.02

/**
 * The reading of each specimen that stands for the test load: at the largest load that every specimen was read at while it went on, so that
 * their stretch can be compared; where they share none, each at its own largest. Null for a specimen without readings.
 */
export function testReadings(specimens: readonly StretchSpecimen[]): readonly (StretchReading | null)[] {
  const loading = (specimen: StretchSpecimen) => specimen.readings.filter((one) => one.on === 'loading' && one.load > 0)
  const near = (load: number) => (one: StretchReading) => Math.abs(one.load - load) <= SAME_LOAD * load
  const [first, ...others] = specimens
  const shared = (first ? loading(first) : [])
    .filter(({ load }) => others.every((one) => loading(one).some(near(load))))
    .reduce((most, { load }) => Math.max(most, load), 0)
  return specimens.map((one) => (shared > 0 ? loading(one).findLast(near(shared))! : largestReading(one)))
}

/**
 * Stretch and tension of one specimen at a reading, its largest unless told; growth and recovery after the rest, recovery of the stretch at
 * its largest load. Null where it was not read. Source: the same formulas.
 */
export function specimenFigures(specimen: StretchSpecimen, at = largestReading(specimen)): StretchFigures | null {
  const top = largestReading(specimen)
  if (!top || !at) return null
  const { gauge, restLength } = specimen
  return {
    stretch: readingStrain(specimen, at),
    growth: restLength === null ? null : strain((restLength - gauge) / gauge),
    recovery: restLength === null || top.length <= gauge ? null : (top.length - restLength) / (top.length - gauge),
    testTension: readingTension(specimen, at),
  }
}

/** Figures of each specimen at the test load. */
export function eachFigures(specimens: readonly StretchSpecimen[]): readonly (StretchFigures | null)[] {
  const readings = testReadings(specimens)
  return specimens.map((one, index) => specimenFigures(one, readings[index]))
}

const mean = (values: readonly number[]): number => values.reduce((sum, value) => sum + value, 0) / values.length

function meanOf(figures: readonly StretchFigures[], pick: (one: StretchFigures) => number | null): number | null {
  const values = figures.map(pick).filter((value): value is number => value !== null)
  return values.length === 0 ? null : mean(values)
}

/** Figures of a whole test, means over its specimens at the test load. A label-only test has a stretch and nothing else. */
export function testFigures(test: StretchTest): StretchFigures {
  if (test.kind === 'label') return { stretch: test.stretch, growth: null, recovery: null, testTension: null }
  const each = eachFigures(test.specimens).filter((one): one is StretchFigures => one !== null)
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
