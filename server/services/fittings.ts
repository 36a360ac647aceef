import type { FittingLevel } from '../../shared/domain/fit/types'
import type { ParsedBody, RouteAnswer } from '../../shared/schemas/routes'
import { fromJson } from '../db/client'
import { findFittingsOfGarment, insertFitting } from '../db/queries/fittings'
import { findGarmentById } from '../db/queries/garments'
import { findVersionById } from '../db/queries/versions'
import { found, refuse } from './refusal'
import type { Room } from './room'

export async function listFittings({ db, workroom }: Room, garment: string): Promise<RouteAnswer<'fittings.list'>> {
  found(await findGarmentById(db, workroom, garment))
  const rows = await findFittingsOfGarment(db, workroom, garment)
  return { items: rows.map((row) => ({ ...row, levels: fromJson<FittingLevel[]>(row.levels), savedAt: row.savedAt.toISOString() })) }
}

/** A fitting of one of the garment's versions. Written once: a second look is a second fitting. */
export async function recordFitting(room: Room, garment: string, body: ParsedBody<'fittings.create'>) {
  const { db, workroom, account, now, today } = room
  found(await findGarmentById(db, workroom, garment))
  if (body.fittedOn > today) refuse('invalid-input', { fields: [{ path: 'fittedOn', message: 'This date is still to come.' }] })
  const version = await findVersionById(db, workroom, body.versionId)
  if (version?.garmentId !== garment)
    refuse('invalid-input', { fields: [{ path: 'versionId', message: 'Choose a version of this garment.' }] })
  const id = await insertFitting(db, workroom, { garmentId: garment, ...body }, account, now)
  return found((await listFittings(room, garment)).items.find((one) => one.id === id))
}
