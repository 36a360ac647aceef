import { execFileSync, spawnSync } from 'node:child_process'
import { mkdtempSync, rmSync, statSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { fileURLToPath } from 'node:url'
import { loadPrintFonts } from '../../server/print/fonts'
import { patternDxf } from '../../server/print/pattern-dxf'
import { renderPatternPdf } from '../../server/print/pattern-pdf'
import { patternSvg } from '../../server/print/pattern-svg'
import type { MeasurementKey } from '../../shared/domain/body/types'
import { allPieces } from '../../shared/domain/draft/roles'
import { defaultStyle } from '../../shared/domain/draft/style'
import type { BodiceStyle, DraftPiece, FurtherSeam } from '../../shared/domain/draft/types'
import { exchangeDrawing } from '../../shared/domain/output/exchange'
import { printSet, type PrintOptions, type PrintSet } from '../../shared/domain/output/print-set'
import { mm } from '../../shared/domain/units/brand'
import { bodyOf, draftOf, WEARER, widthsOf } from '../fixtures/draft-inputs'
import { printFacts } from '../fixtures/print-facts'

const SIZES = 12
const OPTIONS: PrintOptions = { paper: 'A4', orientation: 'auto', margin: 20, overlap: 25, layout: 'wearing', spacing: 20 }
const further = (beside: FurtherSeam['beside']): FurtherSeam => ({ id: 'a', beside, at: null, end: null, share: 0.2, letOut: null })

/** A bodice of twelve pieces: three panels front and back, the right half divided otherwise. */
function twelvePieces(share: number): readonly DraftPiece[] {
  const values = Object.fromEntries(Object.entries(WEARER).map(([key, value]) => [key, value! * share])) as typeof WEARER
  const body = bodyOf(values as Partial<Record<MeasurementKey, number>>)
  const panels = { front: { princess: true, further: [further('side')] }, back: { princess: true, further: [further('side')] } }
  const style: BodiceStyle = {
    ...defaultStyle(),
    centreFront: 'seam',
    panels,
    hem: { level: 'hip', below: mm(0) },
  }
  const right = { ...style, princessAt: 0.45 }
  return allPieces(draftOf({ body, style: { ...style, right }, widths: widthsOf(body, { front: 0.14, back: 0.12, gapBack: 60 }) }))
}

/** Sizes nested piece by piece on the tiles of the largest, as one drawing. */
export function nestedPrint(): { readonly set: PrintSet; readonly pieces: readonly DraftPiece[] } {
  const sizes = Array.from({ length: SIZES }, (_, i) => twelvePieces(0.9 + (0.2 * i) / (SIZES - 1)))
  const planned = printSet(printFacts, sizes.at(-1)!, OPTIONS)
  if (!planned.ok) throw new Error(planned.problem.message)
  const drawings = sizes.map((pieces) => {
    const one = printSet(printFacts, pieces, OPTIONS)
    if (!one.ok) throw new Error(one.problem.message)
    return one.value
  })
  const drawing = drawings.flatMap((size, i) => {
    const moves = new Map(
      size.placements.map((placement) => {
        const to = planned.value.placements.find((one) => one.piece === placement.piece)!
        return [placement.piece, { x: to.offset.x - placement.offset.x, y: to.offset.y - placement.offset.y }]
      }),
    )
    const by = (piece: string | null) => (point: { readonly x: number; readonly y: number }) => {
      const { x, y } = moves.get(piece!)!
      return { x: point.x + x, y: point.y + y }
    }
    return size.drawing
      .filter(({ kind }) => kind === 'path' || i === SIZES - 1)
      .map((operation) => {
        const move = by(operation.piece)
        if (operation.kind === 'text') return { ...operation, at: move(operation.at) }
        const path = operation.path.map((segment) =>
          segment.kind === 'line'
            ? { ...segment, from: move(segment.from), to: move(segment.to) }
            : { ...segment, from: move(segment.from), c1: move(segment.c1), c2: move(segment.c2), to: move(segment.to) },
        )
        return { ...operation, path }
      })
  })
  return { set: { ...planned.value, drawing }, pieces: sizes.at(-1)! }
}

export interface PrintFigures {
  readonly pieces: number
  readonly tiles: number
  readonly time: number
  readonly firstByte: number
  readonly bytes: number
  /** What printing adds to what the process held before, MB. */
  readonly held: number
  /** The whole process, MB, its TypeScript loader and the drafting of all sizes included. */
  readonly whole: number
  readonly dxf: number
  readonly svg: number
  /** The same drawing as one page by rsvg-convert, ms; null where it is not installed. */
  readonly peer: number | null
}

const middle = (times: number[]) => times.sort((a, b) => a - b)[times.length >> 1]!
const timed = async (work: () => unknown): Promise<number> => {
  const began = performance.now()
  await work()
  return performance.now() - began
}

/** The figures of one process: run by the bench in a process of its own, so that the memory is the print's. */
async function measure(): Promise<PrintFigures> {
  const { set, pieces } = nestedPrint()
  const fonts = await loadPrintFonts()
  const before = process.resourceUsage().maxRSS
  const times: number[] = []
  const firsts: number[] = []
  let bytes = 0
  for (let run = 0; run < 5; run++) {
    const began = performance.now()
    let first = 0
    bytes = 0
    for await (const chunk of renderPatternPdf({ set, title: 'HER-02', createdAt: new Date(0) }, fonts)) {
      first ||= performance.now() - began
      bytes += (chunk as Buffer).length
    }
    times.push(performance.now() - began)
    firsts.push(first)
  }
  const held = (process.resourceUsage().maxRSS - before) / 1000
  const drawing = exchangeDrawing(printFacts, pieces, 'both')
  const dxf = await Promise.all([0, 1, 2].map(() => timed(() => patternDxf(pieces, printFacts))))
  const svg = await Promise.all([0, 1, 2].map(() => timed(() => patternSvg(drawing, 'HER-02', fonts))))
  const nested = pieces.map(({ id, name }) => ({
    id,
    name,
    placement: set.placements.find(({ piece }) => piece === id)!,
    operations: set.drawing.filter(({ piece }) => piece === id),
  }))
  const peer = await peerOf(patternSvg({ ...drawing, pieces: nested }, 'HER-02', fonts))
  return {
    pieces: pieces.length,
    tiles: set.plan.tiles.length,
    time: middle(times),
    firstByte: Math.max(...firsts),
    bytes,
    held,
    whole: process.resourceUsage().maxRSS / 1000,
    dxf: middle(dxf),
    svg: middle(svg),
    peer,
  }
}

/** The same operations as one page, by a general-purpose tool (Debian's librsvg2-bin). */
async function peerOf(svg: string): Promise<number | null> {
  if (spawnSync('which', ['rsvg-convert']).status !== 0) return null
  const folder = mkdtempSync(join(tmpdir(), 'tenterframe-bench-'))
  try {
    const [from, to] = [join(folder, 'all.svg'), join(folder, 'all.pdf')]
    writeFileSync(from, svg)
    const time = await timed(() => execFileSync('rsvg-convert', ['--format', 'pdf', '--output', to, from]))
    return statSync(to).size > 0 ? time : null
  } finally {
    rmSync(folder, { recursive: true, force: true })
  }
}

/** Runs the measuring in a process of its own. */
export const printFigures = (): PrintFigures =>
  JSON.parse(execFileSync('node_modules/.bin/jiti', [fileURLToPath(import.meta.url)], { encoding: 'utf8' })) as PrintFigures

if (process.argv[1]?.endsWith('prints.ts')) console.log(JSON.stringify(await measure()))
