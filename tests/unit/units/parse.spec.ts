import fc from 'fast-check'
import { unit } from 'mathjs'
import { describe, expect, it } from 'vitest'
import { mm, newtonPerMetre, pascal } from '../../../shared/domain/units/brand'
import { gramForcePerCm, mmHgToPascal, poundForcePerInch } from '../../../shared/domain/units/convert'
import { formatLength, formatPercent, formatPressureIn, formatTension, formatDegrees, MINUS } from '../../../shared/domain/units/format'
import {
  parseLength,
  parseLoad,
  parseMass,
  parsePercent,
  parsePlain,
  parsePressure,
  parseTension,
} from '../../../shared/domain/units/parse'

const length = (text: string, bare: 'cm' | 'mm' | 'in' = 'cm') => {
  const parsed = parseLength(text, bare)
  if (!parsed.ok) throw new Error(`${text}: ${parsed.problem.message}`)
  return parsed.value.value
}
const code = (parsed: { ok: boolean; problem?: { code: string; todo: string } }) => {
  expect(parsed.problem?.todo).toBeTruthy()
  return parsed.problem?.code
}

describe('lengths as people type them', () => {
  it.each([
    ['36 1/2 in', 'cm', 927.1],
    ['36½"', 'cm', 927.1],
    ['36½', 'in', 927.1],
    ['36-1/2', 'in', 927.1],
    ['36–1/2 in', 'cm', 927.1],
    ['36 ½ inches', 'cm', 927.1],
    ['½ in', 'cm', 12.7],
    ['92,5', 'cm', 925],
    ['92.5 cm', 'in', 925],
    ['92.5cm', 'in', 925],
    [' 925 mm ', 'in', 925],
    ['925 MM', 'in', 925],
    ['3\' 2"', 'cm', 965.2],
    ['3′ 2″', 'cm', 965.2],
    ['3’ 2”', 'cm', 965.2],
    ['3 ft 2 1/2 in', 'cm', 977.9],
    ["5' 6", 'cm', 1676.4],
    ['1 m 62 cm', 'cm', 1620],
    ['1,68 m', 'cm', 1680],
    ['.5 in', 'cm', 12.7],
    [',5', 'cm', 5],
    ['0', 'cm', 0],
    ['+12 mm', 'cm', 12],
    ['1.250 m', 'cm', 1250],
  ] as const)('%s with %s as the bare unit is %d mm', (text, bare, expected) => {
    expect(length(text, bare)).toBeCloseTo(expected, 9)
  })

  it('echoes what it understood', () => {
    expect(parseLength('36½"', 'cm')).toMatchObject({ ok: true, value: { echo: '36.5 in = 927.1 mm' } })
    expect(parseLength('925 mm', 'cm')).toMatchObject({ ok: true, value: { echo: '925 mm' } })
  })

  it.each([
    ['', 'empty'],
    ['   ', 'empty'],
    ['1,250', 'ambiguous-comma'],
    ['92,500 mm', 'ambiguous-comma'],
    ['-3 cm', 'negative'],
    [`${MINUS}3`, 'negative'],
    ['12 cubits', 'unknown-unit'],
    ['5 kg', 'unknown-unit'],
    ['tall', 'not-a-number'],
    ['1.2.3', 'not-a-number'],
    ['1,250.5', 'not-a-number'],
    ['92 94', 'not-a-number'],
    ['12 cm 3 in', 'mixed-units'],
    ['2" 3\'', 'mixed-units'],
    ['36 1/0 in', 'impossible-number'],
    ['36 5/2 in', 'impossible-number'],
    ['99999999 m', 'impossible-number'],
    ['9'.repeat(400), 'impossible-number'],
    ['NaN', 'not-a-number'],
    ['1e9', 'unknown-unit'],
  ])('%j is refused as %s, with what to do', (text, expected) => {
    expect(code(parseLength(text, 'cm') as never)).toBe(expected)
  })

  it('takes a minus where a displacement is typed', () => {
    expect(parseLength(`${MINUS}1/4 in`, 'cm', { signed: true })).toMatchObject({ ok: true, value: { value: -6.35 } })
  })

  it('offers both readings of an ambiguous comma', () => {
    const parsed = parseLength('1,250 mm', 'mm')
    expect(parsed.ok ? '' : parsed.problem.todo).toBe('Write 1.250 or 1250.')
  })
})

describe('other quantities', () => {
  it('agrees with mathjs on every unit of load, mass and pressure', () => {
    const near = (
      parsed: ReturnType<typeof parseLoad> | ReturnType<typeof parseMass> | ReturnType<typeof parsePressure>,
      expected: number,
      digits: number,
    ) => {
      if (!parsed.ok) throw new Error(parsed.problem.message)
      expect(parsed.value.value / expected).toBeCloseTo(1, digits)
    }
    near(parseLoad('2.5 kg'), unit('2.5 kgf').toNumber('N'), 9)
    near(parseLoad('350', 'g'), unit('0.35 kgf').toNumber('N'), 9)
    near(parseLoad('2 lb'), unit('2 lbf').toNumber('N'), 9)
    near(parseLoad('1 lb 4 oz'), unit('1.25 lbf').toNumber('N'), 9)
    near(parseLoad('50 cN'), 0.5, 9)
    near(parseMass('138 lb'), unit('138 lb').toNumber('kg'), 9)
    near(parseMass('9 st 12 lb'), unit('138 lb').toNumber('kg'), 9)
    near(parsePressure('10 mmHg'), unit('10 mmHg').toNumber('Pa'), 5)
    near(parsePressure('1,3'), 1300, 9)
    expect(poundForcePerInch(1) / unit('1 lbf / in').toNumber('N/m')).toBeCloseTo(1, 9)
    expect(gramForcePerCm(1)).toBeCloseTo(unit('0.001 kgf / cm').toNumber('N/m'), 9)
  })

  it('reads percent as a ratio, tension per width, degrees, years and counts', () => {
    expect(parsePercent('50 %')).toMatchObject({ ok: true, value: { value: 0.5, echo: '50%' } })
    expect(parsePercent('12,5')).toMatchObject({ ok: true, value: { value: 0.125 } })
    expect(parseTension('1.5')).toMatchObject({ ok: true, value: { value: 150 } })
    expect(parseTension('150 N/m')).toMatchObject({ ok: true, value: { value: 150 } })
    expect(parsePlain('21°', 'degree')).toMatchObject({ ok: true, value: { value: 21 } })
    expect(parsePlain('34', 'year')).toMatchObject({ ok: true, value: { value: 34 } })
    expect(parsePlain('3', 'count')).toMatchObject({ ok: true, value: { value: 3, echo: '3' } })
    expect(code(parsePlain('2.5', 'count') as never)).toBe('not-whole')
    expect(code(parsePlain('3 cm', 'count') as never)).toBe('unknown-unit')
    expect(code(parsePressure('2 bar') as never)).toBe('unknown-unit')
    expect(code(parsePlain('400', 'year') as never)).toBe('impossible-number')
  })
})

describe('parse after format', () => {
  const HALF_SIXTEENTH = 25.4 / 32
  it.each([
    ['cm', undefined, 0.5],
    ['mm', undefined, 0.5],
    ['mm', 3, 0.0005],
    ['in', undefined, HALF_SIXTEENTH],
    ['in', 3, 0.0127],
  ] as const)('gives the length back in %s with %s digits', (shown, digits, within) => {
    fc.assert(
      fc.property(fc.double({ min: -3000, max: 3000, noNaN: true }), (value) => {
        const parsed = parseLength(formatLength(mm(value), shown, digits), 'cm', { signed: true })
        expect(parsed.ok && Math.abs(parsed.value.value - value)).toBeLessThanOrEqual(within + 1e-9)
      }),
    )
  })

  it('gives pressure, tension and percent back', () => {
    fc.assert(
      fc.property(fc.double({ min: 0, max: 9000, noNaN: true }), (value) => {
        const kilo = parsePressure(formatPressureIn(pascal(value), 'kPa'))
        const mercury = parsePressure(formatPressureIn(pascal(value), 'mmHg'))
        const pull = parseTension(formatTension(newtonPerMetre(value)))
        const share = parsePercent(formatPercent(value / 9000, 1))
        expect(kilo.ok && Math.abs(kilo.value.value - value)).toBeLessThanOrEqual(5 + 1e-9)
        expect(mercury.ok && Math.abs(mercury.value.value - value)).toBeLessThanOrEqual(mmHgToPascal(0.05) + 1e-9)
        expect(pull.ok && Math.abs(pull.value.value - value)).toBeLessThanOrEqual(0.5 + 1e-9)
        expect(share.ok && Math.abs(share.value.value - value / 9000)).toBeLessThanOrEqual(0.0005 + 1e-9)
      }),
    )
  })

  it('writes fractions, a proper minus and never minus zero', () => {
    expect(formatLength(mm(927.1), 'in')).toBe('36 1/2 in')
    expect(formatLength(mm(-6.35), 'in')).toBe(`${MINUS}1/4 in`)
    expect(formatLength(mm(-0.2), 'in')).toBe('0 in')
    expect(formatLength(mm(-0.2), 'mm')).toBe('0 mm')
    expect(formatLength(mm(25.39), 'in')).toBe('1 in')
    expect(formatLength(mm(925), 'cm')).toBe('92.5 cm')
    expect(formatDegrees(-2.25)).toBe(`${MINUS}2.3°`)
  })
})
