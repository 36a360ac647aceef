import { beforeAll, describe, expect, inject, it } from 'vitest'
import { problems } from '../../shared/types/problem-details'
import { call, signIn } from './caller'

let owner: string
let drafter: string
beforeAll(async () => {
  owner = await signIn('owner')
  drafter = await signIn('drafter')
})

const ask = async (path: string, init: RequestInit = {}) => {
  const response = await fetch(`${inject('baseUrl')}${path}`, init)
  return { status: response.status, type: response.headers.get('content-type'), headers: response.headers, body: await response.json() }
}

// RFC 9457, section 3: members type, title, status, detail, instance; media type application/problem+json.
describe('problem details (RFC 9457)', () => {
  it('says what is unknown, and which methods an address takes', async () => {
    const unknown = await ask('/api/nowhere')
    expect(unknown.type).toContain('application/problem+json')
    expect(unknown.body).toEqual({ type: '/problems/not-found', title: problems['not-found'].title, status: 404, instance: '/api/nowhere' })
    const method = await ask('/api/clients', { method: 'DELETE', headers: { origin: inject('baseUrl') } })
    expect(method.body.type).toBe('/problems/method-not-allowed')
    expect(method.headers.get('allow')).toBe('GET, POST')
  })

  it('names every field that needs another look', async () => {
    const answer = await call('clients.create', { body: { name: ' ', email: 'nobody' } }, drafter)
    expect(answer.status).toBe(422)
    expect(answer.headers.get('content-type')).toContain('application/problem+json')
    expect(answer.body.fields.map((field: { path: string }) => field.path)).toEqual(['name', 'email'])
  })

  it('refuses a body that is no JSON, and one that is too large', async () => {
    const headers = { origin: inject('baseUrl'), cookie: drafter, 'content-type': 'application/json' }
    const broken = await ask('/api/clients', { method: 'POST', headers, body: '{"name":' })
    expect(broken.body.type).toBe('/problems/invalid-input')
    const large = await fetch(`${inject('baseUrl')}/api/clients`, {
      method: 'POST',
      headers,
      body: JSON.stringify({ name: 'x'.repeat(5_000_000) }),
    })
    expect(large.status).toBe(413)
  })
})

describe('where a request comes from', () => {
  const post = (headers: Record<string, string>) =>
    ask('/api/clients', { method: 'POST', headers: { 'content-type': 'application/json', cookie: drafter, ...headers }, body: '{}' })

  it.each([
    ['another site', { origin: 'https://elsewhere.example' }],
    ['the same host on another port', { origin: 'http://127.0.0.1:1' }],
    ['nowhere', {}],
    ['an opaque origin', { origin: 'null' }],
    ['a cross-site fetch', { 'sec-fetch-site': 'cross-site' }],
    ['a sibling site', { 'sec-fetch-site': 'same-site' }],
    ['a same-origin fetch with another origin', { 'sec-fetch-site': 'same-origin', origin: 'https://elsewhere.example' }],
  ])('refuses one that changes something from %s', async (_, headers) => {
    expect((await post(headers)).body.type).toBe('/problems/wrong-origin')
  })

  it('takes one from our own pages', async () => {
    const ours: Record<string, string>[] = [{ origin: inject('baseUrl') }, { 'sec-fetch-site': 'same-origin' }]
    for (const headers of ours) {
      expect((await post(headers)).body.type).toBe('/problems/invalid-input')
    }
  })
})

describe('stale forms', () => {
  it('answers 409 with what stands, and saves nothing', async () => {
    const made = (await call('clients.create', { body: { name: 'Hedda Ostrow' } }, drafter)).body
    const change = (base: number, name: string, cookie: string) => call('clients.update', { id: made.id, body: { base, name } }, cookie)
    const saved = await change(1, 'Hedda Ostrow-Lind', owner)
    expect(saved.body.revision).toBe(2)
    const stale = await change(1, 'Hedda Ostrov', drafter)
    expect(stale.status).toBe(409)
    expect(stale.body.type).toBe('/problems/stale')
    expect(stale.body.theirs).toEqual(saved.body)
    expect((await call('clients.get', { id: made.id }, drafter)).body.name).toBe('Hedda Ostrow-Lind')
  })

  it('lets one of two savers through when both save at once', async () => {
    const made = (await call('clients.create', { body: { name: 'Twin savers' } }, drafter)).body
    const answers = await Promise.all(
      ['A', 'B', 'C', 'D'].map((name) => call('clients.update', { id: made.id, body: { base: 1, name } }, drafter)),
    )
    expect(answers.map((one) => one.status).toSorted()).toEqual([200, 409, 409, 409])
  })
})

interface Page {
  readonly items: { readonly id: string; readonly code: string }[]
  readonly nextCursor: string | null
}

describe('lists', () => {
  it('find a client by how the name, or a word of it, begins, without minding accents', async () => {
    await call('clients.create', { body: { name: 'Éloïse Tarn' } }, drafter)
    const names = async (q: string) =>
      (await call('clients.list', { query: { q } }, drafter)).body.items.map((one: { name: string }) => one.name)
    expect(await names('elo')).toEqual(['Éloïse Tarn'])
    expect(await names('TAR')).toEqual(['Éloïse Tarn'])
    expect(await names('arn')).toEqual([])
    expect(await names('%')).toEqual([])
  })

  it('give every row once, page by page', async () => {
    const whole = (await call('clients.list', { query: { limit: 100 } }, drafter)).body.items.map((one: { id: string }) => one.id)
    const paged: string[] = []
    for (let cursor: string | null = ''; cursor !== null;) {
      const page: Page = (await call('clients.list', { query: { limit: 2, cursor } }, drafter)).body
      paged.push(...page.items.map((one) => one.id))
      cursor = page.nextCursor
    }
    expect(paged).toEqual(whole)
    expect((await call('clients.list', { query: { cursor: 'not-a-cursor' } }, drafter)).status).toBe(422)
  })

  it('give garments by due date, page by page', async () => {
    const codes: string[] = []
    for (let cursor: string | null = ''; cursor !== null;) {
      const page: Page = (await call('garments.list', { query: { limit: 1, cursor } }, drafter)).body
      codes.push(...page.items.map((one) => one.code))
      cursor = page.nextCursor
    }
    expect(codes).toEqual(['LS-031', 'AR-007', 'LS-032', 'LS-040'])
  })
})

describe('settings', () => {
  it('may be tightened by the owner, never loosened', async () => {
    const room = (await call('workroom.get', {}, owner)).body
    const loose = await call(
      'workroom.update',
      { body: { base: room.revision, settings: { ...room.settings, largestReduction: 0.25 } } },
      owner,
    )
    expect(loose.body.fields[0].path).toBe('settings.largestReduction')
    const tight = await call(
      'workroom.update',
      { body: { base: room.revision, settings: { ...room.settings, largestReduction: 0.18 } } },
      owner,
    )
    expect(tight.body.settings.largestReduction).toBe(0.18)
    await call('workroom.update', { body: { base: tight.body.revision, settings: room.settings } }, owner)
  })
})
