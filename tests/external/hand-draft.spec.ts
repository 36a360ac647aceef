import { describe, expect, it } from 'vitest'
import { polygonArea, polygonIsSimple } from '../../shared/domain/geometry/polygon'
import { bothDrafts, EASE, handDraftSheet } from './hand-draft'

/** A woven block drawn by handbook steps (from memory, common practice) beside the program's draft of the same figures. */
describe('the draft beside a block drawn by hand', () => {
  const { body, hand, still, solved } = bothDrafts()
  const v = body.values
  const width = (draft: typeof still, level: string) =>
    draft.pieces.reduce((sum, piece) => sum + piece.levels.find((one) => one.level === level)!.width, 0)

  it('shares neck, shoulder slope, waist lengths, underarm height and bust point', () => {
    const near = (a: { x: number; y: number }, b: { x: number; y: number } | undefined, within: number) => {
      expect(Math.abs(a.x - b!.x)).toBeLessThan(within)
      expect(Math.abs(a.y - b!.y)).toBeLessThan(within)
    }
    near(hand.back.points.nape!, still.frame.nape, 0.5)
    near(hand.back.points['neck-shoulder']!, still.frame['back-neck-shoulder'], 0.5)
    near(hand.front.points['neck-shoulder']!, still.frame['front-neck-shoulder'], 0.5)
    expect(hand.front.points['bust-point']!.y).toBeCloseTo(still.frame['bust-point']!.y, 0)
    expect(hand.back.points.underarm!.y).toBeCloseTo(still.frame['back-underarm']!.y, 0)
  })

  it('differs in width by the woven ease and by the stretch, and by nothing else', () => {
    const handBust = hand.back.points.underarm!.x + hand.front.points.underarm!.x
    expect(handBust - width(still, 'bust')).toBeCloseTo(EASE.bust / 2, 0)
    expect(width(still, 'bust')).toBeCloseTo(v.bustGirth / 2, 0)
    for (const level of ['bust', 'underbust', 'waist', 'hip']) expect(width(solved, level)).toBeLessThan(width(still, level) * 0.97)
  })

  it('is a sound outline, drawn with its steps on one sheet', () => {
    for (const half of [hand.back, hand.front]) {
      expect(polygonIsSimple(half.outline)).toBe(true)
      expect(polygonArea(half.outline)).toBeGreaterThan(80_000)
    }
    const sheet = handDraftSheet()
    for (const step of hand.steps) expect(sheet).toContain(step)
  })
})
