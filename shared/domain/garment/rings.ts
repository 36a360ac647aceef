import { FRONT_SHARE } from '../body/levels'
import type { BodyLevel, MeasuredValues } from '../body/types'
import type { GarmentDocument, LevelChoice } from '../document/types'
import { ASPECT_BY_LEVEL, breathAt, FRONT_SHARE_BY_LEVEL, type Exertion } from '../textile/defaults'
import type { RingGeometry, RingMode, RingSegment, RingSolution, SewnRigid } from '../textile/types'
import { mm, type Mm } from '../units/brand'
import { EVEN_SPLIT, zoneSegments, type BustSplit, type ZonePlans, type ZoneSegment } from './zones'

/** Body breadth over depth at a level: as measured where both stand, else the default of the level, said to be estimated. A top edge has the bust's. */
function aspectAt(level: BodyLevel, measured: MeasuredValues): { readonly aspect: number; readonly estimated: boolean } {
  const id = level.id === 'top-edge' ? 'bust' : level.id
  const pair = {
    bust: ['bustBreadth', 'bustDepth'],
    underbust: ['bustBreadth', 'bustDepth'],
    waist: ['waistBreadth', 'waistDepth'],
    'high-hip': ['hipBreadth', 'hipDepth'],
    hip: ['hipBreadth', 'hipDepth'],
  } as const
  const [breadth, depth] = pair[id]
  const across = measured[breadth]?.value
  const through = measured[depth]?.value
  if (across && through && level.id !== 'top-edge' && level.id !== 'underbust' && level.id !== 'high-hip')
    return { aspect: across / through, estimated: false }
  return { aspect: ASPECT_BY_LEVEL[id], estimated: true }
}

/** A segment of a ring with its plan and what is sewn to single layers of it. */
function ringSegment(level: string, part: ZoneSegment, plans: ZonePlans, choice: LevelChoice): RingSegment {
  const plan = plans[part.zone]!
  const sewn: readonly SewnRigid[] = (choice.sewn ?? [])
    .filter((one) => one.half === part.half && one.width > 0 && plan.layers.some((layer) => layer.id === one.layer))
    .map(({ layer, width }) => ({ layer, width }))
  const name = part.pieces.length > 1 ? part.half : part.pieces[0]
  return { id: `${level}-${name}`, half: part.half, plan, share: part.share, ...(sewn.length > 0 ? { sewn } : {}) }
}

/**
 * The ring of one level of a garment: a segment for each half, or for each piece where the pieces of a half have different layers, divided
 * as at the bust; rigid widths and gaps by half. Lengths mm, once round the body.
 */
export function ringGeometry(
  level: BodyLevel,
  choice: LevelChoice,
  plans: ZonePlans,
  measured: MeasuredValues,
  more: { readonly split?: BustSplit; readonly exertion?: Exertion | undefined } = {},
): RingGeometry {
  const { aspect, estimated } = aspectAt(level, measured)
  const arc = level.id === 'bust' ? measured.frontBustArc?.value : undefined
  return {
    level: level.id,
    name: level.name,
    girth: level.girth,
    frontShare: arc ? arc / level.girth : level.id === 'top-edge' ? FRONT_SHARE['top-edge'] : FRONT_SHARE_BY_LEVEL[level.id],
    segments: zoneSegments(plans, level.id, more.split ?? EVEN_SPLIT).map((part) => ringSegment(level.id, part, plans, choice)),
    rigidFront: choice.rigidFront,
    rigidBack: choice.rigidBack,
    gapFront: choice.gapFront,
    gapBack: choice.gapBack,
    squeeze: choice.squeeze,
    aspect,
    aspectEstimated: estimated,
    breath: breathAt(level.id === 'top-edge' ? 'bust' : level.id, more.exertion ?? 'calm'),
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

/** The cloth of a solved ring laid on another ring of the same level: each half keeps its width, divided by the other's shares. */
export function widthsOnto(geometry: RingGeometry, ring: RingSolution): readonly Mm[] {
  const same = geometry.segments.length === ring.segments.length && geometry.segments.every((one, i) => one.half === ring.segments[i]!.half)
  if (same) return ring.segments.map((one) => one.width)
  const half = (side: 'front' | 'back') => ring.segments.filter((one) => one.half === side).reduce((sum, one) => sum + one.width, 0)
  return geometry.segments.map((segment) => mm(half(segment.half) * segment.share))
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
