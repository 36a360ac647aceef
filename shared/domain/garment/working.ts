import type { Working, WorkingInput } from '../units/working'
import type { Recut, RecutAlteration, RecutStep, RecutTarget } from './recut'

const input = (symbol: string, label: string, value: number, unit: WorkingInput['unit'], from: WorkingInput['from']): WorkingInput => ({
  symbol,
  label,
  value,
  unit,
  from,
})

/** The working behind what a level is let out or taken in by at an equal-hold recut, whole girth. */
export function recutWorking({ levels, targets }: Recut, target: RecutTarget, step: RecutStep): Working {
  const level = levels.find((one) => one.level === step.level)
  const cut = level?.fitted.cut ?? 0
  const shares = targets[target].alterations.length
  return {
    title: `${level?.name ?? step.level}: let out or take in`,
    formula: 'w = (G + pi t - rigid - gap) / (1 + e(T)) in the final layers, less the fitted cut; T = P G / (2 pi)',
    inputs: [
      input(
        'P',
        target === 'fitted' ? 'Hold that the fitted version had' : 'Hold that the final plan is asked for',
        target === 'fitted' ? (level?.fitted.pressure ?? step.pressure) : step.asked,
        'Pa',
        target === 'fitted' ? 'computed' : 'chosen',
      ),
      input('P reached', 'Hold of the new cut, alterations included', step.pressure, 'Pa', 'computed'),
      input('w fitted', 'Cut of the fitted version', cut, 'mm', 'computed'),
      input('w', 'Cut in the final layers', step.cut, 'mm', 'computed'),
    ],
    result: { value: step.change, unit: 'mm' },
    source: 'derived: the same tension in another layer plan is another strain',
    notes: [
      step.governs === 'stretch'
        ? 'The wear limit of the final cloth governs: the hold of the fitted version is not reached.'
        : step.governs === 'reduction'
          ? 'The largest reduction governs: the hold of the fitted version is not reached.'
          : 'No limit governs: the hold is reached.',
      'Above zero to let out, below to take in; the seams share it as they share the level.',
      'The sum of layers reads high (two have measured 1.3 to 1.7 times one), so the new cut is rather too large than too small.',
      ...(shares > 0 ? ['Alterations across the body are part of the cut, scaled to the same share of hold.'] : []),
    ],
  }
}

/** The working behind an alteration taken over in hold: how many millimetres it becomes. */
export function recutAlterationWorking(alteration: RecutAlteration): Working {
  return {
    title: `${alteration.name}, in the final layers`,
    formula: 'after = before × give of the final plan / give of the fitted plan',
    inputs: [
      input('before', 'On the fitted version', alteration.before, 'mm', 'chosen'),
      input('factor', 'Cloth that the same share of hold takes, final over fitted', alteration.factor, 'ratio', 'computed'),
    ],
    result: { value: alteration.after, unit: 'mm' },
    source: 'derived: give is the cloth that 5 % more hold takes away, limits left out',
    notes: [
      'Lengths, and what lies off the levels, go over as they are.',
      'Rounded to a tenth of a millimetre; the factor is held to 3 at most.',
      'Near a limit the give is not straight: try the level on before the final cloth is cut.',
    ],
  }
}
