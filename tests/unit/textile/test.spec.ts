import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { checkStripTest } from '../../../shared/domain/textile/check-test'
import { fitLoadCurve } from '../../../shared/domain/textile/curve'
import { angleOf, directionKey, directionWords, nearestDirection, typedDirection } from '../../../shared/domain/textile/direction'
import { testRepeats } from '../../../shared/domain/textile/repeats'
import { rulerStretch } from '../../../shared/domain/textile/ruler'
import { testFigures, testReadings } from '../../../shared/domain/textile/test'
import { curveFigureWorking, testWorking } from '../../../shared/domain/textile/test-working'
import { layerCloth } from '../../../shared/domain/textile/cloth'
import type { StretchReading, StretchSpecimen, StretchTest } from '../../../shared/domain/textile/types'
import { mm, newton, strain } from '../../../shared/domain/units/brand'
import { must } from './cloths'

type Row = readonly [load: number, length: number, on?: StretchReading['on']]
const specimen = (rows: readonly Row[], rest: number | null = null, width = 50, gauge = 100): StretchSpecimen => ({
  width: mm(width),
  gauge: mm(gauge),
  readings: rows.map(([load, length, on = 'loading']) => ({ load: newton(load), length: mm(length), on })),
  restLength: rest === null ? null : mm(rest),
})
const strip = (...specimens: readonly StretchSpecimen[]): StretchTest => ({
  kind: 'strip',
  direction: 'crosswise',
  state: 'dry',
  specimens,
})
const GOOD: readonly Row[] = [
  [2, 110],
  [5, 125],
  [10, 150],
]

/** Every entry that cannot be is a value with its own code, its field and a next step; nothing is thrown and nothing is computed from it. */
describe('bad input of a strip', () => {
  const cases: readonly (readonly [what: string, specimens: readonly StretchSpecimen[], code: string, at: string])[] = [
    ['no strip at all', [], 'no-specimen', 'specimens'],
    ['zero width', [specimen(GOOD, null, 0)], 'width-impossible', 'specimens.0.width'],
    ['zero gauge', [specimen(GOOD, null, 50, 0)], 'gauge-impossible', 'specimens.0.gauge'],
    ['a negative load', [specimen([[-1, 110]])], 'load-impossible', 'specimens.0.readings.0.load'],
    ['a load that is no number', [specimen([[Number.NaN, 110]])], 'load-impossible', 'specimens.0.readings.0.load'],
    ['length beyond any cloth', [specimen([[5, 800]])], 'reading-impossible', 'specimens.0.readings.0.length'],
    ['a strip that got shorter under load', [specimen([[5, 99]])], 'reading-shorter', 'specimens.0.readings.0.length'],
    [
      'length that falls while the load grows',
      [
        specimen([
          [2, 130],
          [5, 120],
        ]),
      ],
      'length-falls',
      'specimens.0.readings.1.length',
    ],
    [
      'load that falls while the length grows',
      [
        specimen([
          [5, 110],
          [2, 140],
        ]),
      ],
      'length-falls',
      'specimens.0.readings.0.length',
    ],
    ['a strip shorter after the rest', [specimen(GOOD, 80)], 'rest-shorter', 'specimens.0.restLength'],
    ['longer after the rest than under load', [specimen(GOOD, 160)], 'rest-longer', 'specimens.0.restLength'],
    ['a rest length of nothing', [specimen(GOOD, 0)], 'rest-impossible', 'specimens.0.restLength'],
    ['lengths in cm beside marks in mm', [specimen([[5, 12]])], 'units-mixed', 'specimens.0.readings.0.length'],
    ['lengths in inches beside marks in mm', [specimen([[5, 5]])], 'units-mixed', 'specimens.0.readings.0.length'],
    ['a width in inches', [specimen(GOOD), specimen(GOOD, null, 2)], 'units-mixed', 'specimens.1.width'],
    ['a gauge in cm', [specimen(GOOD), specimen([[5, 12]], null, 50, 10)], 'units-mixed', 'specimens.1.gauge'],
    ['kilograms for grams', [specimen([[500 * 9.80665, 125]])], 'units-mixed', 'specimens.0.readings.0.load'],
    ['no reading under load', [specimen([[0, 100]])], 'no-reading', 'specimens'],
  ]
  it.each(cases)('%s', (_, specimens, code, at) => {
    const checked = checkStripTest(specimens)
    expect(checked).toMatchObject({ ok: false, problem: { code, at } })
    if (checked.ok) return
    expect(checked.problem.message).toMatch(/[.]$/)
    expect(checked.problem.todo).toMatch(/[.]$/)
    expect(fitLoadCurve(strip(...specimens)).ok).toBe(false)
  })

  it('takes one point as a straight line, and says so by its points', () => {
    const curve = must(fitLoadCurve(strip(specimen([[10, 150]]))))
    expect(curve).toMatchObject({ kind: 'cubic', b: 0, specimens: 1 })
    expect(curve.points).toHaveLength(1)
    expect(curve.a).toBeCloseTo(10 / 0.05 / 0.5, 9)
  })

  it('never throws, whatever figures are typed', () => {
    let read = 0
    const number = fc.oneof(
      { arbitrary: fc.integer({ min: 50, max: 200 }), weight: 12 },
      fc.double(),
      fc.constantFrom(0, -1, Infinity, Number.NaN, 1e9),
    )
    const reading = fc.record({ load: number, length: number, on: fc.constantFrom('loading' as const, 'return' as const) })
    const any = fc.record({ width: number, gauge: number, readings: fc.array(reading, { maxLength: 6 }), restLength: fc.option(number) })
    fc.assert(
      fc.property(fc.array(any, { maxLength: 4 }), (specimens) => {
        const fitted = fitLoadCurve(strip(...(specimens as unknown as StretchSpecimen[])))
        if (!fitted.ok) {
          expect(fitted.problem.todo).toBeTruthy()
          return
        }
        read++
        expect(fitted.value.a).toBeGreaterThanOrEqual(0)
        expect(fitted.value.b).toBeGreaterThanOrEqual(0)
        expect(Number.isFinite(fitted.value.testedTo)).toBe(true)
      }),
      { numRuns: 2000 },
    )
    expect(read).toBeGreaterThan(20)
  })
})

describe('a ruler pull', () => {
  it('gives a stretch, and no load', () => {
    expect(must(rulerStretch(mm(100), mm(150)))).toBeCloseTo(0.5, 12)
    const test: StretchTest = {
      kind: 'label',
      direction: 'bias',
      state: 'dry',
      stretch: strain(0.5),
      ruler: { rest: mm(100), drawn: mm(150) },
    }
    expect(must(fitLoadCurve(test))).toMatchObject({ kind: 'assumed', specimens: 0, points: [] })
    expect(testWorking(test, testFigures(test), 'stretch')).toMatchObject({ result: { value: 50, unit: 'percent' } })
    expect(testWorking(test, testFigures(test), 'testTension')).toBeNull()
  })

  it.each([
    [0, 10, 'gauge-impossible', 'ruler.rest'],
    [100, 100, 'reading-shorter', 'ruler.drawn'],
    [100, 90, 'reading-shorter', 'ruler.drawn'],
    [100, 800, 'reading-impossible', 'ruler.drawn'],
    [100, Number.NaN, 'reading-shorter', 'ruler.drawn'],
  ])('of %d to %d is refused at its field', (rest, drawn, code, at) => {
    expect(rulerStretch(mm(rest), mm(drawn))).toMatchObject({ ok: false, problem: { code, at } })
    const test: StretchTest = {
      kind: 'label',
      direction: 'bias',
      state: 'dry',
      stretch: strain(0.5),
      ruler: { rest: mm(rest), drawn: mm(drawn) },
    }
    expect(fitLoadCurve(test)).toMatchObject({ ok: false, problem: { code } })
  })
})

describe('repeats', () => {
  const three = strip(specimen(GOOD, 103), specimen([...GOOD.slice(0, 2), [10, 154]], 104), specimen([...GOOD.slice(0, 2), [10, 146]], 102))

  it('give the mean, the deviation over n - 1, and the ends', () => {
    const { stretch, growth, testTension } = testRepeats(three)
    expect(stretch).toMatchObject({ count: 3, least: 0.46, most: 0.54 })
    expect(stretch!.mean).toBeCloseTo(0.5, 12)
    expect(stretch!.deviation).toBeCloseTo(0.04, 12)
    expect(growth!.deviation).toBeCloseTo(0.01, 12)
    expect(testTension!.deviation).toBeCloseTo(0, 12)
    expect(testRepeats(strip(specimen(GOOD)))).toMatchObject({ stretch: { count: 1, deviation: null }, growth: null, recovery: null })
    expect(testRepeats({ kind: 'label', direction: 'bias', state: 'dry', stretch: strain(0.4) }).stretch).toBeNull()
  })

  it('are compared at the load that every specimen was read at', () => {
    const uneven = [specimen(GOOD), specimen([GOOD[0]!, [5.05, 127]])]
    expect(testReadings(uneven).map((one) => one!.length)).toEqual([125, 127])
    expect(testFigures(strip(...uneven)).stretch).toBeCloseTo(0.26, 12)
    const unlike = [specimen([[4, 120]]), specimen([[5, 130]])]
    expect(testReadings(unlike).map((one) => one!.load)).toEqual([4, 5])
  })

  it('keep recovery that of the largest load, whatever load is shared', () => {
    const [one] = [specimen(GOOD, 103)]
    const figures = testFigures(strip(one!, specimen([GOOD[0]!], 101)))
    expect(figures.stretch).toBeCloseTo(0.1, 12)
    expect(figures.recovery).toBeCloseTo((47 / 50 + 9 / 10) / 2, 12)
  })
})

describe('a strip’s direction', () => {
  it('is a name, or an angle with the name nearest to it', () => {
    expect(typedDirection(0)).toEqual({ direction: 'lengthwise' })
    expect(typedDirection(45.4)).toEqual({ direction: 'bias' })
    expect(typedDirection(30)).toEqual({ direction: 'bias', angle: 30 })
    expect(typedDirection(80)).toEqual({ direction: 'crosswise', angle: 80 })
    expect(directionWords({ direction: 'bias', angle: 30 })).toBe('30° from the lengthwise')
    expect([directionKey({ direction: 'bias' }), directionKey({ direction: 'bias', angle: 30 })]).toEqual(['bias', '30'])
    fc.assert(fc.property(fc.double({ min: 0, max: 90, noNaN: true }), (angle) => Math.abs(angleOf(typedDirection(angle)) - angle) <= 0.5))
  })

  it('tested at an angle stands nearest to a layer laid there', () => {
    const figures = testFigures(strip(specimen(GOOD)))
    const tested = [
      { direction: 'lengthwise' as const, figures },
      { direction: 'bias' as const, angle: 30, figures },
      { direction: 'bias' as const, figures },
    ]
    expect(nearestDirection(33, tested)).toMatchObject({ cloth: { angle: 30 }, angle: 30, off: 3 })
    expect(nearestDirection(40, tested)!.cloth).toEqual({ direction: 'bias', figures })
  })

  it('goes with the cloth into a layer', () => {
    const test = { ...strip(specimen(GOOD)), direction: 'bias' as const, angle: 30 }
    const cloth = must(layerCloth({ clothId: 'c', name: 'Invented', thickness: mm(0.5), testedOn: null }, test))
    expect(cloth).toMatchObject({ direction: 'bias', angle: 30 })
  })
})

describe('the working of a test and its curve', () => {
  const three = strip(specimen(GOOD, 103), specimen(GOOD, 104), specimen(GOOD, 102))
  const cloth = must(layerCloth({ clothId: 'c', name: 'Invented', thickness: mm(0.5), testedOn: null }, three))

  it.each(['stretch', 'growth', 'recovery', 'testTension'] as const)('opens %s with what each specimen gave', (figure) => {
    const working = testWorking(three, cloth.figures, figure)!
    expect(working.inputs.length).toBe({ stretch: 6, growth: 6, recovery: 9, testTension: 6 }[figure])
    expect(working.inputs.every((one) => one.from === 'measured' && ['mm', 'N'].includes(one.unit))).toBe(true)
    expect(working.source).toBeTruthy()
    expect(working.notes.join(' ')).toContain('mean of 3 specimens')
  })

  it('opens a wear limit that the workroom found itself', () => {
    const found = must(
      layerCloth({ clothId: 'c', name: 'Invented', thickness: mm(0.5), testedOn: null }, { ...three, acceptableStrain: strain(0.4) }),
    )
    expect(found.wearLimit).toBeCloseTo(0.4, 12)
    expect(curveFigureWorking(found, 'wearLimit')).toMatchObject({ source: 'the workroom’s own test' })
    const beyond = must(
      layerCloth({ clothId: 'c', name: 'Invented', thickness: mm(0.5), testedOn: null }, { ...three, acceptableStrain: strain(0.9) }),
    )
    expect(beyond.wearLimit).toBeCloseTo(0.5, 12)
  })

  it.each(['residual', 'spread', 'testedTo', 'wearLimit', 'pullOnLimit'] as const)('opens %s', (figure) => {
    const working = curveFigureWorking(cloth, figure)
    const value = { residual: cloth.curve.residual, spread: cloth.curve.spread, testedTo: 0.5, wearLimit: 0.25, pullOnLimit: 0.45 }[figure]
    expect(working.result.value).toBeCloseTo(value * 100, 9)
    expect(working.formula.length).toBeGreaterThan(4)
    expect(working.notes.length).toBeGreaterThan(0)
  })
})
