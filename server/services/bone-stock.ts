import type { ParsedBody, RouteAnswer } from '../../shared/schemas/routes'
import { fromJson } from '../db/client'
import { archiveBoneStock, findBoneStock, saveBoneStock } from '../db/queries/bone-stock'
import { found } from './refusal'
import type { Room } from './room'

type Fields = Omit<ParsedBody<'stock.save'>, 'name'>

export async function listBoneStock({ db, workroom }: Room): Promise<RouteAnswer<'stock.list'>> {
  const rows = await findBoneStock(db, workroom)
  return { items: rows.map(({ id, name, stock }) => ({ id, name, ...fromJson<Fields>(stock) })) }
}

/** A stock by its name; saved again under it, it is changed. Garments that use it keep what they were laid with. */
export async function keepBoneStock(room: Room, { name, ...fields }: ParsedBody<'stock.save'>): Promise<RouteAnswer<'stock.save'>> {
  const id = await saveBoneStock(room.db, room.workroom, name, fields, room.account)
  return found((await listBoneStock(room)).items.find((one) => one.id === id))
}

export async function putAwayBoneStock({ db, workroom, now }: Room, id: string): Promise<{ done: true }> {
  await archiveBoneStock(db, workroom, id, now)
  return { done: true }
}
