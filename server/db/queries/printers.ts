import { sql } from 'kysely'
import type { Work } from '../client'

export interface PrinterFields {
  readonly name: string
  readonly acrossMm: number
  readonly alongMm: number
  readonly measuredOn: string
}

export function findPrinters(db: Work, workroom: string) {
  return db
    .selectFrom('printer')
    .select(['id', 'name', 'acrossMm', 'alongMm', 'measuredOn'])
    .where('workroomId', '=', workroom)
    .where('archivedAt', 'is', null)
    .orderBy(sql`lower(name)`)
    .execute()
}

/** A printer of the same name is measured again, and is back if it was put away. */
export async function savePrinter(db: Work, workroom: string, fields: PrinterFields, account: string): Promise<string> {
  const { id } = await db
    .insertInto('printer')
    .values({ workroomId: workroom, ...fields, savedBy: account })
    .onConflict((conflict) =>
      conflict.expression(sql`workroom_id, lower(name)`).doUpdateSet({ ...fields, savedBy: account, archivedAt: null }),
    )
    .returning('id')
    .executeTakeFirstOrThrow()
  return id
}

export const archivePrinter = (db: Work, workroom: string, id: string, now: Date) =>
  db.updateTable('printer').set({ archivedAt: now }).where('workroomId', '=', workroom).where('id', '=', id).execute()
