import type { MeasuredValues } from '../../shared/domain/body/types'
import type { GarmentDocument } from '../../shared/domain/document/types'
import { allPieces } from '../../shared/domain/draft/roles'
import { solveGarment } from '../../shared/domain/garment/solve'
import type { GarmentInput, GarmentSolution } from '../../shared/domain/garment/types'
import { garmentDocument } from '../../shared/schemas/garments'
import type { ParsedBody, RouteAnswer } from '../../shared/schemas/routes'
import { fromJson } from '../db/client'
import type { Json } from '../db/tables'
import { findWorkingCopy, keepGoodSolution, saveWorkingCopyAt } from '../db/queries/garments'
import { findMeasuringById } from '../db/queries/measurings'
import { clothsForGarment } from './cloths'
import { outlinesOf } from './garment-views'
import { found, refuse } from './refusal'
import type { Room } from './room'
import { limitsOfWearer } from './wearers'
import { settingsOf } from './workroom'

/** A stored document in today's shape: what was added since it was saved takes its default. */
export const documentOf = (stored: Json): GarmentDocument => garmentDocument.parse(fromJson<unknown>(stored))

type WorkingCopyRow = NonNullable<Awaited<ReturnType<typeof findWorkingCopy>>>
type View = RouteAnswer<'garments.workingCopy'>

/** Everything that the solve of a garment reads, of this workroom and as it stands now. */
export async function garmentInputOf(
  room: Room,
  row: Pick<WorkingCopyRow, 'wearerId' | 'bornOn'>,
  document: GarmentDocument,
): Promise<GarmentInput> {
  const { db, workroom } = room
  const measuring = document.measuringId ? await findMeasuringById(db, workroom, document.measuringId) : undefined
  const own = measuring?.wearerId === row.wearerId ? measuring : undefined
  const used = Object.values(document.plans).flatMap((layers) => layers.map((layer) => layer.clothId))
  return {
    document,
    measured: own ? fromJson<MeasuredValues>(own.values) : {},
    measuredOn: own?.measuredOn ?? null,
    wearer: await limitsOfWearer(room, row.wearerId, row.bornOn),
    cloths: await clothsForGarment(room, [...new Set(used)]),
    settings: await settingsOf(room),
    today: room.today,
  }
}

async function viewOf(room: Room, row: WorkingCopyRow): Promise<View> {
  const document = documentOf(row.document)
  const input = await garmentInputOf(room, row, document)
  const solved = solveGarment(input)
  return {
    garmentId: row.garmentId,
    garmentCode: row.garmentCode,
    garmentName: row.garmentName,
    wearerId: row.wearerId,
    wearerName: row.wearerName,
    revision: row.revision,
    document,
    savedAt: row.savedAt.toISOString(),
    savedBy: row.savedBy,
    input,
    solution: solved.ok ? solved.value : null,
    problem: solved.ok ? null : solved.problem,
    lastGood: row.goodRevision === null ? null : { revision: row.goodRevision, solution: fromJson<GarmentSolution>(row.good) },
  }
}

export async function getWorkingCopy(room: Room, garment: string): Promise<View> {
  return viewOf(room, found(await findWorkingCopy(room.db, room.workroom, garment)))
}

/** Saves a document on top of the revision it was made from. A document that cannot be drafted is saved all the same; the last good solution stays beside it. */
export async function saveWorkingCopy(
  room: Room,
  garment: string,
  { base, document }: ParsedBody<'garments.saveWorkingCopy'>,
): Promise<View> {
  const { db, workroom, account, now } = room
  await checkMeasuring(room, garment, document)
  const saved = await saveWorkingCopyAt(db, workroom, garment, base, document, account, now)
  if (!saved) return refuse('stale', { theirs: await getWorkingCopy(room, garment) })
  const view = await getWorkingCopy(room, garment)
  if (!view.solution) return view
  await keepGoodSolution(db, workroom, garment, saved.revision, view.solution, outlinesOf(allPieces(view.solution.draft)))
  return { ...view, lastGood: { revision: saved.revision, solution: view.solution } }
}

async function checkMeasuring({ db, workroom }: Room, garment: string, { measuringId }: GarmentDocument): Promise<void> {
  if (measuringId === null) return
  const row = found(await findWorkingCopy(db, workroom, garment))
  const measuring = await findMeasuringById(db, workroom, measuringId)
  if (measuring?.wearerId !== row.wearerId) {
    refuse('invalid-input', { fields: [{ path: 'document.measuringId', message: 'Choose a measuring of this wearer.' }] })
  }
}
