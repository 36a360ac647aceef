import type { Working, WorkingInput } from '../units/working'
import type { FittingReading, LevelReading } from './types'

const input = (symbol: string, label: string, value: number, unit: WorkingInput['unit'], from: WorkingInput['from']): WorkingInput => ({
  symbol,
  label,
  value,
  unit,
  from,
})

/** The working behind how tight a level is against the others; `c` is what the levels of its plan have in common. */
export function levelReadingWorking(reading: LevelReading): Working {
  const common = reading.share > 0 && reading.wanted > 0 ? reading.model / (reading.share * reading.wanted) : 0
  return {
    title: `${reading.name}: against the other levels`,
    formula: 'T model / (c T drafted); c = sum(T model × T drafted) / sum(T drafted²)',
    inputs: [
      input('T model', 'Tension of the cloth at the gap seen, by its test', reading.model, 'N/m', 'computed'),
      input('T drafted', 'Tension drafted for', reading.wanted, 'N/m', 'computed'),
      input('c', 'What the levels of this plan have in common', common, 'ratio', 'computed'),
    ],
    result: { value: reading.share, unit: 'ratio' },
    source: 'derived: a gap gives the strain of the level, and its tension up to one factor that all levels share',
    notes: [
      'It says which level is tight against the others, never how hard all of them hold: that takes a pull.',
      'A gap read 2 mm wrong is some 2 mm of cloth. Breathing and standing straight change a gap by more.',
      'Levels of other layers are not compared with it.',
    ],
  }
}

/** The working behind a stiffness learnt from measured pulls; null where none was taken, and it is unknown. */
export function stiffnessWorking({ stiffness, levels }: FittingReading): Working | null {
  if (stiffness === null) return null
  const pulled = levels.filter((one) => one.measured !== null && stiffness.levels.includes(one.level))
  return {
    title: 'Stiffness learnt at the fitting',
    formula: 'sum(T measured × T model) / sum(T model²)',
    inputs: pulled.flatMap((one) => [
      input(`T ${one.level}`, `Pull over the tab's width, ${one.name.toLowerCase()}`, one.measured!, 'N/m', 'measured'),
      input(`model ${one.level}`, `By the test at the gap seen, ${one.name.toLowerCase()}`, one.model, 'N/m', 'computed'),
    ]),
    result: {
      value: stiffness.factor,
      unit: 'ratio',
      band: { low: stiffness.factor * (1 - stiffness.uncertainty), high: stiffness.factor * (1 + stiffness.uncertainty) },
    },
    source: 'least squares through the origin; from a single pull its uncertainty is 10 % (setting)',
    notes: [
      'Holds for levels of the layers that were pulled, and for no others.',
      'A tab slides on lining and skin: friction takes part of the pull, so the factor reads high.',
      'Feel has no part in it.',
      ...(stiffness.left > 0 ? [`${stiffness.left === 1 ? 'A pull' : `${stiffness.left} pulls`} on other layers is left out.`] : []),
    ],
  }
}
