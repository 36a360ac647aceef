import pg from 'pg'
import { describe, expect, inject, it } from 'vitest'
import { accountOf, call, cookieOf, signIn } from './caller'
import { startServer } from './server'

const median = (values: readonly number[]) => values.toSorted((a, b) => a - b)[Math.floor(values.length / 2)]!

describe('sessions', () => {
  it('signs each role in, and says who is signed in', async () => {
    for (const role of ['owner', 'drafter', 'maker']) {
      const me = (await call('session.get', {}, await signIn(role))).body
      expect(me.account.email).toBe(accountOf(role).email)
      expect(me.role).toBe(role)
      expect(me.workroom.name).toBe(accountOf(role).workroom)
    }
  })

  it('gives a cookie that scripts cannot read, and nothing in it but an id', async () => {
    const { email, password } = accountOf('owner')
    const answer = await call('session.signIn', { body: { email, password } })
    const cookie = answer.headers.getSetCookie().at(-1)!
    expect(cookie).toMatch(/HttpOnly/)
    expect(cookie).toMatch(/Secure/)
    expect(cookie).toMatch(/SameSite=Lax/)
    const readable = await fetch(`${inject('baseUrl')}/api/_auth/session`, { headers: { cookie: cookie.split(';')[0]! } }).then((one) =>
      one.json(),
    )
    expect(Object.keys(readable)).toEqual(['id'])
  })

  it('takes no cookie for anonymous requests and keeps answers out of caches', async () => {
    const answer = await call('session.get')
    expect(answer.body.account).toBeNull()
    expect(answer.headers.getSetCookie()).toEqual([])
    expect(answer.headers.get('cache-control')).toBe('no-store')
  })

  it('hides demo sign-ins from a server that is no demo', async () => {
    expect((await call('session.get')).body).toMatchObject({ demo: false, demoSignIns: [] })
  })

  it('answers a wrong password and an unknown account alike, in words and in work', async () => {
    const attempt = async (email: string) => {
      const start = performance.now()
      const answer = await call('session.signIn', { body: { email, password: 'not-the-password' } })
      return { took: performance.now() - start, answer }
    }
    const known: number[] = []
    const unknown: number[] = []
    for (let i = 0; i < 9; i++) {
      const a = await attempt(accountOf('owner').email)
      const b = await attempt(`nobody${i}@lakestage.example`)
      expect(a.answer.status).toBe(401)
      expect(b.answer.body).toEqual(a.answer.body)
      expect(a.answer.body.type).toBe('/problems/sign-in-refused')
      known.push(a.took)
      unknown.push(b.took)
    }
    expect(median(unknown) / median(known)).toBeGreaterThan(0.5)
    expect(median(unknown) / median(known)).toBeLessThan(2)
  })

  it('ends one session, and leaves another', async () => {
    const here = await signIn('drafter')
    const there = await signIn('drafter')
    expect((await call('session.signOut', {}, here)).status).toBe(200)
    expect((await call('workroom.get', {}, here)).body.type).toBe('/problems/not-signed-in')
    expect((await call('workroom.get', {}, there)).status).toBe(200)
  })

  it('ends every session of an account at once, and none of another', async () => {
    const [a, b, other] = [await signIn('maker'), await signIn('maker'), await signIn('owner')]
    expect((await call('session.signOutEverywhere', {}, a)).status).toBe(200)
    for (const cookie of [a, b]) expect((await call('workroom.get', {}, cookie)).status).toBe(401)
    expect((await call('workroom.get', {}, other)).status).toBe(200)
  })

  it('refuses a cookie that somebody else sealed', async () => {
    const cookie = await signIn('owner')
    const bent = cookie.replace(/.$/, (last) => (last === 'A' ? 'B' : 'A'))
    expect((await call('workroom.get', {}, bent)).status).toBe(401)
  })

  it('keeps the unit that a person chose', async () => {
    const cookie = await signIn('drafter')
    expect((await call('session.preferences', { body: { unit: 'in' } }, cookie)).body.unit).toBe('in')
    expect((await call('session.get', {}, await signIn('drafter'))).body.unit).toBe('in')
    expect((await call('session.preferences', { body: { unit: 'ell' } }, cookie)).body.fields[0].path).toBe('unit')
    await call('session.preferences', { body: { unit: 'cm' } }, cookie)
  })

  it('lets an account try a few times, then asks it to wait, and no other account', async () => {
    const owner = new pg.Client({ connectionString: inject('ownerUrl') })
    await owner.connect()
    await owner.query('delete from login_attempt')
    await owner.end()
    const server = await startServer({
      NUXT_DATABASE_URL: inject('appUrl'),
      NUXT_SESSION_PASSWORD: inject('sessionPassword'),
      NUXT_LOGIN_LIMIT: '3',
    })
    try {
      const wrong = { email: accountOf('drafter').email, password: 'not-the-password' }
      for (let i = 0; i < 3; i++) expect((await call('session.signIn', { body: wrong }, null, server.url)).status).toBe(401)
      const right = { email: accountOf('drafter').email, password: accountOf('drafter').password }
      const stopped = await call('session.signIn', { body: right }, null, server.url)
      expect(stopped.body.type).toBe('/problems/too-many-attempts')
      expect(Number(stopped.headers.get('retry-after'))).toBeGreaterThan(0)
      expect(cookieOf(stopped)).toBe('')
      expect(
        (
          await call(
            'session.signIn',
            { body: { email: accountOf('maker').email, password: accountOf('maker').password } },
            null,
            server.url,
          )
        ).status,
      ).toBe(200)
    } finally {
      await server.stop()
    }
  })
})
