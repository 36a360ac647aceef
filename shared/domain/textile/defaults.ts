import type { Mm } from '../units/brand'
import { mm, pascal } from '../units/brand'
import { FEW_SPECIMENS_SPREAD } from './curve'
import type { TextileSettings } from './types'

/** The levels that have defaults here. */
export type DefaultLevel = 'bust' | 'underbust' | 'waist' | 'high-hip' | 'hip'

/** A workroom's settings before it changes any. Reduction 20 % and lacing gap 30 to 80 mm: common practice. Hold 900 Pa: easy. Spread .15: a setting. */
export const DEFAULT_TEXTILE_SETTINGS: TextileSettings = {
  largestReduction: 0.2,
  defaultHold: pascal(900),
  fewSpecimensSpread: FEW_SPECIMENS_SPREAD,
  lacingGapLow: mm(30),
  lacingGapHigh: mm(80),
}

/** Added to the girth by a deep breath at rest, mm. From memory: 40 at bust and underbust, 20 at the waist; nothing is known below it and 0 stands. */
export const BREATH_BY_LEVEL: Readonly<Record<DefaultLevel, Mm>> = {
  bust: mm(40),
  underbust: mm(40),
  waist: mm(20),
  'high-hip': mm(0),
  hip: mm(0),
}

/** How hard the wearer breathes in it. */
export type Exertion = 'calm' | 'stage' | 'skating' | 'swimming'

/** What exertion adds to a deep breath at rest, mm, at bust and underbust, and at the waist. Assumption without a source: a setting. */
export const EXERTION_BREATH: Readonly<Record<Exertion, { readonly ribs: Mm; readonly waist: Mm }>> = {
  calm: { ribs: mm(0), waist: mm(0) },
  stage: { ribs: mm(10), waist: mm(5) },
  skating: { ribs: mm(15), waist: mm(10) },
  swimming: { ribs: mm(20), waist: mm(10) },
}

/** Girth that a deep breath adds at a level while the wearer exerts herself so, mm. */
export function breathAt(level: DefaultLevel, exertion: Exertion): Mm {
  const more = EXERTION_BREATH[exertion]
  const add = level === 'bust' || level === 'underbust' ? more.ribs : level === 'waist' ? more.waist : 0
  return mm(BREATH_BY_LEVEL[level] + add)
}

/** Breadth over depth of the body. Bust, waist, hip: means of ANSUR II women, estimates; underbust and high hip: half-way between their neighbours. */
export const ASPECT_BY_LEVEL: Readonly<Record<DefaultLevel, number>> = {
  bust: 1.1,
  underbust: 1.26,
  waist: 1.42,
  'high-hip': 1.475,
  hip: 1.53,
}

/** f: part of the girth in front of the side lines. Design assumption of the draft. */
export const FRONT_SHARE_BY_LEVEL: Readonly<Record<DefaultLevel, number>> = {
  bust: 0.53,
  underbust: 0.5,
  waist: 0.51,
  'high-hip': 0.5,
  hip: 0.48,
}
