import { mm, type Mm } from '../units/brand'
import { measuredValue } from './estimates'
import type { BodyLevel, LevelId, MeasuredValues } from './types'

/** How the garment is put on: over the head and shoulders, or stepped into. */
export type EntryWay = 'overhead' | 'step-in'

/** The greatest part of the body that a level has to pass on its way. Girth mm. */
export interface Passing {
  readonly over: 'shoulders' | 'bust' | 'high hip' | 'hip' | 'head'
  readonly girth: Mm
  readonly estimated: boolean
  /** How the girth came about, in words. */
  readonly from: string
}

/** By how much the shoulders with the arms hanging are larger round than the bust, mm. From memory, order of magnitude; an estimate, to be measured. */
export const SHOULDERS_OVER_BUST = 100

/** Shoulders with arms: as measured, else the bust and 100 mm, said to be estimated. */
export function shouldersGirth(measured: MeasuredValues, bust: Mm): Passing {
  const own = measuredValue(measured, 'shoulderGirth')
  return own === undefined
    ? {
        over: 'shoulders',
        girth: mm(bust + SHOULDERS_OVER_BUST),
        estimated: true,
        from: `bust girth + ${SHOULDERS_OVER_BUST} mm, from memory`,
      }
    : { over: 'shoulders', girth: mm(own), estimated: false, from: 'shoulder girth as measured' }
}

/** Head girth where nobody measured it, mm. From memory, order of magnitude of an adult; an estimate, to be measured. */
export const USUAL_HEAD_GIRTH = 560

/** What the neck edge has to pass overhead: the head. */
export function headGirth(measured: MeasuredValues): Passing {
  const own = measuredValue(measured, 'headGirth')
  return own === undefined
    ? { over: 'head', girth: mm(USUAL_HEAD_GIRTH), estimated: true, from: `${USUAL_HEAD_GIRTH} mm, from memory` }
    : { over: 'head', girth: mm(own), estimated: false, from: 'head girth as measured' }
}

/**
 * What a level passes at the most: overhead every level passes shoulders with arms, and bust; stepped in every level passes the greatest
 * girth below its place. Null where nothing larger lies on the way.
 */
export function passingOf(way: EntryWay, level: LevelId, levels: readonly BodyLevel[], measured: MeasuredValues): Passing | null {
  const at = (id: LevelId) => levels.find((one) => one.id === id)
  const bust = at('bust')
  if (way === 'overhead') {
    if (!bust) return null
    const shoulders = shouldersGirth(measured, bust.girth)
    return shoulders.girth >= bust.girth
      ? shoulders
      : { over: 'bust', girth: bust.girth, estimated: bust.girthEstimated, from: 'bust girth' }
  }
  const own = at(level)
  if (!own) return null
  const below = levels.filter((one) => one.y < own.y && (one.id === 'high-hip' || one.id === 'hip'))
  const [largest] = [...below].sort((a, b) => b.girth - a.girth)
  if (!largest) return null
  const over = largest.id === 'hip' ? 'hip' : 'high hip'
  return { over, girth: largest.girth, estimated: largest.girthEstimated, from: `${over} girth` }
}
