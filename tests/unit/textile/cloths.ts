import type { Layer, LayerCloth, LayerPlan, RingGeometry, RingSegment, TextileSettings } from '../../../shared/domain/textile/types'
import { DEFAULT_TEXTILE_SETTINGS } from '../../../shared/domain/textile/defaults'
import { mm, newtonPerMetre, strain } from '../../../shared/domain/units/brand'

/** Invented cloths for the tests: a, b in N/m, limits as strains. */
export function cloth(
  a: number,
  b: number,
  more: { spread?: number; thickness?: number; wear?: number; pullOn?: number; testedTo?: number; kind?: 'cubic' | 'assumed' } = {},
): LayerCloth {
  const testedTo = more.testedTo ?? 1
  return {
    clothId: `cloth-${a}-${b}`,
    name: 'An invented cloth',
    direction: 'crosswise',
    state: 'dry',
    curve: {
      kind: more.kind ?? 'cubic',
      a: newtonPerMetre(a),
      b: newtonPerMetre(b),
      knots: [],
      testedTo: strain(testedTo),
      residual: 0,
      spread: more.spread ?? 0.05,
      specimens: 3,
      points: [],
    },
    figures: { stretch: strain(testedTo), growth: strain(0.02), recovery: 0.96, testTension: newtonPerMetre(500) },
    thickness: mm(more.thickness ?? 0),
    wearLimit: strain(more.wear ?? 10),
    pullOnLimit: strain(more.pullOn ?? 0.9),
    testedOn: '2024-03-01',
  }
}

export const layer = (of: LayerCloth, count = 1, cutRatio = 1): Layer => ({
  id: `${of.clothId}-${count}-${cutRatio}`,
  label: 'layer',
  cloth: of,
  count,
  cutRatio,
})

export const plan = (...layers: readonly Layer[]): LayerPlan => ({ zone: 'body', layers })

export const segment = (half: 'front' | 'back', of: LayerPlan, share = 1): RingSegment => ({
  id: `${half}-${share}`,
  half,
  plan: of,
  share,
})

export function ring(segments: readonly RingSegment[], more: Partial<RingGeometry> = {}): RingGeometry {
  return {
    level: 'waist',
    name: 'Waist',
    girth: mm(700),
    frontShare: 0.5,
    segments,
    rigidFront: mm(0),
    rigidBack: mm(0),
    gapFront: mm(0),
    gapBack: mm(0),
    squeeze: mm(0),
    aspect: 1,
    aspectEstimated: true,
    breath: mm(20),
    ...more,
  }
}

/** Settings under which no reduction governs. */
export const FREE: TextileSettings = { ...DEFAULT_TEXTILE_SETTINGS, largestReduction: 0.95 }

export function must<T>(result: { ok: true; value: T } | { ok: false; problem: { code: string; message: string } }): T {
  if (!result.ok) throw new Error(`${result.problem.code}: ${result.problem.message}`)
  return result.value
}
