import { describe, expect, it } from 'vitest'
import { applyCommand } from '../../../shared/domain/document/commands'
import type { GarmentDocument } from '../../../shared/domain/document/types'
import { baseStyle, defaultStyle } from '../../../shared/domain/draft/style'
import { solveGarment } from '../../../shared/domain/garment/solve'
import { splitBody } from '../../../shared/domain/garment/snapshot'
import type { GarmentInput, GarmentSolution } from '../../../shared/domain/garment/types'
import { mm, newtonPerMetre, pascal } from '../../../shared/domain/units/brand'
import { FOUR_LAYERS, inventedDocument, inventedInput, layers } from '../../fixtures/garment-inputs'

function solved(input: GarmentInput): GarmentSolution {
  const result = solveGarment(input)
  if (!result.ok) throw new Error(result.problem.message)
  return result.value
}
const withDocument = (patch: Partial<GarmentDocument>) => inventedInput({ document: inventedDocument(patch) })
const ring = (solution: GarmentSolution, level: string) => solution.rings.find((one) => one.level === level)!
const width = (solution: GarmentSolution, level: string) =>
  2 * solution.draft.pieces.reduce((sum, piece) => sum + (piece.levels.find((one) => one.level === level)?.width ?? 0), 0)

describe('a garment', () => {
  it('reads on its pieces the widths of its rings, to half a millimetre, at every level it covers', () => {
    const solution = solved(inventedInput())
    expect(solution.rings.map((one) => one.level)).toEqual(['bust', 'underbust', 'waist', 'high-hip'])
    for (const one of solution.rings) expect(Math.abs(width(solution, one.level) - one.cut)).toBeLessThan(0.5)
  })

  it('holds what was asked for, to half a per cent, where front and back plans differ and the side seam moves cloth between them', () => {
    const solution = solved(withDocument({ plans: { front: FOUR_LAYERS, back: layers(['shell', 1], ['net', 1]) } }))
    expect(solution.settled).toBe(true)
    expect(solution.rounds).toBeGreaterThan(1)
    for (const one of solution.rings) {
      if (one.governs === 'hold') expect(Math.abs(one.pressure / 1200 - 1)).toBeLessThan(0.005)
    }
    expect(solution.rings.some((one) => one.governs === 'hold')).toBe(true)
  })

  it('keeps a typed cut and says what it holds', () => {
    const document = inventedDocument()
    const levels = document.levels.map((level) => (level.level === 'waist' ? { ...level, solve: 'tension' as const, cut: mm(600) } : level))
    const solution = solved(withDocument({ levels }))
    expect(ring(solution, 'waist').mode).toBe('tension')
    expect(ring(solution, 'waist').cut).toBeCloseTo(600, 1)
    expect(width(solution, 'waist')).toBeCloseTo(600, 0)
  })

  it('finds the lacing gap from a typed cut and pull, and keeps it on the pieces', () => {
    const document = inventedDocument()
    const levels = document.levels.map((level) =>
      level.level === 'waist' ? { ...level, solve: 'gap' as const, cut: mm(590), lacingTension: newtonPerMetre(120) } : level,
    )
    const solution = solved(withDocument({ levels }))
    expect(ring(solution, 'waist').tension).toBeCloseTo(120, 4)
    expect(ring(solution, 'waist').gapBack).toBeGreaterThan(10)
    const back = solution.draft.pieces.find((piece) => piece.id === 'back-centre')!
    expect(back.levels.find((one) => one.level === 'waist')!.from.x).toBeCloseTo(ring(solution, 'waist').gapBack / 2, 1)
  })

  it('has a gap only where a centre is laced, and keeps what was typed', () => {
    const solution = solved(withDocument({ style: { ...defaultStyle(), centreBack: 'fold' } }))
    for (const one of solution.rings) expect(one.gapBack).toBe(0)
  })

  it('differs by exactly what an alteration moves', () => {
    const input = inventedInput()
    const document = applyCommand(input.document, {
      kind: 'move-point',
      role: { piece: 'side-front', edge: 'princess', node: 'waist' },
      dx: mm(-4),
      dy: mm(0),
      carry: false,
      id: 'let-out',
    }).document
    const before = solved(input)
    const after = solved({ ...input, document })
    expect(after.alterationGirth.find((one) => one.level === 'waist')!.by).toBeCloseTo(8, 6)
    expect(ring(after, 'waist').cut - ring(before, 'waist').cut).toBeCloseTo(8, 6)
    expect(ring(after, 'waist').pressure).toBeLessThan(ring(before, 'waist').pressure)
    expect(ring(after, 'bust').cut).toBe(ring(before, 'bust').cut)
  })

  it('presses more with more layers of the same cut, and is cut larger for the same hold', () => {
    const two = solved(withDocument({ plans: { front: layers(['net', 2]), back: layers(['net', 2]) }, style: baseStyle() }))
    const four = solved(withDocument({ plans: { front: layers(['net', 4]), back: layers(['net', 4]) }, style: baseStyle() }))
    expect(ring(four, 'waist').governs).toBe('hold')
    expect(ring(four, 'waist').cut).toBeGreaterThan(ring(two, 'waist').cut)
  })

  it('lowers the hold to a wearer’s cap, up to the upper end of its band', () => {
    const wearer = { ...inventedInput().wearer, pregnancy: true, practitionerAgreed: true }
    const solution = solved(inventedInput({ wearer }))
    for (const one of solution.rings) expect(one.pressureBand.high).toBeLessThan(401)
  })

  it('names the step that lacks something', () => {
    const stepOf = (input: GarmentInput) => {
      const result = solveGarment(input)
      return result.ok ? null : [result.problem.step, result.problem.code]
    }
    expect(stepOf(inventedInput({ measured: {} }))?.[0]).toBe('body')
    expect(stepOf(withDocument({ plans: { front: [], back: FOUR_LAYERS } }))).toEqual(['layers', 'no-layers'])
    expect(stepOf(withDocument({ plans: { front: layers(['gone', 1]), back: FOUR_LAYERS } }))).toEqual(['layers', 'cloth-missing'])
    const lengthwise = FOUR_LAYERS.map((layer) => ({ ...layer, direction: 'lengthwise' as const }))
    expect(stepOf(withDocument({ plans: { front: lengthwise, back: FOUR_LAYERS } }))).toEqual(['cloth', 'test-missing'])
    expect(stepOf(withDocument({ style: { ...defaultStyle(), necklineFrontDepth: mm(400) } }))?.[0]).toBe('draft')
    const levels = inventedDocument().levels.map((level) => ({ ...level, gapBack: mm(2000) }))
    expect(stepOf(withDocument({ levels }))?.[0]).toBe('layers')
  })

  it('gives the same bytes for the same input', () => {
    expect(JSON.stringify(solved(inventedInput()))).toBe(JSON.stringify(solved(inventedInput())))
  })

  it('keeps nothing of the wearer in the part of a version that erasure leaves', () => {
    const input = inventedInput({ wearer: { ...inventedInput().wearer, pregnancy: true } })
    const { kept } = splitBody(input, solved(input))
    const text = JSON.stringify(kept)
    expect(text).not.toMatch(/pregnan/i)
    for (const girth of ['920', '779', '720', '1000']) expect(text).not.toMatch(new RegExp(`"girth":${girth}\\b`))
    expect(kept.rings.every((one) => !('girth' in one) && !('surface' in one))).toBe(true)
  })

  it('asks for a hold in Pa', () => {
    const levels = inventedDocument().levels.map((level) => ({ ...level, hold: pascal(800) }))
    expect(ring(solved(withDocument({ levels })), 'waist').hold).toBe(800)
  })
})
