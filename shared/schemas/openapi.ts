import type { ZodTypeAny } from 'zod'
import { zodToJsonSchema } from 'zod-to-json-schema'
import { problems } from '../types/problem-details'
import { routes, type Route } from './routes'

const schemaOf = (schema: ZodTypeAny) => {
  const { $schema: _, ...rest } = zodToJsonSchema(schema, {
    target: 'jsonSchema2019-09',
    $refStrategy: 'none',
    effectStrategy: 'input',
  }) as Record<string, unknown>
  return rest
}

/** Refusals that a route may give, besides those of its own work. */
export function refusalsOf(route: Route): (keyof typeof problems)[] {
  const signedIn = route.access !== 'public'
  return [
    ...(signedIn ? (['not-signed-in'] as const) : []),
    ...(typeof route.access === 'string' ? [] : (['not-allowed'] as const)),
    ...(route.resource ? (['not-found'] as const) : []),
    ...(route.method === 'GET' ? [] : (['wrong-origin'] as const)),
    ...(route.body || route.query || route.upload ? (['invalid-input'] as const) : []),
    ...(route.upload ? (['too-large'] as const) : []),
  ]
}

const whoMay = (route: Route) =>
  route.access === 'public' ? 'Anyone.' : route.access === 'signed-in' ? 'Whoever is signed in.' : `Roles: ${route.access.join(', ')}.`

function operationOf(id: string, route: Route) {
  const query = route.query ? (schemaOf(route.query) as { properties?: Record<string, unknown>; required?: string[] }) : null
  const statuses = new Map<number, string[]>()
  for (const slug of refusalsOf(route)) statuses.set(problems[slug].status, [...(statuses.get(problems[slug].status) ?? []), slug])
  return {
    operationId: id,
    tags: [route.group],
    summary: route.summary,
    description: whoMay(route),
    security: route.access === 'public' ? [] : [{ session: [] }],
    parameters: [
      ...(route.resource ? [{ name: 'id', in: 'path', required: true, schema: { type: 'string', format: 'uuid' } }] : []),
      ...Object.entries(query?.properties ?? {}).map(([name, schema]) => ({
        name,
        in: 'query',
        required: query?.required?.includes(name) ?? false,
        schema,
      })),
    ],
    ...(route.upload
      ? {
          requestBody: {
            required: true,
            content: Object.fromEntries(route.upload.media.map((media) => [media, { schema: { type: 'string', format: 'binary' } }])),
          },
        }
      : {}),
    ...(route.body ? { requestBody: { required: true, content: { 'application/json': { schema: schemaOf(route.body) } } } } : {}),
    responses: {
      [route.status ?? 200]: {
        description: route.summary,
        content: route.response
          ? { 'application/json': { schema: schemaOf(route.response) } }
          : { [route.media ?? 'application/octet-stream']: {} },
      },
      ...Object.fromEntries(
        [...statuses].map(([status, slugs]) => [
          status,
          { description: slugs.join(', '), content: { 'application/problem+json': { schema: { $ref: '#/components/schemas/Problem' } } } },
        ]),
      ),
    },
  }
}

let described: Record<string, unknown> | null = null

/** The route table as OpenAPI 3.1. Lengths are millimetres, tension N/m, pressure Pa, strain a ratio. */
export function describeRoutes(): Record<string, unknown> {
  if (described) return described
  const paths: Record<string, Record<string, unknown>> = {}
  for (const [id, route] of Object.entries(routes) as [string, Route][]) {
    const path = route.path.replace(':id', '{id}')
    paths[path] = { ...paths[path], [route.method.toLowerCase()]: operationOf(id, route) }
  }
  described = {
    openapi: '3.1.0',
    info: {
      title: 'Tenterframe',
      version: '1',
      description:
        'Lengths are millimetres, tension newtons per metre of width, pressure pascals, strain a ratio. Requests that change something need a same-origin Origin header.',
    },
    paths,
    components: {
      securitySchemes: { session: { type: 'apiKey', in: 'cookie', name: 'tenterframe' } },
      schemas: {
        Problem: {
          type: 'object',
          description: 'Problem details, RFC 9457.',
          required: ['type', 'title', 'status'],
          properties: {
            type: { type: 'string', enum: Object.keys(problems).map((slug) => `/problems/${slug}`) },
            title: { type: 'string' },
            status: { type: 'integer' },
            detail: { type: 'string' },
            instance: { type: 'string' },
            fields: { type: 'array', items: { type: 'object', properties: { path: { type: 'string' }, message: { type: 'string' } } } },
            theirs: { description: 'What was saved meanwhile.' },
            problem: { type: 'object', description: 'Why it cannot be computed, with its next step.' },
            ask: { type: 'object', description: 'Which columns and units of a machine’s file have to be chosen.' },
            retryAfterSeconds: { type: 'integer' },
          },
        },
      },
    },
  }
  return described
}
