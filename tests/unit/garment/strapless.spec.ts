import { describe, expect, it } from 'vitest'
import { applyCommand } from '../../../shared/domain/document/commands'
import type { GarmentDocument } from '../../../shared/domain/document/types'
import { solveGarment } from '../../../shared/domain/garment/solve'
import type { GarmentInput } from '../../../shared/domain/garment/types'
import { mm, pascal } from '../../../shared/domain/units/brand'
import { bodiceStyle } from '../../../shared/schemas/draft'
import { inventedInput } from '../../fixtures/garment-inputs'

const TOP = { form: 'pointed' as const, front: mm(45), back: mm(20), side: mm(25), curve: 0.3 }

function straplessInput(changes: Partial<GarmentInput> = {}, top: GarmentDocument['style']['top'] = TOP): GarmentInput {
  const input = inventedInput()
  const { document } = applyCommand(input.document, { kind: 'set-style', patch: { top } })
  return { ...input, document, measured: { ...input.measured, upperBustGirth: { value: 880 } }, ...changes }
}
const solved = (input: GarmentInput) => {
  const result = solveGarment(input)
  if (!result.ok) throw new Error(`${result.problem.code}: ${result.problem.message}`)
  return result.value
}

describe('a strapless garment', () => {
  it('has a level at its top edge that is solved, drafted and read again like the others', () => {
    const input = straplessInput()
    const solution = solved(input)
    expect(solution.levels[0]).toMatchObject({ id: 'top-edge', name: 'Top edge', girthEstimated: true })
    expect(solution.settled).toBe(true)
    const ring = solution.rings.find(({ level }) => level === 'top-edge')!
    const asked = input.document.levels.find(({ level }) => level === 'top-edge')!.hold
    expect(Math.abs(ring.pressure / asked - 1)).toBeLessThan(0.02)
    const onPieces = solution.draft.pieces.reduce((sum, piece) => sum + piece.levels.find(({ level }) => level === 'top-edge')!.width, 0)
    expect(Math.abs(2 * onPieces - ring.cut)).toBeLessThan(1)
  })

  it('cuts the top edge shorter when it is to hold more', () => {
    const input = straplessInput()
    const cut = (hold: number) =>
      solved({
        ...input,
        document: applyCommand(input.document, { kind: 'set-level', level: 'top-edge', patch: { hold: pascal(hold) } }).document,
      }).rings.find(({ level }) => level === 'top-edge')!.cut
    expect(cut(1500)).toBeLessThan(cut(700))
  })

  it('needs the upper bust girth and a hold there, each said where it is missing', () => {
    const input = straplessInput()
    const { upperBustGirth: _, ...measured } = input.measured
    const lacking = solveGarment({ ...input, measured })
    expect(lacking.ok ? null : lacking.problem).toMatchObject({ step: 'body', at: 'upperBustGirth' })
    const slack = {
      ...input,
      document: applyCommand(input.document, { kind: 'set-level', level: 'top-edge', patch: { hold: pascal(0) } }).document,
    }
    const without = solveGarment(slack)
    expect(without.ok ? null : without.problem).toMatchObject({ step: 'layers', code: 'top-edge-without-hold', at: 'top-edge' })
  })

  it('takes the level and the use with the style in one step, and gives them back', () => {
    const { document } = straplessInput()
    expect(document.use.strapless).toBe(true)
    expect(document.levels.map(({ level }) => level)).toContain('top-edge')
    const back = applyCommand(document, { kind: 'set-style', patch: { top: null } }).document
    expect(back.use.strapless).toBe(false)
    expect(solved({ ...straplessInput(), document: back }).rings.some(({ level }) => level === 'top-edge')).toBe(false)
    expect(bodiceStyle.parse(JSON.parse(JSON.stringify(document.style)))).toEqual(document.style)
  })
})

describe('documents from before', () => {
  it('are read with the panels, ends and edges that they were drafted with', () => {
    const input = inventedInput()
    const { allowances, ...rest } = JSON.parse(JSON.stringify(input.document.style)) as Record<string, unknown> & { allowances: object }
    const since = ['panels', 'hemShape', 'neckline', 'top', 'princessEnd', 'backPrincessAt', 'letOut', 'openingsTake', 'bustAs']
    const old = Object.fromEntries(Object.entries(rest).filter(([key]) => !since.includes(key)))
    const before = Object.fromEntries(Object.entries(allowances).filter(([key]) => key !== 'opening'))
    const read = bodiceStyle.parse({ ...old, allowances: before })
    expect(read.panels).toEqual({ front: { princess: true, further: [] }, back: { princess: true, further: [] } })
    expect(solved({ ...input, document: { ...input.document, style: read } }).draft).toEqual(solved(input).draft)
  })
})
