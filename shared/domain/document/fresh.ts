import type { LevelId } from '../body/types'
import { defaultStyle } from '../draft/style'
import { mm, pascal } from '../units/brand'
import type { GarmentDocument, LevelChoice } from './types'

/** The levels that a bodice is solved at, from the top down. */
export const LEVEL_IDS: readonly LevelId[] = ['bust', 'underbust', 'waist', 'high-hip', 'hip']

/** Hold asked for when nobody has chosen one, Pa: easy. Source: the workroom's default setting (design value). */
export const DEFAULT_HOLD = pascal(900)

/** A level as a new garment has it: cut solved from the default hold, no rigid width, no gap. Lengths mm. */
export function freshLevel(level: LevelId): LevelChoice {
  return {
    level,
    hold: DEFAULT_HOLD,
    solve: 'cut',
    cut: null,
    lacingTension: null,
    rigidFront: mm(0),
    rigidBack: mm(0),
    gapFront: mm(0),
    gapBack: mm(0),
    squeeze: mm(0),
    opening: null,
  }
}

/** The document of a new garment: no measuring, no layers, default style, every level at the default hold. */
export function freshDocument(): GarmentDocument {
  return {
    schema: 1,
    measuringId: null,
    state: 'dry',
    use: { water: false, strapless: false, exertion: 'calm', way: 'overhead', opens: 'unsaid', frontRelease: false, dresser: '' },
    plans: { front: [], back: [] },
    levels: LEVEL_IDS.map(freshLevel),
    style: defaultStyle(),
    alterations: [],
    acknowledged: [],
    stiffness: null,
    structure: { bones: [], closures: { front: null, back: null } },
  }
}
