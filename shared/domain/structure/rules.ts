import type { DraftPiece, EdgeId, PieceId } from '../draft/types'
import { wholeEdge } from '../draft/roles'
import { pathEnd, pathFlatten, pathStart } from '../geometry/path'
import type { Point } from '../geometry/types'
import type { LaidBone } from './types'

/** End of a bone from an armhole, mm. Setting; common practice, from memory. */
export const FROM_ARMHOLE = 20
/** End of a bone from another finished edge, mm. Source: couture practice page, read (1/2 in). */
export const FROM_EDGE = 13
/** What a rule may be missed by, mm: below what a tape shows. */
const MISSED_BY = 0.1

/** A rule of bones that is not kept. */
export interface BoneFinding {
  readonly code: 'bone-near-armhole' | 'bone-near-edge' | 'bones-close' | 'bone-bends-tight'
  readonly bone: string
  readonly name: string
  readonly piece: PieceId
  readonly edge: EdgeId | null
  /** mm. */
  readonly value: number
  readonly limit: number
}

/** Chords leave a line by no more than this where distances are judged, mm. */
const CHORDS = 0.05

/** Distance from a point to a line of chords, mm. */
function distanceTo(at: Point, points: readonly Point[]): number {
  let least = Infinity
  for (let i = 1; i < points.length; i++) {
    const [a, b] = [points[i - 1]!, points[i]!]
    const [dx, dy] = [b.x - a.x, b.y - a.y]
    const square = dx * dx + dy * dy
    const t = square > 0 ? Math.min(1, Math.max(0, ((at.x - a.x) * dx + (at.y - a.y) * dy) / square)) : 0
    const [x, y] = [at.x - a.x - dx * t, at.y - a.y - dy * t]
    least = Math.min(least, x * x + y * y)
  }
  return Math.sqrt(least)
}

/** Rules of bones that are not kept: ends from edges, bones from each other, curves against what the stock bends to. */
export function boneFindings(bones: readonly LaidBone[], pieces: readonly DraftPiece[]): readonly BoneFinding[] {
  const found: BoneFinding[] = []
  for (const bone of bones) {
    const piece = pieces.find(({ id }) => id === bone.piece)
    if (!piece) continue
    const about = { bone: bone.id, name: bone.name, piece: piece.id }
    for (const edge of piece.edges) {
      if (edge.kind !== 'finished') continue
      const line = pathFlatten(edge.path, CHORDS)
      const value = Math.min(...[pathStart(bone.path), pathEnd(bone.path)].map((end) => distanceTo(end, line)))
      const armhole = wholeEdge(edge.id) === 'armhole'
      const limit = armhole ? FROM_ARMHOLE : FROM_EDGE
      if (value < limit - MISSED_BY)
        found.push({ ...about, code: armhole ? 'bone-near-armhole' : 'bone-near-edge', edge: edge.id, value, limit })
    }
    if (bone.radius < bone.stock.leastRadius)
      found.push({ ...about, code: 'bone-bends-tight', edge: null, value: bone.radius, limit: bone.stock.leastRadius })
  }
  const lines = bones.map((bone) => pathFlatten(bone.path, CHORDS))
  bones.forEach((bone, index) => {
    for (let next = index + 1; next < bones.length; next++) {
      const other = bones[next]!
      if (other.piece !== bone.piece) continue
      const limit = 2 * Math.max(bone.channelWidth, other.channelWidth)
      const value = Math.min(...lines[index]!.map((at) => distanceTo(at, lines[next]!)))
      if (value < limit - MISSED_BY)
        found.push({
          code: 'bones-close',
          bone: other.id,
          name: `${bone.name} and ${other.name.toLowerCase()}`,
          piece: bone.piece,
          edge: null,
          value,
          limit,
        })
    }
  })
  return found
}
