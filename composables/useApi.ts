import type { FetchError } from 'ofetch'
import { routeClient, routePath, type Fetcher, type RouteArguments } from '#shared/schemas/client'
import type { RouteAnswer, RouteId } from '#shared/schemas/routes'
import type { ProblemDetails } from '#shared/types/problem-details'

/** The typed client for what follows an event; pages load by `useLoaded`. */
export function useApi() {
  return routeClient($fetch as unknown as Fetcher)
}

/**
 * Loads a route for a page, with the cookies of the request. The answer is kept by its address; where the page that is being left holds
 * the same one, it is read again, because what was done there may have changed it.
 */
export function useLoaded<K extends RouteId>(route: K, ...[given]: RouteArguments<K>) {
  const request = useRequestFetch()
  const path = routePath(route, given)
  const loaded = useAsyncData<RouteAnswer<K>>(path, () => request<RouteAnswer<K>>(path) as Promise<RouteAnswer<K>>, { deep: false })
  if (import.meta.client && !useNuxtApp().isHydrating && loaded.status.value === 'success') void loaded.refresh()
  return loaded
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
