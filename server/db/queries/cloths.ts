import { sql } from 'kysely'
import type { StretchTest } from '../../../shared/domain/textile/types'
import type { TestDraft } from '../../../shared/schemas/test-draft'
import { json, type Work } from '../client'

export interface ClothFields {
  readonly code: string
  readonly name: string
  readonly lot: string | null
  readonly supplier: string | null
  readonly composition: string
  readonly mass: number | null
  readonly thickness: number
  readonly width: number | null
  readonly note: string | null
}

export interface TestFields {
  readonly testedOn: string
  readonly tester: string | null
  readonly cycles: number | null
  readonly note: string | null
  /** Null while the test is unfinished; then `draft` holds what is typed. */
  readonly test: StretchTest | null
  readonly draft?: TestDraft | null
}

export interface PhotoFields {
  /** Its name in the file store. */
  readonly name: string
  readonly width: number
  readonly height: number
}

const columns = [
  'id',
  'code',
  'name',
  'lot',
  'supplier',
  'composition',
  'mass',
  'thickness',
  'width',
  'note',
  'revision',
  'archivedAt',
  'updatedAt',
] as const
const testColumns = [
  'id',
  'clothId',
  'testedOn',
  'tester',
  'cycles',
  'note',
  'test',
  'draft',
  'photo',
  'photoWidth',
  'photoHeight',
  'photoAt',
  'revision',
  'archivedAt',
  'updatedAt',
] as const

const read = ({ test, draft, ...fields }: TestFields) => ({ ...fields, test: test && json(test), draft: draft ? json(draft) : null })

export function findClothById(db: Work, workroom: string, id: string) {
  return db.selectFrom('cloth').select(columns).where('workroomId', '=', workroom).where('id', '=', id).executeTakeFirst()
}

export function findClothsByIds(db: Work, workroom: string, ids: readonly string[]) {
  if (ids.length === 0) return Promise.resolve([])
  return db.selectFrom('cloth').select(columns).where('workroomId', '=', workroom).where('id', 'in', ids).execute()
}

export function findCloths(
  db: Work,
  workroom: string,
  filter: { readonly q: string; readonly archived: boolean; readonly after: readonly [string, string] | null; readonly limit: number },
) {
  let query = db
    .selectFrom('cloth')
    .select(columns)
    .where('workroomId', '=', workroom)
    .where('archivedAt', filter.archived ? 'is not' : 'is', null)
  const q = filter.q.toLowerCase()
  if (q) {
    query = query.where((eb) =>
      eb.or([eb(sql<number>`position(${q} in lower(code))`, '=', 1), eb(sql<number>`position(${` ${q}`} in ' ' || lower(name))`, '>', 0)]),
    )
  }
  if (filter.after) query = query.where(sql<boolean>`(code, id) > (${filter.after[0]}, ${filter.after[1]}::uuid)`)
  return query
    .orderBy('code')
    .orderBy('id')
    .limit(filter.limit + 1)
    .execute()
}

export function insertCloth(db: Work, workroom: string, fields: ClothFields, account: string, now: Date) {
  return db
    .insertInto('cloth')
    .values({ workroomId: workroom, ...fields, createdAt: now, updatedAt: now, updatedBy: account })
    .returning(columns)
    .executeTakeFirstOrThrow()
}

export function updateClothAt(db: Work, workroom: string, id: string, base: number, fields: ClothFields, account: string, now: Date) {
  return db
    .updateTable('cloth')
    .set({ ...fields, revision: base + 1, updatedAt: now, updatedBy: account })
    .where('workroomId', '=', workroom)
    .where('id', '=', id)
    .where('revision', '=', base)
    .returning(columns)
    .executeTakeFirst()
}

export function setClothArchived(db: Work, workroom: string, id: string, at: Date | null, account: string, now: Date) {
  return db
    .updateTable('cloth')
    .set((eb) => ({ archivedAt: at, revision: eb('revision', '+', 1), updatedAt: now, updatedBy: account }))
    .where('workroomId', '=', workroom)
    .where('id', '=', id)
    .returning(columns)
    .executeTakeFirst()
}

/** Tests of the lots named, newest first. */
export function findTestsOfCloths(db: Work, workroom: string, cloths: readonly string[]) {
  if (cloths.length === 0) return Promise.resolve([])
  return db
    .selectFrom('stretchTest')
    .select(testColumns)
    .where('workroomId', '=', workroom)
    .where('clothId', 'in', cloths)
    .orderBy('testedOn', 'desc')
    .orderBy('createdAt', 'desc')
    .execute()
}

export function findTestById(db: Work, workroom: string, id: string) {
  return db.selectFrom('stretchTest').select(testColumns).where('workroomId', '=', workroom).where('id', '=', id).executeTakeFirst()
}

export function insertTest(db: Work, workroom: string, cloth: string, fields: TestFields, account: string, now: Date) {
  return db
    .insertInto('stretchTest')
    .values({
      workroomId: workroom,
      clothId: cloth,
      ...read(fields),
      createdAt: now,
      updatedAt: now,
      updatedBy: account,
    })
    .returning(testColumns)
    .executeTakeFirstOrThrow()
}

export function updateTestAt(db: Work, workroom: string, id: string, base: number, fields: TestFields, account: string, now: Date) {
  return db
    .updateTable('stretchTest')
    .set({ ...read(fields), revision: base + 1, updatedAt: now, updatedBy: account })
    .where('workroomId', '=', workroom)
    .where('id', '=', id)
    .where('revision', '=', base)
    .returning(testColumns)
    .executeTakeFirst()
}

export function archiveTest(db: Work, workroom: string, id: string, account: string, now: Date) {
  return db
    .updateTable('stretchTest')
    .set((eb) => ({ archivedAt: now, revision: eb('revision', '+', 1), updatedAt: now, updatedBy: account }))
    .where('workroomId', '=', workroom)
    .where('id', '=', id)
    .returning(testColumns)
    .executeTakeFirst()
}

/** Sets or takes away the photograph of a test. The revision stays: a photograph is no correction of what was read. */
export function setTestPhoto(db: Work, workroom: string, id: string, photo: PhotoFields | null, account: string, now: Date) {
  const { name = null, width = null, height = null } = photo ?? {}
  return db
    .updateTable('stretchTest')
    .set({ photo: name, photoWidth: width, photoHeight: height, photoAt: photo && now, updatedAt: now, updatedBy: account })
    .where('workroomId', '=', workroom)
    .where('id', '=', id)
    .returning(testColumns)
    .executeTakeFirst()
}

/** Which of the codes are in use. */
export async function takenClothCodes(db: Work, workroom: string, codes: readonly string[]): Promise<string[]> {
  const rows = await db.selectFrom('cloth').select('code').where('workroomId', '=', workroom).where('code', 'in', codes).execute()
  return rows.map(({ code }) => code)
}
