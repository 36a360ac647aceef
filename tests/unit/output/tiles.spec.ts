import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { Point } from '../../../shared/domain/geometry/types'
import { layoutPieces } from '../../../shared/domain/output/layout'
import { pageSize, PAPERS } from '../../../shared/domain/output/paper'
import { placePoint } from '../../../shared/domain/output/placing'
import { planTiles, tileName } from '../../../shared/domain/output/tiles'
import type { TileOptions, TilePlan } from '../../../shared/domain/output/tiles'
import { polygonTouches, strokeTouches } from '../../../shared/domain/output/touching'
import { printPieces } from '../../fixtures/print-pieces'

const rectangle = (width: number, height: number, x = 0, y = 0): Point[] => [
  { x, y },
  { x: x + width, y },
  { x: x + width, y: y + height },
  { x, y: y + height },
]
const planned = (outlines: readonly (readonly Point[])[], paper: keyof typeof PAPERS, options: TileOptions): TilePlan => {
  const plan = planTiles(outlines, PAPERS[paper], options)
  if (!plan.ok) throw new Error(plan.problem.message)
  return plan.value
}
const pieceOutlines = () => {
  const pieces = printPieces()
  return layoutPieces(pieces, 'wearing', 20).map((placement) =>
    pieces.find((piece) => piece.id === placement.piece)!.cuttingLine.map((point) => placePoint(point, placement)),
  )
}

describe('papers', () => {
  it('have the sizes of ISO 216 (read) and US Letter (8 1/2 by 11 in)', () => {
    expect(pageSize(PAPERS.A4, 'portrait')).toEqual({ width: 210, height: 297 })
    expect(pageSize(PAPERS.A3, 'landscape')).toEqual({ width: 420, height: 297 })
    expect(PAPERS.letter.width / 25.4).toBeCloseTo(8.5, 12)
    expect(PAPERS.letter.height / 25.4).toBeCloseTo(11, 12)
  })
})

describe('tile plan', () => {
  it.each([0, 10])('takes 5 by 5 sheets of A4 for an A0 drawing, margins 10 mm, overlap %i mm (derived from ISO 216)', (overlap) => {
    const plan = planned([rectangle(841, 1189)], 'A4', { margin: 10, overlap, orientation: 'portrait' })
    expect([plan.columns, plan.rows, plan.tiles.length]).toEqual([5, 5, 25])
  })

  it('takes one sheet for what fits one, to the last millimetre', () => {
    expect(planned([rectangle(190, 277)], 'A4', { margin: 10, overlap: 10, orientation: 'portrait' }).tiles).toHaveLength(1)
    expect(planned([rectangle(190.01, 277)], 'A4', { margin: 10, overlap: 10, orientation: 'portrait' }).tiles).toHaveLength(2)
    expect(planned([rectangle(277, 190)], 'A4', { margin: 10, overlap: 10, orientation: 'auto' }).orientation).toBe('landscape')
  })

  it('names rows by letters from the top and columns by numbers from the left', () => {
    expect([tileName(0, 0), tileName(1, 2), tileName(25, 9), tileName(26, 0), tileName(51, 0), tileName(52, 1)]).toEqual([
      'A1',
      'B3',
      'Z10',
      'AA1',
      'AZ1',
      'BA2',
    ])
    const plan = planned([rectangle(300, 400)], 'A4', { margin: 10, overlap: 0, orientation: 'portrait' })
    const [a1, a2, b1] = plan.tiles
    expect([a1!.name, a2!.name, b1!.name]).toEqual(['A1', 'A2', 'B1'])
    expect(a2!.area.left).toBeGreaterThan(a1!.area.left)
    expect(b1!.area.top).toBeLessThan(a1!.area.top)
  })

  it('leaves out sheets that no piece touches and keeps sheets with nothing but the inside of one', () => {
    const apart = planned([rectangle(60, 60), rectangle(60, 60, 600, 900)], 'A4', { margin: 10, overlap: 10, orientation: 'portrait' })
    expect(apart.tiles).toHaveLength(2)
    expect(apart.tiles.length + apart.blank.length).toBe(apart.rows * apart.columns)
    expect(apart.tiles.flatMap((tile) => tile.joins)).toEqual([])
    const large = planned([rectangle(841, 1189)], 'A4', { margin: 10, overlap: 10, orientation: 'portrait' })
    const inside = large.tiles.find((tile) => tile.name === 'C3')!
    expect(inside.joins.map((join) => `${join.side} ${join.neighbour}`)).toEqual(['left C2', 'top B3', 'right C4', 'bottom D3'])
  })

  it('says what to do when the paper is smaller than its margins or the overlap larger than the tile', () => {
    const problem = (margin: number, overlap: number) => {
      const plan = planTiles([rectangle(100, 100)], PAPERS.A4, { margin, overlap, orientation: 'portrait' })
      return plan.ok ? null : plan.problem
    }
    expect(problem(120, 10)).toMatchObject({ code: 'paper-too-small', at: 'margin' })
    expect(problem(120, 10)?.todo).toContain('at most 75 mm')
    expect(problem(10, 190)).toMatchObject({ code: 'overlap-too-large', at: 'overlap' })
    expect(problem(10, 190)?.todo).toContain('at most 150 mm')
    expect(problem(75, 0)).toBeNull()
    expect(problem(10, 150)).toBeNull()
    expect(problem(-1, 0)?.code).toBe('margin-unclear')
    expect(problem(10, Number.NaN)?.code).toBe('overlap-unclear')
    expect(planTiles([], PAPERS.A4, { margin: 10, overlap: 10, orientation: 'auto' })).toMatchObject({
      problem: { code: 'nothing-to-print' },
    })
    expect(planTiles([rectangle(20_000, 20_000)], PAPERS.A4, { margin: 10, overlap: 10, orientation: 'auto' })).toMatchObject({
      problem: { code: 'too-many-tiles' },
    })
  })
})

const anyOutline = fc
  .record({ x: fc.double({ min: -800, max: 800, noNaN: true }), y: fc.double({ min: -800, max: 800, noNaN: true }) })
  .chain((centre) =>
    fc.array(fc.double({ min: 20, max: 400, noNaN: true }), { minLength: 3, maxLength: 12 }).map((radii) =>
      radii.map((radius, i) => ({
        x: centre.x + radius * Math.cos((2 * Math.PI * i) / radii.length),
        y: centre.y + radius * Math.sin((2 * Math.PI * i) / radii.length),
      })),
    ),
  )
const anyOptions = fc.record({
  margin: fc.double({ min: 0, max: 40, noNaN: true }),
  overlap: fc.double({ min: 0, max: 60, noNaN: true }),
  orientation: fc.constantFrom('portrait' as const, 'landscape' as const, 'auto' as const),
})
const anyPaper = fc.constantFrom('A4' as const, 'A3' as const, 'letter' as const)

describe('laws of the tile plan', () => {
  it('covers every point of the drawing, with the cells edge to edge', () => {
    fc.assert(
      fc.property(fc.array(anyOutline, { minLength: 1, maxLength: 4 }), anyPaper, anyOptions, (outlines, paper, options) => {
        const plan = planned(outlines, paper, options)
        for (const outline of outlines)
          outline.forEach((from, i) => {
            const to = outline[(i + 1) % outline.length]!
            for (let step = 0; step <= 20; step += 1) {
              const point = { x: from.x + ((to.x - from.x) * step) / 20, y: from.y + ((to.y - from.y) * step) / 20 }
              const holding = plan.tiles.filter(
                ({ cell }) =>
                  point.x >= cell.left - 1e-5 &&
                  point.x <= cell.right + 1e-5 &&
                  point.y >= cell.bottom - 1e-5 &&
                  point.y <= cell.top + 1e-5,
              )
              expect(holding.length).toBeGreaterThan(0)
            }
          })
        const area = plan.tiles.reduce((sum, { cell }) => sum + (cell.right - cell.left) * (cell.top - cell.bottom), 0)
        const blankAllowed = (plan.whole.right - plan.whole.left) * (plan.whole.top - plan.whole.bottom)
        if (plan.blank.length === 0) expect(area / blankAllowed).toBeCloseTo(1, 9)
        else expect(area).toBeLessThan(blankAllowed)
      }),
      { numRuns: 150, seed: 7 },
    )
  })

  it('names neighbours from both sides, with the join line and its marks at the same place', () => {
    fc.assert(
      fc.property(fc.array(anyOutline, { minLength: 1, maxLength: 4 }), anyPaper, anyOptions, (outlines, paper, options) => {
        const plan = planned(outlines, paper, options)
        const opposite = { left: 'right', right: 'left', top: 'bottom', bottom: 'top' } as const
        for (const tile of plan.tiles)
          for (const join of tile.joins) {
            const neighbour = plan.tiles.find((other) => other.name === join.neighbour)!
            const back = neighbour.joins.find((other) => other.side === opposite[join.side])!
            expect(back.neighbour).toBe(tile.name)
            join.marks.forEach((mark, i) => {
              expect(Math.hypot(mark.x - back.marks[i]!.x, mark.y - back.marks[i]!.y)).toBeLessThan(1e-9)
              for (const { area } of [tile, neighbour])
                expect(
                  mark.x >= area.left - 1e-6 && mark.x <= area.right + 1e-6 && mark.y >= area.bottom - 1e-6 && mark.y <= area.top + 1e-6,
                ).toBe(true)
            })
          }
      }),
      { numRuns: 150, seed: 11 },
    )
  })

  it('leaves out a sheet only when no piece touches it', () => {
    fc.assert(
      fc.property(fc.array(anyOutline, { minLength: 1, maxLength: 4 }), anyPaper, anyOptions, (outlines, paper, options) => {
        const plan = planned(outlines, paper, options)
        for (const { cell } of plan.tiles) expect(outlines.some((outline) => polygonTouches(outline, cell))).toBe(true)
        expect(new Set([...plan.tiles.map((tile) => tile.name), ...plan.blank]).size).toBe(plan.rows * plan.columns)
      }),
      { numRuns: 100, seed: 13 },
    )
  })
})

describe('a bodice', () => {
  it('fits a plausible number of sheets, fewer on A3', () => {
    const options: TileOptions = { margin: 10, overlap: 10, orientation: 'auto' }
    const [a4, a3] = [planned(pieceOutlines(), 'A4', options), planned(pieceOutlines(), 'A3', options)]
    expect(a3.tiles.length).toBeLessThan(a4.tiles.length)
    expect(a4.tiles.length).toBeLessThanOrEqual(a4.rows * a4.columns)
  })

  it('tells a stroke that passes a rectangle from one that meets it', () => {
    const box = { left: 0, bottom: 0, right: 10, top: 10 }
    expect(strokeTouches({ x: -5, y: 5 }, { x: 15, y: 5 }, box)).toBe(true)
    expect(strokeTouches({ x: -5, y: 8 }, { x: 5, y: 18 }, box)).toBe(false)
    expect(strokeTouches({ x: 3, y: 3 }, { x: 4, y: 4 }, box)).toBe(true)
    expect(strokeTouches({ x: -5, y: 20 }, { x: 15, y: 20 }, box)).toBe(false)
  })
})
