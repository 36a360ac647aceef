import type { VersionKept } from '../../shared/domain/garment/snapshot'
import { printSet, type PrintSet } from '../../shared/domain/output/print-set'
import type { PrintFacts } from '../../shared/domain/output/print-words'
import { layoutPieces } from '../../shared/domain/output/layout'
import { PAPERS } from '../../shared/domain/output/paper'
import { placePoint } from '../../shared/domain/output/placing'
import type { Placement } from '../../shared/domain/output/types'
import { planTiles, type TilePlan } from '../../shared/domain/output/tiles'
import type { DraftPiece } from '../../shared/domain/draft/types'
import type { Point } from '../../shared/domain/geometry/types'
import type { ParsedBody } from '../../shared/schemas/routes'
import type { PrintQuery } from '../../shared/schemas/print'
import type { LengthUnit } from '../../shared/schemas/session'
import { fromJson } from '../db/client'
import { findVersionKept } from '../db/queries/versions'
import { refuse, found } from './refusal'
import type { Room } from './room'
import { readableVersion } from './versions'

/** What is printed beside the drawing. Worn strains are the wearer's and are not kept, so prints carry no stretch ticks. */
function factsOf(kept: VersionKept, garmentCode: string, version: string, printedOn: string, unit: LengthUnit): PrintFacts {
  const zones = ['front', 'side', 'back'] as const
  return {
    garmentCode,
    version,
    printedOn,
    unit,
    layers: zones.flatMap((zone) =>
      (kept.plans.find((plan) => plan.zone === zone)?.layers ?? []).map((layer) => ({
        zone,
        label: layer.label,
        cloth: layer.cloth.name,
        count: layer.count,
      })),
    ),
    rings: kept.rings.map((ring) => ({ name: ring.name, cut: ring.cut, hold: ring.band })),
    cautions: kept.cautions,
  }
}

/** The print set of a version as saved. An archived cloth or an erased body changes nothing on it but its mark. */
export async function printOfVersion(
  room: Room,
  id: string,
  query: PrintQuery,
  unit: LengthUnit,
): Promise<{ set: PrintSet; title: string; outlines: Point[][] }> {
  const row = await readableVersion(room, id)
  const kept = fromJson<VersionKept>(found(await findVersionKept(room.db, room.workroom, id)).kept)
  const marks = [row.clearedAt ? 'cleared for cutting' : 'not cleared for cutting', ...(row.erasedAt ? ['body erased'] : [])]
  const version = `version ${row.number}, ${marks.join(', ')}`
  const set = printSet(factsOf(kept, row.garmentCode, version, room.today, unit), kept.draft.pieces, query)
  if (!set.ok) return refuse('cannot-solve', { problem: set.problem })
  return {
    set: set.value,
    outlines: outlinesOf(kept.draft.pieces, set.value.placements),
    title: `${row.garmentCode} version ${row.number}`,
  }
}

/** Cutting lines as they lie on the drafting plane. */
const outlinesOf = (pieces: readonly DraftPiece[], placements: readonly Placement[]): Point[][] =>
  placements.map((placement) => {
    const piece = pieces.find((one) => one.id === placement.piece)!
    return piece.cuttingLine.map((point) => placePoint(point, placement))
  })

/** Pages for pieces that are not saved. */
export function tilesOfPieces({ pieces, paper, spacing, ...options }: ParsedBody<'solve.tiles'>): TilePlan {
  const placements = layoutPieces(pieces, 'packed', spacing)
  const outlines = outlinesOf(pieces, placements)
  const plan = planTiles(outlines, PAPERS[paper], options)
  return plan.ok ? plan.value : refuse('cannot-solve', { problem: plan.problem })
}
