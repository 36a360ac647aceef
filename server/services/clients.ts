import type { ParsedBody, ParsedQuery, RouteAnswer } from '../../shared/schemas/routes'
import { findClientById, findClients, insertClient, setClientArchived, updateClientAt, type ClientFields } from '../db/queries/clients'
import { findGarmentsOfClient } from '../db/queries/garments'
import { findWearersOfClient } from '../db/queries/wearers'
import { pageOf, readCursor } from './cursor'
import { garmentSummaryOf } from './garment-views'
import { found, refuse } from './refusal'
import type { Room } from './room'

type ClientRow = NonNullable<Awaited<ReturnType<typeof findClientById>>>

const clientOf = ({ id, name, email, phone, note, revision, archivedAt, updatedAt }: ClientRow): RouteAnswer<'clients.create'> => ({
  id,
  name,
  email,
  phone,
  note,
  revision,
  archivedAt: archivedAt?.toISOString() ?? null,
  updatedAt: updatedAt.toISOString(),
})

export async function listClients({ db, workroom }: Room, query: ParsedQuery<'clients.list'>): Promise<RouteAnswer<'clients.list'>> {
  const rows = await findClients(db, workroom, {
    q: query.q ?? '',
    archived: query.archived === 'yes',
    after: readCursor(query.cursor),
    limit: query.limit,
  })
  return pageOf(
    rows,
    query.limit,
    (row) => ({ ...clientOf(row), wearers: row.wearers ?? 0, garments: row.garments ?? 0 }),
    (row) => [row.nameKey, row.id],
  )
}

export async function createClient({ db, workroom, account, now }: Room, fields: ClientFields) {
  return clientOf(await insertClient(db, workroom, fields, account, now))
}

export async function getClient({ db, workroom, role }: Room, id: string): Promise<RouteAnswer<'clients.get'>> {
  const client = clientOf(found(await findClientById(db, workroom, id)))
  const wearers = await findWearersOfClient(db, workroom, id)
  const garments = await findGarmentsOfClient(db, workroom, id)
  return {
    ...client,
    wearers: wearers.map((one) => ({
      id: one.id,
      name: one.name,
      bornOn: one.bornOn,
      guardian: one.guardian,
      measurings: one.measurings ?? 0,
      lastMeasuredOn: one.lastMeasuredOn,
    })),
    garments: garments.map((row) => garmentSummaryOf(row, role)),
  }
}

export async function updateClient({ db, workroom, account, now }: Room, id: string, { base, ...fields }: ParsedBody<'clients.update'>) {
  const saved = await updateClientAt(db, workroom, id, base, fields, account, now)
  return saved ? clientOf(saved) : refuse('stale', { theirs: clientOf(found(await findClientById(db, workroom, id))) })
}

export async function archiveClient({ db, workroom, account, now }: Room, id: string, archived: boolean) {
  return clientOf(found(await setClientArchived(db, workroom, id, archived ? now : null, account, now)))
}
