import { sql } from 'kysely'
import type { GarmentDocument } from '../../../shared/domain/document/types'
import type { GarmentSolution } from '../../../shared/domain/garment/types'
import { json, type Work } from '../client'

export interface GarmentFields {
  readonly code: string
  readonly name: string
  readonly dueOn: string | null
  readonly stage: string
  readonly note: string | null
}

export interface Outline {
  readonly piece: string
  readonly points: readonly { readonly x: number; readonly y: number }[]
}

/** `clearedOnly`: what a maker may see, with the newest cleared version instead of the newest. */
const selectGarment = (db: Work, workroom: string, clearedOnly: boolean) =>
  db
    .selectFrom('garment')
    .innerJoin('wearer', (join) => join.onRef('wearer.workroomId', '=', 'garment.workroomId').onRef('wearer.id', '=', 'garment.wearerId'))
    .innerJoin('client', (join) => join.onRef('client.workroomId', '=', 'wearer.workroomId').onRef('client.id', '=', 'wearer.clientId'))
    .leftJoin('workingCopy', (join) =>
      join.onRef('workingCopy.workroomId', '=', 'garment.workroomId').onRef('workingCopy.garmentId', '=', 'garment.id'),
    )
    .leftJoinLateral(
      (eb) =>
        eb
          .selectFrom('version')
          .leftJoin('clearance', (join) =>
            join.onRef('clearance.workroomId', '=', 'version.workroomId').onRef('clearance.versionId', '=', 'version.id'),
          )
          .leftJoin('membership', (join) =>
            join.onRef('membership.workroomId', '=', 'clearance.workroomId').onRef('membership.accountId', '=', 'clearance.clearedBy'),
          )
          .select(['version.id', 'version.number', 'version.name', 'clearance.clearedAt', 'membership.name as clearedBy'])
          .whereRef('version.workroomId', '=', 'garment.workroomId')
          .whereRef('version.garmentId', '=', 'garment.id')
          .$if(clearedOnly, (query) => query.where('clearance.clearedAt', 'is not', null))
          .orderBy('version.number', 'desc')
          .limit(1)
          .as('latest'),
      (join) => join.onTrue(),
    )
    .select([
      'garment.id',
      'garment.code',
      'garment.name',
      'garment.wearerId',
      'wearer.name as wearerName',
      'wearer.clientId',
      'client.name as clientName',
      'garment.dueOn',
      'garment.stage',
      'garment.note',
      'garment.revision',
      'garment.updatedAt',
      'garment.archivedAt',
      'workingCopy.outlines',
      'latest.id as latestId',
      'latest.number as latestNumber',
      'latest.name as latestName',
      'latest.clearedAt as latestClearedAt',
      'latest.clearedBy as latestClearedBy',
    ])
    .where('garment.workroomId', '=', workroom)
    .$if(clearedOnly, (query) => query.where('latest.id', 'is not', null))

export type GarmentRow = Awaited<ReturnType<typeof findGarments>>[number]

export function findGarmentById(db: Work, workroom: string, id: string, clearedOnly = false) {
  return selectGarment(db, workroom, clearedOnly).where('garment.id', '=', id).executeTakeFirst()
}

export function findGarmentsOfClient(db: Work, workroom: string, client: string) {
  return selectGarment(db, workroom, false).where('wearer.clientId', '=', client).orderBy('garment.code').execute()
}

export function findGarments(
  db: Work,
  workroom: string,
  filter: {
    readonly q: string
    readonly archived: boolean
    readonly clearedOnly: boolean
    readonly after: readonly [string, string] | null
    readonly limit: number
  },
) {
  let query = selectGarment(db, workroom, filter.clearedOnly).where('garment.archivedAt', filter.archived ? 'is not' : 'is', null)
  const q = filter.q.toLowerCase()
  if (q) {
    query = query.where((eb) =>
      eb.or([
        eb(sql<number>`position(${q} in lower(garment.code))`, '=', 1),
        eb(sql<number>`position(${` ${q}`} in ' ' || lower(garment.name))`, '>', 0),
      ]),
    )
  }
  if (filter.after) {
    query = query.where(sql<boolean>`(coalesce(garment.due_on, 'infinity'), garment.code) > (${filter.after[0]}::date, ${filter.after[1]})`)
  }
  return query
    .orderBy(sql`coalesce(garment.due_on, 'infinity')`)
    .orderBy('garment.code')
    .limit(filter.limit + 1)
    .execute()
}

export function insertGarment(db: Work, workroom: string, wearer: string, fields: GarmentFields, account: string, now: Date) {
  return db
    .insertInto('garment')
    .values({ workroomId: workroom, wearerId: wearer, ...fields, createdAt: now, updatedAt: now, updatedBy: account })
    .returning('id')
    .executeTakeFirstOrThrow()
}

export function updateGarmentAt(db: Work, workroom: string, id: string, base: number, fields: GarmentFields, account: string, now: Date) {
  return db
    .updateTable('garment')
    .set({ ...fields, revision: base + 1, updatedAt: now, updatedBy: account })
    .where('workroomId', '=', workroom)
    .where('id', '=', id)
    .where('revision', '=', base)
    .returning('id')
    .executeTakeFirst()
}

export function findWorkingCopy(db: Work, workroom: string, garment: string) {
  return db
    .selectFrom('workingCopy')
    .innerJoin('garment', (join) =>
      join.onRef('garment.workroomId', '=', 'workingCopy.workroomId').onRef('garment.id', '=', 'workingCopy.garmentId'),
    )
    .innerJoin('wearer', (join) => join.onRef('wearer.workroomId', '=', 'garment.workroomId').onRef('wearer.id', '=', 'garment.wearerId'))
    .leftJoin('membership', (join) =>
      join.onRef('membership.workroomId', '=', 'workingCopy.workroomId').onRef('membership.accountId', '=', 'workingCopy.savedBy'),
    )
    .select([
      'workingCopy.garmentId',
      'garment.code as garmentCode',
      'garment.name as garmentName',
      'garment.wearerId',
      'wearer.name as wearerName',
      'wearer.bornOn',
      'workingCopy.revision',
      'workingCopy.document',
      'workingCopy.good',
      'workingCopy.goodRevision',
      'workingCopy.savedAt',
      'membership.name as savedBy',
    ])
    .where('workingCopy.workroomId', '=', workroom)
    .where('workingCopy.garmentId', '=', garment)
    .executeTakeFirst()
}

export async function insertWorkingCopy(
  db: Work,
  workroom: string,
  garment: string,
  document: GarmentDocument,
  account: string,
  now: Date,
): Promise<void> {
  await db
    .insertInto('workingCopy')
    .values({ workroomId: workroom, garmentId: garment, document: json(document), savedAt: now, savedBy: account })
    .execute()
}

export function saveWorkingCopyAt(
  db: Work,
  workroom: string,
  garment: string,
  base: number,
  document: GarmentDocument,
  account: string,
  now: Date,
) {
  return db
    .updateTable('workingCopy')
    .set({ document: json(document), revision: base + 1, savedAt: now, savedBy: account })
    .where('workroomId', '=', workroom)
    .where('garmentId', '=', garment)
    .where('revision', '=', base)
    .returning('revision')
    .executeTakeFirst()
}

/** Keeps the last good solution beside the document, for the day a new input cannot be drafted. */
export async function keepGoodSolution(
  db: Work,
  workroom: string,
  garment: string,
  revision: number,
  solution: GarmentSolution,
  outlines: readonly Outline[],
): Promise<void> {
  await db
    .updateTable('workingCopy')
    .set({ good: json(solution), goodRevision: revision, outlines: json(outlines) })
    .where('workroomId', '=', workroom)
    .where('garmentId', '=', garment)
    .execute()
}

/** Holds the garment until the transaction ends, so that version numbers follow each other. */
export async function lockGarmentById(db: Work, workroom: string, id: string): Promise<void> {
  await db.selectFrom('garment').select('id').where('workroomId', '=', workroom).where('id', '=', id).forUpdate().execute()
}

/** Which of the codes are in use. */
export async function takenGarmentCodes(db: Work, workroom: string, codes: readonly string[]): Promise<string[]> {
  const rows = await db.selectFrom('garment').select('code').where('workroomId', '=', workroom).where('code', 'in', codes).execute()
  return rows.map(({ code }) => code)
}
