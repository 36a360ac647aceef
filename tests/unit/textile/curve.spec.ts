import fc from 'fast-check'
import { nnls } from 'nnls'
import { describe, expect, it } from 'vitest'
import { assumedCurve, fitLoadCurve, scaleCurve, slopeAt, strainAt, tensionAt } from '../../../shared/domain/textile/curve'
import { layerCloth } from '../../../shared/domain/textile/cloth'
import {
  isExtrapolated,
  planFreeStrain,
  planPullOnLimit,
  planStrainAt,
  planTensionAt,
  planThickness,
  planWearLimit,
  turnOfCloth,
} from '../../../shared/domain/textile/plan'
import type { StretchSpecimen, StretchTest } from '../../../shared/domain/textile/types'
import { mm, newton, strain } from '../../../shared/domain/units/brand'
import { cloth, layer, must, plan } from './cloths'

const between = (min: number, max: number) => fc.double({ min, max, noNaN: true })

/** A specimen of 50 x 100 mm whose readings lie on a given tension at the strains. */
function specimen(tension: (e: number) => number, strains: readonly number[], on: 'loading' | 'return' = 'loading'): StretchSpecimen {
  return {
    width: mm(50),
    gauge: mm(100),
    readings: strains.map((e) => ({ load: newton(tension(e) * 0.05), length: mm(100 * (1 + e)), on })),
    restLength: null,
  }
}
const strip = (...specimens: readonly StretchSpecimen[]): StretchTest => ({
  kind: 'strip',
  direction: 'crosswise',
  state: 'dry',
  specimens,
})
function settled<T>(solve: () => T): T | null {
  try {
    return solve()
  } catch {
    return null
  }
}
const STRAINS = [0.1, 0.2, 0.3, 0.4, 0.5, 0.6]

describe('the fitted load curve', () => {
  it('finds a and b again from readings that lie on them', () => {
    fc.assert(
      fc.property(between(0, 3000), between(0, 5000), (a, b) => {
        fc.pre(a + b > 10)
        const curve = must(fitLoadCurve(strip(specimen((e) => a * e + b * e ** 3, STRAINS))))
        expect(curve.kind).toBe('cubic')
        for (const e of STRAINS) expect(tensionAt(curve, e) / (a * e + b * e ** 3)).toBeCloseTo(1, 8)
        expect(curve.residual).toBeLessThan(1e-8)
        expect(curve.testedTo).toBeCloseTo(0.6, 12)
      }),
    )
  })

  it('agrees with the active-set solver of another hand (nnls), wherever that one settles', () => {
    let compared = 0
    fc.assert(
      fc.property(fc.array(between(1, 600), { minLength: 4, maxLength: 8 }), (drawn) => {
        const tensions = drawn.toSorted((one, other) => one - other)
        const strains = tensions.map((_, i) => 0.08 * (i + 1))
        const read = (e: number) => tensions[Math.round(e / 0.08) - 1]!
        const curve = must(fitLoadCurve(strip(specimen(read, strains))))
        if (curve.kind !== 'cubic') return
        const solved = settled(() =>
          nnls(
            strains.map((e) => [e, e ** 3]),
            strains.map(read),
          ),
        )
        if (!solved) return
        compared++
        const miss = (a: number, b: number) => strains.reduce((sum, e) => sum + (a * e + b * e ** 3 - read(e)) ** 2, 0)
        expect(miss(curve.a, curve.b)).toBeLessThanOrEqual(miss(solved.x.get(0, 0), solved.x.get(1, 0)) * (1 + 1e-9) + 1e-6)
      }),
      { numRuns: 300, seed: 7 },
    )
    expect(compared).toBeGreaterThan(10)
  })

  it('is no worse than any other a, b >= 0 of a fine grid (brute force)', () => {
    const read = (e: number) => 300 * e + 900 * e ** 3 + 25 * Math.sin(40 * e)
    const curve = must(fitLoadCurve(strip(specimen(read, STRAINS))))
    const miss = (a: number, b: number) => STRAINS.reduce((sum, e) => sum + (a * e + b * e ** 3 - read(e)) ** 2, 0)
    let least = Infinity
    for (let a = 0; a <= 600; a += 2) for (let b = 0; b <= 2000; b += 5) least = Math.min(least, miss(a, b))
    expect(miss(curve.a, curve.b)).toBeLessThanOrEqual(least + 1e-9)
  })

  it('never has a negative part, and rises', () => {
    fc.assert(
      fc.property(fc.array(between(1, 600), { minLength: 2, maxLength: 8 }), (tensions) => {
        const rising = [...tensions].sort((one, other) => one - other)
        const strains = rising.map((_, i) => 0.08 * (i + 1))
        const curve = must(fitLoadCurve(strip(specimen((e) => rising[Math.round(e / 0.08) - 1]!, strains))))
        expect(curve.a).toBeGreaterThanOrEqual(0)
        expect(curve.b).toBeGreaterThanOrEqual(0)
        for (let e = 0; e < 1; e += 0.01) expect(tensionAt(curve, e + 0.01)).toBeGreaterThan(tensionAt(curve, e))
      }),
    )
  })

  it('gives way to the monotone cubic where the cloth softens first, and follows it better', () => {
    const softening = (e: number) => 400 * Math.sqrt(e)
    const curve = must(fitLoadCurve(strip(specimen(softening, [0.02, 0.05, 0.1, 0.2, 0.4, 0.6]))))
    expect(curve.kind).toBe('monotone')
    expect(curve.residual).toBeLessThan(0.01)
    expect(tensionAt(curve, 0.2)).toBeCloseTo(softening(0.2), 6)
    expect(tensionAt(curve, 0.9) - tensionAt(curve, 0.8)).toBeCloseTo(0.1 * slopeAt(curve, 0.6), 9)
  })

  it('goes back from tension to strain, in every kind', () => {
    const kinds = [
      must(fitLoadCurve(strip(specimen((e) => 300 * e + 700 * e ** 3, STRAINS)))),
      must(fitLoadCurve(strip(specimen((e) => 400 * Math.sqrt(e), [0.02, 0.05, 0.1, 0.2, 0.4, 0.6])))),
      assumedCurve(strain(0.5)),
    ]
    fc.assert(
      fc.property(fc.constantFrom(...kinds), between(0.001, 1.2), (curve, e) => {
        expect(strainAt(curve, tensionAt(curve, e)) / e).toBeCloseTo(1, 9)
        const h = 1e-6
        expect((tensionAt(curve, e + h) - tensionAt(curve, e - h)) / (2 * h) / slopeAt(curve, e)).toBeCloseTo(1, 3)
      }),
    )
  })

  it('reads the way back where every specimen has one', () => {
    const there = specimen((e) => 500 * e, STRAINS)
    const back = { ...there, readings: [...there.readings, ...specimen((e) => 350 * e, [0.1, 0.2, 0.3, 0.4, 0.5], 'return').readings] }
    expect(tensionAt(must(fitLoadCurve(strip(back))), 0.3)).toBeLessThan(130)
    expect(must(fitLoadCurve(strip(back))).points.length).toBe(6)
    expect(tensionAt(must(fitLoadCurve(strip(back, there))), 0.3)).toBeCloseTo(150, 6)
  })

  it('takes the spread of three specimens, and the setting for fewer', () => {
    const at = (factor: number) => specimen((e) => factor * 400 * e, STRAINS)
    expect(must(fitLoadCurve(strip(at(0.9), at(1), at(1.1)))).spread).toBeCloseTo(0.1, 9)
    expect(must(fitLoadCurve(strip(at(0.9), at(1)))).spread).toBe(0.15)
    expect(must(fitLoadCurve(strip(at(1)), 0.2)).spread).toBe(0.2)
  })

  it.each([
    ['no specimen', strip(), 'no-specimen'],
    ['no readings', strip({ ...specimen((e) => e, []) }), 'no-reading'],
    ['no width', strip({ ...specimen((e) => 400 * e, STRAINS), width: mm(0) }), 'width-impossible'],
    ['no gauge', strip({ ...specimen((e) => 400 * e, STRAINS), gauge: mm(0) }), 'gauge-impossible'],
    ['a reading shorter than the gauge', strip({ ...specimen((e) => 400 * e, [0.1]), gauge: mm(120) }), 'reading-shorter'],
    [
      'a length that falls while the load grows',
      strip({
        ...specimen((e) => 400 * e, []),
        readings: [
          { load: newton(1), length: mm(120), on: 'loading' },
          { load: newton(2), length: mm(115), on: 'loading' },
        ],
      }),
      'length-falls',
    ],
    ['a length in the wrong unit', strip({ ...specimen((e) => 400 * e, [0.1]), gauge: mm(10) }), 'reading-impossible'],
    ['a label without stretch', { kind: 'label', direction: 'crosswise', state: 'dry', stretch: strain(0) } as const, 'no-stretch'],
  ])('refuses %s', (_, test, code) => {
    expect(fitLoadCurve(test)).toMatchObject({ ok: false, problem: { code } })
  })

  it('scales every tension alike', () => {
    const curve = must(fitLoadCurve(strip(specimen((e) => 400 * Math.sqrt(e), [0.02, 0.05, 0.1, 0.2, 0.4, 0.6]))))
    for (const e of STRAINS) expect(tensionAt(scaleCurve(curve, 1.3), e)).toBeCloseTo(1.3 * tensionAt(curve, e), 9)
  })
})

describe('a cloth', () => {
  const identity = { clothId: 'c', name: 'Invented', thickness: mm(0.6), testedOn: null }
  it('is worn to half its tested stretch unless more is known, and pulled on to nine tenths', () => {
    const test = strip(specimen((e) => 400 * e, STRAINS))
    expect(must(layerCloth(identity, test))).toMatchObject({ wearLimit: 0.3, pullOnLimit: 0.54 })
    expect(must(layerCloth({ ...identity, acceptableStrain: strain(0.45) }, test)).wearLimit).toBe(0.45)
    expect(must(layerCloth({ ...identity, acceptableStrain: strain(0.9) }, test)).wearLimit).toBeCloseTo(0.6, 12)
  })
})

describe('a layer plan', () => {
  const thin = cloth(300, 100, { thickness: 0.5, wear: 0.3, testedTo: 0.6 })
  const thick = cloth(500, 900, { thickness: 1.5, wear: 0.25, testedTo: 0.5 })

  it('adds tensions side by side, slack layers giving nothing', () => {
    const of = plan(layer(thin, 2), layer(thick, 1, 1.1))
    expect(planTensionAt(of, 0.05)).toBeCloseTo(2 * (300 * 0.05 + 100 * 0.05 ** 3), 9)
    const x = 1.3 / 1.1 - 1
    expect(planTensionAt(of, 0.3)).toBeCloseTo(2 * (300 * 0.3 + 100 * 0.3 ** 3) + 500 * x + 900 * x ** 3, 9)
    expect(planFreeStrain(of)).toBe(0)
    expect(planFreeStrain(plan(layer(thin, 1, 0.9)))).toBeCloseTo(-0.1, 12)
  })

  it('goes back from tension to strain', () => {
    fc.assert(
      fc.property(between(-0.05, 1), (e) => {
        const of = plan(layer(thin, 2), layer(thick, 1, 1.1), layer(thin, 1, 0.95))
        fc.pre(planTensionAt(of, e) > 0)
        expect(planStrainAt(of, planTensionAt(of, e))).toBeCloseTo(e, 10)
      }),
    )
  })

  it('is worn to the least limit of its layers, by their cut ratio', () => {
    expect(planWearLimit(plan(layer(thin), layer(thick, 1, 1.1)))).toBeCloseTo(0.3, 12)
    expect(planWearLimit(plan(layer(thin), layer(thick, 1, 1)))).toBeCloseTo(0.25, 12)
    expect(planWearLimit(plan(layer(thick, 1, 0.9)))).toBeCloseTo(0.9 * 1.25 - 1, 12)
    expect(planPullOnLimit(plan(layer(thin)))).toBeCloseTo(0.9, 12)
    expect(planThickness(plan(layer(thin, 2), layer(thick)))).toBeCloseTo(2.5, 12)
    expect(isExtrapolated(plan(layer(thick, 1, 0.8)), 0.25)).toBe(true)
    expect(isExtrapolated(plan(layer(thick)), 0.5)).toBe(false)
  })

  it('turns cloth: outer layers longer, inner shorter, about the middle surface', () => {
    const of = plan(layer(thick), layer(thick))
    expect(turnOfCloth(of, 0, mm(700))).toBeCloseTo(1 + (2 * Math.PI * 0.75) / (700 + Math.PI * 3), 12)
    expect(turnOfCloth(of, 0, mm(700)) + turnOfCloth(of, 1, mm(700))).toBeCloseTo(2, 12)
    expect(turnOfCloth(plan(layer(thick)), 0, mm(700))).toBe(1)
  })
})
