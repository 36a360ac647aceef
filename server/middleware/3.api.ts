import { defineEventHandler, setResponseHeader } from 'h3'
import { routes, type Route } from '../../shared/schemas/routes'
import { problemAnswer } from '../utils/problem'

const table = Object.values(routes).map((route: Route) => ({
  method: route.method,
  pattern: new RegExp(`^${route.path.replace(/[.]/g, '\\.').replace(':id', '[^/]+')}$`),
}))

/** An address that the table does not have, or not with that method, is refused as problem details like everything else. */
export default defineEventHandler((event) => {
  const path = event.path.split('?')[0]!
  if (!path.startsWith('/api/') || path.startsWith('/api/_')) return
  const methods = table.filter((route) => route.pattern.test(path)).map((route) => route.method)
  if (methods.length === 0) return problemAnswer(event, 'not-found')
  if (methods.includes(event.method as Route['method']) || (event.method === 'HEAD' && methods.includes('GET'))) return
  setResponseHeader(event, 'allow', [...new Set(methods)].join(', '))
  return problemAnswer(event, 'method-not-allowed')
})
