import type { DraftPiece } from '../../shared/domain/draft/types'
import type { GarmentSummary } from '../../shared/schemas/garments'
import { stage } from '../../shared/schemas/garments'
import type { Role } from '../../shared/schemas/session'
import { fromJson } from '../db/client'
import type { GarmentRow, Outline } from '../db/queries/garments'

/** Points kept of a cutting line for a small picture. */
const PICTURE_POINTS = 80

/** Cutting lines thinned for a small picture, rounded to a tenth of a millimetre. */
export function outlinesOf(pieces: readonly DraftPiece[]): readonly Outline[] {
  const tenth = (value: number) => Math.round(value * 10) / 10
  return pieces.map((piece) => {
    const step = Math.max(1, Math.ceil(piece.cuttingLine.length / PICTURE_POINTS))
    return { piece: piece.id, points: piece.cuttingLine.filter((_, i) => i % step === 0).map(({ x, y }) => ({ x: tenth(x), y: tenth(y) })) }
  })
}

/** A garment in a list. A maker gets neither names nor the outlines of what is not cleared. */
export function garmentSummaryOf(row: GarmentRow, role: Role): GarmentSummary {
  const named = role !== 'maker'
  return {
    id: row.id,
    code: row.code,
    name: row.name,
    wearerId: named ? row.wearerId : null,
    wearerName: named ? row.wearerName : null,
    clientId: named ? row.clientId : null,
    clientName: named ? row.clientName : null,
    dueOn: row.dueOn,
    stage: stage.parse(row.stage),
    latestVersion:
      row.latestId === null
        ? null
        : {
            id: row.latestId,
            number: row.latestNumber!,
            name: row.latestName!,
            cleared: row.latestClearedAt ? { at: row.latestClearedAt.toISOString(), by: row.latestClearedBy ?? '' } : null,
          },
    outlines: named && row.outlines ? [...fromJson<GarmentSummary['outlines'] & object>(row.outlines)] : null,
    updatedAt: row.updatedAt.toISOString(),
    archivedAt: row.archivedAt?.toISOString() ?? null,
  }
}
