import type { Work } from '../client'

export interface WearerFields {
  readonly name: string
  readonly bornOn: string | null
  readonly guardian: string | null
  readonly note: string | null
}

export interface FlagFields {
  readonly pregnancy: boolean
  readonly nursing: boolean
  readonly reflux: boolean
  readonly breathing: boolean
  readonly circulation: boolean
  readonly child: boolean
  readonly practitionerAgreed: boolean
  readonly purpose: string
  readonly consentNoted: boolean
  readonly consentBy: string | null
}

const flagColumns = [
  'pregnancy',
  'nursing',
  'reflux',
  'breathing',
  'circulation',
  'child',
  'practitionerAgreed',
  'purpose',
  'consentNoted',
  'consentBy',
  'notedAt',
] as const

const selectWearer = (db: Work, workroom: string) =>
  db
    .selectFrom('wearer')
    .innerJoin('client', (join) => join.onRef('client.workroomId', '=', 'wearer.workroomId').onRef('client.id', '=', 'wearer.clientId'))
    .select([
      'wearer.id',
      'wearer.clientId',
      'client.name as clientName',
      'wearer.name',
      'wearer.bornOn',
      'wearer.guardian',
      'wearer.note',
      'wearer.revision',
      'wearer.updatedAt',
    ])
    .select((eb) => [
      eb
        .selectFrom('measuring')
        .select((count) => count.fn.countAll<number>().as('count'))
        .whereRef('measuring.workroomId', '=', 'wearer.workroomId')
        .whereRef('measuring.wearerId', '=', 'wearer.id')
        .as('measurings'),
      eb
        .selectFrom('measuring')
        .select((last) => last.fn.max('measuredOn').as('last'))
        .whereRef('measuring.workroomId', '=', 'wearer.workroomId')
        .whereRef('measuring.wearerId', '=', 'wearer.id')
        .as('lastMeasuredOn'),
    ])
    .where('wearer.workroomId', '=', workroom)

export function findWearerById(db: Work, workroom: string, id: string) {
  return selectWearer(db, workroom).where('wearer.id', '=', id).executeTakeFirst()
}

export function findWearersOfClient(db: Work, workroom: string, client: string) {
  return selectWearer(db, workroom).where('wearer.clientId', '=', client).orderBy('wearer.name').orderBy('wearer.id').execute()
}

export function insertWearer(db: Work, workroom: string, client: string, fields: WearerFields, account: string, now: Date) {
  return db
    .insertInto('wearer')
    .values({ workroomId: workroom, clientId: client, ...fields, createdAt: now, updatedAt: now, updatedBy: account })
    .returning('id')
    .executeTakeFirstOrThrow()
}

export function updateWearerAt(db: Work, workroom: string, id: string, base: number, fields: WearerFields, account: string, now: Date) {
  return db
    .updateTable('wearer')
    .set({ ...fields, revision: base + 1, updatedAt: now, updatedBy: account })
    .where('workroomId', '=', workroom)
    .where('id', '=', id)
    .where('revision', '=', base)
    .returning('id')
    .executeTakeFirst()
}

export function findFlags(db: Work, workroom: string, wearer: string) {
  return db
    .selectFrom('wearerFlag')
    .leftJoin('membership', (join) =>
      join.onRef('membership.workroomId', '=', 'wearerFlag.workroomId').onRef('membership.accountId', '=', 'wearerFlag.notedBy'),
    )
    .select(flagColumns)
    .select('membership.name as notedBy')
    .where('wearerFlag.workroomId', '=', workroom)
    .where('wearerFlag.wearerId', '=', wearer)
    .executeTakeFirst()
}

export async function putFlags(db: Work, workroom: string, wearer: string, fields: FlagFields, account: string, now: Date): Promise<void> {
  const noted = { ...fields, notedAt: now, notedBy: account }
  await db
    .insertInto('wearerFlag')
    .values({ workroomId: workroom, wearerId: wearer, ...noted })
    .onConflict((conflict) => conflict.columns(['workroomId', 'wearerId']).doUpdateSet(noted))
    .execute()
}
