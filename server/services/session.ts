import type { Database } from '../db/client'
import {
  endEverySession,
  endSession,
  findAccountForSignIn,
  findSession,
  findWorkroomsOfAccount,
  setAccountUnit,
  startSession,
  type SessionRow,
} from '../db/queries/session'
import type { LengthUnit, Me } from '../../shared/schemas/session'
import { refuse } from './refusal'

const SESSION_DAYS = 14
const DAY = 86_400_000

export type VerifyPassword = (hash: string, password: string) => Promise<boolean>

/** Counts one attempt and answers how many seconds to wait; null when there is no need to. */
export interface AttemptLimit {
  readonly count: (email: string, address: string) => Promise<number | null>
  readonly clear: (email: string, address: string) => Promise<void>
}

/**
 * Signs in: one answer and the same work for a wrong password, an unknown account and an account without a workroom.
 * `dummyHash` is what an unknown account is held against.
 */
export async function signIn(
  db: Database,
  given: { readonly email: string; readonly password: string; readonly address: string },
  tools: { readonly verify: VerifyPassword; readonly dummyHash: () => Promise<string>; readonly limit: AttemptLimit },
  now: Date,
): Promise<string> {
  const wait = await tools.limit.count(given.email, given.address)
  if (wait !== null) refuse('too-many-attempts', { retryAfterSeconds: wait })
  const account = await findAccountForSignIn(db, given.email)
  const fits = await tools.verify(account?.passwordHash ?? (await tools.dummyHash()), given.password)
  if (!account || !fits) return refuse('sign-in-refused')
  const [first] = await findWorkroomsOfAccount(db, account.accountId)
  if (!first) return refuse('sign-in-refused')
  await tools.limit.clear(given.email, given.address)
  return startSession(db, account.accountId, first.workroomId, now, new Date(now.getTime() + SESSION_DAYS * DAY))
}

export const readSession = findSession
export const signOut = endSession
export const signOutEverywhere = endEverySession

export async function chooseUnit(db: Database, session: string, unit: LengthUnit): Promise<void> {
  await setAccountUnit(db, session, unit)
}

export function meOf(row: SessionRow | null, demo: Pick<Me, 'demo' | 'demoSignIns'>): Me {
  if (!row) return { account: null, role: null, workroom: null, unit: 'cm', ...demo }
  return {
    account: { id: row.accountId, name: row.accountName, email: row.email },
    role: row.role,
    workroom: { id: row.workroomId, name: row.workroomName, zone: row.zone },
    unit: row.unit,
    demo: demo.demo,
    demoSignIns: [],
  }
}
