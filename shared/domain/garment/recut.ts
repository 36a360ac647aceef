import { wearerLimits } from '../body/wearer'
import { freshLevel, LEVEL_IDS } from '../document/fresh'
import { planKey } from '../document/plan-key'
import type { GarmentDocument } from '../document/types'
import type { Alteration } from '../draft/types'
import { cappedHold } from '../textile/hold'
import { solveRing } from '../textile/ring'
import type { HoldBand, RingGeometry, RingSolution, TextileSettings } from '../textile/types'
import { mm, pascal, type Mm, type Pascal } from '../units/brand'
import { succeed, type Result } from '../units/result'
import { widthsOnto } from './rings'
import { solveGarment } from './solve'
import type { GarmentInput, GarmentProblem, GarmentSolution } from './types'

/** What the final cut is to hold: what the fitted version held, or what its own plan was asked for. */
export type RecutTarget = 'fitted' | 'own'

/** One level of the fitted version, and of its cut copied straight into the final plan. Girths mm, once round the body. */
export interface RecutLevel {
  readonly level: string
  readonly name: string
  readonly fitted: { readonly cut: Mm; readonly pressure: Pascal; readonly band: HoldBand }
  /** The fitted cut in the final plan; null where that ring has no solution. */
  readonly copied: { readonly pressure: Pascal; readonly band: HoldBand } | null
}

/** One level of the proposed garment. */
export interface RecutStep {
  readonly level: string
  /** What this level is asked for: what is left for the draft once the alterations do their part. */
  readonly asked: Pascal
  readonly cut: Mm
  readonly pressure: Pascal
  readonly band: HoldBand
  readonly governs: RingSolution['governs']
  /** Cut less the fitted cut: above 0 to let out, below to take in. Whole girth, and for each half front and half back. */
  readonly change: Mm
  readonly changeFront: Mm
  readonly changeBack: Mm
  /** Millimetres of alteration here that do what one millimetre did on the fitted version. */
  readonly factor: number
}

export interface RecutAlteration {
  readonly id: string
  readonly name: string
  readonly before: Mm
  readonly after: Mm
  /** Cloth that the same share of hold takes, final over fitted. */
  readonly factor: number
}

export interface RecutProposal {
  readonly document: GarmentDocument
  readonly solution: GarmentSolution
  readonly steps: readonly RecutStep[]
  /** Alterations across the body whose amount changes. Those along it, and those off the levels, go over as they are. */
  readonly alterations: readonly RecutAlteration[]
}

export interface Recut {
  readonly levels: readonly RecutLevel[]
  readonly targets: Readonly<Record<RecutTarget, RecutProposal>>
}

/** Part by which the hold is changed to see how many millimetres it takes. */
const PROBE = 0.05
/** A ring that gives less than this for the probe, mm, tells nothing of the other. */
const LEAST_GIVE = 0.01
const LARGEST_FACTOR = 3

const clothOf = (ring: RingSolution): number => ring.segments.reduce((sum, segment) => sum + segment.width, 0)

const halfOf = (ring: RingSolution, half: 'front' | 'back'): number =>
  ring.segments.filter((segment) => segment.half === half).reduce((sum, segment) => sum + segment.width, 0) / 2

/** The ring with its cloth made so many millimetres wide, shared as it is; what it then holds. */
function holdAt(ring: RingSolution, geometry: RingGeometry, cloth: number, settings: TextileSettings): RingSolution | null {
  const now = clothOf(ring)
  if (!(now > 0) || !(cloth > 0)) return null
  const widths = ring.segments.map((segment) => mm((segment.width * cloth) / now))
  const solved = solveRing(geometry, { solve: 'tension', widths }, settings)
  return solved.ok ? solved.value : null
}

/** The same pieces in the final layers: what is rigid there lies on them as well, so their cloth is narrower by what more is rigid. */
function copiedWidths(geometry: RingGeometry, ring: RingSolution): readonly Mm[] | null {
  const onto = widthsOnto(geometry, ring)
  const more = { front: geometry.rigidFront - ring.rigidFront, back: geometry.rigidBack - ring.rigidBack }
  const cloth = (half: 'front' | 'back') => onto.reduce((sum, width, i) => (geometry.segments[i]!.half === half ? sum + width : sum), 0)
  const left = { front: 1 - more.front / cloth('front'), back: 1 - more.back / cloth('back') }
  if (!(left.front > 0) || !(left.back > 0)) return null
  return onto.map((width, i) => mm(width * left[geometry.segments[i]!.half]))
}

/** Cloth that a little more hold takes away, mm, limits left out: how a ring answers an alteration. */
function giveOf(geometry: RingGeometry, pressure: Pascal, settings: TextileSettings): number {
  const free = { ...settings, largestReduction: 0.9 }
  const at = (hold: number) => solveRing(geometry, { solve: 'cut', hold: pascal(hold) }, free)
  const [now, harder] = [at(pressure), at(pressure * (1 + PROBE))]
  return now.ok && harder.ok ? clothOf(now.value) - clothOf(harder.value) : 0
}

function proposalOf(
  fittedInput: GarmentInput,
  fitted: GarmentSolution,
  final: GarmentInput,
  plain: GarmentSolution,
  target: RecutTarget,
): Result<RecutProposal, GarmentProblem> {
  const asked = new Map<string, { readonly hold: Pascal; readonly factor: number }>()
  for (const geometry of plain.ringInputs) {
    const ring = fitted.rings.find((one) => one.level === geometry.level)
    const fittedGeometry = fitted.ringInputs.find((one) => one.level === geometry.level)
    if (!ring || !fittedGeometry) continue
    const own = final.document.levels.find((one) => one.level === geometry.level)?.hold ?? freshLevel('waist').hold
    const wanted = target === 'fitted' ? ring.pressure : own
    const capped = cappedHold(wanted, wearerLimits(final.wearer, geometry.level).cap, geometry, final.settings)
    const cut = solveRing(geometry, { solve: 'cut', hold: capped }, final.settings)
    if (!cut.ok) continue
    const give = giveOf(fittedGeometry, ring.pressure, fittedInput.settings)
    const gives = giveOf(geometry, cut.value.pressure, final.settings)
    const factor = give > LEAST_GIVE && gives > LEAST_GIVE ? Math.min(LARGEST_FACTOR, gives / give) : 1
    const byAlterations = fitted.alterationGirth.find((one) => one.level === geometry.level)?.by ?? 0
    const before = holdAt(cut.value, geometry, clothOf(cut.value) - factor * byAlterations, final.settings)
    asked.set(geometry.level, { hold: pascal(Math.round((before ?? cut.value).pressure)), factor })
  }

  const changed: RecutAlteration[] = []
  const alterations: Alteration[] = fittedInput.document.alterations.map((one) => {
    if (one.kind === 'length') return one
    const level = one.kind === 'girth' ? one.level : levelOfNode(one.role.node, fittedInput.document)
    const factor = level === null ? 1 : (asked.get(level)?.factor ?? 1)
    const before = one.kind === 'girth' ? one.amount : one.dx
    const after = mm(Math.round(before * factor * 10) / 10)
    if (after !== before) changed.push({ id: one.id, name: one.name, before, after, factor })
    return one.kind === 'girth' ? { ...one, amount: after } : { ...one, dx: after }
  })
  const document: GarmentDocument = {
    ...final.document,
    style: fittedInput.document.style,
    alterations,
    alteredIn: planKey(final.document.plans),
    levels: final.document.levels.map((level) => {
      const wish = asked.get(level.level)
      return wish ? { ...level, solve: 'cut', hold: wish.hold } : level
    }),
  }
  const solved = solveGarment({ ...final, document })
  if (!solved.ok) return solved
  const steps = solved.value.rings.flatMap((ring) => {
    const old = fitted.rings.find((one) => one.level === ring.level)
    const wish = asked.get(ring.level)
    if (!old || !wish) return []
    return [
      {
        level: ring.level,
        asked: wish.hold,
        cut: ring.cut,
        pressure: ring.pressure,
        band: ring.band,
        governs: ring.governs,
        change: mm(ring.cut - old.cut),
        changeFront: mm(halfOf(ring, 'front') + ring.rigidFront / 2 - halfOf(old, 'front') - old.rigidFront / 2),
        changeBack: mm(halfOf(ring, 'back') + ring.rigidBack / 2 - halfOf(old, 'back') - old.rigidBack / 2),
        factor: wish.factor,
      },
    ]
  })
  return succeed({ document, solution: solved.value, steps, alterations: changed })
}

/** The level that a node lies on: its own name, or the hem's. Null off the levels. */
function levelOfNode(node: string, document: GarmentDocument): string | null {
  if ((LEVEL_IDS as readonly string[]).includes(node)) return node
  return node === 'hem' ? document.style.hem.level : null
}

/**
 * Equal-hold recut. A cut that fits in one plan holds something at each level; the same cut in another plan holds something else. For both
 * targets: the cut of each level in the final plan, w = (G + pi t - rigid - gap) / (1 + e(T)), held to that plan's wear limit, largest
 * reduction and the wearer's cap; and the alterations made on the fitted version taken over in hold, not in millimetres: scaled by how
 * much cloth a change of hold takes in the one plan and in the other. The style goes over, so seam shaping keeps its share of the level.
 * Both garments must solve. Lengths mm, pressures Pa.
 */
export function recut(fittedInput: GarmentInput, final: GarmentInput): Result<Recut, GarmentProblem> {
  const fitted = solveGarment(fittedInput)
  if (!fitted.ok) return fitted
  const styled = { ...final, document: { ...final.document, style: fittedInput.document.style, alterations: [] } }
  const plain = solveGarment(styled)
  if (!plain.ok) return plain
  const levels = fitted.value.rings.map((ring): RecutLevel => {
    const geometry = plain.value.ringInputs.find((one) => one.level === ring.level)
    const widths = geometry ? copiedWidths(geometry, ring) : null
    const copied = geometry && widths ? solveRing(geometry, { solve: 'tension', widths }, final.settings) : null
    return {
      level: ring.level,
      name: ring.name,
      fitted: { cut: ring.cut, pressure: ring.pressure, band: ring.band },
      copied: copied?.ok ? { pressure: copied.value.pressure, band: copied.value.band } : null,
    }
  })
  const toFitted = proposalOf(fittedInput, fitted.value, final, plain.value, 'fitted')
  if (!toFitted.ok) return toFitted
  const toOwn = proposalOf(fittedInput, fitted.value, final, plain.value, 'own')
  if (!toOwn.ok) return toOwn
  return succeed({ levels, targets: { fitted: toFitted.value, own: toOwn.value } })
}
