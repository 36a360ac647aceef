import { splitBody, type VersionBody, type VersionKept } from '../../shared/domain/garment/snapshot'
import { garmentDocument } from '../../shared/schemas/garments'
import type { ParsedBody, RouteAnswer } from '../../shared/schemas/routes'
import type { VersionSummary } from '../../shared/schemas/versions'
import { fromJson } from '../db/client'
import type { Json } from '../db/tables'
import { findGarmentById, lockGarmentById } from '../db/queries/garments'
import {
  findVersionBody,
  findVersionById,
  findVersionKept,
  findVersionsOfGarment,
  insertClearance,
  insertVersion,
  nextVersionNumber,
  type VersionRow,
} from '../db/queries/versions'
import { found, refuse } from './refusal'
import type { Room } from './room'
import { getWorkingCopy, saveWorkingCopy } from './working-copy'

/** A maker reads neither the note nor the reason of a clearance: both are written for owner and drafter. */
function summaryOf(row: VersionRow, role: Room['role']): VersionSummary {
  const maker = role === 'maker'
  const { id, garmentId, garmentCode, number, name, engine, stops, cautions, barred, savedBy } = row
  return {
    id,
    garmentId,
    garmentCode,
    number,
    name,
    note: maker ? null : row.note,
    savedAt: row.savedAt.toISOString(),
    savedBy,
    engine,
    stops,
    cautions,
    barred,
    cleared: row.clearedAt
      ? { at: row.clearedAt.toISOString(), by: row.clearedBy ?? '', name: row.byName, reason: maker ? null : row.reason }
      : null,
    bodyErased: row.erasedAt !== null,
  }
}

/** The version as this role may read it: a maker only what is cleared for cutting. */
export async function readableVersion({ db, workroom, role }: Room, id: string): Promise<VersionRow> {
  const row = found(await findVersionById(db, workroom, id))
  return role === 'maker' && !row.clearedAt ? refuse('not-cleared') : row
}

export async function listVersions({ db, workroom, role }: Room, garment: string): Promise<RouteAnswer<'versions.list'>> {
  const rows = await findVersionsOfGarment(db, workroom, garment)
  const shown = role === 'maker' ? rows.filter((row) => row.clearedAt) : rows
  return { items: shown.map((row) => summaryOf(row, role)) }
}

/** What a version keeps, its document in today's shape. */
function keptOf(stored: Json): VersionKept {
  const kept = fromJson<VersionKept>(stored)
  return { ...kept, document: garmentDocument.parse(kept.document) }
}

/** The frame of a draft and its findings speak of the body; a measuring is the wearer's. */
const forMaker = (kept: VersionKept): VersionKept => ({
  ...kept,
  document: { ...kept.document, measuringId: null },
  draft: { ...kept.draft, frame: {}, findings: [] },
})

export async function getVersion(room: Room, id: string): Promise<RouteAnswer<'versions.get'>> {
  const { db, workroom, role } = room
  const row = await readableVersion(room, id)
  const kept = keptOf(found(await findVersionKept(db, workroom, id)).kept)
  const own = role === 'maker' ? undefined : await findVersionBody(db, workroom, id)
  return {
    ...summaryOf(row, role),
    kept: role === 'maker' ? forMaker(kept) : kept,
    body: own?.body ? fromJson<VersionBody>(own.body) : null,
    wearerName: own?.wearerName ?? null,
  }
}

/** Names the working copy. It must be the one that was looked at, and it must draft. */
export async function createVersion(room: Room, garment: string, { base, name, note }: ParsedBody<'versions.create'>) {
  const { db, workroom, role, account, now } = room
  await lockGarmentById(db, workroom, garment)
  const copy = await getWorkingCopy(room, garment)
  if (copy.revision !== base) refuse('stale', { theirs: copy })
  if (!copy.solution) return refuse('cannot-draft', { problem: copy.problem! })
  const { kept, body } = splitBody(copy.input, copy.solution)
  const stops = copy.solution.cautions.filter((caution) => caution.severity === 'stop')
  const fields = {
    garmentId: garment,
    name,
    note,
    engine: copy.solution.engine,
    stops: stops.length,
    cautions: copy.solution.cautions.filter((caution) => caution.severity === 'caution').length,
    barred: stops.some((caution) => !caution.clearable),
    kept,
  }
  const number = await nextVersionNumber(db, workroom, garment)
  const id = await insertVersion(db, workroom, fields, { id: copy.wearerId, name: copy.wearerName, body }, number, account, now)
  return summaryOf(found(await findVersionById(db, workroom, id)), role)
}

/** Makes a version the working copy again, as a new revision. The version itself stays as it is. */
export async function restoreVersion(room: Room, id: string, { base }: ParsedBody<'versions.restore'>) {
  const { db, workroom } = room
  const row = found(await findVersionById(db, workroom, id))
  const { document } = keptOf(found(await findVersionKept(db, workroom, id)).kept)
  return saveWorkingCopy(room, row.garmentId, { base, document })
}

/** Clears for cutting. Over a stop only the owner may, by name and reason; a wearer's cap and a way out that is missing nobody may. */
export async function clearVersion(room: Room, id: string, given: ParsedBody<'versions.clear'>) {
  const { db, workroom, role, account, now } = room
  const row = found(await findVersionById(db, workroom, id))
  await lockGarmentById(db, workroom, row.garmentId)
  found(await findGarmentById(db, workroom, row.garmentId))
  const latest = found(await findVersionById(db, workroom, id))
  if (latest.clearedAt) refuse('already-cleared')
  if (latest.barred) refuse('stop-barred')
  const over = latest.stops > 0
  if (over && role !== 'owner') refuse('stop-stands', { detail: 'Only the owner may clear over a stop, by name and reason.' })
  if (over && !(given.name && given.reason)) {
    const missing = (['name', 'reason'] as const).filter((key) => !given[key])
    refuse('invalid-input', { fields: missing.map((path) => ({ path, message: 'A stop stands: give your name and the reason.' })) })
  }
  await insertClearance(
    db,
    workroom,
    id,
    over ? { byName: given.name, reason: given.reason } : { byName: null, reason: null },
    account,
    now,
  )
  return summaryOf(found(await findVersionById(db, workroom, id)), role)
}
