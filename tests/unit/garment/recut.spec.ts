import { describe, expect, it } from 'vitest'
import { recut } from '../../../shared/domain/garment/recut'
import { solveGarment } from '../../../shared/domain/garment/solve'
import type { GarmentInput } from '../../../shared/domain/garment/types'
import { mm, pascal } from '../../../shared/domain/units/brand'
import { FOUR_LAYERS, inventedDocument, inventedInput, layers } from '../../fixtures/garment-inputs'

const TWO_LAYERS = layers(['lining', 1], ['shell', 1])
const plain = inventedDocument({ plans: { front: TWO_LAYERS, back: TWO_LAYERS } })
const mockUp = (by = 0): GarmentInput =>
  inventedInput({
    document: {
      ...plain,
      alterations:
        by === 0
          ? []
          : [
              {
                id: 'one',
                kind: 'move',
                name: 'side front, side seam at waist',
                role: { piece: 'side-front', edge: 'side', node: 'waist' },
                dx: mm(by),
                dy: mm(0),
                carry: true,
                on: true,
              },
            ],
    },
  })
const final = inventedInput({ document: inventedDocument({ plans: { front: FOUR_LAYERS, back: FOUR_LAYERS } }) })
const value = (fitted: GarmentInput, to: GarmentInput = final) => {
  const result = recut(fitted, to)
  if (!result.ok) throw new Error(result.problem.message)
  return result.value
}

describe('equal-hold recut', () => {
  it('says that the straight copy into more layers holds harder, and lets it out until it holds as the mock-up did', () => {
    const { levels, targets } = value(mockUp())
    for (const level of levels) {
      expect(level.copied!.pressure).toBeGreaterThan(1.5 * level.fitted.pressure)
      const step = targets.fitted.steps.find((one) => one.level === level.level)!
      expect(step.pressure / level.fitted.pressure).toBeCloseTo(1, 1)
      expect(Math.abs(step.pressure / level.fitted.pressure - 1)).toBeLessThan(0.01)
      expect(step.change).toBeGreaterThan(0)
      expect(2 * (step.changeFront + step.changeBack)).toBeCloseTo(step.change, 6)
    }
  })

  it('reaches the final plan’s own hold for the other target', () => {
    const document = { ...final.document, levels: final.document.levels.map((level) => ({ ...level, hold: pascal(1000) })) }
    for (const step of value(mockUp(), { ...final, document }).targets.own.steps) {
      if (step.governs === 'hold') expect(Math.abs(step.pressure / 1000 - 1)).toBeLessThan(0.01)
      else expect(step.pressure).toBeLessThan(1000)
    }
  })

  it('takes alterations over in hold, not in millimetres', () => {
    const { levels, targets } = value(mockUp(8))
    const [alteration] = targets.fitted.alterations
    expect(alteration).toMatchObject({ id: 'one', before: 8 })
    expect(alteration!.after).toBeLessThan(8)
    expect(alteration!.after).toBeGreaterThan(0)
    const waist = levels.find((one) => one.level === 'waist')!
    const step = targets.fitted.steps.find((one) => one.level === 'waist')!
    expect(Math.abs(step.pressure / waist.fitted.pressure - 1)).toBeLessThan(0.02)
    // Copied in millimetres it would let the waist out too far: the same hold is missed by more.
    const copied = solveGarment({
      ...final,
      document: { ...targets.fitted.document, alterations: mockUp(8).document.alterations },
    })
    if (!copied.ok) throw new Error(copied.problem.message)
    const missed = copied.value.rings.find((one) => one.level === 'waist')!.pressure / waist.fitted.pressure - 1
    expect(missed).toBeLessThan(-0.05)
  })

  it('proposes a document that solves to what it says', () => {
    const { targets } = value(mockUp(-6))
    for (const target of ['fitted', 'own'] as const) {
      const again = solveGarment({ ...final, document: targets[target].document })
      if (!again.ok) throw new Error(again.problem.message)
      expect(again.value.rings.map((ring) => ring.cut)).toEqual(targets[target].solution.rings.map((ring) => ring.cut))
      expect(targets[target].document.style).toEqual(plain.style)
    }
  })

  it('is the cut itself when both plans are the same', () => {
    const { targets } = value(mockUp(5), mockUp())
    for (const step of targets.fitted.steps) expect(Math.abs(step.change)).toBeLessThan(0.6)
    expect(targets.fitted.alterations).toEqual([])
  })

  it('answers with the problem of the garment that does not solve', () => {
    const result = recut(mockUp(), inventedInput({ document: inventedDocument({ plans: { front: [], back: [] } }) }))
    expect(result).toMatchObject({ ok: false, problem: { code: 'no-layers' } })
  })
})
