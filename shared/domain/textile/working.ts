import { mm } from '../units/brand'
import { ASSUMED_TENSION, ASSUMED_TENSION_LOW } from './load-curve'
import type { Working, WorkingInput } from '../units/working'
import { ellipseAxes } from './pressure'
import { hasSewn } from './segment'
import type { LoadCurve, RingGeometry, RingSolution } from './types'

/** The figures of a ring that open their working. */
export type RingFigure = 'tension' | 'pressure' | 'breath' | 'side' | 'cut' | 'negativeEase' | 'k'

const THOMAS = 'Laplace; S. Thomas, World Wide Wounds, rev. 2003 (read)'

const LAPLACE_NOTES: readonly string[] = [
  'The mean over the ring: measured pressures on legs were up to 42 % lower than Laplace gives.',
  'Bony places have been read at two to five times the mean; bones bridge hollows and load ribs and hip.',
  'Two equal layers have measured 1.3 to 1.7 times one where the sum says 2, so a plan of many layers reads high.',
  'A free strip narrows and boned cloth cannot: the real tension is 1.1 to 1.3 times higher.',
  'In hours a quarter of the tension goes, in months a third (bandages, burn garments).',
  'Friction, posture and time are left out.',
]

const input = (symbol: string, label: string, value: number, unit: WorkingInput['unit'], from: WorkingInput['from']): WorkingInput => ({
  symbol,
  label,
  value,
  unit,
  from,
})

const clothFrom = (solution: RingSolution): 'computed' | 'assumed' => (solution.assumed ? 'assumed' : 'computed')

/** Inputs that every figure of a ring hangs on. */
function roundInputs(solution: RingSolution, geometry: RingGeometry): readonly WorkingInput[] {
  return [
    input('G', `Girth, ${geometry.name.toLowerCase()}`, geometry.girth, 'mm', 'measured'),
    ...(geometry.squeeze > 0 ? [input('s', 'Squeeze, taken off G', geometry.squeeze, 'mm', 'chosen')] : []),
    input('t', 'Thickness of the layers', solution.thickness, 'mm', 'measured'),
  ]
}

const tensionNotes = (solution: RingSolution): readonly string[] => [
  ...(solution.assumed
    ? [
        `Of a cloth only its stretch is known: it is taken to have been read at ${ASSUMED_TENSION} N/m; from ${ASSUMED_TENSION_LOW} N/m the hold would be a fifth.`,
      ]
    : []),
  ...(solution.extrapolated ? ['A cloth is worn beyond its tested range: the curve is extrapolated.'] : []),
  'The band holds the spread of the cloth only, not the errors of the model.',
]

/** What layers without stretch and rigid widths of single layers do in the ring. */
function layerNotes(geometry: RingGeometry): readonly string[] {
  const stops = geometry.segments.some((segment) => segment.plan.layers.some((layer) => layer.rigid && layer.count > 0))
  return [
    ...(stops ? ['A rigid layer lies loose up to its cut ratio less 1 and gives no further; what it carries beyond is not known.'] : []),
    ...(geometry.segments.some(hasSewn)
      ? ['A rigid width sewn to one layer strains that layer more: e = ((1 + e) w - rho) / (r w - rho) - 1.']
      : []),
  ]
}

/** The working behind one figure of a solved ring: formula in plain symbols, inputs with unit and origin, source, limits, direction of error. */
export function ringWorking(solution: RingSolution, geometry: RingGeometry, figure: RingFigure): Working {
  const girth = geometry.girth - geometry.squeeze
  const gap = solution.gapFront + solution.gapBack
  const rigid = solution.rigidFront + solution.rigidBack
  const round = roundInputs(solution, geometry)
  const fixed = [
    input('rigid', 'Rigid widths on the pieces', rigid, 'mm', 'chosen'),
    input('gap', 'Lacing gap', gap, 'mm', solution.mode === 'gap' ? 'computed' : 'chosen'),
  ]
  const widths = solution.segments.flatMap((segment, i) => [
    input(
      `w${i + 1}`,
      `Cloth width, ${segment.zone} (${segment.half})`,
      segment.width,
      'mm',
      solution.mode === 'cut' ? 'computed' : 'chosen',
    ),
    input(`e${i + 1}`, `Its strain on the body`, segment.strain, 'ratio', clothFrom(solution)),
  ])
  const tension = input('T', 'Tension round the ring', solution.tension, 'N/m', solution.mode === 'gap' ? 'chosen' : clothFrom(solution))
  const name = geometry.name
  switch (figure) {
    case 'tension':
      return {
        title: `Tension, ${name.toLowerCase()}`,
        formula:
          solution.mode === 'cut'
            ? `T = min(P G / (2 pi), T at a wear limit, T at the largest reduction); ${solution.governs ?? 'hold'} governs`
            : solution.mode === 'gap'
              ? 'T as typed for the lacing'
              : 'sum w (1 + e(T)) + rigid + gap = G + pi t, solved for T',
        inputs: [
          ...(solution.hold === null ? [] : [input('P', 'Hold asked for', solution.hold, 'Pa', 'chosen')]),
          ...round,
          ...widths,
          ...fixed,
        ],
        result: { value: solution.tension, unit: 'N/m' },
        source: 'derived: cloth in series carries one tension, layers side by side add theirs',
        notes: [...layerNotes(geometry), ...tensionNotes(solution)],
      }
    case 'pressure':
      return {
        title: `Hold at rest, ${name.toLowerCase()}`,
        formula: 'P = 2 pi T / G',
        inputs: [tension, ...round],
        result: { value: solution.pressure, unit: 'Pa', band: solution.pressureBand },
        source: THOMAS,
        notes: [...layerNotes(geometry), ...LAPLACE_NOTES, ...tensionNotes(solution)],
      }
    case 'breath':
      return {
        title: `Hold at a deep breath, ${name.toLowerCase()}`,
        formula: 'sum w (1 + e(T)) + rigid + gap = G + b + pi t, solved for T; P = 2 pi T / (G + b)',
        inputs: [...round, input('b', 'Added to the girth by a deep breath', geometry.breath, 'mm', 'estimate'), ...widths, ...fixed],
        result: { value: solution.breathPressure, unit: 'Pa', band: solution.breathBand },
        source: `${THOMAS}; added girth from memory`,
        notes: [
          'Exertion adds up to 20 mm more, as chosen for the garment: an assumption without a source.',
          ...(solution.breathShort
            ? ['Rigid layers stop the ring before the breath is full: this is the least it presses there, and no upper end is known.']
            : []),
          'A published series saw rib pressure go from 42 to 89 mmHg from rest to a deep breath (Dickinson 1911).',
          'The gap is taken not to give; lacing that slips gives less.',
          ...LAPLACE_NOTES,
        ],
      }
    case 'side': {
      const axes = ellipseAxes(mm(girth), geometry.aspect)
      return {
        title: `Hold at the side, ${name.toLowerCase()}`,
        formula: 'P = T a / b²; perimeter of the ellipse a, b = G',
        inputs: [
          tension,
          ...round,
          input('a : b', 'Breadth over depth', geometry.aspect, 'ratio', geometry.aspectEstimated ? 'estimate' : 'measured'),
          input('a', 'Half the breadth', axes.a, 'mm', 'computed'),
          input('b', 'Half the depth', axes.b, 'mm', 'computed'),
        ],
        result: { value: solution.sidePressure, unit: 'Pa' },
        source: 'derived: Laplace on an ellipse; breadth over depth from ANSUR II means where it is an estimate',
        notes: ['A body is no ellipse: a flat front reads less, a sharp side more.', ...LAPLACE_NOTES],
      }
    }
    case 'cut':
      return {
        title: `Cut girth, ${name.toLowerCase()}`,
        formula: 'cut = rigid + sum of (arc - rigid - gap) / (1 + e(T)); arcs: f (G + pi t) in front, the rest behind',
        inputs: [
          ...round,
          input('f', 'Part of the girth in front', geometry.frontShare, 'ratio', 'estimate'),
          tension,
          ...widths,
          ...fixed,
        ],
        result: { value: solution.cut, unit: 'mm', band: solution.cutBand },
        source: 'derived',
        notes: ['Cloth and rigid widths on the pieces, without the gap and the seam allowances.', ...tensionNotes(solution)],
      }
    case 'negativeEase':
      return {
        title: `Negative ease, ${name.toLowerCase()}`,
        formula: '100 (1 - (cut + gap) / G)',
        inputs: [input('cut', 'Cut girth', solution.cut, 'mm', 'computed'), fixed[1]!, ...round.filter((one) => one.symbol !== 't')],
        result: { value: solution.negativeEase, unit: 'percent' },
        source: 'derived',
        notes: ['A figure to show, computed from the cloths and their layers; nothing is cut from it.'],
      }
    case 'k':
      return {
        title: `Cut girth over body girth, ${name.toLowerCase()}`,
        formula: 'k = cut / G',
        inputs: [input('cut', 'Cut girth', solution.cut, 'mm', 'computed'), ...round.filter((one) => one.symbol !== 't')],
        result: { value: solution.k, unit: 'ratio' },
        source: 'derived',
        notes: ['A figure to show, never an input: each segment has a strain of its own.'],
      }
  }
}

/** The working behind a load curve: which kind it is, its coefficients, how far it was tested and how far it misses its readings. */
export function curveWorking(curve: LoadCurve): Working {
  const tested = input('e max', 'Tested to', curve.testedTo, 'ratio', curve.kind === 'assumed' ? 'assumed' : 'measured')
  const fit = [
    input('n', 'Specimens', curve.specimens, 'count', 'measured'),
    input('s', 'Spread of the specimens, deviation over mean', curve.spread, 'ratio', curve.specimens < 3 ? 'setting' : 'computed'),
    input('rms', 'Residual over the largest tension', curve.residual, 'ratio', 'computed'),
  ]
  const coefficients = [input('a', 'Slope at no stretch', curve.a, 'N/m', 'computed'), input('b', 'Stiffening', curve.b, 'N/m', 'computed')]
  const beyond = 'Beyond the tested range the curve is extrapolated, and the figures that use it say so.'
  if (curve.kind === 'assumed') {
    return {
      title: 'Load curve, assumed',
      formula: 'T = a e, a = 500 N/m / stretch',
      inputs: [tested, input('a', 'Slope', curve.a, 'N/m', 'assumed')],
      result: { value: curve.a, unit: 'N/m' },
      source: 'assumption without a source: the stretch was read somewhere between 100 and 500 N/m',
      notes: [
        'The cut is solved at 500 N/m, so that it cannot press more than asked.',
        'The hold is unknown down to a fifth: pull a strip.',
      ],
    }
  }
  if (curve.kind === 'monotone') {
    return {
      title: 'Load curve through the means of the specimens',
      formula: 'T(e): monotone cubic through the means, with its last slope beyond them',
      inputs: [input('knots', 'Means it goes through', curve.knots.length - 1, 'count', 'measured'), tested, ...fit],
      result: { value: curve.knots[curve.knots.length - 1]!.tension, unit: 'N/m' },
      source: 'Fritsch and Butland 1984 (memory); taken because a e + b e³ missed the readings by more than 8 %',
      notes: ['The cloth softens first; the curve never falls.', beyond],
    }
  }
  return {
    title: 'Load curve',
    formula: 'T = a e + b e³',
    inputs: [...coefficients, tested, ...fit],
    result: { value: curve.a, unit: 'N/m' },
    source: 'non-negative least squares through the origin over all readings (Lawson and Hanson 1974, memory)',
    notes: ['Read on the way back where that was done, because a garment holds on the return.', beyond],
  }
}
