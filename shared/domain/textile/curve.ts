import type { Strain } from '../units/brand'
import { newtonPerMetre, strain } from '../units/brand'
import type { Result } from '../units/result'
import { fail, succeed } from '../units/result'
import { LARGEST_STRAIN, checkStripTest } from './check-test'
import { ASSUMED_TENSION, tensionAt } from './load-curve'
import { monotoneCurve, monotoneTension, risingKnots } from './monotone'
import { rulerStretch } from './ruler'
import type { TestPoint } from './test'
import { curvePoints } from './test'
import type { LoadCurve, StretchTest } from './types'

export { ASSUMED_TENSION, ASSUMED_TENSION_LOW, bandFactors, scaleCurve, slopeAt, strainAt, tensionAt } from './load-curve'

/** Residual over the largest tension from which a e + b e³ gives way to the monotone cubic. A setting. */
export const LARGEST_RESIDUAL = 0.08
/** Specimens from which their own spread counts. */
export const ENOUGH_SPECIMENS = 3
/** Spread taken for fewer specimens, standard deviation over mean. A setting without a source. */
export const FEW_SPECIMENS_SPREAD = 0.15
/** Shares of the common tested range at which the spread is read. */
const SPREAD_AT = [0.25, 0.5, 0.75, 1] as const

/** Readings whose strains are this much alike count as one step, from which only a straight line follows. */
const ONE_STEP = 1e-9

const rootMeanSquare = (values: readonly number[]): number =>
  Math.sqrt(values.reduce((sum, value) => sum + value * value, 0) / values.length)

/** The assumed curve of a cloth of which only a stretch is known: linear, reached at 500 N/m, so that a cut from it presses no more than asked. */
export function assumedCurve(stretch: Strain): LoadCurve {
  return {
    kind: 'assumed',
    a: newtonPerMetre(ASSUMED_TENSION / stretch),
    b: newtonPerMetre(0),
    knots: [],
    testedTo: stretch,
    residual: 0,
    spread: FEW_SPECIMENS_SPREAD,
    specimens: 0,
    points: [],
  }
}

/**
 * a, b >= 0 of the least squares through the origin. With two unknowns every active set can be tried: both free, else the better of a alone
 * and b alone. Exact on any readings, where an iterative solver may go round in circles on rounding.
 */
function cubicFit(points: readonly TestPoint[]): { readonly a: number; readonly b: number } {
  const longest = Math.max(...points.map((point) => point.strain))
  let [xx, xy, yy, xt, yt] = [0, 0, 0, 0, 0]
  for (const point of points) {
    const x = point.strain / longest
    const y = x ** 3
    xx += x * x
    xy += x * y
    yy += y * y
    xt += x * point.tension
    yt += y * point.tension
  }
  const determinant = xx * yy - xy * xy
  const a = (yy * xt - xy * yt) / determinant
  const b = (xx * yt - xy * xt) / determinant
  if (determinant > ONE_STEP * xx * yy && a >= 0 && b >= 0) return { a: a / longest, b: b / longest ** 3 }
  const linear = determinant <= ONE_STEP * xx * yy || (xt * xt) / xx >= (yt * yt) / yy
  return linear ? { a: xt / xx / longest, b: 0 } : { a: 0, b: yt / yy / longest ** 3 }
}

const bySpecimen = (points: readonly TestPoint[]): readonly (readonly TestPoint[])[] => {
  const groups = new Map<number, TestPoint[]>()
  for (const point of points) groups.set(point.specimen, [...(groups.get(point.specimen) ?? []), point])
  return [...groups.values()].map((group) => group.sort((one, other) => one.strain - other.strain))
}

/** Tension of one specimen at a strain, straight lines between its readings and from the origin. */
function readTension(points: readonly TestPoint[], at: number): number {
  let before = { strain: 0, tension: 0 }
  for (const point of points) {
    if (point.strain >= at) {
      const span = point.strain - before.strain
      return span > 0 ? before.tension + ((at - before.strain) / span) * (point.tension - before.tension) : point.tension
    }
    before = point
  }
  return before.tension
}

function meanPoints(groups: readonly (readonly TestPoint[])[]): readonly { readonly strain: number; readonly tension: number }[] {
  const count = groups[0]!.length
  if (groups.every((group) => group.length === count)) {
    return Array.from({ length: count }, (_, i) => ({
      strain: groups.reduce((sum, group) => sum + group[i]!.strain, 0) / groups.length,
      tension: groups.reduce((sum, group) => sum + group[i]!.tension, 0) / groups.length,
    }))
  }
  const reach = Math.min(...groups.map((group) => group[group.length - 1]!.strain))
  const most = Math.max(...groups.map((group) => group.length))
  return Array.from({ length: most }, (_, i) => {
    const at = (reach * (i + 1)) / most
    return { strain: at, tension: groups.reduce((sum, group) => sum + readTension(group, at), 0) / groups.length }
  })
}

/**
 * Spread of the specimens, standard deviation over mean (n - 1): root mean square of its values at a quarter, half, three quarters and all of
 * the strain that every specimen reached. `few` with fewer than three specimens.
 */
function specimenSpread(groups: readonly (readonly TestPoint[])[], few: number): number {
  if (groups.length < ENOUGH_SPECIMENS) return few
  const reach = Math.min(...groups.map((group) => group[group.length - 1]!.strain))
  return rootMeanSquare(
    SPREAD_AT.map((share) => {
      const tensions = groups.map((group) => readTension(group, reach * share))
      const mean = tensions.reduce((sum, one) => sum + one, 0) / tensions.length
      const variance = tensions.reduce((sum, one) => sum + (one - mean) ** 2, 0) / (tensions.length - 1)
      return Math.sqrt(variance) / mean
    }),
  )
}

/**
 * Load curve of a stretch test: T = a e + b e³ through the origin over all specimens' points, a and b not negative, so that it never falls;
 * a monotone cubic through the means where the residual (root mean square over the largest tension) passes 8 %; the assumed case from a
 * label. A strip read at one step only gives a straight line. `fewSpread` is the workroom's spread for fewer than three specimens.
 * Problems name the specimen and reading.
 */
export function fitLoadCurve(test: StretchTest, fewSpread = FEW_SPECIMENS_SPREAD): Result<LoadCurve> {
  if (test.kind === 'label') {
    const ruler = test.ruler ? rulerStretch(test.ruler.rest, test.ruler.drawn) : null
    if (ruler && !ruler.ok) return ruler
    if (!(test.stretch > 0)) {
      return fail({
        code: 'no-stretch',
        message: 'A cloth without stretch has no load curve.',
        todo: 'Enter it as a rigid width, or type the stretch from the label.',
        at: 'stretch',
      })
    }
    if (test.stretch > LARGEST_STRAIN)
      return fail({
        code: 'reading-impossible',
        message: 'No cloth stretches that far.',
        todo: 'Type the stretch in percent.',
        at: 'stretch',
      })
    return succeed({ ...assumedCurve(test.stretch), spread: fewSpread })
  }
  const checked = checkStripTest(test.specimens)
  if (!checked.ok) return checked
  const points = curvePoints(test.specimens).filter((point) => point.strain > 0)
  const groups = bySpecimen(points)
  const largest = Math.max(...points.map((point) => point.tension))
  const { a, b } = cubicFit(points)
  const base = {
    testedTo: strain(Math.max(...points.map((point) => point.strain))),
    spread: specimenSpread(groups, fewSpread),
    specimens: groups.length,
    points,
  }
  const residualOf = (tension: (at: number) => number) =>
    rootMeanSquare(points.map((point) => tension(point.strain) - point.tension)) / largest
  const cubic: LoadCurve = { ...base, kind: 'cubic', a: newtonPerMetre(a), b: newtonPerMetre(b), knots: [], residual: 0 }
  const residual = residualOf((at) => tensionAt(cubic, at))
  const knots = risingKnots(meanPoints(groups))
  if (residual <= LARGEST_RESIDUAL || knots.length < 3) return succeed({ ...cubic, residual })
  const monotone = monotoneCurve(knots)
  return succeed({
    ...base,
    kind: 'monotone',
    a: newtonPerMetre(0),
    b: newtonPerMetre(0),
    knots: knots.map((knot) => ({ strain: strain(knot.strain), tension: newtonPerMetre(knot.tension) })),
    residual: residualOf((at) => monotoneTension(monotone, at)),
  })
}
