import type { VersionBody, VersionKept } from '../../../shared/domain/garment/snapshot'
import { json, type Work } from '../client'

export interface VersionFields {
  readonly garmentId: string
  readonly name: string
  readonly note: string | null
  readonly engine: string
  readonly stops: number
  readonly cautions: number
  readonly barred: boolean
  readonly kept: VersionKept
}

const selectVersion = (db: Work, workroom: string) =>
  db
    .selectFrom('version')
    .innerJoin('garment', (join) =>
      join.onRef('garment.workroomId', '=', 'version.workroomId').onRef('garment.id', '=', 'version.garmentId'),
    )
    .innerJoin('versionBody', (join) =>
      join.onRef('versionBody.workroomId', '=', 'version.workroomId').onRef('versionBody.versionId', '=', 'version.id'),
    )
    .leftJoin('clearance', (join) =>
      join.onRef('clearance.workroomId', '=', 'version.workroomId').onRef('clearance.versionId', '=', 'version.id'),
    )
    .leftJoin('membership as saver', (join) =>
      join.onRef('saver.workroomId', '=', 'version.workroomId').onRef('saver.accountId', '=', 'version.savedBy'),
    )
    .leftJoin('membership as clearer', (join) =>
      join.onRef('clearer.workroomId', '=', 'clearance.workroomId').onRef('clearer.accountId', '=', 'clearance.clearedBy'),
    )
    .select([
      'version.id',
      'version.garmentId',
      'garment.code as garmentCode',
      'version.number',
      'version.name',
      'version.note',
      'version.engine',
      'version.stops',
      'version.cautions',
      'version.barred',
      'version.savedAt',
      'saver.name as savedBy',
      'clearance.clearedAt',
      'clearer.name as clearedBy',
      'clearance.byName',
      'clearance.reason',
      'versionBody.erasedAt',
    ])
    .where('version.workroomId', '=', workroom)

export type VersionRow = Awaited<ReturnType<typeof findVersionsOfGarment>>[number]

export function findVersionsOfGarment(db: Work, workroom: string, garment: string) {
  return selectVersion(db, workroom).where('version.garmentId', '=', garment).orderBy('version.number', 'desc').execute()
}

export function findVersionById(db: Work, workroom: string, id: string) {
  return selectVersion(db, workroom).where('version.id', '=', id).executeTakeFirst()
}

export function findVersionKept(db: Work, workroom: string, id: string) {
  return db.selectFrom('version').select('kept').where('workroomId', '=', workroom).where('id', '=', id).executeTakeFirst()
}

export function findVersionBody(db: Work, workroom: string, id: string) {
  return db
    .selectFrom('versionBody')
    .select(['wearerName', 'body'])
    .where('workroomId', '=', workroom)
    .where('versionId', '=', id)
    .executeTakeFirst()
}

export async function nextVersionNumber(db: Work, workroom: string, garment: string): Promise<number> {
  const row = await db
    .selectFrom('version')
    .select((eb) => eb.fn.max('number').as('last'))
    .where('workroomId', '=', workroom)
    .where('garmentId', '=', garment)
    .executeTakeFirst()
  return (row?.last ?? 0) + 1
}

export async function insertVersion(
  db: Work,
  workroom: string,
  fields: VersionFields,
  wearer: { readonly id: string; readonly name: string; readonly body: VersionBody },
  number: number,
  account: string,
  now: Date,
): Promise<string> {
  const { id } = await db
    .insertInto('version')
    .values({ workroomId: workroom, ...fields, kept: json(fields.kept), number, savedAt: now, savedBy: account })
    .returning('id')
    .executeTakeFirstOrThrow()
  await db
    .insertInto('versionBody')
    .values({ workroomId: workroom, versionId: id, wearerId: wearer.id, wearerName: wearer.name, body: json(wearer.body) })
    .execute()
  return id
}

export async function insertClearance(
  db: Work,
  workroom: string,
  version: string,
  cleared: { readonly byName: string | null; readonly reason: string | null },
  account: string,
  now: Date,
): Promise<void> {
  await db
    .insertInto('clearance')
    .values({ workroomId: workroom, versionId: version, clearedAt: now, clearedBy: account, ...cleared })
    .execute()
}
