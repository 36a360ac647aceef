import type { MeasuredValues } from '../../../shared/domain/body/types'
import { json, type Work } from '../client'

export interface MeasuringFields {
  readonly measuredOn: string
  readonly measuredBy: string | null
  readonly note: string | null
  readonly values: MeasuredValues
}

const selectMeasuring = (db: Work, workroom: string) =>
  db
    .selectFrom('measuring')
    .leftJoin('membership', (join) =>
      join.onRef('membership.workroomId', '=', 'measuring.workroomId').onRef('membership.accountId', '=', 'measuring.updatedBy'),
    )
    .select([
      'measuring.id',
      'measuring.wearerId',
      'measuring.measuredOn',
      'measuring.measuredBy',
      'measuring.note',
      'measuring.values',
      'measuring.revision',
      'measuring.updatedAt',
      'membership.name as updatedBy',
    ])
    .where('measuring.workroomId', '=', workroom)

export function findMeasuringById(db: Work, workroom: string, id: string) {
  return selectMeasuring(db, workroom).where('measuring.id', '=', id).executeTakeFirst()
}

export function findMeasuringsOfWearer(db: Work, workroom: string, wearer: string) {
  return selectMeasuring(db, workroom)
    .where('measuring.wearerId', '=', wearer)
    .orderBy('measuring.measuredOn', 'desc')
    .orderBy('measuring.createdAt', 'desc')
    .execute()
}

export function insertMeasuring(db: Work, workroom: string, wearer: string, fields: MeasuringFields, account: string, now: Date) {
  return db
    .insertInto('measuring')
    .values({
      workroomId: workroom,
      wearerId: wearer,
      ...fields,
      values: json(fields.values),
      createdAt: now,
      updatedAt: now,
      updatedBy: account,
    })
    .returning('id')
    .executeTakeFirstOrThrow()
}

export function updateMeasuringAt(
  db: Work,
  workroom: string,
  id: string,
  base: number,
  fields: MeasuringFields,
  account: string,
  now: Date,
) {
  return db
    .updateTable('measuring')
    .set({ ...fields, values: json(fields.values), revision: base + 1, updatedAt: now, updatedBy: account })
    .where('workroomId', '=', workroom)
    .where('id', '=', id)
    .where('revision', '=', base)
    .returning('id')
    .executeTakeFirst()
}
