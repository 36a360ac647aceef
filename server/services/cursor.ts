import { refuse } from './refusal'

/** Where a page ended: the sort keys of its last row. */
export const writeCursor = (keys: readonly string[]): string => Buffer.from(JSON.stringify(keys)).toString('base64url')

export function readCursor(cursor: string | undefined): readonly [string, string] | null {
  if (!cursor) return null
  try {
    const keys: unknown = JSON.parse(Buffer.from(cursor, 'base64url').toString())
    if (Array.isArray(keys) && typeof keys[0] === 'string' && typeof keys[1] === 'string') return [keys[0], keys[1]]
  } catch {
    // Falls through to the refusal.
  }
  return refuse('invalid-input', { fields: [{ path: 'cursor', message: 'This page mark is not one of ours.' }] })
}

/** A page of at most `limit` rows from a query that asked for one more. */
export function pageOf<Row, Item>(rows: readonly Row[], limit: number, item: (row: Row) => Item, keys: (row: Row) => readonly string[]) {
  const shown = rows.slice(0, limit)
  const last = shown.at(-1)
  return { items: shown.map(item), nextCursor: rows.length > limit && last ? writeCursor(keys(last)) : null }
}
