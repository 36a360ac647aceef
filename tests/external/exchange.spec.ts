/** A produced DXF and SVG read back by general-purpose libraries: ezdxf (Debian), dxf-parser (npm), rsvg-convert and poppler (Debian). */
import { execFileSync, spawnSync } from 'node:child_process'
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { buffer } from 'node:stream/consumers'
import DxfParser from 'dxf-parser'
import sharp from 'sharp'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { loadPrintFonts, type PrintFont } from '../../server/print/fonts'
import { patternDxf } from '../../server/print/pattern-dxf'
import { renderPatternPdf } from '../../server/print/pattern-pdf'
import { patternSvg } from '../../server/print/pattern-svg'
import { pathLength } from '../../shared/domain/geometry/path'
import { pointDistance } from '../../shared/domain/geometry/point'
import type { Point } from '../../shared/domain/geometry/types'
import { exchangeDrawing } from '../../shared/domain/output/exchange'
import { DEFAULT_PRINT, printSet } from '../../shared/domain/output/print-set'
import { mm } from '../../shared/domain/units/brand'
import { draftedPieces } from '../fixtures/print-draft'
import { printFacts } from '../fixtures/print-facts'

const pieces = draftedPieces()
const dxf = patternDxf(pieces, printFacts)
const folder = mkdtempSync(join(tmpdir(), 'tenterframe-exchange-'))
afterAll(() => rmSync(folder, { recursive: true, force: true }))

const around = (points: readonly Point[]) =>
  points.reduce((sum, point, index) => sum + pointDistance(point, points[(index + 1) % points.length]!), 0)
const seamLength = (piece: (typeof pieces)[number]) => piece.edges.reduce((sum, edge) => sum + pathLength(edge.path), 0)

const python = ['/usr/bin/python3', 'python3'].find((command) => spawnSync(command, ['-c', 'import ezdxf']).status === 0) ?? null
if (python === null) console.warn('SKIPPED: python3-ezdxf is not installed, so the DXF was not audited by it.')

const AUDIT = `
import sys, json, ezdxf
document = ezdxf.readfile(sys.argv[1])
auditor = document.audit()
blocks = {}
for block in document.blocks:
    if block.name.startswith('*'): continue
    lengths = {}
    for line in block.query('POLYLINE'):
        points = [vertex.dxf.location for vertex in line.vertices]
        if line.is_closed: points.append(points[0])
        lengths[line.dxf.layer] = sum(a.distance(b) for a, b in zip(points, points[1:]))
    blocks[block.name] = {'lengths': lengths, 'notches': len(block.query('POINT[layer=="4"]')), 'fold': len(block.query('LINE[layer=="6"]')), 'texts': [text.dxf.text for text in block.query('TEXT')]}
print(json.dumps({'errors': [str(error.message) for error in auditor.errors], 'units': document.units, 'inserts': [insert.dxf.name for insert in document.modelspace().query('INSERT')], 'blocks': blocks}))
`

describe('the DXF of a pattern', () => {
  // Source: ezdxf, a general-purpose library (Debian's python3-ezdxf); lengths asked for to .01 mm.
  it.skipIf(python === null)('passes the audit of ezdxf, a block a piece, lengths to .01 mm', () => {
    const file = join(folder, 'pattern.dxf')
    writeFileSync(file, dxf)
    const read = JSON.parse(execFileSync(python!, ['-c', AUDIT, file], { encoding: 'utf8' })) as {
      errors: string[]
      units: number
      inserts: string[]
      blocks: Record<string, { lengths: Record<string, number>; notches: number; fold: number; texts: string[] }>
    }
    expect(read.errors).toEqual([])
    expect(read.units).toBe(4)
    expect(read.inserts.sort()).toEqual(pieces.map(({ id }) => id.toUpperCase()).sort())
    for (const piece of pieces) {
      const block = read.blocks[piece.id.toUpperCase()]!
      expect(Math.abs(block.lengths['14']! - seamLength(piece))).toBeLessThan(0.01)
      expect(Math.abs(block.lengths['1']! - around(piece.cuttingLine))).toBeLessThan(0.01)
      expect(block.notches).toBe(piece.edges.reduce((sum, edge) => sum + edge.notches.length, 0))
      expect(block.fold).toBe(piece.onFold ? 1 : 0)
      expect(block.texts).toContain(`PIECE NAME: ${piece.name}`)
    }
  })

  // Source: dxf-parser 1.1.2 (npm), a general-purpose library.
  it('reads the same in dxf-parser', () => {
    const read = new DxfParser().parseSync(dxf)!
    for (const piece of pieces) {
      const block = read.blocks[piece.id.toUpperCase()]!
      const lines = block.entities.filter((one) => one.type === 'POLYLINE') as unknown as { layer: string; vertices: Point[] }[]
      expect(Math.abs(around(lines.find(({ layer }) => layer === '14')!.vertices) - seamLength(piece))).toBeLessThan(0.01)
      expect(Math.abs(around(lines.find(({ layer }) => layer === '1')!.vertices) - around(piece.cuttingLine))).toBeLessThan(0.01)
    }
    expect(read.header.$INSUNITS).toBe(4)
  })

  it('gives the same bytes again, in ASCII alone', () => {
    expect(patternDxf(draftedPieces(), printFacts)).toBe(dxf)
    const odd = patternDxf(pieces, { ...printFacts, garmentCode: 'Löwe\n0\nEOF' })
    expect([...odd].every((sign) => sign.charCodeAt(0) < 127)).toBe(true)
    expect(new DxfParser().parseSync(odd)!.entities.length).toBeGreaterThan(pieces.length)
  })
})

const tools = ['rsvg-convert', 'pdftocairo'].every((tool) => spawnSync('which', [tool]).status === 0)
if (!tools) console.warn('SKIPPED: rsvg-convert or pdftocairo is not installed, so SVG and PDF were not compared.')

describe('the SVG of a pattern', () => {
  let fonts: readonly PrintFont[]
  let svg: string
  const drawing = exchangeDrawing(printFacts, pieces, 'both')
  beforeAll(async () => {
    fonts = await loadPrintFonts()
    svg = patternSvg(drawing, 'HER-02 version 3', fonts)
  })

  it('is in millimetres, a group a piece, layers by name', () => {
    const width = drawing.bounds.right - drawing.bounds.left
    expect(svg).toContain(`width="${Number(width.toFixed(4))}mm"`)
    for (const piece of pieces) {
      expect(svg).toContain(`<g id="${piece.id}">`)
      for (const layer of ['seam-line', 'cutting-line', 'notch', 'grain', 'label']) expect(svg).toContain(`<g id="${piece.id}-${layer}"`)
    }
    expect(patternSvg(drawing, '<&">', fonts)).toContain('<title>&lt;&amp;&quot;&gt;</title>')
  })

  // Source: rsvg-convert and pdftocairo (Debian): one drawing, 100 dpi; a pixel counts where it differs by more than 25 % from every neighbour.
  it.skipIf(!tools)('looks the same as the PDF: under .2 % of pixels differ', async () => {
    const { bounds } = drawing
    const page = { width: mm(bounds.right - bounds.left), height: mm(bounds.top - bounds.bottom) }
    const planned = printSet(printFacts, pieces, DEFAULT_PRINT)
    if (!planned.ok) throw new Error(planned.problem.message)
    const set = {
      ...planned.value,
      plan: { ...planned.value.plan, page },
      drawing: drawing.pieces.flatMap(({ operations }) => operations),
      sheets: [{ kind: 'tile', name: 'A1', under: [], drawing: { area: bounds, at: { x: 0, y: 0 } }, operations: [] } as const],
    }
    const pdf = await buffer(renderPatternPdf({ set, title: 'one', createdAt: new Date(0) }, fonts))
    writeFileSync(join(folder, 'one.pdf'), pdf)
    writeFileSync(join(folder, 'one.svg'), svg)
    execFileSync('pdftocairo', ['-png', '-r', '100', '-singlefile', join(folder, 'one.pdf'), join(folder, 'pdf')])
    execFileSync('rsvg-convert', ['-d', '100', '-p', '100', '-b', 'white', '-o', join(folder, 'svg.png'), join(folder, 'one.svg')])
    const read = async (name: string) => sharp(join(folder, name)).greyscale().raw().toBuffer({ resolveWithObject: true })
    const [first, second] = [await read('pdf.png'), await read('svg.png')]
    const { width, height } = first.info
    expect(Math.abs(width - second.info.width)).toBeLessThanOrEqual(1)
    expect(Math.abs(height - second.info.height)).toBeLessThanOrEqual(1)
    const offBy = (a: typeof first, b: typeof first, x: number, y: number) => {
      const own = a.data[y * a.info.width + x]!
      for (let dy = -1; dy <= 1; dy++) {
        for (let dx = -1; dx <= 1; dx++) {
          const [nx, ny] = [x + dx, y + dy]
          if (nx < 0 || ny < 0 || nx >= b.info.width || ny >= b.info.height) continue
          if (Math.abs(b.data[ny * b.info.width + nx]! - own) <= 64) return false
        }
      }
      return true
    }
    let off = 0
    for (let y = 0; y < Math.min(height, second.info.height); y++)
      for (let x = 0; x < Math.min(width, second.info.width); x++) if (offBy(first, second, x, y) || offBy(second, first, x, y)) off++
    console.log(`SVG against PDF at 100 dpi: ${((100 * off) / (width * height)).toFixed(4)} % of pixels differ`)
    expect(off / (width * height)).toBeLessThan(0.002)
  })
})
