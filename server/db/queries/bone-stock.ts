import { sql } from 'kysely'
import { json, type Work } from '../client'

export function findBoneStock(db: Work, workroom: string) {
  return db
    .selectFrom('boneStock')
    .select(['id', 'name', 'stock'])
    .where('workroomId', '=', workroom)
    .where('archivedAt', 'is', null)
    .orderBy(sql`lower(name)`)
    .execute()
}

/** A stock of the same name is changed, and is back if it was put away. */
export async function saveBoneStock(db: Work, workroom: string, name: string, stock: object, account: string): Promise<string> {
  const { id } = await db
    .insertInto('boneStock')
    .values({ workroomId: workroom, name, stock: json(stock), savedBy: account })
    .onConflict((conflict) =>
      conflict.expression(sql`workroom_id, lower(name)`).doUpdateSet({ name, stock: json(stock), savedBy: account, archivedAt: null }),
    )
    .returning('id')
    .executeTakeFirstOrThrow()
  return id
}

export const archiveBoneStock = (db: Work, workroom: string, id: string, now: Date) =>
  db.updateTable('boneStock').set({ archivedAt: now }).where('workroomId', '=', workroom).where('id', '=', id).execute()
