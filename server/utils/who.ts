import { getCookie, type H3Event } from 'h3'
import { readSession } from '../services/session'
import type { SessionRow } from '../db/queries/session'
import { database } from './database'

export interface Who extends SessionRow {
  readonly sid: string
}

/** The id in the sealed part of a session; null when it holds none. */
const sidOf = (secure: { readonly sid?: unknown } | undefined): string | null => (typeof secure?.sid === 'string' ? secure.sid : null)

/** Id in the cookie, or null. A request without the cookie gets none. */
export async function sessionIdOf(event: H3Event): Promise<string | null> {
  if (!getCookie(event, useRuntimeConfig(event).session.name ?? 'nuxt-session')) return null
  const { secure } = await getUserSession(event)
  return sidOf(secure)
}

/** Who asks: the row of the session is looked at on every request, so that it can be ended. */
export async function whoAsks(event: H3Event, now: Date): Promise<Who | null> {
  const sid = await sessionIdOf(event)
  if (sid === null) return null
  const row = await readSession(database(), sid, now)
  return row ? { ...row, sid } : null
}
