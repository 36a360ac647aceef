import type { CautionFigure } from './define'
import { defineCaution } from './define'
import type { Severity } from './types'

/** What a draft had to decide or hold, in the draft's own words. */
export interface FindingFacts {
  readonly message: string
  readonly value: number
  readonly unit: CautionFigure['unit']
  readonly limit?: number
}

const finding = (code: string, severity: Severity, maker: string, source: string, todo: string) =>
  defineCaution<FindingFacts>(code, {
    severity,
    message: ({ message }) => message,
    maker,
    figure: ({ value, unit }) => ({ value, unit }),
    limit: ({ limit, unit }) => (limit === undefined ? null : { value: limit, unit }),
    source,
    todo,
  })

const DESIGN = 'design value of the draft, no source'

export const bustAngleNegative = finding(
  'bust-angle-negative',
  'caution',
  'Front and back lengths are being checked.',
  'derived',
  'Measure front and back waist length again.',
)
export const bustAngleLarge = finding(
  'bust-angle-large',
  'caution',
  'Large bust angle: ease the seam with care.',
  DESIGN,
  'Check the front lengths; a second seam may share the angle.',
)
export const bustAngleHeld = finding(
  'bust-angle-held',
  'caution',
  'Bust angle held at its limit.',
  DESIGN,
  'Check the front lengths, or type the angle.',
)
export const bustAngleEased = finding(
  'bust-angle-eased',
  'note',
  'The front armhole is eased: gather it evenly over its lower half.',
  DESIGN,
  'Ease it with elastic or tape, or take a dart or a princess seam.',
)
export const bustAngleDart = finding(
  'bust-angle-dart',
  'note',
  'Sew the bust dart before the side seam.',
  DESIGN,
  'Mark its point; take a princess seam where a dart would show.',
)
export const bustLevelMoved = finding(
  'bust-level-moved',
  'note',
  'Bust level drawn under the underarm.',
  DESIGN,
  'Measure the bust girth where the level is drawn.',
)
export const acrossFrontHeld = finding(
  'across-front-held',
  'note',
  'Across front held inside the underarm.',
  DESIGN,
  'Check across front at the fitting.',
)
export const acrossBackHeld = finding(
  'across-back-held',
  'note',
  'Across back held inside the underarm.',
  DESIGN,
  'Check across back at the fitting.',
)
export const armholeAimOff = finding('armhole-aim-off', 'caution', 'Armhole length is off its aim.', DESIGN, 'Lower or raise the underarm.')
export const sideSeamMoved = finding(
  'side-seam-moved',
  'note',
  'Side seam leaves the side line.',
  'derived',
  'Change the wedge shares if it has to stand straight.',
)
export const pieceNarrow = finding(
  'piece-narrow',
  'caution',
  'A piece is very narrow at one level.',
  DESIGN,
  'Move its seam, or leave the seam out.',
)
export const alterationParked = finding(
  'alteration-parked',
  'caution',
  'An alteration is not applied.',
  'derived',
  'Make it again on the piece that is there, or remove it.',
)
export const seamsDiffer = finding(
  'seams-differ',
  'caution',
  'Two seam edges differ in length.',
  DESIGN,
  'True the seam, or carry the alteration to its mate.',
)

export const edgeCorner = finding(
  'edge-corner',
  'caution',
  'An edge has a corner where a seam crosses it.',
  DESIGN,
  'Run the edge on, or leave the corner if it is meant.',
)
export const foldBent = finding(
  'fold-bent',
  'caution',
  'A fold is no longer straight.',
  'derived',
  'Bring the point back to the fold, or make the fold a seam.',
)

/** Solve, draft and read back did not settle. */
export const notSettled = defineCaution<{ readonly rounds: number }>('not-settled', {
  severity: 'caution',
  message: ({ rounds }) => `The widths on the pieces did not settle on the hold asked for in ${rounds} rounds.`,
  maker: 'Widths are near their aim, not on it.',
  figure: ({ rounds }) => ({ value: rounds, unit: 'count' }),
  source: 'settled: .5 % of the tension and .05 mm',
  todo: 'Bring the front and back layer plans nearer to each other, or type the cut.',
})
