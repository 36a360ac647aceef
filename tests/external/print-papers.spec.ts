/** Rolls, typed papers and printer correction, read back by general-purpose tools of Debian: poppler (pdfinfo, pdftotext, pdftocairo) and qpdf. */
import { execFileSync, spawnSync } from 'node:child_process'
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { buffer } from 'node:stream/consumers'
import { afterAll, describe, expect, it } from 'vitest'
import { loadPrintFonts } from '../../server/print/fonts'
import { renderPatternPdf } from '../../server/print/pattern-pdf'
import { PAPERS } from '../../shared/domain/output/paper'
import { printSet, type PrintOptions, type PrintSet } from '../../shared/domain/output/print-set'
import type { PrintFacts } from '../../shared/domain/output/print-words'
import { pathLength } from '../../shared/domain/geometry/path'
import { draftedPieces } from '../fixtures/print-draft'
import { printFacts } from '../fixtures/print-facts'
import { apart, pageOf, POINTS_TO_MM, type Page } from '../fixtures/read-print'

const tools = ['pdfinfo', 'pdftotext', 'pdftocairo', 'qpdf'].every((tool) => spawnSync('which', [tool]).status === 0)
if (!tools) console.warn('SKIPPED: poppler-utils or qpdf is not installed, so rolls and corrected prints were not read back.')
const run = (tool: string, ...args: string[]) => execFileSync(tool, args, { encoding: 'utf8', maxBuffer: 64_000_000 })
const folder = mkdtempSync(join(tmpdir(), 'tenterframe-papers-'))
afterAll(() => rmSync(folder, { recursive: true, force: true }))
const pieces = draftedPieces()

function planned(options: Partial<PrintOptions>, facts: PrintFacts = printFacts): PrintSet {
  const set = printSet(facts, pieces, { paper: 'A4', orientation: 'auto', margin: 10, overlap: 10, ...options })
  if (!set.ok) throw new Error(set.problem.message)
  return set.value
}
let count = 0
async function printed(set: PrintSet): Promise<{ readonly file: string; readonly boxes: readonly (readonly number[])[] }> {
  const file = join(folder, `${count++}.pdf`)
  writeFileSync(file, await buffer(renderPatternPdf({ set, title: 'HER-02', createdAt: new Date(0) }, await loadPrintFonts())))
  expect(run('qpdf', '--check', file)).toContain('No syntax or stream encoding errors')
  const boxes = [...run('pdfinfo', '-box', '-f', '1', '-l', '999', file).matchAll(/MediaBox:\s+([\d. ]+)/g)].map(([, box]) =>
    box!
      .trim()
      .split(/\s+/)
      .map((each) => Number(each) * POINTS_TO_MM),
  )
  return { file, boxes }
}
function read(file: string, number: number): Page {
  const only = ['-f', `${number}`, '-l', `${number}`]
  const svg = `${file}.${number}.svg`
  run('pdftocairo', '-svg', '-origpagesizes', '-noshrink', '-nocenter', ...only, file, svg)
  return pageOf(readFileSync(svg, 'utf8'), run('pdftotext', '-bbox', ...only, file, '-'))
}
const squares = (page: Page) =>
  page.lines.flatMap(({ points, dash }) => {
    if (dash || points.length !== 5 || apart(points[0]!, points[4]!) > 0.01) return []
    const [a, b, c] = points
    const sides = [
      { x: Math.abs(b!.x - a!.x), y: Math.abs(b!.y - a!.y) },
      { x: Math.abs(c!.x - b!.x), y: Math.abs(c!.y - b!.y) },
    ]
    return [{ across: Math.max(...sides.map(({ x }) => x)), along: Math.max(...sides.map(({ y }) => y)) }]
  })

describe.skipIf(!tools)('papers', () => {
  // Source: ISO 216 and ANSI/ASME Y14.1, as in the paper table; read back to .1 mm.
  it.each([
    ['A2', {}],
    ['A0', { overlap: 0 }],
    ['legal', { overlap: 0 }],
    ['tabloid', { layout: 'wearing' }],
    ['typed', { width: 320, height: 450 }],
  ] as const)('%s has pages of its size', async (paper, more) => {
    const set = planned({ paper, ...more })
    const { boxes } = await printed(set)
    const size = paper === 'typed' ? { width: 320, height: 450 } : PAPERS[paper]
    const sides = [size.width, size.height].sort((a, b) => a - b)
    for (const [left, bottom, right, top] of boxes) {
      expect([left, bottom]).toEqual([0, 0])
      const [short, long] = [right!, top!].sort((a, b) => a - b)
      expect(Math.abs(short! - sides[0]!)).toBeLessThan(0.1)
      expect(Math.abs(long! - sides[1]!)).toBeLessThan(0.1)
    }
  })

  it.each(['roll-841', 'roll-914', 'roll-36in'] as const)(
    '%s is one page of its width, with squares, words and every seam at its length',
    async (paper) => {
      const set = planned({ paper })
      const { file, boxes } = await printed(set)
      expect(boxes).toHaveLength(1)
      expect(Math.abs(boxes[0]![2]! - PAPERS[paper].width)).toBeLessThan(0.1)
      const page = read(file, 1)
      for (const side of [100, 101.6])
        expect(squares(page).filter(({ across, along }) => Math.abs(across - side) < 0.1 && Math.abs(along - side) < 0.1)).toHaveLength(1)
      const said = page.words.map((word) => word.text).join(' ')
      expect(said).toContain('no medical device and no buoyancy aid')
      expect(said).toContain('Print at actual size (100 %)')
      // A piece without a fold is one closed line: its seam line, whole.
      const seams = page.lines
        .filter((line) => line.dash === '4.0 2.0')
        .map(({ points }) => points.slice(1).reduce((sum, to, i) => sum + apart(points[i]!, to), 0))
      for (const piece of pieces.filter(({ onFold }) => !onFold)) {
        const length = piece.edges.reduce((sum, edge) => sum + pathLength(edge.path), 0)
        expect(seams.some((seam) => Math.abs(seam - length) < 0.1)).toBe(true)
      }
    },
  )

  it('asks for another paper where pieces are wider than it or a size is unlikely', () => {
    const options = { orientation: 'auto', margin: 10, overlap: 10 } as const
    expect(printSet(printFacts, pieces, { ...options, paper: 'typed' })).toMatchObject({
      ok: false,
      problem: { code: 'paper-size-unlikely', at: 'width' },
    })
    expect(printSet(printFacts, pieces, { ...options, paper: 'typed', width: 300, height: 90 })).toMatchObject({
      ok: false,
      problem: { at: 'height' },
    })
    expect(printSet(printFacts, pieces, { ...options, paper: 'roll-841', margin: 400 })).toMatchObject({
      ok: false,
      problem: { at: 'paper' },
    })
  })
})

describe.skipIf(!tools)('a printer that was measured', () => {
  const printer = { name: 'hall printer', across: 100 / 98, along: 100 / 100.5 }

  // Derived: a printer that makes 98 mm of 100 across and 100.5 along is given 102.04 and 99.50 mm to print.
  it.each(['portrait', 'landscape'] as const)('is corrected on each axis, upright or lying: %s', async (orientation) => {
    const set = planned({ paper: 'A4', orientation }, { ...printFacts, printer })
    const { file, boxes } = await printed(set)
    const [width, height] = orientation === 'portrait' ? [210, 297] : [297, 210]
    for (const box of boxes) {
      expect(Math.abs(box[2]! - width)).toBeLessThan(0.1)
      expect(Math.abs(box[3]! - height)).toBeLessThan(0.1)
    }
    const factors = orientation === 'portrait' ? { x: printer.across, y: printer.along } : { x: printer.along, y: printer.across }
    const measure = set.sheets.findIndex((sheet) => sheet.kind === 'measure') + 1
    const [square] = squares(read(file, measure)).filter(({ across }) => Math.abs(across - 100 * factors.x) < 0.5)
    expect(Math.abs(square!.across - 100 * factors.x)).toBeLessThan(0.1)
    expect(Math.abs(square!.along - 100 * factors.y)).toBeLessThan(0.1)
    set.sheets.forEach((sheet, index) => {
      if (sheet.kind !== 'tile' || index > measure + 1) return
      const said = read(file, index + 1)
        .words.map((word) => word.text)
        .join(' ')
      expect(said).toContain('corrected for hall printer: across 1.0204, along 0.9950')
    })
  })
})
