/**
 * Figures of the domain against a peer in the same run. A guard is a ratio, so that a slower machine does not fail it; the
 * milliseconds are printed for the reader.
 */
import { Bezier } from 'bezier-js'
import { solveGarment } from '../../shared/domain/garment/solve'
import { draftBodice } from '../../shared/domain/draft/bodice'
import { solveRing } from '../../shared/domain/textile/ring'
import type { LevelWidths } from '../../shared/domain/draft/types'
import { mm, pascal } from '../../shared/domain/units/brand'
import { inventedInput } from '../fixtures/garment-inputs'

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

const peer = median(() => curves.forEach((curve) => new Bezier(curve.points).length()))
const ringTime = median(() => ringInputs.forEach((geometry) => solveRing(geometry, { solve: 'cut', hold: pascal(1200) }, input.settings)))
const draftTime = median(() => draftBodice({ body, style: input.document.style, widths }))
const wholeTime = median(() => solveGarment(input))

const rows = [
  { what: `peer: bezier-js, length of the draft's ${curves.length} curves`, time: peer, most: Infinity },
  { what: `rings: ${ringInputs.length} levels, 4 layers, cut from hold`, time: ringTime, most: 12 },
  { what: 'draft: four pieces, trued, notched, offset', time: draftTime, most: 120 },
  { what: 'whole garment: solve, draft, read, judge', time: wholeTime, most: 150 },
]
let failed = false
for (const { what, time, most } of rows) {
  const ratio = time / peer
  const over = ratio > most
  failed ||= over
  console.log(`${time.toFixed(3)} ms  ×${ratio.toFixed(1)}${most < Infinity ? ` (guard ×${most})` : ''}  ${what}${over ? '  OVER' : ''}`)
}
process.exit(failed ? 1 : 0)
