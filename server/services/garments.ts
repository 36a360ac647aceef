import { freshDocument } from '../../shared/domain/document/fresh'
import type { ParsedBody, ParsedQuery, RouteAnswer } from '../../shared/schemas/routes'
import { findGarmentById, findGarments, insertGarment, insertWorkingCopy, updateGarmentAt } from '../db/queries/garments'
import { findMeasuringsOfWearer } from '../db/queries/measurings'
import { findWearerById } from '../db/queries/wearers'
import { pageOf, readCursor } from './cursor'
import { garmentSummaryOf } from './garment-views'
import { found, isTaken, refuse } from './refusal'
import type { Room } from './room'
import { settingsOf } from './workroom'

const NO_DATE = 'infinity'

export async function listGarments(
  { db, workroom, role }: Room,
  query: ParsedQuery<'garments.list'>,
): Promise<RouteAnswer<'garments.list'>> {
  const rows = await findGarments(db, workroom, {
    q: query.q ?? '',
    archived: query.archived === 'yes',
    clearedOnly: role === 'maker',
    after: readCursor(query.cursor),
    limit: query.limit,
  })
  return pageOf(
    rows,
    query.limit,
    (row) => garmentSummaryOf(row, role),
    (row) => [row.dueOn ?? NO_DATE, row.code],
  )
}

export async function getGarment({ db, workroom, role }: Room, id: string): Promise<RouteAnswer<'garments.get'>> {
  const maker = role === 'maker'
  const row = await findGarmentById(db, workroom, id, maker)
  if (!row) return refuse(maker ? 'not-cleared' : 'not-found')
  return { ...garmentSummaryOf(row, role), note: maker ? null : row.note, revision: row.revision }
}

const takenCode = (error: unknown): never => {
  if (isTaken(error)) refuse('code-taken', { fields: [{ path: 'code', message: 'Another garment has this code. Choose another.' }] })
  throw error
}

/** A new garment starts from the wearer's newest measuring and the workroom's own hold. */
export async function createGarment(room: Room, { wearerId, ...fields }: ParsedBody<'garments.create'>) {
  const { db, workroom, account, now } = room
  if (!(await findWearerById(db, workroom, wearerId))) {
    refuse('invalid-input', { fields: [{ path: 'wearerId', message: 'Choose a wearer of this workroom.' }] })
  }
  const { id } = await insertGarment(db, workroom, wearerId, fields, account, now).catch(takenCode)
  const fresh = freshDocument()
  const { defaultHold } = await settingsOf(room)
  const [newest] = await findMeasuringsOfWearer(db, workroom, wearerId)
  const levels = fresh.levels.map((level) => ({ ...level, hold: defaultHold }))
  await insertWorkingCopy(db, workroom, id, { ...fresh, levels, measuringId: newest?.id ?? null }, account, now)
  return getGarment(room, id)
}

export async function updateGarment(room: Room, id: string, { base, ...fields }: ParsedBody<'garments.update'>) {
  const { db, workroom, account, now } = room
  found(await findGarmentById(db, workroom, id))
  const saved = await updateGarmentAt(db, workroom, id, base, fields, account, now).catch(takenCode)
  return saved ? getGarment(room, id) : refuse('stale', { theirs: await getGarment(room, id) })
}
