import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { pathCrossingsAtHeight } from '../../../shared/domain/geometry/crossings'
import { monotoneCurve, monotonePath, monotoneValueAt } from '../../../shared/domain/geometry/monotone'
import {
  pathEnd,
  pathFlatten,
  pathLength,
  pathMirror,
  pathPointAt,
  pathReverse,
  pathSplitAt,
  pathStart,
  pathTangentAt,
  pathTransform,
} from '../../../shared/domain/geometry/path'
import { pointDistance, vectorLength } from '../../../shared/domain/geometry/point'
import { cubicSegment, lineSegment, segmentPointAt } from '../../../shared/domain/geometry/segment'
import { moveBy, transformThen, turnAbout } from '../../../shared/domain/geometry/transform'
import type { Path, Point } from '../../../shared/domain/geometry/types'

const coordinate = fc.double({ min: -600, max: 600, noNaN: true })
const anyPoint: fc.Arbitrary<Point> = fc.record({ x: coordinate, y: coordinate })
const anyPath: fc.Arbitrary<Path> = fc
  .array(fc.tuple(anyPoint, fc.option(fc.tuple(anyPoint, anyPoint))), { minLength: 2, maxLength: 6 })
  .map((stops) =>
    stops.slice(1).map(([to, handles], index) => {
      const from = stops[index]![0]
      return handles === null ? lineSegment(from, to) : cubicSegment(from, handles[0], handles[1], to)
    }),
  )

const closeTo = (a: Point, b: Point, within = 1e-6) => expect(pointDistance(a, b)).toBeLessThan(within)

describe('paths', () => {
  it('measures a straight line and a quarter circle', () => {
    expect(pathLength([lineSegment({ x: 0, y: 0 }, { x: 3, y: 4 })])).toBe(5)
    const k = (4 / 3) * Math.tan(Math.PI / 8)
    const quarter = cubicSegment({ x: 100, y: 0 }, { x: 100, y: 100 * k }, { x: 100 * k, y: 100 }, { x: 0, y: 100 })
    // The four-point Bézier circle is longer than the true one by about 2 parts in 10 000 (plain geometry).
    expect(pathLength([quarter])).toBeCloseTo(50 * Math.PI, 1)
  })

  it('keeps its length reversed, mirrored twice, moved and turned', () => {
    fc.assert(
      fc.property(anyPath, anyPoint, fc.double({ min: -3, max: 3, noNaN: true }), (path, pivot, angle) => {
        const length = pathLength(path)
        const twice = pathMirror(pathMirror(path, 17), 17)
        twice.forEach((segment, index) => closeTo(segment.to, path[index]!.to))
        expect(Math.abs(pathLength(pathReverse(path)) - length)).toBeLessThan(1e-5)
        expect(Math.abs(pathLength(pathTransform(path, transformThen(turnAbout(pivot, angle), moveBy(5, -3)))) - length)).toBeLessThan(1e-5)
      }),
      { numRuns: 60 },
    )
  })

  it('splits into parts whose lengths sum and which meet', () => {
    fc.assert(
      fc.property(anyPath, fc.double({ min: 0, max: 1, noNaN: true }), (path, share) => {
        const length = pathLength(path)
        const [first, second] = pathSplitAt(path, share * length)
        // A generated curve may turn back on itself in a cusp, where its length is known to a thousandth only.
        expect(Math.abs(pathLength(first) + pathLength(second) - length)).toBeLessThan(1e-3)
        expect(Math.abs(pathLength(first) - share * length)).toBeLessThan(1e-3)
        if (first.length > 0 && second.length > 0) closeTo(pathEnd(first), pathStart(second))
      }),
      { numRuns: 60 },
    )
  })

  it('finds the point and the direction at a length', () => {
    fc.assert(
      fc.property(anyPath, fc.double({ min: 0.01, max: 0.99, noNaN: true }), (path, share) => {
        const at = share * pathLength(path)
        closeTo(pathPointAt(path, at), pathEnd(pathSplitAt(path, at)[0]), 1e-5)
        expect(vectorLength(pathTangentAt(path, at))).toBeCloseTo(1, 9)
      }),
      { numRuns: 60 },
    )
  })

  it('flattens so that the polyline is as long as the curve, and finer changes nothing', () => {
    const gentle = cubicSegment({ x: 0, y: 0 }, { x: 0, y: 80 }, { x: 60, y: 150 }, { x: 70, y: 240 })
    const along = (tolerance: number) => {
      const points = pathFlatten([gentle], tolerance)
      return points.slice(1).reduce((sum, to, index) => sum + pointDistance(points[index]!, to), 0)
    }
    expect(Math.abs(along(0.02) - pathLength([gentle]))).toBeLessThan(0.05)
    expect(Math.abs(along(0.002) - along(0.02))).toBeLessThan(0.05)
  })

  it('stays within the tolerance when flattened', () => {
    fc.assert(
      fc.property(anyPath, (path) => {
        const points = pathFlatten(path, 0.05)
        for (const segment of path) {
          for (const t of [0.13, 0.37, 0.5, 0.71, 0.93]) {
            const at = segmentPointAt(segment, t)
            const nearest = Math.min(
              pointDistance(at, points[0]!),
              ...points.slice(1).map((to, index) => distanceToSide(at, points[index]!, to)),
            )
            expect(nearest).toBeLessThan(0.0501)
          }
        }
      }),
      { numRuns: 40 },
    )
  })

  it('crosses a height where the curve is', () => {
    fc.assert(
      fc.property(anyPath, coordinate, (path, height) => {
        const crossings = pathCrossingsAtHeight(path, height)
        const [start, end] = [pathStart(path).y - height, pathEnd(path).y - height]
        if (Math.abs(start) > 1e-3 && Math.abs(end) > 1e-3 && start * end < 0) expect(crossings.length).toBeGreaterThan(0)
        crossings.forEach((at) => expect(at.y).toBe(height))
      }),
    )
  })
})

function distanceToSide(at: Point, from: Point, to: Point): number {
  const dx = to.x - from.x
  const dy = to.y - from.y
  const t = Math.min(1, Math.max(0, ((at.x - from.x) * dx + (at.y - from.y) * dy) / (dx * dx + dy * dy || 1)))
  return Math.hypot(at.x - from.x - t * dx, at.y - from.y - t * dy)
}

describe('the monotone curve', () => {
  const knots = fc
    .array(fc.tuple(fc.double({ min: 5, max: 200, noNaN: true }), fc.double({ min: -60, max: 60, noNaN: true })), {
      minLength: 2,
      maxLength: 7,
    })
    .map((steps) => {
      let height = -200
      return { heights: steps.map(([step]) => (height += step)), values: steps.map(([, value]) => value) }
    })

  it('passes through its values, never leaves them, and its Béziers are the same curve', () => {
    fc.assert(
      fc.property(knots, fc.double({ min: 0, max: 1, noNaN: true }), ({ heights, values }, t) => {
        const curve = monotoneCurve(heights, values, { first: 0, last: 0 })
        const path = monotonePath(curve)
        heights.forEach((height, index) => expect(monotoneValueAt(curve, height)).toBeCloseTo(values[index]!, 8))
        path.forEach((segment, index) => {
          const at = segmentPointAt(segment, t)
          const [low, high] = [Math.min(values[index]!, values[index + 1]!), Math.max(values[index]!, values[index + 1]!)]
          expect(at.x).toBeGreaterThanOrEqual(low - 1e-9)
          expect(at.x).toBeLessThanOrEqual(high + 1e-9)
          expect(monotoneValueAt(curve, at.y)).toBeCloseTo(at.x, 7)
        })
      }),
    )
  })

  it('refuses heights that do not rise', () => {
    expect(() => monotoneCurve([0, 0], [1, 2])).toThrow('rise')
  })
})
