import type { Mm, Pascal } from '../units/brand'
import { mm, newtonPerMetre, pascal, strain } from '../units/brand'
import { plainDecimal } from '../units/format'
import type { Problem, Result } from '../units/result'
import { fail, succeed } from '../units/result'
import { holdBand } from './bands'
import { isAssumed, planThickness } from './plan'
import { ellipsePressures, holdTension, ringPressure } from './pressure'
import { risingRoot } from './root'
import { filledWidth, hasSewn, isSegmentExtrapolated, stackOfSegment, widthAtWearLimit, widthUnder } from './segment'
import type { BandSide, Stack } from './stack'
import { giveOfStack, stackOf, stackStretches, strainOfStack, tensionOfStack } from './stack'
import type { Governs, Interval, RingGeometry, RingMode, RingSegment, RingSolution, TextileSettings } from './types'

/** Share of the girth by which a soft waist may be squeezed at most. Source: Gau 1998 (read). */
export const LARGEST_SQUEEZE = 0.1
/** Edges that pass each other by less are taken to meet, mm. */
const MEETING_TOLERANCE = 1e-6
/** A ring that its rigid layers stop within this is taken to go round, mm. */
const SHORT_TOLERANCE = 1e-6
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

/** A ring without stretching width has no tension figure: by how much it is too short or loose. `reach`: what its cloth goes round without stretch, mm. */
function withoutStretch(geometry: RingGeometry, ready: Ready, reach = 0): { readonly ok: false; readonly problem: Problem } {
  const gap = geometry.gapFront + geometry.gapBack
  if (gap >= ready.surface) {
    return at(
      geometry,
      'gap-larger-than-ring',
      `the gap of ${millimetres(gap)} is larger than the ring it lies in, ${millimetres(ready.surface)}.`,
      'Type a smaller gap.',
    )
  }
  const over = ready.fixed + reach - ready.surface
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
    gap > 0
      ? `A gap of ${millimetres(Math.max(0, gap - over))} makes it fit. What it holds is then decided by the lacing alone and is not known here.`
      : 'Make a rigid part narrower, or give the ring a gap that can close.',
  )
}

/** Rigid layers stop the ring before it goes round the body. */
const tooShort = (geometry: RingGeometry, by: number): { readonly ok: false; readonly problem: Problem } =>
  at(
    geometry,
    'ring-too-short',
    `its rigid layers give no further, and it is ${millimetres(by)} too short.`,
    `Cut it larger, cut the rigid layers larger than the others, or open a gap by ${millimetres(by)}.`,
  )

const stacksOf = (geometry: RingGeometry, widths: readonly number[], side: BandSide): readonly Stack[] =>
  geometry.segments.map((segment, i) => stackOfSegment(segment, widths[i]!, side))

/** Length that segments reach with every rigid layer at its stop, mm; infinite where one has none. */
const greatestReach = (stacks: readonly Stack[], widths: readonly number[]): number =>
  stacks.reduce((sum, stack, i) => (widths[i]! > 0 ? sum + widths[i]! * (1 + stack.stop) : sum), 0)

/** Least tension at which every segment is at its stop, N/m. */
const tensionAtStop = (stacks: readonly Stack[], widths: readonly number[]): number =>
  stacks.reduce((most, stack, i) => (widths[i]! > 0 && stack.stop < Infinity ? Math.max(most, tensionOfStack(stack, stack.stop)) : most), 0)

/** Lengths nearer to each other than this part of them are the same. */
const SAME_LENGTH = 1e-12

/**
 * Tension of segments in series whose cloth of widths `w` has to reach `length`: root of sum w (1 + e(T)) = length. 0 when they reach it
 * slack; infinite when rigid layers stop them before. The root lies between the least and the greatest tension that the segments have at
 * their common mean strain, or above where a segment is stopped.
 */
export function seriesTension(stacks: readonly Stack[], widths: readonly number[], length: number): number {
  let total = 0
  let slack = 0
  for (let i = 0; i < stacks.length; i++) {
    total += widths[i]!
    slack += widths[i]! * (1 + stacks[i]!.free)
  }
  if (slack >= length) return 0
  const most = greatestReach(stacks, widths)
  if (most <= length * (1 + SAME_LENGTH)) return most < length * (1 - SAME_LENGTH) ? Infinity : tensionAtStop(stacks, widths)
  const common = length / total - 1
  let low = Infinity
  let high = 0
  let stopped = false
  for (let i = 0; i < stacks.length; i++) {
    if (!(widths[i]! > 0)) continue
    if (common > stacks[i]!.stop) {
      stopped = true
      continue
    }
    const tension = tensionOfStack(stacks[i]!, common)
    low = Math.min(low, tension)
    high = Math.max(high, tension)
  }
  if (!stopped && high - low <= 1e-15 * high) return high
  const miss = (tension: number): number => {
    let sum = -length
    for (let i = 0; i < stacks.length; i++) if (widths[i]! > 0) sum += widths[i]! * (1 + strainOfStack(stacks[i]!, tension))
    return sum
  }
  if (stopped) {
    high = Math.max(high, 1)
    while (miss(high) < 0) high *= 2
  }
  const slope = (tension: number): number => {
    let sum = 0
    for (let i = 0; i < stacks.length; i++) if (widths[i]! > 0) sum += widths[i]! * giveOfStack(stacks[i]!, tension)
    return sum
  }
  return risingRoot(miss, slope, low, high, (low + high) / 2)
}

/** Cloth widths that go round their arcs under a tension: arc / (1 + e(T)); where a rigid width fills a layer, the width at which it does. */
const widthsUnder = (segments: readonly RingSegment[], arcs: readonly number[], tension: number): readonly number[] =>
  arcs.map((arc, i) => widthUnder(segments[i]!, arc, tension) ?? filledWidth(segments[i]!))

const sumOf = (values: readonly number[]): number => values.reduce((sum, value) => sum + value, 0)

interface CutTension {
  readonly tension: number
  readonly governs: Governs
}

/** T = min(T of the hold, T at the first wear limit, T at the largest reduction), and which of them it is. */
function cutTension(geometry: RingGeometry, ready: Ready, hold: Pascal, largestReduction: number): CutTension {
  const { segments } = geometry
  let tension: number = holdTension(hold, mm(ready.girth))
  let governs: Governs = 'hold'
  const limit = (to: number, by: Governs) => {
    if (to >= tension) return
    tension = to
    governs = by
  }
  segments.forEach((segment, i) => {
    const arc = ready.arcs[i]!
    if (!(arc > 0)) return
    const width = widthAtWearLimit(segment, arc)
    if (width !== null && width > 0) limit(tensionOfStack(stackOfSegment(segment, width), arc / width - 1), 'stretch')
  })
  if (segments.every((segment, i) => !(ready.arcs[i]! > 0) || stackOf(segment.plan).stop < Infinity)) {
    const at = ready.arcs.map((arc, i) => arc / (1 + stackOf(segments[i]!.plan).stop))
    limit(tensionAtStop(stacksOf(geometry, at, 'mean'), ready.arcs), 'stretch')
  }
  const least = (1 - largestReduction) * ready.girth - ready.fixed
  const spare = (at: number) => least - sumOf(widthsUnder(segments, ready.arcs, at))
  if (tension > 0 && spare(tension) > 0) {
    const slope = (at: number) =>
      sumOf(
        widthsUnder(segments, ready.arcs, at).map((width, i) =>
          width > 0 ? (width * width * giveOfStack(stackOfSegment(segments[i]!, width), at)) / ready.arcs[i]! : 0,
        ),
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
  const mean = stacksOf(geometry, widths, 'mean')
  const low = stacksOf(geometry, widths, 'low')
  const high = stacksOf(geometry, widths, 'high')
  const cloth = sumOf(widths)
  const taut = sumOf(widths.map((width, i) => width * (1 + mean[i]!.free)))
  const slack = Math.max(0, taut - length)
  const strains = mean.map((stack) => (stack.pulls ? strainOfStack(stack, tension) : stack.free))
  const breathShort = Math.max(0, length + geometry.breath - greatestReach(mean, widths))
  const pressureUnder = (stacks: readonly Stack[], breath: number): number => {
    const under = seriesTension(stacks, widths, length + breath)
    return ringPressure(newtonPerMetre(Number.isFinite(under) ? under : tensionAtStop(stacks, widths)), mm(girth + breath))
  }
  const interval = (one: number, other: number): Interval => ({ low: Math.min(one, other), high: Math.max(one, other) })
  const recut = (side: BandSide): number =>
    rigid +
    sumOf(
      widths.map((width, i) => (width > 0 ? (widthUnder(geometry.segments[i]!, width * (1 + strains[i]!), tension, side) ?? width) : 0)),
    )
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
    cutBand: interval(recut('low'), recut('high')),
    band: holdBand(pascal(pressureBand.high)),
    breathPressure: pascal(pressureUnder(mean, geometry.breath)),
    breathBand: interval(pressureUnder(low, geometry.breath), pressureUnder(high, geometry.breath)),
    ...(breathShort > SHORT_TOLERANCE ? { breathShort: mm(breathShort) } : {}),
    sidePressure: peaks.side,
    frontPressure: peaks.front,
    governs: found.governs,
    hold: mode.solve === 'cut' ? mode.hold : null,
    assumed: geometry.segments.some((segment, i) => widths[i]! > 0 && isAssumed(segment.plan)),
    extrapolated: geometry.segments.some((segment, i) => widths[i]! > 0 && isSegmentExtrapolated(segment, widths[i]!, strains[i]!)),
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
 * Any number of segments and layers. Problems: nothing stretches, nothing pulls, the gap is larger than the ring, the edges meet, rigid
 * layers stop the ring too short, a rigid width fills the layer it is sewn to.
 */
export function solveRing(geometry: RingGeometry, mode: RingMode, settings: TextileSettings): Result<RingSolution> {
  const slip = check(geometry)
  if (slip) return slip
  const { gapFront, gapBack } = geometry
  if (mode.solve === 'cut') {
    const ready = makeReady(geometry)
    if (!ready.arcs.some((arc) => arc > 0)) return withoutStretch(geometry, ready)
    const idle = withoutPull(geometry, ready.arcs) ?? withoutGive(geometry, ready, ready.arcs, ready.arcs)
    if (idle) return idle
    if (!(mode.hold >= 0 && Number.isFinite(mode.hold)))
      return at(geometry, 'hold-impossible', 'the hold asked for is not a pressure.', 'Choose a hold from light to strong.')
    const { tension, governs } = cutTension(geometry, ready, mode.hold, settings.largestReduction)
    const widths = widthsUnder(geometry.segments, ready.arcs, tension)
    const filled = filledLayer(geometry, widths)
    if (filled) return filled
    return succeed(describe(geometry, mode, ready, { tension, widths, gapFront, gapBack, governs }))
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
  const reaches = widths.map((width, i) => width * (1 + stackOf(geometry.segments[i]!.plan).free))
  const idle = withoutPull(geometry, widths) ?? withoutGive(geometry, ready, widths, reaches) ?? filledLayer(geometry, widths)
  if (idle) return idle
  const stacks = stacksOf(geometry, widths, 'mean')
  const length = ready.surface - ready.fixed
  if (mode.solve === 'tension') {
    if (length <= 0) return withoutStretch(open, ready)
    const tension = seriesTension(stacks, widths, length)
    if (!Number.isFinite(tension)) return tooShort(geometry, length - greatestReach(stacks, widths))
    return succeed(describe(geometry, mode, ready, { tension, widths, gapFront, gapBack, governs: null }))
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

type Refused = { readonly ok: false; readonly problem: Problem }

function withoutPull(geometry: RingGeometry, widths: readonly number[]): Refused | null {
  const idle = geometry.segments.find((segment, i) => {
    const stack = stackOf(segment.plan)
    return widths[i]! > 0 && !stack.pulls && stack.stop === Infinity
  })
  return idle
    ? at(geometry, 'plan-without-pull', `no layer of the ${idle.plan.zone} pulls.`, 'Add a cloth with a stretch test to the layer plan.')
    : null
}

/** Every segment in use is held by its rigid layers: nothing stretches. */
function withoutGive(geometry: RingGeometry, ready: Ready, widths: readonly number[], reaches: readonly number[]): Refused | null {
  const gives = geometry.segments.some((segment, i) => widths[i]! > 0 && stackStretches(stackOf(segment.plan)))
  return gives ? null : withoutStretch(geometry, ready, sumOf(reaches))
}

/** A rigid width as wide as the layer it is sewn to, or as the arc it lies in. */
function filledLayer(geometry: RingGeometry, widths: readonly number[]): Refused | null {
  const found = geometry.segments.find((segment, i) => widths[i]! > 0 && hasSewn(segment) && !(widths[i]! > filledWidth(segment)))
  return found
    ? at(
        geometry,
        'sewn-width-fills',
        `the rigid width sewn to one layer of the ${found.plan.zone} fills that layer; nothing of it is left to stretch.`,
        `Keep it under ${millimetres(filledWidth(found))} of cloth, or use narrower channels.`,
      )
    : null
}
