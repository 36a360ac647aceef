import type { BodyLevel, MeasuredValues } from '../body/types'
import type { GarmentDocument, LevelChoice } from '../document/types'
import { ASPECT_BY_LEVEL, breathAt, FRONT_SHARE_BY_LEVEL, type Exertion } from '../textile/defaults'
import type { LayerPlan, RingGeometry, RingMode, RingSolution } from '../textile/types'
import { mm, type Mm } from '../units/brand'

/** Body breadth over depth at a level: as measured where both stand, else the default of the level, said to be estimated. */
function aspectAt(level: BodyLevel, measured: MeasuredValues): { readonly aspect: number; readonly estimated: boolean } {
  const pair = {
    bust: ['bustBreadth', 'bustDepth'],
    underbust: ['bustBreadth', 'bustDepth'],
    waist: ['waistBreadth', 'waistDepth'],
    'high-hip': ['hipBreadth', 'hipDepth'],
    hip: ['hipBreadth', 'hipDepth'],
  } as const
  const [breadth, depth] = pair[level.id]
  const across = measured[breadth]?.value
  const through = measured[depth]?.value
  if (across && through && level.id !== 'underbust' && level.id !== 'high-hip') return { aspect: across / through, estimated: false }
  return { aspect: ASPECT_BY_LEVEL[level.id], estimated: true }
}

/**
 * The ring of one level of a garment with a plan for its front and one for its back: two segments, rigid widths and gaps
 * by half. Lengths mm, once round the body.
 */
export function ringGeometry(
  level: BodyLevel,
  choice: LevelChoice,
  plans: { readonly front: LayerPlan; readonly back: LayerPlan },
  measured: MeasuredValues,
  exertion: Exertion = 'calm',
): RingGeometry {
  const { aspect, estimated } = aspectAt(level, measured)
  const arc = level.id === 'bust' ? measured.frontBustArc?.value : undefined
  return {
    level: level.id,
    name: level.name,
    girth: level.girth,
    frontShare: arc ? arc / level.girth : FRONT_SHARE_BY_LEVEL[level.id],
    segments: [
      { id: `${level.id}-front`, half: 'front', plan: plans.front, share: 1 },
      { id: `${level.id}-back`, half: 'back', plan: plans.back, share: 1 },
    ],
    rigidFront: choice.rigidFront,
    rigidBack: choice.rigidBack,
    gapFront: choice.gapFront,
    gapBack: choice.gapBack,
    squeeze: choice.squeeze,
    aspect,
    aspectEstimated: estimated,
    breath: breathAt(level.id, exertion),
  }
}

/** A gap stands only where the centre is laced; the document keeps what was typed for the day it is laced again. */
export function gapsOf(document: GarmentDocument, choice: LevelChoice): { readonly gapFront: Mm; readonly gapBack: Mm } {
  return {
    gapFront: document.style.centreFront === 'lacing' ? choice.gapFront : mm(0),
    gapBack: document.style.centreBack === 'lacing' ? choice.gapBack : mm(0),
  }
}

/** Cloth widths round the body by segment for a typed cut girth: divided as the solved cut divides it. */
export function widthsForCut(solved: RingSolution, cut: Mm): readonly Mm[] {
  const cloth = solved.segments.reduce((sum, segment) => sum + segment.width, 0)
  const asked = cut - solved.rigidFront - solved.rigidBack
  return solved.segments.map((segment) => mm((segment.width * asked) / cloth))
}

/** Which mode the level asks for once its cut has been solved from the hold. Null when what it needs was not typed. */
export function modeOf(document: GarmentDocument, choice: LevelChoice, solved: RingSolution): RingMode | null {
  if (choice.solve === 'cut' || choice.cut === null) return null
  const widths = widthsForCut(solved, choice.cut)
  if (choice.solve === 'tension') return { solve: 'tension', widths }
  const laced = document.style.centreBack === 'lacing' ? 'back' : document.style.centreFront === 'lacing' ? 'front' : null
  if (laced === null || choice.lacingTension === null) return null
  return { solve: 'gap', widths, tension: choice.lacingTension, gapIn: laced }
}
