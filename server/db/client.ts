import { CamelCasePlugin, Kysely, PostgresDialect, sql, type RawBuilder, type Transaction } from 'kysely'
import pg from 'pg'
import type { DB, Json } from './tables'

export type Database = Kysely<DB>
export type Work = Transaction<DB>

const DATE = 1082
const INT8 = 20
pg.types.setTypeParser(DATE, (text) => text)
pg.types.setTypeParser(INT8, Number)

/** A pool of connections to one database. Columns are snake_case there and camelCase here; keys inside jsonb stay as they are. */
export function createDatabase(url: string, connections = 12): Database {
  return new Kysely<DB>({
    dialect: new PostgresDialect({ pool: new pg.Pool({ connectionString: url, max: connections, connectionTimeoutMillis: 5000 }) }),
    plugins: [new CamelCasePlugin({ maintainNestedObjectKeys: true })],
  })
}

/** From here to its end the transaction sees the rows of one workroom alone. */
export async function enterWorkroom(trx: Work, workroom: string): Promise<void> {
  await sql`select set_config('tenterframe.workroom', ${workroom}, true)`.execute(trx)
}

/** Runs work in a transaction that sees the rows of one workroom alone. */
export function inWorkroom<T>(db: Database, workroom: string, work: (trx: Work) => Promise<T>): Promise<T> {
  return db.transaction().execute(async (trx) => {
    await enterWorkroom(trx, workroom)
    return work(trx)
  })
}

/** A value for a jsonb column. */
export const json = (value: unknown): RawBuilder<Json> => sql<Json>`${JSON.stringify(value)}::jsonb`

/** A value read from a jsonb column that was written through its schema. */
export const fromJson = <T>(value: Json | null): T => value as unknown as T
