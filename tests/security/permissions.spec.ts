import { randomUUID } from 'node:crypto'
import { beforeAll, describe, expect, inject, it } from 'vitest'
import pg from 'pg'
import { routeIds, routes, type ResourceKind, type Route, type RouteId } from '../../shared/schemas/routes'
import { roles } from '../../shared/schemas/session'
import { call, signIn } from '../api/caller'

const tables: Readonly<Record<ResourceKind, string>> = {
  client: 'client',
  wearer: 'wearer',
  measuring: 'measuring',
  cloth: 'cloth',
  test: 'stretch_test',
  garment: 'garment',
  version: 'version',
  printer: 'printer',
  stock: 'bone_stock',
}

/** Routes that end the session they are called with. */
const ending: ReadonlySet<RouteId> = new Set(['session.signOut', 'session.signOutEverywhere'])
const entryOf = (id: RouteId): Route => routes[id]
const mayNot = [401, 403, 404, 405, 500]

let own: Record<ResourceKind, string>
let foreign: Record<ResourceKind, string>
const cookies: Record<string, string> = {}

/** A cloth that the demo's cleared garment does not use: the routes below archive it and its test. */
const SPARE = `'VL-21'`

/** One row of each kind; of garments and versions the cleared one, which a maker may read. */
async function idsOf(client: pg.Client, workroom: string): Promise<Record<ResourceKind, string>> {
  const ids: Partial<Record<ResourceKind, string>> = {}
  await client.query('begin')
  await client.query(`select set_config('tenterframe.workroom', $1, true)`, [workroom])
  for (const [kind, table] of Object.entries(tables) as [ResourceKind, string][]) {
    const cleared = `exists (select from clearance join version v on v.id = clearance.version_id where ${kind === 'version' ? 'v.id' : 'v.garment_id'} = row.id)`
    const orders: Partial<Record<ResourceKind, string>> = {
      garment: `${cleared} desc`,
      version: `${cleared} desc`,
      cloth: `row.code = ${SPARE} desc`,
      test: `(select cloth.code = ${SPARE} from cloth where cloth.id = row.cloth_id) desc`,
    }
    const order = `order by ${orders[kind] ?? 'row.id'}`
    const { rows } = await client.query<{ id: string }>(`select row.id from ${table} row ${order} limit 1`)
    ids[kind] = rows[0]!.id
  }
  await client.query('commit')
  return ids as Record<ResourceKind, string>
}

beforeAll(async () => {
  const client = new pg.Client({ connectionString: inject('appUrl') })
  await client.connect()
  own = await idsOf(client, inject('first').workroom)
  foreign = await idsOf(client, inject('second').workroom)
  await client.end()
  for (const role of roles) cookies[role] = await signIn(role)
})

describe('who may, for every route, every role, own and foreign ids', () => {
  const guarded = routeIds.filter((id) => entryOf(id).access !== 'public')

  it.each(guarded)('%s: nobody without signing in, whatever the id', async (id) => {
    const { resource } = entryOf(id)
    for (const row of resource ? [own[resource], foreign[resource], randomUUID()] : [undefined]) {
      const answer = await call(id, row ? { id: row } : {})
      expect(answer.status).toBe(401)
      expect(answer.body.type).toBe('/problems/not-signed-in')
    }
  })

  const withId = guarded.filter((id) => entryOf(id).resource !== null)
  it.each(withId.flatMap((id) => roles.map((role) => [id, role] as const)))(
    '%s as %s: 404 and nothing else for another workroom',
    async (id, role) => {
      const resource = entryOf(id).resource!
      const answers = []
      for (const row of [foreign[resource], randomUUID(), 'not-an-id']) {
        const answer = await call(id, { id: row }, cookies[role])
        expect(answer.status).toBe(404)
        const { instance, ...rest } = answer.body
        expect(instance).toContain(row)
        answers.push(rest)
      }
      expect(answers[0]).toEqual({ type: '/problems/not-found', title: 'There is no such thing in this workroom.', status: 404 })
      expect(answers[1]).toEqual(answers[0])
      expect(answers[2]).toEqual(answers[0])
    },
  )

  it.each(guarded.flatMap((id) => roles.map((role) => [id, role] as const)))('%s as %s: as the table says', async (id, role) => {
    const { access, resource } = entryOf(id)
    const cookie = ending.has(id) ? await signIn(role) : cookies[role]!
    const answer = await call(id, resource ? { id: own[resource] } : {}, cookie)
    if (typeof access !== 'string' && !access.includes(role)) {
      expect(answer.status).toBe(403)
      expect(answer.body.type).toBe('/problems/not-allowed')
    } else {
      expect(mayNot).not.toContain(answer.status)
    }
    if (id === 'session.signOutEverywhere') cookies[role] = await signIn(role)
  })
})

describe('ids that come in a body', () => {
  it('starts no garment for another workroom’s wearer', async () => {
    const answer = await call('garments.create', { body: { code: 'X-1', name: 'Borrowed', wearerId: foreign.wearer } }, cookies.drafter)
    expect(answer.status).toBe(422)
    expect(answer.body.fields[0].path).toBe('wearerId')
  })

  it('takes neither measuring nor cloth of another workroom into a working copy', async () => {
    const copy = (await call('garments.workingCopy', { id: own.garment }, cookies.drafter)).body
    const measured = await call(
      'garments.saveWorkingCopy',
      { id: own.garment, body: { base: copy.revision, document: { ...copy.document, measuringId: foreign.measuring } } },
      cookies.drafter,
    )
    expect(measured.body.fields[0].path).toBe('document.measuringId')
    const plans = {
      ...copy.document.plans,
      front: copy.document.plans.front.map((layer: object) => ({ ...layer, clothId: foreign.cloth })),
    }
    const clothed = await call(
      'garments.saveWorkingCopy',
      { id: own.garment, body: { base: copy.revision, document: { ...copy.document, plans } } },
      cookies.drafter,
    )
    expect(clothed.body.problem.code).toBe('cloth-missing')
    expect(clothed.body.solution).toBeNull()
    expect(clothed.body.lastGood.revision).toBe(copy.revision)
    expect(JSON.stringify(clothed.body.input.cloths)).not.toContain(foreign.cloth)
    const back = await call(
      'garments.saveWorkingCopy',
      { id: own.garment, body: { base: clothed.body.revision, document: copy.document } },
      cookies.drafter,
    )
    expect(back.body.solution).not.toBeNull()
  })
})
