import type { Caution } from './types'

/** A caution that a drafter has seen and answers for, with the reason. Stops are cleared with the version, not here. */
export interface Acknowledged {
  readonly key: string
  readonly reason: string
  /** Name of who acknowledged it. */
  readonly by: string
  /** ISO date. */
  readonly on: string
}

/** FNV-1a, 32 bit: the words themselves may speak of the wearer and are not kept. */
function fingerprint(text: string): string {
  let hash = 0x811c9dc5
  for (let i = 0; i < text.length; i++) hash = Math.imul(hash ^ text.charCodeAt(i), 0x01000193)
  return (hash >>> 0).toString(16)
}

/** What an acknowledgement holds on to: code, place and the words with their figures. When a figure changes it lapses. */
export const cautionKey = (caution: Caution): string => `${caution.code} ${fingerprint(JSON.stringify([caution.place, caution.message]))}`

/** The acknowledgement that stands for a caution; only cautions have one, notes need none and stops are cleared. */
export function acknowledgementOf(caution: Caution, acknowledged: readonly Acknowledged[]): Acknowledged | null {
  if (caution.severity !== 'caution') return null
  const key = cautionKey(caution)
  return acknowledged.find((one) => one.key === key) ?? null
}
