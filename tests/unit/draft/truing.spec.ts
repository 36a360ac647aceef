import { describe, expect, it } from 'vitest'
import { applyAlterations } from '../../../shared/domain/draft/alterations'
import { baseStyle } from '../../../shared/domain/draft/style'
import {
  bentFolds,
  CORNER_WITHIN,
  edgeCorners,
  mendCorner,
  mendFold,
  mendSeam,
  seamStations,
  TRUE_WITHIN,
} from '../../../shared/domain/draft/truing'
import type { Mend } from '../../../shared/domain/draft/truing'
import type { Alteration, Draft, MoveAlteration } from '../../../shared/domain/draft/types'
import { mm } from '../../../shared/domain/units/brand'
import { bodyOf, draftOf, widthsOf } from '../../fixtures/draft-inputs'

const body = bodyOf()
const draft = draftOf({ body, style: baseStyle(), widths: widthsOf(body, { front: 0.1, back: 0.14 }) })
const move = (role: MoveAlteration['role'], dx: number, dy: number, rest: Partial<MoveAlteration> = {}): MoveAlteration => ({
  id: `${role.piece}-${role.edge}-${role.node}`,
  kind: 'move',
  name: 'Moved',
  role,
  dx: mm(dx),
  dy: mm(dy),
  carry: false,
  on: true,
  ...rest,
})
const mended = (standing: readonly Alteration[], mend: Mend): readonly Alteration[] =>
  mend.kind === 'change'
    ? standing.map((one) => (one.id === mend.id ? ({ ...one, ...mend.patch } as Alteration) : one))
    : [...standing, ...mend.alterations.map((one, index) => ({ ...one, id: `mend-${index}` }))]
const after = (standing: readonly Alteration[]): Draft => applyAlterations(draft, standing).draft
const seamOf = (from: Draft, name: string) => from.seams.find((one) => one.name === name)!

describe('a seam compared along its way', () => {
  it('lists the points both mates have, each at its own length, alike on a true draft', () => {
    for (const seam of draft.seams) {
      const stations = seamStations(draft.pieces, seam)
      expect(stations.length).toBeGreaterThanOrEqual(2)
      expect(stations[0]).toMatchObject({ a: 0, b: 0 })
      expect(stations.at(-1)!.a).toBeCloseTo(seam.a.length, 9)
      for (const { a, b } of stations) expect(Math.abs(a - b)).toBeLessThan(TRUE_WITHIN)
    }
  })

  it('shows where a move broke it', () => {
    const broken = after([move({ piece: 'side-front', edge: 'side', node: 'waist' }, 30, 0)])
    const stations = seamStations(broken.pieces, seamOf(broken, 'Side seam'))
    const at = (node: string) => stations.find((one) => one.node === node)!
    expect(Math.abs(at('high-hip').a - at('high-hip').b)).toBeLessThan(TRUE_WITHIN)
    expect(Math.abs(at('waist').a - at('waist').b)).toBeGreaterThan(TRUE_WITHIN)
  })
})

describe('a seam that a move broke', () => {
  it('is made true by carrying the move to the mate', () => {
    const standing = [move({ piece: 'side-front', edge: 'side', node: 'waist' }, 30, 0)]
    const broken = seamOf(after(standing), 'Side seam')
    expect(Math.abs(broken.difference)).toBeGreaterThan(TRUE_WITHIN)
    const mend = mendSeam(draft, standing, broken)!
    expect(mend).toMatchObject({ kind: 'change', patch: { carry: true } })
    expect(Math.abs(seamOf(after(mended(standing, mend)), 'Side seam').difference)).toBeLessThanOrEqual(TRUE_WITHIN)
  })

  it('is made true at the free end where the move has no fellow', () => {
    for (const role of [
      { piece: 'side-back', edge: 'armhole', node: 'tip' },
      { piece: 'side-front', edge: 'armhole', node: 'underarm' },
      { piece: 'front-centre', edge: 'neckline', node: 'neck' },
    ] as const) {
      const standing = [move(role, -3, 9)]
      const broken = after(standing).seams.filter((seam) => Math.abs(seam.difference) > TRUE_WITHIN)
      expect(broken.length).toBeGreaterThan(0)
      for (const seam of broken) {
        const mend = mendSeam(draft, standing, seam)!
        expect(Math.abs(seamOf(after(mended(standing, mend)), seam.name).difference)).toBeLessThanOrEqual(TRUE_WITHIN)
      }
    }
  })

  it('asks for nothing where it is true', () => {
    expect(mendSeam(draft, [], draft.seams[0]!)).toBeNull()
  })
})

describe('an edge that a seam crosses', () => {
  it('runs on without a corner in a draft', () => {
    const corners = edgeCorners(draft.pieces, draft.seams)
    expect(corners.map((one) => one.a.edge)).toEqual(expect.arrayContaining(['hem', 'shoulder', 'armhole', 'neckline']))
    for (const corner of corners) expect(Math.abs(corner.angle)).toBeLessThan(0.01)
  })

  it('has its corner told and taken out', () => {
    for (const role of [
      { piece: 'side-front', edge: 'armhole', node: 'underarm', handle: 'after' },
      { piece: 'side-back', edge: 'armhole', node: 'underarm', handle: 'after' },
      { piece: 'front-centre', edge: 'hem', node: 'princess', handle: 'before' },
      { piece: 'front-centre', edge: 'neckline', node: 'neck', handle: 'after' },
    ] as const) {
      const standing = [move(role, role.edge === 'neckline' ? 20 : 4, 12)]
      const altered = after(standing)
      const found = edgeCorners(altered.pieces, altered.seams).filter((one) => Math.abs(one.angle) > CORNER_WITHIN)
      expect(found.length).toBeGreaterThan(0)
      const mend = mendCorner(altered.pieces, found[0]!)!
      const straight = after(mended(standing, mend))
      const left = edgeCorners(straight.pieces, straight.seams).find(
        (one) => one.seam.name === found[0]!.seam.name && one.node === found[0]!.node,
      )!
      expect(Math.abs(left.angle)).toBeLessThan(0.2)
    }
  })
})

describe('a fold', () => {
  it('is straight in a draft, told when a point leaves it, and straightened', () => {
    expect(bentFolds(draft.pieces)).toEqual([])
    const standing = [move({ piece: 'front-centre', edge: 'centre', node: 'waist' }, 5, 2)]
    const bent = bentFolds(after(standing).pieces)
    expect(bent).toMatchObject([{ role: { node: 'waist' }, off: 5 }])
    const mend = mendFold(standing, bent[0]!)!
    expect(bentFolds(after(mended(standing, mend)).pieces)).toEqual([])
  })
})
