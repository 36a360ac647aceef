import type { ClothDirection } from './types'

/** Degrees within which a strip is cut along a named direction: no strip is cut truer. A setting without a source. */
const NAMED_WITHIN = 0.5
/** Half-way between bias and its neighbours, degrees from the lengthwise. */
const NEARER = { lengthwise: 22.5, crosswise: 67.5 } as const
const NAMES = [
  [0, 'lengthwise'],
  [45, 'bias'],
  [90, 'crosswise'],
] as const

/** A strip's direction from a typed angle, degrees from the lengthwise, 0 to 90: the name nearest to it, and the angle unless it is that name's own. */
export function typedDirection(angle: number): { readonly direction: ClothDirection; readonly angle?: number } {
  const own = NAMES.find(([degrees]) => Math.abs(degrees - angle) <= NAMED_WITHIN)
  if (own) return { direction: own[1] }
  return { direction: angle < NEARER.lengthwise ? 'lengthwise' : angle > NEARER.crosswise ? 'crosswise' : 'bias', angle }
}

/** A strip's direction in words: its name, or its angle from the lengthwise. */
export const directionWords = ({ direction, angle }: { readonly direction: ClothDirection; readonly angle?: number }): string =>
  angle === undefined ? direction : `${angle}° from the lengthwise`

/** What tells the directions of one cloth apart: the name, or the angle. */
export const directionKey = ({ direction, angle }: { readonly direction: ClothDirection; readonly angle?: number }): string =>
  angle === undefined ? direction : String(angle)
