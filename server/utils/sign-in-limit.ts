import { sql } from 'kysely'
import { RateLimiterPostgres, RateLimiterRes } from 'rate-limiter-flexible'
import type { AttemptLimit } from '../services/session'
import { database } from './database'

const WINDOW_SECONDS = 15 * 60
/** Attempts from one address over all accounts, as a multiple of those on one account. */
const ADDRESS_FACTOR = 10

/** The counts lie in a table that this role cannot reach: each statement of the limiter goes through its own function. */
const store = {
  async query({ name = '', values }: { name?: string; values: readonly unknown[] }) {
    const [key, a, b, c] = values
    const rows = async (statement: ReturnType<typeof sql>) => {
      const answer = await statement.execute(database())
      return { rows: answer.rows, rowCount: answer.rows.length }
    }
    if (name.includes('upsert')) {
      return rows(sql`select * from login_attempt_count(${key}, ${a}::integer, ${b}::bigint, ${c}::bigint, ${name.endsWith('force')})`)
    }
    if (name.endsWith('get')) return rows(sql`select * from login_attempt_read(${key}, ${a}::bigint)`)
    if (name.endsWith('delete')) return rows(sql`select login_attempt_clear(${key}) as gone`)
    throw new Error(`The limiter asked for ${name}, which has no function.`)
  },
}

const limiter = (keyPrefix: string, points: number) =>
  new RateLimiterPostgres({
    storeClient: store,
    storeType: 'client',
    tableName: 'login_attempt',
    tableCreated: true,
    clearExpiredByTimeout: false,
    keyPrefix,
    points,
    duration: WINDOW_SECONDS,
  })

/** Counts attempts by account with address, and by address alone. */
export function signInLimit(points: number): AttemptLimit {
  const byAccount = limiter('account', points)
  const byAddress = limiter('address', points * ADDRESS_FACTOR)
  return {
    async count(email, address) {
      try {
        await byAccount.consume(`${email} ${address}`)
        await byAddress.consume(address)
        return null
      } catch (reached) {
        if (reached instanceof RateLimiterRes) return Math.max(1, Math.ceil(reached.msBeforeNext / 1000))
        throw reached
      }
    },
    async clear(email, address) {
      await byAccount.delete(`${email} ${address}`)
      await byAddress.reward(address)
    },
  }
}
