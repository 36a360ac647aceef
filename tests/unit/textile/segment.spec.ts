import fc from 'fast-check'
import { evaluate } from 'mathjs'
import { describe, expect, it } from 'vitest'
import { layerShares } from '../../../shared/domain/textile/contributions'
import { DEFAULT_TEXTILE_SETTINGS } from '../../../shared/domain/textile/defaults'
import { planFreeStrain, planStrainAt, planTensionAt, turnOfCloth } from '../../../shared/domain/textile/plan'
import { solveRing } from '../../../shared/domain/textile/ring'
import { layerStrainIn, segmentPullOnLimit, segmentWearLimit, stackOfSegment, widthUnder } from '../../../shared/domain/textile/segment'
import { strainOfStack, tensionOfStack } from '../../../shared/domain/textile/stack'
import type { Layer, RingGeometry, RingSegment, RingSolution } from '../../../shared/domain/textile/types'
import { mm, newtonPerMetre, pascal } from '../../../shared/domain/units/brand'
import { cloth, FREE, layer, must, plan, ring, segment } from './cloths'

const between = (min: number, max: number) => fc.double({ min, max, noNaN: true })
const widths = (solution: RingSolution) => solution.segments.map((one) => one.width)
const rigid = (thickness = 0.4, cutRatio = 1): Layer => ({
  ...layer(cloth(0, 0, { thickness }), 1, cutRatio),
  id: `rigid-${cutRatio}`,
  rigid: true,
})

const shell = layer(cloth(300, 150, { thickness: 0.6 }))
const lining = layer(cloth(120, 40, { thickness: 0.3 }))
/** Channels of so many mm sewn to the lining alone, the shell floating. */
const channelled = (half: 'front' | 'back', width: number, layers: readonly Layer[] = [shell, lining]): RingSegment => ({
  ...segment(half, plan(...layers)),
  sewn: [{ layer: lining.id, width: mm(width) }],
})

const anySegment = (half: 'front' | 'back'): fc.Arbitrary<RingSegment> =>
  fc
    .record({
      layers: fc.array(fc.record({ a: between(30, 900), b: between(0, 900), ratio: fc.constantFrom(1, 1, 0.97, 1.04) }), {
        minLength: 1,
        maxLength: 4,
      }),
      sewn: between(0, 90),
      stop: fc.option(between(1.02, 1.2), { freq: 3 }),
    })
    .map(({ layers, sewn, stop }) => {
      const stack = layers.map(({ a, b, ratio }, i) => ({ ...layer(cloth(a, b), 1, ratio), id: `l${i}` }))
      return {
        ...segment(half, plan(...stack, ...(stop === null ? [] : [rigid(0.3, stop)]))),
        sewn: [{ layer: 'l0', width: mm(sewn) }],
      }
    })
const anyRing: fc.Arbitrary<RingGeometry> = fc
  .record({
    front: anySegment('front'),
    back: anySegment('back'),
    girth: between(600, 1200),
    rigidBack: between(0, 40),
    gapBack: between(0, 60),
  })
  .map(({ front, back, ...more }) =>
    ring([front, back], { girth: mm(more.girth), rigidBack: mm(more.rigidBack), gapBack: mm(more.gapBack), breath: mm(0) }),
  )

/** Tension of a segment at the garment's strain by the formula as it is written, layer by layer; nothing of the solver is used. */
function written(of: RingSegment, width: number, e: number): number {
  return of.plan.layers.reduce((sum, one) => {
    if (one.rigid) return e > one.cutRatio - 1 + 1e-12 ? Infinity : sum
    const rho = of.sewn?.filter((sewn) => sewn.layer === one.id).reduce((all, sewn) => all + sewn.width, 0) ?? 0
    const x = ((1 + e) * width - rho) / (one.cutRatio * width - rho) - 1
    return x > 0 ? sum + one.count * (one.cloth.curve.a * x + one.cloth.curve.b * x ** 3) : sum
  }, 0)
}

/** Strain under a tension by halving the formula as it is written. */
function halved(of: RingSegment, width: number, tension: number): number {
  let low = -0.5
  let high = 30
  for (let i = 0; i < 90; i++) {
    const middle = (low + high) / 2
    if (written(of, width, middle) < tension) low = middle
    else high = middle
  }
  return (low + high) / 2
}

describe('a rigid width sewn to one layer alone', () => {
  it('strains that layer by ((1 + e) w - rho) / (r w - rho) - 1, as mathjs has it', () => {
    const of = channelled('front', 40)
    const scope = { e: 0.2, w: 250, rho: 40, r: 1 }
    const x = evaluate('((1 + e) * w - rho) / (r * w - rho) - 1', scope) as number
    expect(layerStrainIn(of, lining, 250, 0.2)).toBeCloseTo(x, 14)
    expect(layerStrainIn(of, shell, 250, 0.2)).toBeCloseTo(0.2, 14)
    const tension = evaluate('300 e + 150 e^3 + 120 x + 40 x^3', { e: 0.2, x }) as number
    expect(tensionOfStack(stackOfSegment(of, 250), 0.2)).toBeCloseTo(tension, 9)
  })

  it('brings its wear limit down to (rho + (r w - rho)(1 + u)) / w - 1, and its pull-on limit likewise', () => {
    const worn = layer(cloth(120, 0, { wear: 0.3, pullOn: 0.6 }))
    const of: RingSegment = { ...segment('front', plan(worn)), sewn: [{ layer: worn.id, width: mm(50) }] }
    expect(segmentWearLimit(of, 250)).toBeCloseTo(evaluate('(50 + (250 - 50) * 1.3) / 250 - 1') as number, 14)
    expect(segmentPullOnLimit(of, 250)).toBeCloseTo(evaluate('(50 + (250 - 50) * 1.6) / 250 - 1') as number, 14)
    const cut = must(solveRing(ring([of, { ...of, half: 'back' }]), { solve: 'cut', hold: pascal(90_000) }, FREE))
    expect(cut.governs).toBe('stretch')
    expect(cut.segments[0]!.strain).toBeCloseTo(segmentWearLimit(of, cut.segments[0]!.width), 10)
  })

  it('finds the width that goes round its arc', () => {
    fc.assert(
      fc.property(anySegment('front'), between(200, 600), between(1, 400), (of, arc, tension) => {
        const width = widthUnder(of, arc, tension)
        if (width === null) return
        expect(width * (1 + halved(of, width, tension))).toBeCloseTo(arc, 6)
      }),
    )
  })

  it('asks for more cloth than none, and for less than the same width through all layers', () => {
    const at = (of: readonly RingSegment[], more: Partial<RingGeometry> = {}) =>
      must(solveRing(ring([...of], { breath: mm(0), ...more }), { solve: 'cut', hold: pascal(1500) }, FREE)).cut
    const both = [segment('front', plan(shell, lining)), segment('back', plan(shell, lining))]
    const none = at(both)
    const floating = at([channelled('front', 20), channelled('back', 20)])
    const through = at(both, { rigidFront: mm(20), rigidBack: mm(20) })
    expect(floating).toBeGreaterThan(none)
    expect(floating).toBeLessThan(through)
  })

  it('is a problem where it fills its layer', () => {
    const filled = [channelled('front', 400), channelled('back', 400)]
    expect(solveRing(ring(filled), { solve: 'tension', widths: [mm(300), mm(300)] }, FREE)).toMatchObject({
      ok: false,
      problem: { code: 'sewn-width-fills', at: 'waist' },
    })
    expect(solveRing(ring(filled), { solve: 'cut', hold: pascal(900) }, FREE)).toMatchObject({
      ok: false,
      problem: { code: 'sewn-width-fills' },
    })
  })
})

describe('rigid layers', () => {
  it('lie loose up to r - 1 and give no further', () => {
    const of = plan(shell, rigid(0.4, 1.08))
    expect(planTensionAt(of, 0.08)).toBeCloseTo(planTensionAt(plan(shell), 0.08), 9)
    expect(planTensionAt(of, 0.09)).toBe(Infinity)
    expect(planStrainAt(of, 1)).toBeCloseTo(planStrainAt(plan(shell), 1), 12)
    expect(planStrainAt(of, 10_000)).toBeCloseTo(0.08, 12)
  })

  it('make their half a rigid width, the other half stretches', () => {
    const geometry = ring([segment('front', plan(shell, rigid(0))), segment('back', plan(shell))], { breath: mm(0) })
    const solved = must(solveRing(geometry, { solve: 'cut', hold: pascal(1000) }, FREE))
    expect(solved.segments[0]!.strain).toBe(0)
    expect(solved.segments[0]!.width).toBeCloseTo(solved.surface / 2, 9)
    expect(solved.segments[1]!.width * (1 + solved.segments[1]!.strain)).toBeCloseTo(solved.surface / 2, 9)
    expect(solved.pressure).toBeCloseTo(1000, 6)
  })

  it('are a ring without tension figure when they go all round: so many mm too short or loose, or the gap that makes it fit', () => {
    const all = (gapBack: number) =>
      ring([segment('front', plan(rigid(0))), segment('back', plan(shell, rigid(0)))], { gapBack: mm(gapBack) })
    const told = (cut: number, gapBack = 0) => {
      const solved = solveRing(all(gapBack), { solve: 'tension', widths: [mm(cut / 2), mm(cut / 2)] }, FREE)
      return solved.ok ? null : solved.problem
    }
    const surface = 700 + Math.PI * 0.3
    expect(told(surface - 12)).toMatchObject({ code: 'no-stretching-width' })
    expect(told(surface - 12)!.message).toContain('12 mm too short')
    expect(told(surface + 5)!.message).toContain('5 mm loose')
    expect(told(surface - 62, 50)!.todo).toContain('A gap of 62 mm makes it fit')
    expect(solveRing(all(0), { solve: 'cut', hold: pascal(900) }, FREE)).toMatchObject({
      ok: false,
      problem: { code: 'no-stretching-width' },
    })
  })

  it('are told when they stop a ring before it goes round, and when they stop a breath', () => {
    const of = plan(shell, rigid(0, 1.1))
    const geometry = ring([segment('front', of), segment('back', of)], { breath: mm(40) })
    const cut = (width: number) => solveRing(geometry, { solve: 'tension', widths: [mm(width), mm(width)] }, FREE)
    const short = cut(310)
    expect(short).toMatchObject({ ok: false, problem: { code: 'ring-too-short' } })
    const surface = 700 + Math.PI * 0.6
    expect(short.ok ? '' : short.problem.message).toContain(`${(surface - 620 * 1.1).toFixed(1)} mm too short`)
    const stopped = must(cut(330))
    expect(stopped.breathShort).toBeCloseTo(surface + 40 - 660 * 1.1, 9)
    expect(Number.isFinite(stopped.breathPressure)).toBe(true)
    expect(must(cut(349)).breathShort).toBeUndefined()
  })
})

describe('segments against the formula as it is written', () => {
  it('have the tension that halving finds', () => {
    fc.assert(
      fc.property(anyRing, between(0.8, 0.97), (geometry, factor) => {
        const cut = geometry.segments.map(() => mm((geometry.girth * factor - geometry.gapBack) / 2))
        const solved = solveRing(geometry, { solve: 'tension', widths: cut }, FREE)
        if (!solved.ok) {
          expect(['ring-too-short', 'sewn-width-fills']).toContain(solved.problem.code)
          return
        }
        if (solved.value.slack > 0) return
        const reach = geometry.segments.reduce(
          (sum, one, i) => sum + cut[i]! * (1 + halved(one, cut[i]!, solved.value.tension)),
          geometry.rigidBack + geometry.gapBack,
        )
        expect(reach).toBeCloseTo(solved.value.surface, 5)
      }),
    )
  })

  it('agree in the three solves to 1e-9 of the tension', () => {
    fc.assert(
      fc.property(anyRing, between(200, 2500), (geometry, hold) => {
        const cut = solveRing(geometry, { solve: 'cut', hold: pascal(hold) }, FREE)
        fc.pre(cut.ok && cut.value.governs === 'hold')
        const solved = must(cut)
        // A segment stopped by a rigid layer says nothing of the tension; one that is not decides it.
        fc.pre(solved.segments.some((one, i) => one.width > 0 && one.strain < stackOfSegment(geometry.segments[i]!, one.width).stop - 1e-6))
        const tension = must(solveRing(geometry, { solve: 'tension', widths: widths(solved) }, FREE))
        expect(Math.abs(tension.tension / solved.tension - 1)).toBeLessThan(1e-9)
        const gap = must(
          solveRing(
            { ...geometry, gapBack: mm(0) },
            { solve: 'gap', widths: widths(solved), tension: solved.tension, gapIn: 'back' },
            FREE,
          ),
        )
        expect(Math.abs(gap.gapBack - geometry.gapBack)).toBeLessThan(1e-9 * geometry.girth)
      }),
      { numRuns: 200 },
    )
  })

  it('pull more the further they are drawn, and never press less for a layer more', () => {
    fc.assert(
      fc.property(anySegment('front'), between(150, 400), between(-0.05, 0.5), between(0.001, 0.2), (of, width, e, more) => {
        const stack = stackOfSegment(of, width)
        expect(tensionOfStack(stack, e + more)).toBeGreaterThanOrEqual(tensionOfStack(stack, e))
        const thicker = { ...of, plan: plan(...of.plan.layers, layer(cloth(80, 0))) }
        expect(tensionOfStack(stackOfSegment(thicker, width), e)).toBeGreaterThanOrEqual(tensionOfStack(stack, e) * (1 - 1e-12))
        const tension = tensionOfStack(stack, e)
        if (tension > 0 && Number.isFinite(tension)) expect(strainOfStack(stack, tension)).toBeCloseTo(Math.min(e, stack.stop), 9)
      }),
    )
  })
})

describe('pre-stretched and slack plans', () => {
  it('are free at the least r - 1, below zero where a layer is cut smaller', () => {
    const of = plan(layer(cloth(300, 0)), layer(cloth(200, 0), 1, 0.9))
    expect(planFreeStrain(of)).toBeCloseTo(-0.1, 12)
    // Derived: at e = 0 only the smaller layer pulls, 200 (1 / .9 - 1).
    expect(planTensionAt(of, 0)).toBeCloseTo(200 * (1 / 0.9 - 1), 9)
    const geometry = ring([segment('front', of), segment('back', of)])
    const worn = must(solveRing(geometry, { solve: 'tension', widths: [mm(360), mm(360)] }, FREE))
    expect(worn.slack).toBe(0)
    expect(worn.segments[0]!.strain).toBeLessThan(0)
    expect(worn.tension).toBeGreaterThan(0)
    expect(must(solveRing(geometry, { solve: 'tension', widths: [mm(400), mm(400)] }, FREE)).slack).toBeCloseTo(800 * 0.9 - 700, 9)
  })
})

describe('what each layer brings', () => {
  it('adds up to the tension and thickness of the plan', () => {
    fc.assert(
      fc.property(anySegment('front'), between(200, 400), between(0, 0.3), (of, width, e) => {
        fc.pre(e < stackOfSegment(of, width).stop - 1e-6)
        const shares = layerShares(of, mm(width), e, mm(700))
        expect(shares.reduce((sum, one) => sum + (one.tension ?? 0), 0)).toBeCloseTo(tensionOfStack(stackOfSegment(of, width), e), 6)
        const pulls = shares.reduce((sum, one) => sum + one.pullShare!, 0)
        expect(pulls === 0 || Math.abs(pulls - 1) < 1e-9).toBe(true)
      }),
    )
  })

  it('says the stretch left to the first limit, and a turn of cloth for a layer of its own cut alone', () => {
    const worn = layer(cloth(300, 0, { wear: 0.35, pullOn: 0.7, thickness: 1 }))
    const own = { ...layer(cloth(100, 0, { wear: 0.5, thickness: 2 }), 1, 0.95), id: 'own' }
    const of = segment('front', plan(worn, own))
    const [first, second] = layerShares(of, mm(300), 0.2, mm(700))
    expect(first).toMatchObject({ turn: 1, width: 300 })
    expect(first!.stretchLeft).toBeCloseTo(0.15, 12)
    expect(first!.pullOnLeft).toBeCloseTo(0.5, 12)
    expect(second!.stretchLeft).toBeCloseTo(0.95 * 1.5 - 1.2, 12)
    expect(second!.turn).toBeCloseTo(turnOfCloth(of.plan, 1, mm(700)), 12)
    expect(second!.turn).toBeLessThan(1)
    expect(second!.width).toBeCloseTo(second!.turn * 0.95 * 300, 9)
  })

  it('leaves the pull of a stopped rigid layer unknown', () => {
    const of = segment('front', plan(shell, rigid(0.4)))
    const [stretching, stopped] = layerShares(of, mm(300), 0, mm(700))
    expect(stopped).toMatchObject({ rigid: true, tension: null, pullShare: null, stretchLeft: 0 })
    expect(stretching!.pullShare).toBeNull()
    const loose = layerShares({ ...of, plan: plan(shell, rigid(0.4, 1.2)) }, mm(300), 0.1, mm(700))
    expect(loose[1]).toMatchObject({ tension: 0, pullShare: 0 })
    expect(newtonPerMetre(loose[0]!.pullShare!)).toBe(1)
  })
})

describe('the largest reduction', () => {
  it('governs a ring with channels on one layer too', () => {
    const of = [channelled('front', 30), channelled('back', 30)]
    const solved = must(solveRing(ring(of), { solve: 'cut', hold: pascal(9000) }, DEFAULT_TEXTILE_SETTINGS))
    expect(solved.governs).toBe('reduction')
    expect(solved.negativeEase).toBeCloseTo(20, 6)
  })
})
