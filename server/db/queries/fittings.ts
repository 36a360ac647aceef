import type { FittingLevel } from '../../../shared/domain/fit/types'
import { json, type Work } from '../client'

export interface FittingFields {
  readonly garmentId: string
  readonly versionId: string
  readonly fittedOn: string
  readonly note: string | null
  readonly levels: readonly FittingLevel[]
}

/** Newest first. */
export function findFittingsOfGarment(db: Work, workroom: string, garment: string) {
  return db
    .selectFrom('fitting')
    .innerJoin('version', (join) =>
      join.onRef('version.workroomId', '=', 'fitting.workroomId').onRef('version.id', '=', 'fitting.versionId'),
    )
    .leftJoin('membership', (join) =>
      join.onRef('membership.workroomId', '=', 'fitting.workroomId').onRef('membership.accountId', '=', 'fitting.savedBy'),
    )
    .select([
      'fitting.id',
      'fitting.versionId',
      'version.number as versionNumber',
      'version.name as versionName',
      'fitting.fittedOn',
      'fitting.note',
      'fitting.levels',
      'fitting.savedAt',
      'membership.name as savedBy',
    ])
    .where('fitting.workroomId', '=', workroom)
    .where('fitting.garmentId', '=', garment)
    .orderBy('fitting.fittedOn', 'desc')
    .orderBy('fitting.savedAt', 'desc')
    .execute()
}

export async function insertFitting(db: Work, workroom: string, fields: FittingFields, account: string, now: Date): Promise<string> {
  const { id } = await db
    .insertInto('fitting')
    .values({ workroomId: workroom, ...fields, levels: json(fields.levels), savedAt: now, savedBy: account })
    .returning('id')
    .executeTakeFirstOrThrow()
  return id
}
