import { describe, expect, it } from 'vitest'
import { applyAlterations } from '../../../shared/domain/draft/alterations'
import { baseStyle } from '../../../shared/domain/draft/style'
import type { Draft, GirthAlteration, LengthAlteration, MoveAlteration, PointRole } from '../../../shared/domain/draft/types'
import { mm } from '../../../shared/domain/units/brand'
import { bodyOf, draftOf, widthsOf } from '../../fixtures/draft-inputs'

const body = bodyOf()
const draft = draftOf({ body, style: baseStyle(), widths: widthsOf(body, { front: 0.1, back: 0.14 }) })

const move = (role: PointRole, dx: number, dy: number, rest: Partial<MoveAlteration> = {}): MoveAlteration => ({
  id: `${role.piece}-${role.edge}-${role.node}`,
  kind: 'move',
  name: 'Let out at the waist',
  role,
  dx: mm(dx),
  dy: mm(dy),
  carry: false,
  on: true,
  ...rest,
})

const pieceOf = (from: Draft, id: string) => from.pieces.find((piece) => piece.id === id)!
const widthAt = (from: Draft, level: string) =>
  from.pieces.reduce((sum, piece) => sum + piece.levels.find((own) => own.level === level)!.width, 0)
const seam = (from: Draft, name: string) => from.seams.find((own) => own.name === name)!

describe('alterations', () => {
  it('move a node by role, and widths change by exactly that', () => {
    const altered = applyAlterations(draft, [move({ piece: 'side-front', edge: 'side', node: 'waist' }, 6, 0)]).draft
    expect(widthAt(altered, 'waist') - widthAt(draft, 'waist')).toBeCloseTo(6, 6)
    expect(widthAt(altered, 'hip') - widthAt(draft, 'hip')).toBeCloseTo(0, 9)
    expect(pieceOf(altered, 'side-front').cuttingLine).not.toEqual(pieceOf(draft, 'side-front').cuttingLine)
    expect(Math.abs(seam(altered, 'Side seam').difference)).toBeGreaterThan(0.01)
  })

  it('carried to the mate let out both edges alike and keep the seam true', () => {
    for (const role of [
      { piece: 'side-front', edge: 'side', node: 'waist' },
      { piece: 'back-centre', edge: 'princess', node: 'waist' },
      { piece: 'side-back', edge: 'princess', node: 'high-hip' },
      { piece: 'front-centre', edge: 'princess', node: 'waist' },
    ] as const) {
      const { draft: altered, effects } = applyAlterations(draft, [move(role, 5, 3, { carry: true })])
      expect(effects[0]).toMatchObject({ state: 'applied', notCarried: false })
      expect(effects[0]!.moved).toHaveLength(2)
      altered.seams.forEach(({ difference }) => expect(Math.abs(difference)).toBeLessThan(0.5))
      const outwards = role.edge === 'princess' && role.piece === 'side-back' ? -5 : 5
      expect(Math.sign(widthAt(altered, role.node) - widthAt(draft, role.node))).toBe(Math.sign(outwards))
    }
  })

  it('move a corner on both its edges', () => {
    const altered = applyAlterations(draft, [move({ piece: 'side-back', edge: 'armhole', node: 'tip' }, -4, 2)]).draft
    const edges = pieceOf(altered, 'side-back').edges
    const tip = edges.find((edge) => edge.id === 'armhole')!.nodes.at(-1)!.at
    expect(edges.find((edge) => edge.id === 'shoulder')!.nodes[0]!.at).toEqual(tip)
    expect(edges.find((edge) => edge.id === 'shoulder')!.path[0]!.from).toEqual(tip)
    expect(Math.abs(seam(altered, 'Shoulder seam at the arm').difference)).toBeGreaterThan(1)
  })

  it('move a curve handle and leave the nodes', () => {
    const role = { piece: 'side-front', edge: 'armhole', node: 'across', handle: 'before' } as const
    const altered = applyAlterations(draft, [move(role, 3, 0)]).draft
    const armhole = (from: Draft) => pieceOf(from, 'side-front').edges.find((edge) => edge.id === 'armhole')!
    expect(armhole(altered).nodes).toEqual(armhole(draft).nodes)
    expect(armhole(altered).path).not.toEqual(armhole(draft).path)
    expect(altered.armhole.length).not.toBe(draft.armhole.length)
  })

  it('park what has no role, skip what is off, and say so', () => {
    const gone = move({ piece: 'side-front', edge: 'princess', node: 'dart' }, 1, 1)
    const line = move({ piece: 'front-centre', edge: 'shoulder', node: 'neck', handle: 'before' }, 1, 1)
    const off = move({ piece: 'side-front', edge: 'side', node: 'waist' }, 6, 0, { on: false })
    const result = applyAlterations(draft, [gone, line, off])
    expect(result.parked).toEqual([gone, line])
    expect(result.effects.map(({ state }) => state)).toEqual(['parked', 'parked', 'off'])
    expect(result.draft).toEqual(draft)
  })

  it('refuse a move that makes the outline cross itself, and name the piece', () => {
    const result = applyAlterations(draft, [
      move({ piece: 'front-centre', edge: 'princess', node: 'waist' }, -400, 0),
      move({ piece: 'side-front', edge: 'side', node: 'waist' }, 2, 0),
    ])
    expect(result.effects[0]).toMatchObject({ state: 'refused', problem: { code: 'alteration-crosses', at: 'front-centre' } })
    expect(result.effects[1]).toMatchObject({ state: 'applied' })
    expect(widthAt(result.draft, 'waist') - widthAt(draft, 'waist')).toBeCloseTo(2, 6)
  })

  it('say where a carried move has no fellow', () => {
    const result = applyAlterations(draft, [move({ piece: 'side-front', edge: 'princess', node: 'fairing-above' }, -2, 0, { carry: true })])
    expect(result.effects[0]).toMatchObject({ state: 'applied', notCarried: true })
    expect(Math.abs(seam(result.draft, 'Front princess seam').difference)).toBeGreaterThan(0)
  })

  it('leave the draft they were given as it is', () => {
    const before = JSON.stringify(draft)
    applyAlterations(draft, [move({ piece: 'side-front', edge: 'side', node: 'waist' }, 6, 0, { carry: true })])
    expect(JSON.stringify(draft)).toBe(before)
  })

  it('survive a redraft from new measurements', () => {
    const other = bodyOf({ bustGirth: 960, waistGirth: 800 })
    const redraft = draftOf({ body: other, style: baseStyle(), widths: widthsOf(other, { front: 0.1, back: 0.14 }) })
    const altered = applyAlterations(redraft, [move({ piece: 'side-front', edge: 'side', node: 'waist' }, 6, 0, { carry: true })])
    expect(altered.effects[0]!.state).toBe('applied')
    expect(widthAt(altered.draft, 'waist') - widthAt(redraft, 'waist')).toBeCloseTo(12, 1)
  })
})

const girth = (rest: Partial<GirthAlteration> = {}): GirthAlteration => ({
  id: 'girth',
  kind: 'girth',
  name: 'Let out at the waist',
  on: true,
  level: 'waist',
  amount: mm(12),
  seams: [
    { piece: 'side-front', edge: 'side' },
    { piece: 'front-centre', edge: 'princess' },
    { piece: 'side-back', edge: 'princess' },
  ],
  ...rest,
})
const length = (rest: Partial<LengthAlteration> = {}): LengthAlteration => ({
  id: 'length',
  kind: 'length',
  name: 'Longer below the underbust',
  on: true,
  below: 'underbust',
  by: mm(15),
  ...rest,
})

describe('letting out and taking in over seams', () => {
  it('adds up to the whole girth asked for, at that level alone, and leaves every seam true', () => {
    for (const amount of [12, -18]) {
      const { draft: altered, effects } = applyAlterations(draft, [girth({ amount: mm(amount) })])
      expect(effects[0]).toMatchObject({ state: 'applied' })
      expect(effects[0]!.moved).toHaveLength(6)
      expect(2 * (widthAt(altered, 'waist') - widthAt(draft, 'waist'))).toBeCloseTo(amount, 6)
      for (const level of ['bust', 'underbust', 'hip']) expect(widthAt(altered, level)).toBeCloseTo(widthAt(draft, level), 6)
      for (const own of altered.seams) expect(Math.abs(own.difference)).toBeLessThan(0.5)
    }
  })

  it('is the same from either edge of a seam', () => {
    const one = applyAlterations(draft, [girth({ seams: [{ piece: 'side-front', edge: 'side' }] })]).draft
    const other = applyAlterations(draft, [girth({ seams: [{ piece: 'side-back', edge: 'side' }] })]).draft
    for (const piece of one.pieces) {
      const fellow = pieceOf(other, piece.id)
      piece.levels.forEach((level, index) => expect(level.width).toBeCloseTo(fellow.levels[index]!.width, 9))
    }
  })

  it('is parked whole when one of its seams is gone or is a fold, never shared over the rest', () => {
    const gone = girth({ seams: [...girth().seams, { piece: 'front-centre', edge: 'centre' }] })
    const { draft: altered, effects, parked } = applyAlterations(draft, [gone])
    expect(effects[0]!.state).toBe('parked')
    expect(parked).toEqual([gone])
    expect(altered).toBe(draft)
  })
})

describe('lengthening and shortening', () => {
  it('draws out what lies between two levels on every piece, keeps widths and mates, and moves the levels below', () => {
    const { draft: altered } = applyAlterations(draft, [length()])
    for (const level of ['bust', 'underbust', 'waist', 'high-hip', 'hip']) {
      expect(widthAt(altered, level)).toBeCloseTo(widthAt(draft, level), 6)
      const down = level === 'bust' || level === 'underbust' ? 0 : 15
      expect(draft.frame[`level-${level}`]!.y - altered.frame[`level-${level}`]!.y).toBeCloseTo(down, 9)
    }
    for (const own of altered.seams) expect(Math.abs(own.difference)).toBeLessThan(0.5)
    const hem = (from: Draft) => pieceOf(from, 'front-centre').edges.find((edge) => edge.id === 'hem')!.nodes[0]!.at.y
    expect(hem(draft) - hem(altered)).toBeCloseTo(15, 9)
  })

  it('and shortening by as much gives the first draft back', () => {
    const back = applyAlterations(draft, [length({ id: 'a', by: mm(12) }), length({ id: 'b', by: mm(-12) })]).draft
    for (const piece of back.pieces) {
      pieceOf(draft, piece.id).edges.forEach((edge, index) =>
        edge.nodes.forEach((node, at) => expect(Math.abs(node.at.y - piece.edges[index]!.nodes[at]!.at.y)).toBeLessThan(1e-9)),
      )
    }
  })

  it('is refused where two levels would meet, with the most that works, and parked below the lowest', () => {
    const { effects } = applyAlterations(draft, [length({ by: mm(-290) })])
    expect(effects[0]!.state).toBe('refused')
    const most = Number(/by (\d+) mm/.exec(effects[0]!.problem!.todo!)![1])
    expect(applyAlterations(draft, [length({ by: mm(-most) })]).effects[0]!.state).toBe('applied')
    expect(applyAlterations(draft, [length({ below: 'hip' })]).effects[0]!.state).toBe('parked')
  })
})
