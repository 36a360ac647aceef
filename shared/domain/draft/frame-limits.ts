import type { LevelId } from '../body/types'
import { pathCrossingsAtHeight } from '../geometry/crossings'
import type { Problem } from '../units/result'
import { LEVELS } from './draft-levels'
import { princessAbove, shoulderOf } from './edges'
import type { Frame } from './frame'
import { millimetres } from './say'
import type { BodiceStyle, DraftInput } from './types'

/** Levels must lie at least this far apart, mm. */
const LEAST_BETWEEN_LEVELS = 10
/** Cloth that must lie between the centre edge and the bust point, mm. */
const LEAST_TO_BUST_POINT = 15
/** The shoulder end lies at least this far above the underarm, mm. */
const LEAST_ARMHOLE = 60
/** The princess seam passes at least this far inside the across point, mm. */
const LEAST_BESIDE_ARMHOLE = 12

/** Widths that a draft lacks, or gaps where nothing is laced. */
export function widthProblem({ widths, style, above }: DraftInput): Problem | null {
  if (style.top !== null && above === undefined) {
    return {
      code: 'top-without-level',
      message: 'A strapless bodice hangs from a level above the bust, and there is none.',
      todo: 'Measure the upper bust girth and choose the hold there, or take shoulders.',
      at: 'style.top',
    }
  }
  if (above !== undefined && !(above.front > 0 && above.back > 0 && Number.isFinite(above.front + above.back + above.y))) {
    return {
      code: 'width-missing',
      message: 'The level above the bust has no width to draft.',
      todo: 'Solve its ring first.',
      at: 'style.top',
    }
  }
  for (const level of LEVELS) {
    const own = widths.find((candidate) => candidate.level === level)
    const values = own === undefined ? [] : [own.front, own.back, own.gapFront, own.gapBack]
    if (own === undefined || !values.every(Number.isFinite) || own.front <= 0 || own.back <= 0 || own.gapFront < 0 || own.gapBack < 0) {
      return { code: 'width-missing', message: `The ${level} level has no width to draft.`, todo: 'Solve its ring first.', at: level }
    }
    if (own.gapFront > 0 && style.centreFront !== 'lacing') return gapProblem(level, 'front')
    if (own.gapBack > 0 && style.centreBack !== 'lacing') return gapProblem(level, 'back')
  }
  return null
}

const gapProblem = (level: LevelId, half: 'front' | 'back'): Problem => ({
  code: 'gap-without-lacing',
  message: `The ${level} level has a gap at the centre ${half}, which is not laced.`,
  todo: `Lace the centre ${half} or set its gap to 0.`,
  at: level,
})

/** A frame on which nothing can be drawn: levels too near, a bust point outside, no room for an armhole. */
export function frameProblem(frame: Frame, style: BodiceStyle): Problem | null {
  for (const [index, level] of LEVELS.slice(1).entries()) {
    const above = LEVELS[index] as LevelId
    const apart = frame.heightOf(above) - frame.heightOf(level)
    if (!(apart >= LEAST_BETWEEN_LEVELS)) {
      return {
        code: 'levels-too-near',
        message: `The ${level} level lies ${millimetres(apart)} below the ${above} level; ${LEAST_BETWEEN_LEVELS} mm is the least.`,
        todo: 'Measure the front waist length, the neck-shoulder point to bust point, the bust point to underbust and the waist to hip again.',
        at: level,
      }
    }
  }
  const { front, back } = frame
  if (frame.above !== null && !(frame.above.y - frame.heightOf('bust') >= LEAST_BETWEEN_LEVELS)) {
    return {
      code: 'levels-too-near',
      message: `The level above the bust lies ${millimetres(frame.above.y - frame.heightOf('bust'))} above it; ${LEAST_BETWEEN_LEVELS} mm is the least.`,
      todo: 'Measure the upper bust further up.',
      at: 'above',
    }
  }
  const beside = Math.min(front.princess.x - front.centreX, front.underarm.x - front.princess.x)
  if (!(beside >= LEAST_TO_BUST_POINT)) {
    return {
      code: 'bust-point-outside',
      message: `The bust point lies ${millimetres(beside)} from the edge of the half front; ${LEAST_TO_BUST_POINT} mm is the least.`,
      todo: 'Check the bust point distance, narrow the gap at the centre front or ask for a lighter hold at the bust.',
      at: 'bust',
    }
  }
  const shoulder = Math.min(front.shoulderEnd.y - front.underarmDrawn.y, back.shoulderEnd.y - back.underarm.y)
  if (style.top === null && !(shoulder >= LEAST_ARMHOLE)) {
    return {
      code: 'armhole-too-shallow',
      message: `The shoulder end lies only ${millimetres(shoulder)} above the underarm.`,
      todo: 'Measure the back waist length, the front waist length and the side waist length again.',
      at: 'sideWaistLength',
    }
  }
  return null
}

/** How far the princess seams that end on the shoulder pass inside the across point, the nearer of front and back, mm. */
function princessInsideAcross(frame: Frame, style: BodiceStyle): number {
  return Math.min(
    ...(['front', 'back'] as const).map((zone) => {
      if (style.top !== null || !style.panels[zone].princess || style.princessEnd[zone].edge !== 'shoulder') return Infinity
      const half = frame[zone]
      const seam = pathCrossingsAtHeight([princessAbove(half, shoulderOf(half, style))], half.across.y)[0]
      return seam === undefined ? Infinity : half.across.x - seam.x
    }),
  )
}

/** A princess seam on the shoulder that passes too near to the armhole, with the nearest place that does not. */
export function princessProblem(frame: Frame, style: BodiceStyle): Problem | null {
  if (princessInsideAcross(frame, style) >= LEAST_BESIDE_ARMHOLE) return null
  const works = (share: number) => princessInsideAcross(frame, { ...style, princessAt: share }) >= LEAST_BESIDE_ARMHOLE
  const nearest = Array.from(
    { length: Math.round(style.princessAt * 100) - 20 },
    (_, step) => Math.round(style.princessAt * 100 - step - 1) / 100,
  ).find(works)
  return {
    code: 'princess-near-armhole',
    message: `The princess seam would pass nearer than ${LEAST_BESIDE_ARMHOLE} mm to the armhole.`,
    todo:
      nearest === undefined
        ? 'No place on the shoulder works: measure across front and across back again, or ask for a lighter hold at the bust.'
        : `Let it meet the shoulder nearer to the neck: the nearest share that works is ${nearest}.`,
    at: 'style.princessAt',
  }
}
