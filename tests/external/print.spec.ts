/**
 * A produced pattern print read back by general-purpose tools of Debian: poppler (pdfinfo, pdffonts, pdftotext, pdftocairo)
 * and qpdf. Nothing of the drawing code is used to read: pages are taped by the join lines that are found on them.
 */
import { execFileSync } from 'node:child_process'
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { buffer } from 'node:stream/consumers'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { loadPrintFonts } from '../../server/print/fonts'
import { renderPatternPdf } from '../../server/print/pattern-pdf'
import type { Path, Point } from '../../shared/domain/geometry/types'
import { PAPERS } from '../../shared/domain/output/paper'
import { printSet } from '../../shared/domain/output/print-set'
import type { PrintOptions, PrintSet } from '../../shared/domain/output/print-set'
import { printerCorrection } from '../../shared/domain/output/printer-correction'
import { printFacts } from '../fixtures/print-facts'
import { apart, linesOf, pageOf, POINTS_TO_MM, type Line, type Page } from '../fixtures/read-print'
import { draftedPieces } from '../fixtures/print-draft'

const has = (tool: string) => {
  try {
    execFileSync('which', [tool], { stdio: 'ignore' })
    return true
  } catch {
    return false
  }
}
const missing = ['pdfinfo', 'pdffonts', 'pdftotext', 'pdftocairo', 'qpdf'].filter((tool) => !has(tool))
if (missing.length > 0) console.warn(`print checks skipped: ${missing.join(', ')} not installed (Debian: poppler-utils, qpdf)`)
const run = (tool: string, ...args: string[]) => execFileSync(tool, args, { encoding: 'utf8', maxBuffer: 64_000_000 })

const SEAM = '4.0 2.0'
const JOIN = '2.0 2.0'

function pathLengthByChords(path: Path): number {
  let length = 0
  for (const segment of path) {
    if (segment.kind === 'line') length += apart(segment.from, segment.to)
    else {
      const { from, c1, c2, to } = segment
      const at = (t: number): Point => {
        const s = 1 - t
        const mix = (p: number, q: number, r: number, u: number) => s ** 3 * p + 3 * s * s * t * q + 3 * s * t * t * r + t ** 3 * u
        return { x: mix(from.x, c1.x, c2.x, to.x), y: mix(from.y, c1.y, c2.y, to.y) }
      }
      for (let i = 0; i < 4000; i += 1) length += apart(at(i / 4000), at((i + 1) / 4000))
    }
  }
  return length
}

interface Cell {
  readonly left: number
  readonly right: number
  readonly top: number
  readonly bottom: number
}

/** Length of the part of a stroke inside a cell. */
function lengthInside(a: Point, b: Point, cell: Cell): number {
  let [enter, leave] = [0, 1]
  for (const [from, to, low, high] of [
    [a.x, b.x, cell.left, cell.right],
    [a.y, b.y, cell.top, cell.bottom],
  ] as const) {
    if (from === to) {
      if (from < low || from >= high) return 0
      continue
    }
    const [t1, t2] = [(low - from) / (to - from), (high - from) / (to - from)]
    enter = Math.max(enter, Math.min(t1, t2))
    leave = Math.min(leave, Math.max(t1, t2))
  }
  return leave > enter ? (leave - enter) * apart(a, b) : 0
}

interface ReadTile {
  readonly name: string
  readonly cell: Cell
  readonly joins: readonly { readonly neighbour: string; readonly line: Line }[]
  readonly seams: readonly Line[]
}

/** A tile by what is printed on it: its name at the foot, its join lines and the names beside them. */
function readTile(page: Page): ReadTile | null {
  if (!/ tile \d+ of \d+/.test(page.words.map((word) => word.text).join(' '))) return null
  const foot = page.words.find((word, i) => word.text === 'tile' && page.words[i + 2]?.text === 'of')!.bottom
  const name = page.words.filter((word) => Math.abs(foot - word.bottom) < 2).sort((a, b) => a.left - b.left)[0]!.text
  const lines = page.lines.filter((line) => line.dash === JOIN)
  const joins = page.words.flatMap((word) => {
    if (word.text !== 'joins') return []
    const beside = page.words.filter((other) => Math.abs(other.top - word.top) < 0.3 && other.left > word.right)
    const next = beside.sort((a, b) => a.left - b.left)[0]!
    const middle = { x: (word.left + next.right) / 2, y: (word.top + word.bottom) / 2 }
    const toLine = ({ points: [from, to] }: Line) => {
      const upright = Math.abs(from!.x - to!.x) < 0.01
      return upright ? Math.min(Math.abs(word.left - from!.x), Math.abs(next.right - from!.x)) : Math.abs(middle.y - from!.y)
    }
    return [{ neighbour: next.text, line: [...lines].sort((a, b) => toLine(a) - toLine(b))[0]! }]
  })
  const xs = lines.filter(({ points: [a, b] }) => Math.abs(a!.x - b!.x) < 0.01).map(({ points: [a] }) => a!.x)
  const ys = lines.filter(({ points: [a, b] }) => Math.abs(a!.y - b!.y) < 0.01).map(({ points: [a] }) => a!.y)
  const [middleX, middleY] = [page.width / 2, page.height / 2]
  return {
    name,
    joins,
    seams: page.lines.filter((line) => line.dash === SEAM),
    cell: {
      left: Math.max(-Infinity, ...xs.filter((x) => x < middleX)),
      right: Math.min(Infinity, ...xs.filter((x) => x > middleX)),
      top: Math.max(-Infinity, ...ys.filter((y) => y < middleY)),
      bottom: Math.min(Infinity, ...ys.filter((y) => y > middleY)),
    },
  }
}

/** Lays the tiles beside each other so that their join lines meet; throws when a neighbour does not name back. */
function tape(tiles: readonly ReadTile[]): Map<string, Point> {
  const places = new Map<string, Point>()
  for (const first of tiles) {
    if (places.has(first.name)) continue
    if (places.size > 0) throw new Error(`${first.name} hangs on no tile`)
    places.set(first.name, { x: 0, y: 0 })
    const queue = [first]
    for (let tile = queue.shift(); tile; tile = queue.shift())
      for (const { neighbour, line } of tile.joins) {
        const other = tiles.find((each) => each.name === neighbour)!
        const back = other.joins.find((each) => each.neighbour === tile!.name)
        if (!back) throw new Error(`${neighbour} does not name ${tile.name}`)
        const at = places.get(tile.name)!
        const place = { x: at.x + line.points[0]!.x - back.line.points[0]!.x, y: at.y + line.points[0]!.y - back.line.points[0]!.y }
        const known = places.get(neighbour)
        if (known) expect(apart(known, place)).toBeLessThan(0.05)
        else {
          places.set(neighbour, place)
          queue.push(other)
        }
      }
  }
  return places
}

const cases: readonly { readonly name: string; readonly options: PrintOptions }[] = [
  { name: 'A4, margins 10, overlap 10 mm', options: { paper: 'A4', orientation: 'portrait', margin: 10, overlap: 10 } },
  { name: 'US Letter, margins 12, overlap 0 mm', options: { paper: 'letter', orientation: 'landscape', margin: 12, overlap: 0 } },
  { name: 'A3, margins 8, overlap 15 mm', options: { paper: 'A3', orientation: 'auto', margin: 8, overlap: 15 } },
]
const createdAt = new Date('2026-11-14T09:00:00Z')

describe.skipIf(missing.length > 0).each(cases)('pattern print on $name, read back by poppler and qpdf', ({ options }) => {
  let folder: string
  let file: string
  const pieces = draftedPieces()
  let set: PrintSet
  let pages: Page[]

  beforeAll(async () => {
    folder = mkdtempSync(join(tmpdir(), 'tenterframe-print-'))
    file = join(folder, 'print.pdf')
    const planned = printSet(printFacts, pieces, options)
    if (!planned.ok) throw new Error(planned.problem.message)
    set = planned.value
    writeFileSync(file, await buffer(renderPatternPdf({ set, title: 'HER-02 version 3', createdAt }, await loadPrintFonts())))
    pages = set.sheets.map((_, i) => {
      const only = ['-f', `${i + 1}`, '-l', `${i + 1}`]
      const svg = join(folder, `${i}.svg`)
      run('pdftocairo', '-svg', '-origpagesizes', '-noshrink', '-nocenter', ...only, file, svg)
      return pageOf(readFileSync(svg, 'utf8'), run('pdftotext', '-bbox', ...only, file, '-'))
    })
  })
  afterAll(() => rmSync(folder, { recursive: true, force: true }))

  it('has page boxes of the paper to 0.1 mm', () => {
    const boxes = [...run('pdfinfo', '-box', '-f', '1', '-l', '999', file).matchAll(/MediaBox:\s+([\d. ]+)/g)].map(([, box]) =>
      box!
        .trim()
        .split(/\s+/)
        .map((each) => Number(each) * POINTS_TO_MM),
    )
    const paper = PAPERS[options.paper as 'A4']
    const [width, height] = set.plan.orientation === 'portrait' ? [paper.width, paper.height] : [paper.height, paper.width]
    expect(boxes).toHaveLength(set.sheets.length)
    for (const [left, bottom, right, top] of boxes) {
      expect([left, bottom]).toEqual([0, 0])
      expect(Math.abs(right! - width)).toBeLessThan(0.1)
      expect(Math.abs(top! - height)).toBeLessThan(0.1)
    }
  })

  it('has Inter embedded and no other font', () => {
    const fonts = run('pdffonts', file).trim().split('\n').slice(2)
    expect(fonts.length).toBeGreaterThan(0)
    for (const font of fonts) expect(font).toMatch(/^[A-Z]{6}\+Inter-\S+ .* yes yes yes /)
  })

  it('opens with no warning in qpdf and asks readers not to scale', () => {
    expect(run('qpdf', '--check', file)).toContain('No syntax or stream encoding errors')
    expect(run('qpdf', '--qdf', '--object-streams=disable', file, '-')).toContain('/PrintScaling /None')
  })

  it('has squares of 100 mm and 4 in to 0.1 mm', () => {
    const sides = pages
      .flatMap((page) => page.lines)
      .flatMap(({ points, dash }) => {
        if (dash || points.length !== 5 || apart(points[0]!, points[4]!) > 0.01) return []
        const [a, b, c] = points
        return Math.abs(apart(a!, b!) - apart(b!, c!)) < 0.01 ? [apart(a!, b!)] : []
      })
    for (const side of [100, 4 * 25.4]) expect(sides.filter((each) => Math.abs(each - side) < 0.1)).toHaveLength(1)
  })

  it('has every tile once, with garment code and version, and neighbours that name each other', () => {
    const tiles = pages.map(readTile).filter((tile) => tile !== null)
    expect(tiles.map((tile) => tile.name)).toEqual(set.plan.tiles.map((tile) => tile.name))
    expect(tape(tiles).size).toBe(tiles.length)
    for (const page of pages.filter((each) => readTile(each))) {
      const said = page.words.map((word) => word.text).join(' ')
      expect(said).toContain(`${printFacts.garmentCode} · ${printFacts.version} · tile`)
    }
  })

  it.each([
    ['front-centre', 'princess'],
    ['side-front', 'side'],
    ['side-back', 'princess'],
    ['side-front', 'armhole'],
  ] as const)('gives the %s %s seam line its length to 0.1 mm once taped', (pieceId, edgeId) => {
    const tiles = pages.map(readTile).filter((tile) => tile !== null)
    const places = tape(tiles)
    const edge = pieces.find((piece) => piece.id === pieceId)!.edges.find((each) => each.id === edgeId)!
    const placement = set.placements.find((each) => each.piece === pieceId)!
    const firstTile = set.plan.tiles[0]!
    const onTable = ({ x, y }: Point): Point => ({
      x: (placement.mirrored ? -x : x) + placement.offset.x - firstTile.area.left + options.margin,
      y: firstTile.area.top - y - placement.offset.y + options.margin,
    })
    const [start, end] = [onTable(edge.path[0]!.from), onTable(edge.path[edge.path.length - 1]!.to)]
    const parts = tiles.map((tile) => {
      const at = places.get(tile.name)!
      const taped = tile.seams.map((line) => line.points.map(({ x, y }) => ({ x: x + at.x, y: y + at.y })))
      const cell = {
        left: tile.cell.left + at.x,
        right: tile.cell.right + at.x,
        top: tile.cell.top + at.y,
        bottom: tile.cell.bottom + at.y,
      }
      const seam = taped.find(
        (points) => points.some((point) => apart(point, start) < 0.1) && points.some((point) => apart(point, end) < 0.1),
      )
      if (!seam) return 0
      const closed = apart(seam[0]!, seam[seam.length - 1]!) < 0.01
      const loop = closed ? seam.slice(0, -1) : seam
      const from = loop.findIndex((point) => apart(point, start) < 0.1)
      let length = 0
      for (let i = from; apart(loop[i % loop.length]!, end) >= 0.1; i += 1)
        length += lengthInside(loop[i % loop.length]!, loop[(i + 1) % loop.length]!, cell)
      return length
    })
    const printed = parts.reduce((sum, part) => sum + part, 0)
    expect(Math.abs(printed - pathLengthByChords(edge.path))).toBeLessThan(0.1)
    if (set.plan.rows > 2 && edgeId !== 'armhole') expect(parts.filter((part) => part > 1).length).toBeGreaterThan(1)
  })

  it('says the maker’s words of open cautions, how to print, and the safety line', () => {
    const said = pages.map((page) => page.words.map((word) => word.text).join(' ')).join(' ')
    for (const caution of printFacts.cautions) expect(said).toContain(caution.makerMessage)
    expect(said).toContain('Print at actual size (100 %)')
    expect(said).toContain('no medical device and no buoyancy aid')
    expect(said).toContain('Local codes and licensed practice go first')
  })

  it('measures 96.93 mm when a reader shrinks it to a smaller paper, and the correction makes it true again', () => {
    const { width, height } = set.plan.page
    const [shrunkWidth, shrunkHeight] = [Math.min(width, height), Math.max(width, height)].map((side) =>
      Math.round((side / POINTS_TO_MM) * 0.9693),
    )
    const measurePage = set.sheets.findIndex((sheet) => sheet.kind === 'measure') + 1
    const svg = join(folder, 'shrunk.svg')
    run(
      'pdftocairo',
      '-svg',
      '-paperw',
      `${shrunkWidth}`,
      '-paperh',
      `${shrunkHeight}`,
      '-f',
      `${measurePage}`,
      '-l',
      `${measurePage}`,
      file,
      svg,
    )
    const sides = linesOf(readFileSync(svg, 'utf8')).flatMap(({ points }) => (points.length === 5 ? [apart(points[0]!, points[1]!)] : []))
    const measured = Math.min(...sides.filter((side) => side > 90))
    expect(measured).toBeLessThan(97.1)
    const corrected = printerCorrection(100, measured)
    expect(corrected.ok && measured * corrected.value.correction).toBeCloseTo(100, 6)
  })
})

describe('printed scale', () => {
  it('of a 100 mm side that measures 97 mm is 3 % small, correction 1.0309 (derived)', () => {
    const corrected = printerCorrection(100, 97)
    expect(corrected.ok && corrected.value.scale - 1).toBeCloseTo(-0.03, 12)
    expect(corrected.ok && corrected.value.correction).toBeCloseTo(1.0309, 4)
    expect(printerCorrection(100, 60)).toMatchObject({ ok: false, problem: { code: 'scale-unlikely' } })
    expect(printerCorrection(100, Number.NaN).ok).toBe(false)
  })

  it('gives the same bytes for the same input', async () => {
    const fonts = await loadPrintFonts()
    const make = async () => {
      const set = printSet(printFacts, draftedPieces(), { paper: 'A4', orientation: 'auto', margin: 10, overlap: 10 })
      if (!set.ok) throw new Error(set.problem.message)
      return buffer(renderPatternPdf({ set: set.value, title: 'HER-02', createdAt }, fonts))
    }
    expect((await make()).equals(await make())).toBe(true)
  })
})
