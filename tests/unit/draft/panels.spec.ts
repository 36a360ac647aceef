import { describe, expect, it } from 'vitest'
import { applyAlterations } from '../../../shared/domain/draft/alterations'
import { draftBodice } from '../../../shared/domain/draft/bodice'
import { blockOf, edgeWords, halfOf, pieceWords } from '../../../shared/domain/draft/roles'
import { baseStyle } from '../../../shared/domain/draft/style'
import type { BodiceStyle, CentreKind, Draft, DraftInput, FurtherSeam, HalfPanels } from '../../../shared/domain/draft/types'
import { pathEndTangent, pathLength, pathStartTangent } from '../../../shared/domain/geometry/path'
import { pointDistance, vectorDot } from '../../../shared/domain/geometry/point'
import { mm } from '../../../shared/domain/units/brand'
import { bodyOf, draftOf, widthsOf } from '../../fixtures/draft-inputs'
import { cornersAcrossSeams, edgeIn, pieceIn, untrueSeams, wrongWidths } from '../../fixtures/draft-invariants'

const body = bodyOf()
const seam = (id: FurtherSeam['id'], rest: Partial<FurtherSeam> = {}): FurtherSeam => ({
  id,
  beside: 'side',
  at: null,
  end: null,
  share: 0.2,
  letOut: null,
  ...rest,
})
const one: HalfPanels = { princess: false, further: [] }
const two: HalfPanels = { princess: true, further: [] }
const with_ = (...further: FurtherSeam[]): HalfPanels => ({ princess: true, further })
const inputWith = (changes: Partial<BodiceStyle> = {}): DraftInput => ({
  body,
  style: { ...baseStyle(), ...changes },
  widths: widthsOf(body, { front: 0.1, back: 0.14 }),
})
const draftWith = (changes: Partial<BodiceStyle> = {}) => draftOf(inputWith(changes))
const ids = (draft: Draft) => draft.pieces.map(({ id }) => id)
const problemOf = (changes: Partial<BodiceStyle>, rest: Partial<DraftInput> = {}) => {
  const result = draftBodice({ ...inputWith(changes), ...rest })
  return result.ok ? null : result.problem
}
const widthOf = (draft: Draft, piece: Parameters<typeof pieceIn>[1], level: string) =>
  pieceIn(draft, piece).levels.find((own) => own.level === level)!.width

describe('panels of a half', () => {
  it('go from one to five, front and back, named by their role', () => {
    expect(ids(draftWith())).toEqual(['front-centre', 'side-front', 'side-back', 'back-centre'])
    expect(ids(draftWith({ panels: { front: one, back: one } }))).toEqual(['front', 'back'])
    expect(ids(draftWith({ panels: { front: with_(seam('a'), seam('b')), back: two } }))).toEqual([
      'front-centre',
      'side-front-a',
      'side-front-b',
      'side-front',
      'side-back',
      'back-centre',
    ])
    expect(ids(draftWith({ panels: { front: with_(seam('a', { beside: 'centre' })), back: with_(seam('a')) } }))).toEqual([
      'front-centre',
      'front-centre-a',
      'side-front',
      'side-back',
      'side-back-a',
      'back-centre',
    ])
  })

  it('keep their names when another seam is added', () => {
    const before = draftWith({ panels: { front: with_(seam('a')), back: two } })
    const after = draftWith({ panels: { front: with_(seam('a'), seam('b')), back: two } })
    for (const id of ids(before)) expect(ids(after)).toContain(id)
    expect(pieceIn(after, 'side-front-a').edges.map(({ id }) => id)).toEqual(pieceIn(before, 'side-front-a').edges.map(({ id }) => id))
    expect(pieceIn(after, 'side-front').edges[1]!.id).toBe('side')
  })

  it('stand where the drafter puts them, else divide evenly', () => {
    const even = draftWith({ panels: { front: with_(seam('a'), seam('b')), back: two } })
    const [first, second, third] = (['side-front-a', 'side-front-b', 'side-front'] as const).map((id) => widthOf(even, id, 'bust'))
    expect(first).toBeCloseTo(second!, 6)
    expect(second).toBeCloseTo(third!, 6)
    const put = draftWith({ panels: { front: two, back: with_(seam('a', { at: 0.8 })) } })
    const whole = inputWith().widths.find(({ level }) => level === 'bust')!.back
    expect(widthOf(put, 'side-back', 'bust')).toBeCloseTo(0.2 * whole, 6)
    const moved = draftWith({ backPrincessAt: 0.5 })
    expect(widthOf(moved, 'back-centre', 'bust')).toBeCloseTo(0.5 * whole, 6)
  })

  it('share the shaping: a new seam takes its share from the others in proportion', () => {
    const input = inputWith({
      panels: { front: with_(seam('a', { share: 0.3 })), back: two },
      frontShares: { centre: 0, princess: 0.6, side: 0.4 },
    })
    const draft = draftOf(input)
    const taken = (level: 'bust' | 'waist') => input.widths.find((own) => own.level === level)!.front
    const whole = taken('bust') - taken('waist')
    // Each edge of an inner seam takes half its wedge; the centre piece has one edge of the princess seam.
    expect(widthOf(draft, 'front-centre', 'bust') - widthOf(draft, 'front-centre', 'waist')).toBeCloseTo((0.6 * 0.7 * whole) / 2, 6)
    expect(widthOf(draft, 'side-front-a', 'bust') - widthOf(draft, 'side-front-a', 'waist')).toBeCloseTo(((0.6 * 0.7 + 0.3) * whole) / 2, 6)
    expect(wrongWidths(draft, input)).toEqual([])
  })

  it('let out by the other list where a level is wider than the bust', () => {
    const wide = bodyOf({ waistGirth: 1069, hipGirth: 1135 })
    const input = {
      body: wide,
      style: { ...baseStyle(), letOut: { front: { centre: 0, princess: 0, side: 1 }, back: null } },
      widths: widthsOf(wide, { front: 0.1, back: 0.1 }),
    }
    const draft = draftOf(input)
    expect(widthOf(draft, 'front-centre', 'waist')).toBeCloseTo(widthOf(draft, 'front-centre', 'bust'), 6)
    expect(widthOf(draft, 'front-centre', 'underbust')).toBeLessThan(widthOf(draft, 'front-centre', 'bust') - 5)
    expect(wrongWidths(draft, input)).toEqual([])
  })

  it('are refused with the nearest that works', () => {
    expect(problemOf({ panels: { front: with_(seam('a'), seam('b'), seam('c')), back: with_(seam('a')) } })).toMatchObject({
      code: 'style-panels-many',
      at: 'style.panels.front',
      todo: expect.stringContaining('is 3') as string,
    })
    expect(problemOf({ panels: { front: { princess: false, further: [seam('a')] }, back: two } })).toMatchObject({
      at: 'style.panels.front',
    })
    const near = problemOf({ panels: { front: with_(seam('a', { at: 0.46 })), back: two } })
    expect(near).toMatchObject({ code: 'panels-too-narrow', at: 'style.panels.front', todo: expect.stringContaining('evenly') as string })
    const small = bodyOf({ bustGirth: 700, underbustGirth: 600, waistGirth: 560, hipGirth: 740, acrossFront: 250, acrossBack: 290 })
    const many = {
      body: small,
      style: { ...baseStyle(), panels: { front: with_(seam('a'), seam('b'), seam('c')), back: one } },
      widths: widthsOf(small, { front: 0.2, back: 0.2 }),
    }
    const result = draftBodice(many)
    expect(result.ok).toBe(false)
    const most = Number(/are (\d)/.exec(result.ok ? '' : result.problem.todo!)![1])
    const fewer = with_(...[seam('a'), seam('b'), seam('c')].slice(0, most - 2))
    expect(draftBodice({ ...many, style: { ...many.style, panels: { front: fewer, back: one } } }).ok).toBe(true)
    expect(problemOf({ panels: { front: with_(seam('a', { share: 0.95 })), back: two } })).toMatchObject({ code: 'style-shares-further' })
    expect(problemOf({ frontShares: { centre: 0, princess: 1, side: 0 }, panels: { front: one, back: two } })).toMatchObject({
      code: 'style-shares-idle',
      at: 'style.frontShares',
    })
  })

  it('park alterations whose seam is gone, and keep the others', () => {
    const move = (id: string, piece: 'side-front' | 'front-centre', edge: 'side' | 'princess') => ({
      id,
      kind: 'move' as const,
      name: id,
      role: { piece, edge, node: 'waist' },
      dx: mm(2),
      dy: mm(0),
      carry: true,
      on: true,
    })
    const alterations = [
      move('side', 'side-front', 'side'),
      move('princess', 'side-front', 'princess'),
      move('centre', 'front-centre', 'princess'),
    ]
    const states = (draft: Draft) => applyAlterations(draft, alterations).effects.map(({ state }) => state)
    expect(states(draftWith())).toEqual(['applied', 'applied', 'applied'])
    expect(states(draftWith({ panels: { front: with_(seam('a')), back: two } }))).toEqual(['applied', 'parked', 'applied'])
    expect(states(draftWith({ panels: { front: one, back: two } }))).toEqual(['parked', 'parked', 'parked'])
    const carried = applyAlterations(draftWith({ panels: { front: with_(seam('a')), back: two } }), [
      { ...move('a', 'side-front', 'side'), role: { piece: 'side-front-a', edge: 'seam-a', node: 'waist' } },
    ])
    expect(carried.effects[0]!.moved.map(({ piece }) => piece)).toEqual(['side-front-a', 'side-front'])
    expect(untrueSeams(carried.draft)).toEqual([])
  })

  it('have words of their own', () => {
    expect(['side-front-a', 'back', 'front-centre'].map((id) => pieceWords(id as 'back'))).toEqual(['Side front A', 'Back', 'Front centre'])
    expect([blockOf('side-back-c'), blockOf('front'), halfOf('back-centre-b')]).toEqual(['side-back', 'front-centre', 'back'])
    expect([edgeWords('seam-b'), edgeWords('armhole-dart'), edgeWords('hem')]).toEqual(['seam B', 'armhole beyond the dart', 'hem'])
  })
})

describe('the bust angle without a seam', () => {
  it('is a dart to the nearest edge, with legs alike, and said', () => {
    const draft = draftWith({ panels: { front: one, back: one } })
    const front = pieceIn(draft, 'front')
    const [leg, beyond] = [edgeIn(front, 'dart'), edgeIn(front, 'dart-beyond')]
    expect(pathLength(leg.path)).toBeCloseTo(pathLength(beyond.path), 9)
    const directions = vectorDot(pathEndTangent(leg.path), pathEndTangent(beyond.path))
    expect(Math.abs(directions)).toBeLessThan(1)
    expect(leg.mate).toEqual({ piece: 'front', edge: 'dart-beyond' })
    const said = draft.findings.find(({ code }) => code === 'bust-angle-dart')!
    expect(said.value).toBeCloseTo(draft.bustAngle, 9)
    const mouth = pointDistance(
      leg.path.at(-1)!.to.y > leg.path[0]!.from.y ? leg.path.at(-1)!.to : leg.path[0]!.from,
      beyond.path[0]!.from.y > beyond.path.at(-1)!.to.y ? beyond.path[0]!.from : beyond.path.at(-1)!.to,
    )
    expect(said.message).toContain(`${Math.round(mouth * 10) / 10} mm`)
    expect(cornersAcrossSeams(draft, inputWith())).toEqual([])
    expect(draft.seams.find(({ name }) => name === 'Bust dart')!.difference).toBeCloseTo(0, 9)
  })

  it('is eased up to 10 mm, and never dropped silently', () => {
    // FWL - (BWL + .055 N): 376 + 20.405 + 8.
    const flat = bodyOf({ frontWaistLength: 404.405, neckShoulderToBustPoint: 247.405 })
    const style = { ...baseStyle(), panels: { front: one, back: two } }
    const eased = draftOf({ body: flat, style, widths: widthsOf(flat, { front: 0.1, back: 0.1 }) })
    expect(eased.bustAngle).toBe(0)
    expect(eased.findings.find(({ code }) => code === 'bust-angle-eased')!.value).toBeCloseTo(8, 6)
    expect(eased.pieces[0]!.edges.some(({ id }) => id === 'dart')).toBe(false)
    const asDart = draftOf({ body: flat, style: { ...style, bustAs: 'dart' }, widths: widthsOf(flat, { front: 0.1, back: 0.1 }) })
    expect(asDart.bustAngle).toBeGreaterThan(0)
    expect(asDart.findings.some(({ code }) => code === 'bust-angle-dart')).toBe(true)
    expect(problemOf({ bustAs: 'ease' })).toMatchObject({ code: 'style-bust-as', at: 'style.bustAs', todo: 'Take the seam.' })
    expect(problemOf({ bustAs: 'ease', panels: { front: one, back: two } })).toMatchObject({ todo: 'Take a dart.' })
    expect(problemOf({ bustAs: 'dart' })).toMatchObject({ at: 'style.bustAs' })
    expect(problemOf({ bustAs: 'seam', panels: { front: one, back: one } })).toMatchObject({ at: 'style.bustAs' })
  })
})

describe('the princess seam', () => {
  const ends: BodiceStyle['princessEnd']['front'][] = [
    { edge: 'shoulder', at: 0.5 },
    { edge: 'armhole', at: 0.45 },
    { edge: 'neckline', at: 0.6 },
  ]

  it('ends on shoulder, armhole or neckline, front and back each', () => {
    for (const front of ends) {
      for (const back of ends) {
        const input = inputWith({ princessEnd: { front, back }, necklineFrontDepth: mm(60), necklineBackDepth: mm(40) })
        const draft = draftOf(input)
        expect(edgeIn(pieceIn(draft, 'front-centre'), 'princess').nodes.at(-1)!.name).toBe(front.edge)
        expect(untrueSeams(draft)).toEqual([])
        expect(cornersAcrossSeams(draft, input)).toEqual([])
        const shoulders = draft.seams.filter(({ name }) => name.startsWith('Shoulder'))
        expect(shoulders).toHaveLength(front.edge === 'shoulder' || back.edge === 'shoulder' ? 2 : 1)
      }
    }
  })

  it('into the armhole holds the angle so that its turned end stays 15 mm above the underarm', () => {
    const long = bodyOf({ frontWaistLength: 460, neckShoulderToBustPoint: 305 })
    const style = { ...baseStyle(), princessEnd: { ...baseStyle().princessEnd, front: { edge: 'armhole' as const, at: 0.6 } } }
    const draft = draftOf({ body: long, style, widths: widthsOf(long, { front: 0.1, back: 0.1 }) })
    const side = pieceIn(draft, 'side-front')
    const end = edgeIn(side, 'princess').nodes[0]!
    expect(end.name).toBe('armhole')
    expect(end.at.y - draft.frame['front-underarm']!.y).toBeGreaterThan(14)
    const held = draft.findings.find(({ code }) => code === 'bust-angle-held')!
    expect(held).toMatchObject({ piece: 'side-front', unit: 'mm' })
    expect(held.value).toBeGreaterThan(1)
  })

  it('cannot end anywhere: the nearest place that works is said', () => {
    const problem = problemOf({ princessEnd: { ...baseStyle().princessEnd, front: { edge: 'armhole', at: 0.95 } } })
    expect(problem).toMatchObject({ at: 'style.princessEnd.front.at', todo: 'The nearest value that works is 0.75.' })
  })
})

describe('hem and neckline', () => {
  it('run to a point at the centre and level into the side seam, without a corner at any seam', () => {
    const shape = { form: 'pointed' as const, front: mm(80), back: mm(50), side: mm(5), curve: 0.3 }
    const input = inputWith({
      hem: { level: 'waist', below: mm(0) },
      hemShape: shape,
      panels: { front: with_(seam('a')), back: with_(seam('a')) },
    })
    const draft = draftOf(input)
    expect(edgeIn(pieceIn(draft, 'front-centre'), 'hem').nodes[0]!.at.y).toBeCloseTo(-80, 9)
    expect(edgeIn(pieceIn(draft, 'back-centre'), 'hem').nodes[0]!.at.y).toBeCloseTo(-50, 9)
    for (const id of ['side-front', 'side-back'] as const) {
      const hem = edgeIn(pieceIn(draft, id), 'hem')
      expect(hem.nodes.at(-1)!.at.y).toBeCloseTo(-5, 9)
      // Square to the side seam: level on the joined cloth.
      expect(vectorDot(pathEndTangent(hem.path), pathStartTangent(edgeIn(pieceIn(draft, id), 'side').path))).toBeCloseTo(0, 9)
    }
    const [a, b] = [
      edgeIn(pieceIn(draft, 'front-centre'), 'hem').nodes.at(-1)!.at,
      edgeIn(pieceIn(draft, 'side-front-a'), 'hem').nodes[0]!.at,
    ]
    expect(a.y).toBeCloseTo(b.y, 9)
    expect(cornersAcrossSeams(draft, input)).toEqual([])
    expect(problemOf({ hem: { level: 'waist', below: mm(0) }, hemShape: { ...shape, front: mm(400) } })).toMatchObject({
      at: 'style.hemShape.front',
    })
  })

  it('end at any level, down from 45 mm under the bust', () => {
    expect(draftWith({ hem: { level: 'underbust', below: mm(0) } }).pieces).toHaveLength(4)
    expect(problemOf({ hem: { level: 'underbust', below: mm(-60) } })).toMatchObject({ at: 'style.hem.below' })
  })

  it('are round, square or a V, square to the shoulder', () => {
    for (const form of ['round', 'square', 'v'] as const) {
      const input = inputWith({
        neckline: { front: form, back: form },
        necklineFrontDepth: mm(80),
        necklineBackDepth: mm(50),
        necklineWidth: mm(20),
      })
      const draft = draftOf(input)
      expect(cornersAcrossSeams(draft, input)).toEqual([])
      const neckline = edgeIn(pieceIn(draft, 'front-centre'), 'neckline')
      expect(neckline.nodes.map(({ name }) => name)).toEqual(form === 'square' ? ['neck', 'corner', 'centre'] : ['neck', 'centre'])
      const shoulder = edgeIn(pieceIn(draft, 'front-centre'), 'shoulder')
      expect(vectorDot(pathStartTangent(neckline.path), pathStartTangent(shoulder.path))).toBeCloseTo(0, 6)
    }
  })

  it('that come too near to the armhole or the princess seam say which measure works', () => {
    const narrow = bodyOf({ bustPointDistance: 170 })
    const style = {
      ...baseStyle(),
      neckline: { front: 'square' as const, back: 'round' as const },
      necklineFrontDepth: mm(110),
      necklineBackDepth: mm(40),
      necklineWidth: mm(50),
      princessAt: 0.3,
    }
    const input = { body: narrow, style, widths: widthsOf(narrow, { front: 0.15, back: 0.15 }) }
    const result = draftBodice(input)
    expect(result.ok ? null : result.problem).toMatchObject({ code: 'neckline-near-edge' })
    const { at, todo } = result.ok ? { at: '', todo: '' } : result.problem
    const key = at!.replace('style.', '') as 'necklineWidth' | 'necklineFrontDepth'
    const value = Number(/is (\d+) mm/.exec(todo!)![1])
    const next = draftBodice({ ...input, style: { ...style, [key]: mm(value) } })
    expect(next.ok ? '' : next.problem.code).not.toBe('neckline-near-edge')
  })

  it('leave a strap as narrow as 20 mm where no princess seam ends on it', () => {
    const armhole = { edge: 'armhole' as const, at: 0.45 }
    expect(problemOf({ necklineWidth: mm(95), necklineBackDepth: mm(60) })).toMatchObject({ at: 'style.necklineWidth' })
    expect(
      problemOf({
        necklineWidth: mm(95),
        necklineFrontDepth: mm(40),
        necklineBackDepth: mm(60),
        princessEnd: { front: armhole, back: armhole },
      }),
    ).toBeNull()
  })
})

describe('centres', () => {
  it('are fold, seam or opening with allowances of their own', () => {
    const kinds: readonly (readonly [CentreKind, string, number])[] = [
      ['fold', 'fold', 0],
      ['seam', 'seam', 15],
      ['zip', 'opening', 22],
      ['hook-tape', 'opening', 22],
      ['hooks', 'opening', 22],
      ['busk', 'opening', 22],
      ['lacing', 'opening', 22],
    ]
    for (const [centreBack, kind, allowance] of kinds) {
      const draft = draftWith({ centreBack, allowances: { ...baseStyle().allowances, opening: mm(22) } })
      expect(edgeIn(pieceIn(draft, 'back-centre'), 'centre')).toMatchObject({ kind, allowance })
    }
  })

  it('that open take nothing of the shaping unless they are asked to', () => {
    const at = (draft: Draft) => edgeIn(pieceIn(draft, 'back-centre'), 'centre').nodes.find(({ name }) => name === 'waist')!.at.x
    expect(at(draftWith({ centreBack: 'zip' }))).toBeCloseTo(0, 9)
    expect(at(draftWith({ centreBack: 'zip', openingsTake: { front: false, back: true } }))).toBeGreaterThan(3)
    expect(at(draftWith({ centreBack: 'seam' }))).toBeGreaterThan(3)
    expect(at(draftWith({ centreBack: 'fold', openingsTake: { front: true, back: true } }))).toBeCloseTo(0, 9)
  })
})

describe('a top edge', () => {
  const top = { form: 'pointed' as const, front: mm(40), back: mm(14 + 6), side: mm(20), curve: 0.3 }
  const strapless = (changes: Partial<BodiceStyle> = {}): DraftInput => {
    const input = inputWith({ top, ...changes })
    const bust = input.widths.find(({ level }) => level === 'bust')!
    return { ...input, above: { y: mm(183), front: mm(bust.front - 22), back: mm(bust.back - 6) } }
  }

  it('takes the place of neckline, shoulder and armhole, in front less the opening of the bust angle', () => {
    const input = strapless()
    const draft = draftOf(input)
    const edges = new Set(draft.pieces.flatMap(({ edges: own }) => own.map(({ id }) => id)))
    expect([...edges].sort()).toEqual(['centre', 'hem', 'princess', 'side', 'top'])
    expect(draft.armhole).toEqual({ length: 0, aim: 0 })
    expect(untrueSeams(draft)).toEqual([])
    expect(cornersAcrossSeams(draft, input)).toEqual([])
    const height = input.body.values.sideWaistLength - draft.frame['bust-point']!.y
    const opening = 2 * Math.tan((draft.bustAngle * Math.PI) / 360) * height
    expect(opening).toBeGreaterThan(1)
  })

  it('opens a dart where the front has no princess seam', () => {
    const input = strapless({ panels: { front: one, back: one } })
    const draft = draftOf(input)
    expect(pieceIn(draft, 'front').edges.map(({ id }) => id)).toEqual(['hem', 'side', 'top-dart', 'dart-beyond', 'dart', 'top', 'centre'])
    expect(cornersAcrossSeams(draft, input)).toEqual([])
  })

  it('needs a level above the bust, and stays over the bust and under the arm', () => {
    expect(problemOf({ top })).toMatchObject({ code: 'top-without-level', at: 'style.top' })
    const high = draftBodice(strapless({ top: { ...top, side: mm(90) } }))
    expect(high.ok ? null : high.problem).toMatchObject({ at: 'style.top.side' })
    const low = draftBodice(strapless({ top: { ...top, front: mm(2) } }))
    expect(low.ok ? null : low.problem).toMatchObject({ at: 'style.top.front', todo: 'The nearest value that works is 15 mm.' })
  })
})
