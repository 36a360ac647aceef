import { mm } from '../units/brand'
import type { BodiceStyle, HalfPanels } from './types'

export { checkStyle } from './style-limits'

/** Seam allowances to begin with, mm: common practice for stretch cloth. */
const DEFAULT_ALLOWANCES: BodiceStyle['allowances'] = {
  seam: mm(10),
  centre: mm(15),
  opening: mm(15),
  shoulder: mm(10),
  neckline: mm(10),
  armhole: mm(10),
  hem: mm(20),
}

/** Two panels: a princess seam and no other. */
const PRINCESS_PANELS: HalfPanels = { princess: true, further: [] }

/**
 * The base style: neckline at the neck base, full shoulder, hem at the hip, folds at both centres, heights as on the
 * body. A draft in it can be measured back as a body.
 */
export function baseStyle(): BodiceStyle {
  return {
    centreFront: 'fold',
    centreBack: 'fold',
    right: null,
    panels: { front: PRINCESS_PANELS, back: PRINCESS_PANELS },
    hem: { level: 'hip', below: mm(0) },
    hemShape: { form: 'straight', front: mm(0), back: mm(0), side: mm(0), curve: 0.4 },
    neckline: { front: 'round', back: 'round' },
    necklineFrontDepth: mm(0),
    necklineBackDepth: mm(0),
    necklineWidth: mm(0),
    top: null,
    princessAt: 0.5,
    princessEnd: { front: { edge: 'shoulder', at: 0.5 }, back: { edge: 'shoulder', at: 0.5 } },
    backPrincessAt: 0.42,
    frontShares: { centre: 0, princess: 0.62, side: 0.38 },
    backShares: { centre: 0.14, princess: 0.5, side: 0.36 },
    letOut: { front: null, back: null },
    openingsTake: { front: false, back: false },
    verticalFactor: 1,
    bustAngle: null,
    bustAs: 'auto',
    underarmDrop: mm(0),
    allowances: DEFAULT_ALLOWANCES,
  }
}

/** The style a new bodice starts from: boned, laced at the back, hem at the high hip, neckline lowered and widened. */
export function defaultStyle(): BodiceStyle {
  return {
    ...baseStyle(),
    centreBack: 'lacing',
    hem: { level: 'high-hip', below: mm(0) },
    necklineFrontDepth: mm(70),
    necklineBackDepth: mm(60),
    necklineWidth: mm(35),
  }
}
