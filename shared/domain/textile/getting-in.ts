import { mm, newtonPerMetre, type Mm, type NewtonPerMetre } from '../units/brand'
import { fixedDecimal } from '../units/format'
import type { Working, WorkingInput } from '../units/working'
import { seriesTension } from './ring'
import { segmentPullOnLimit, stackOfSegment } from './segment'
import { strainOfStack, tensionOfStack, type Stack } from './stack'
import type { RingGeometry } from './types'

/** Within this part of what it has to pass a level is tight. Source: setting, common practice. */
export const TIGHT_WITHIN = 0.03
/** Pull for getting in above which it is a caution, N per 100 mm of height. Source: setting. */
export const MOST_PULL = 100

/** How a level is open while the garment is put on: closed, by a typed width, or over its whole length. */
export type Opening = { readonly kind: 'closed' } | { readonly kind: 'by'; readonly width: Mm } | { readonly kind: 'whole' }

export type PassVerdict = 'open' | 'passes' | 'tight' | 'cannot'

export interface LevelPass {
  readonly level: string
  readonly name: string
  readonly needs: Mm
  /** How far round the level reaches at the pull-on limit of its cloths, mm; 0 for one that is open over its whole length. */
  readonly reach: Mm
  /** Tension at which the first cloth meets its pull-on limit, N/m. */
  readonly limit: NewtonPerMetre
  /** Tension that it takes to pass, N/m; null where it cannot. */
  readonly tension: NewtonPerMetre | null
  /** The same as a pull by hand, N per 100 mm of height. */
  readonly pull: number | null
  readonly verdict: PassVerdict
}

const strainOf = (stack: Stack, tension: number): number => (stack.pulls ? strainOfStack(stack, tension) : stack.free)

/**
 * Whether one level passes a girth on the way on or off, closures open. Reach = sum w (1 + e(T_in)) + rigid + opening, T_in the least
 * tension at which a plan meets its pull-on limit: one tension runs round. Rigid layers give up to their stop and no further. An opening takes the place of the lacing gap. No stitch limit is
 * applied: there is no stitch plan yet. Widths mm, one for each segment.
 */
export function passLevel(geometry: RingGeometry, widths: readonly Mm[], opening: Opening, needs: Mm): LevelPass {
  const named = { level: geometry.level, name: geometry.name, needs }
  const stacks = geometry.segments.map((segment, i) => stackOfSegment(segment, widths[i]!))
  const pulling = stacks.flatMap((stack, i) => {
    if (!(widths[i]! > 0) || !stack.pulls) return []
    const strain = segmentPullOnLimit(geometry.segments[i]!, widths[i]!)
    return [{ tension: tensionOfStack(stack, strain), atStop: tensionOfStack(stack, stack.stop) }]
  })
  const first = Math.min(...pulling.map((one) => one.tension))
  const limit = newtonPerMetre(Number.isFinite(first) ? first : Math.max(0, ...pulling.map((one) => one.atStop)))
  if (opening.kind === 'whole') return { ...named, reach: mm(0), limit, tension: newtonPerMetre(0), pull: 0, verdict: 'open' }
  const open = opening.kind === 'by' ? opening.width : geometry.gapFront + geometry.gapBack
  const fixed = geometry.rigidFront + geometry.rigidBack + open
  const reach = mm(stacks.reduce((sum, stack, i) => sum + widths[i]! * (1 + strainOf(stack, limit)), fixed))
  if (reach < needs || pulling.length === 0) {
    const loose = reach >= needs
    return {
      ...named,
      reach,
      limit,
      tension: loose ? newtonPerMetre(0) : null,
      pull: loose ? 0 : null,
      verdict: loose ? 'passes' : 'cannot',
    }
  }
  const tension = newtonPerMetre(seriesTension(stacks, widths, Math.max(0, needs - fixed)))
  return { ...named, reach, limit, tension, pull: tension / 10, verdict: reach < needs * (1 + TIGHT_WITHIN) ? 'tight' : 'passes' }
}

/** The working behind the reach and the pull of a level. */
export function passWorking(
  pass: LevelPass,
  geometry: RingGeometry,
  opening: Opening,
  needs: { readonly from: string; readonly estimated: boolean },
): Working {
  const open = opening.kind === 'by' ? opening.width : geometry.gapFront + geometry.gapBack
  const input = (symbol: string, label: string, value: number, unit: 'mm' | 'N/m', from: WorkingInput['from']) => ({
    symbol,
    label,
    value,
    unit,
    from,
  })
  return {
    title: `${pass.name}: on the way on and off`,
    formula: 'reach = Σ w (1 + e(T_in)) + rigid + opening; pull = T / 10 per 100 mm, T where the reach is what it has to pass',
    inputs: [
      input('T_in', 'Tension at the first pull-on limit', pass.limit, 'N/m', 'computed'),
      input('rigid', 'Rigid widths', geometry.rigidFront + geometry.rigidBack, 'mm', 'chosen'),
      input('opening', 'Opening', open, 'mm', 'chosen'),
      input('needs', `What it has to pass: ${needs.from}`, pass.needs, 'mm', needs.estimated ? 'estimate' : 'measured'),
    ],
    result: { value: pass.reach, unit: 'mm' },
    source: 'derived; pull-on limit .9 of the tested stretch: a setting',
    notes: [
      `Tight within ${fixedDecimal(TIGHT_WITHIN * 100, 0)} % of what it has to pass; a caution above ${MOST_PULL} N per 100 mm (setting).`,
      'No stitch limit is applied: there is no stitch plan yet. A seam or hem along the level may give less.',
      'Skin, friction and a tilted way on are left out: arms pass one after the other, so shoulders ask for less than their girth.',
    ],
  }
}
