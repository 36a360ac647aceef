import { evaluate } from 'mathjs'
import { describe, expect, it } from 'vitest'
import { fitLoadCurve } from '../../../shared/domain/textile/curve'
import { solveRing } from '../../../shared/domain/textile/ring'
import { testFigures } from '../../../shared/domain/textile/test'
import type { StretchTest } from '../../../shared/domain/textile/types'
import type { RingFigure } from '../../../shared/domain/textile/working'
import { testWorking } from '../../../shared/domain/textile/test-working'
import { curveWorking, ringWorking } from '../../../shared/domain/textile/working'
import { mm, newton, pascal, strain } from '../../../shared/domain/units/brand'
import type { Working } from '../../../shared/domain/units/working'
import { cloth, FREE, layer, must, plan, ring, segment } from './cloths'

const of = plan(layer(cloth(400, 300, { thickness: 0.8 }), 2))
const geometry = ring([segment('front', of), segment('back', of)], { rigidBack: mm(30), gapBack: mm(50), squeeze: mm(20), aspect: 1.42 })
const solved = must(solveRing(geometry, { solve: 'cut', hold: pascal(1200) }, FREE))
const test: StretchTest = {
  kind: 'strip',
  direction: 'crosswise',
  state: 'dry',
  specimens: [{ width: mm(50), gauge: mm(100), readings: [{ load: newton(10), length: mm(150), on: 'loading' }], restLength: mm(103) }],
}

const value = (working: Working, symbol: string) => working.inputs.find((one) => one.symbol === symbol)!.value

describe('the working behind a figure', () => {
  const figures: readonly RingFigure[] = ['tension', 'pressure', 'breath', 'side', 'cut', 'negativeEase', 'k']

  it.each(figures)('of a ring, %s, has formula, inputs, source and limits', (figure) => {
    const working = ringWorking(solved, geometry, figure)
    expect(working.formula.length).toBeGreaterThan(5)
    expect(working.inputs.length).toBeGreaterThan(1)
    expect(working.source).toBeTruthy()
    expect(working.notes.length).toBeGreaterThan(0)
    for (const one of working.inputs) expect(Number.isFinite(one.value)).toBe(true)
  })

  it('gives its result again when its formula is worked by hand', () => {
    const pressure = ringWorking(solved, geometry, 'pressure')
    const scope = { T: value(pressure, 'T'), G: value(pressure, 'G'), s: value(pressure, 's') }
    expect(pressure.result.value).toBeCloseTo(evaluate('2 pi T / ((G - s) / 1000)', scope), 6)
    const side = ringWorking(solved, geometry, 'side')
    expect(side.result.value).toBeCloseTo(evaluate('1000 T a / b^2', { T: value(side, 'T'), a: value(side, 'a'), b: value(side, 'b') }), 6)
    const ease = ringWorking(solved, geometry, 'negativeEase')
    const inputs = { cut: value(ease, 'cut'), gap: value(ease, 'gap'), G: value(ease, 'G'), s: value(ease, 's') }
    expect(ease.result.value).toBeCloseTo(evaluate('100 (1 - (cut + gap) / (G - s))', inputs), 9)
    const cut = ringWorking(solved, geometry, 'cut')
    expect(cut.result.value).toBeCloseTo(value(cut, 'w1') + value(cut, 'w2') + value(cut, 'rigid'), 9)
  })

  it('says which inputs are estimates, chosen or assumed', () => {
    expect(ringWorking(solved, geometry, 'side').inputs.find((one) => one.symbol === 'a : b')!.from).toBe('estimate')
    const assumed = plan(layer(cloth(1000, 0, { kind: 'assumed', testedTo: 0.5 })))
    const ringed = ring([segment('front', assumed), segment('back', assumed)])
    const unknown = must(solveRing(ringed, { solve: 'cut', hold: pascal(900) }, FREE))
    const working = ringWorking(unknown, ringed, 'pressure')
    expect(working.inputs.find((one) => one.symbol === 'T')!.from).toBe('assumed')
    expect(working.notes.join(' ')).toContain('500 N/m')
  })

  it('of a curve names its kind', () => {
    expect(curveWorking(must(fitLoadCurve(test))).formula).toBe('T = a e + b e³')
    const label = must(fitLoadCurve({ kind: 'label', direction: 'crosswise', state: 'dry', stretch: strain(0.5) }))
    expect(curveWorking(label)).toMatchObject({ title: 'Load curve, assumed', result: { value: 1000 } })
  })

  it('of a test gives its figures, and none where nothing was read', () => {
    const figures = testFigures(test)
    expect(testWorking(test, figures, 'stretch')!.result).toEqual({ value: 50, unit: 'percent' })
    expect(testWorking(test, figures, 'recovery')!.result.value).toBeCloseTo(94, 9)
    expect(
      testWorking({ ...test, specimens: [{ ...test.specimens[0]!, restLength: null }] }, { ...figures, growth: null }, 'growth'),
    ).toBeNull()
  })
})
