import { headGirth, passingOf } from '../body/passing'
import { cautions } from '../cautions/registry'
import type { Caution } from '../cautions/types'
import type { GarmentDocument } from '../document/types'
import { MOST_PULL, passLevel, type LevelPass, type Opening } from '../textile/getting-in'
import { opens } from '../draft/panels'
import { wholeEdge } from '../draft/roles'
import { pathLength } from '../geometry/path'
import type { RingGeometry, RingSegment } from '../textile/types'
import { mm, type Mm } from '../units/brand'
import type { GarmentInput, GarmentPass, GarmentSolution } from './types'

/** Codes of the cautions that speak of the way on and off. */
export const ENTRY_CODES: ReadonlySet<string> = new Set(
  [
    cautions.cannotGetIn,
    cautions.tightToGetIn,
    cautions.hardToPullOn,
    cautions.noOpening,
    cautions.noDresser,
    cautions.cannotLeaveAlone,
  ].map((one) => one.code),
)

/** How a level is open while the garment goes on. Not said yet counts as closed. */
export function openingAt(document: GarmentDocument, level: string): Opening {
  if (document.use.opens === 'whole') return { kind: 'whole' }
  const opening = document.levels.find((one) => one.level === level)?.opening ?? null
  return document.use.opens === 'part' && opening !== null ? { kind: 'by', width: opening } : { kind: 'closed' }
}

/** Level of the neck edge on the way on and off; it is an edge of the pieces and no ring of the body. */
export const NECK_EDGE = 'neck-edge'

/**
 * The neck edge as a ring of its own: the neckline edges of the pieces as they are cut, both sides, on the layers of the yoke where it has
 * its own. It opens as the bust does, because closures run up to it. A binding or elastic along it holds it to its stitch, which is not
 * planned yet; cloth along a curve stretches otherwise than round the body.
 */
export function neckEdge(solution: Pick<GarmentSolution, 'draft' | 'plans' | 'ringInputs'>): EdgeRing | null {
  const bust = solution.ringInputs.find((one) => one.level === 'bust')
  const length = (half: 'front' | 'back') =>
    [...solution.draft.pieces, ...(solution.draft.right ?? solution.draft.pieces)]
      .filter((piece) => piece.zone === half)
      .flatMap((piece) => piece.edges.filter((edge) => wholeEdge(edge.id) === 'neckline'))
      .reduce((sum, edge) => sum + pathLength(edge.path), 0)
  const yoke = solution.plans.find((plan) => plan.zone === 'yoke')
  const segments = (['front', 'back'] as const).flatMap((half): RingSegment[] => {
    const plan = yoke ?? solution.plans.find((one) => one.zone === half)
    return plan && length(half) > 0 ? [{ id: `${NECK_EDGE}-${half}`, half, plan, share: 1 }] : []
  })
  if (!bust || segments.length === 0) return null
  const none = mm(0)
  return {
    geometry: { ...bust, level: NECK_EDGE, name: 'Neck edge', segments, rigidFront: none, rigidBack: none },
    widths: segments.map((segment) => mm(length(segment.half))),
  }
}

interface EdgeRing {
  readonly geometry: RingGeometry
  readonly widths: readonly Mm[]
}

/** The way on and off of a solved garment: the neck edge over the head, and each level that has something larger to pass. The way off is the way on. */
export function passesOf(
  input: GarmentInput,
  solution: Pick<GarmentSolution, 'levels' | 'ringInputs' | 'rings' | 'plans' | 'draft'>,
): readonly GarmentPass[] {
  const { document, measured } = input
  const { levels, ringInputs, rings } = solution
  const neck = document.use.way === 'overhead' ? neckEdge(solution) : null
  const head = headGirth(measured)
  const opened = openingAt(document, 'bust')
  const overHead = neck
    ? [{ ...passLevel(neck.geometry, neck.widths, opened, head.girth), over: head.over, estimated: head.estimated, from: head.from }]
    : []
  const overBody = rings.flatMap((ring, i) => {
    const body = levels.find((level) => level.id === ring.level)
    const passing = body ? passingOf(document.use.way, body.id, levels, measured) : null
    if (!passing) return []
    const widths = ring.segments.map((segment) => segment.width)
    const pass = passLevel(ringInputs[i]!, widths, openingAt(document, ring.level), passing.girth)
    return [{ ...pass, over: passing.over, estimated: passing.estimated, from: passing.from }]
  })
  return [...overHead, ...overBody]
}

/** What one level asks to be seen to on the way on and off; `said`: how it opens has been said, so that not passing is a stop. */
export function levelCautions(pass: LevelPass & { readonly over: string }, said: boolean): readonly Caution[] {
  const place = { kind: 'ring', level: pass.level } as const
  const { name: ring, over, reach, needs, pull, verdict } = pass
  return [
    ...(verdict === 'cannot' ? [cautions.cannotGetIn(place, { ring, over, reach, needs, said })] : []),
    ...(verdict === 'tight' ? [cautions.tightToGetIn(place, { ring, over, reach, needs })] : []),
    ...(pull !== null && pull > MOST_PULL ? [cautions.hardToPullOn(place, { ring, pull, limit: MOST_PULL })] : []),
  ]
}

/** What the way on and off asks to be seen to: levels that do not pass, are tight or take a hard pull; and who opens it. */
export function entryCautions(input: GarmentInput, passes: readonly GarmentPass[]): readonly Caution[] {
  const { style, use } = input.document
  const found: Caution[] = []
  for (const pass of passes) found.push(...levelCautions(pass, use.opens !== 'unsaid'))
  const place = { kind: 'garment' } as const
  const opensBehind = opens(style.centreBack) || use.opens === 'part' || use.opens === 'whole'
  if (use.frontRelease || opens(style.centreFront)) return found
  if (!opensBehind) return [...found, cautions.noOpening(place, {})]
  const because = use.water ? 'water' : input.wearer.child ? 'child' : null
  if (because === null && use.dresser === '') return [...found, cautions.noDresser(place, {})]
  return [...found, cautions.cannotLeaveAlone(place, { because, dresser: use.dresser })]
}
