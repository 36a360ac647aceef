import type { TextileSettings } from '../../../shared/domain/textile/types'
import { json, type Work } from '../client'

const columns = ['id', 'name', 'zone', 'settings', 'revision'] as const

export function findWorkroom(db: Work, workroom: string) {
  return db.selectFrom('workroom').select(columns).where('id', '=', workroom).executeTakeFirst()
}

export function updateWorkroomAt(
  db: Work,
  workroom: string,
  base: number,
  fields: { readonly name: string; readonly zone: string; readonly settings: TextileSettings },
) {
  return db
    .updateTable('workroom')
    .set({ ...fields, settings: json(fields.settings), revision: base + 1 })
    .where('id', '=', workroom)
    .where('revision', '=', base)
    .returning(columns)
    .executeTakeFirst()
}
