import type { CentreKind, DraftPiece } from '../draft/types'
import { pathLength, pathPointAt, pathReverse } from '../geometry/path'
import { pullOnClosure } from '../textile/pressure'
import { mm, newtonPerMetre, type Mm, type Newton, type NewtonPerMetre } from '../units/brand'
import { cordLength, eyeletPlaces, hookCount } from './lacing'
import type { ClosureChoice } from './types'

/** Pull on one hook above which a tape gapes between hooks, N. Setting, common practice. */
export const MOST_HOOK_PULL = 6

/** A centre edge that opens, as it lies on a draft. */
export interface ClosureReading {
  readonly half: 'front' | 'back'
  readonly kind: CentreKind
  /** Along the edge, mm. */
  readonly length: Mm
  readonly rigid: Mm
  /** Hooks or studs; null for a zip or lacing. */
  readonly hooks: number | null
  /** Eyelets of one side, mm from the top; empty but for lacing. */
  readonly eyelets: readonly Mm[]
  /** Cord of the lacing as it is worn, mm; null but for lacing. */
  readonly cord: Mm | null
  /** What one hook or pair of eyelets carries at each level. */
  readonly pulls: readonly { readonly level: string; readonly name: string; readonly tension: NewtonPerMetre; readonly pull: Newton }[]
}

/** A level as the closure meets it. */
export interface ClosureLevel {
  readonly level: string
  readonly name: string
  /** Height on the pieces, mm. */
  readonly y: number
  readonly gap: Mm
  readonly tension: NewtonPerMetre
}

const OPENS: ReadonlySet<CentreKind> = new Set(['zip', 'hook-tape', 'hooks', 'busk', 'lacing'])
export const opensAt = (kind: CentreKind): boolean => OPENS.has(kind)

/** Gap at a height: straight between the levels, level beyond them. */
function gapAt(levels: readonly ClosureLevel[], y: number): number {
  const sorted = [...levels].sort((a, b) => a.y - b.y)
  if (sorted.length === 0) return 0
  const above = sorted.findIndex((level) => level.y >= y)
  if (above < 0) return sorted.at(-1)!.gap
  if (above === 0) return sorted[0]!.gap
  const [low, high] = [sorted[above - 1]!, sorted[above]!]
  return low.gap + ((high.gap - low.gap) * (y - low.y)) / Math.max(1e-9, high.y - low.y)
}

/** Reads a closure off the centre edge of a half: length, hooks or eyelets, cord, and what each carries. Null where that centre does not open. */
export function readClosure(
  half: 'front' | 'back',
  kind: CentreKind,
  choice: ClosureChoice,
  pieces: readonly DraftPiece[],
  levels: readonly ClosureLevel[],
): ClosureReading | null {
  const edge = pieces
    .find((piece) => piece.zone === half && piece.edges.some((one) => one.id === 'centre'))
    ?.edges.find((one) => one.id === 'centre')
  if (!edge || !opensAt(kind)) return null
  const down = edge.nodes[0]!.at.y >= edge.nodes.at(-1)!.at.y ? edge.path : pathReverse(edge.path)
  const length = pathLength(down)
  const laced = kind === 'lacing'
  const waist = levels.find(({ level }) => level === 'waist')
  const waistFromTop = waist ? mm(Math.max(0, down[0]!.from.y - waist.y)) : null
  const eyelets = laced ? eyeletPlaces(mm(length), choice.pitch, choice.waistPitch, waistFromTop) : []
  const pairs = eyelets.map((at) => ({ at, apart: mm(gapAt(levels, pathPointAt(down, at).y) + choice.rigid / 2) }))
  return {
    half,
    kind,
    length: mm(length),
    rigid: choice.rigid,
    hooks: kind === 'zip' || laced ? null : hookCount(mm(length), choice.pitch),
    eyelets,
    cord: laced ? cordLength(pairs, choice.ends) : null,
    pulls:
      choice.pitch > 0
        ? levels.map(({ level, name, tension }) => ({
            level,
            name,
            tension,
            pull: pullOnClosure(tension, level === 'waist' && laced ? choice.waistPitch : choice.pitch),
          }))
        : [],
  }
}

/** Tension above which a hook carries more than it should, N/m. */
export const mostTensionAt = (pitch: Mm): NewtonPerMetre => newtonPerMetre((MOST_HOOK_PULL * 1000) / pitch)
