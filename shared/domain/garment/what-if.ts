import type { LevelId, MeasurementKey } from '../body/types'
import type { Caution } from '../cautions/types'
import { applyCommand, type Zone } from '../document/commands'
import type { GarmentDocument, LayerChoice } from '../document/types'
import type { RingSolution } from '../textile/types'
import type { Mm, Pascal, Strain } from '../units/brand'
import { mm, pascal, strain } from '../units/brand'
import { succeed, type Result } from '../units/result'
import { solveGarment } from './solve'
import type { GarmentInput, GarmentProblem, GarmentSolution } from './types'

/** One thing that is tried. Lengths mm, pressures Pa; a measurement in its own unit. */
export type Trial =
  | { readonly kind: 'hold'; readonly level: LevelId | 'all'; readonly hold: Pascal }
  | { readonly kind: 'gap'; readonly level: LevelId | 'all'; readonly half: 'front' | 'back'; readonly gap: Mm }
  | { readonly kind: 'layers'; readonly zone: Zone | 'both'; readonly layers: readonly LayerChoice[] }
  | { readonly kind: 'count'; readonly zone: Zone | 'both'; readonly layer: string; readonly count: number }
  | { readonly kind: 'measurement'; readonly key: MeasurementKey; readonly value: number }

/** A ring before and after, and what the change makes of it: after less before. */
export interface RingDifference {
  readonly level: string
  readonly name: string
  readonly before: RingSolution
  readonly after: RingSolution
  readonly cut: Mm
  readonly gap: Mm
  readonly pressure: Pascal
  readonly breathPressure: Pascal
  readonly negativeEase: number
  /** Of the segment that is stretched most. */
  readonly strain: Strain
  /** Whether another limit governs now. */
  readonly governsChanged: boolean
}

export interface WhatIf {
  readonly before: GarmentSolution
  readonly after: GarmentSolution
  /** Levels that both have. */
  readonly rings: readonly RingDifference[]
  /** Cautions by what the change brings and what it takes away; one that stands in both is in neither. */
  readonly comes: readonly Caution[]
  readonly goes: readonly Caution[]
  /** The document as it was tried, to be taken as it is. A tried measurement is not in it: it has to be measured. */
  readonly document: GarmentDocument
}

function withCount(document: GarmentDocument, zone: Zone | 'both', layer: string, count: number): GarmentDocument {
  const zones: readonly Zone[] = zone === 'both' ? ['front', 'back'] : [zone]
  return zones.reduce((now, one) => {
    const layers = (now.plans[one] ?? [])
      .map((choice) => (choice.id === layer ? { ...choice, count } : choice))
      .filter((choice) => choice.count > 0)
    return applyCommand(now, { kind: 'set-layers', zone: one, layers }).document
  }, document)
}

/** The input with what is tried put into it. A count of 0 takes the layer out. */
export function withTrial(input: GarmentInput, trial: Trial): GarmentInput {
  const { document } = input
  switch (trial.kind) {
    case 'hold':
      return { ...input, document: applyCommand(document, { kind: 'set-level', level: trial.level, patch: { hold: trial.hold } }).document }
    case 'gap': {
      const patch = trial.half === 'front' ? { gapFront: trial.gap } : { gapBack: trial.gap }
      return { ...input, document: applyCommand(document, { kind: 'set-level', level: trial.level, patch }).document }
    }
    case 'layers':
      return { ...input, document: applyCommand(document, { kind: 'set-layers', zone: trial.zone, layers: trial.layers }).document }
    case 'count':
      return { ...input, document: withCount(document, trial.zone, trial.layer, trial.count) }
    case 'measurement':
      return { ...input, measured: { ...input.measured, [trial.key]: { value: trial.value } } }
  }
}

const mostStrained = (ring: RingSolution): number => Math.max(...ring.segments.map((segment) => segment.strain))

function differenceOf(before: RingSolution, after: RingSolution): RingDifference {
  return {
    level: before.level,
    name: before.name,
    before,
    after,
    cut: mm(after.cut - before.cut),
    gap: mm(after.gapFront + after.gapBack - before.gapFront - before.gapBack),
    pressure: pascal(after.pressure - before.pressure),
    breathPressure: pascal(after.breathPressure - before.breathPressure),
    negativeEase: after.negativeEase - before.negativeEase,
    strain: strain(mostStrained(after) - mostStrained(before)),
    governsChanged: after.governs !== before.governs,
  }
}

const sameCaution = (one: Caution, other: Caution): boolean =>
  one.code === other.code && one.severity === other.severity && JSON.stringify(one.place) === JSON.stringify(other.place)

/** A garment as it stands and as it would be, its rings side by side. Both must solve: the problem is that of the one that does not. */
export function whatIf(input: GarmentInput, trials: readonly Trial[]): Result<WhatIf, GarmentProblem> {
  const tried = trials.reduce(withTrial, input)
  const before = solveGarment(input)
  if (!before.ok) return before
  const after = solveGarment(tried)
  if (!after.ok) return after
  const missingFrom = (found: readonly Caution[], others: readonly Caution[]) =>
    found.filter((one) => !others.some((other) => sameCaution(one, other)))
  return succeed({
    before: before.value,
    after: after.value,
    rings: before.value.rings.flatMap((ring) => {
      const other = after.value.rings.find((one) => one.level === ring.level)
      return other ? [differenceOf(ring, other)] : []
    }),
    comes: missingFrom(after.value.cautions, before.value.cautions),
    goes: missingFrom(before.value.cautions, after.value.cautions),
    document: tried.document,
  })
}
