import fc from 'fast-check'
import { unit } from 'mathjs'
import { describe, expect, it } from 'vitest'
import {
  cmToMm,
  gramForce,
  gramForcePerCm,
  inchToMm,
  kilogramForce,
  loadOverWidth,
  mmHgToPascal,
  mmToCm,
  mmToInch,
  newtonPerCm,
  newtonToKilogramForce,
  ounceForce,
  pascalToMmHg,
  poundForce,
  poundForcePerInch,
  tensionToNewtonPerCm,
} from '../../../shared/domain/units/convert'
import { parseLength, parseLoad, parseTension } from '../../../shared/domain/units/parse'
import { mm, newton, newtonPerMetre, pascal } from '../../../shared/domain/units/brand'

const positive = fc.double({ min: 1e-3, max: 1e4, noNaN: true })
/** Conversions go through one or two exact factors: nothing but rounding may be lost. */
const EXACT = 12

describe('units there and back', () => {
  const pairs: readonly (readonly [name: string, there: (value: number) => number, back: (value: number) => number])[] = [
    ['in', inchToMm, (value) => mmToInch(mm(value))],
    ['cm', cmToMm, (value) => mmToCm(mm(value))],
    ['kg', kilogramForce, (value) => newtonToKilogramForce(newton(value))],
    ['N/cm', newtonPerCm, (value) => tensionToNewtonPerCm(newtonPerMetre(value))],
    ['mmHg', mmHgToPascal, (value) => pascalToMmHg(pascal(value))],
  ]
  it.each(pairs)('%s', (_, there, back) => {
    fc.assert(
      fc.property(positive, (value) => {
        expect(back(there(value)) / value).toBeCloseTo(1, EXACT)
      }),
    )
  })

  it('loads and tensions typed in one unit read the same in another', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 100_000 }), (grams) => {
        const read = (text: string) => {
          const parsed = parseLoad(text, 'g')
          if (!parsed.ok) throw new Error(parsed.problem.message)
          return parsed.value.value
        }
        expect(read(`${grams} g`) / read(`${grams / 1000} kg`)).toBeCloseTo(1, 9)
        expect(read(`${grams} g`) / gramForce(grams)).toBeCloseTo(1, EXACT)
      }),
    )
  })
})

/** mathjs keeps its own table of units; its gram is a mass, so loads are compared by way of its kilogram-force and pound-force. */
describe('units against mathjs', () => {
  it('loads', () => {
    fc.assert(
      fc.property(positive, (value) => {
        expect(kilogramForce(value) / unit(value, 'kgf').toNumber('N')).toBeCloseTo(1, 9)
        expect(gramForce(value) / unit(value / 1000, 'kgf').toNumber('N')).toBeCloseTo(1, 9)
        expect(poundForce(value) / unit(value, 'lbf').toNumber('N')).toBeCloseTo(1, 9)
        expect(ounceForce(value) / unit(value / 16, 'lbf').toNumber('N')).toBeCloseTo(1, 9)
      }),
    )
  })

  it('tensions of a strip', () => {
    fc.assert(
      fc.property(positive, fc.double({ min: 5, max: 500, noNaN: true }), (load, width) => {
        const other = unit(load, 'N').toNumber('N') / unit(width, 'mm').toNumber('m')
        expect(loadOverWidth(newton(load), mm(width)) / other).toBeCloseTo(1, EXACT)
        expect(poundForcePerInch(load) / (unit(load, 'lbf').toNumber('N') / unit(1, 'inch').toNumber('m'))).toBeCloseTo(1, 9)
        expect(gramForcePerCm(load) / (unit(load / 1000, 'kgf').toNumber('N') / unit(1, 'cm').toNumber('m'))).toBeCloseTo(1, 9)
      }),
    )
  })

  it('what is typed with its unit', () => {
    const typed = (parsed: { ok: boolean; value?: { value: number } }) => parsed.value?.value
    expect(typed(parseLoad('1 lb 4 oz', 'kg'))).toBeCloseTo(unit(1.25, 'lbf').toNumber('N'), 6)
    expect(typed(parseLoad('250 cN', 'kg'))).toBeCloseTo(2.5, EXACT)
    expect(typed(parseLength('2 in', 'mm'))).toBeCloseTo(unit(2, 'inch').toNumber('mm'), EXACT)
    expect(typed(parseTension('2 lb/in'))).toBeCloseTo((unit(2, 'lbf').toNumber('N') / 25.4) * 1000, 6)
  })
})
