import { solveGarment } from '../../shared/domain/garment/solve'
import { solveRing } from '../../shared/domain/textile/ring'
import type { RingGeometry, RingSegment } from '../../shared/domain/textile/types'
import { mm, pascal } from '../../shared/domain/units/brand'
import { inventedInput } from '../fixtures/garment-inputs'

const input = inventedInput()
const result = solveGarment(input)
if (!result.ok) throw new Error(result.problem.message)
const { ringInputs, plans } = result.value

/** Rings of six segments with five layers each, no two plans the same object, so that nothing is remembered from one ring to the next. */
function wideRings(count: number, sewn: number): readonly RingGeometry[] {
  const cloths = plans[0]!.layers.map((layer) => layer.cloth)
  return Array.from({ length: count }, (_, level) => ({
    ...ringInputs[0]!,
    level: `level-${level}`,
    girth: mm(700 + 10 * level),
    segments: Array.from({ length: 6 }, (_, i): RingSegment => {
      const stack = Array.from({ length: 5 }, (_, j) => ({
        id: `layer-${j}`,
        label: 'layer',
        cloth: cloths[(i + j) % cloths.length]!,
        count: 1 + ((i + j) % 2),
        cutRatio: j === 4 ? 1.02 : 1,
      }))
      const half = i < 3 ? 'front' : 'back'
      const channels = sewn > 0 && i % 2 === 0 ? { sewn: [{ layer: 'layer-3', width: mm(sewn) }] } : {}
      return { id: `${level}-${i}`, half, plan: { zone: `zone-${i}`, layers: stack }, share: 1 / 3, ...channels }
    }),
  }))
}

/** Median ms of so many rings solved from a hold; they are made anew for each of the runs, and the making is left out of its time. */
export function medianOfFresh(count: number, sewn = 0): number {
  const times = Array.from({ length: 120 }, () => {
    const fresh = wideRings(count, sewn)
    const began = performance.now()
    for (const geometry of fresh) {
      const solved = solveRing(geometry, { solve: 'cut', hold: pascal(1200) }, input.settings)
      if (!solved.ok) throw new Error(solved.problem.message)
    }
    return performance.now() - began
  }).sort((a, b) => a - b)
  return times[times.length >> 1]!
}
