import { describe, expect, it } from 'vitest'
import { applyCommand } from '../../../shared/domain/document/commands'
import { solveGarment } from '../../../shared/domain/garment/solve'
import { closuresOf, laidBones, rigidOf } from '../../../shared/domain/garment/structure'
import { pathFlatten } from '../../../shared/domain/geometry/path'
import { polygonContains } from '../../../shared/domain/geometry/polygon'
import { pieceOutline } from '../../../shared/domain/draft/piece'
import { layBone } from '../../../shared/domain/structure/bone'
import { DEFAULT_CLOSURES } from '../../../shared/domain/structure/lacing'
import { layOutBones } from '../../../shared/domain/structure/lay-out'
import { boneFindings } from '../../../shared/domain/structure/rules'
import { DEFAULT_STOCK, lengthToBuy } from '../../../shared/domain/structure/stock'
import type { Bone, StructureChoice } from '../../../shared/domain/structure/types'
import type { GarmentDocument } from '../../../shared/domain/document/types'
import { garmentDocument } from '../../../shared/schemas/garments'
import { mm } from '../../../shared/domain/units/brand'
import { draftedPieces } from '../../fixtures/print-draft'
import { inventedDocument, inventedInput } from '../../fixtures/garment-inputs'

const pieces = draftedPieces()
const stock = DEFAULT_STOCK.find(({ id }) => id === 'spiral-steel-6')!
const bone = (more: Partial<Bone> = {}): Bone => ({
  id: 'bone',
  name: 'Side front bone',
  stock: stock.id,
  place: { kind: 'panel', piece: 'side-front', at: 0.5 },
  bottom: { kind: 'edge', clear: mm(13) },
  top: { kind: 'edge', clear: mm(20) },
  channelOn: null,
  under: null,
  on: true,
  ...more,
})
const laid = (one: Bone, on = pieces) => {
  const found = layBone(one, on, DEFAULT_STOCK)
  if (!found.ok) throw new Error(found.problem.message)
  return found.value
}
const solved = (structure: Partial<StructureChoice>, more: Partial<GarmentDocument> = {}) => {
  const base = inventedDocument()
  const document = { ...base, ...more, structure: { bones: [], closures: { front: null, back: null }, ...structure } }
  const found = solveGarment(inventedInput({ document }))
  if (!found.ok) throw new Error(found.problem.message)
  return { document, solution: found.value }
}

describe('a bone on a piece', () => {
  it('lies within it, at its share of the width at every level, as long as its curve', () => {
    const piece = pieces.find(({ id }) => id === 'side-front')!
    const outline = pieceOutline(piece.edges)
    for (const at of [0.2, 0.5, 0.8]) {
      const found = laid(bone({ place: { kind: 'panel', piece: 'side-front', at } }))
      for (const point of pathFlatten(found.path)) expect(polygonContains(outline, point)).toBe(true)
      for (const { level, at: place } of found.crossings) {
        const crossing = piece.levels.find((one) => one.level === level)!
        expect((place.x - crossing.from.x) / (crossing.to.x - crossing.from.x)).toBeCloseTo(at, 3)
      }
      expect(found.count).toBe(2)
      expect(found.cut).toBeCloseTo(found.channel - 12, 9)
    }
  })

  it('ends at a level, or runs free between two', () => {
    const upTo = laid(bone({ top: { kind: 'level', level: 'underbust', above: mm(-10) } }))
    const underbust = pieces.find(({ id }) => id === 'side-front')!.levels.find(({ level }) => level === 'underbust')!
    expect(Math.max(...pathFlatten(upTo.path).map(({ y }) => y))).toBeCloseTo(underbust.from.y - 10, 1)
    const slanted = laid(
      bone({
        place: { kind: 'free', piece: 'side-front', from: { level: 'waist', at: 0.2 }, to: { level: 'bust', at: 0.8 }, bow: mm(0) },
        bottom: { kind: 'edge', clear: mm(0) },
        top: { kind: 'edge', clear: mm(0) },
      }),
    )
    expect(slanted.radius).toBe(Infinity)
    const bowed = laid(
      bone({
        place: { kind: 'free', piece: 'side-front', from: { level: 'waist', at: 0.5 }, to: { level: 'bust', at: 0.5 }, bow: mm(12) },
      }),
    )
    expect(bowed.radius).toBeLessThan(2000)
    const crossing = slanted.crossings.find(({ level }) => level === 'underbust')!
    expect(crossing.width).toBeCloseTo(8 / Math.cos(crossing.tilt), 6)
    expect(crossing.tilt).toBeGreaterThan(0.2)
  })

  it('says why it cannot lie, and never goes to a neighbour', () => {
    const fault = (one: Bone) => {
      const found = layBone(one, pieces, DEFAULT_STOCK)
      return found.ok ? null : found.problem.code
    }
    expect(fault(bone({ place: { kind: 'panel', piece: 'side-front-b', at: 0.5 } }))).toBe('piece-gone')
    expect(fault(bone({ place: { kind: 'seam', piece: 'side-front', edge: 'seam-b' } }))).toBe('piece-gone')
    expect(fault(bone({ stock: 'gone' }))).toBe('stock-gone')
    expect(fault(bone({ top: { kind: 'level', level: 'hip', above: mm(0) } }))).toBe('level-missing')
    expect(fault(bone({ bottom: { kind: 'edge', clear: mm(200) }, top: { kind: 'edge', clear: mm(400) } }))).toBe('too-short')
  })

  it('is cut once in a centre seam and twice anywhere else', () => {
    expect(laid(bone({ place: { kind: 'seam', piece: 'back-centre', edge: 'centre' } })).count).toBe(1)
    expect(laid(bone({ place: { kind: 'seam', piece: 'side-front', edge: 'side' } }))).toMatchObject({ count: 2, inSideSeam: true })
  })

  it('is bought at the shortest length that is long enough', () => {
    const flat = DEFAULT_STOCK.find(({ id }) => id === 'flat-steel-7')!
    expect(lengthToBuy(flat, mm(251))).toBe(300)
    expect(lengthToBuy(flat, mm(900))).toBeNull()
    expect(lengthToBuy(stock, mm(251))).toBeNull()
  })
})

describe('rules of bones', () => {
  it('tell ends near edges, bones close together and curves too tight', () => {
    const codes = (bones: readonly Bone[]) =>
      boneFindings(
        bones.map((one) => laid(one)),
        pieces,
      ).map(({ code }) => code)
    expect(codes([bone({ bottom: { kind: 'edge', clear: mm(4) } })])).toContain('bone-near-edge')
    expect(codes([bone({ place: { kind: 'panel', piece: 'side-front', at: 0.9 }, top: { kind: 'edge', clear: mm(3) } })])).toContain(
      'bone-near-armhole',
    )
    expect(codes([bone(), bone({ id: 'other', place: { kind: 'panel', piece: 'side-front', at: 0.55 } })])).toContain('bones-close')
    expect(
      codes([
        bone({
          stock: 'flat-steel-7',
          place: { kind: 'seam', piece: 'side-front', edge: 'princess' },
          top: { kind: 'level', level: 'bust', above: mm(60) },
        }),
      ]),
    ).toContain('bone-bends-tight')
  })

  it('are kept by bones laid out on any panel; as many as fit where not all do', () => {
    for (const piece of pieces) {
      for (const count of [1, 2, 3]) {
        const { bones, fits } = layOutBones(piece, count, stock, piece.id, (index) => `Bone ${index + 1}`)
        expect(bones).toHaveLength(fits)
        expect(fits).toBeGreaterThan(0)
        expect(
          boneFindings(
            bones.map((one) => laid(one)),
            pieces,
          ),
        ).toEqual([])
      }
      expect(layOutBones(piece, 30, stock, piece.id, String).fits).toBeLessThan(12)
    }
  })
})

describe('bones and closures in the rings', () => {
  it('a bone changes the rings it crosses at once: its channel no longer stretches, the hold stays as asked for', () => {
    const plain = solved({})
    const boned = solved({ bones: [bone({ place: { kind: 'panel', piece: 'side-front', at: 0.5 } })] })
    const at = (of: typeof plain, level: string) => of.solution.rings.find((ring) => ring.level === level)!
    for (const level of ['underbust', 'waist']) {
      expect(at(boned, level).rigidFront).toBeGreaterThan(15.999)
      expect(at(boned, level).rigidFront).toBeLessThan(17)
      expect(at(boned, level).rigidBack).toBe(0)
      expect(at(boned, level).cut).toBeGreaterThan(at(plain, level).cut)
      expect(at(boned, level).pressure / at(plain, level).pressure).toBeCloseTo(1, 2)
    }
    const [waist] = rigidOf(boned.document, boned.solution.draft.pieces, ['waist'])
    expect(Math.abs(at(boned, 'waist').rigidFront - waist!.front)).toBeLessThan(0.02)
  })

  it('widths on the pieces are cloth and rigid widths together, to .5 mm', () => {
    const { solution } = solved({
      bones: [
        bone(),
        bone({ id: 'b2', place: { kind: 'seam', piece: 'side-back', edge: 'side' } }),
        bone({ id: 'b3', place: { kind: 'panel', piece: 'back-centre', at: 0.4 } }),
      ],
      closures: { front: null, back: DEFAULT_CLOSURES.lacing },
    })
    for (const ring of solution.rings) {
      const paper =
        2 * solution.draft.pieces.reduce((sum, piece) => sum + (piece.levels.find(({ level }) => level === ring.level)?.width ?? 0), 0)
      const cloth = ring.segments.reduce((sum, segment) => sum + segment.width, 0)
      expect(Math.abs(paper - cloth - ring.rigidFront - ring.rigidBack)).toBeLessThan(0.5)
      if (ring.level !== 'high-hip') expect(ring.rigidBack).toBeGreaterThan(60)
    }
  })

  it('a channel on one layer alone is rigid in that layer, and presses less than one through all', () => {
    const lining = inventedDocument().plans.front.at(-1)!.id
    const through = solved({ bones: [bone()] }).solution.rings.find(({ level }) => level === 'waist')!
    const alone = solved({ bones: [bone({ channelOn: lining })] }).solution.rings.find(({ level }) => level === 'waist')!
    expect(alone.rigidFront).toBe(0)
    expect(alone.cut).toBeLessThan(through.cut)
  })

  it('reads a lacing off its edge: eyelets, cord and what a pair carries', () => {
    const { document, solution } = solved({ closures: { front: null, back: DEFAULT_CLOSURES.lacing } })
    const [lacing] = closuresOf(document, solution.draft, solution.rings)
    expect(lacing!.kind).toBe('lacing')
    expect(lacing!.eyelets.length).toBeGreaterThan(12)
    expect(lacing!.cord!).toBeGreaterThan(1500)
    const waist = solution.rings.find(({ level }) => level === 'waist')!
    expect(lacing!.pulls.find(({ level }) => level === 'waist')!.pull).toBeCloseTo((waist.tension * 16) / 1000, 9)
  })

  it('cautions: unboned lacing, rust in water, a ridge, a bone that is parked; none for a well boned edge', () => {
    const codes = (of: ReturnType<typeof solved>) => of.solution.cautions.map(({ code }) => code)
    expect(codes(solved({}))).toContain('lacing-unboned')
    const beside = [0.06, 0.5].map((at, index) => bone({ id: `l${index}`, place: { kind: 'panel', piece: 'back-centre', at }, under: 1 }))
    const boned = solved({ bones: beside })
    expect(codes(boned)).not.toContain('lacing-unboned')
    const use = { ...inventedDocument().use, water: true }
    expect(codes(solved({ bones: [bone()] }, { use }))).toContain('bone-rusts')
    expect(codes(solved({ bones: [bone({ stock: 'spiral-stainless-6' })] }, { use }))).not.toContain('bone-rusts')
    expect(codes(solved({ bones: [bone({ under: 0 })] }))).toContain('bone-ridge')
    expect(codes(solved({ bones: [bone({ place: { kind: 'panel', piece: 'side-back-d', at: 0.5 } })] }))).toContain('bone-not-laid')
    expect(laidBones(boned.document, boned.solution.draft.pieces).faults).toEqual([])
  })
})

describe('structure in a document', () => {
  it('keeps a copy of the stock of the workroom that its bones use', () => {
    const own = { ...DEFAULT_STOCK[1]!, id: 'own', name: 'Own spiral', width: mm(10) }
    const start = inventedDocument()
    const { document: one } = applyCommand(start, { kind: 'set-bones', bones: [bone({ stock: 'own' })], label: 'bone', stock: [own] })
    const { document: two } = applyCommand(one, {
      kind: 'set-bones',
      bones: [bone({ stock: 'own', id: 'b2' })],
      label: 'bone',
      stock: [own],
    })
    expect(two.structure!.stock).toEqual([own])
    const found = laidBones(two, pieces)
    expect(found.faults).toEqual([])
    expect(found.bones[0]!.channelWidth).toBe(12)
    expect(laidBones({ structure: { ...two.structure!, stock: [] } }, pieces).faults[0]!.code).toBe('stock-gone')
  })

  it('is added, changed, removed and undone by commands, and read from documents older than it', () => {
    const start = inventedDocument()
    const { document: one } = applyCommand(start, { kind: 'set-bones', bones: [bone()], label: 'bone' })
    const { document: two } = applyCommand(one, {
      kind: 'set-bones',
      bones: [bone({ name: 'Moved' }), bone({ id: 'next' })],
      label: 'bones',
    })
    expect(two.structure!.bones.map(({ id, name }) => [id, name])).toEqual([
      ['bone', 'Moved'],
      ['next', 'Side front bone'],
    ])
    const { document: three } = applyCommand(two, { kind: 'remove-bone', id: 'bone' })
    expect(three.structure!.bones).toHaveLength(1)
    const { structure: _, ...old } = { ...start, measuringId: null, plans: { front: [], back: [] } }
    expect(garmentDocument.parse(old).structure).toBeUndefined()
    expect(solveGarment(inventedInput({ document: { ...start, structure: undefined } as unknown as GarmentDocument })).ok).toBe(true)
    expect(garmentDocument.parse({ ...old, structure: two.structure }).structure).toEqual(two.structure)
  })
})
