import { Bezier } from 'bezier-js'
import { describe, expect, it } from 'vitest'
import { baseStyle } from '../../shared/domain/draft/style'
import { pathLength } from '../../shared/domain/geometry/path'
import { cubicSegment, segmentLength, segmentPointAt, segmentSplitAt } from '../../shared/domain/geometry/segment'
import type { CubicSegment } from '../../shared/domain/geometry/types'
import { seeded } from '../fixtures/bodies'
import { bodyOf, draftOf, widthsOf } from '../fixtures/draft-inputs'

const outside = ({ from, c1, c2, to }: CubicSegment) => new Bezier(from.x, from.y, c1.x, c1.y, c2.x, c2.y, to.x, to.y)

/** The outside library measures by a fixed rule of 24 nodes; halved a few times it is exact enough for any curve. */
function outsideLength(segment: CubicSegment, halvings = 4): number {
  if (halvings === 0) return outside(segment).length()
  const [first, second] = segmentSplitAt(segment, 0.5) as readonly [CubicSegment, CubicSegment]
  return outsideLength(first, halvings - 1) + outsideLength(second, halvings - 1)
}

// Source: bezier-js 6.1.4, a general-purpose library; the list of outside checks asks for .01 mm.
describe('curve lengths against bezier-js', () => {
  it('agree to .01 mm on random cubics, loops and cusps among them', () => {
    const random = seeded(99)
    const at = () => ({ x: 600 * random() - 300, y: 600 * random() - 300 })
    for (let index = 0; index < 400; index += 1) {
      const segment = cubicSegment(at(), at(), at(), at())
      expect(Math.abs(segmentLength(segment) - outsideLength(segment))).toBeLessThan(0.01)
    }
  })

  it('agree to .01 mm on every curve of a draft, without halving', () => {
    const body = bodyOf()
    const draft = draftOf({ body, style: baseStyle(), widths: widthsOf(body, { front: 0.1, back: 0.14 }) })
    const curves = draft.pieces.flatMap((piece) => piece.edges.flatMap((edge) => edge.path)).filter((segment) => segment.kind === 'cubic')
    expect(curves.length).toBeGreaterThan(30)
    for (const curve of curves) expect(Math.abs(pathLength([curve]) - outside(curve).length())).toBeLessThan(0.01)
  })

  it('give the same points', () => {
    const segment = cubicSegment({ x: 0, y: 0 }, { x: 10, y: 90 }, { x: 80, y: 120 }, { x: 140, y: 60 })
    for (const t of [0, 0.2, 0.5, 0.77, 1]) {
      const own = segmentPointAt(segment, t)
      const there = outside(segment).get(t)
      expect(Math.hypot(own.x - there.x, own.y - there.y)).toBeLessThan(1e-9)
    }
  })
})
