import type { TextileSettings } from '../../shared/domain/textile/types'
import type { ParsedBody, RouteAnswer } from '../../shared/schemas/routes'
import { fromJson } from '../db/client'
import { findMembers } from '../db/queries/session'
import { findWorkroom, updateWorkroomAt } from '../db/queries/workroom'
import { found, refuse } from './refusal'
import { dateIn, type Room } from './room'

type WorkroomRow = NonNullable<Awaited<ReturnType<typeof findWorkroom>>>

const workroomOf = ({ id, name, zone, settings, revision }: WorkroomRow, now: Date): RouteAnswer<'workroom.get'> => ({
  id,
  name,
  zone,
  settings: fromJson<TextileSettings>(settings),
  revision,
  today: dateIn(zone, now),
})

export async function getWorkroom({ db, workroom, now }: Room) {
  return workroomOf(found(await findWorkroom(db, workroom)), now)
}

export async function settingsOf({ db, workroom }: Room): Promise<TextileSettings> {
  return fromJson<TextileSettings>(found(await findWorkroom(db, workroom)).settings)
}

export async function updateWorkroom(room: Room, { base, ...change }: ParsedBody<'workroom.update'>) {
  const stands = await getWorkroom(room)
  const fields = { name: change.name ?? stands.name, zone: change.zone ?? stands.zone, settings: change.settings ?? stands.settings }
  if (fields.settings.lacingGapLow > fields.settings.lacingGapHigh) {
    refuse('invalid-input', { fields: [{ path: 'settings.lacingGapLow', message: 'The smallest gap is larger than the largest.' }] })
  }
  const saved = await updateWorkroomAt(room.db, room.workroom, base, fields)
  return saved ? workroomOf(saved, room.now) : refuse('stale', { theirs: stands })
}

export async function listMembers({ db }: Room): Promise<RouteAnswer<'members.list'>> {
  return { items: (await findMembers(db)).map((one) => ({ ...one, since: one.since.toISOString() })) }
}
