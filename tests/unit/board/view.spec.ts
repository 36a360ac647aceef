import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  dotStep,
  fitView,
  panBy,
  pinchView,
  scaleBarLength,
  SCALE_LEAST,
  SCALE_MOST,
  spreadApart,
  toPlane,
  toScreen,
  zoomAt,
} from '../../../composables/useBoardView'

const coordinate = fc.double({ min: -2000, max: 2000, noNaN: true })
const place = fc.record({ x: coordinate, y: coordinate })
const view = fc.record({ scale: fc.double({ min: SCALE_LEAST, max: SCALE_MOST, noNaN: true }), x: coordinate, y: coordinate })

describe('view of the board', () => {
  it('comes back from the screen to the same point', () => {
    fc.assert(
      fc.property(view, place, (v, point) => {
        const back = toPlane(v, toScreen(v, point))
        expect(back.x).toBeCloseTo(point.x, 6)
        expect(back.y).toBeCloseTo(point.y, 6)
      }),
    )
  })

  it('draws up as up', () => {
    expect(toScreen({ scale: 2, x: 0, y: 100 }, { x: 10, y: 10 })).toEqual({ x: 20, y: 80 })
  })

  it('keeps the point under the pointer while it zooms, and keeps the scale within its limits', () => {
    fc.assert(
      fc.property(view, place, fc.double({ min: 0.01, max: 100, noNaN: true }), (v, at, factor) => {
        const before = toPlane(v, at)
        const zoomed = zoomAt(v, at, factor)
        const after = toPlane(zoomed, at)
        expect(Math.hypot(after.x - before.x, after.y - before.y)).toBeLessThan(1e-6 * (1 + Math.hypot(before.x, before.y)))
        expect(zoomed.scale).toBeGreaterThanOrEqual(SCALE_LEAST)
        expect(zoomed.scale).toBeLessThanOrEqual(SCALE_MOST)
      }),
    )
  })

  it('carries the plane with two fingers that move alike', () => {
    const from = { scale: 1, x: 0, y: 0 }
    const moved = pinchView(
      from,
      [
        { x: 0, y: 0 },
        { x: 100, y: 0 },
      ],
      [
        { x: 10, y: 5 },
        { x: 110, y: 5 },
      ],
    )
    expect(moved).toEqual(panBy(from, 10, 5))
  })

  it('doubles the scale when the fingers part to twice their distance', () => {
    const wider = pinchView(
      { scale: 1, x: 0, y: 0 },
      [
        { x: 50, y: 0 },
        { x: 150, y: 0 },
      ],
      [
        { x: 0, y: 0 },
        { x: 200, y: 0 },
      ],
    )
    expect(wider.scale).toBeCloseTo(2, 9)
    expect(toPlane(wider, { x: 100, y: 0 }).x).toBeCloseTo(100, 9)
  })

  it('fits bounds inside the padding', () => {
    fc.assert(
      fc.property(
        place,
        fc.double({ min: 50, max: 1500, noNaN: true }),
        fc.double({ min: 50, max: 1500, noNaN: true }),
        (at, width, height) => {
          const bounds = { left: at.x, bottom: at.y, right: at.x + width, top: at.y + height }
          const fitted = fitView(bounds, { width: 900, height: 600 }, { left: 100, right: 20, top: 20, bottom: 40 })
          const topLeft = toScreen(fitted, { x: bounds.left, y: bounds.top })
          const bottomRight = toScreen(fitted, { x: bounds.right, y: bounds.bottom })
          expect(topLeft.x).toBeGreaterThanOrEqual(100 - 1e-6)
          expect(topLeft.y).toBeGreaterThanOrEqual(20 - 1e-6)
          expect(bottomRight.x).toBeLessThanOrEqual(880 + 1e-6)
          expect(bottomRight.y).toBeLessThanOrEqual(560 + 1e-6)
        },
      ),
    )
  })

  it('rules the paper at 25 mm or 1 in, coarser only where dots would run together', () => {
    expect(dotStep(1, 'cm')).toBe(25)
    expect(dotStep(1, 'in')).toBe(25.4)
    expect(dotStep(0.3, 'cm')).toBe(50)
    expect(dotStep(0.1, 'in') * 0.1).toBeGreaterThanOrEqual(14)
  })

  it('keeps the scale bar within its width', () => {
    expect(scaleBarLength(1, 'cm')).toBe(100)
    expect(scaleBarLength(1, 'in')).toBeCloseTo(101.6, 9)
  })

  it('pushes names apart, keeps their order, and leaves those alone that have room', () => {
    expect(spreadApart([0, 100, 200], 17)).toEqual([0, 100, 200])
    expect(spreadApart([50, 50], 20)).toEqual([40, 60])
    fc.assert(
      fc.property(fc.array(fc.double({ min: 0, max: 400, noNaN: true }), { minLength: 2, maxLength: 8 }), (places) => {
        const sorted = [...places].sort((a, b) => a - b)
        const spread = spreadApart(sorted, 17)
        spread.slice(1).forEach((at, index) => expect(at - spread[index]!).toBeGreaterThanOrEqual(17 - 1e-9))
      }),
    )
  })
})
