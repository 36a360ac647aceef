import { inject } from 'vitest'
import { DEMO_ACCOUNTS } from '../../shared/demo'
import { routePath } from '../../shared/schemas/client'
import { routes, type RouteId } from '../../shared/schemas/routes'

export interface Answer {
  readonly status: number
  readonly headers: Headers
  // The tests look into answers of every shape.
  // eslint-disable-next-line @typescript-eslint/no-explicit-any
  readonly body: any
}

export interface Given {
  readonly id?: string
  readonly body?: unknown
  readonly query?: object
  readonly headers?: Readonly<Record<string, string>>
}

export const FIRST = DEMO_ACCOUNTS[0]!.workroom
export const SECOND = DEMO_ACCOUNTS.at(-1)!.workroom

export const accountOf = (role: string, workroom = FIRST) => DEMO_ACCOUNTS.find((one) => one.role === role && one.workroom === workroom)!

/** Calls one route of the table as whoever holds the cookie. */
export async function call(route: RouteId, given: Given = {}, cookie: string | null = null, base = inject('baseUrl')): Promise<Answer> {
  const { method } = routes[route]
  const response = await fetch(`${base}${routePath(route, given)}`, {
    method,
    headers: {
      ...(method === 'GET' ? {} : { origin: base, 'content-type': 'application/json' }),
      ...(cookie ? { cookie } : {}),
      ...given.headers,
    },
    ...(method === 'GET' ? {} : { body: JSON.stringify(given.body ?? {}) }),
  })
  const json = response.headers.get('content-type')?.includes('json')
  return { status: response.status, headers: response.headers, body: json ? await response.json() : await response.arrayBuffer() }
}

export const cookieOf = (answer: Answer): string => answer.headers.getSetCookie().at(-1)?.split(';')[0] ?? ''

export async function signIn(role: string, workroom = FIRST, base = inject('baseUrl')): Promise<string> {
  const { email, password } = accountOf(role, workroom)
  const answer = await call('session.signIn', { body: { email, password } }, null, base)
  if (answer.status !== 200) throw new Error(`Sign-in answered ${answer.status}.`)
  return cookieOf(answer)
}
