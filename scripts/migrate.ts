import { Kysely, Migrator, PostgresDialect } from 'kysely'
import pg from 'pg'
import { migrations } from '../migrations/index'

/** Brings a database to the newest schema under Kysely's lock. The address is the owner's. */
export async function migrateDatabase(url: string): Promise<readonly string[]> {
  const db = new Kysely<unknown>({ dialect: new PostgresDialect({ pool: new pg.Pool({ connectionString: url, max: 1 }) }) })
  try {
    const { error, results } = await new Migrator({ db, provider: { getMigrations: async () => migrations } }).migrateToLatest()
    const failed = results?.find((one) => one.status === 'Error')
    if (error) throw failed ? new Error(`Migration ${failed.migrationName} failed.`, { cause: error }) : error
    return (results ?? []).map((one) => one.migrationName)
  } finally {
    await db.destroy()
  }
}

if (process.argv[1]?.endsWith('migrate.ts')) {
  const url = process.env.NUXT_DATABASE_OWNER_URL
  if (!url) {
    console.error('NUXT_DATABASE_OWNER_URL is not set: the owner of the database migrates.')
    process.exit(1)
  }
  for (const name of await migrateDatabase(url)) console.log(`migrated ${name}`)
}
