import { directionKey } from '../textile/direction'
import type { LevelId } from '../body/types'
import { ringPressure } from '../textile/pressure'
import { solveRing } from '../textile/ring'
import { isOddStiffness, type Stiffness } from '../textile/stiffness'
import type { RingGeometry, RingSolution, TextileSettings } from '../textile/types'
import { mm, newtonPerMetre, type Mm, type NewtonPerMetre } from '../units/brand'
import type { FittingLevel, FittingReading, LevelReading } from './types'

/** Uncertainty of a factor from a single pull, a part of it. Source: setting. */
export const SINGLE_PULL_UNCERTAINTY = 0.1
/** A level so much above the common tension is called tight; below that the reading of a gap explains it. Source: setting. */
export const TIGHT_SHARE = 1.05

/** Tension of a pull on a tab, N/m: the force over the tab's width. */
export const pullTension = (force: number, tab: Mm): NewtonPerMetre => newtonPerMetre((force * 1000) / tab)

interface Worn {
  readonly geometry: RingGeometry
  readonly drafted: RingSolution
  readonly seen: FittingLevel
  readonly model: RingSolution
}

/** The ring at its cut with the gap that was seen in place of the drafted one, all of it where the drafted gap lies. */
function wornRing(geometry: RingGeometry, drafted: RingSolution, seen: FittingLevel, settings: TextileSettings): Worn | null {
  const inFront = geometry.gapFront > 0 && geometry.gapBack === 0
  const gap = seen.gap ?? mm(geometry.gapFront + geometry.gapBack)
  const worn = { ...geometry, gapFront: mm(inFront ? gap : 0), gapBack: mm(inFront ? 0 : gap) }
  const model = solveRing(worn, { solve: 'tension', widths: drafted.segments.map((one) => one.width) }, settings)
  return model.ok ? { geometry: worn, drafted, seen, model: model.value } : null
}

const clothOf = (ring: RingSolution): number => ring.segments.reduce((sum, one) => sum + one.width, 0)

/** The layers that a ring goes through, in one line: levels of the same plan have one common factor, others say nothing of each other. */
function planOfRing(geometry: RingGeometry): string {
  const plans = geometry.segments.map((segment) =>
    segment.plan.layers
      .filter((layer) => layer.count > 0)
      .map(({ cloth, count, cutRatio, rigid }) =>
        [cloth.clothId, directionKey(cloth), cloth.state, count, cutRatio, rigid ?? false].join(' '),
      )
      .join(', '),
  )
  return [...new Set(plans)].sort().join('; ')
}

/** Whole girth to let out so that the level, at the gap seen, has the tension; null when no cut has it. */
function letOutTo(worn: Worn, tension: number, settings: TextileSettings): Mm | null {
  const free = { ...settings, largestReduction: 0.9 }
  const hold = ringPressure(newtonPerMetre(tension), mm(worn.geometry.girth - worn.geometry.squeeze))
  const cut = solveRing(worn.geometry, { solve: 'cut', hold }, free)
  if (!cut.ok || cut.value.governs !== 'hold') return null
  return mm(clothOf(cut.value) - clothOf(worn.drafted))
}

/**
 * What a fitting says. The gaps give each level's strain, hence its tension up to one common factor: enough to say which level is tight
 * against the others, and by how many millimetres. The stiffness of the cloth is learnt from measured pulls alone: factor = sum(T measured
 * × T model) / sum(T model²), with its standard error (10 % from a single pull); without a pull it stays unknown. Feel changes nothing.
 * Holds for levels of one plan only: levels of another plan are compared among themselves, and of the pulls those of the plan that has most
 * of them are taken. `standing` is the stiffness that the version was already solved with, so that the factor stays one on the test. Levels without a ring, or whose ring has no solution at the gap seen, are left out.
 */
export function readFitting(
  levels: readonly FittingLevel[],
  geometries: readonly RingGeometry[],
  rings: readonly RingSolution[],
  settings: TextileSettings,
  standing: Stiffness | null = null,
): FittingReading {
  const worn = levels.flatMap((seen) => {
    const geometry = geometries.find((one) => one.level === seen.level)
    const drafted = rings.find((one) => one.level === seen.level)
    const found = geometry && drafted ? wornRing(geometry, drafted, seen, settings) : null
    return found ? [found] : []
  })
  const looked = worn.filter((one) => one.seen.gap !== null && one.drafted.tension > 0)
  const commonOf = (plan: string): number => {
    const mates = looked.filter((one) => planOfRing(one.geometry) === plan)
    const squares = mates.reduce((sum, one) => sum + one.drafted.tension ** 2, 0)
    return squares > 0 ? mates.reduce((sum, one) => sum + one.model.tension * one.drafted.tension, 0) / squares : 1
  }
  const readings = worn.map((one): LevelReading => {
    const inStep = commonOf(planOfRing(one.geometry)) * one.drafted.tension
    return {
      level: one.seen.level,
      name: one.geometry.name,
      model: one.model.tension,
      wanted: one.drafted.tension,
      share: inStep > 0 ? one.model.tension / inStep : 1,
      letOut: one.seen.gap === null || !(inStep > 0) ? null : letOutTo(one, inStep, settings),
      measured: one.seen.pull ? pullTension(one.seen.pull.force, one.seen.pull.tab) : null,
    }
  })
  const seen = readings.filter((one) => levels.find((level) => level.level === one.level)?.gap !== null)
  const tightest = seen.filter((one) => one.share > TIGHT_SHARE).sort((a, b) => b.share - a.share)[0]?.level ?? null
  const plans = new Map(worn.map((one) => [one.seen.level, planOfRing(one.geometry)]))
  return { levels: readings, tightest, stiffness: stiffnessOf(readings, plans, standing) }
}

function stiffnessOf(
  readings: readonly LevelReading[],
  plans: ReadonlyMap<LevelId, string>,
  standing: Stiffness | null,
): FittingReading['stiffness'] {
  const all = readings.flatMap((one) => {
    if (one.measured === null || !(one.model > 0)) return []
    const already = standing && (standing.levels === undefined || standing.levels.includes(one.level)) ? standing.factor : 1
    return [{ plan: plans.get(one.level)!, measured: one.measured, model: one.model / already }]
  })
  const counts = [...new Set(all.map((one) => one.plan))].map((plan) => ({ plan, pulls: all.filter((one) => one.plan === plan) }))
  const most = counts.reduce<(typeof counts)[number] | null>(
    (best, one) => (best && best.pulls.length >= one.pulls.length ? best : one),
    null,
  )
  if (most === null) return null
  const pulled = most.pulls
  const squares = pulled.reduce((sum, one) => sum + one.model ** 2, 0)
  const factor = pulled.reduce((sum, one) => sum + one.measured * one.model, 0) / squares
  const misses = pulled.reduce((sum, one) => sum + (one.measured - factor * one.model) ** 2, 0)
  const error = pulled.length === 1 ? SINGLE_PULL_UNCERTAINTY : Math.sqrt(misses / ((pulled.length - 1) * squares)) / factor
  const levels = [...plans].filter(([, plan]) => plan === most.plan).map(([level]) => level)
  return { factor, uncertainty: error, pulls: pulled.length, isOdd: isOddStiffness(factor), levels, left: all.length - pulled.length }
}
