import { Bezier } from 'bezier-js'
import { describe, expect, it } from 'vitest'
import { layBone } from '../../shared/domain/structure/bone'
import { cordLength, EYELET_FROM_END, eyeletPlaces, HOOK_PITCH, hookCount } from '../../shared/domain/structure/lacing'
import { FROM_ARMHOLE, FROM_EDGE } from '../../shared/domain/structure/rules'
import { channelWidth, DEFAULT_STOCK, stripStiffness, TIP_CLEARANCE } from '../../shared/domain/structure/stock'
import type { Bone } from '../../shared/domain/structure/types'
import { mm } from '../../shared/domain/units/brand'
import { draftedPieces } from '../fixtures/print-draft'

describe('structure against figures from outside', () => {
  // Corsetry teacher's page, read: bone 7 mm, channel 9 mm. Couture practice page, read: 13 mm (1/2 in) from a finished edge.
  // Tips 6 mm and 20 mm off an armhole: settings, common practice, from memory.
  it('adds 2 mm for the channel and keeps the ends from the edges', () => {
    expect(channelWidth({ width: mm(7) })).toBe(9)
    expect(FROM_EDGE).toBe(13)
    expect(FROM_ARMHOLE).toBe(20)
    expect(TIP_CLEARANCE).toBe(6)
  })

  // Derived, E w t^3 / 12 with moduli from memory: steel 200 GPa 7 x .5 mm, plastic 2.5 GPa 6 x 1.5 mm.
  it('computes the stiffness of a strip', () => {
    expect(stripStiffness(200, mm(7), mm(0.5))).toBeCloseTo(0.0146, 4)
    expect(stripStiffness(2.5, mm(6), mm(1.5))).toBeCloseTo(0.0042, 4)
  })

  // Published shoelace length formulas, read: P 12, H 50, V 25, L 300 mm; the same, derived, with P 7, H 30, V 40, L 0.
  it('measures the cord of a criss-cross lacing', () => {
    const pairs = (count: number, apart: number, step: number) =>
      Array.from({ length: count }, (_, index) => ({ at: mm(index * step), apart: mm(apart) }))
    expect(cordLength(pairs(12, 50, 25), mm(300))).toBeCloseTo(1929.8, 1)
    expect(cordLength(pairs(7, 30, 40), mm(0))).toBeCloseTo(660, 9)
  })

  // Setting, common practice, from memory: hook tape 19 mm, eyelets 20 to 25 mm and closer at the waist.
  it('spaces hooks and eyelets as is common practice', () => {
    expect(HOOK_PITCH).toBe(19)
    expect(hookCount(mm(380), mm(19))).toBe(20)
    const places = eyeletPlaces(mm(360), mm(22), mm(16), mm(200))
    const steps = places.slice(1).map((at, index) => at - places[index]!)
    expect(places[0]).toBe(EYELET_FROM_END)
    expect(places.at(-1)).toBeCloseTo(350, 9)
    for (const [index, step] of steps.entries()) {
      const middle = (places[index]! + places[index + 1]!) / 2
      expect(step).toBeLessThanOrEqual((Math.abs(middle - 200) < 40 ? 16 : 22) + 1e-9)
      expect(step).toBeGreaterThan(8)
    }
  })

  // bezier-js, a general-purpose library: length along the curve to .01 mm.
  it('measures channels along the curve', () => {
    const pieces = draftedPieces()
    for (const piece of pieces) {
      const edge = piece.edges.find(({ id }) => id === 'princess')!
      const bone: Bone = {
        id: 'b',
        name: 'Bone',
        stock: DEFAULT_STOCK[1]!.id,
        place: { kind: 'seam', piece: piece.id, edge: edge.id },
        bottom: { kind: 'edge', clear: mm(0) },
        top: { kind: 'edge', clear: mm(0) },
        channelOn: null,
        under: null,
        on: true,
      }
      const laid = layBone(bone, pieces, DEFAULT_STOCK)
      if (!laid.ok) throw new Error(laid.problem.message)
      const outside = edge.path.reduce(
        (sum, segment) =>
          sum +
          (segment.kind === 'line'
            ? Math.hypot(segment.to.x - segment.from.x, segment.to.y - segment.from.y)
            : new Bezier(segment.from, segment.c1, segment.c2, segment.to).length()),
        0,
      )
      expect(Math.abs(laid.value.channel - outside)).toBeLessThan(0.01)
      expect(laid.value.cut).toBeCloseTo(laid.value.channel - 12, 9)
    }
  })
})
