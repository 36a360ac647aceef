import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { DEFAULT_TEXTILE_SETTINGS } from '../../../shared/domain/textile/defaults'
import { cappedHold, upperPressure } from '../../../shared/domain/textile/hold'
import { planTensionAt } from '../../../shared/domain/textile/plan'
import { solveRing } from '../../../shared/domain/textile/ring'
import type { LayerPlan, RingGeometry, RingSolution } from '../../../shared/domain/textile/types'
import { mm, newtonPerMetre, pascal } from '../../../shared/domain/units/brand'
import { cloth, FREE, layer, must, plan, ring, segment } from './cloths'

const widths = (solution: RingSolution) => solution.segments.map((one) => one.width)
const between = (min: number, max: number) => fc.double({ min, max, noNaN: true })

const anyCloth = fc
  .record({ a: between(20, 2000), b: between(0, 4000), spread: between(0, 0.3), thickness: between(0, 1.5) })
  .map(({ a, b, ...more }) => cloth(a, b, more))
const anyPlan = fc
  .array(fc.record({ of: anyCloth, count: fc.integer({ min: 1, max: 3 }), ratio: fc.constantFrom(1, 1, 0.97, 1.04) }), {
    minLength: 1,
    maxLength: 5,
  })
  .map((layers) => plan(...layers.map(({ of, count, ratio }) => layer(of, count, ratio))))
const halfOf = (half: 'front' | 'back') =>
  fc.array(anyPlan, { minLength: 1, maxLength: 3 }).map((plans) => plans.map((one) => segment(half, one, 1 / plans.length)))
const anyRing: fc.Arbitrary<RingGeometry> = fc
  .record({
    front: halfOf('front'),
    back: halfOf('back'),
    girth: between(550, 1300),
    frontShare: between(0.45, 0.55),
    rigidFront: between(0, 60),
    rigidBack: between(0, 60),
    gapFront: between(0, 20),
    gapBack: between(0, 80),
    squeeze: between(0, 50),
    aspect: between(1, 1.6),
    breath: between(0, 60),
  })
  .map(({ front, back, girth, frontShare, aspect, ...lengths }) =>
    ring([...front, ...back], {
      girth: mm(girth),
      frontShare,
      aspect,
      rigidFront: mm(lengths.rigidFront),
      rigidBack: mm(lengths.rigidBack),
      gapFront: mm(lengths.gapFront),
      gapBack: mm(lengths.gapBack),
      squeeze: mm(lengths.squeeze),
      breath: mm(lengths.breath),
    }),
  )

describe('the three solves of a ring', () => {
  it('agree to 1e-9 of the tension where no limit governs', () => {
    fc.assert(
      fc.property(anyRing, between(150, 4000), (geometry, hold) => {
        const cut = must(solveRing(geometry, { solve: 'cut', hold: pascal(hold) }, FREE))
        fc.pre(cut.governs === 'hold')
        expect(cut.pressure / hold).toBeCloseTo(1, 9)
        const tension = must(solveRing(geometry, { solve: 'tension', widths: widths(cut) }, FREE))
        expect(Math.abs(tension.tension / cut.tension - 1)).toBeLessThan(1e-9)
        const gap = must(
          solveRing({ ...geometry, gapBack: mm(0) }, { solve: 'gap', widths: widths(cut), tension: cut.tension, gapIn: 'back' }, FREE),
        )
        expect(Math.abs(gap.gapBack - geometry.gapBack)).toBeLessThan(1e-9 * geometry.girth)
      }),
      { numRuns: 300 },
    )
  })

  it('find the tension that a plain scan of the sum of lengths finds', () => {
    fc.assert(
      fc.property(anyRing, between(0.75, 0.98), (geometry, factor) => {
        const asCut = geometry.segments.map((one) => mm((geometry.girth * factor * one.share) / 2))
        const solved = must(solveRing(geometry, { solve: 'tension', widths: asCut }, FREE))
        if (solved.slack > 0) return
        const reach = (tension: number) =>
          geometry.segments.reduce((sum, one, i) => sum + asCut[i]! * (1 + scanStrain(one.plan, tension)), 0) +
          geometry.rigidFront +
          geometry.rigidBack +
          geometry.gapFront +
          geometry.gapBack
        expect(reach(solved.tension)).toBeCloseTo(solved.surface, 4)
      }),
      { numRuns: 40 },
    )
  })
})

/** Strain under a tension by halving alone, from nothing but the forward curve. */
function scanStrain(of: LayerPlan, tension: number): number {
  let low = -0.5
  let high = 20
  for (let i = 0; i < 80; i++) {
    const middle = (low + high) / 2
    if (planTensionAt(of, middle) < tension) low = middle
    else high = middle
  }
  return (low + high) / 2
}

describe('laws of a ring', () => {
  it('never presses less at the same cut with a layer more', () => {
    fc.assert(
      fc.property(anyRing, anyCloth, between(0.75, 0.98), (geometry, extra, factor) => {
        const asCut = geometry.segments.map((one) => mm((geometry.girth * factor * one.share) / 2))
        const more = { ...geometry, segments: geometry.segments.map((one) => ({ ...one, plan: plan(...one.plan.layers, layer(extra)) })) }
        const before = must(solveRing(geometry, { solve: 'tension', widths: asCut }, FREE))
        const after = must(solveRing(more, { solve: 'tension', widths: asCut }, FREE))
        expect(after.pressure).toBeGreaterThanOrEqual(before.pressure * (1 - 1e-12))
      }),
    )
  })

  it('never presses more with a larger cut', () => {
    fc.assert(
      fc.property(anyRing, between(0.7, 0.98), between(0, 30), (geometry, factor, wider) => {
        const asCut = geometry.segments.map((one) => mm((geometry.girth * factor * one.share) / 2))
        const before = must(solveRing(geometry, { solve: 'tension', widths: asCut }, FREE))
        const after = must(solveRing(geometry, { solve: 'tension', widths: asCut.map((one) => mm(one + wider)) }, FREE))
        expect(after.pressure).toBeLessThanOrEqual(before.pressure * (1 + 1e-12))
      }),
    )
  })

  it('cuts smaller for more hold, and no smaller than its limits', () => {
    fc.assert(
      fc.property(anyRing, between(100, 4000), between(1, 2), (geometry, hold, times) => {
        const before = must(solveRing(geometry, { solve: 'cut', hold: pascal(hold) }, DEFAULT_TEXTILE_SETTINGS))
        const after = must(solveRing(geometry, { solve: 'cut', hold: pascal(hold * times) }, DEFAULT_TEXTILE_SETTINGS))
        expect(after.cut).toBeLessThanOrEqual(before.cut * (1 + 1e-12))
        expect(after.negativeEase).toBeLessThanOrEqual(20 + 1e-6)
        if (after.governs === 'reduction') expect(after.negativeEase).toBeCloseTo(20, 6)
      }),
    )
  })

  it('keeps every figure finite and every band round its figure', () => {
    fc.assert(
      fc.property(anyRing, between(0, 5000), (geometry, hold) => {
        const solved = must(solveRing(geometry, { solve: 'cut', hold: pascal(hold) }, DEFAULT_TEXTILE_SETTINGS))
        for (const value of Object.values(solved)) if (typeof value === 'number') expect(Number.isFinite(value)).toBe(true)
        expect(solved.pressureBand.low).toBeLessThanOrEqual(solved.pressure + 1e-9)
        expect(solved.pressureBand.high).toBeGreaterThanOrEqual(solved.pressure - 1e-9)
        expect(solved.cutBand.low).toBeLessThanOrEqual(solved.cut + 1e-9)
        expect(solved.cutBand.high).toBeGreaterThanOrEqual(solved.cut - 1e-9)
        expect(solved.frontPressure).toBeLessThanOrEqual(solved.sidePressure + 1e-9)
        expect(solved.breathPressure).toBeGreaterThanOrEqual(0)
      }),
    )
  })
})

describe('which limit governs', () => {
  const light = cloth(40, 20, { wear: 0.35, thickness: 0.5 })
  const power = cloth(260, 120, { wear: 0.35, thickness: 0.6 })
  const shell = cloth(180, 160, { wear: 0.3, thickness: 0.9 })
  const two = (of: LayerPlan) => ring([segment('front', of), segment('back', of)])
  const cut = (of: LayerPlan, hold: number) => must(solveRing(two(of), { solve: 'cut', hold: pascal(hold) }, DEFAULT_TEXTILE_SETTINGS))

  it('is the reduction for one light layer, the hold for four layers with shell, at the same hold', () => {
    const one = cut(plan(layer(light)), 1000)
    const four = cut(plan(layer(shell), layer(power, 2), layer(light)), 1000)
    expect(one.governs).toBe('reduction')
    expect(one.pressure).toBeLessThan(400)
    expect(four.governs).toBe('hold')
    expect(four.pressure).toBeCloseTo(1000, 6)
    expect(four.cut).toBeGreaterThan(one.cut + 25)
  })

  it('is the stretch for a cloth that wears out before the reduction', () => {
    const solved = cut(plan(layer(cloth(40, 20, { wear: 0.18 }))), 1000)
    expect(solved.governs).toBe('stretch')
    expect(solved.segments[0]!.strain).toBeCloseTo(0.18, 12)
  })
})

describe('halves, rigid widths, slack', () => {
  const of = plan(layer(cloth(400, 200)))

  it('divides each half by its own rigid widths and gap', () => {
    const geometry = ring([segment('front', of), segment('back', of)], { rigidBack: mm(40), gapBack: mm(50), frontShare: 0.52 })
    const solved = must(solveRing(geometry, { solve: 'cut', hold: pascal(800) }, FREE))
    const e = solved.segments[0]!.strain
    expect(solved.segments[0]!.width).toBeCloseTo((0.52 * 700) / (1 + e), 9)
    expect(solved.segments[1]!.width).toBeCloseTo((0.48 * 700 - 90) / (1 + e), 9)
    expect(solved.cut).toBeCloseTo(solved.segments[0]!.width + solved.segments[1]!.width + 40, 9)
    expect(solved.negativeEase).toBeCloseTo(100 * (1 - (solved.cut + 50) / 700), 9)
  })

  it('fixes a half that its rigid widths fill and gives the other the rest', () => {
    const geometry = ring([segment('front', of), segment('back', of)], { rigidFront: mm(380) })
    const solved = must(solveRing(geometry, { solve: 'cut', hold: pascal(800) }, FREE))
    expect(solved.segments[0]!.width).toBe(0)
    expect(solved.segments[1]!.width * (1 + solved.segments[1]!.strain)).toBeCloseTo(320, 9)
  })

  it('takes a squeeze off the girth everywhere', () => {
    const squeezed = must(
      solveRing(ring([segment('front', of), segment('back', of)], { squeeze: mm(50) }), { solve: 'cut', hold: pascal(800) }, FREE),
    )
    const smaller = must(
      solveRing(ring([segment('front', of), segment('back', of)], { girth: mm(650) }), { solve: 'cut', hold: pascal(800) }, FREE),
    )
    expect({ ...squeezed, girth: 0 }).toEqual({ ...smaller, girth: 0 })
  })

  it('says by how much a ring lies loose', () => {
    const solved = must(
      solveRing(ring([segment('front', of), segment('back', of)]), { solve: 'tension', widths: [mm(360), mm(365)] }, FREE),
    )
    expect(solved).toMatchObject({ tension: 0, pressure: 0, band: 'light' })
    expect(solved.slack).toBeCloseTo(25, 9)
  })

  it.each([
    ['nothing stretches', ring([]), 'no-stretching-width'],
    [
      'both halves are rigid',
      ring([segment('front', of), segment('back', of)], { rigidFront: mm(360), rigidBack: mm(350) }),
      'no-stretching-width',
    ],
    ['the gap is larger than the ring', ring([segment('front', of), segment('back', of)], { gapBack: mm(800) }), 'gap-larger-than-ring'],
    ['a plan has no layer', ring([segment('front', of), segment('back', plan())]), 'plan-without-pull'],
    ['a layer counts zero times', ring([segment('front', of), segment('back', plan(layer(cloth(400, 0), 0)))]), 'plan-without-pull'],
    ['the squeeze is more than a tenth', ring([segment('front', of), segment('back', of)], { squeeze: mm(90) }), 'squeeze-too-large'],
    ['there is no girth', ring([segment('front', of)], { girth: mm(0) }), 'girth-impossible'],
    ['the shares do not add up', ring([segment('front', of, 0.5), segment('back', of)]), 'shares-not-whole'],
  ] as const)('is a problem at its ring when %s', (_, geometry, expected) => {
    const solved = solveRing(geometry, { solve: 'cut', hold: pascal(800) }, FREE)
    expect(solved).toMatchObject({ ok: false, problem: { code: expected, at: 'waist' } })
  })

  it('says by how many millimetres a rigid ring is loose or too short', () => {
    const message = (rigid: number) => {
      const solved = solveRing(ring([], { rigidFront: mm(rigid) }), { solve: 'cut', hold: pascal(800) }, FREE)
      return solved.ok ? '' : solved.problem.message
    }
    expect(message(712)).toContain('12 mm loose')
    expect(message(690)).toContain('10 mm too short')
  })

  it('says when lacing edges meet before the tension is reached', () => {
    const solved = solveRing(
      ring([segment('front', of), segment('back', of)]),
      { solve: 'gap', widths: [mm(350), mm(340)], tension: newtonPerMetre(100), gapIn: 'back' },
      FREE,
    )
    expect(solved).toMatchObject({ ok: false, problem: { code: 'edges-meet' } })
  })
})

describe('a hold under a wearer’s cap', () => {
  it('is lowered until the upper end of its band, in a breath too, meets the cap', () => {
    fc.assert(
      fc.property(anyRing, between(500, 3000), between(200, 1300), (geometry, hold, cap) => {
        const asked = cappedHold(pascal(hold), pascal(cap), geometry, DEFAULT_TEXTILE_SETTINGS)
        const upper = upperPressure(geometry, asked, DEFAULT_TEXTILE_SETTINGS)!
        expect(asked).toBeLessThanOrEqual(hold)
        if (asked > 0) expect(upper).toBeLessThanOrEqual(cap + 1e-6)
        const uncapped = upperPressure(geometry, pascal(hold), DEFAULT_TEXTILE_SETTINGS)!
        if (asked > 0 && uncapped > cap) expect(upper).toBeGreaterThan(cap * 0.999)
      }),
      { numRuns: 60 },
    )
  })

  it('leaves the hold alone without a cap', () => {
    expect(cappedHold(pascal(900), null, ring([]), DEFAULT_TEXTILE_SETTINGS)).toBe(900)
  })
})

describe('an assumed cloth', () => {
  it('is cut as if read at 500 N/m and shows its hold from a fifth', () => {
    const of = plan(layer(cloth(1000, 0, { kind: 'assumed', testedTo: 0.5 })))
    const solved = must(solveRing(ring([segment('front', of), segment('back', of)]), { solve: 'cut', hold: pascal(900) }, FREE))
    expect(solved.assumed).toBe(true)
    expect(solved.pressureBand.high).toBeCloseTo(900, 6)
    expect(solved.pressureBand.low).toBeCloseTo(180, 6)
  })
})
