import type { ResourceKind } from '../../../shared/schemas/routes'
import type { Work } from '../client'

const tables = {
  client: 'client',
  wearer: 'wearer',
  measuring: 'measuring',
  cloth: 'cloth',
  test: 'stretchTest',
  garment: 'garment',
  version: 'version',
  printer: 'printer',
  stock: 'boneStock',
} as const satisfies Record<ResourceKind, string>

/** Whether the workroom has such a row. */
export async function resourceExists(db: Work, workroom: string, kind: ResourceKind, id: string): Promise<boolean> {
  const row = await db.selectFrom(tables[kind]).select('id').where('workroomId', '=', workroom).where('id', '=', id).executeTakeFirst()
  return row !== undefined
}
