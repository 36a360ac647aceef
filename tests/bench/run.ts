/**
 * Figures of the domain against a peer in the same run. A guard is a ratio, so that a slower machine does not fail it; the
 * milliseconds are printed for the reader.
 */
import { execFileSync } from 'node:child_process'
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { fileURLToPath } from 'node:url'
import { Bezier } from 'bezier-js'
import Papa from 'papaparse'
import { readMachineFile } from '../../shared/utils/machine-file'
import { solveGarment } from '../../shared/domain/garment/solve'
import { draftBodice } from '../../shared/domain/draft/bodice'
import { solveRing } from '../../shared/domain/textile/ring'
import { DEFAULT_CLOSURES } from '../../shared/domain/structure/lacing'
import { layOutBones } from '../../shared/domain/structure/lay-out'
import { DEFAULT_STOCK } from '../../shared/domain/structure/stock'
import type { LevelWidths } from '../../shared/domain/draft/types'
import { mm, pascal } from '../../shared/domain/units/brand'
import { completeBody } from '../../shared/domain/body/complete'
import { generatedBody, seeded } from '../fixtures/bodies'
import { measuredOf, widthsOf } from '../fixtures/draft-inputs'
import { inventedInput } from '../fixtures/garment-inputs'
import { printFigures } from './prints'
import { medianOfFresh } from './wide-rings'

function median(work: () => void, runs = 400): number {
  for (let warm = 0; warm < 100; warm++) work()
  const times = Array.from({ length: runs }, () => {
    const began = performance.now()
    work()
    return performance.now() - began
  }).sort((a, b) => a - b)
  return times[runs >> 1]!
}

const input = inventedInput()
const result = solveGarment(input)
if (!result.ok) throw new Error(result.problem.message)
const { draft, ringInputs, body, levels, rings } = result.value

const curves = draft.pieces
  .flatMap((piece) => piece.edges.flatMap((edge) => edge.path))
  .flatMap((segment) => (segment.kind === 'cubic' ? [new Bezier(segment.from, segment.c1, segment.c2, segment.to)] : []))
const widths: LevelWidths[] = levels.map((level) => {
  const ring = rings.find((one) => one.level === level.id)
  const cloth = (half: 'front' | 'back') => ring?.segments.find((segment) => segment.half === half)?.width ?? level.girth * 0.4
  return { level: level.id, front: mm(cloth('front') / 2), back: mm(cloth('back') / 2), gapFront: mm(0), gapBack: mm(50) }
})

/** Twelve bones over the four pieces and a laced back. */
const boned: typeof input = {
  ...input,
  document: {
    ...input.document,
    structure: {
      bones: draft.pieces.flatMap(
        (piece) => layOutBones(piece, 3, DEFAULT_STOCK[1]!, piece.id, (index) => `${piece.name} ${index + 1}`).bones,
      ),
      closures: { front: null, back: DEFAULT_CLOSURES.lacing },
    },
  },
}

const peer = median(() => curves.forEach((curve) => new Bezier(curve.points).length()))
const ringTime = median(() => ringInputs.forEach((geometry) => solveRing(geometry, { solve: 'cut', hold: pascal(1200) }, input.settings)))
const draftTime = median(() => draftBodice({ body, style: input.document.style, widths }))
const wideTime = medianOfFresh(8)
const sewnTime = medianOfFresh(8, 12)
const runTime = medianOfFresh(200)
const wholeTime = median(() => solveGarment(input))
const bonedTime = median(() => solveGarment(boned))

/** 2,000 bodies solved by reductions, drafted, trued and offset; the last tenth over the first says whether earlier drafts cost anything. */
const random = seeded(20_261_201)
const many = Array.from({ length: 2000 }, () => completeBody(measuredOf(generatedBody(random).values))).flatMap((found) =>
  found.ok ? [found.value] : [],
)
const draftMany = (bodies: typeof many): number => {
  const began = performance.now()
  for (const own of bodies)
    draftBodice({ body: own, style: input.document.style, widths: widthsOf(own, { front: 0.1, back: 0.1, gapBack: 50 }) })
  return performance.now() - began
}
draftMany(many.slice(0, 200))
const tenth = Math.floor(many.length / 10)
const firstTenth = draftMany(many.slice(0, tenth))
const between = draftMany(many.slice(tenth, -tenth))
const lastTenth = draftMany(many.slice(-tenth))

/** A machine's file of 100,000 rows, five cycles. Invented. */
const lines = ['Time (s),Extension (mm),Load (N)']
for (let i = 0; i < 100_000; i++) {
  const extension = 60 * (1 - Math.abs((i % 20_000) / 10_000 - 1))
  lines.push(`${(i / 100).toFixed(2)},${extension.toFixed(4)},${(0.15 * extension).toFixed(5)}`)
}
const text = lines.join('\n')
const once = async (work: () => unknown): Promise<number> => {
  const times: number[] = []
  for (let i = 0; i < 5; i++) {
    const began = performance.now()
    await work()
    times.push(performance.now() - began)
  }
  return times.sort((a, b) => a - b)[2]!
}
const bareParse = await once(() => Papa.parse(text).data.length)
const fileTime = await once(() => readMachineFile({ file: text, width: mm(50), gauge: mm(100), chosen: {} }))

/** What a process of its own holds at most while it streams the same file from disk, its TypeScript loader included. */
function heldByReader(): number {
  const folder = mkdtempSync(join(tmpdir(), 'tenterframe-bench-'))
  try {
    const path = join(folder, 'run.csv')
    writeFileSync(path, text)
    const out = execFileSync('node_modules/.bin/jiti', [fileURLToPath(new URL('read-file.ts', import.meta.url)), path], {
      encoding: 'utf8',
    })
    return Number(out)
  } finally {
    rmSync(folder, { recursive: true, force: true })
  }
}
const held = heldByReader()
const MOST_HELD = 200

const rows = [
  { what: `peer: bezier-js, length of the draft's ${curves.length} curves`, time: peer, most: Infinity },
  { what: `rings: ${ringInputs.length} levels, 4 layers, cut from hold`, time: ringTime, most: 12 },
  { what: 'rings: 8 levels, 6 segments, 5 layers, cut from hold (under 1 ms)', time: wideTime, most: 60 },
  { what: 'the same with channels sewn to one layer', time: sewnTime, most: 120 },
  { what: 'rings: 200 of a size run, 6 segments, 5 layers (under 20 ms)', time: runTime, most: 1200 },
  { what: 'draft: four pieces, trued, notched, offset', time: draftTime, most: 120 },
  { what: 'whole garment: solve, draft, read, judge', time: wholeTime, most: 150 },
  {
    what: `whole garment with ${boned.document.structure!.bones.length} bones and a lacing, settled (under 5 ms)`,
    time: bonedTime,
    most: 350,
  },
]
let failed = false
for (const { what, time, most } of rows) {
  const ratio = time / peer
  const over = ratio > most
  failed ||= over
  console.log(`${time.toFixed(3)} ms  ×${ratio.toFixed(1)}${most < Infinity ? ` (guard ×${most})` : ''}  ${what}${over ? '  OVER' : ''}`)
}
const drift = lastTenth / firstTenth
const drifts = drift > 2
failed ||= drifts
console.log(
  `${((firstTenth + between + lastTenth) / 1000).toFixed(1)} s  ${many.length} bodies drafted, trued, offset (under 15 s); the last tenth ×${drift.toFixed(2)} of the first (guard ×2)${drifts ? '  OVER' : ''}`,
)
const fileRatio = fileTime / bareParse
const fileOver = fileRatio > 4 || held > MOST_HELD
failed ||= fileOver
console.log(`${bareParse.toFixed(0)} ms  ×1.0  bare: papaparse, 100,000 rows to a table`)
console.log(
  `${fileTime.toFixed(0)} ms  ×${fileRatio.toFixed(1)} (guard ×4)  machine's file of 100,000 rows read as a test; a process that streams it holds ${held.toFixed(0)} MB (guard ${MOST_HELD})${fileOver ? '  OVER' : ''}`,
)

const print = printFigures()
const kilobytes = print.bytes / 1000
const bare = print.peer ?? NaN
const printOver =
  print.tiles < 40 || kilobytes > 400 || print.held > 120 || print.time / bare > 4 || print.dxf / bare > 2 || print.svg / bare > 2
failed ||= printOver
console.log(
  print.peer === null
    ? 'rsvg-convert is not installed, so prints have no peer'
    : `${bare.toFixed(0)} ms  ×1.0  peer: rsvg-convert, the same drawing on one page of a PDF`,
)
console.log(
  `${print.time.toFixed(0)} ms  ×${(print.time / bare).toFixed(1)} (guard ×4, under 300 ms)  pattern PDF, 12 sizes of ${print.pieces} pieces on ${print.tiles} tiles of A4: ` +
    `${kilobytes.toFixed(0)} kB (guard 400), first byte ${print.firstByte.toFixed(0)} ms (under 150), ${print.held.toFixed(0)} MB more held (guard 120), ${print.whole.toFixed(0)} MB in all${printOver ? '  OVER' : ''}`,
)
console.log(`${print.dxf.toFixed(0)} ms  ×${(print.dxf / bare).toFixed(1)} (guard ×2, under 100 ms)  DXF of ${print.pieces} pieces`)
console.log(`${print.svg.toFixed(0)} ms  ×${(print.svg / bare).toFixed(1)} (guard ×2, under 100 ms)  SVG of ${print.pieces} pieces`)
process.exit(failed ? 1 : 0)
