import { cautions } from '../cautions/registry'
import type { Caution } from '../cautions/types'
import type { Pascal } from '../units/brand'
import { mm, pascal } from '../units/brand'
import { daysBetween } from '../units/days'
import { BAND_LIMITS, BREATH_LIMITS, SIDE_LIMIT, holdBand } from './bands'
import { ENOUGH_SPECIMENS, LARGEST_RESIDUAL } from './curve'
import { SAME_ANGLE, angleOf, directionKey, directionWords } from './direction'
import { layerStrainIn, segmentWearLimit } from './segment'
import type { Layer, LayerCloth, LayerPlan, RingGeometry, RingSolution, TextileSettings } from './types'

/** Recovery below which there is a caution. A setting. */
export const LEAST_RECOVERY = 0.9
/** Growth above which there is a caution. A setting, common practice. */
export const LARGEST_GROWTH = 0.05
/** Spread of specimens above which there is a caution. A setting without a source. */
export const LARGEST_SPREAD = 0.25
/** Age of a test from which there is a caution, days. A setting: a year. */
export const TEST_DAYS = 365
/** Part of the way round that has to stretch. A setting without a source. */
export const LEAST_STRETCHING_SHARE = 1 / 3
/** Strains of front and back that differ by more are told. A setting without a source. */
export const HALVES_DIFFER = 0.15
/** A lacing gap that differs from the mean of the lacing by more is told, mm. Common practice, no source. */
export const GAP_UNEVEN = mm(15)
/** What keeps a garment up, judged on the mean, Pa. An assumption, a setting. */
export const KEEPS_UP = { straps: pascal(400), topEdge: pascal(600), strapless: pascal(1300) } as const

/** Part by which a hold has to be lower than the one asked for to be told as lowered. */
const LOWERED = 1e-3
const ABOVE = 1 + 1e-9
const DAYS_PER_MONTH = 30.44

/** A ring as it was solved, and the hold that was chosen for it before any cap. */
export interface JudgedRing {
  readonly geometry: RingGeometry
  readonly solution: RingSolution
  readonly asked: Pascal
}

/** What cloth, layers and rings are judged by. */
export interface TextileContext {
  readonly rings: readonly JudgedRing[]
  readonly plans: readonly LayerPlan[]
  /** All tested directions of the cloths used, to know whether another one stretches more. */
  readonly directions: readonly LayerCloth[]
  readonly state: 'dry' | 'wet'
  readonly use: { readonly water: boolean; readonly strapless: boolean }
  /** The wearer's record carries a flag: caps go before what keeps the garment up, assumed cloth is a stop. */
  readonly flagged: boolean
  readonly settings: TextileSettings
  /** ISO date. */
  readonly today: string
}

/** Cautions of one ring: its hold at rest, in a breath, at the side, and what its cloth and rigid parts do. Pressures at the upper end of their band. */
export function ringCautions({ geometry, solution, asked }: JudgedRing): readonly Caution[] {
  const place = { kind: 'ring', level: geometry.level } as const
  const ring = geometry.name
  const found: Caution[] = []
  const upper = pascal(solution.pressureBand.high)
  const { band } = solution
  if (band === 'firm' || band === 'strong' || band === 'stop') {
    const limit = band === 'firm' ? BAND_LIMITS.easy : band === 'strong' ? BAND_LIMITS.firm : BAND_LIMITS.strong
    found.push(cautions.holdHigh(place, { ring, pressure: upper, limit, band }))
  }
  if (solution.hold !== null && solution.hold < asked * (1 - LOWERED)) {
    found.push(cautions.holdLowered(place, { ring, hold: solution.hold, asked }))
  }
  if ((solution.governs === 'stretch' || solution.governs === 'reduction') && solution.pressure < asked) {
    found.push(cautions.holdNotReached(place, { ring, pressure: solution.pressure, asked, governs: solution.governs }))
  }
  const breath = pascal(solution.breathBand.high)
  if (breath > BREATH_LIMITS.caution) {
    const stops = breath > BREATH_LIMITS.stop
    found.push(cautions.breathHigh(place, { ring, pressure: breath, limit: stops ? BREATH_LIMITS.stop : BREATH_LIMITS.caution, stops }))
  }
  if (solution.breathShort) found.push(cautions.breathStopped(place, { ring, short: solution.breathShort }))
  if (solution.sidePressure > SIDE_LIMIT) {
    found.push(cautions.sideHigh(place, { ring, pressure: solution.sidePressure, limit: SIDE_LIMIT, estimated: solution.aspectEstimated }))
  }
  if (solution.slack > 0) found.push(cautions.ringSlack(place, { ring, slack: solution.slack }))
  return [...found, ...stretchCautions(geometry, solution)]
}

function stretchCautions(geometry: RingGeometry, solution: RingSolution): readonly Caution[] {
  const place = { kind: 'ring', level: geometry.level } as const
  const ring = geometry.name
  const found: Caution[] = []
  const told = new Set<string>()
  solution.segments.forEach((segment, i) => {
    if (!(segment.width > 0) || solution.slack > 0) return
    const { plan } = geometry.segments[i]!
    const wear = segmentWearLimit(geometry.segments[i]!, segment.width)
    if (segment.strain > wear * ABOVE && !told.has(plan.zone)) {
      told.add(plan.zone)
      found.push(cautions.wearLimitPassed(place, { ring, zone: plan.zone, strain: segment.strain, limit: wear }))
    }
    for (const layer of plan.layers) {
      const { cloth, count, rigid } = layer
      const strain = layerStrainIn(geometry.segments[i]!, layer, segment.width, segment.strain)
      const key = `${cloth.clothId}/${directionKey(cloth)}`
      if (!(count > 0) || rigid || strain <= cloth.curve.testedTo * ABOVE || told.has(key)) continue
      told.add(key)
      found.push(cautions.testExtrapolated(place, { cloth: cloth.name, strain, testedTo: cloth.curve.testedTo }))
    }
  })
  const reach = (half: 'front' | 'back') =>
    solution.segments.filter((one) => one.half === half).reduce((sum, one) => sum + one.width * (1 + one.strain), 0)
  const [front, back] = [reach('front'), reach('back')]
  const share = (front + back) / solution.surface
  if (share < LEAST_STRETCHING_SHARE) found.push(cautions.stretchingWidthLittle(place, { ring, share, limit: LEAST_STRETCHING_SHARE }))
  if (front === 0) found.push(cautions.halfFixed(place, { ring, half: 'front' }))
  if (back === 0) found.push(cautions.halfFixed(place, { ring, half: 'back' }))
  if (front > 0 && back > 0) {
    const strainOf = (half: 'front' | 'back', arc: number) =>
      arc / solution.segments.filter((one) => one.half === half).reduce((sum, one) => sum + one.width, 0) - 1
    const strains = { front: strainOf('front', front), back: strainOf('back', back) }
    if (Math.abs(strains.front - strains.back) > HALVES_DIFFER)
      found.push(cautions.halvesDiffer(place, { ring, ...strains, limit: HALVES_DIFFER }))
  }
  return found
}

/** Cautions of a lacing: gaps out of range, and levels whose gap differs from the mean, front and back each for itself. */
export function lacingCautions(rings: readonly JudgedRing[], settings: TextileSettings): readonly Caution[] {
  const found: Caution[] = []
  for (const side of ['gapFront', 'gapBack'] as const) {
    const laced = rings.filter((one) => one.solution[side] > 0)
    const mean = mm(laced.reduce((sum, one) => sum + one.solution[side], 0) / Math.max(1, laced.length))
    for (const { geometry, solution } of laced) {
      const place = { kind: 'ring', level: geometry.level } as const
      const gap = solution[side]
      const { lacingGapLow: low, lacingGapHigh: high } = settings
      if (gap < low / ABOVE || gap > high * ABOVE) found.push(cautions.gapOutOfRange(place, { ring: geometry.name, gap, low, high }))
      if (Math.abs(gap - mean) > GAP_UNEVEN) found.push(cautions.gapUneven(place, { ring: geometry.name, gap, mean, limit: GAP_UNEVEN }))
    }
  }
  return found
}

const ABOVE_WAIST: readonly string[] = ['top-edge', 'upper-bust', 'bust', 'underbust']

/** What keeps the garment up, judged on the mean pressure: one ring above the waist, or for a strapless one its top edge and underbust or waist. */
export function heldUpCautions(rings: readonly JudgedRing[], strapless: boolean, flagged: boolean): readonly Caution[] {
  const above = rings.filter((one) => ABOVE_WAIST.includes(one.geometry.level))
  const best = (some: readonly JudgedRing[]) =>
    some.reduce<JudgedRing | null>((most, one) => (most && most.solution.pressure >= one.solution.pressure ? most : one), null)
  const told = (ring: JudgedRing | null, limit: Pascal): readonly Caution[] => {
    if (!ring) return []
    const { pressure, pressureBand, assumed } = ring.solution
    if (assumed && pressureBand.low < limit && pressureBand.high >= limit / ABOVE) {
      return [cautions.heldUpUnknown({ kind: 'ring', level: ring.geometry.level }, { where: ring.geometry.name, limit })]
    }
    if (pressure >= limit / ABOVE) return []
    const facts = { where: ring.geometry.name, pressure: ring.solution.pressure, limit, strapless, capped: flagged }
    return [cautions.notHeldUp({ kind: 'ring', level: ring.geometry.level }, facts)]
  }
  if (!strapless) return told(best(above), KEEPS_UP.straps)
  const top = ABOVE_WAIST.map((level) => above.find((one) => one.geometry.level === level)).find((one) => one !== undefined) ?? null
  const below = best(rings.filter((one) => one.geometry.level === 'underbust' || one.geometry.level === 'waist'))
  return [...told(top, KEEPS_UP.topEdge), ...told(below, KEEPS_UP.strapless)]
}

function testCautions(layer: Layer, zone: string, context: TextileContext, firm: boolean): readonly Caution[] {
  const { cloth } = layer
  const { curve, figures } = cloth
  const place = { kind: 'plan', zone, layer: layer.id } as const
  const name = { cloth: cloth.name }
  const found: Caution[] = []
  if (curve.kind === 'assumed') {
    found.push(cautions.testAssumed(place, { ...name, because: context.flagged ? 'wearer' : firm ? 'hold' : null }))
  } else {
    if (curve.specimens < ENOUGH_SPECIMENS)
      found.push(cautions.testFewSpecimens(place, { ...name, specimens: curve.specimens, spread: curve.spread }))
    else if (curve.spread > LARGEST_SPREAD)
      found.push(cautions.specimensDiffer(place, { ...name, spread: curve.spread, limit: LARGEST_SPREAD }))
    if (curve.residual > LARGEST_RESIDUAL)
      found.push(cautions.curveScatter(place, { ...name, residual: curve.residual, limit: LARGEST_RESIDUAL }))
    if (curve.points.length > 0 && curve.points.length === curve.specimens) found.push(cautions.testOneStep(place, name))
  }
  const days = cloth.testedOn === null ? null : daysBetween(cloth.testedOn, context.today)
  if (days !== null && days > TEST_DAYS) {
    found.push(
      cautions.testOld(place, { ...name, months: Math.floor(days / DAYS_PER_MONTH), limit: Math.round(TEST_DAYS / DAYS_PER_MONTH) }),
    )
  }
  if (cloth.state === 'dry' && (context.use.water || context.state === 'wet')) {
    const wetToo = context.directions.some(
      (one) => one.clothId === cloth.clothId && directionKey(one) === directionKey(cloth) && one.state === 'wet',
    )
    if (!wetToo || context.state === 'wet') found.push(cautions.testDryForWater(place, name))
  }
  if (cloth.state === 'wet' && context.state === 'dry') found.push(cautions.testWetForDry(place, name))
  if (figures.recovery !== null && figures.recovery < LEAST_RECOVERY) {
    found.push(cautions.recoveryLow(place, { ...name, recovery: figures.recovery, limit: LEAST_RECOVERY }))
  }
  if (figures.growth !== null && figures.growth > LARGEST_GROWTH) {
    found.push(cautions.growthHigh(place, { ...name, growth: figures.growth, limit: LARGEST_GROWTH }))
  }
  const rival = context.directions
    .filter(
      (one) => one.clothId === cloth.clothId && one.state === cloth.state && one.direction !== cloth.direction && one.direction !== 'bias',
    )
    .find((one) => one.figures.stretch > figures.stretch * ABOVE)
  if (rival) {
    const facts = { direction: cloth.direction, stretch: figures.stretch, other: rival.direction, otherStretch: rival.figures.stretch }
    found.push(cautions.lowStretchDirection(place, { ...name, ...facts }))
  }
  return found
}

function directionCautions({ cloth, askedAngle, id }: Layer, zone: string): readonly Caution[] {
  if (askedAngle === undefined) return []
  const off = Math.abs(askedAngle - angleOf(cloth))
  if (off <= SAME_ANGLE) return []
  const place = { kind: 'plan', zone, layer: id } as const
  return [cautions.directionNearest(place, { cloth: cloth.name, asked: askedAngle, taken: directionWords(cloth), off })]
}

/**
 * Cautions of the layer plans: what their cloths' tests do not know. A cloth is told once, at the first layer that uses it; a rigid layer
 * needs no test.
 */
export function planCautions(context: TextileContext): readonly Caution[] {
  const firm = context.rings.some((one) => !['light', 'easy'].includes(holdBand(one.asked)))
  const told = new Set<string>()
  return context.plans.flatMap((plan) =>
    plan.layers.flatMap((layer) => {
      const key = `${layer.cloth.clothId}/${directionKey(layer.cloth)}/${layer.cloth.state}`
      const asked = `${key}/${layer.askedAngle ?? ''}`
      if (!(layer.count > 0) || layer.rigid || told.has(asked)) return []
      const first = !told.has(key)
      told.add(key).add(asked)
      return [...directionCautions(layer, plan.zone), ...(first ? testCautions(layer, plan.zone, context, firm) : [])]
    }),
  )
}

/** Everything that cloth, layers and rings have to say of a garment. A wearer's own limits are found in the body's room. */
export function textileCautions(context: TextileContext): readonly Caution[] {
  return [
    ...context.rings.flatMap(ringCautions),
    ...lacingCautions(context.rings, context.settings),
    ...heldUpCautions(context.rings, context.use.strapless, context.flagged),
    ...planCautions(context),
    ...standingCautions(context),
  ]
}

/** Notes that stand wherever a hold is chosen, and those of a water garment. */
export function standingCautions({ use }: Pick<TextileContext, 'use'>): readonly Caution[] {
  const place = { kind: 'garment' } as const
  const always = [cautions.takeItOff(place, {}), cautions.noMedicalDevice(place, {}), cautions.nickel(place, {}), cautions.latex(place, {})]
  const water = [cautions.noBuoyancyAid(place, {}), cautions.waterSalt(place, {}), cautions.releaseInWater(place, {})]
  return use.water ? [...always, ...water] : always
}
