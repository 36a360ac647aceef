import { bodyLevels } from '../body/levels'
import type { DraftBody } from '../body/types'
import { mm } from '../units/brand'
import type { Problem } from '../units/result'
import type { BodiceStyle, HalfPanels } from './types'

/** Seam allowances to begin with, mm: common practice for stretch cloth. */
const DEFAULT_ALLOWANCES: BodiceStyle['allowances'] = {
  seam: mm(10),
  centre: mm(15),
  opening: mm(15),
  shoulder: mm(10),
  neckline: mm(10),
  armhole: mm(10),
  hem: mm(20),
}

/** Two panels: a princess seam and no other. */
const PRINCESS_PANELS: HalfPanels = { princess: true, further: [] }

/**
 * The base style: neckline at the neck base, full shoulder, hem at the hip, folds at both centres, heights as on the
 * body. A draft in it can be measured back as a body.
 */
export function baseStyle(): BodiceStyle {
  return {
    centreFront: 'fold',
    centreBack: 'fold',
    panels: { front: PRINCESS_PANELS, back: PRINCESS_PANELS },
    hem: { level: 'hip', below: mm(0) },
    hemShape: { form: 'straight', front: mm(0), back: mm(0), side: mm(0), curve: 0.4 },
    neckline: { front: 'round', back: 'round' },
    necklineFrontDepth: mm(0),
    necklineBackDepth: mm(0),
    necklineWidth: mm(0),
    top: null,
    princessAt: 0.5,
    princessEnd: { front: { edge: 'shoulder', at: 0.5 }, back: { edge: 'shoulder', at: 0.5 } },
    backPrincessAt: 0.42,
    frontShares: { centre: 0, princess: 0.62, side: 0.38 },
    backShares: { centre: 0.14, princess: 0.5, side: 0.36 },
    letOut: { front: null, back: null },
    openingsTake: { front: false, back: false },
    verticalFactor: 1,
    bustAngle: null,
    bustAs: 'auto',
    underarmDrop: mm(0),
    allowances: DEFAULT_ALLOWANCES,
  }
}

/** The style a new bodice starts from: boned, laced at the back, hem at the high hip, neckline lowered and widened. */
export function defaultStyle(): BodiceStyle {
  return {
    ...baseStyle(),
    centreBack: 'lacing',
    hem: { level: 'high-hip', below: mm(0) },
    necklineFrontDepth: mm(70),
    necklineBackDepth: mm(60),
    necklineWidth: mm(35),
  }
}

/** Shoulder that must be left beside the neckline, mm. Setting. */
export const LEAST_SHOULDER = 40
/** The neckline's lowest point stays this far above the bust level, so that the bust is gone round whole, mm. */
export const NECKLINE_ABOVE_BUST = 15
/** The neckline at the centre back stays this far below where it meets the shoulder, mm. */
export const NECKLINE_BELOW_SHOULDER = 6
/** The hem stays this far below the underbust level, mm. */
export const HEM_BELOW_UNDERBUST = 20
/** The lowered underarm stays this far above the bust level, mm. */
export const UNDERARM_ABOVE_BUST = 10
/** Degrees: the bust angle is said from the first and held at the second. */
export const BUST_ANGLE_LARGE = 30
export const BUST_ANGLE_MOST = 42

function outside(at: string, what: string, value: number, low: number, high: number, unit: string): readonly Problem[] {
  if (Number.isFinite(value) && value >= low && value <= high) return []
  // Shown rounded inwards, so that the value on the screen works itself.
  const steps = unit === '' ? 100 : 10
  const nearest = value > high ? Math.floor(high * steps + 1e-6) / steps : Math.ceil(low * steps - 1e-6) / steps
  return [
    {
      code: `style-${at.replaceAll('.', '-').replaceAll(/[A-Z]/g, (letter) => `-${letter.toLowerCase()}`)}`,
      message: `${what} cannot be drafted at ${Number.isFinite(value) ? value : 'no number'}${unit}.`,
      todo: `The nearest value that works is ${nearest}${unit}.`,
      at: `style.${at}`,
    },
  ]
}

function shareProblems(at: 'frontShares' | 'backShares', what: string, shares: BodiceStyle['frontShares']): readonly Problem[] {
  const values = [shares.centre, shares.princess, shares.side]
  const sum = values.reduce((total, share) => total + share, 0)
  if (values.every((share) => Number.isFinite(share) && share >= 0) && Math.abs(sum - 1) <= 1e-6 && shares.princess + shares.side > 0)
    return []
  return [
    {
      code: 'style-shares',
      message: `The seams' shares of the ${what} must be 0 or more and add up to 1; they add up to ${sum.toFixed(2)}.`,
      todo: 'Change the shares until they add up to 1, with some of it at the princess or side seam.',
      at: `style.${at}`,
    },
  ]
}

/** What of a style cannot be drafted on a body, each with the nearest value that works; `at` names the choice. Empty when all works. */
export function checkStyle(style: BodiceStyle, body: DraftBody): readonly Problem[] {
  const { values } = body
  const levels = bodyLevels(body)
  const heightOf = (id: string) => (levels.find((level) => level.id === id)?.y ?? 0) * style.verticalFactor
  const bust = heightOf('bust')
  const v = style.verticalFactor
  const neckHalf = values.neckBaseGirth / 5 - 2
  const frontDepth = (values.frontWaistLength - neckHalf) * v - bust - NECKLINE_ABOVE_BUST
  const backDepth = values.backWaistLength * v - bust - NECKLINE_ABOVE_BUST
  const shoulderFalls = Math.sin(((values.shoulderSlope - 2) * Math.PI) / 180) * style.necklineWidth
  const backLeast = shoulderFalls - 0.055 * values.neckBaseGirth * v + NECKLINE_BELOW_SHOULDER
  const hemLowest = heightOf('hip') - 0.6 * values.waistToHip
  const hemLevel = heightOf(style.hem.level)
  // A laced back may draw the shoulder in by at most an eighth: the milder factor at the largest reduction of a quarter.
  const shoulder = values.shoulderLength * 0.875
  return [
    ...outside('verticalFactor', 'The vertical factor', v, 0.85, 1.1, ''),
    ...outside(
      'hem.below',
      'The hem',
      style.hem.below,
      -(heightOf('underbust') - HEM_BELOW_UNDERBUST - hemLevel),
      hemLevel - hemLowest,
      ' mm',
    ),
    ...outside('necklineFrontDepth', 'The front neckline', style.necklineFrontDepth, 0, Math.max(0, frontDepth), ' mm'),
    ...outside(
      'necklineBackDepth',
      'The back neckline',
      style.necklineBackDepth,
      Math.max(0, backLeast),
      Math.max(0, backLeast, backDepth),
      ' mm',
    ),
    ...outside('necklineWidth', 'The neckline', style.necklineWidth, 0, Math.max(0, shoulder - LEAST_SHOULDER), ' mm'),
    ...outside('princessAt', 'The princess seam', style.princessAt, 0.2, 0.8, ''),
    ...outside(
      'underarmDrop',
      'The underarm',
      style.underarmDrop,
      -40,
      Math.max(0, values.sideWaistLength * v - bust - UNDERARM_ABOVE_BUST),
      ' mm',
    ),
    ...(style.bustAngle === null ? [] : outside('bustAngle', 'The bust angle', style.bustAngle, 0, BUST_ANGLE_MOST, '°')),
    ...shareProblems('frontShares', 'front', style.frontShares),
    ...shareProblems('backShares', 'back', style.backShares),
    ...Object.entries(style.allowances).flatMap(([key, value]) => outside(`allowances.${key}`, 'An allowance', value, 0, 60, ' mm')),
  ]
}
