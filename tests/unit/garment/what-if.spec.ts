import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { solveGarment } from '../../../shared/domain/garment/solve'
import { whatIf, withTrial, type Trial } from '../../../shared/domain/garment/what-if'
import { mm, pascal } from '../../../shared/domain/units/brand'
import { FOUR_LAYERS, inventedInput, layers } from '../../fixtures/garment-inputs'

const input = inventedInput()
const tried = (...trials: readonly Trial[]) => {
  const result = whatIf(input, trials)
  if (!result.ok) throw new Error(result.problem.message)
  return result.value
}
const at = (result: ReturnType<typeof tried>, level: string) => result.rings.find((ring) => ring.level === level)!

describe('what if', () => {
  it('is the same garment solved twice where nothing is tried', () => {
    const { rings, comes, goes, document } = tried()
    expect(document).toBe(input.document)
    expect([comes, goes]).toEqual([[], []])
    for (const ring of rings) expect([ring.cut, ring.pressure, ring.gap, ring.negativeEase, ring.strain]).toEqual([0, 0, 0, 0, 0])
  })

  it('says what another hold does to one level, and leaves the others alone but for the shared seam', () => {
    const result = tried({ kind: 'hold', level: 'waist', hold: pascal(2000) })
    expect(at(result, 'waist').pressure).toBeCloseTo(800, -1)
    expect(at(result, 'waist').cut).toBeLessThan(-3)
    expect(at(result, 'waist').strain).toBeGreaterThan(0)
    expect(Math.abs(at(result, 'bust').cut)).toBeLessThan(0.5)
    expect(result.comes.map((one) => one.code)).toContain('hold-high')
  })

  it('gives the figures that solving both garments gives', () => {
    const trial = fc.oneof(
      fc.record({
        kind: fc.constant('hold' as const),
        level: fc.constantFrom('waist' as const, 'all' as const),
        hold: fc.integer({ min: 500, max: 2500 }).map(pascal),
      }),
      fc.record({
        kind: fc.constant('gap' as const),
        level: fc.constant('all' as const),
        half: fc.constant('back' as const),
        gap: fc.integer({ min: 0, max: 90 }).map(mm),
      }),
      fc.record({
        kind: fc.constant('count' as const),
        zone: fc.constant('both' as const),
        layer: fc.constant('net-1'),
        count: fc.integer({ min: 0, max: 3 }),
      }),
      fc.record({
        kind: fc.constant('measurement' as const),
        key: fc.constant('waistGirth' as const),
        value: fc.integer({ min: 690, max: 760 }),
      }),
    )
    fc.assert(
      fc.property(trial, (one) => {
        const after = solveGarment(withTrial(input, one))
        fc.pre(after.ok)
        const result = tried(one)
        result.rings.forEach((ring) => {
          const other = after.ok ? after.value.rings.find((of) => of.level === ring.level)! : ring.after
          expect(ring.before.cut + ring.cut).toBeCloseTo(other.cut, 9)
          expect(ring.before.pressure + ring.pressure).toBeCloseTo(other.pressure, 9)
        })
      }),
      { numRuns: 25 },
    )
  })

  it('takes a layer out with a count of none, lays in another, and tries a girth without keeping it', () => {
    const without = tried({ kind: 'count', zone: 'both', layer: 'net-1', count: 0 })
    expect(without.document.plans.front.map((one) => one.id)).toEqual(['shell-0', 'lining-2'])
    expect(at(without, 'waist').cut).toBeLessThan(0)
    const laid = tried({ kind: 'layers', zone: 'both', layers: [...FOUR_LAYERS, ...layers(['net', 2])] })
    expect(at(laid, 'waist').cut).toBeGreaterThan(0)
    const wider = tried({ kind: 'measurement', key: 'waistGirth', value: 740 })
    expect(at(wider, 'waist').after.girth - at(wider, 'waist').before.girth).toBe(20)
    expect(wider.document).toBe(input.document)
  })

  it('says why where what is tried cannot be solved', () => {
    expect(whatIf(input, [{ kind: 'layers', zone: 'both', layers: [] }])).toMatchObject({ ok: false, problem: { code: 'no-layers' } })
    expect(whatIf(input, [{ kind: 'gap', level: 'all', half: 'back', gap: mm(1990) }])).toMatchObject({
      ok: false,
      problem: { code: 'gap-larger-than-ring', step: 'layers' },
    })
  })
})
