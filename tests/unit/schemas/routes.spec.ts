import { readdirSync } from 'node:fs'
import { fileURLToPath } from 'node:url'
import { describe, expect, it } from 'vitest'
import { migrations } from '../../../migrations/index'
import { freshDocument } from '../../../shared/domain/document/fresh'
import { DEFAULT_TEXTILE_SETTINGS } from '../../../shared/domain/textile/defaults'
import { isoDate } from '../../../shared/schemas/base'
import { routeClient, routePath } from '../../../shared/schemas/client'
import { describeRoutes } from '../../../shared/schemas/openapi'
import { garmentDocument } from '../../../shared/schemas/garments'
import { measuredValues } from '../../../shared/schemas/measuring'
import { routeIds, routes, type Route } from '../../../shared/schemas/routes'
import { stretchTest } from '../../../shared/schemas/textile'
import { flagsBody } from '../../../shared/schemas/wearers'
import { textileSettings } from '../../../shared/schemas/workroom'
import { problems, problemSlug } from '../../../shared/types/problem-details'

const table = routeIds.map((id) => [id, routes[id] as Route] as const)
const under = (folder: string) => fileURLToPath(new URL(`../../../${folder}`, import.meta.url))

describe('the route table', () => {
  it('names each method of an address once', () => {
    const addresses = table.map(([, route]) => `${route.method} ${route.path}`)
    expect(new Set(addresses).size).toBe(addresses.length)
  })

  it.each(table)('%s: an id in the address is that of a resource, which only roles may ask for', (_, route) => {
    expect(route.path.includes(':id')).toBe(route.resource !== null)
    if (route.resource !== null) expect(Array.isArray(route.access)).toBe(true)
    expect(route.summary).toMatch(/[.]$/)
    if (route.method === 'GET') expect(route.body).toBeNull()
  })

  it('has one handler for each route, and no handler beside them', () => {
    const files = readdirSync(under('server/api'), { recursive: true, encoding: 'utf8' }).filter((file) => file.endsWith('.ts'))
    const addressOf = (file: string) => {
      const [, path, method] = /^(.*)\.(get|post|put|patch|delete)\.ts$/.exec(file)!
      return `${method!.toUpperCase()} /api/${path!.replace(/(^|\/)index$/, '').replace('[id]', ':id')}`
    }
    expect(files.map(addressOf).toSorted()).toEqual(table.map(([, route]) => `${route.method} ${route.path}`).toSorted())
  })

  it('describes every schema without leaving one out', () => {
    expect(JSON.stringify(describeRoutes()).length).toBeGreaterThan(10_000)
    for (const [, route] of table.filter(([, route]) => route.body)) {
      const path = describeRoutes().paths as Record<
        string,
        Record<string, { requestBody: { content: Record<string, { schema: object }> } }>
      >
      const body = path[route.path.replace(':id', '{id}')]![route.method.toLowerCase()]!.requestBody.content['application/json']!.schema
      expect(Object.keys(body).length).toBeGreaterThan(0)
    }
  })
})

describe('the client', () => {
  it('fills in the id and leaves empty queries out', () => {
    expect(routePath('clients.get', { id: 'a/b' })).toBe('/api/clients/a%2Fb')
    expect(routePath('clients.list', { query: { q: 'Ann & Co', cursor: undefined } })).toBe('/api/clients?q=Ann+%26+Co')
    expect(routePath('clients.get', { id: '$&' })).toBe('/api/clients/%24%26')
  })

  it('sends the method of the table and the body given', async () => {
    const sent: unknown[] = []
    const api = routeClient(async (path, options) => sent.push([path, options]))
    await api('session.preferences', { body: { unit: 'in' } })
    await api('workroom.get')
    expect(sent).toEqual([
      ['/api/session/preferences', { method: 'PUT', body: { unit: 'in' } }],
      ['/api/workroom', { method: 'GET' }],
    ])
  })
})

describe('schemas of what is saved', () => {
  it('take a fresh document and the default settings as they are', () => {
    expect(garmentDocument.parse(freshDocument())).toEqual(freshDocument())
    expect(textileSettings.parse(DEFAULT_TEXTILE_SETTINGS)).toEqual(DEFAULT_TEXTILE_SETTINGS)
  })

  it('refuse what no garment is', () => {
    const fresh = freshDocument()
    const refused = (change: object) => garmentDocument.safeParse({ ...fresh, ...change }).success
    expect(refused({ schema: 2 })).toBe(false)
    expect(refused({ levels: [fresh.levels[0], fresh.levels[0]] })).toBe(false)
    expect(refused({ style: { ...fresh.style, frontShares: { centre: 0.5, princess: 0.4, side: 0.4 } } })).toBe(false)
    expect(refused({ levels: [{ ...fresh.levels[0], hold: Number.NaN }] })).toBe(false)
  })

  it('never loosen a limit', () => {
    const loose = { largestReduction: 0.21, fewSpecimensSpread: 0.1 }
    for (const [key, value] of Object.entries(loose))
      expect(textileSettings.safeParse({ ...DEFAULT_TEXTILE_SETTINGS, [key]: value }).success, key).toBe(false)
  })

  it('keep what was typed, and refuse measurements that they do not know', () => {
    const typed = { waistGirth: { value: 698.5, typed: '27 1/2 in' } }
    expect(measuredValues.parse(typed)).toEqual(typed)
    expect(measuredValues.safeParse({ waistline: { value: 700 } }).success).toBe(false)
    expect(measuredValues.safeParse({ waistGirth: { value: -1 } }).success).toBe(false)
  })

  it('know which days there are', () => {
    expect(isoDate.safeParse('2028-02-29').success).toBe(true)
    for (const day of ['2027-02-29', '2026-13-01', '26-1-1', 'today']) expect(isoDate.safeParse(day).success, day).toBe(false)
  })

  it('take health data with its purpose and consent alone', () => {
    const flags = {
      pregnancy: false,
      nursing: true,
      reflux: false,
      breathing: false,
      circulation: false,
      child: false,
      practitionerAgreed: false,
      consentBy: null,
    }
    expect(flagsBody.safeParse({ ...flags, purpose: 'Sets limits.', consentNoted: true }).success).toBe(true)
    expect(flagsBody.safeParse({ ...flags, purpose: '', consentNoted: true }).success).toBe(false)
    expect(flagsBody.safeParse({ ...flags, purpose: 'Sets limits.', consentNoted: false }).success).toBe(false)
  })

  it('take a test by strip or by label, with at least one reading', () => {
    const strip = { kind: 'strip', direction: 'bias', state: 'wet', specimens: [{ width: 50, gauge: 100, readings: [], restLength: null }] }
    expect(stretchTest.safeParse(strip).success).toBe(false)
    expect(stretchTest.safeParse({ kind: 'label', direction: 'bias', state: 'dry', stretch: 0.4 }).success).toBe(true)
  })
})

describe('problems', () => {
  it('have a slug that is told from the wire, and an error status', () => {
    for (const [slug, { status, title }] of Object.entries(problems)) {
      expect(problemSlug({ type: `/problems/${slug}` })).toBe(slug)
      expect(status).toBeGreaterThanOrEqual(400)
      expect(title).toMatch(/[.]$/)
    }
    for (const other of [null, 'x', {}, { type: '/problems/other' }, { type: 1 }]) expect(problemSlug(other)).toBeNull()
  })
})

describe('migrations', () => {
  it('are listed as they lie in the folder, in order', () => {
    const files = readdirSync(under('migrations'))
      .filter((file) => file !== 'index.ts')
      .map((file) => file.replace('.ts', ''))
    expect(Object.keys(migrations)).toEqual(files.toSorted())
  })
})
