import { describe, expect, it } from 'vitest'
import type { Point } from '../../../shared/domain/geometry/types'
import { insideAtHeight, pointsAlong } from '../../../shared/domain/output/crossings'
import { layoutPieces } from '../../../shared/domain/output/layout'
import { placedBounds, placedOutline, placePoint } from '../../../shared/domain/output/placing'
import { cutWords, pieceOperations } from '../../../shared/domain/output/scene'
import { strainAtHeight, stretchTicks } from '../../../shared/domain/output/stretch-ticks'
import type { DrawingOperation, Placement } from '../../../shared/domain/output/types'
import { printPieces } from '../../fixtures/print-pieces'

const pieces = printPieces()
const at = (id: string) => pieces.find((piece) => piece.id === id)!
const flat = (id: string): Placement => ({ piece: id, mirrored: false, offset: { x: 0, y: 0 } })
const ofRole = (operations: readonly DrawingOperation[], role: DrawingOperation['role']) =>
  operations.filter((operation) => operation.role === role)
const texts = (operations: readonly DrawingOperation[]) =>
  operations.flatMap((operation) => (operation.kind === 'text' ? [operation.text] : []))
const ends = (operation: DrawingOperation) =>
  operation.kind === 'path' ? { from: operation.path[0]!.from, to: operation.path[operation.path.length - 1]!.to } : null

describe('drawing operations of a piece', () => {
  it('draws the fold apart and leaves it out of seam line and cutting line', () => {
    const operations = pieceOperations(at('front-centre'), flat('front-centre'))
    const fold = ofRole(operations, 'fold')
    expect(fold).toHaveLength(1)
    const run = ends(fold[0]!)!
    expect([run.from.x, run.from.y, run.to.x, run.to.y].map((each) => Math.round(each * 100) / 100)).toEqual([0, 268, 0, -170])
    const seamOnly = ofRole(pieceOperations(at('front-centre'), flat('front-centre'), { show: { cutting: false } }), 'fold')
    expect(ends(seamOnly[0]!)).toEqual({ from: { x: 0, y: 262 }, to: { x: 0, y: -150 } })
    const [seam] = ofRole(operations, 'seam-line')
    expect(ends(seam!)).toEqual({ from: { x: 0, y: -150 }, to: { x: 0, y: 262 } })
    const cutting = ofRole(operations, 'cutting-line')
    expect(cutting).toHaveLength(1)
    const cut = ends(cutting[0]!)!
    expect(Math.abs(cut.from.x) + Math.abs(cut.to.x)).toBeLessThan(0.1)
    expect(texts(operations)).toContain('fold')
  })

  it('closes seam line and cutting line where there is no fold', () => {
    const operations = pieceOperations(at('side-front'), flat('side-front'))
    for (const role of ['seam-line', 'cutting-line'] as const) {
      const [line, ...more] = ofRole(operations, role)
      expect(more).toHaveLength(0)
      expect(line?.kind === 'path' && line.closed).toBe(true)
    }
    expect(ofRole(operations, 'fold')).toHaveLength(0)
  })

  it('runs a notch from the seam line to the cutting line, twice on the back', () => {
    const single = ofRole(pieceOperations(at('side-front'), flat('side-front')), 'notch')
    const double = ofRole(pieceOperations(at('side-back'), flat('side-back')), 'notch')
    expect(single).toHaveLength(3)
    expect(double).toHaveLength(6)
    const { from, to } = ends(single[0]!)!
    expect(Math.hypot(to.x - from.x, to.y - from.y)).toBeCloseTo(10, 6)
  })

  it('says the name, the cut and the levels, and keeps parts back when asked', () => {
    const piece = at('back-centre')
    const words = texts(pieceOperations(piece, flat(piece.id), { lines: ['cut 2 shell, 2 lining'] }))
    for (const word of ['Back centre', 'cut 2 shell, 2 lining', 'waist', 'high hip', 'grain', 'greatest stretch'])
      expect(words).toContain(word)
    const bare = pieceOperations(piece, flat(piece.id), { show: { labels: false, levels: false, arrows: false, notches: false } })
    expect(texts(bare)).toEqual([])
    expect(new Set(bare.map((operation) => operation.role))).toEqual(new Set(['cutting-line', 'seam-line']))
    expect(cutWords(piece)).toBe('cut 2, a pair')
    expect(cutWords(at('front-centre'))).toBe('cut 1 on the fold')
  })

  it('mirrors points and keeps words readable', () => {
    const piece = at('side-back')
    const mirrored: Placement = { piece: piece.id, mirrored: true, offset: { x: 500, y: 20 } }
    const name = pieceOperations(piece, mirrored).find((operation) => operation.kind === 'text' && operation.text === piece.name)
    expect(name?.kind === 'text' && name.at).toEqual({ x: 500 - piece.labelAt.x, y: 20 + piece.labelAt.y })
    const twice = placePoint(placePoint({ x: 31, y: 7 }, { ...mirrored, offset: { x: 0, y: 0 } }), { ...mirrored, offset: { x: 0, y: 0 } })
    expect(twice).toEqual({ x: 31, y: 7 })
  })
})

describe('stretch ticks', () => {
  it('are 5 mm · (1 + strain) apart at a level and inside the seam line', () => {
    const piece = at('side-front')
    const outline = pointsAlong(piece.edges.flatMap((edge) => edge.path))
    const ticks = stretchTicks(piece, { bust: 0.4, waist: 0.2, 'high-hip': 0.3 })
    expect(ticks.length).toBeGreaterThan(100)
    const waist = ticks.filter((tick) => Math.abs((tick.from.y + tick.to.y) / 2) < 1e-9)
    expect(waist[1]!.from.x - waist[0]!.from.x).toBeCloseTo(6, 9)
    for (const { from, to } of ticks) {
      const inside = insideAtHeight(outline, (from.y + to.y) / 2)
      expect(inside.some(([left, right]) => from.x > left && from.x < right)).toBe(true)
    }
  })

  it('read the strain between levels and hold it beyond them', () => {
    const piece = at('side-front')
    const strains = { bust: 0.4, waist: 0.2 }
    expect(strainAtHeight(piece, strains, 75)).toBeCloseTo(0.3, 9)
    expect(strainAtHeight(piece, strains, 300)).toBe(0.4)
    expect(strainAtHeight(piece, strains, -80)).toBe(0.2)
    expect(strainAtHeight(piece, {}, 0)).toBeNull()
    expect(stretchTicks(piece, {})).toEqual([])
  })

  it('keep out of the label', () => {
    const piece = at('front-centre')
    const ticks = pieceOperations(piece, flat(piece.id), { show: { ticks: true }, strains: { waist: 0 } }).filter(
      (operation) => operation.role === 'stretch-tick',
    )
    const underName = ticks.map((tick) => ends(tick)!.from).filter(({ x, y }) => Math.abs(x - 42) < 20 && Math.abs(y - 61.5) < 4)
    expect(underName).toEqual([])
    expect(ticks.length).toBeGreaterThan(50)
  })
})

describe('layout', () => {
  it('lays pieces in wearing order, waist lines level, the centre back at the right', () => {
    const placements = layoutPieces([...pieces].reverse(), 'wearing', 40)
    expect(placements.map((placement) => placement.piece)).toEqual(['front-centre', 'side-front', 'side-back', 'back-centre'])
    expect(placements.every((placement) => placement.offset.y === 0)).toBe(true)
    const bounds = placements.map((placement) => placedBounds(at(placement.piece), placement))
    expect(bounds[0]!.left).toBeCloseTo(0, 9)
    for (let i = 1; i < bounds.length; i += 1) expect(bounds[i]!.left - bounds[i - 1]!.right).toBeCloseTo(40, 9)
    const back = placements[3]!
    const centre = placePoint({ x: 15, y: 0 }, back).x
    expect(Math.max(...pointsAlong(placedOutline(at('back-centre'), back)).map((point) => point.x))).toBeCloseTo(centre, 6)
  })

  it('packs closer than the wearing order and keeps the spacing between cutting lines', () => {
    const spacing = 12
    const placements = layoutPieces(pieces, 'packed', spacing)
    const outlines = placements.map((placement) => at(placement.piece).cuttingLine.map((point) => placePoint(point, placement)))
    const width = (all: readonly Placement[]) => Math.max(...all.map((each) => placedBounds(at(each.piece), each).right))
    expect(width(placements)).toBeLessThan(width(layoutPieces(pieces, 'wearing', spacing)))
    let least = Infinity
    outlines.forEach((a, i) => outlines.slice(i + 1).forEach((b) => (least = Math.min(least, distance(a, b)))))
    expect(least).toBeGreaterThan(spacing - 2)
  })

  it('starts a new row when the width is used up', () => {
    const placements = layoutPieces(pieces, 'packed', 10, 420)
    const bounds = placements.map((placement) => placedBounds(at(placement.piece), placement))
    expect(Math.max(...bounds.map((each) => each.right))).toBeLessThanOrEqual(420)
    expect(new Set(placements.map((placement) => placement.offset.y)).size).toBeGreaterThan(1)
    bounds.forEach((a, i) =>
      bounds.slice(i + 1).forEach((b, j) => {
        const sameRow = placements[i]!.offset.y === placements[i + 1 + j]!.offset.y
        if (!sameRow) expect(a.bottom - b.top).toBeGreaterThanOrEqual(10 - 1e-6)
      }),
    )
  })
})

function distance(a: readonly Point[], b: readonly Point[]): number {
  let least = Infinity
  for (const [points, polygon] of [
    [a, b],
    [b, a],
  ] as const)
    for (const point of points)
      polygon.forEach((from, i) => {
        const to = polygon[(i + 1) % polygon.length]!
        const [dx, dy] = [to.x - from.x, to.y - from.y]
        const t = Math.min(1, Math.max(0, ((point.x - from.x) * dx + (point.y - from.y) * dy) / (dx * dx + dy * dy || 1)))
        least = Math.min(least, Math.hypot(from.x + t * dx - point.x, from.y + t * dy - point.y))
      })
  return least
}
