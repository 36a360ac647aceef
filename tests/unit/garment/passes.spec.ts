import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { passingOf, SHOULDERS_OVER_BUST } from '../../../shared/domain/body/passing'
import type { GarmentDocument } from '../../../shared/domain/document/types'
import { NECK_EDGE, neckEdge } from '../../../shared/domain/garment/passes'
import { solveGarment } from '../../../shared/domain/garment/solve'
import type { GarmentInput, GarmentSolution } from '../../../shared/domain/garment/types'
import { passLevel } from '../../../shared/domain/textile/getting-in'
import { planPullOnLimit, planTensionAt } from '../../../shared/domain/textile/plan'
import { mm, pascal } from '../../../shared/domain/units/brand'
import { inventedDocument, inventedInput } from '../../fixtures/garment-inputs'

const use = inventedDocument().use
const solved = (patch: Partial<GarmentDocument> = {}, input: Partial<GarmentInput> = {}): GarmentSolution => {
  const result = solveGarment(inventedInput({ ...input, document: inventedDocument(patch) }))
  if (!result.ok) throw new Error(result.problem.message)
  return result.value
}
const codes = (solution: GarmentSolution) => solution.cautions.map((one) => `${one.code} ${one.severity}`)

describe('exertion', () => {
  it('makes a deep breath larger where the ribs and the waist move, and changes nothing at rest', () => {
    const [calm, swimming] = [solved(), solved({ use: { ...use, exertion: 'swimming' } })]
    calm.rings.forEach((ring, i) => {
      const other = swimming.rings[i]!
      expect(other.cut).toBe(ring.cut)
      expect(other.pressure).toBe(ring.pressure)
      if (['bust', 'underbust', 'waist'].includes(ring.level)) expect(other.breathPressure).toBeGreaterThan(ring.breathPressure)
      else expect(other.breathPressure).toBe(ring.breathPressure)
    })
  })
})

describe('getting in and out', () => {
  it('has every level pass shoulders with arms overhead, and the greatest girth below it when stepped into', () => {
    const { levels } = solved()
    expect(passingOf('overhead', 'waist', levels, { shoulderGirth: { value: 1050 } })).toMatchObject({ girth: 1050, estimated: false })
    expect(passingOf('overhead', 'hip', levels, {})).toMatchObject({ girth: 920 + SHOULDERS_OVER_BUST, estimated: true })
    expect(passingOf('overhead', 'waist', levels, { shoulderGirth: { value: 900 } })).toMatchObject({ over: 'bust', girth: 920 })
    expect(passingOf('step-in', 'waist', levels, {})).toMatchObject({ over: 'hip', girth: 1000 })
    expect(passingOf('step-in', 'hip', levels, {})).toBeNull()
  })

  it('reaches what the first pull-on limit allows: one tension runs round', () => {
    const { ringInputs, rings } = solved()
    rings.forEach((ring, i) => {
      const geometry = ringInputs[i]!
      const widths = ring.segments.map((segment) => segment.width)
      const pass = passLevel(geometry, widths, { kind: 'closed' }, mm(1))
      const limits = geometry.segments.map(({ plan }) => planTensionAt(plan, planPullOnLimit(plan)))
      expect(pass.limit).toBeCloseTo(Math.min(...limits), 9)
      // Front and back share their plan here: the reach is the cloth at its pull-on limit, the gap and nothing else.
      const e = planPullOnLimit(geometry.segments[0]!.plan)
      const cloth = widths.reduce((sum, width) => sum + width, 0)
      expect(pass.reach).toBeCloseTo(cloth * (1 + e) + geometry.gapBack, 6)
      const open = passLevel(geometry, widths, { kind: 'by', width: mm(300) }, mm(1))
      expect(open.reach - pass.reach).toBeCloseTo(300 - geometry.gapBack, 6)
    })
  })

  it('takes the pull at which it just passes; more opening never takes more, and a larger body never less', () => {
    const { ringInputs, rings } = solved()
    const [geometry, ring] = [ringInputs[2]!, rings[2]!]
    const widths = ring.segments.map((segment) => segment.width)
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 300 }), fc.integer({ min: 600, max: 1100 }), (opening, needs) => {
        const pass = passLevel(geometry, widths, { kind: 'by', width: mm(opening) }, mm(needs))
        const wider = passLevel(geometry, widths, { kind: 'by', width: mm(opening + 20) }, mm(needs))
        const larger = passLevel(geometry, widths, { kind: 'by', width: mm(opening) }, mm(needs + 20))
        expect(wider.pull ?? Infinity).toBeLessThanOrEqual(pass.pull ?? Infinity)
        expect(larger.pull ?? Infinity).toBeGreaterThanOrEqual(pass.pull ?? Infinity)
        expect(pass.verdict === 'cannot').toBe(pass.reach < needs)
        if (pass.pull !== null) expect(pass.pull * 10).toBeLessThanOrEqual(pass.limit * (1 + 1e-9))
      }),
    )
  })

  it('calls a level tight within 3 %, and open over its whole length when it is', () => {
    const { ringInputs, rings } = solved()
    const widths = rings[0]!.segments.map((segment) => segment.width)
    const { reach } = passLevel(ringInputs[0]!, widths, { kind: 'closed' }, mm(1))
    expect(passLevel(ringInputs[0]!, widths, { kind: 'closed' }, mm(reach / 1.02)).verdict).toBe('tight')
    expect(passLevel(ringInputs[0]!, widths, { kind: 'closed' }, mm(reach / 1.04)).verdict).toBe('passes')
    expect(passLevel(ringInputs[0]!, widths, { kind: 'closed' }, mm(reach * 1.01)).verdict).toBe('cannot')
    expect(passLevel(ringInputs[0]!, widths, { kind: 'whole' }, mm(5000)).verdict).toBe('open')
  })

  it('stops where it does not pass with its closures as said, and asks first where nobody said', () => {
    const shoulders = { ...inventedInput().measured, shoulderGirth: { value: 1600 } }
    expect(codes(solved({}, { measured: shoulders }))).toContain('cannot-get-in caution')
    expect(codes(solved({ use: { ...use, opens: 'closed' } }, { measured: shoulders }))).toContain('cannot-get-in stop')
    expect(codes(solved({ use: { ...use, opens: 'whole' } }, { measured: shoulders })).join()).not.toContain('cannot-get-in')
  })

  it('is a stop at the back alone in water or for a child, whoever helps; on dry land a named dresser makes it a caution', () => {
    const behind = { ...use, opens: 'whole', dresser: 'Mirela' } as const
    const child = { ...inventedInput().wearer, child: true, practitionerAgreed: true }
    expect(codes(solved({ use: { ...behind, dresser: '' } }))).toContain('no-dresser stop')
    expect(codes(solved({ use: behind }))).toContain('cannot-leave-alone caution')
    expect(codes(solved({ use: { ...behind, water: true } }))).toContain('cannot-leave-alone stop')
    expect(codes(solved({ use: behind }, { wearer: child }))).toContain('cannot-leave-alone stop')
    const stop = solved({ use: { ...behind, water: true } }).cautions.find((one) => one.code === 'cannot-leave-alone')!
    expect(stop.clearable).toBe(false)
    expect(codes(solved({ use: { ...behind, water: true, frontRelease: true } })).join()).not.toContain('cannot-leave-alone')
  })

  it('warns above 100 N on 100 mm of height', () => {
    const stiff = solved({
      use: { ...use, opens: 'closed' },
      levels: inventedDocument().levels.map((one) => ({ ...one, hold: pascal(3000) })),
    })
    for (const pass of stiff.passes) {
      expect(codes(stiff).filter((one) => one === 'hard-to-pull-on caution').length > 0 || (pass.pull ?? 0) <= 100).toBe(true)
    }
  })
})

describe('the neck edge', () => {
  const neckOf = (solution: GarmentSolution) => solution.passes.find((pass) => pass.level === NECK_EDGE)

  it('passes the head overhead, measured or from memory and said so, and is no level when stepped into', () => {
    expect(neckOf(solved())).toMatchObject({ over: 'head', needs: 560, estimated: true })
    expect(neckOf(solved({}, { measured: { ...inventedInput().measured, headGirth: { value: 580 } } }))).toMatchObject({
      needs: 580,
      estimated: false,
    })
    expect(neckOf(solved({ use: { ...use, way: 'step-in' } }))).toBeUndefined()
  })

  it('reaches its edges as cut, stretched to the first pull-on limit', () => {
    const solution = solved()
    const { geometry, widths } = neckEdge(solution)!
    const cut = solution.draft.pieces.flatMap((piece) => piece.edges).filter((edge) => edge.id === 'neckline')
    // Chords between the nodes are shorter than the edge, and close to it.
    const chords = cut.reduce((sum, { nodes }) => {
      const [from, to] = [nodes[0]!.at, nodes.at(-1)!.at]
      return sum + 2 * Math.hypot(to.x - from.x, to.y - from.y)
    }, 0)
    const along = widths.reduce((sum, width) => sum + width, 0)
    expect(along).toBeGreaterThanOrEqual(chords)
    expect(along).toBeLessThan(1.3 * chords)
    const e = planPullOnLimit(geometry.segments[0]!.plan)
    expect(neckOf(solution)!.reach).toBeCloseTo(along * (1 + e) + geometry.gapBack, 6)
  })

  it('cannot go over a head that is too large for it, unless it opens', () => {
    const large = { measured: { ...inventedInput().measured, headGirth: { value: 1900 } } }
    const closed = solved({ use: { ...use, opens: 'closed' } }, large)
    expect(neckOf(closed)!.verdict).toBe('cannot')
    expect(
      closed.cautions.some((one) => one.code === 'cannot-get-in' && one.severity === 'stop' && one.message.startsWith('Neck edge')),
    ).toBe(true)
    expect(neckOf(solved({ use: { ...use, opens: 'whole' } }, large))!.verdict).toBe('open')
  })
})
