import { ringPressure } from '../textile/pressure'
import { solveRing } from '../textile/ring'
import { isOddStiffness } from '../textile/stiffness'
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
 * Holds for levels of one plan only. Levels without a ring, or whose ring has no solution at the gap seen, are left out.
 */
export function readFitting(
  levels: readonly FittingLevel[],
  geometries: readonly RingGeometry[],
  rings: readonly RingSolution[],
  settings: TextileSettings,
): FittingReading {
  const worn = levels.flatMap((seen) => {
    const geometry = geometries.find((one) => one.level === seen.level)
    const drafted = rings.find((one) => one.level === seen.level)
    const found = geometry && drafted ? wornRing(geometry, drafted, seen, settings) : null
    return found ? [found] : []
  })
  const looked = worn.filter((one) => one.seen.gap !== null && one.drafted.tension > 0)
  const common =
    looked.length > 0
      ? looked.reduce((sum, one) => sum + one.model.tension * one.drafted.tension, 0) /
        looked.reduce((sum, one) => sum + one.drafted.tension ** 2, 0)
      : 1
  const readings = worn.map((one): LevelReading => {
    const inStep = common * one.drafted.tension
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
  return { levels: readings, tightest, stiffness: stiffnessOf(readings) }
}

function stiffnessOf(readings: readonly LevelReading[]): FittingReading['stiffness'] {
  const pulled = readings.flatMap((one) => (one.measured !== null && one.model > 0 ? [{ measured: one.measured, model: one.model }] : []))
  if (pulled.length === 0) return null
  const squares = pulled.reduce((sum, one) => sum + one.model ** 2, 0)
  const factor = pulled.reduce((sum, one) => sum + one.measured * one.model, 0) / squares
  const misses = pulled.reduce((sum, one) => sum + (one.measured - factor * one.model) ** 2, 0)
  const error = pulled.length === 1 ? SINGLE_PULL_UNCERTAINTY : Math.sqrt(misses / ((pulled.length - 1) * squares)) / factor
  return { factor, uncertainty: error, pulls: pulled.length, isOdd: isOddStiffness(factor) }
}
