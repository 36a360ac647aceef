import pg from 'pg'
import { describe, expect, inject, it } from 'vitest'
import { newestMigration } from '../../migrations/index'
import { startServer } from './server'

const env = () => ({ NUXT_DATABASE_URL: inject('appUrl'), NUXT_SESSION_PASSWORD: inject('sessionPassword') })

describe('a server refuses to start', () => {
  it('on an older schema than it was built with', async () => {
    const owner = new pg.Client({ connectionString: inject('ownerUrl') })
    await owner.connect()
    const rename = (from: string, to: string) => owner.query('update kysely_migration set name = replace(name, $1, $2)', [from, to])
    const year = newestMigration.slice(0, 4)
    await rename(year, '1999')
    try {
      await expect(startServer(env())).rejects.toThrow('older than this server')
    } finally {
      await rename('1999', year)
      await owner.end()
    }
  })

  it('with a session password that is too short, or without a database', async () => {
    await expect(startServer({ ...env(), NUXT_SESSION_PASSWORD: 'short' })).rejects.toThrow('NUXT_SESSION_PASSWORD')
    await expect(startServer({ ...env(), NUXT_DATABASE_URL: '' })).rejects.toThrow('NUXT_DATABASE_URL is not set')
  })
})
