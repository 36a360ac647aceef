import type { GarmentCloth } from '../../shared/domain/garment/types'
import { layerCloth } from '../../shared/domain/textile/cloth'
import type { StretchTest, TextileSettings } from '../../shared/domain/textile/types'
import { directionKey } from '../../shared/domain/textile/direction'
import { mm } from '../../shared/domain/units/brand'
import type { ParsedBody, ParsedQuery, RouteAnswer } from '../../shared/schemas/routes'
import type { TestDraft } from '../../shared/schemas/test-draft'
import { fromJson } from '../db/client'
import {
  archiveTest,
  findClothById,
  findCloths,
  findClothsByIds,
  findTestById,
  findTestsOfCloths,
  insertCloth,
  insertTest,
  setClothArchived,
  updateClothAt,
  updateTestAt,
  type ClothFields,
  type TestFields,
} from '../db/queries/cloths'
import { pageOf, readCursor } from './cursor'
import { found, isTaken, refuse } from './refusal'
import type { Room } from './room'
import { settingsOf } from './workroom'

type ClothRow = NonNullable<Awaited<ReturnType<typeof findClothById>>>
type TestRow = NonNullable<Awaited<ReturnType<typeof findTestById>>>
type Direction = RouteAnswer<'cloths.get'>['directions'][number]

/** Lots that a garment may choose from at once; more of them are found by search, not offered. */
const OFFERED_CLOTHS = 200

const clothOf = (row: ClothRow): RouteAnswer<'cloths.create'> => ({
  ...row,
  thickness: mm(row.thickness),
  width: row.width === null ? null : mm(row.width),
  archivedAt: row.archivedAt?.toISOString() ?? null,
  updatedAt: row.updatedAt.toISOString(),
})

export function testOf({ photo, photoWidth, photoHeight, photoAt, ...row }: TestRow): RouteAnswer<'tests.create'> {
  return {
    ...row,
    test: fromJson<StretchTest | null>(row.test),
    draft: fromJson<TestDraft | null>(row.draft),
    photo: photo === null ? null : { width: photoWidth!, height: photoHeight!, at: photoAt!.toISOString() },
    archivedAt: row.archivedAt?.toISOString() ?? null,
    updatedAt: row.updatedAt.toISOString(),
  }
}

/** The newest finished test of each direction and state, read as a layer. Tests come newest first. */
function directionsOf(cloth: ClothRow, tests: readonly TestRow[], settings: TextileSettings): Direction[] {
  const seen = new Map<string, Direction>()
  for (const row of tests) {
    const test = fromJson<StretchTest | null>(row.test)
    if (!test || row.clothId !== cloth.id || row.archivedAt) continue
    const key = `${directionKey(test)} ${test.state}`
    if (seen.has(key)) continue
    const identity = {
      clothId: cloth.id,
      name: cloth.name,
      thickness: mm(cloth.thickness),
      testedOn: row.testedOn,
      fewSpread: settings.fewSpecimensSpread,
    }
    const layer = layerCloth(identity, test)
    const { direction, angle, state } = test
    seen.set(key, {
      testId: row.id,
      direction,
      ...(angle === undefined ? {} : { angle }),
      state,
      layer: layer.ok ? layer.value : null,
      problem: layer.ok ? null : layer.problem,
    })
  }
  return [...seen.values()]
}

export async function listCloths(room: Room, query: ParsedQuery<'cloths.list'>): Promise<RouteAnswer<'cloths.list'>> {
  const { db, workroom } = room
  const rows = await findCloths(db, workroom, {
    q: query.q ?? '',
    archived: query.archived === 'yes',
    after: readCursor(query.cursor),
    limit: query.limit,
  })
  const tests = await findTestsOfCloths(
    db,
    workroom,
    rows.map((row) => row.id),
  )
  const settings = await settingsOf(room)
  return pageOf(
    rows,
    query.limit,
    (row) => ({ ...clothOf(row), directions: directionsOf(row, tests, settings) }),
    (row) => [row.code, row.id],
  )
}

export async function getCloth(room: Room, id: string): Promise<RouteAnswer<'cloths.get'>> {
  const row = found(await findClothById(room.db, room.workroom, id))
  const tests = await findTestsOfCloths(room.db, room.workroom, [id])
  return { ...clothOf(row), tests: tests.map(testOf), directions: directionsOf(row, tests, await settingsOf(room)) }
}

/** Lots for a garment: those in use, archived or not, and those on offer. */
export async function clothsForGarment(room: Room, used: readonly string[]): Promise<readonly GarmentCloth[]> {
  const { db, workroom } = room
  const offered = await findCloths(db, workroom, { q: '', archived: false, after: null, limit: OFFERED_CLOTHS })
  const missing = used.filter((id) => !offered.some((cloth) => cloth.id === id))
  const rows = [...offered, ...(await findClothsByIds(db, workroom, missing))]
  const tests = await findTestsOfCloths(
    db,
    workroom,
    rows.map((row) => row.id),
  )
  const settings = await settingsOf(room)
  return rows.map((row) => ({
    id: row.id,
    code: row.code,
    name: row.name,
    archived: row.archivedAt !== null,
    thickness: mm(row.thickness),
    directions: directionsOf(row, tests, settings).flatMap((one) => (one.layer ? [one.layer] : [])),
  }))
}

const takenCode = (error: unknown): never => {
  if (isTaken(error)) refuse('code-taken', { fields: [{ path: 'code', message: 'Another lot has this code. Choose another.' }] })
  throw error
}

export async function createCloth({ db, workroom, account, now }: Room, fields: ClothFields) {
  return clothOf(await insertCloth(db, workroom, fields, account, now).catch(takenCode))
}

export async function updateCloth({ db, workroom, account, now }: Room, id: string, { base, ...fields }: ParsedBody<'cloths.update'>) {
  const saved = await updateClothAt(db, workroom, id, base, fields, account, now).catch(takenCode)
  return saved ? clothOf(saved) : refuse('stale', { theirs: clothOf(found(await findClothById(db, workroom, id))) })
}

export async function archiveCloth({ db, workroom, account, now }: Room, id: string, archived: boolean) {
  return clothOf(found(await setClothArchived(db, workroom, id, archived ? now : null, account, now)))
}

/** A test that gives no curve is refused at its field, so that what was typed can be mended. */
function checkTest({ today }: Room, cloth: ClothRow, { test, testedOn }: TestFields): void {
  if (!test) return
  if (testedOn > today) refuse('invalid-input', { fields: [{ path: 'testedOn', message: 'This date is still to come.' }] })
  const layer = layerCloth({ clothId: cloth.id, name: cloth.name, thickness: mm(cloth.thickness), testedOn }, test)
  if (!layer.ok)
    refuse('invalid-input', {
      problem: layer.problem,
      fields: [{ path: layer.problem.at ? `test.${layer.problem.at}` : 'test', message: layer.problem.message }],
    })
}

export async function createTest(room: Room, cloth: string, fields: TestFields) {
  const { db, workroom, account, now } = room
  const row = found(await findClothById(db, workroom, cloth))
  if (row.archivedAt) refuse('archived', { detail: 'Bring the lot back first.' })
  checkTest(room, row, fields)
  return testOf(await insertTest(db, workroom, cloth, fields, account, now))
}

export async function updateTest(room: Room, id: string, { base, ...fields }: ParsedBody<'tests.update'>) {
  const { db, workroom, account, now } = room
  const stands = found(await findTestById(db, workroom, id))
  if (stands.archivedAt) refuse('archived', { detail: 'This test was put away.' })
  if (stands.test && fields.draft) refuse('invalid-input', { detail: 'A finished test stays finished: correct it, or put it away.' })
  checkTest(room, found(await findClothById(db, workroom, stands.clothId)), fields)
  const saved = await updateTestAt(db, workroom, id, base, fields, account, now)
  return saved ? testOf(saved) : refuse('stale', { theirs: testOf(stands) })
}

export async function removeTest({ db, workroom, account, now }: Room, id: string) {
  return testOf(found(await archiveTest(db, workroom, id, account, now)))
}
