import type { LevelId } from '../body/types'
import type { DraftPiece } from '../draft/types'
import type { Point } from '../geometry/types'
import { insideAtHeight, pointsAlong } from './crossings'

/** Spacing of the marks on resting cloth, mm; worn, it grows by the strain. */
export const TICK_SPACING_AT_REST = 5
const TICK_LENGTH = 3
const ROW_STEP = 20
const CLEAR_OF_EDGE = 2

/** A rectangle in the piece's frame that ticks keep out of, e.g. round a label, mm. */
export interface KeepClear {
  readonly left: number
  readonly bottom: number
  readonly right: number
  readonly top: number
}

/**
 * Strain at a height of a piece: linear between the levels that are given, held above the highest and below the lowest.
 * Null when no level of the piece has a strain.
 */
export function strainAtHeight(piece: DraftPiece, strains: Readonly<Partial<Record<LevelId, number>>>, y: number): number | null {
  const known = piece.levels
    .flatMap(({ level, from, to }) => (strains[level] === undefined ? [] : [{ y: (from.y + to.y) / 2, strain: strains[level] }]))
    .sort((a, b) => a.y - b.y)
  const lowest = known[0]
  const highest = known[known.length - 1]
  if (!lowest || !highest) return null
  if (y <= lowest.y) return lowest.strain
  for (let i = 1; i < known.length; i += 1) {
    const [below, above] = [known[i - 1]!, known[i]!]
    if (y <= above.y) return below.strain + ((y - below.y) / Math.max(above.y - below.y, 1e-9)) * (above.strain - below.strain)
  }
  return highest.strain
}

/**
 * Stretch ticks of a piece in its own frame: rows of short upright marks inside the seam line, 20 mm apart, the marks
 * 5 mm · (1 + strain) apart, so that their spacing is the strain round the body. Each row is centred on the cloth it
 * crosses. No ticks without strains.
 */
export function stretchTicks(
  piece: DraftPiece,
  strains: Readonly<Partial<Record<LevelId, number>>>,
  keepClear: readonly KeepClear[] = [],
): readonly { readonly from: Point; readonly to: Point }[] {
  const polygon = pointsAlong(piece.edges.flatMap((edge) => edge.path))
  const heights = polygon.map((point) => point.y)
  const ticks: { from: Point; to: Point }[] = []
  const first = Math.ceil((Math.min(...heights) + TICK_LENGTH) / ROW_STEP) * ROW_STEP
  for (let y = first; y < Math.max(...heights) - TICK_LENGTH; y += ROW_STEP) {
    const worn = strainAtHeight(piece, strains, y)
    if (worn === null) return []
    const spacing = TICK_SPACING_AT_REST * (1 + worn)
    for (const [left, right] of insideAtHeight(polygon, y)) {
      const count = Math.floor((right - left - 2 * CLEAR_OF_EDGE) / spacing)
      for (let i = 0; i <= count; i += 1) {
        const x = (left + right) / 2 + (i - count / 2) * spacing
        const covered = keepClear.some((box) => x > box.left && x < box.right && y > box.bottom && y < box.top)
        if (!covered) ticks.push({ from: { x, y: y - TICK_LENGTH / 2 }, to: { x, y: y + TICK_LENGTH / 2 } })
      }
    }
  }
  return ticks
}
