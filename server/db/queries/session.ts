import { sql } from 'kysely'
import type { Role } from '../../../shared/schemas/session'
import type { Database, Work } from '../client'

export interface SessionRow {
  readonly accountId: string
  readonly accountName: string
  readonly email: string
  readonly unit: 'cm' | 'in'
  readonly workroomId: string
  readonly workroomName: string
  readonly zone: string
  readonly role: Role
}

export async function findSession(db: Database, session: string, now: Date): Promise<SessionRow | undefined> {
  const { rows } = await sql<SessionRow>`select * from session_find(${session}::uuid, ${now}::timestamptz)`.execute(db)
  return rows[0]
}

export async function findAccountForSignIn(db: Database, email: string): Promise<{ accountId: string; passwordHash: string } | undefined> {
  const { rows } = await sql<{ accountId: string; passwordHash: string }>`select * from account_for_sign_in(${email})`.execute(db)
  return rows[0]
}

export async function findWorkroomsOfAccount(
  db: Database,
  account: string,
): Promise<readonly { workroomId: string; role: Role; name: string }[]> {
  const { rows } = await sql<{ workroomId: string; role: Role; name: string }>`select * from account_workrooms(${account}::uuid)`.execute(
    db,
  )
  return rows
}

export async function startSession(db: Database, account: string, workroom: string, now: Date, expires: Date): Promise<string> {
  const { rows } = await sql<{ id: string }>`
    select session_start(${account}::uuid, ${workroom}::uuid, ${now}::timestamptz, ${expires}::timestamptz) as id`.execute(db)
  return rows[0]!.id
}

export async function endSession(db: Database, session: string, now: Date): Promise<void> {
  await sql`select session_end(${session}::uuid, ${now}::timestamptz)`.execute(db)
}

export async function endEverySession(db: Database, session: string, now: Date): Promise<void> {
  await sql`select session_end_all(${session}::uuid, ${now}::timestamptz)`.execute(db)
}

export async function setAccountUnit(db: Database, session: string, unit: string): Promise<void> {
  await sql`select account_set_unit(${session}::uuid, ${unit})`.execute(db)
}

export async function findMembers(
  db: Work,
): Promise<readonly { accountId: string; name: string; email: string; role: Role; since: Date }[]> {
  const { rows } = await sql<{
    accountId: string
    name: string
    email: string
    role: Role
    since: Date
  }>`select * from workroom_members()`.execute(db)
  return rows
}

export async function readSchemaVersion(db: Database): Promise<string | null> {
  const { rows } = await sql<{ version: string | null }>`select schema_version() as version`.execute(db)
  return rows[0]?.version ?? null
}
