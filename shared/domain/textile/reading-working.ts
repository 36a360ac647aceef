import type { Working, WorkingInput, WorkingUnit } from '../units/working'
import type { RingGeometry, RingSolution } from './types'
import { ringWorking, type RingFigure } from './working'

/** Every reading of a ring that a screen may open. */
export type RingReading = RingFigure | 'front' | 'strain' | 'gap' | 'hold' | 'slack' | 'governs'

const from = (symbol: string, label: string, value: number, unit: WorkingUnit, origin: WorkingInput['from']): WorkingInput => ({
  symbol,
  label,
  value,
  unit,
  from: origin,
})

/** The working behind any reading of a ring; those of `ringWorking`, and what was chosen, solved for or is a part of them. Units as given. */
export function ringReadingWorking(solution: RingSolution, geometry: RingGeometry, reading: RingReading): Working {
  const name = geometry.name.toLowerCase()
  const round = from('G + pi t', 'What the middle of the layers goes round', solution.surface, 'mm', 'computed')
  const rigid = from('rigid', 'Rigid widths', solution.rigidFront + solution.rigidBack, 'mm', 'chosen')
  const cloth = solution.segments.flatMap((segment, index) => [
    from(`w${index + 1}`, `Cloth width, ${segment.half}`, segment.width, 'mm', 'computed'),
    from(`e${index + 1}`, 'Its strain on the body', segment.strain, 'ratio', solution.assumed ? 'assumed' : 'computed'),
  ])
  const tension = from('T', 'Tension round the ring', solution.tension, 'N/m', 'computed')
  switch (reading) {
    case 'front':
      return {
        ...ringWorking(solution, geometry, 'side'),
        title: `Hold in front, ${name}`,
        formula: 'P = T b / a²; perimeter of the ellipse a, b = G',
        result: { value: solution.frontPressure, unit: 'Pa' },
      }
    case 'governs':
      return ringWorking(solution, geometry, 'tension')
    case 'strain':
      return {
        title: `Strain of the cloth, ${name}`,
        formula: 'e: the strain at which the layers together pull T',
        inputs: [tension, ...cloth],
        result: { value: solution.segments[0]?.strain ?? 0, unit: 'ratio' },
        source: 'derived: load curves of the layers added, read at T',
        notes: ['Front and back carry the same tension; each stretches as its own layers let it. The first segment is the result shown.'],
      }
    case 'gap': {
      const gap = solution.gapFront + solution.gapBack
      return solution.mode === 'gap'
        ? {
            title: `Lacing gap, ${name}`,
            formula: 'gap = G + pi t - rigid - sum w (1 + e(T))',
            inputs: [round, rigid, tension, ...cloth],
            result: { value: gap, unit: 'mm' },
            source: 'derived',
            notes: ['From the typed cut and the pull of the lacing.'],
          }
        : {
            title: `Lacing gap, ${name}`,
            formula: 'gap as typed',
            inputs: [from('gap', 'Lacing gap', gap, 'mm', 'chosen')],
            result: { value: gap, unit: 'mm' },
            source: 'chosen by the drafter; 30 to 80 mm is common practice',
            notes: ['It lies in the half that is laced and is left out of the pieces.'],
          }
    }
    case 'hold':
      return {
        title: `Hold asked for, ${name}`,
        formula: 'P as chosen, lowered until the upper end of its band meets the wearer’s limit',
        inputs: [from('P', 'Hold the cut was solved for', solution.hold ?? solution.pressure, 'Pa', 'chosen')],
        result: { value: solution.hold ?? solution.pressure, unit: 'Pa' },
        source: 'chosen by the drafter; bands: Anthropometry, Apparel Sizing and Design, table 13.5 (read)',
        notes: ['A hold is met only where neither the cloth’s wear limit nor the largest reduction governs.'],
      }
    case 'slack':
      return {
        title: `Looseness, ${name}`,
        formula: 'sum w (1 + e0) + rigid + gap - (G + pi t)',
        inputs: [round, rigid, ...cloth],
        result: { value: solution.slack, unit: 'mm' },
        source: 'derived',
        notes: ['The ring lies loose: nothing is under tension there.'],
      }
    default:
      return ringWorking(solution, geometry, reading)
  }
}
