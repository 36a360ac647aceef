import type { LevelId } from '../body/types'
import type { LevelHeight } from './piece'
import type { Draft } from './types'

/** The levels of every body from the top down. */
export const LEVELS: readonly Exclude<LevelId, 'top-edge'>[] = ['bust', 'underbust', 'waist', 'high-hip', 'hip']

/** Levels by the names they have in the draft's frame. */
export const levelName = (level: LevelId): string => `level-${level}`

/** Heights of the levels of a draft on its pieces. */
export function levelHeightsOf(draft: Draft): readonly LevelHeight[] {
  return (['top-edge', ...LEVELS] as const).flatMap((level) => {
    const at = draft.frame[levelName(level)]
    return at === undefined ? [] : [{ level, y: at.y }]
  })
}

/** A draft's frame with its levels at other heights. */
export const withLevelHeights = (frame: Draft['frame'], heights: readonly LevelHeight[]): Draft['frame'] => ({
  ...frame,
  ...Object.fromEntries(heights.map(({ level, y }) => [levelName(level), { x: 0, y }])),
})
