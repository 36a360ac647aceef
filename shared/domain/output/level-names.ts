import type { LevelId } from '../body/types'

/** Level names as they stand on the board and the print. */
export const LEVEL_NAMES: Readonly<Record<LevelId, string>> = {
  bust: 'bust',
  underbust: 'underbust',
  waist: 'waist',
  'top-edge': 'top edge',
  'high-hip': 'high hip',
  hip: 'hip',
}
