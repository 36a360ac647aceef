import { cautions } from '../cautions/registry'
import type { Caution } from '../cautions/types'
import { mm } from '../units/brand'
import { fixedDecimal, formatDegrees, formatLength, formatMass } from '../units/format'
import type { MeasurementEntry } from './catalogue'
import { MEASUREMENT_CATALOGUE, measurementEntry } from './catalogue'
import type { MeasuredValues, MeasurementKey } from './types'

/** Observer error of a repeated girth and of a length or width, mm. From memory, order of magnitude. */
export const OBSERVER_ERROR = { girth: 12, length: 8 } as const
/** Two measurings that differ by less than this many observer errors count as the same. From memory. */
export const SAME_WITHIN = 2
/** A change beyond this many observer errors is asked about. A setting. */
export const CHANGE_FAR = 4

/** How the figures are said, and for whom. */
export interface MeasuringOptions {
  readonly unit?: 'cm' | 'in'
  /** The published ranges are an adult's: a child's values are not held against them. */
  readonly child?: boolean
}

const shown = (entry: MeasurementEntry, value: number, unit: 'cm' | 'in'): string => {
  if (entry.unit === 'length') return formatLength(mm(value), unit)
  if (entry.unit === 'degree') return formatDegrees(value)
  return entry.unit === 'mass' ? formatMass(value) : `${fixedDecimal(value, 0)} years`
}

const FIGURE_UNIT = { length: 'mm', degree: 'degree', mass: 'count', year: 'count' } as const

/** Observer error of a measurement, mm; null for what is not a length. */
export function observerError(key: MeasurementKey): number | null {
  const entry = measurementEntry(key)
  if (entry.unit !== 'length') return null
  return entry.group === 'girths' ? OBSERVER_ERROR.girth : OBSERVER_ERROR.length
}

/** Whether two values of a measurement count as the same: they differ by under twice the observer error. False for what is not a length. */
export function isSameMeasured(key: MeasurementKey, one: number, other: number): boolean {
  const error = observerError(key)
  return error === null ? one === other : Math.abs(one - other) < SAME_WITHIN * error
}

/** A pair of measurements: `one - other` is usually between low and high, mm. */
interface Pair {
  readonly one: MeasurementKey
  readonly other: MeasurementKey
  readonly low: number
  readonly high: number
  readonly source: string
}

/** P1 and P99 of a surveyed difference widened by a fifth of the span between them. */
const surveyedPair = (one: MeasurementKey, other: MeasurementKey, p1: number, p99: number): Pair => ({
  one,
  other,
  low: p1 - (p99 - p1) / 5,
  high: p99 + (p99 - p1) / 5,
  source: 'ANSUR II women, difference P1 to P99 widened by a fifth of its span',
})

const rememberedPair = (one: MeasurementKey, other: MeasurementKey, low: number, high: number): Pair => ({
  one,
  other,
  low,
  high,
  source: 'from memory, order of magnitude',
})

/** ANSUR 1988: the natural waist is on average 66 mm smaller than the waist at the navel. */
const NATURAL_WAIST_SMALLER = 66

const PAIRS: readonly Pair[] = [
  surveyedPair('bustGirth', 'navelWaistGirth', -49, 203),
  { ...surveyedPair('bustGirth', 'waistGirth', -49, 203 + NATURAL_WAIST_SMALLER), low: -49 - 252 / 5 },
  surveyedPair('hipGirth', 'bustGirth', -68, 209),
  surveyedPair('hipGirth', 'navelWaistGirth', 9, 289),
  { ...surveyedPair('hipGirth', 'waistGirth', 9, 289 + NATURAL_WAIST_SMALLER), low: 9 - 280 / 5 },
  rememberedPair('navelWaistGirth', 'waistGirth', -30, 220),
  rememberedPair('bustGirth', 'underbustGirth', 20, 320),
  rememberedPair('underbustGirth', 'waistGirth', -160, 220),
  rememberedPair('bustGirth', 'upperBustGirth', -60, 260),
  rememberedPair('hipGirth', 'highHipGirth', -60, 240),
  rememberedPair('frontWaistLength', 'neckShoulderToBustPoint', 80, 240),
  rememberedPair('frontWaistLength', 'backWaistLength', -20, 130),
  rememberedPair('backWaistLength', 'sideWaistLength', 120, 280),
  rememberedPair('acrossBack', 'acrossFront', -30, 110),
  rememberedPair('upperArmGirth', 'elbowGirth', -30, 180),
  rememberedPair('elbowGirth', 'wristGirth', 30, 160),
  rememberedPair('hipGirth', 'thighGirth', 250, 600),
]

function outsideRange(entry: MeasurementEntry, value: number, unit: 'cm' | 'in'): Caution | null {
  const { low, high } = entry.range
  if (value >= low && value <= high) return null
  return cautions.measurementOutsideRange(
    { kind: 'body', measurement: entry.key },
    {
      name: entry.name,
      value,
      unit: FIGURE_UNIT[entry.unit],
      shown: shown(entry, value, unit),
      limit: value < low ? low : high,
      range: `${shown(entry, low, unit)} to ${shown(entry, high, unit)}`,
      from: entry.range.source,
    },
  )
}

function contradicts(pair: Pair, values: MeasuredValues, unit: 'cm' | 'in'): Caution | null {
  const one = values[pair.one]?.value
  const other = values[pair.other]?.value
  if (one === undefined || other === undefined) return null
  const difference = one - other
  if (difference >= pair.low && difference <= pair.high) return null
  const over = difference > 0
  return cautions.measurementsContradict(
    { kind: 'body', measurement: pair.one },
    {
      message: `${measurementEntry(pair.one).name} is ${formatLength(mm(Math.abs(difference)), unit)} ${over ? 'more' : 'less'} than ${measurementEntry(pair.other).name.toLowerCase()}.`,
      value: difference,
      unit: 'mm',
      limit: difference < pair.low ? pair.low : pair.high,
      source: pair.source,
    },
  )
}

function changed(entry: MeasurementEntry, value: number, before: number | undefined, unit: 'cm' | 'in'): Caution | null {
  const error = observerError(entry.key)
  if (error === null || before === undefined) return null
  const change = value - before
  if (Math.abs(change) <= CHANGE_FAR * error) return null
  return cautions.measurementChanged(
    { kind: 'body', measurement: entry.key },
    {
      name: entry.name,
      value,
      unit: 'mm',
      shown: shown(entry, value, unit),
      change,
      limit: CHANGE_FAR * error,
      shownChange: `${formatLength(mm(Math.abs(change)), unit)} ${change > 0 ? 'more' : 'less'}`,
    },
  )
}

/**
 * What of a measuring asks to be measured again: values outside the published adult range, pairs that contradict each other, changes since
 * the last measuring larger than the observer error by far. Cautions, never stops: a measuring is saved all the same.
 */
export function checkMeasuring(
  values: MeasuredValues,
  previous?: MeasuredValues | null,
  options: MeasuringOptions = {},
): readonly Caution[] {
  const unit = options.unit ?? 'cm'
  const found: (Caution | null)[] = []
  for (const entry of MEASUREMENT_CATALOGUE) {
    const value = values[entry.key]?.value
    if (value === undefined) continue
    if (!options.child) found.push(outsideRange(entry, value, unit))
    found.push(changed(entry, value, previous?.[entry.key]?.value, unit))
  }
  if (!options.child) for (const pair of PAIRS) found.push(contradicts(pair, values, unit))
  return found.filter((one): one is Caution => one !== null)
}
