import { mm, type Mm } from '../units/brand'
import type { ClosureChoice } from './types'

/** First and last eyelet from the ends of their edge, mm. Setting; common practice. */
export const EYELET_FROM_END = 10
/** Eyelets stand closer within this much of the waist, mm up and down. Setting; common practice. */
export const WAIST_ZONE = 40
/** Hook-and-eye tape, mm from hook to hook. Setting; from memory. */
export const HOOK_PITCH = 19

/** Closures to begin with: widths and pitches by common practice, a setting of the drafter. Both sides together, mm. */
export const DEFAULT_CLOSURES: Readonly<Record<'zip' | 'hook-tape' | 'hooks' | 'busk' | 'lacing', ClosureChoice>> = {
  zip: { rigid: mm(24), pitch: mm(0), waistPitch: mm(0), ends: mm(0) },
  'hook-tape': { rigid: mm(30), pitch: mm(HOOK_PITCH), waistPitch: mm(HOOK_PITCH), ends: mm(0) },
  hooks: { rigid: mm(20), pitch: mm(25), waistPitch: mm(25), ends: mm(0) },
  busk: { rigid: mm(34), pitch: mm(55), waistPitch: mm(55), ends: mm(0) },
  lacing: { rigid: mm(50), pitch: mm(22), waistPitch: mm(16), ends: mm(300) },
}

/**
 * Places along an edge, mm from its top, the first and last `EYELET_FROM_END` from its ends, no further apart than `pitch`, and no further
 * than `waistPitch` where the waist lies `waist` from the top (null: nowhere). Evenly within each stretch.
 */
export function eyeletPlaces(length: Mm, pitch: Mm, waistPitch: Mm, waist: Mm | null): readonly Mm[] {
  const first = EYELET_FROM_END
  const last = length - EYELET_FROM_END
  if (!(last > first) || !(pitch > 0)) return []
  const cuts =
    waist === null || !(waistPitch > 0 && waistPitch < pitch)
      ? [first, last]
      : [first, waist - WAIST_ZONE, waist + WAIST_ZONE, last].map((at) => Math.min(Math.max(at, first), last))
  const places: number[] = [first]
  for (let i = 1; i < cuts.length; i++) {
    const [from, to] = [cuts[i - 1]!, cuts[i]!]
    if (to - from < 1e-9) continue
    const step = cuts.length === 4 && i === 2 ? waistPitch : pitch
    const count = Math.max(1, Math.ceil((to - from) / step - 1e-9))
    for (let k = 1; k <= count; k++) places.push(from + ((to - from) * k) / count)
  }
  return places.map(mm)
}

/**
 * Cord for a criss-cross lacing: 2 (H + (P - 1) sqrt(H² + V²) + L) for P pairs H apart and V one below the other, L left at each end, mm.
 * Source: published shoelace length formulas, read. With gaps and steps of their own each crossing is taken by its own.
 */
export function cordLength(pairs: readonly { readonly at: Mm; readonly apart: Mm }[], ends: Mm): Mm {
  if (pairs.length === 0) return mm(0)
  const across = pairs.slice(1).reduce((sum, pair, i) => {
    const before = pairs[i]!
    return sum + Math.hypot((pair.apart + before.apart) / 2, pair.at - before.at)
  }, 0)
  return mm(2 * (pairs[0]!.apart + across + ends))
}

/** Hooks on a tape of this length, the first half a pitch from its end. */
export const hookCount = (length: Mm, pitch: Mm): number => (pitch > 0 ? Math.max(0, Math.floor(length / pitch)) : 0)
