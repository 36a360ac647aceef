import { describe, expect, it } from 'vitest'
import { measurePages } from '../../../shared/domain/output/measure-page'
import { allowanceState, allowanceWords, cutLines } from '../../../shared/domain/output/print-words'
import { DEFAULT_PRINT, printSet } from '../../../shared/domain/output/print-set'
import type { PrintOptions, PrintSet } from '../../../shared/domain/output/print-set'
import type { Sheet, SheetOperation } from '../../../shared/domain/output/sheet'
import { textWidth, wrapText } from '../../../shared/domain/output/text-width'
import { mm } from '../../../shared/domain/units/brand'
import { printFacts } from '../../fixtures/print-facts'
import { printPieces } from '../../fixtures/print-pieces'

const pieces = printPieces()
const setOf = (options: Partial<PrintOptions> = {}, facts = printFacts): PrintSet => {
  const set = printSet(facts, pieces, { ...DEFAULT_PRINT, ...options })
  if (!set.ok) throw new Error(set.problem.message)
  return set.value
}
const textOf = (operations: readonly SheetOperation[]) =>
  operations.flatMap((operation) => (operation.kind === 'text' ? [operation.text] : [])).join(' ')
const saidBy = (sheets: readonly Sheet[]) => sheets.map((sheet) => textOf([...sheet.under, ...sheet.operations])).join(' ')

describe('print set', () => {
  it('comes as overview, measuring page and tiles in taping order', () => {
    const set = setOf()
    expect(set.sheets.map((sheet) => sheet.kind).filter((kind, i, all) => kind !== all[i - 1])).toEqual(['overview', 'measure', 'tile'])
    const tiles = set.sheets.filter((sheet) => sheet.kind === 'tile')
    expect(tiles.map((sheet) => sheet.name)).toEqual(set.plan.tiles.map((tile) => tile.name))
    tiles.forEach((sheet, i) => expect(sheet.drawing?.area).toEqual(set.plan.tiles[i]!.area))
  })

  it('says on the overview what is cut from which cloth, how to tape, what to mind', () => {
    const said = saidBy(setOf().sheets.filter((sheet) => sheet.kind === 'overview'))
    for (const words of [
      'HER-02 · version 3',
      '14 November 2026',
      'A4',
      'centimetres',
      'cut 4 power net',
      'Firm net, black, lot 1',
      'Side front',
    ])
      expect(said).toContain(words)
    expect(said).toContain('no medical device and no buoyancy aid')
    for (const caution of printFacts.cautions) expect(said).toContain(caution.makerMessage.slice(0, 40))
    expect(said).toContain('59.8 cm')
    expect(said).toContain('firm')
  })

  it('names on each tile itself, its neighbours, garment code and version', () => {
    const set = setOf()
    for (const tile of set.plan.tiles) {
      const said = saidBy(set.sheets.filter((sheet) => sheet.name === tile.name))
      expect(said).toContain(tile.name)
      expect(said).toContain('HER-02 · version 3')
      for (const join of tile.joins) expect(said).toContain(`joins ${join.neighbour}`)
    }
  })

  it('keeps what it writes within the margins of every page', () => {
    for (const options of [{}, { paper: 'letter', orientation: 'portrait', margin: 25 }, { paper: 'A3', overlap: 0 }] as const) {
      const { plan, sheets } = setOf(options)
      for (const sheet of sheets)
        for (const operation of sheet.operations) {
          if (operation.kind !== 'text') continue
          const width = textWidth(operation.text, operation.size, operation.weight)
          const left = operation.at.x - (operation.align === 'start' ? 0 : operation.align === 'middle' ? width / 2 : width)
          expect(left).toBeGreaterThan(plan.margin - 0.5)
          expect(left + width).toBeLessThan(plan.page.width - plan.margin + 0.5)
          expect(operation.at.y).toBeGreaterThan(plan.margin - 0.5)
          expect(operation.at.y + operation.size * 0.7).toBeLessThan(plan.page.height - plan.margin + 0.5)
        }
    }
  })

  it('draws only the outlines asked for and says so', () => {
    const roles = (lines: PrintOptions['lines']) => new Set(setOf({ lines }).drawing.map((operation) => operation.role))
    expect(roles('seam').has('cutting-line')).toBe(false)
    expect(roles('seam').has('seam-line')).toBe(true)
    expect(roles('cutting').has('seam-line')).toBe(false)
    expect(roles('both').has('stretch-tick')).toBe(false)
    expect(saidBy(setOf({ lines: 'seam' }).sheets)).toContain('Not drawn')
    const ticks = setOf({}, { ...printFacts, strains: { front: { waist: 0.2 }, back: { waist: 0.1 } } }).drawing
    expect(ticks.some((operation) => operation.role === 'stretch-tick')).toBe(true)
  })

  it('prints only the pieces chosen, and says when there is none', () => {
    const set = setOf({ only: ['side-back'] })
    expect(set.placements.map((placement) => placement.piece)).toEqual(['side-back'])
    expect(saidBy(set.sheets)).not.toContain('Side front')
    expect(printSet(printFacts, pieces, { ...DEFAULT_PRINT, only: [] })).toMatchObject({ problem: { code: 'nothing-to-print' } })
    expect(printSet(printFacts, [], DEFAULT_PRINT)).toMatchObject({ problem: { code: 'nothing-to-print' } })
  })

  it('carries a long list of cautions over to further overview pages without losing one', () => {
    const cautions = Array.from({ length: 70 }, (_, i) => ({ severity: 'note' as const, makerMessage: `Look at seam ${i + 1}.` }))
    const overview = setOf({}, { ...printFacts, cautions }).sheets.filter((sheet) => sheet.kind === 'overview')
    expect(overview.length).toBeGreaterThan(1)
    for (const caution of cautions) expect(saidBy(overview)).toContain(caution.makerMessage)
  })

  it('refuses margins within which the measuring squares do not fit', () => {
    const set = printSet(printFacts, pieces, { ...DEFAULT_PRINT, margin: 60 })
    expect(set).toMatchObject({ ok: false, problem: { code: 'paper-too-small', at: 'margin' } })
    const pages = measurePages({ page: { width: mm(210), height: mm(297) }, margin: 45 })
    expect(pages.ok && pages.value.map((page) => page.name)).toEqual(['Measure', 'Measure, inches'])
  })
})

describe('words of a print', () => {
  it('count pieces over layers and say the fold or the pair once', () => {
    expect(cutLines(pieces[0]!, printFacts)).toEqual(['cut 1 shell', 'cut 1 lining', 'cut 2 power net', 'on the fold'])
    expect(cutLines(pieces[2]!, printFacts)).toEqual(['cut 2 shell', 'cut 2 lining', 'in pairs'])
    expect(cutLines(pieces[2]!, { layers: [] })).toEqual(['cut 2 of each layer', 'in pairs'])
  })

  it('state the allowances by width', () => {
    expect(allowanceWords(pieces, 'cm')).toBe('0.6 cm armhole, neckline; 1.0 cm princess, side; 1.2 cm shoulder; 2.0 cm hem; 2.5 cm centre')
    const bare = pieces.map((piece) => ({ ...piece, edges: piece.edges.map((edge) => ({ ...edge, allowance: mm(0) })) }))
    expect(allowanceState(bare, 'cm', 'both')).toContain('None planned')
    expect(allowanceState(pieces, 'in', 'both')).toContain('3/8 in princess, side')
  })

  it('wrap at spaces and keep every word', () => {
    const text = 'Go row by row from the top, each row from left to right'
    const lines = wrapText(text, 3.2, 40)
    expect(lines.join(' ')).toBe(text)
    expect(lines.length).toBeGreaterThan(1)
    for (const line of lines) expect(textWidth(line, 3.2)).toBeLessThanOrEqual(40)
    expect(wrapText('', 3, 10)).toEqual([])
  })
})
