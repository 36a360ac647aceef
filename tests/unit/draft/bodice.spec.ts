import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { draftBodice } from '../../../shared/domain/draft/bodice'
import { gentlestCurve } from '../../../shared/domain/draft/armhole'
import { baseStyle, checkStyle, defaultStyle } from '../../../shared/domain/draft/style'
import type { BodiceStyle, Draft, DraftInput } from '../../../shared/domain/draft/types'
import { sharesOf } from '../../../shared/domain/draft/panels'
import { armholeAimWorking, bustAngleWorking, neckWidthWorking, seamWorking, sideSeamWorking } from '../../../shared/domain/draft/working'
import { pathLength } from '../../../shared/domain/geometry/path'
import { pointDistance, vectorDot } from '../../../shared/domain/geometry/point'
import { polygonContains } from '../../../shared/domain/geometry/polygon'
import { mm } from '../../../shared/domain/units/brand'
import { bodyOf, draftOf, valueOf, widthsOf } from '../../fixtures/draft-inputs'
import { edgeIn, pieceIn } from '../../fixtures/draft-invariants'
import { pieceOutline } from '../../../shared/domain/draft/piece'

const body = bodyOf()
const inputWith = (changes: Partial<BodiceStyle> = {}, gapBack = 0): DraftInput => ({
  body,
  style: { ...baseStyle(), ...changes },
  widths: widthsOf(body, { front: 0.1, back: 0.14, gapBack }),
})
const codes = (draft: Draft) => draft.findings.map(({ code }) => code)
const problemOf = (input: DraftInput) => {
  const result = draftBodice(input)
  return result.ok ? null : result.problem
}

describe('styles', () => {
  it('to begin with can be drafted', () => {
    expect(checkStyle(baseStyle(), body)).toEqual([])
    expect(checkStyle(defaultStyle(), body)).toEqual([])
    expect(draftBodice({ ...inputWith({}, 50), style: defaultStyle() }).ok).toBe(true)
  })

  it('that cannot be drafted give the nearest value that works, and that one does work', () => {
    const tries: readonly [keyof BodiceStyle, number][] = [
      ['necklineFrontDepth', 400],
      ['necklineBackDepth', 400],
      ['necklineWidth', 130],
      ['princessAt', 0.95],
      ['verticalFactor', 0.5],
      ['underarmDrop', 90],
      ['bustAngle', 60],
    ]
    for (const [key, value] of tries) {
      const problems = checkStyle({ ...baseStyle(), [key]: mm(value) }, body)
      const own = problems.find(({ at }) => at === `style.${key}`)!
      const nearest = Number(/works is (-?\d+(?:\.\d+)?)/.exec(own.todo!)![1])
      expect(checkStyle({ ...baseStyle(), [key]: mm(nearest) }, body).filter(({ at }) => at === `style.${key}`)).toEqual([])
    }
  })

  it('with shares that do not add up are refused by name', () => {
    const problems = checkStyle({ ...baseStyle(), backShares: { centre: 0.2, princess: 0.2, side: 0.2 } }, body)
    expect(problems).toMatchObject([{ code: 'style-shares', at: 'style.backShares' }])
  })

  it('give the share of a fold or lacing to the other seams in proportion', () => {
    const shares = { centre: 0.14, princess: 0.5, side: 0.36 }
    expect(sharesOf(shares, 'seam')).toEqual(shares)
    const given = sharesOf(shares, 'fold')
    expect(given.centre).toBe(0)
    expect(given.princess + given.side).toBeCloseTo(1, 12)
    expect(given.princess / given.side).toBeCloseTo(0.5 / 0.36, 12)
  })
})

describe('the bodice', () => {
  const draft = draftOf(inputWith())

  it('has a fold without allowance at the centre front, cut once, and a pair of every other piece', () => {
    const front = pieceIn(draft, 'front-centre')
    expect(front).toMatchObject({ onFold: true, quantity: 1 })
    expect(edgeIn(front, 'centre')).toMatchObject({ kind: 'fold', allowance: 0, mate: null })
    expect(Math.min(...front.cuttingLine.map(({ x }) => x))).toBeCloseTo(0, 3)
    expect(pieceIn(draft, 'side-back').quantity).toBe(2)
  })

  it('stands beside its gap where a centre is laced', () => {
    const laced = pieceIn(draftOf(inputWith({ centreBack: 'lacing' }, 60)), 'back-centre')
    expect(laced).toMatchObject({ onFold: false, quantity: 2 })
    expect(edgeIn(laced, 'centre').kind).toBe('opening')
    edgeIn(laced, 'centre').nodes.forEach(({ at }) => expect(at.x).toBeCloseTo(30, 9))
  })

  it('pairs notches on mates at equal lengths, single in front and double at the back', () => {
    const at = (piece: Parameters<typeof pieceIn>[1], edge: 'princess' | 'side', pair: string, up: boolean) => {
      const own = edgeIn(pieceIn(draft, piece), edge)
      const notch = own.notches.find((candidate) => candidate.pair === pair)!
      let travelled = 0
      let best = { off: Infinity, length: 0 }
      for (const segment of own.path) {
        const whole = pathLength([segment])
        for (let step = 0; step <= 400; step += 1) {
          const place = pathPoint(segment, step / 400)
          const off = pointDistance(place, notch.at)
          if (off < best.off) best = { off, length: travelled + (whole * step) / 400 }
        }
        travelled += whole
      }
      expect(Math.abs(vectorDot(notch.inward, notch.inward) - 1)).toBeLessThan(1e-9)
      expect(
        polygonContains(pieceOutline(pieceIn(draft, piece).edges), { x: notch.at.x + notch.inward.x, y: notch.at.y + notch.inward.y }),
      ).toBe(true)
      return { kind: notch.kind, length: up ? best.length : travelled - best.length }
    }
    for (const station of ['waist', 'bust', 'upper']) {
      const a = at('front-centre', 'princess', `front-princess-${station}`, true)
      const b = at('side-front', 'princess', `front-princess-${station}`, false)
      expect(Math.abs(a.length - b.length)).toBeLessThan(3)
      expect([a.kind, b.kind]).toEqual(['single', 'single'])
      expect(at('side-back', 'princess', `back-princess-${station}`, false).kind).toBe('double')
    }
    expect(at('side-front', 'side', 'side-waist', true).length).toBeCloseTo(at('side-back', 'side', 'side-waist', true).length, 0)
  })

  it('keeps grain line, arrow and label inside every piece', () => {
    for (const piece of draft.pieces) {
      const outline = pieceOutline(piece.edges)
      for (const at of [piece.grain.from, piece.grain.to, piece.stretch.from, piece.stretch.to, piece.labelAt])
        expect(polygonContains(outline, at)).toBe(true)
      expect(piece.grain.from.x).toBe(piece.grain.to.x)
      expect(piece.stretch.from.y).toBe(piece.stretch.to.y)
    }
  })

  it('says what it decided or held', () => {
    expect(codes(draft)).toContain('side-seam-moved')
    const of = (changes: Parameters<typeof bodyOf>[0]) => {
      const own = bodyOf(changes)
      return codes(draftOf({ body: own, style: baseStyle(), widths: widthsOf(own, { front: 0.1, back: 0.1 }) }))
    }
    expect(of({ frontWaistLength: 385, neckShoulderToBustPoint: 240 })).toContain('bust-angle-negative')
    expect(of({ frontWaistLength: 460, neckShoulderToBustPoint: 305 })).toContain('bust-angle-large')
    expect(of({ frontWaistLength: 510, neckShoulderToBustPoint: 350 })).toContain('bust-angle-held')
    expect(of({ frontWaistLength: 431, neckShoulderToBustPoint: 240 })).toContain('bust-level-moved')
    expect(of({ acrossBack: 440 })).toContain('across-back-held')
    expect(of({ acrossFront: 440 })).toContain('across-front-held')
    expect(of({ armscyeGirth: 480 })).toContain('armhole-aim-off')
    expect(of({ bustPointDistance: 60 })).toContain('piece-narrow')
  })

  it('opens the front princess by the bust angle and lengthens nothing by it', () => {
    const turned = draftOf(inputWith({ bustAngle: 25 }))
    expect(turned.bustAngle).toBeCloseTo(25, 9)
    const shoulder = (id: 'front-centre' | 'side-front') =>
      edgeIn(pieceIn(turned, id), 'shoulder').nodes.find(({ name }) => name === 'princess')!.at
    expect(pointDistance(shoulder('front-centre'), shoulder('side-front'))).toBeGreaterThan(80)
    turned.seams.forEach(({ difference }) => expect(Math.abs(difference)).toBeLessThan(0.001))
  })

  it('refuses what it cannot draft, in words with a next step', () => {
    expect(problemOf({ ...inputWith(), widths: inputWith().widths.slice(1) })).toMatchObject({ code: 'width-missing', at: 'bust' })
    expect(problemOf(inputWith({ centreBack: 'seam' }, 60))).toMatchObject({ code: 'gap-without-lacing' })
    expect(problemOf(inputWith({ princessAt: 0.99 }))).toMatchObject({ code: 'style-princess-at', at: 'style.princessAt' })
    const short = bodyOf({ bustPointToUnderbust: 150 })
    expect(problemOf({ ...inputWith(), body: short })).toMatchObject({ code: 'levels-too-near', at: 'waist' })
    const narrow = bodyOf({ acrossFront: 210 })
    const problem = problemOf({ ...inputWith({ princessAt: 0.75 }), body: narrow })
    expect(problem).toMatchObject({ code: 'princess-near-armhole', at: 'style.princessAt' })
    const nearest = Number(/works is (\d+(?:\.\d+)?)/.exec(problem!.todo!)?.[1])
    expect(problemOf({ ...inputWith({ princessAt: nearest }), body: narrow })).toBeNull()
  })

  it('is quick', () => {
    const times = Array.from({ length: 60 }, () => {
      const start = performance.now()
      valueOf(draftBodice(inputWith()))
      return performance.now() - start
    }).sort((a, b) => a - b)
    // Well under 5 ms is meant; the bound leaves room for a busy machine.
    expect(times[30]).toBeLessThan(12.5)
  })
})

function pathPoint(segment: Draft['pieces'][number]['edges'][number]['path'][number], t: number) {
  if (segment.kind === 'line')
    return { x: segment.from.x + (segment.to.x - segment.from.x) * t, y: segment.from.y + (segment.to.y - segment.from.y) * t }
  const s = 1 - t
  const mix = (a: number, b: number, c: number, d: number) => s ** 3 * a + 3 * s * s * t * b + 3 * s * t * t * c + t ** 3 * d
  return {
    x: mix(segment.from.x, segment.c1.x, segment.c2.x, segment.to.x),
    y: mix(segment.from.y, segment.c1.y, segment.c2.y, segment.to.y),
  }
}

describe('the armhole curve', () => {
  it('starts and ends as asked whatever the room', () => {
    const number = fc.double({ min: 5, max: 120, noNaN: true })
    fc.assert(
      fc.property(number, number, (across, down) => {
        const curve = gentlestCurve({ x: 0, y: down }, { x: 0, y: -1 }, { x: across, y: 0 }, { x: 1, y: 0 })
        expect(curve.c1.x).toBeCloseTo(0, 9)
        expect(curve.c2.y).toBeCloseTo(0, 9)
        expect(curve.c1.y).toBeGreaterThanOrEqual(0)
        expect(curve.c2.x).toBeGreaterThanOrEqual(0)
      }),
    )
  })
})

describe('workings', () => {
  it('open the figures that the draft shows', () => {
    const input = inputWith()
    const draft = draftOf(input)
    expect(bustAngleWorking(input, draft).result).toEqual({ value: draft.bustAngle, unit: 'degree' })
    expect(neckWidthWorking(body).result.value).toBeCloseTo(72.2, 9)
    expect(armholeAimWorking(input, draft).result.value).toBe(draft.armhole.aim)
    expect(sideSeamWorking(draft).result.value).toBe(draft.findings.find(({ code }) => code === 'side-seam-moved')!.value)
    expect(seamWorking(draft.seams[0]!).result.value).toBe(draft.seams[0]!.difference)
    // The working's own arithmetic gives the figure again.
    const [k] = armholeAimWorking(input, draft).inputs.filter(({ symbol }) => symbol === 'k')
    expect(body.values.armscyeGirth * (1 - (1 - k!.value) / 2)).toBeCloseTo(draft.armhole.aim, 9)
  })
})
