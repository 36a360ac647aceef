import { formatPercent, plainDecimal } from '../units/format'
import type { CautionFigure } from './define'
import { defineCaution } from './define'

const ratio = (value: number): CautionFigure => ({ value, unit: 'ratio' })
const count = (value: number): CautionFigure => ({ value, unit: 'count' })

/** A cloth by the name the workroom gave it. */
export interface ClothFacts {
  readonly cloth: string
}

/** The direction laid round the body stretches less than another tested one. */
export const lowStretchDirection = defineCaution<
  ClothFacts & { readonly direction: string; readonly stretch: number; readonly other: string; readonly otherStretch: number }
>('low-stretch-direction', {
  severity: 'caution',
  message: ({ cloth, direction, stretch, other, otherStretch }) =>
    `${cloth} is laid ${direction} round the body, where it stretches ${formatPercent(stretch)}; ${other} it stretches ${formatPercent(otherStretch)}.`,
  maker: ({ cloth, direction }) => `${cloth}: laid ${direction} round the body on the plan; check the arrow before cutting.`,
  figure: ({ stretch }) => ratio(stretch),
  limit: ({ otherStretch }) => ratio(otherStretch),
  source: 'common practice: the greatest stretch goes round the body',
  todo: 'Turn the cloth, or say in the plan that it is meant.',
})

/** Recovery too low. */
export const recoveryLow = defineCaution<ClothFacts & { readonly recovery: number; readonly limit: number }>('recovery-low', {
  severity: 'caution',
  message: ({ cloth, recovery }) => `${cloth} recovers ${formatPercent(recovery)} of its stretch: it will lose hold as it is worn.`,
  maker: ({ cloth }) => `${cloth}: recovers little.`,
  figure: ({ recovery }) => ratio(recovery),
  limit: ({ limit }) => ratio(limit),
  source: 'workroom setting; compression knits recover over 95 % at once, J. Fiber Bioeng. Inform. 4:1 (2011) (read)',
  todo: 'Take another cloth where hold counts, or wear it at less stretch.',
})

/** Growth too high. */
export const growthHigh = defineCaution<ClothFacts & { readonly growth: number; readonly limit: number }>('growth-high', {
  severity: 'caution',
  message: ({ cloth, growth }) => `${cloth} stayed ${formatPercent(growth, 1)} longer after its rest.`,
  maker: ({ cloth }) => `${cloth}: grows with wear.`,
  figure: ({ growth }) => ratio(growth),
  limit: ({ limit }) => ratio(limit),
  source: 'workroom setting, common practice',
  todo: 'Test again after a longer rest; else wear it at less stretch.',
})

/** No test in the direction and state that the plan needs. */
export const testMissing = defineCaution<ClothFacts & { readonly direction: string; readonly state: string }>('test-missing', {
  severity: 'stop',
  message: ({ cloth, direction, state }) => `${cloth} has no stretch test ${direction}, ${state}.`,
  maker: ({ cloth }) => `${cloth}: stretch test missing.`,
  source: 'workroom rule',
  todo: 'Pull a strip in that direction.',
})

/** Fewer than three specimens. */
export const testFewSpecimens = defineCaution<ClothFacts & { readonly specimens: number; readonly spread: number }>('test-few-specimens', {
  severity: ({ specimens }) => (specimens === 1 ? 'caution' : 'note'),
  message: ({ cloth, specimens, spread }) =>
    `${cloth} was tested on ${specimens === 1 ? 'a single specimen' : `${specimens} specimens`}; a spread of ${formatPercent(spread)} is assumed.`,
  maker: ({ cloth }) => `${cloth}: tested on few specimens.`,
  figure: ({ specimens }) => count(specimens),
  limit: () => count(3),
  source: 'workroom setting',
  todo: 'Pull three strips from different places.',
})

/** Specimens that differ widely. */
export const specimensDiffer = defineCaution<ClothFacts & { readonly spread: number; readonly limit: number }>('specimens-differ', {
  severity: 'caution',
  message: ({ cloth, spread }) => `The specimens of ${cloth} differ by ${formatPercent(spread)} of their mean.`,
  maker: ({ cloth }) => `${cloth}: the test specimens differ widely.`,
  figure: ({ spread }) => ratio(spread),
  limit: ({ limit }) => ratio(limit),
  source: 'workroom setting without a source',
  todo: 'Read the strips again; cut new ones from the middle of the cloth.',
})

/** A fitted curve that misses its readings. */
export const curveScatter = defineCaution<ClothFacts & { readonly residual: number; readonly limit: number }>('curve-scatter', {
  severity: 'caution',
  message: ({ cloth, residual }) => `The load curve of ${cloth} misses its readings by ${formatPercent(residual)} of the largest.`,
  maker: ({ cloth }) => `${cloth}: the stretch readings scatter.`,
  figure: ({ residual }) => ratio(residual),
  limit: ({ limit }) => ratio(limit),
  source: 'workroom setting',
  todo: 'Look for a reading that was written down wrong, or pull the strip again.',
})

/** A curve from one load only. */
export const testOneStep = defineCaution<ClothFacts>('test-one-step', {
  severity: 'note',
  message: ({ cloth }) => `${cloth} was read under one load only; its load curve is taken to be straight.`,
  maker: ({ cloth }) => `${cloth}: read under one load only.`,
  source: 'derived: one reading gives a straight line',
  todo: 'Hang two more weights, one lighter and one heavier.',
})

/** An old test. */
export const testOld = defineCaution<ClothFacts & { readonly months: number; readonly limit: number }>('test-old', {
  severity: 'caution',
  message: ({ cloth, months }) => `The stretch test of ${cloth} is ${plainDecimal(months, 0)} months old.`,
  maker: ({ cloth }) => `${cloth}: stretch test is old.`,
  figure: ({ months }) => count(months),
  limit: ({ limit }) => count(limit),
  source: 'workroom setting: a year',
  todo: 'Pull a new strip from the cloth that will be cut.',
})

/** Only a stretch percentage is known. */
export const testAssumed = defineCaution<ClothFacts & { readonly because: 'hold' | 'wearer' | null }>('test-assumed', {
  severity: ({ because }) => (because === null ? 'caution' : 'stop'),
  message: ({ cloth, because }) =>
    `Hold unknown, pull a strip: of ${cloth} only a stretch percentage is known${because === 'hold' ? ', and firm hold is asked for' : because === 'wearer' ? ', and this wearer has a limit' : ''}.`,
  maker: ({ cloth }) => `${cloth}: hold unknown, pull a strip.`,
  source: 'assumption: the stretch was read somewhere between 100 and 500 N/m; the cut is solved at 500',
  todo: 'Hang known weights on a strip and enter the lengths.',
})

/** Worn beyond the tested range. */
export const testExtrapolated = defineCaution<ClothFacts & { readonly strain: number; readonly testedTo: number }>('test-extrapolated', {
  severity: 'caution',
  message: ({ cloth, strain, testedTo }) =>
    `${cloth} is worn at ${formatPercent(strain)} stretch but was tested to ${formatPercent(testedTo)} only.`,
  maker: ({ cloth }) => `${cloth}: worn beyond its tested range.`,
  figure: ({ strain }) => ratio(strain),
  limit: ({ testedTo }) => ratio(testedTo),
  source: 'derived',
  todo: 'Test with heavier weights, or cut the ring larger.',
})

/** A dry test where the garment is for water, or wet. */
export const testDryForWater = defineCaution<ClothFacts>('test-dry-for-water', {
  severity: 'caution',
  message: ({ cloth }) => `${cloth} was tested dry, and the garment is for water.`,
  maker: ({ cloth }) => `${cloth}: not tested wet.`,
  source: 'workroom rule: water garments are looked at in both states',
  todo: 'Pull a strip wet.',
})

/** A wet test where the plan is dry. */
export const testWetForDry = defineCaution<ClothFacts>('test-wet-for-dry', {
  severity: 'note',
  message: ({ cloth }) => `${cloth} was tested wet only, and the plan is dry.`,
  maker: ({ cloth }) => `${cloth}: not tested dry.`,
  source: 'workroom rule',
  todo: 'Pull a strip dry.',
})
