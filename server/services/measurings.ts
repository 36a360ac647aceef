import type { MeasuredValues } from '../../shared/domain/body/types'
import type { ParsedBody, RouteAnswer } from '../../shared/schemas/routes'
import { fromJson } from '../db/client'
import {
  findMeasuringById,
  findMeasuringsOfWearer,
  insertMeasuring,
  updateMeasuringAt,
  type MeasuringFields,
} from '../db/queries/measurings'
import { found, refuse } from './refusal'
import type { Room } from './room'

type MeasuringRow = NonNullable<Awaited<ReturnType<typeof findMeasuringById>>>

const measuringOf = (row: MeasuringRow): RouteAnswer<'measurings.get'> => ({
  ...row,
  values: fromJson<MeasuredValues>(row.values),
  updatedAt: row.updatedAt.toISOString(),
})

export async function getMeasuring({ db, workroom }: Room, id: string) {
  return measuringOf(found(await findMeasuringById(db, workroom, id)))
}

export async function listMeasurings({ db, workroom }: Room, wearer: string): Promise<RouteAnswer<'measurings.list'>> {
  return { items: (await findMeasuringsOfWearer(db, workroom, wearer)).map(measuringOf) }
}

export async function createMeasuring(room: Room, wearer: string, fields: MeasuringFields) {
  notInTheFuture(room, fields.measuredOn)
  const { id } = await insertMeasuring(room.db, room.workroom, wearer, fields, room.account, room.now)
  return getMeasuring(room, id)
}

export async function updateMeasuring(room: Room, id: string, { base, ...fields }: ParsedBody<'measurings.update'>) {
  notInTheFuture(room, fields.measuredOn)
  const saved = await updateMeasuringAt(room.db, room.workroom, id, base, fields, room.account, room.now)
  return saved ? getMeasuring(room, id) : refuse('stale', { theirs: await getMeasuring(room, id) })
}

function notInTheFuture({ today }: Room, measuredOn: string): void {
  if (measuredOn > today) refuse('invalid-input', { fields: [{ path: 'measuredOn', message: 'This date is still to come.' }] })
}
