import { describe, expect, it } from 'vitest'
import { pullTension, readFitting, SINGLE_PULL_UNCERTAINTY } from '../../../shared/domain/fit/fitting'
import type { FittingLevel } from '../../../shared/domain/fit/types'
import { solveGarment } from '../../../shared/domain/garment/solve'
import { solveRing } from '../../../shared/domain/textile/ring'
import { DEFAULT_TEXTILE_SETTINGS as settings } from '../../../shared/domain/textile/defaults'
import { mm, newton } from '../../../shared/domain/units/brand'
import { inventedDocument, inventedInput, layers } from '../../fixtures/garment-inputs'

const solve = (patch: Parameters<typeof inventedDocument>[0] = {}) => {
  const result = solveGarment(inventedInput({ document: inventedDocument(patch) }))
  if (!result.ok) throw new Error(result.problem.message)
  return result.value
}
const { ringInputs, rings } = solve()
const plain: FittingLevel[] = rings.map((ring) => ({
  level: ring.level as FittingLevel['level'],
  gap: mm(ring.gapBack),
  feel: null,
  pull: null,
}))
const read = (levels: readonly FittingLevel[]) => readFitting(levels, ringInputs, rings, settings)
const at = (level: string, patch: Partial<FittingLevel>) => plain.map((one) => (one.level === level ? { ...one, ...patch } : one))

describe('what a fitting says', () => {
  it('finds nothing tight where every gap is as drafted', () => {
    const reading = read(plain)
    expect(reading.tightest).toBeNull()
    for (const level of reading.levels) {
      expect(level.share).toBeCloseTo(1, 6)
      expect(Math.abs(level.letOut!)).toBeLessThan(0.1)
    }
  })

  it('says which level is tight by its gap, and by how many millimetres', () => {
    // Levels gaping 20 mm wider than the waist are slacker by 20 mm of cloth; the waist is the tight one.
    const levels = plain.map((one) => (one.level === 'waist' ? one : { ...one, gap: mm(one.gap! + 20) }))
    const reading = read(levels)
    expect(reading.tightest).toBe('waist')
    const waist = reading.levels.find((one) => one.level === 'waist')!
    expect(waist.share).toBeGreaterThan(1)
    expect(waist.letOut!).toBeGreaterThan(0)
    // Let out by that much, at the gap seen, the waist is in step with the others.
    const index = rings.findIndex((ring) => ring.level === 'waist')
    const cloth = rings[index]!.segments.reduce((sum, one) => sum + one.width, 0)
    const widths = rings[index]!.segments.map((one) => mm((one.width * (cloth + waist.letOut!)) / cloth))
    const again = solveRing(ringInputs[index]!, { solve: 'tension', widths }, settings)
    if (!again.ok) throw new Error(again.problem.message)
    expect(again.value.tension / waist.wanted).toBeCloseTo(waist.model / waist.wanted / waist.share, 3)
  })

  it('does not know the stiffness without a pull, however it felt', () => {
    expect(read(plain).stiffness).toBeNull()
    expect(read(at('waist', { feel: 'hurts' }))).toEqual(read(plain))
  })

  it('learns the factor by least squares from measured pulls, with its standard error', () => {
    const tab = mm(40)
    const factors = [1.2, 1.3, 1.25, 1.25]
    const levels = plain.map((one, i) => {
      const tension = rings[i]!.tension * factors[i]!
      return { ...one, pull: { force: newton((tension * tab) / 1000), tab } }
    })
    const { stiffness } = read(levels)
    const model = rings.map((ring) => ring.tension)
    const squares = model.reduce((sum, t) => sum + t * t, 0)
    const expected = model.reduce((sum, t, i) => sum + t * factors[i]! * t, 0) / squares
    expect(stiffness!.factor).toBeCloseTo(expected, 6)
    expect(stiffness).toMatchObject({ pulls: 4, isOdd: false })
    expect(stiffness!.uncertainty).toBeGreaterThan(0)
    expect(stiffness!.uncertainty).toBeLessThan(0.05)
  })

  it('takes ten per cent for a single pull, and calls a factor outside .5 to 2 odd', () => {
    const waist = rings.find((ring) => ring.level === 'waist')!
    const one = read(at('waist', { pull: { force: newton(waist.tension * 2.4 * 0.05), tab: mm(50) } })).stiffness!
    expect(one.uncertainty).toBe(SINGLE_PULL_UNCERTAINTY)
    expect(one.factor).toBeCloseTo(2.4, 6)
    expect(one.isOdd).toBe(true)
    expect(pullTension(5, mm(50))).toBe(100)
  })

  it('makes every ring hold so much harder at the same cut once it is kept, and is as before once it is dropped', () => {
    const learnt = solve({ stiffness: { factor: 1.25, uncertainty: 0.1, learntOn: '2026-11-20' } })
    const plainCut = solve()
    learnt.rings.forEach((ring, i) => {
      if (ring.governs !== 'hold') return
      expect(ring.cut).toBeGreaterThan(plainCut.rings[i]!.cut)
      const copied = solveRing(
        learnt.ringInputs[i]!,
        { solve: 'tension', widths: plainCut.rings[i]!.segments.map((one) => one.width) },
        settings,
      )
      if (!copied.ok) throw new Error(copied.problem.message)
      expect(copied.value.tension / plainCut.rings[i]!.tension).toBeCloseTo(1.25, 6)
    })
    expect(learnt.cautions.map((one) => one.code)).toContain('stiffness-learnt')
    const odd = solve({ stiffness: { factor: 2.4, uncertainty: 0.1, learntOn: '2026-11-20' } })
    expect(odd.cautions.map((one) => one.code)).toContain('stiffness-odd')
    expect(solve({ stiffness: null }).rings).toEqual(plainCut.rings)
  })
})

describe('levels of one plan only', () => {
  const panel = inventedDocument({ plans: { ...inventedDocument().plans, waistPanel: layers(['net', 3]) } })
  const mixed = solve(panel)
  const pulls = (factors: Readonly<Record<string, number>>): FittingLevel[] =>
    mixed.rings.map((ring) => ({
      level: ring.level as FittingLevel['level'],
      gap: mm(ring.gapBack),
      feel: null,
      pull: factors[ring.level] === undefined ? null : { force: newton(ring.tension * factors[ring.level]! * 0.05), tab: mm(50) },
    }))

  it('learns from the plan with most pulls, and holds for its levels alone', () => {
    const reading = readFitting(pulls({ bust: 1.2, underbust: 1.2, waist: 3 }), mixed.ringInputs, mixed.rings, settings)
    expect(reading.stiffness).toMatchObject({ pulls: 2, left: 1 })
    expect(reading.stiffness!.factor).toBeCloseTo(1.2, 6)
    expect(reading.stiffness!.levels).not.toContain('waist')
    const { factor, uncertainty, levels } = reading.stiffness!
    const corrected = solve({ ...panel, stiffness: { factor, uncertainty, learntOn: '2026-11-20', levels } })
    const cut = (solution: typeof mixed, level: string) => solution.rings.find((ring) => ring.level === level)!.cut
    expect(cut(corrected, 'underbust')).toBeGreaterThan(cut(mixed, 'underbust') + 1)
    expect(Math.abs(cut(corrected, 'waist') - cut(mixed, 'waist'))).toBeLessThan(0.2)
  })

  it('compares a gap with those of its own plan alone', () => {
    const levels = pulls({}).map((one) => (one.level === 'waist' ? one : { ...one, gap: mm(one.gap! + 20) }))
    const reading = readFitting(levels, mixed.ringInputs, mixed.rings, settings)
    expect(reading.levels.find((one) => one.level === 'waist')!.share).toBeCloseTo(1, 9)
    expect(reading.tightest).not.toBe('waist')
  })

  it('stays a factor on the test when the version was already solved with one', () => {
    const stiffness = { factor: 1.5, uncertainty: 0.1, learntOn: '2026-11-20' }
    const stiff = solve({ stiffness })
    const seen = stiff.rings.map((ring) => ({
      level: ring.level as FittingLevel['level'],
      gap: mm(ring.gapBack),
      feel: null,
      pull: { force: newton(ring.tension * 0.05), tab: mm(50) },
    }))
    const reading = readFitting(seen, stiff.ringInputs, stiff.rings, settings, stiffness)
    expect(reading.stiffness!.factor).toBeCloseTo(1.5, 2)
  })
})
