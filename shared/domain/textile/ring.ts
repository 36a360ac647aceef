import type { Mm, Pascal } from '../units/brand'
import { mm, newtonPerMetre, pascal, strain } from '../units/brand'
import { plainDecimal } from '../units/format'
import type { Problem, Result } from '../units/result'
import { fail, succeed } from '../units/result'
import { holdBand } from './bands'
import { isAssumed, isExtrapolated, planThickness, planWearLimit } from './plan'
import { ellipsePressures, holdTension, ringPressure } from './pressure'
import { risingRoot } from './root'
import type { BandSide, Stack } from './stack'
import { slopeOfStack, stackOf, strainOfStack, tensionOfStack } from './stack'
import type { Governs, Interval, RingGeometry, RingMode, RingSolution, TextileSettings } from './types'

/** Share of the girth by which a soft waist may be squeezed at most. Source: Gau 1998 (read). */
export const LARGEST_SQUEEZE = 0.1
/** Edges that pass each other by less are taken to meet, mm. */
const MEETING_TOLERANCE = 1e-6
/** How far the shares of a half may be from 1 in sum. */
const SHARE_TOLERANCE = 1e-6

/** Why a ring has no solution, at its level. */
const at = (geometry: RingGeometry, code: string, message: string, todo: string): { readonly ok: false; readonly problem: Problem } =>
  fail({ code, message: `${geometry.name}: ${message}`, todo, at: geometry.level })

const millimetres = (length: number): string => `${plainDecimal(length, 1)} mm`

/** A ring made ready: what does not depend on the mode. Lengths mm. */
interface Ready {
  readonly girth: number
  readonly thickness: number
  readonly surface: number
  /** Rigid widths and gaps, all round. */
  readonly fixed: number
  /** Arc of the body that each segment has to cover, by segment; 0 in a half that its rigid widths fill. */
  readonly arcs: readonly number[]
}

/** Thickness of the plans round the ring, mm: weighted by the body arcs their segments cover. */
export function ringThickness(geometry: RingGeometry): Mm {
  let weight = 0
  let sum = 0
  for (const segment of geometry.segments) {
    const arc = (segment.half === 'front' ? geometry.frontShare : 1 - geometry.frontShare) * segment.share
    weight += arc
    sum += arc * planThickness(segment.plan)
  }
  return mm(weight > 0 ? sum / weight : 0)
}

function check(geometry: RingGeometry): { readonly ok: false; readonly problem: Problem } | null {
  const { girth, squeeze, frontShare } = geometry
  if (!(girth > 0 && Number.isFinite(girth))) return at(geometry, 'girth-impossible', 'the body has no girth here.', 'Measure the girth.')
  if (!(squeeze >= 0 && squeeze <= LARGEST_SQUEEZE * girth + 1e-9)) {
    return at(
      geometry,
      'squeeze-too-large',
      `a squeeze of ${millimetres(squeeze)} is not between 0 and a tenth of the girth.`,
      `Take at most ${millimetres(Math.floor(LARGEST_SQUEEZE * girth))}.`,
    )
  }
  if (!(frontShare > 0 && frontShare < 1))
    return at(geometry, 'front-share-impossible', 'the front takes no possible part of the girth.', 'Measure the front arc again.')
  for (const width of [geometry.rigidFront, geometry.rigidBack, geometry.gapFront, geometry.gapBack, geometry.breath]) {
    if (!(width >= 0 && Number.isFinite(width)))
      return at(geometry, 'width-impossible', 'a rigid width, gap or breath is below zero.', 'Enter it as a width.')
  }
  if (!(geometry.aspect > 0 && Number.isFinite(geometry.aspect)))
    return at(geometry, 'aspect-impossible', 'breadth over depth is not possible.', 'Measure breadth and depth again.')
  for (const half of ['front', 'back'] as const) {
    const shares = geometry.segments.filter((segment) => segment.half === half).map((segment) => segment.share)
    if (
      shares.some((share) => !(share >= 0)) ||
      (shares.length > 0 && Math.abs(shares.reduce((sum, share) => sum + share, 0) - 1) > SHARE_TOLERANCE)
    ) {
      return at(
        geometry,
        'shares-not-whole',
        `the parts of the ${half} do not add up to the whole of it.`,
        'Divide the half so that its parts sum to 1.',
      )
    }
  }
  return null
}

function makeReady(geometry: RingGeometry): Ready {
  const girth = geometry.girth - geometry.squeeze
  const thickness = ringThickness(geometry)
  const surface = girth + Math.PI * thickness
  const has = (half: 'front' | 'back') => geometry.segments.some((segment) => segment.half === half && segment.share > 0)
  const fixedFront = geometry.rigidFront + geometry.gapFront
  const fixedBack = geometry.rigidBack + geometry.gapBack
  const fixed = fixedFront + fixedBack
  let front = has('front') ? geometry.frontShare * surface - fixedFront : 0
  let back = has('back') ? (1 - geometry.frontShare) * surface - fixedBack : 0
  const free = surface - fixed
  if (front <= 0 && back > 0) [front, back] = [0, Math.max(0, free)]
  else if (back <= 0 && front > 0) [front, back] = [Math.max(0, free), 0]
  else if (front <= 0) [front, back] = [0, 0]
  return {
    girth,
    thickness,
    surface,
    fixed,
    arcs: geometry.segments.map((segment) => (segment.half === 'front' ? front : back) * segment.share),
  }
}

/** A ring without stretching width has no tension figure: by how much it is too short or loose. */
function withoutStretch(geometry: RingGeometry, ready: Ready): { readonly ok: false; readonly problem: Problem } {
  if (geometry.gapFront + geometry.gapBack >= ready.surface) {
    return at(
      geometry,
      'gap-larger-than-ring',
      `the gap of ${millimetres(geometry.gapFront + geometry.gapBack)} is larger than the ring it lies in, ${millimetres(ready.surface)}.`,
      'Type a smaller gap.',
    )
  }
  const over = ready.fixed - ready.surface
  const said =
    Math.abs(over) < 0.05
      ? 'it goes round the body exactly'
      : over > 0
        ? `it is ${millimetres(over)} loose`
        : `it is ${millimetres(-over)} too short`
  return at(
    geometry,
    'no-stretching-width',
    `no cloth stretches between the rigid parts; ${said}.`,
    'Make a rigid part narrower, or give the ring a gap that can close.',
  )
}

const stacksOf = (geometry: RingGeometry, side: BandSide): readonly Stack[] =>
  geometry.segments.map((segment) => stackOf(segment.plan, side))

/**
 * Tension of segments in series whose cloth of widths `w` has to reach `length`: root of sum w (1 + e(T)) = length. 0 when they reach it slack.
 * The root lies between the least and the greatest tension that the segments have at their common mean strain.
 */
export function seriesTension(stacks: readonly Stack[], widths: readonly number[], length: number): number {
  let total = 0
  let slack = 0
  for (let i = 0; i < stacks.length; i++) {
    total += widths[i]!
    slack += widths[i]! * (1 + stacks[i]!.free)
  }
  if (slack >= length) return 0
  const common = length / total - 1
  let low = Infinity
  let high = 0
  for (let i = 0; i < stacks.length; i++) {
    if (!(widths[i]! > 0)) continue
    const tension = tensionOfStack(stacks[i]!, common)
    low = Math.min(low, tension)
    high = Math.max(high, tension)
  }
  if (high - low <= 1e-15 * high) return high
  const miss = (tension: number): number => {
    let sum = -length
    for (let i = 0; i < stacks.length; i++) if (widths[i]! > 0) sum += widths[i]! * (1 + strainOfStack(stacks[i]!, tension))
    return sum
  }
  const slope = (tension: number): number => {
    let sum = 0
    for (let i = 0; i < stacks.length; i++) {
      if (widths[i]! > 0) sum += widths[i]! / slopeOfStack(stacks[i]!, strainOfStack(stacks[i]!, tension))
    }
    return sum
  }
  return risingRoot(miss, slope, low, high, (low + high) / 2)
}

/** Cloth widths that go round their arcs under a tension: arc / (1 + e(T)). */
const widthsUnder = (stacks: readonly Stack[], arcs: readonly number[], tension: number): readonly number[] =>
  arcs.map((arc, i) => (arc > 0 ? arc / (1 + strainOfStack(stacks[i]!, tension)) : 0))

const sumOf = (values: readonly number[]): number => values.reduce((sum, value) => sum + value, 0)

interface CutTension {
  readonly tension: number
  readonly governs: Governs
}

/** T = min(T of the hold, T at the first wear limit, T at the largest reduction), and which of them it is. */
function cutTension(geometry: RingGeometry, ready: Ready, stacks: readonly Stack[], hold: Pascal, largestReduction: number): CutTension {
  let tension: number = holdTension(hold, mm(ready.girth))
  let governs: Governs = 'hold'
  geometry.segments.forEach((segment, i) => {
    if (!(ready.arcs[i]! > 0)) return
    const wear = tensionOfStack(stacks[i]!, planWearLimit(segment.plan))
    if (wear < tension) {
      tension = wear
      governs = 'stretch'
    }
  })
  const least = (1 - largestReduction) * ready.girth - ready.fixed
  const spare = (at: number) => least - sumOf(widthsUnder(stacks, ready.arcs, at))
  if (tension > 0 && spare(tension) > 0) {
    const slope = (at: number) =>
      sumOf(
        ready.arcs.map((arc, i) => {
          if (!(arc > 0)) return 0
          const e = strainOfStack(stacks[i]!, at)
          return arc / ((1 + e) ** 2 * slopeOfStack(stacks[i]!, e))
        }),
      )
    tension = spare(0) >= 0 ? 0 : risingRoot(spare, slope, 0, tension, tension)
    governs = 'reduction'
  }
  return { tension, governs }
}

/** Everything the solution says, from the widths, the tension and the gaps that were found. */
function describe(
  geometry: RingGeometry,
  mode: RingMode,
  ready: Ready,
  found: {
    readonly tension: number
    readonly widths: readonly number[]
    readonly gapFront: number
    readonly gapBack: number
    readonly governs: Governs | null
  },
): RingSolution {
  const { tension, widths, gapFront, gapBack } = found
  const { girth, surface } = ready
  const rigid = geometry.rigidFront + geometry.rigidBack
  const gap = gapFront + gapBack
  const length = surface - rigid - gap
  const mean = stacksOf(geometry, 'mean')
  const low = stacksOf(geometry, 'low')
  const high = stacksOf(geometry, 'high')
  const cloth = sumOf(widths)
  const taut = sumOf(widths.map((width, i) => width * (1 + mean[i]!.free)))
  const slack = Math.max(0, taut - length)
  const strains = mean.map((stack) => (stack.pulls ? strainOfStack(stack, tension) : stack.free))
  const pressureUnder = (stacks: readonly Stack[], breath: number): number =>
    ringPressure(newtonPerMetre(seriesTension(stacks, widths, length + breath)), mm(girth + breath))
  const interval = (one: number, other: number): Interval => ({ low: Math.min(one, other), high: Math.max(one, other) })
  const recut = (stacks: readonly Stack[]): number =>
    rigid + sumOf(widths.map((width, i) => (width > 0 ? (width * (1 + strains[i]!)) / (1 + strainOfStack(stacks[i]!, tension)) : 0)))
  const pressureBand = interval(pressureUnder(low, 0), pressureUnder(high, 0))
  const peaks = ellipsePressures(newtonPerMetre(tension), mm(girth), geometry.aspect)
  const cut = cloth + rigid
  return {
    level: geometry.level,
    name: geometry.name,
    mode: mode.solve,
    girth: geometry.girth,
    surface: mm(surface),
    tension: newtonPerMetre(tension),
    segments: geometry.segments.map((segment, i) => ({
      id: segment.id,
      half: segment.half,
      zone: segment.plan.zone,
      width: mm(widths[i]!),
      strain: strain(strains[i]!),
    })),
    rigidFront: geometry.rigidFront,
    rigidBack: geometry.rigidBack,
    gapFront: mm(gapFront),
    gapBack: mm(gapBack),
    cut: mm(cut),
    thickness: mm(ready.thickness),
    k: cut / girth,
    negativeEase: 100 * (1 - (cut + gap) / girth),
    pressure: ringPressure(newtonPerMetre(tension), mm(girth)),
    pressureBand,
    cutBand: interval(recut(low), recut(high)),
    band: holdBand(pascal(pressureBand.high)),
    breathPressure: pascal(pressureUnder(mean, geometry.breath)),
    breathBand: interval(pressureUnder(low, geometry.breath), pressureUnder(high, geometry.breath)),
    sidePressure: peaks.side,
    frontPressure: peaks.front,
    governs: found.governs,
    hold: mode.solve === 'cut' ? mode.hold : null,
    assumed: geometry.segments.some((segment, i) => widths[i]! > 0 && isAssumed(segment.plan)),
    extrapolated: geometry.segments.some((segment, i) => widths[i]! > 0 && isExtrapolated(segment.plan, strains[i]!)),
    slack: mm(slack),
    aspect: geometry.aspect,
    aspectEstimated: geometry.aspectEstimated,
  }
}

/**
 * A ring going round the body at one level. Cloth in series carries one tension T: sum w (1 + e(T)) + rigid + gap = G - squeeze + pi t.
 * `cut`: the widths by segment from a hold, held to the wear limits and the largest reduction. `tension`: T from widths as cut and gaps.
 * `gap`: the gap from widths as cut and the lacing tension. The three agree to 1e-9 of T where T > 0 and no limit governs.
 * Pressure by Laplace with the mean radius; bands by solving the ring at its cut with every curve at the ends of its spread.
 * Any number of segments and layers. Problems: nothing stretches, nothing pulls, the gap is larger than the ring, the edges meet.
 */
export function solveRing(geometry: RingGeometry, mode: RingMode, settings: TextileSettings): Result<RingSolution> {
  const slip = check(geometry)
  if (slip) return slip
  const { gapFront, gapBack } = geometry
  if (mode.solve === 'cut') {
    const ready = makeReady(geometry)
    if (!ready.arcs.some((arc) => arc > 0)) return withoutStretch(geometry, ready)
    const idle = withoutPull(geometry, ready.arcs)
    if (idle) return idle
    if (!(mode.hold >= 0 && Number.isFinite(mode.hold)))
      return at(geometry, 'hold-impossible', 'the hold asked for is not a pressure.', 'Choose a hold from light to strong.')
    const stacks = stacksOf(geometry, 'mean')
    const { tension, governs } = cutTension(geometry, ready, stacks, mode.hold, settings.largestReduction)
    return succeed(
      describe(geometry, mode, ready, { tension, widths: widthsUnder(stacks, ready.arcs, tension), gapFront, gapBack, governs }),
    )
  }
  const widths = mode.widths
  if (widths.length !== geometry.segments.length) throw new RangeError('One width for each segment')
  if (widths.some((width) => !(width >= 0 && Number.isFinite(width))))
    return at(geometry, 'width-impossible', 'a cut width is below zero.', 'Enter it as a width.')
  const open =
    mode.solve === 'gap'
      ? { ...geometry, gapFront: mode.gapIn === 'front' ? mm(0) : gapFront, gapBack: mode.gapIn === 'back' ? mm(0) : gapBack }
      : geometry
  const ready = makeReady(open)
  if (open.gapFront + open.gapBack >= ready.surface) return withoutStretch(open, ready)
  if (!(sumOf(widths) > 0)) return withoutStretch(open, ready)
  const idle = withoutPull(geometry, widths)
  if (idle) return idle
  const stacks = stacksOf(geometry, 'mean')
  const length = ready.surface - ready.fixed
  if (mode.solve === 'tension') {
    if (length <= 0) return withoutStretch(open, ready)
    return succeed(
      describe(geometry, mode, ready, { tension: seriesTension(stacks, widths, length), widths, gapFront, gapBack, governs: null }),
    )
  }
  if (!(mode.tension >= 0 && Number.isFinite(mode.tension)))
    return at(geometry, 'tension-impossible', 'the lacing tension is not a tension.', 'Type it in N/cm.')
  const reach = sumOf(widths.map((width, i) => (width > 0 ? width * (1 + strainOfStack(stacks[i]!, mode.tension)) : 0)))
  const gap = Math.max(0, length - reach)
  if (length - reach < -MEETING_TOLERANCE) {
    return at(
      geometry,
      'edges-meet',
      `the edges meet, and would pass each other by ${millimetres(reach - length)}, before the lacing pulls that hard.`,
      'Cut the ring smaller, or lace it with less tension.',
    )
  }
  const gaps = mode.gapIn === 'front' ? { gapFront: gap, gapBack } : { gapFront, gapBack: gap }
  return succeed(describe(geometry, mode, ready, { tension: mode.tension, widths, ...gaps, governs: null }))
}

function withoutPull(geometry: RingGeometry, widths: readonly number[]): { readonly ok: false; readonly problem: Problem } | null {
  const idle = geometry.segments.find((segment, i) => widths[i]! > 0 && !stackOf(segment.plan).pulls)
  return idle
    ? at(geometry, 'plan-without-pull', `no layer of the ${idle.plan.zone} pulls.`, 'Add a cloth with a stretch test to the layer plan.')
    : null
}
