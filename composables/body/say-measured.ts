import { measurementEntry } from '#shared/domain/body/catalogue'
import type { MeasurementKey } from '#shared/domain/body/types'
import { mm } from '#shared/domain/units/brand'
import { fixedDecimal, formatDegrees, formatLength, formatMass } from '#shared/domain/units/format'

/** A stored measurement as the person reads it. */
export function sayMeasured(key: MeasurementKey, value: number, unit: 'cm' | 'in'): string {
  switch (measurementEntry(key).unit) {
    case 'length':
      return formatLength(mm(value), unit)
    case 'degree':
      return formatDegrees(value)
    case 'mass':
      return formatMass(value)
    case 'year':
      return `${fixedDecimal(value, 0)} years`
  }
}
