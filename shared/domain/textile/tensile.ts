import { mm, newton, newtonPerMetre, strain, type Mm } from '../units/brand'
import { fail, succeed, type Problem, type Result } from '../units/result'
import { risingKnots } from './monotone'
import type { StretchReading, StretchSpecimen, TensileRecord } from './types'

/** A run of a tensile machine: load in N and extension in mm, row by row as they came. */
export interface TensileRun {
  readonly loads: ArrayLike<number>
  readonly extensions: ArrayLike<number>
}

/** One loading and the return after it, as rows of the run: from, turn and to are indices, `to` not counted. */
export interface TensileCycle {
  readonly from: number
  readonly turn: number
  readonly to: number
}

/** A run read as one specimen: its last loading and the return after it, thinned. */
export interface TensileReading {
  readonly specimen: StretchSpecimen
  readonly rows: number
  readonly cycles: number
  readonly hasReturn: boolean
  /** The loadings before the last, for drawing only. */
  readonly earlier: TensileRecord['earlier']
}

/** A turn counts once the extension has gone back by this part of its whole range. Setting: above any machine's noise, below any cycle. */
export const TURN_SHARE = 0.1
/** Readings kept of a loading, and of its return: means over equal steps of extension. */
const KEPT = { loading: 24, return: 16 }
const KEPT_OF_EARLIER = 16

/** Loadings and returns of a run, by the turns of its extension. A run that only rises is one cycle without return. */
export function tensileCycles({ extensions }: Pick<TensileRun, 'extensions'>): readonly TensileCycle[] {
  const rows = extensions.length
  if (rows === 0) return []
  let least = Infinity
  let most = -Infinity
  for (let i = 0; i < rows; i++) {
    least = Math.min(least, extensions[i]!)
    most = Math.max(most, extensions[i]!)
  }
  const back = TURN_SHARE * (most - least)
  const cycles: TensileCycle[] = []
  let from = 0
  let extreme = 0
  let rising = true
  let turn = 0
  for (let i = 1; i < rows; i++) {
    const now = extensions[i]!
    const far = extensions[extreme]!
    if (rising ? now >= far : now <= far) {
      extreme = i
      continue
    }
    if (Math.abs(now - far) <= back) continue
    if (rising) turn = extreme
    else {
      cycles.push({ from, turn, to: extreme + 1 })
      from = extreme
    }
    rising = !rising
    extreme = i
  }
  if (rising) cycles.push({ from, turn: extreme, to: extreme + 1 })
  else cycles.push({ from, turn, to: rows })
  return cycles
}

/** Means of load and extension over equal steps of extension between two rows; empty steps are left out. */
function thinned({ loads, extensions }: TensileRun, from: number, to: number, steps: number): { load: number; extension: number }[] {
  const start = Math.min(extensions[from]!, extensions[to - 1]!)
  const end = Math.max(extensions[from]!, extensions[to - 1]!)
  const sums = Array.from({ length: steps }, () => ({ load: 0, extension: 0, count: 0 }))
  for (let i = from; i < to; i++) {
    const share = (extensions[i]! - start) / (end - start)
    if (!(share >= 0 && share <= 1)) continue
    const sum = sums[Math.min(steps - 1, Math.floor(share * steps))]!
    sum.load += loads[i]!
    sum.extension += extensions[i]!
    sum.count++
  }
  return sums.filter((sum) => sum.count > 0).map((sum) => ({ load: sum.load / sum.count, extension: sum.extension / sum.count }))
}

/** A loading ends near its largest load; where much less is left at its end, the strip slipped or tore. Setting. */
const LEAST_AT_TURN = 0.7

function largestLoad({ loads }: TensileRun, { from, turn }: TensileCycle): number {
  let most = -Infinity
  for (let i = from; i <= turn; i++) most = Math.max(most, loads[i]!)
  return most
}

/** Means that rise in both: where a machine's noise makes the load of neighbours fall, they are pooled, so that none is preferred. */
function rising(points: readonly { readonly load: number; readonly extension: number }[], zero: number) {
  const knots = risingKnots(points.map(({ load, extension }) => ({ strain: extension - zero, tension: load })))
  return knots.slice(1).map(({ strain, tension }) => ({ load: tension, extension: strain + zero }))
}

const problem = (code: string, message: string, todo: string): { readonly ok: false; readonly problem: Problem } =>
  fail({ code, message, todo })

/**
 * A tensile run as a specimen: of the cycles the last loading and the return after it count, earlier ones are kept for drawing. The
 * thousands of rows are thinned to means over equal steps of extension, with the turning point as it was read. Clamp distance is the gauge.
 */
export function readTensile(run: TensileRun, strip: { readonly width: Mm; readonly gauge: Mm }): Result<TensileReading> {
  const rows = Math.min(run.loads.length, run.extensions.length)
  if (rows < 3) return problem('run-too-short', 'The run has fewer than three rows of figures.', 'Export the whole run from the machine.')
  if (!(strip.width > 0)) return problem('width-impossible', 'The strip has no width.', 'Measure the strip across.')
  if (!(strip.gauge > 0))
    return problem('gauge-impossible', 'The clamp distance is missing.', 'Measure between the clamps before any load.')
  const cycles = tensileCycles(run)
  const last = cycles.at(-1)!
  const top = { load: run.loads[last.turn]!, extension: run.extensions[last.turn]! - run.extensions[0]! }
  if (!(top.load > 0))
    return problem('run-without-load', 'No load stands at the largest extension.', 'Choose the column of the load, and its sign.')
  if (!(top.extension > 0)) return problem('run-without-extension', 'The strip does not get longer.', 'Choose the column of the extension.')
  if (top.load < LEAST_AT_TURN * largestLoad(run, last))
    return problem(
      'load-falls',
      'The load falls while the strip gets longer: it slipped in the clamps, tore, or the columns are exchanged.',
      'Look at the clamps and run another strip, or choose the columns of load and extension.',
    )
  const zero = run.extensions[0]!
  const readings: StretchReading[] = []
  const keep = (on: StretchReading['on'], points: readonly { load: number; extension: number }[]) => {
    for (const { load, extension } of points) {
      if (load > 0 && extension - zero > 0) readings.push({ load: newton(load), length: mm(strip.gauge + extension - zero), on })
    }
  }
  const turn = { load: run.loads[last.turn]!, extension: run.extensions[last.turn]! }
  const below = thinned(run, last.from, last.turn + 1, KEPT.loading).filter(({ load }) => load < turn.load)
  keep('loading', [...rising(below, zero), turn])
  const hasReturn = last.to > last.turn + 1
  if (hasReturn) keep('return', rising(thinned(run, last.turn, last.to, KEPT.return), zero).toReversed())
  const earlier = cycles.slice(0, -1).map((cycle) =>
    thinned(run, cycle.from, cycle.turn + 1, KEPT_OF_EARLIER).map(({ load, extension }) => ({
      strain: strain((extension - zero) / strip.gauge),
      tension: newtonPerMetre((Math.max(0, load) * 1000) / strip.width),
    })),
  )
  return succeed({
    specimen: { width: strip.width, gauge: strip.gauge, readings, restLength: null },
    rows,
    cycles: cycles.length,
    hasReturn,
    earlier,
  })
}
