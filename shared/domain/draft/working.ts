import type { DraftBody, DraftBodyKey } from '../body/types'
import type { Working, WorkingInput } from '../units/working'
import { draftFrame } from './frame'
import { BUST_ANGLE_MOST } from './bust-angle'
import type { Draft, DraftInput, SeamComparison } from './types'

/** Where the drafting rules come from. */
const DRAFTING_RULE = 'Drafting rule of this workbench; common practice'

function measured(body: DraftBody, key: DraftBodyKey, symbol: string, label: string): WorkingInput {
  return { symbol, label, value: body.values[key], unit: 'mm', from: body.estimated.includes(key) ? 'estimate' : 'measured' }
}

/** The working behind the bust angle: lengths of front and back, and the arm from bust point to underarm. */
export function bustAngleWorking(input: DraftInput, draft: Draft): Working {
  const { body, style } = input
  const { bust, front } = draftFrame(input)
  const underarm = { x: front.underarm.x, y: body.values.sideWaistLength * style.verticalFactor }
  return {
    title: 'Bust angle',
    formula: 'alpha = asin((h + v d) / sqrt(r² + h²)) - atan(h / r), d = FWL - (BWL + .055 N)',
    inputs: [
      measured(body, 'frontWaistLength', 'FWL', 'Front waist length'),
      measured(body, 'backWaistLength', 'BWL', 'Back waist length'),
      measured(body, 'neckBaseGirth', 'N', 'Neck base girth'),
      { symbol: 'v', label: 'Vertical factor', value: style.verticalFactor, unit: 'ratio', from: 'setting' },
      { symbol: 'v d', label: 'Front longer than back', value: bust.longer, unit: 'mm', from: 'computed' },
      { symbol: 'r', label: 'Bust point to underarm, across', value: underarm.x - bust.bustPoint.x, unit: 'mm', from: 'computed' },
      { symbol: 'h', label: 'Bust point to underarm, up', value: underarm.y - bust.bustPoint.y, unit: 'mm', from: 'computed' },
      ...(style.bustAngle === null
        ? []
        : [{ symbol: 'chosen', label: 'Chosen instead', value: style.bustAngle, unit: 'degree', from: 'chosen' } as const]),
    ],
    result: { value: draft.bustAngle, unit: 'degree' },
    source: DRAFTING_RULE,
    notes: [
      'The angle makes the front armhole as deep as the back’s although the front is longer over the bust.',
      `It is 0 where the front is shorter than the back or is eased, and held at ${BUST_ANGLE_MOST}°.`,
      'Where it opens into the armhole it is held so that its turned end stays 15 mm above and inside the underarm.',
      'A front waist length measured too long makes it too large.',
    ],
  }
}

/** The working behind the half width of the neck. */
export function neckWidthWorking(body: DraftBody): Working {
  return {
    title: 'Back neck width, half',
    formula: 'n = N / 5 - 2',
    inputs: [measured(body, 'neckBaseGirth', 'N', 'Neck base girth')],
    result: { value: body.values.neckBaseGirth / 5 - 2, unit: 'mm' },
    source: 'English metric handbook, from memory; common practice',
    notes: [
      'The front neck is 3 mm narrower and as deep as the back is wide.',
      'Front and back necklines then measure the neck base girth to within a few millimetres.',
    ],
  }
}

/** The working behind the armhole's aim. */
export function armholeAimWorking(input: DraftInput, draft: Draft): Working {
  const { body } = input
  const { milder } = draftFrame(input)
  return {
    title: 'Armhole aim',
    formula: 'aim = A (1 - (1 - k) / 2)',
    inputs: [
      measured(body, 'armscyeGirth', 'A', 'Armscye girth'),
      { symbol: 'k', label: 'Bust on the pieces with gaps, over the body’s', value: 1 - 2 * (1 - milder), unit: 'ratio', from: 'computed' },
    ],
    result: { value: draft.armhole.aim, unit: 'mm' },
    source: DRAFTING_RULE,
    notes: [
      'Half of the reduction at the bust is taken off the armscye.',
      'An armscye that is not measured is taken as .41 of the bust girth.',
      'The armhole itself follows from shoulder, across points and underarm; lower or raise the underarm to come nearer.',
    ],
  }
}

/** The working behind how far the side seam moves at the waist. */
export function sideSeamWorking(draft: Draft): Working {
  const moved = draft.findings.find(({ code }) => code === 'side-seam-moved')?.value ?? 0
  return {
    title: 'Side seam at the waist',
    formula: 'moved = (share_F S_F - share_B S_B) / 2, S = bust width - waist width',
    inputs: [],
    result: { value: moved, unit: 'mm' },
    source: DRAFTING_RULE,
    notes: [
      'Both edges of the side seam take half of what front and back have to take in there, so that they are as long.',
      'Towards the back is positive; below 1 mm it is not said.',
    ],
  }
}

/** The working behind a seam's difference: both mates along the seam line. */
export function seamWorking(seam: SeamComparison): Working {
  return {
    title: seam.name,
    formula: 'difference = a - b',
    inputs: [
      { symbol: 'a', label: `${seam.a.piece}, ${seam.a.edge}`, value: seam.a.length, unit: 'mm', from: 'computed' },
      { symbol: 'b', label: `${seam.b.piece}, ${seam.b.edge}`, value: seam.b.length, unit: 'mm', from: 'computed' },
    ],
    result: { value: seam.difference, unit: 'mm' },
    source: 'Lengths along the drawn curves, to a thousandth of a millimetre',
    notes: ['Mates differ by at most 0.5 mm after truing; an alteration on one of them alone shows here.'],
  }
}
