import { describe, expect, it } from 'vitest'
import { applyCommand } from '../../../shared/domain/document/commands'
import { planKey } from '../../../shared/domain/document/plan-key'
import type { GarmentDocument, LayerChoice } from '../../../shared/domain/document/types'
import { recut } from '../../../shared/domain/garment/recut'
import { solveGarment } from '../../../shared/domain/garment/solve'
import type { GarmentInput, GarmentSolution } from '../../../shared/domain/garment/types'
import { bustSplit, zoneAt, zoneSegments } from '../../../shared/domain/garment/zones'
import { cutLines } from '../../../shared/domain/output/print-words'
import { planTensionAt } from '../../../shared/domain/textile/plan'
import { mm, strain } from '../../../shared/domain/units/brand'
import { garmentDocument, garmentSolution } from '../../../shared/schemas/garments'
import { CLOTHS, FOUR_LAYERS, inventedCloth, inventedDocument, inventedInput, layers, stripTest } from '../../fixtures/garment-inputs'

const solved = (patch: Partial<GarmentDocument> = {}, more: Partial<GarmentInput> = {}): GarmentSolution => {
  const result = solveGarment(inventedInput({ document: inventedDocument(patch), ...more }))
  if (!result.ok) throw new Error(result.problem.message)
  return result.value
}
const plans = inventedDocument().plans
const soft = layers(['net', 1], ['lining', 2])
const codes = (solution: GarmentSolution) => solution.cautions.map((one) => one.code)
const ringOf = (solution: GarmentSolution, level: string) => {
  const i = solution.rings.findIndex((ring) => ring.level === level)
  return { ring: solution.rings[i]!, geometry: solution.ringInputs[i]! }
}

describe('zones with layers of their own', () => {
  it('name the plan of each segment: waist panel over cups over side over the half', () => {
    const all = { side: 1, cups: 1, waistPanel: 1 }
    expect(zoneAt(all, 'side-front', 'waist')).toBe('waistPanel')
    expect(zoneAt(all, 'side-front', 'bust')).toBe('cups')
    expect(zoneAt(all, 'side-back', 'bust')).toBe('side')
    expect(zoneAt(all, 'back-centre', 'hip')).toBe('back')
    expect(zoneSegments({}, 'waist', { front: 0.5, back: 0.5 }).map((one) => one.share)).toEqual([1, 1])
    expect(zoneSegments(all, 'hip', { front: 0.6, back: 0.7 }).map((one) => [one.zone, one.share])).toEqual([
      ['front', 0.6],
      ['side', 0.4],
      ['back', 0.7],
      ['side', expect.closeTo(0.3, 12)],
    ])
  })

  it('carry one tension round, each with its own strain, on the widths of their pieces', () => {
    const solution = solved({ plans: { ...plans, side: soft } })
    expect(solution.plans.map((plan) => plan.zone)).toEqual(['front', 'back', 'side'])
    for (const [i, ring] of solution.rings.entries()) {
      const geometry = solution.ringInputs[i]!
      expect(ring.segments.map((one) => one.zone)).toEqual(['front', 'side', 'back', 'side'])
      ring.segments.forEach((segment, j) => {
        expect(planTensionAt(geometry.segments[j]!.plan, segment.strain)).toBeCloseTo(ring.tension, 5)
      })
      const onPaper = solution.draft.pieces.reduce((sum, piece) => sum + 2 * piece.levels.find((one) => one.level === ring.level)!.width, 0)
      expect(ring.cut).toBeCloseTo(onPaper, 6)
    }
    const { ring } = ringOf(solution, 'waist')
    expect(ring.segments[1]!.strain).toBeGreaterThan(ring.segments[0]!.strain)
    expect(solution.settled).toBe(true)
    expect(ring.pressure).toBeCloseTo(1200, -1)
  })

  it('divide the half as the pieces do at the bust', () => {
    const solution = solved({ plans: { ...plans, side: soft } })
    const split = bustSplit(solution.draft)
    const shares = ringOf(solution, 'bust').geometry.segments.map((one) => one.share)
    expect(shares[0]).toBeCloseTo(split.front, 1)
    expect(shares[0]! + shares[1]!).toBeCloseTo(1, 12)
  })

  it('as another name for the same layers change nothing', () => {
    const plain = solved()
    const named = solved({ plans: { ...plans, side: FOUR_LAYERS, cups: FOUR_LAYERS, waistPanel: FOUR_LAYERS } })
    named.rings.forEach((ring, i) => {
      expect(ring.pressure).toBeCloseTo(plain.rings[i]!.pressure, 3)
      expect(ring.cut).toBeCloseTo(plain.rings[i]!.cut, 3)
    })
  })

  it('are told where the draft has no piece of their own for them', () => {
    expect(codes(solved())).not.toContain('zone-not-drafted')
    expect(codes(solved({ plans: { ...plans, side: soft } }))).not.toContain('zone-not-drafted')
    expect(codes(solved({ plans: { ...plans, cups: soft } }))).toContain('zone-not-drafted')
    const yoke = solved({ plans: { ...plans, yoke: soft } })
    expect(codes(yoke)).toContain('zone-not-drafted')
    expect(yoke.rings.map((ring) => ring.cut)).toEqual(solved().rings.map((ring) => ring.cut))
  })

  it('say on the paper which layers a side piece is cut from', () => {
    const shown = [
      { zone: 'front' as const, label: 'Shell', cloth: 'A', count: 1 },
      { zone: 'side' as const, label: 'Net', cloth: 'B', count: 2 },
    ]
    const { draft } = solved()
    const lines = (id: string) =>
      cutLines(
        draft.pieces.find((piece) => piece.id === id)!,
        { layers: shown },
      )
    expect(lines('side-front')).toEqual(['cut 4 net', 'in pairs'])
    expect(lines('front-centre')[0]).toContain('shell')
  })

  it('stand while they have layers, and older documents without them still parse', () => {
    const id = 'a6b4ee0e-9a43-4f0e-9f0a-6f6f1ad4bd33'
    const withIds = (some: readonly LayerChoice[]) => some.map((one) => ({ ...one, clothId: id }))
    const document: GarmentDocument = {
      ...inventedDocument(),
      measuringId: id,
      plans: { front: withIds(FOUR_LAYERS), back: withIds(FOUR_LAYERS) },
    }
    const older = JSON.parse(JSON.stringify(document)) as GarmentDocument
    expect(garmentDocument.parse(older).plans).toEqual(document.plans)
    const cups = applyCommand(document, { kind: 'set-layers', zone: 'cups', layers: withIds(soft) }).document
    expect(garmentDocument.parse(cups).plans.cups).toHaveLength(2)
    expect(applyCommand(cups, { kind: 'set-layers', zone: 'cups', layers: [] }).document.plans).toEqual(document.plans)
    expect(applyCommand(cups, { kind: 'set-layers', zone: 'both', layers: [] }).document.plans.cups).toHaveLength(2)
  })

  it('are recut too: a fitted version without zones goes onto one that has them', () => {
    const made = recut(inventedInput(), inventedInput({ document: inventedDocument({ plans: { ...plans, side: soft } }) }))
    expect(made.ok && made.value.levels.every((level) => level.copied !== null)).toBe(true)
  })
})

describe('layers that are rigid, laid at an angle or sewn alone', () => {
  const canvas = inventedCloth('canvas', 'Canvas', stripTest(9000, 0.05))
  const untested = { ...canvas, directions: [], thickness: mm(0.7) }
  const rigid = (cutRatio: number): LayerChoice => ({ ...layers(['canvas', 1])[0]!, rigid: true, cutRatio })

  it('need no test, bring their thickness, and stop the strain', () => {
    const stiffened = solved({ plans: { front: [...FOUR_LAYERS, rigid(1)], back: FOUR_LAYERS } }, { cloths: [...CLOTHS, untested] })
    const { ring } = ringOf(stiffened, 'waist')
    expect(ring.segments[0]!.strain).toBe(0)
    expect(ring.segments[1]!.strain).toBeGreaterThan(0.02)
    expect(stiffened.plans[0]!.layers.at(-1)!.cloth.thickness).toBe(0.7)
    expect(ring.thickness).toBeGreaterThan(ringOf(solved(), 'waist').ring.thickness)
  })

  it('are a problem with its next step when nothing else is left to stretch', () => {
    const result = solveGarment(
      inventedInput({ document: inventedDocument({ plans: { front: [rigid(1)], back: [rigid(1)] } }), cloths: [...CLOTHS, untested] }),
    )
    expect(result).toMatchObject({ ok: false, problem: { code: 'no-stretching-width', step: 'layers' } })
  })

  it('take the nearest tested direction for a typed angle and say so', () => {
    const bias = {
      ...CLOTHS[0]!.directions[0]!,
      direction: 'bias' as const,
      figures: { ...CLOTHS[0]!.directions[0]!.figures, stretch: strain(1.2) },
    }
    const both = CLOTHS.map((cloth) => (cloth.id === 'shell' ? { ...cloth, directions: [...cloth.directions, bias] } : cloth))
    const angled = FOUR_LAYERS.map((choice) => (choice.clothId === 'shell' ? { ...choice, angle: 50 } : choice))
    const solution = solved({ plans: { front: angled, back: angled } }, { cloths: both })
    expect(solution.plans[0]!.layers[0]!.cloth.direction).toBe('bias')
    expect(solution.plans[0]!.state).toBe('dry')
    expect(solution.cautions.find((one) => one.code === 'direction-nearest')).toMatchObject({ severity: 'note', figure: { value: 5 } })
    expect(codes(solved())).not.toContain('direction-nearest')
  })

  it('strain the lining more where channels are sewn to it alone, and count as rigid over the breast', () => {
    const lining = FOUR_LAYERS.find((one) => one.clothId === 'lining')!.id
    const sewn = (['front', 'back'] as const).map((half) => ({ half, layer: lining, width: mm(60) }))
    const levels = inventedDocument().levels.map((level) => ({ ...level, sewn }))
    const { ring, geometry } = ringOf(solved({ levels }), 'waist')
    expect(geometry.segments[0]!.sewn).toEqual([{ layer: lining, width: 60 }])
    expect(ring.cut).toBeGreaterThan(ringOf(solved(), 'waist').ring.cut)
    expect(ring.pressure).toBeCloseTo(1200, -1)
    const wearer = { ...inventedInput().wearer, nursing: true, practitionerAgreed: true }
    expect(codes(solved({ levels }, { wearer }))).toContain('wearer-rigid-over-breast')
  })
})

describe('an answer of the service', () => {
  it('lets every figure of zones, sewn widths and rigid layers through as it is', () => {
    const lining = FOUR_LAYERS.find((one) => one.clothId === 'lining')!.id
    const sewn = [{ half: 'back' as const, layer: lining, width: mm(20) }]
    const loose = FOUR_LAYERS.map((one) => (one.clothId === 'lining' ? { ...one, rigid: true, cutRatio: 1.06 } : one))
    const solution = solved({
      plans: { front: loose, back: FOUR_LAYERS, side: loose.map((one) => ({ ...one, angle: 80 })), cups: soft },
      levels: inventedDocument().levels.map((level) => ({ ...level, sewn })),
    })
    expect(garmentSolution.parse(JSON.parse(JSON.stringify(solution)))).toEqual(JSON.parse(JSON.stringify(solution)))
  })
})

describe('what was learnt or altered in other layers', () => {
  const role = { piece: 'front-centre', edge: 'princess', node: 'waist' } as const
  const altered = applyCommand(inventedDocument(), { kind: 'set-move', role, dx: mm(4), dy: mm(0), carry: true, id: 'a' }).document
  const other = applyCommand(altered, { kind: 'set-layers', zone: 'both', layers: layers(['shell', 1], ['net', 1]) }).document

  it('says that alterations were copied in millimetres, and not when they were recut', () => {
    expect(altered.alteredIn).toBe(planKey(altered.plans))
    expect(codes(solved(altered))).not.toContain('alterations-copied')
    expect(codes(solved(other))).toContain('alterations-copied')
    const made = recut(inventedInput({ document: altered }), inventedInput({ document: other }))
    if (!made.ok) throw new Error(made.problem.message)
    expect(codes(made.value.targets.fitted.solution)).not.toContain('alterations-copied')
  })

  it('uses a learnt stiffness in the layers it was learnt in alone', () => {
    const stiffness = { factor: 1.4, uncertainty: 0.1, learntOn: '2026-11-20', plan: planKey(altered.plans) }
    const waist = (document: GarmentDocument) => ringOf(solved(document), 'waist').ring.cut
    expect(waist({ ...inventedDocument(), stiffness })).toBeGreaterThan(waist(inventedDocument()))
    const elsewhere = solved({ ...other, stiffness })
    expect(ringOf(elsewhere, 'waist').ring.cut).toBe(waist(other))
    expect(codes(elsewhere)).toContain('stiffness-elsewhere')
    expect(codes(elsewhere)).not.toContain('stiffness-learnt')
  })
})
