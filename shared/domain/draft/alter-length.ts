import type { Point } from '../geometry/types'
import type { LevelHeight } from './piece'
import type { DraftPiece, LengthAlteration } from './types'

/** Levels stay at least this far apart when a piece is shortened, mm. Setting. */
export const LEAST_BETWEEN = 10

/** A stretch between two levels that is lengthened, heights over the waist before it, mm. */
interface Stretch {
  readonly top: number
  readonly bottom: number
}

/** The stretch below a level down to the next one. Null where the level is not in the draft or is its lowest. */
export function stretchBelow(heights: readonly LevelHeight[], { below }: Pick<LengthAlteration, 'below'>): Stretch | null {
  const top = heights.find((one) => one.level === below)?.y
  if (top === undefined) return null
  const lower = heights.map(({ y }) => y).filter((y) => y < top)
  return lower.length === 0 ? null : { top, bottom: Math.max(...lower) }
}

/** The most a stretch may be shortened by, mm below 0. */
export const mostShortened = ({ top, bottom }: Stretch): number => Math.min(0, LEAST_BETWEEN - (top - bottom))

const lowered = (y: number, { top, bottom }: Stretch, by: number): number => {
  if (y >= top) return y
  return y <= bottom ? y - by : y - (by * (top - y)) / (top - bottom)
}

/** Pieces lengthened in a stretch: what lies in it is drawn out in proportion, what lies under it moves down as a whole. Widths at the levels stay. */
export function lengthened(pieces: readonly DraftPiece[], stretch: Stretch, by: number): readonly DraftPiece[] {
  const map = ({ x, y }: Point): Point => ({ x, y: lowered(y, stretch, by) })
  return pieces.map((piece) => ({
    ...piece,
    edges: piece.edges.map((edge) => ({
      ...edge,
      nodes: edge.nodes.map((node) => ({ ...node, at: map(node.at) })),
      path: edge.path.map((segment) =>
        segment.kind === 'line'
          ? { ...segment, from: map(segment.from), to: map(segment.to) }
          : { ...segment, from: map(segment.from), c1: map(segment.c1), c2: map(segment.c2), to: map(segment.to) },
      ),
    })),
  }))
}

/** Heights of the levels after a stretch was lengthened. */
export const heightsAfter = (heights: readonly LevelHeight[], stretch: Stretch, by: number): readonly LevelHeight[] =>
  heights.map(({ level, y }) => ({ level, y: lowered(y, stretch, by) }))
