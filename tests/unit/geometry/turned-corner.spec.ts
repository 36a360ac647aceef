import { describe, expect, it } from 'vitest'
import { outlineOffset } from '../../../shared/domain/geometry/offset'
import type { Point } from '../../../shared/domain/geometry/types'

/** A panel that flares downwards by 10 mm on each side over 100, hem at the bottom. */
const corners: readonly Point[] = [
  { x: -60, y: 0 },
  { x: 60, y: 0 },
  { x: 50, y: 100 },
  { x: -50, y: 100 },
]
const runs = (turned: boolean) =>
  corners.map((from, index) => ({
    points: [from, corners[(index + 1) % 4]!],
    allowance: index === 0 ? 20 : 10,
    turned: turned && index === 0,
  }))
const mirrored = ({ x, y }: Point): Point => ({ x, y: -y })

describe('the corner of an allowance that is turned under', () => {
  const turned = outlineOffset(runs(true))!
  const mitred = outlineOffset(runs(false))!

  it('lies on the seam allowance once it is turned: its side is the mirror image of the line above', () => {
    const low = turned.filter(({ y }) => y < -19.9)
    expect(low).toHaveLength(2)
    // Derived: the seam's cutting line is x = 60 + 10 sqrt(1.01) - y / 10; turned up, the low corner lies on it.
    for (const point of low) {
      const up = mirrored(point)
      expect(Math.abs(up.x)).toBeCloseTo(60 + 10 * Math.sqrt(1.01) - up.y / 10, 3)
    }
    const bend = turned.filter(({ y }) => Math.abs(y) < 0.01)
    expect(bend).toHaveLength(2)
  })

  it('is narrower than a mitre on a flare, and the same on a square corner', () => {
    const width = (outline: readonly Point[]) => Math.max(...outline.filter(({ y }) => y < -19.9).map(({ x }) => x))
    expect(width(turned)).toBeLessThan(width(mitred) - 3)
    const square: readonly Point[] = [
      { x: 0, y: 0 },
      { x: 80, y: 0 },
      { x: 80, y: 60 },
      { x: 0, y: 60 },
    ]
    const of = (way: boolean) =>
      outlineOffset(
        square.map((from, index) => ({
          points: [from, square[(index + 1) % 4]!],
          allowance: index === 0 ? 20 : 10,
          turned: way && index === 0,
        })),
      )!
    const box = (outline: readonly Point[]) => [
      Math.min(...outline.map(({ x }) => x)),
      Math.max(...outline.map(({ x }) => x)),
      Math.min(...outline.map(({ y }) => y)),
    ]
    box(of(true)).forEach((value, index) => expect(value).toBeCloseTo(box(of(false))[index]!, 3))
  })
})
