import { defineEventHandler, getQuery, getRouterParam, isError, readBody, setResponseStatus, type H3Event } from 'h3'
import type { ZodError, ZodTypeAny } from 'zod'
import { id as idSchema } from '../../shared/schemas/base'
import {
  routes,
  type ParsedBody,
  type ParsedQuery,
  type Route,
  type RouteAnswer,
  type RouteId,
  type Routes,
  type UploadRouteId,
} from '../../shared/schemas/routes'
import type { Role } from '../../shared/schemas/session'
import { inWorkroom, type Work } from '../db/client'
import { receive } from '../files/receive'
import { resourceExists } from '../db/queries/existence'
import { Refusal, refuse } from '../services/refusal'
import { dateIn, type Room } from '../services/room'
import { database } from './database'
import { problemAnswer } from './problem'
import { whoAsks, type Who } from './who'

type Access<K extends RouteId> = Routes[K]['access']

export interface Asked<K extends RouteId> {
  readonly event: H3Event
  readonly now: Date
  readonly who: Access<K> extends 'public' ? Who | null : Who
  /** The transaction of the workroom; null where the route needs none. */
  readonly room: Access<K> extends readonly Role[] ? Room : null
  readonly id: string
  readonly body: ParsedBody<K>
  readonly query: ParsedQuery<K>
}

type Answer<K extends RouteId> = Routes[K]['response'] extends null ? unknown : RouteAnswer<K>

/** Answers are held against their schemas in development and in tests. */
const checksAnswers = () => import.meta.dev || process.env.TENTERFRAME_CHECK_ANSWERS === '1'

/**
 * A handler of one route of the table. In this order: session (401), the row that the address names (404, whatever the
 * role), the role (403), query and body (422); then the work, in one transaction of the workroom.
 */
export function handle<K extends RouteId>(route: K, work: (asked: Asked<K>) => Promise<Answer<K>> | Answer<K>) {
  const entry: Route = routes[route]
  return defineEventHandler((event) =>
    answered(event, entry, async (now, who) => {
      const run = async (db: Work | null): Promise<unknown> =>
        work((await admitted(event, entry, now, who, db, true)) as unknown as Asked<K>)
      return typeof entry.access === 'string' ? run(null) : inWorkroom(database(), who!.workroomId, run)
    }),
  )
}

/**
 * A handler of a route that takes a file. Who asks is looked at before a byte is read, the file is streamed to a temporary place and made
 * into what is needed outside of any transaction, and only then the work is done, in a transaction of its own.
 */
export function handleUpload<K extends UploadRouteId, T>(
  route: K,
  make: (path: string, asked: Omit<Asked<K>, 'room'>) => Promise<T>,
  work: (asked: Asked<K>, made: T) => Promise<Answer<K>> | Answer<K>,
) {
  const entry: Route = routes[route]
  return defineEventHandler((event) =>
    answered(event, entry, async (now, who) => {
      const asIn = <R>(then: (db: Work | null) => Promise<R>) =>
        typeof entry.access === 'string' ? then(null) : inWorkroom(database(), who!.workroomId, then)
      const before = await asIn((db) => admitted(event, entry, now, who, db, false))
      const made = await receive(event.node.req, entry.upload!, (path) => make(path, before as unknown as Asked<K>))
      return asIn(async (db) => work((await admitted(event, entry, now, who, db, false)) as unknown as Asked<K>, made))
    }),
  )
}

async function answered(event: H3Event, entry: Route, run: (now: Date, who: Who | null) => Promise<unknown>): Promise<unknown> {
  try {
    const now = new Date()
    const who = await whoAsks(event, now)
    if (entry.access !== 'public' && !who) refuse('not-signed-in')
    const answer = await run(now, who)
    if (entry.response && checksAnswers()) entry.response.parse(JSON.parse(JSON.stringify(answer)))
    setResponseStatus(event, entry.status ?? 200)
    return answer
  } catch (error) {
    return answerOf(event, error)
  }
}

async function admitted(event: H3Event, entry: Route, now: Date, who: Who | null, db: Work | null, readsBody: boolean) {
  const id = entry.resource === null ? '' : await existingId(event, entry, db!, who!.workroomId)
  if (typeof entry.access !== 'string' && !entry.access.includes(who!.role)) refuse('not-allowed')
  const room = db && { db, workroom: who!.workroomId, account: who!.accountId, role: who!.role, now, today: dateIn(who!.zone, now) }
  const query = entry.query ? parse(entry.query, getQuery(event)) : undefined
  const body = readsBody && entry.body ? parse(entry.body, await bodyOf(event)) : undefined
  return { event, now, who, room, id, body, query }
}

async function existingId(event: H3Event, entry: Route, db: Work, workroom: string): Promise<string> {
  const id = idSchema.safeParse(getRouterParam(event, 'id'))
  if (!id.success || !(await resourceExists(db, workroom, entry.resource!, id.data))) return refuse('not-found')
  return id.data
}

/** What a person sent did not fit its schema. */
class Unfit extends Error {
  constructor(readonly reason: ZodError) {
    super('unfit')
  }
}

function parse(schema: ZodTypeAny, value: unknown): unknown {
  const parsed = schema.safeParse(value)
  if (!parsed.success) throw new Unfit(parsed.error)
  return parsed.data
}

async function bodyOf(event: H3Event): Promise<unknown> {
  try {
    return (await readBody<unknown>(event)) ?? {}
  } catch {
    return refuse('invalid-input', { detail: 'The body is not JSON.' })
  }
}

function answerOf(event: H3Event, error: unknown) {
  if (error instanceof Refusal) return problemAnswer(event, error.slug, error.details)
  if (error instanceof Unfit) {
    const fields = error.reason.issues.map((issue) => ({ path: issue.path.join('.'), message: issue.message }))
    return problemAnswer(event, 'invalid-input', { fields })
  }
  if (isError(error) && error.statusCode === 413) return problemAnswer(event, 'too-large')
  console.error(error)
  return problemAnswer(event, 'unexpected')
}
