/** Layers and form objects of a pattern print, read by pikepdf (Debian's python3-pikepdf) and drawn by poppler. */
import { execFileSync, spawnSync } from 'node:child_process'
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { buffer } from 'node:stream/consumers'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { loadPrintFonts } from '../../server/print/fonts'
import { renderPatternPdf } from '../../server/print/pattern-pdf'
import { DEFAULT_PRINT, printSet, type PrintOptions } from '../../shared/domain/output/print-set'
import { draftedPieces } from '../fixtures/print-draft'
import { printFacts } from '../fixtures/print-facts'
import { linesOf } from '../fixtures/read-print'

const python = ['/usr/bin/python3', 'python3'].find((command) => spawnSync(command, ['-c', 'import pikepdf']).status === 0) ?? null
const poppler = spawnSync('which', ['pdftocairo']).status === 0
if (python === null || !poppler) console.warn('SKIPPED: python3-pikepdf or poppler-utils is not installed, so layers were not read back.')
const folder = mkdtempSync(join(tmpdir(), 'tenterframe-layers-'))
afterAll(() => rmSync(folder, { recursive: true, force: true }))

const READ = `
import sys, json, pikepdf
pdf = pikepdf.open(sys.argv[1])
layers = pdf.Root.get('/OCProperties')
forms = {}
placed = []
for page in pdf.pages:
    objects = page.Resources.get('/XObject', {})
    drawn = [str(one.operands[0]) for one in pikepdf.parse_content_stream(page) if str(one.operator) == 'Do']
    placed.append(drawn)
    for name in drawn:
        form = objects[name]
        forms.setdefault(name, {'objects': [], 'layer': str(form.OC.Name) if '/OC' in form else None, 'bytes': len(form.read_bytes()), 'box': [float(side) for side in form.BBox], 'fonts': len(form.Resources.get('/Font', {}))})
        if form.objgen[0] not in forms[name]['objects']: forms[name]['objects'].append(form.objgen[0])
print(json.dumps({'version': pdf.pdf_version, 'problems': pdf.check(), 'all': [str(one.Name) for one in layers.OCGs], 'listed': [str(one.Name) for one in layers.D.Order], 'on': [str(one.Name) for one in layers.D.ON], 'forms': forms, 'placed': placed}))
`
const SWITCH = `
import sys, pikepdf
pdf = pikepdf.open(sys.argv[1])
off = [one for one in pdf.Root.OCProperties.OCGs if str(one.Name) in sys.argv[3:]]
pdf.Root.OCProperties.D.OFF = pikepdf.Array(off)
pdf.Root.OCProperties.D.ON = pikepdf.Array([one for one in pdf.Root.OCProperties.OCGs if str(one.Name) not in sys.argv[3:]])
pdf.save(sys.argv[2])
`
interface Read {
  version: string
  problems: string[]
  all: string[]
  listed: string[]
  on: string[]
  forms: Record<string, { objects: number[]; layer: string | null; bytes: number; box: number[]; fonts: number }>
  placed: string[][]
}
async function printed(name: string, options: Partial<PrintOptions> = {}) {
  const set = printSet(printFacts, draftedPieces(), { ...DEFAULT_PRINT, ...options })
  if (!set.ok) throw new Error(set.problem.message)
  const file = join(folder, `${name}.pdf`)
  writeFileSync(file, await buffer(renderPatternPdf({ set: set.value, title: 'HER-02', createdAt: new Date(0) }, await loadPrintFonts())))
  return { file, set: set.value, read: JSON.parse(execFileSync(python!, ['-c', READ, file], { encoding: 'utf8' })) as Read }
}

describe.skipIf(python === null || !poppler)('layers of a pattern print', () => {
  let file: string
  let read: Read
  let tilesFrom: number
  beforeAll(async () => {
    const made = await printed('both')
    file = made.file
    read = made.read
    tilesFrom = made.set.sheets.findIndex((sheet) => sheet.kind === 'tile')
  })

  it('are named, all on, and open without a complaint (ISO 32000-1, optional content)', () => {
    expect(read.problems).toEqual([])
    expect(Number(read.version)).toBeGreaterThanOrEqual(1.5)
    expect(read.all).toEqual(['Cutting line', 'Seam line', 'Labels and marks'])
    expect(read.listed).toEqual(read.all)
    expect(read.on).toEqual(read.all)
  })

  it('are written once each and placed on every tile; the fold is always shown', () => {
    expect(Object.fromEntries(Object.entries(read.forms).map(([name, form]) => [name, form.layer]))).toEqual({
      '/Marks': 'Labels and marks',
      '/Seams': 'Seam line',
      '/Folds': null,
      '/Cutting': 'Cutting line',
    })
    for (const form of Object.values(read.forms)) {
      expect(form.objects).toHaveLength(1)
      expect(form.bytes).toBeGreaterThan(20)
    }
    expect(read.forms['/Marks']!.fonts).toBeGreaterThan(0)
    read.placed.forEach((names, page) => expect(names).toEqual(page < tilesFrom ? [] : ['/Marks', '/Seams', '/Folds', '/Cutting']))
  })

  it.each([
    ['Cutting line', ''],
    ['Seam line', '4.0 2.0'],
  ] as const)('show no %s once a reader switches it off', (layer, dash) => {
    const strokes = (pdf: string) => {
      const svg = `${pdf}.svg`
      execFileSync('pdftocairo', ['-svg', '-f', `${tilesFrom + 1}`, '-l', `${tilesFrom + 1}`, pdf, svg])
      return linesOf(readFileSync(svg, 'utf8'))
    }
    const off = join(folder, `without ${layer}.pdf`)
    execFileSync(python!, ['-c', SWITCH, file, off, layer])
    const width = layer === 'Cutting line' ? 0.4 : 0.25
    const own = (pdf: string) =>
      strokes(pdf).filter((line) => line.dash === dash && Math.abs(line.width - width) < 0.01 && line.points.length > 20)
    const others = (pdf: string) => strokes(pdf).filter((line) => line.dash !== dash).length
    expect(own(file).length).toBeGreaterThan(0)
    expect(own(off)).toHaveLength(0)
    expect(others(off)).toBe(others(file))
  })

  it('name only what is drawn', async () => {
    expect((await printed('cutting', { lines: 'cutting' })).read.all).toEqual(['Cutting line', 'Labels and marks'])
    expect((await printed('roll', { paper: 'roll-914', lines: 'seam' })).read.all).toEqual(['Seam line', 'Labels and marks'])
  })
})
