import type { Role } from '../../shared/schemas/session'
import type { Work } from '../db/client'

/** What a use case works in: one transaction of one workroom, who asks, and the clock. */
export interface Room {
  readonly db: Work
  readonly workroom: string
  readonly account: string
  readonly role: Role
  readonly now: Date
  /** The date in the workroom's zone, ISO. */
  readonly today: string
}

/** ISO date of a moment in a zone. */
export const dateIn = (zone: string, now: Date): string =>
  new Intl.DateTimeFormat('en-CA', { timeZone: zone, year: 'numeric', month: '2-digit', day: '2-digit' }).format(now)

/** Whole years between two ISO dates; null when the first is not known. */
export function yearsBetween(from: string | null, to: string): number | null {
  if (from === null) return null
  const years = Number(to.slice(0, 4)) - Number(from.slice(0, 4))
  return to.slice(5) < from.slice(5) ? years - 1 : years
}
