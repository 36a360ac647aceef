import { passingOf } from '../body/passing'
import type { BodyLevel } from '../body/types'
import { cautions } from '../cautions/registry'
import type { Caution } from '../cautions/types'
import type { GarmentDocument } from '../document/types'
import { MOST_PULL, passLevel, type LevelPass, type Opening } from '../textile/getting-in'
import type { RingGeometry, RingSolution } from '../textile/types'
import type { GarmentInput, GarmentPass } from './types'

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

/** The way on and off of a solved garment: each level that has something larger to pass. The way off is the way on. */
export function passesOf(
  input: GarmentInput,
  levels: readonly BodyLevel[],
  geometries: readonly RingGeometry[],
  rings: readonly RingSolution[],
): readonly GarmentPass[] {
  const { document, measured } = input
  return rings.flatMap((ring, i) => {
    const body = levels.find((level) => level.id === ring.level)
    const passing = body ? passingOf(document.use.way, body.id, levels, measured) : null
    if (!passing) return []
    const widths = ring.segments.map((segment) => segment.width)
    const pass = passLevel(geometries[i]!, widths, openingAt(document, ring.level), passing.girth)
    return [{ ...pass, over: passing.over, estimated: passing.estimated, from: passing.from }]
  })
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
  const opensBehind = style.centreBack === 'lacing' || use.opens === 'part' || use.opens === 'whole'
  if (use.frontRelease || style.centreFront === 'lacing') return found
  if (!opensBehind) return [...found, cautions.noOpening(place, {})]
  const because = use.water ? 'water' : input.wearer.child ? 'child' : null
  if (because === null && use.dresser === '') return [...found, cautions.noDresser(place, {})]
  return [...found, cautions.cannotLeaveAlone(place, { because, dresser: use.dresser })]
}
