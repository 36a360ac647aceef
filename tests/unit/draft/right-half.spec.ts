import { describe, expect, it } from 'vitest'
import { applyAlterations } from '../../../shared/domain/draft/alterations'
import { draftBodice } from '../../../shared/domain/draft/bodice'
import { withPanelCount } from '../../../shared/domain/draft/panels'
import { allPieces, isRight, pieceWords } from '../../../shared/domain/draft/roles'
import { baseStyle } from '../../../shared/domain/draft/style'
import type { Alteration, BodiceStyle, DraftInput, RightHalf } from '../../../shared/domain/draft/types'
import { solveGarment } from '../../../shared/domain/garment/solve'
import { layoutPieces } from '../../../shared/domain/output/layout'
import { DEFAULT_PRINT, printSet } from '../../../shared/domain/output/print-set'
import type { Bone } from '../../../shared/domain/structure/types'
import { mm } from '../../../shared/domain/units/brand'
import { bodiceStyle, draft as draftSchema } from '../../../shared/schemas/draft'
import { bodyOf, draftOf, widthsOf } from '../../fixtures/draft-inputs'
import { brokenOutlines, cornersAcrossSeams, untrueSeams, wrongWidths } from '../../fixtures/draft-invariants'
import { inventedInput } from '../../fixtures/garment-inputs'
import { printFacts } from '../../fixtures/print-facts'

const body = bodyOf()
const base: BodiceStyle = { ...baseStyle(), centreFront: 'seam', centreBack: 'lacing', necklineBackDepth: mm(40) }
const RIGHT: RightHalf = {
  panels: { front: withPanelCount(base.panels.front, 3), back: base.panels.back },
  princessAt: base.princessAt,
  princessEnd: { front: { edge: 'armhole', at: 0.45 }, back: { edge: 'armhole', at: 0.45 } },
  backPrincessAt: 0.5,
  neckline: { front: 'v', back: 'round' },
  necklineWidth: mm(30),
}
const inputWith = (right: RightHalf | null, changes: Partial<BodiceStyle> = {}): DraftInput => ({
  body,
  style: { ...base, ...changes, right },
  widths: widthsOf(body, { front: 0.1, back: 0.14, gapBack: 40 }),
})

describe('a right half that differs', () => {
  const input = inputWith(RIGHT)
  const draft = draftOf(input)

  it('has pieces of its own, every one cut once and named by its side', () => {
    expect(draft.pieces.map(({ id }) => id)).toEqual(['front-centre', 'side-front', 'side-back', 'back-centre'])
    expect(draft.right!.map(({ id }) => id)).toEqual([
      'right-front-centre',
      'right-side-front-a',
      'right-side-front',
      'right-side-back',
      'right-back-centre',
    ])
    expect(allPieces(draft).map(({ quantity }) => quantity)).toEqual(Array(9).fill(1))
    expect(draft.pieces[1]!.name).toBe('Left side front')
    expect(draft.right![1]!.name).toBe(pieceWords('right-side-front-a'))
    expect(draft.right!.flatMap(({ edges }) => edges.flatMap(({ mate }) => (mate ? [isRight(mate.piece)] : [])))).not.toContain(false)
  })

  it('keeps every invariant for itself, at the widths of the left', () => {
    const right = { ...draft, pieces: draft.right!, seams: draft.seams.filter(({ a }) => isRight(a.piece)) }
    expect(right.seams.map(({ name }) => name)).toContain('Front seam A, right')
    expect(brokenOutlines(right)).toEqual([])
    expect(untrueSeams(draft)).toEqual([])
    expect(wrongWidths(right, input)).toEqual([])
    expect(cornersAcrossSeams(right, { style: { ...input.style, ...RIGHT } })).toEqual([])
    const end = (pieces: typeof draft.pieces) => pieces[0]!.edges.at(-1)!.nodes.map(({ at }) => at)
    expect(end(draft.right!)).toEqual(end(draft.pieces))
  })

  it('cannot be cut on a fold, and what does not work in it is said of it', () => {
    const fold = draftBodice(inputWith(RIGHT, { centreFront: 'fold' }))
    expect(fold.ok ? null : fold.problem).toMatchObject({ code: 'right-half-on-fold', at: 'style.centreFront' })
    const wrong = draftBodice(inputWith({ ...RIGHT, backPrincessAt: 0.95 }))
    expect(wrong.ok ? null : wrong.problem).toMatchObject({
      at: 'style.right.backPrincessAt',
      message: expect.stringMatching(/^Right half: /) as string,
    })
  })

  it('takes moves of its own points; what alters the girth alters both halves or neither', () => {
    const move: Alteration = {
      id: 'move',
      kind: 'move',
      name: 'Right side out',
      role: { piece: 'right-side-front', edge: 'side', node: 'waist' },
      dx: mm(4),
      dy: mm(0),
      carry: true,
      on: true,
    }
    const girth = (edge: 'side' | 'princess'): Alteration => ({
      id: edge,
      kind: 'girth',
      name: edge,
      level: 'waist',
      amount: mm(20),
      seams: [{ piece: 'side-front', edge }],
      on: true,
    })
    const waist = (pieces: typeof draft.pieces) =>
      pieces.reduce((sum, piece) => sum + piece.levels.find(({ level }) => level === 'waist')!.width, 0)
    const moved = applyAlterations(draft, [move])
    expect(moved.effects[0]).toMatchObject({ state: 'applied', notCarried: false })
    expect(waist(moved.draft.pieces)).toBeCloseTo(waist(draft.pieces), 9)
    expect(waist(moved.draft.right!) - waist(draft.right!)).toBeCloseTo(8, 1)
    expect(untrueSeams(moved.draft)).toEqual([])
    const centre = applyAlterations(draft, [
      { ...move, role: { piece: 'right-front-centre', edge: 'centre', node: 'waist' }, dx: mm(-6), carry: true },
    ])
    const between = centre.draft.seams.find(({ name }) => name === 'Centre front')!
    expect(Math.abs(between.difference)).toBeGreaterThan(0.05)
    expect(draft.seams.find(({ name }) => name === 'Centre front')!.difference).toBe(0)
    const wider = applyAlterations(draft, [girth('side')])
    expect(waist(wider.draft.pieces) + waist(wider.draft.right!) - waist(draft.pieces) - waist(draft.right!)).toBeCloseTo(20, 1)
    // The right side front has no princess seam beside it: seam A is there. Neither half is altered.
    const neither = applyAlterations(draft, [girth('princess')])
    expect(neither.effects[0]!.state).toBe('parked')
    expect(neither.draft).toEqual(draft)
    expect(applyAlterations(draftOf(inputWith(null)), [move]).effects[0]!.state).toBe('parked')
  })

  it('is laid out mirrored after the left half, printed, stored and read', () => {
    const placements = layoutPieces(allPieces(draft), 'wearing', 30)
    expect(placements.map(({ piece }) => piece)).toEqual(allPieces(draft).map(({ id }) => id))
    expect(placements.map(({ mirrored }) => mirrored)).toEqual([false, false, true, true, true, true, true, false, false])
    const set = printSet(printFacts, allPieces(draft), DEFAULT_PRINT)
    expect(set.ok && set.value.placements).toHaveLength(9)
    expect(draftSchema.parse(JSON.parse(JSON.stringify(draft)))).toEqual(draft)
    expect(bodiceStyle.parse(JSON.parse(JSON.stringify(input.style)))).toEqual(input.style)
  })

  it('holds as asked once round the body', () => {
    const whole = inventedInput()
    const style: BodiceStyle = { ...base, necklineFrontDepth: mm(60), right: RIGHT }
    const solved = solveGarment({ ...whole, document: { ...whole.document, style } })
    if (!solved.ok) throw new Error(solved.problem.message)
    const { rings, settled } = solved.value
    expect(settled).toBe(true)
    for (const ring of rings) {
      const asked = whole.document.levels.find(({ level }) => level === ring.level)!.hold
      expect(Math.abs(ring.pressure / asked - 1)).toBeLessThan(0.02)
    }
  })

  it('carries bones of its own, each once: those of the left half are not doubled', () => {
    const bone = (piece: 'side-front' | 'right-side-front'): Bone => ({
      id: piece,
      name: piece,
      stock: 'spiral-steel-6',
      place: { kind: 'panel', piece, at: 0.5 },
      bottom: { kind: 'edge', clear: mm(13) },
      top: { kind: 'level', level: 'underbust', above: mm(20) },
      channelOn: null,
      under: null,
      on: true,
    })
    const rigidAt = (style: BodiceStyle, bones: readonly Bone[]) => {
      const whole = inventedInput()
      const structure = { bones, closures: { front: null, back: null } }
      const solved = solveGarment({ ...whole, document: { ...whole.document, style, structure } })
      if (!solved.ok) throw new Error(solved.problem.message)
      return solved.value.ringInputs.find(({ level }) => level === 'waist')!.rigidFront
    }
    const style: BodiceStyle = { ...base, necklineFrontDepth: mm(60) }
    const alike = rigidAt(style, [bone('side-front')])
    const left = rigidAt({ ...style, right: RIGHT }, [bone('side-front')])
    const both = rigidAt({ ...style, right: RIGHT }, [bone('side-front'), bone('right-side-front')])
    expect(alike).toBeGreaterThan(10)
    expect(left).toBeCloseTo(alike / 2, 1)
    expect(both).toBeCloseTo(alike, 0)
  })
})
