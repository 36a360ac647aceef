import { sql } from 'kysely'
import type { Work } from '../client'

export interface ClientFields {
  readonly name: string
  readonly email: string | null
  readonly phone: string | null
  readonly note: string | null
}

const columns = ['id', 'name', 'nameKey', 'email', 'phone', 'note', 'revision', 'archivedAt', 'updatedAt'] as const

/** Name as it is searched: small letters without accents. */
export const nameKey = (name: string): string => name.normalize('NFD').replace(/\p{M}/gu, '').toLowerCase().trim()

export function findClientById(db: Work, workroom: string, id: string) {
  return db.selectFrom('client').select(columns).where('workroomId', '=', workroom).where('id', '=', id).executeTakeFirst()
}

export function findClients(
  db: Work,
  workroom: string,
  filter: { readonly q: string; readonly archived: boolean; readonly after: readonly [string, string] | null; readonly limit: number },
) {
  let query = db
    .selectFrom('client')
    .select(columns)
    .select((eb) => [
      eb
        .selectFrom('wearer')
        .select((count) => count.fn.countAll<number>().as('count'))
        .whereRef('wearer.workroomId', '=', 'client.workroomId')
        .whereRef('wearer.clientId', '=', 'client.id')
        .as('wearers'),
      eb
        .selectFrom('garment')
        .innerJoin('wearer', (join) =>
          join.onRef('wearer.workroomId', '=', 'garment.workroomId').onRef('wearer.id', '=', 'garment.wearerId'),
        )
        .select((count) => count.fn.countAll<number>().as('count'))
        .whereRef('garment.workroomId', '=', 'client.workroomId')
        .whereRef('wearer.clientId', '=', 'client.id')
        .as('garments'),
    ])
    .where('client.workroomId', '=', workroom)
    .where('client.archivedAt', filter.archived ? 'is not' : 'is', null)
  const q = nameKey(filter.q)
  if (q) {
    query = query.where((eb) =>
      eb.or([
        eb.and([eb('nameKey', '>=', q), eb('nameKey', '<', `${q}\u{10FFFF}`)]),
        eb(sql<number>`position(${` ${q}`} in name_key)`, '>', 0),
      ]),
    )
  }
  if (filter.after) query = query.where(sql<boolean>`(name_key, id) > (${filter.after[0]}, ${filter.after[1]}::uuid)`)
  return query
    .orderBy('nameKey')
    .orderBy('id')
    .limit(filter.limit + 1)
    .execute()
}

export function insertClient(db: Work, workroom: string, fields: ClientFields, account: string, now: Date) {
  return db
    .insertInto('client')
    .values({ workroomId: workroom, ...fields, nameKey: nameKey(fields.name), createdAt: now, updatedAt: now, updatedBy: account })
    .returning(columns)
    .executeTakeFirstOrThrow()
}

export function updateClientAt(db: Work, workroom: string, id: string, base: number, fields: ClientFields, account: string, now: Date) {
  return db
    .updateTable('client')
    .set({ ...fields, nameKey: nameKey(fields.name), revision: base + 1, updatedAt: now, updatedBy: account })
    .where('workroomId', '=', workroom)
    .where('id', '=', id)
    .where('revision', '=', base)
    .returning(columns)
    .executeTakeFirst()
}

export function setClientArchived(db: Work, workroom: string, id: string, at: Date | null, account: string, now: Date) {
  return db
    .updateTable('client')
    .set((eb) => ({ archivedAt: at, revision: eb('revision', '+', 1), updatedAt: now, updatedBy: account }))
    .where('workroomId', '=', workroom)
    .where('id', '=', id)
    .returning(columns)
    .executeTakeFirst()
}
