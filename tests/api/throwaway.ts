import { execFileSync } from 'node:child_process'
import { randomBytes } from 'node:crypto'
import pg from 'pg'
import { migrateDatabase } from '../../scripts/migrate'
import { seedDemo, type DemoIds } from '../../scripts/lib/demo'
import { createDatabase } from '../../server/db/client'

export interface Throwaway {
  /** Address for the application's role. */
  readonly app: string
  /** Address for the database's owner. */
  readonly owner: string
  readonly seeded: { readonly first: DemoIds; readonly second: DemoIds }
  readonly drop: () => Promise<void>
}

/** Addresses of a database server: those given, else those of this checkout's own cluster. */
function databaseUrls(): { readonly app: string; readonly owner: string } {
  const { NUXT_DATABASE_URL: app, NUXT_DATABASE_OWNER_URL: owner } = process.env
  if (app && owner) return { app, owner }
  const script = 'set -e; source scripts/lib/database.sh; database_up; printf "%s\\n%s\\n" "$NUXT_DATABASE_URL" "$NUXT_DATABASE_OWNER_URL"'
  const [ownApp, ownOwner] = execFileSync('bash', ['-c', script], { encoding: 'utf8', env: { ...process.env, NUXT_DATABASE_URL: '' } })
    .trim()
    .split('\n')
  return { app: ownApp!, owner: ownOwner! }
}

const withDatabase = (url: string, name: string): string => {
  const changed = new URL(url)
  changed.pathname = `/${name}`
  return changed.href
}

async function run(url: string, statement: string): Promise<void> {
  const client = new pg.Client({ connectionString: url })
  await client.connect()
  try {
    await client.query(statement)
  } finally {
    await client.end()
  }
}

/** A throwaway database on the server named, migrated and loaded with the demo. The named database is never touched. */
export async function throwawayDatabase(now: Date): Promise<Throwaway> {
  const urls = databaseUrls()
  const name = `tf_test_${randomBytes(6).toString('hex')}`
  await run(urls.owner, `create database ${name} template template0 encoding 'UTF8'`)
  /** The owner may not end sessions of the app role: the server's own are given a moment to close. */
  const drop = async () => {
    for (let tries = 0; ; tries++) {
      try {
        return await run(urls.owner, `drop database if exists ${name}`)
      } catch (error) {
        if (tries === 20) throw error
        await new Promise((wait) => setTimeout(wait, 150))
      }
    }
  }
  try {
    const owner = withDatabase(urls.owner, name)
    await migrateDatabase(owner)
    const asOwner = createDatabase(owner, 2)
    const seeded = await seedDemo(asOwner, now).finally(() => asOwner.destroy())
    return { app: withDatabase(urls.app, name), owner, seeded, drop }
  } catch (error) {
    await drop()
    throw error
  }
}
