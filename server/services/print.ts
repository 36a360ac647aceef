import type { VersionKept } from '../../shared/domain/garment/snapshot'
import { laidBones } from '../../shared/domain/garment/structure'
import { printSet, type PrintSet } from '../../shared/domain/output/print-set'
import { exchangeDrawing } from '../../shared/domain/output/exchange'
import type { PrintedLines, PrintFacts } from '../../shared/domain/output/print-words'
import { layoutPieces } from '../../shared/domain/output/layout'
import { paperOf } from '../../shared/domain/output/paper'
import { placePoint } from '../../shared/domain/output/placing'
import type { Placement } from '../../shared/domain/output/types'
import { planTiles, type TilePlan } from '../../shared/domain/output/tiles'
import { allPieces } from '../../shared/domain/draft/roles'
import type { DraftPiece, PieceId } from '../../shared/domain/draft/types'
import type { Point } from '../../shared/domain/geometry/types'
import type { ParsedBody } from '../../shared/schemas/routes'
import type { PrintQuery } from '../../shared/schemas/print'
import type { LengthUnit } from '../../shared/schemas/session'
import { fromJson } from '../db/client'
import { findVersionKept } from '../db/queries/versions'
import { printerFor } from './printers'
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

/** A version as it is kept, with what is said of it on paper. */
async function keptForPrint(room: Room, id: string, unit: LengthUnit) {
  const row = await readableVersion(room, id)
  const kept = fromJson<VersionKept>(found(await findVersionKept(room.db, room.workroom, id)).kept)
  const marks = [row.clearedAt ? 'cleared for cutting' : 'not cleared for cutting', ...(row.erasedAt ? ['body erased'] : [])]
  const version = `version ${row.number}, ${marks.join(', ')}`
  const { bones } = laidBones(kept.document, allPieces(kept.draft))
  return {
    kept,
    facts: { ...factsOf(kept, row.garmentCode, version, room.today, unit), bones },
    title: `${row.garmentCode} version ${row.number}`,
  }
}

/** The print set of a version as saved. An archived cloth or an erased body changes nothing on it but its mark. */
export async function printOfVersion(
  room: Room,
  id: string,
  { pieces, printer, ...query }: PrintQuery,
  unit: LengthUnit,
): Promise<{ set: PrintSet; title: string; outlines: Point[][] }> {
  const { kept, facts, title } = await keptForPrint(room, id, unit)
  const only = pieces ? { only: pieces.split(',') as PieceId[] } : {}
  const set = printSet({ ...facts, printer: await printerFor(room, printer) }, allPieces(kept.draft), { ...query, ...only })
  if (!set.ok) return refuse('cannot-solve', { problem: set.problem })
  return { set: set.value, outlines: outlinesOf(allPieces(kept.draft), set.value.placements), title }
}

/** A version's pieces as one drawing, for other programs. */
export async function patternOfVersion(room: Room, id: string, lines: PrintedLines, unit: LengthUnit) {
  const { kept, facts, title } = await keptForPrint(room, id, unit)
  const pieces = allPieces(kept.draft)
  return { pieces, facts, title, drawing: exchangeDrawing(facts, pieces, lines) }
}

/** Cutting lines as they lie on the drafting plane. */
const outlinesOf = (pieces: readonly DraftPiece[], placements: readonly Placement[]): Point[][] =>
  placements.map((placement) => {
    const piece = pieces.find((one) => one.id === placement.piece)!
    return piece.cuttingLine.map((point) => placePoint(point, placement))
  })

/** Pages for pieces that are not saved. */
export function tilesOfPieces({ pieces, paper, width, height, spacing, ...options }: ParsedBody<'solve.tiles'>): TilePlan {
  const placements = layoutPieces(pieces, 'packed', spacing)
  const outlines = outlinesOf(pieces, placements)
  const known = paperOf(paper, width, height)
  const plan = known.ok ? planTiles(outlines, known.value, options) : known
  return plan.ok ? plan.value : refuse('cannot-solve', { problem: plan.problem })
}
