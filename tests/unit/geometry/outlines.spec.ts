import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { outlineOffset } from '../../../shared/domain/geometry/offset'
import type { OffsetRun } from '../../../shared/domain/geometry/offset'
import { pointsBounds, polygonArea, polygonContains, polygonIsSimple } from '../../../shared/domain/geometry/polygon'
import type { Polygon } from '../../../shared/domain/geometry/polygon'

const square: Polygon = [
  { x: 0, y: 0 },
  { x: 100, y: 0 },
  { x: 100, y: 100 },
  { x: 0, y: 100 },
]

const runsOf = (polygon: Polygon, allowances: readonly number[]): OffsetRun[] =>
  polygon.map((from, index) => ({
    points: [from, polygon[(index + 1) % polygon.length]!],
    allowance: allowances[index % allowances.length]!,
  }))

/** A star-shaped outline about the origin, its radii between 60 and 160 mm: simple and counter-clockwise. */
const star: fc.Arbitrary<Polygon> = fc.array(fc.double({ min: 60, max: 160, noNaN: true }), { minLength: 5, maxLength: 24 }).map((radii) =>
  radii.map((radius, index) => {
    const angle = (2 * Math.PI * index) / radii.length
    return { x: radius * Math.cos(angle), y: radius * Math.sin(angle) }
  }),
)

describe('outlines', () => {
  it('has a signed area, positive counter-clockwise', () => {
    expect(polygonArea(square)).toBe(10_000)
    expect(polygonArea([...square].reverse())).toBe(-10_000)
    expect(pointsBounds(square)).toEqual({ minX: 0, minY: 0, maxX: 100, maxY: 100 })
    expect(polygonContains(square, { x: 50, y: 50 })).toBe(true)
    expect(polygonContains(square, { x: 150, y: 50 })).toBe(false)
  })

  it('knows a simple outline from one that crosses, touches or folds back', () => {
    expect(polygonIsSimple(square)).toBe(true)
    expect(polygonIsSimple([square[0]!, square[2]!, square[1]!, square[3]!])).toBe(false)
    expect(polygonIsSimple([...square.slice(0, 3), { x: 50, y: 0 }])).toBe(false)
    expect(polygonIsSimple([square[0]!, square[1]!, { x: 40, y: 0 }, square[2]!, square[3]!])).toBe(false)
    fc.assert(
      fc.property(star, (polygon) => {
        expect(polygonIsSimple(polygon)).toBe(true)
      }),
    )
  })

  it('offsets each edge by its own allowance and leaves an allowance of 0 where it is', () => {
    const offset = outlineOffset(runsOf(square, [20, 10, 5, 0]))!
    expect(pointsBounds(offset)).toEqual({ minX: 0, minY: -20, maxX: 110, maxY: 105 })
    expect(polygonArea(offset)).toBeCloseTo(110 * 125, 3)
  })

  it('gives the outline itself at no allowance', () => {
    fc.assert(
      fc.property(star, (polygon) => {
        const same = outlineOffset(runsOf(polygon, [0]))!
        expect(Math.abs(polygonArea(same) - polygonArea(polygon))).toBeLessThan(0.1)
      }),
    )
  })

  it('goes out and comes back', () => {
    const out = outlineOffset(runsOf(square, [12]))!
    const back = outlineOffset(runsOf(out, [-12]))!
    expect(Math.abs(polygonArea(back) - 10_000)).toBeLessThan(0.1)
  })

  it('never crosses itself and never goes inside', () => {
    fc.assert(
      fc.property(star, fc.array(fc.integer({ min: 0, max: 25 }), { minLength: 1, maxLength: 5 }), (polygon, allowances) => {
        const offset = outlineOffset(runsOf(polygon, allowances))!
        expect(polygonIsSimple(offset)).toBe(true)
        expect(polygonArea(offset)).toBeGreaterThan(polygonArea(polygon) - 0.1)
      }),
    )
  })

  it('cuts a mitre off where it would run too far', () => {
    const needle: Polygon = [
      { x: 0, y: 0 },
      { x: 200, y: -4 },
      { x: 200, y: 4 },
    ]
    const bounds = pointsBounds(outlineOffset(runsOf(needle, [10]), 3)!)
    expect(bounds.minX).toBeGreaterThan(-30)
  })
})
