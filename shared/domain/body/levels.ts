import { mm } from '../units/brand'
import type { BodyLevel, DraftBody, DraftBodyKey, LevelId } from './types'

/** A bust level at or above the underarm is drawn this far below it, mm. */
export const BUST_BELOW_UNDERARM = 10

/** Share of the girth that lies in front of the side lines, by level. Source: the drafting notes; common practice. */
export const FRONT_SHARE: Readonly<Record<LevelId, number>> = {
  'top-edge': 0.51,
  bust: 0.53,
  underbust: 0.5,
  waist: 0.51,
  'high-hip': 0.5,
  hip: 0.48,
}

type BodyLevelId = Exclude<LevelId, 'top-edge'>

const LEVEL_NAMES: Readonly<Record<BodyLevelId, string>> = {
  bust: 'Bust',
  underbust: 'Underbust',
  waist: 'Waist',
  'high-hip': 'High hip',
  hip: 'Hip',
}

const LEVEL_GIRTHS: Readonly<Record<BodyLevelId, DraftBodyKey>> = {
  bust: 'bustGirth',
  underbust: 'underbustGirth',
  waist: 'waistGirth',
  'high-hip': 'highHipGirth',
  hip: 'hipGirth',
}

/**
 * The five levels of the body from the top down: heights over the natural waist in mm, on the body, before any vertical
 * factor. A bust level at or above the underarm is lowered to 10 mm below it; `movedBy` says by how many millimetres (downwards positive).
 */
export function bodyLevels(body: DraftBody): readonly BodyLevel[] {
  const { values, estimated } = body
  const bustPoint = values.frontWaistLength - values.neckShoulderToBustPoint
  const bust = bustPoint >= values.sideWaistLength ? values.sideWaistLength - BUST_BELOW_UNDERARM : bustPoint
  const heights: Readonly<Record<BodyLevelId, number>> = {
    bust,
    underbust: bustPoint - values.bustPointToUnderbust,
    waist: 0,
    'high-hip': -values.waistToHip / 2,
    hip: -values.waistToHip,
  }
  return (['bust', 'underbust', 'waist', 'high-hip', 'hip'] as const).map((id) => ({
    id,
    name: LEVEL_NAMES[id],
    y: mm(heights[id]),
    girth: mm(values[LEVEL_GIRTHS[id]]),
    girthEstimated: estimated.includes(LEVEL_GIRTHS[id]),
    movedBy: mm(id === 'bust' ? bustPoint - bust : 0),
  }))
}

/**
 * The level of a top edge `above` the bust level, mm on the body. Its girth runs evenly from the bust girth at the bust to the
 * upper bust girth at the underarm: an estimate, unless it lies at one of them.
 */
export function topEdgeLevel(body: DraftBody, upperBustGirth: number, above: number): BodyLevel {
  const bust = bodyLevels(body)[0] as BodyLevel
  const underarm = body.values.sideWaistLength
  const share = Math.min(1, Math.max(0, above / Math.max(1, underarm - bust.y)))
  return {
    id: 'top-edge',
    name: 'Top edge',
    y: mm(bust.y + above),
    girth: mm(bust.girth + share * (upperBustGirth - bust.girth)),
    girthEstimated: share < 1,
    movedBy: mm(0),
  }
}
