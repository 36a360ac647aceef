import { routes, type RouteAnswer, type RouteBody, type RouteHasId, type RouteId, type RouteQuery, type UploadRouteId } from './routes'

type Given<K extends RouteId> = (RouteHasId<K> extends true ? { readonly id: string } : { readonly id?: undefined }) &
  (RouteBody<K> extends undefined ? { readonly body?: undefined } : { readonly body: RouteBody<K> }) &
  (RouteQuery<K> extends undefined ? { readonly query?: undefined } : { readonly query?: RouteQuery<K> }) &
  (K extends UploadRouteId ? { readonly file: Blob } : { readonly file?: undefined })

/** What a route needs: its id, its body, its query; nothing where it needs nothing. */
export type RouteGiven<K extends RouteId> = Given<K>
export type RouteArguments<K extends RouteId> =
  RouteHasId<K> extends true ? [given: Given<K>] : RouteBody<K> extends undefined ? [given?: Given<K>] : [given: Given<K>]

/** Address of a route with its id filled in and its query behind it. */
export function routePath<K extends RouteId>(route: K, given?: { readonly id?: string; readonly query?: object }): string {
  const path = routes[route].path.replace(':id', () => encodeURIComponent(given?.id ?? ''))
  const query = Object.entries(given?.query ?? {}).filter(([, value]) => value !== undefined && value !== null && value !== '')
  return query.length === 0 ? path : `${path}?${new URLSearchParams(query.map(([key, value]) => [key, String(value)]))}`
}

export type Fetcher = (path: string, options: { method: string; body?: unknown }) => Promise<unknown>

/** A typed client over any fetcher ($fetch, useRequestFetch()): `await api('clients.list', { query: { q: 'ann' } })`. */
export function routeClient(fetcher: Fetcher) {
  return async <K extends RouteId>(route: K, ...[given]: RouteArguments<K>): Promise<RouteAnswer<K>> => {
    const answer = await fetcher(routePath(route, given), {
      method: routes[route].method,
      ...(given?.body === undefined ? {} : { body: given.body }),
      ...(given?.file === undefined ? {} : { body: given.file }),
    })
    return answer as RouteAnswer<K>
  }
}
