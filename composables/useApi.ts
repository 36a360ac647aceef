import type { FetchError } from 'ofetch'
import { routeClient, routePath, type Fetcher, type RouteArguments } from '#shared/schemas/client'
import { routes, type RouteAnswer, type RouteId } from '#shared/schemas/routes'
import type { ProblemDetails } from '#shared/types/problem-details'

/** Changes that no loaded list shows: they leave what is loaded as it is. */
const SHOWS_NOWHERE: ReadonlySet<RouteId> = new Set<RouteId>(['garments.saveWorkingCopy', 'print.tiles'])

/** The typed client for what follows an event; pages load by `useLoaded`. What is loaded is read again after a change. */
export function useApi() {
  const client = routeClient($fetch as unknown as Fetcher)
  return async <K extends RouteId>(route: K, ...given: RouteArguments<K>): Promise<RouteAnswer<K>> => {
    const answer = await client(route, ...given)
    const changes = routes[route].method !== 'GET' && !/^(session|solve)\./.test(route) && !SHOWS_NOWHERE.has(route)
    if (changes) await refreshNuxtData()
    return answer
  }
}

/** Loads a route for a page, with the cookies of the request. The answer is kept by its address. */
export function useLoaded<K extends RouteId>(route: K, ...[given]: RouteArguments<K>) {
  const request = useRequestFetch()
  const path = routePath(route, given)
  return useAsyncData<RouteAnswer<K>>(path, () => request<RouteAnswer<K>>(path) as Promise<RouteAnswer<K>>, { deep: false })
}

/** What came back instead of an answer: problem details, or nothing at all when there is no connection. */
export interface Refusal {
  readonly offline: boolean
  readonly status: number
  readonly problem: ProblemDetails | null
  readonly message: string
  /** Messages by the field they belong to, as dotted paths. */
  readonly fields: Readonly<Record<string, string>>
}

export function refusalOf(error: unknown): Refusal {
  const failed = error as Partial<FetchError> & { statusCode?: number; data?: unknown }
  const status = failed.statusCode ?? failed.response?.status ?? 0
  const data = failed.data as ProblemDetails | { readonly data?: ProblemDetails } | undefined
  const problem = !data ? null : 'type' in data ? data : ((data as { readonly data?: ProblemDetails }).data ?? null)
  const fields: Record<string, string> = {}
  for (const field of problem?.fields ?? []) fields[field.path] ??= field.message
  const offline = status === 0
  return {
    offline,
    status,
    problem,
    message: offline
      ? 'There is no connection. What you typed stays here; try again when there is one.'
      : (problem?.detail ?? problem?.title ?? 'This could not be done. What you typed stays here; try again.'),
    fields,
  }
}
