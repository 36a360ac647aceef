import { newestMigration } from '../../migrations/index'
import { createDatabase, type Database } from '../db/client'
import { readSchemaVersion } from '../db/queries/session'

let opened: Database | null = null

/** The database of this server, as the role that serves. */
export function database(): Database {
  opened ??= createDatabase(useRuntimeConfig().databaseUrl)
  return opened
}

export async function closeDatabase(): Promise<void> {
  await opened?.destroy()
  opened = null
}

/** Schema of the database against the one this server was built with. */
export async function schemaState(): Promise<{ readonly ready: boolean; readonly schema: string }> {
  const schema = (await readSchemaVersion(database())) ?? ''
  return { ready: schema >= newestMigration, schema }
}
