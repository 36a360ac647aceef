import { bodyLevels } from '../body/levels'
import type { DraftBody } from '../body/types'
import type { Problem } from '../units/result'
import { BUST_ANGLE_MOST, bustTaken, EASED_AT_MOST } from './bust-angle'
import { fillEvenly, panelCount } from './panels'
import type { Zone } from './panels'
import { millimetres } from './say'
import { shareProblems } from './share-limits'
import { pointedPower } from './shapes'
import type { BodiceStyle } from './types'

/** Shoulder that must be left beside the neckline, mm: more where a princess seam ends on it. Settings. */
export const LEAST_SHOULDER = 40
export const LEAST_STRAP = 20
/** The neckline's lowest point stays this far above the bust level, so that the bust is gone round whole, mm. */
export const NECKLINE_ABOVE_BUST = 15
/** The neckline at the centre back stays this far below where it meets the shoulder, mm. */
export const NECKLINE_BELOW_SHOULDER = 6
/** The hem stays this far below the bust level everywhere, mm. */
export const HEM_BELOW_BUST = 45
/** The lowered underarm stays this far above the bust level, mm. */
export const UNDERARM_ABOVE_BUST = 10
/** A top edge stays this far above the bust level, and at most this far above the underarm at the side and at the centre, mm. */
export const TOP_ABOVE_BUST = 15
export const TOP_OVER_UNDERARM_AT_SIDE = 0
export const TOP_OVER_UNDERARM_AT_CENTRE = 80
/** Steepest rise of a pointed edge: how far centre and side may lie apart, mm, divided by the power of its curve. */
const POINT_MOST = 200
/** Panels of a half of the body, front and back together. */
export const MOST_PANELS = 6
/** Ends of neighbouring seams on one edge stay this far apart, as a share of it. */
const ENDS_APART = 0.08

const ZONES: readonly Zone[] = ['front', 'back']

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

function panelProblems(style: BodiceStyle): readonly Problem[] {
  const { panels } = style
  const count = panelCount(panels.front) + panelCount(panels.back)
  const problems: Problem[] = ZONES.flatMap((zone) => {
    const { princess, further } = panels[zone]
    if (!princess && further.length > 0) {
      return [
        {
          code: 'style-panels-princess',
          message: `The half ${zone} has further seams but no princess seam.`,
          todo: `Take the princess seam: ${further.length + 2} panels.`,
          at: `style.panels.${zone}`,
        },
      ]
    }
    return (['centre', 'side'] as const).flatMap((beside) => {
      const ends = further.filter((seam) => seam.beside === beside).map(({ end }) => end)
      if (ends.every((end) => end === null)) return []
      const filled = fillEvenly(ends, 0, 1)
      const near = [0, ...filled, 1].some((end, index, all) => index > 0 && !(end - (all[index - 1] as number) >= ENDS_APART))
      if (!near) return []
      return [
        {
          code: 'style-panels-ends',
          message: `The seams beside the ${beside === 'centre' ? 'centre' : 'side seam'} of the ${zone} end in another order than they stand, or nearer than ${ENDS_APART * 100} % of the edge to each other.`,
          todo: 'Leave their ends empty: they then divide the edge evenly.',
          at: `style.panels.${zone}`,
        },
      ]
    })
  })
  if (count > MOST_PANELS) {
    const zone = panelCount(panels.front) >= panelCount(panels.back) ? 'front' : 'back'
    problems.push({
      code: 'style-panels-many',
      message: `${count} panels in a half of the body cannot be drafted; ${MOST_PANELS} are the most.`,
      todo: `The nearest number that works for the ${zone} is ${panelCount(panels[zone]) - (count - MOST_PANELS)}.`,
      at: `style.panels.${zone}`,
    })
  }
  return problems
}

function bustProblems(style: BodiceStyle, longer: number): readonly Problem[] {
  const taken = bustTaken(style, longer)
  const { princess } = style.panels.front
  const wrong = (message: string, todo: string): readonly Problem[] => [{ code: 'style-bust-as', message, todo, at: 'style.bustAs' }]
  if (taken === 'seam' && !princess) {
    return wrong('The bust angle cannot lie in a seam: the half front has no princess seam.', 'Take a dart, or two panels in front.')
  }
  if (taken === 'dart' && princess) {
    return wrong(
      'The bust angle lies in the princess seam through the bust point; a dart there would open it twice.',
      'Take the seam, or one panel in front.',
    )
  }
  if (taken === 'ease' && (style.bustAngle ?? 0) > 0) {
    return wrong(
      'A bust angle that is typed cannot be eased away.',
      `Leave the bust angle empty, or take ${princess ? 'the seam' : 'a dart'}.`,
    )
  }
  if (taken === 'ease' && longer > EASED_AT_MOST) {
    return wrong(
      `The front is ${millimetres(longer)} longer than the back over the bust; at most ${EASED_AT_MOST} mm can be eased.`,
      `Take ${princess ? 'the seam' : 'a dart'}.`,
    )
  }
  return []
}

function shoulderProblems(style: BodiceStyle, body: DraftBody, bust: number): readonly Problem[] {
  const { values } = body
  const v = style.verticalFactor
  const neckHalf = values.neckBaseGirth / 5 - 2
  const frontDepth = (values.frontWaistLength - neckHalf) * v - bust - NECKLINE_ABOVE_BUST
  const backDepth = values.backWaistLength * v - bust - NECKLINE_ABOVE_BUST
  const shoulderFalls = Math.sin(((values.shoulderSlope - 2) * Math.PI) / 180) * style.necklineWidth
  const backLeast = shoulderFalls - 0.055 * values.neckBaseGirth * v + NECKLINE_BELOW_SHOULDER
  // A laced back may draw the shoulder in by at most an eighth: the milder factor at the largest reduction of a quarter.
  const shoulder = values.shoulderLength * 0.875
  const parted = ZONES.some((zone) => style.panels[zone].princess && style.princessEnd[zone].edge === 'shoulder')
  return [
    ...outside('necklineFrontDepth', 'The front neckline', style.necklineFrontDepth, 0, Math.max(0, frontDepth), ' mm'),
    ...outside(
      'necklineBackDepth',
      'The back neckline',
      style.necklineBackDepth,
      Math.max(0, backLeast),
      Math.max(0, backLeast, backDepth),
      ' mm',
    ),
    ...outside(
      'necklineWidth',
      'The neckline',
      style.necklineWidth,
      0,
      Math.max(0, shoulder - (parted ? LEAST_SHOULDER : LEAST_STRAP)),
      ' mm',
    ),
    ...(parted ? outside('princessAt', 'The princess seam', style.princessAt, 0.2, 0.8, '') : []),
    ...ZONES.flatMap((zone) => {
      const { edge, at } = style.princessEnd[zone]
      if (!style.panels[zone].princess || edge === 'shoulder') return []
      const [low, high] = edge === 'armhole' ? [0.2, 0.75] : [0.25, 0.85]
      return outside(`princessEnd.${zone}.at`, `The ${zone} princess seam's end on the ${edge}`, at, low, high, '')
    }),
    ...outside(
      'underarmDrop',
      'The underarm',
      style.underarmDrop,
      -40,
      Math.max(0, values.sideWaistLength * v - bust - UNDERARM_ABOVE_BUST),
      ' mm',
    ),
  ]
}

function topProblems(style: BodiceStyle, body: DraftBody, bust: number): readonly Problem[] {
  if (style.top === null) return []
  const underarm = body.values.sideWaistLength * style.verticalFactor - bust
  const { form, front, back, side, curve } = style.top
  const least = TOP_ABOVE_BUST
  const sideMost = Math.max(least, underarm + TOP_OVER_UNDERARM_AT_SIDE)
  const most = Math.max(least, underarm + TOP_OVER_UNDERARM_AT_CENTRE)
  const reach = POINT_MOST / pointedPower(curve)
  const centre = (key: 'front' | 'back', value: number) =>
    form === 'straight'
      ? []
      : outside(
          `top.${key}`,
          `The top edge at the centre ${key}`,
          value,
          Math.max(least, side - reach),
          Math.min(most, side + reach),
          ' mm',
        )
  return [
    ...outside('top.side', 'The top edge at the side seam', side, least, sideMost, ' mm'),
    ...centre('front', front),
    ...centre('back', back),
    ...outside('top.curve', 'The curve of the top edge', curve, 0, 1, ''),
  ]
}

/** What of a style cannot be drafted on a body, each with the nearest value that works; `at` names the choice. Empty when all works. */
export function checkStyle(style: BodiceStyle, body: DraftBody): readonly Problem[] {
  const { values } = body
  const levels = bodyLevels(body)
  const v = style.verticalFactor
  const heightOf = (id: string) => (levels.find((level) => level.id === id)?.y ?? 0) * v
  const bust = heightOf('bust')
  const hemLowest = heightOf('hip') - 0.6 * values.waistToHip
  const hemLevel = heightOf(style.hem.level)
  const { form, front, back, side, curve } = style.hemShape
  const drops = form === 'straight' ? [0] : [front, back, side]
  const apart = POINT_MOST / pointedPower(curve)
  const longer = values.frontWaistLength - values.backWaistLength - 0.055 * values.neckBaseGirth
  const hemHighest = bust - HEM_BELOW_BUST + Math.min(...drops)
  return [
    ...outside('verticalFactor', 'The vertical factor', v, 0.85, 1.1, ''),
    ...(form === 'straight'
      ? []
      : [
          ...outside('hemShape.curve', 'The curve of the hem', curve, 0, 1, ''),
          ...outside('hemShape.front', 'The hem at the centre front', front, side - apart, side + apart, ' mm'),
          ...outside('hemShape.back', 'The hem at the centre back', back, side - apart, side + apart, ' mm'),
          ...outside('hemShape.side', 'The hem at the side seam', side, -POINT_MOST, POINT_MOST, ' mm'),
        ]),
    ...outside('hem.below', 'The hem', style.hem.below, hemLevel - hemHighest, hemLevel - hemLowest - Math.max(...drops), ' mm'),
    ...panelProblems(style),
    ...(style.top === null ? shoulderProblems(style, body, bust) : topProblems(style, body, bust)),
    ...(style.panels.back.princess ? outside('backPrincessAt', 'The back princess seam', style.backPrincessAt, 0.2, 0.75, '') : []),
    ...(style.bustAngle === null ? [] : outside('bustAngle', 'The bust angle', style.bustAngle, 0, BUST_ANGLE_MOST, '°')),
    ...bustProblems(style, longer),
    ...ZONES.flatMap((zone) => shareProblems(style, zone)),
    ...Object.entries(style.allowances).flatMap(([key, value]) => outside(`allowances.${key}`, 'An allowance', value, 0, 60, ' mm')),
  ]
}
