import type { WearerFlags } from '../../shared/domain/body/types'
import type { ParsedBody, RouteAnswer } from '../../shared/schemas/routes'
import { findClientById } from '../db/queries/clients'
import {
  findFlags,
  findWearerById,
  insertWearer,
  putFlags,
  updateWearerAt,
  type FlagFields,
  type WearerFields,
} from '../db/queries/wearers'
import { found, refuse } from './refusal'
import { yearsBetween, type Room } from './room'

/** Children by EN 14682: up to fourteen (from memory). Under that age a wearer counts as a child without being flagged. */
const CHILD_UNDER = 14

export async function getWearer({ db, workroom, today }: Room, id: string): Promise<RouteAnswer<'wearers.get'>> {
  const row = found(await findWearerById(db, workroom, id))
  const flags = await findFlags(db, workroom, id)
  return {
    ...row,
    age: yearsBetween(row.bornOn, today),
    measurings: row.measurings ?? 0,
    updatedAt: row.updatedAt.toISOString(),
    flags: flags ? { ...flags, notedAt: flags.notedAt.toISOString() } : null,
  }
}

export async function createWearer(room: Room, client: string, fields: WearerFields) {
  const { db, workroom, account, now } = room
  const row = found(await findClientById(db, workroom, client))
  if (row.archivedAt) refuse('archived', { detail: 'Bring the client back first.' })
  const { id } = await insertWearer(db, workroom, client, fields, account, now)
  return getWearer(room, id)
}

export async function updateWearer(room: Room, id: string, { base, ...fields }: ParsedBody<'wearers.update'>) {
  const saved = await updateWearerAt(room.db, room.workroom, id, base, fields, room.account, room.now)
  return saved ? getWearer(room, id) : refuse('stale', { theirs: await getWearer(room, id) })
}

export async function noteFlags(room: Room, id: string, fields: FlagFields) {
  await putFlags(room.db, room.workroom, id, fields, room.account, room.now)
  return getWearer(room, id)
}

/** What of a wearer's record changes limits, as the domain reads it. */
export async function limitsOfWearer({ db, workroom, today }: Room, wearer: string, bornOn: string | null): Promise<WearerFlags> {
  const flags = await findFlags(db, workroom, wearer)
  const age = yearsBetween(bornOn, today)
  return {
    pregnancy: flags?.pregnancy ?? false,
    nursing: flags?.nursing ?? false,
    reflux: flags?.reflux ?? false,
    breathing: flags?.breathing ?? false,
    circulation: flags?.circulation ?? false,
    child: (flags?.child ?? false) || (age !== null && age < CHILD_UNDER),
    practitionerAgreed: flags?.practitionerAgreed ?? false,
    age,
  }
}
