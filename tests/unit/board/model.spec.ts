import { describe, expect, it } from 'vitest'
import { moveOf, moveText, parseMove } from '../../../composables/useBoardEntry'
import {
  arrowMove,
  boardPoints,
  draftBounds,
  edgeUnder,
  levelLines,
  movedSegments,
  piecePoints,
  pieceUnder,
  pointUnder,
  roleKey,
  seamOfEdge,
  steadyPlacements,
  toPieceMove,
} from '../../../composables/useBoardModel'
import { moveWords, seamState } from '../../../composables/useBoardWords'
import type { Alteration, DraftPiece, PointRole } from '../../../shared/domain/draft/types'
import { placePoint } from '../../../shared/domain/output/placing'
import { mm } from '../../../shared/domain/units/brand'
import { drawnDraft } from './draft-fixture'

const draft = drawnDraft()
const placements = steadyPlacements(draft, [])
const points = boardPoints(draft, placements)
const sideFront = draft.pieces.find(({ id }) => id === 'side-front')!
const role: PointRole = { piece: 'side-front', edge: 'princess', node: 'n1' }
const at = (wanted: PointRole) => points.find((point) => roleKey(point.role) === roleKey(wanted))!.at

describe('points of the board', () => {
  it('names every point and handle once', () => {
    expect(new Set(points.map((point) => roleKey(point.role))).size).toBe(points.length)
    const cubics = sideFront.edges.flatMap((edge) => edge.path).filter(({ kind }) => kind === 'cubic').length
    expect(piecePoints(sideFront).filter((point) => point.role.handle)).toHaveLength(2 * cubics)
  })

  it('finds the nearest point within reach and none beyond it', () => {
    const there = at(role)
    const bare = points.filter((point) => !point.role.handle)
    expect(pointUnder(bare, { x: there.x + 3, y: there.y }, 5, null)).toEqual(role)
    expect(pointUnder(bare, { x: there.x + 6, y: there.y }, 5, null)).toBeNull()
  })

  it('goes round the edges that meet in a corner', () => {
    const corner: PointRole = { piece: 'side-front', edge: 'side', node: 'n0' }
    const first = pointUnder(points, at(corner), 4, null)!
    const second = pointUnder(points, at(corner), 4, first, true)!
    expect(new Set([first.edge, second.edge])).toEqual(new Set(['hem', 'side']))
    expect(pointUnder(points, at(corner), 4, second, true)).toEqual(first)
    expect(pointUnder(points, at(corner), 4, second)).toEqual(second)
  })

  it('takes a handle of the chosen edge before a point that lies nearer', () => {
    const handle: PointRole = { ...role, handle: 'after' }
    const between = at(handle)
    expect(pointUnder(points, between, 200, role)?.handle).toBeDefined()
  })

  it('finds the edge and the piece under a place', () => {
    const shoulder = sideFront.edges.find(({ id }) => id === 'shoulder')!.path[0]!
    const placement = placements.find(({ piece }) => piece === 'side-front')!
    const middle = placePoint({ x: (shoulder.from.x + shoulder.to.x) / 2, y: (shoulder.from.y + shoulder.to.y) / 2 }, placement)
    expect(edgeUnder(draft, placements, middle, 4)).toMatchObject({ piece: 'side-front', edge: 'shoulder' })
    expect(edgeUnder(draft, placements, { x: middle.x, y: middle.y + 60 }, 4)).toBeNull()
    expect(pieceUnder(draft, placements, placePoint(sideFront.labelAt, placement))).toBe('side-front')
    expect(pieceUnder(draft, placements, { x: -500, y: 0 })).toBeNull()
  })

  it('turns sideways moves round on mirrored pieces', () => {
    const back = placements.find(({ piece }) => piece === 'back-centre')!
    expect(toPieceMove(back, 4, 2)).toEqual({ dx: -4, dy: 2 })
    expect(toPieceMove(placements[0], 4, 2)).toEqual({ dx: 4, dy: 2 })
  })

  it('nudges by .5 mm, with Shift by 5 mm', () => {
    expect(arrowMove('ArrowLeft', false)).toEqual({ dx: -0.5, dy: 0 })
    expect(arrowMove('ArrowUp', true)).toEqual({ dx: 0, dy: 5 })
    expect(arrowMove('Enter', false)).toBeNull()
  })
})

describe('what a move changes', () => {
  it('carries both sides of a point with its handles', () => {
    const moved = movedSegments(sideFront, role, 3, -2)
    const princess = sideFront.edges.find(({ id }) => id === 'princess')!
    expect(moved).toHaveLength(2)
    expect(moved[0]!.to).toEqual({ x: princess.path[0]!.to.x + 3, y: princess.path[0]!.to.y - 2 })
    expect(moved[1]!.from).toEqual(moved[0]!.to)
    expect(moved[0]!.from).toEqual(princess.path[0]!.from)
  })

  it('carries both edges of a corner', () => {
    const moved = movedSegments(sideFront, { piece: 'side-front', edge: 'side', node: 'n0' }, 0, -6)
    expect(moved).toHaveLength(2)
    const ends = moved.flatMap(({ from, to }) => [from, to]).filter(({ y }) => Math.abs(y + 156) < 1e-9)
    expect(ends).toHaveLength(2)
  })

  it('moves a handle alone', () => {
    const [segment, ...rest] = movedSegments(sideFront, { ...role, handle: 'before' }, 5, 0)
    const original = sideFront.edges.find(({ id }) => id === 'princess')!.path[0]!
    expect(rest).toHaveLength(0)
    expect(segment!.from).toEqual(original.from)
    expect(segment!.to).toEqual(original.to)
    if (segment!.kind !== 'cubic' || original.kind !== 'cubic') throw new Error('curves expected')
    expect(segment!.c2).toEqual({ x: original.c2.x + 5, y: original.c2.y })
    expect(segment!.c1).toEqual(original.c1)
  })

  it('changes nothing for a point that is gone', () => {
    expect(movedSegments(sideFront, { ...role, node: 'gone' }, 5, 0)).toEqual([])
  })
})

const widened = (by: number) =>
  drawnDraft((piece: DraftPiece) =>
    piece.id === 'side-front'
      ? { ...piece, cuttingLine: piece.cuttingLine.map((point) => (point.x > 150 ? { x: point.x + by, y: point.y } : point)) }
      : piece,
  )

describe('where the pieces lie', () => {
  it('lies still while a piece changes a little', () => {
    expect(steadyPlacements(widened(6), placements)).toEqual(placements)
  })

  it('is laid out again when pieces would touch', () => {
    const wide = widened(60)
    const laid = steadyPlacements(wide, placements)
    expect(laid).not.toEqual(placements)
    expect(laid).toEqual(steadyPlacements(wide, []))
  })

  it('is laid out again when a piece goes', () => {
    const fewer = { ...draft, pieces: draft.pieces.slice(1) }
    expect(steadyPlacements(fewer, placements)).toHaveLength(draft.pieces.length - 1)
  })

  it('puts the centre back at the right and waist lines on one height', () => {
    const [first, , , last] = placements
    expect(first!.mirrored).toBe(false)
    expect(last!.mirrored).toBe(true)
    expect(placements.every(({ offset }) => offset.y === 0)).toBe(true)
    expect(levelLines(draft)).toEqual([
      { level: 'bust', y: 150 },
      { level: 'waist', y: 0 },
      { level: 'high-hip', y: -100 },
    ])
    expect(draftBounds(draft, placements)!.left).toBeCloseTo(0, 6)
    expect(draftBounds({ ...draft, pieces: [] }, [])).toBeNull()
  })
})

describe('words and entry', () => {
  it('gives a seam with the asked edge first', () => {
    expect(seamOfEdge(draft, 'side-front', 'princess')).toMatchObject({ length: 525.4, mateLength: 524.2 })
    expect(seamOfEdge(draft, 'side-front', 'hem')).toBeNull()
    expect(seamState(-1.2, 'cm')).toBe('off by 1.2 mm')
    expect(seamState(0.5, 'cm')).toBe('true')
  })

  it('says a move in the words of the piece', () => {
    expect(moveWords(4, 0, 'cm')).toBe('out 4.0 mm')
    expect(moveWords(-2.54, 12.7, 'in')).toBe('in 0.100 in, up 0.500 in')
    expect(moveWords(0, 0, 'cm')).toBe('not moved')
  })

  it('reads signed moves in the unit of the person and asks back what it cannot read', () => {
    expect(parseMove('-4,5', 'cm')).toMatchObject({ ok: true, value: { value: -4.5 } })
    expect(parseMove('1/8', 'in')).toMatchObject({ ok: true, value: { value: 3.175 } })
    expect(parseMove('0.4 cm', 'in')).toMatchObject({ ok: true, value: { value: 4 } })
    expect(parseMove('', 'cm')).toMatchObject({ ok: true, value: { value: 0 } })
    expect(parseMove('a bit', 'cm').ok).toBe(false)
    expect(parseMove(moveText(-4.5, 'cm'), 'cm')).toMatchObject({ ok: true, value: { value: -4.5 } })
  })

  it('adds up the alterations that are on', () => {
    const alteration = (dx: number, on: boolean, carry: boolean): Alteration => ({
      id: `${dx}`,
      kind: 'move',
      name: 'x',
      role,
      dx: mm(dx),
      dy: mm(0),
      carry,
      on,
    })
    const all = [alteration(4, true, false), alteration(2, true, true), alteration(9, false, false)]
    expect(moveOf(all, role).dx).toBe(6)
    expect(moveOf(all, role, true).dx).toBe(2)
    expect(moveOf(all, { ...role, handle: 'after' }).dx).toBe(0)
  })
})
