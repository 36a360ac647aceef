import { z } from 'zod'
import type {
  Layer,
  LayerCloth,
  LayerPlan,
  LoadCurve,
  RingGeometry,
  RingMode,
  RingSolution,
  StretchFigures,
  StretchTest,
} from '../domain/textile/types'
import { figure, length, load, mirrors, pressure, ratio, tension } from './base'

export const direction = z.enum(['lengthwise', 'crosswise', 'bias'])
export const clothState = z.enum(['dry', 'wet'])
const half = z.enum(['front', 'back'])
const label = z.string().max(120)

const reading = z.object({ load: load(0, 2000), length: length(1, 5000), on: z.enum(['loading', 'return']) })
export const specimen = z.object({
  width: length(5, 500),
  gauge: length(10, 1000),
  readings: z.array(reading).min(1, 'Enter at least one load and its length.').max(200),
  restLength: length(1, 5000).nullable(),
})

export const testMethod = z.enum(['workroom strip', 'EN ISO 20932-1', 'ASTM D2594', 'ASTM D3107', 'ASTM D4964', 'other'])

export const tensileRecord = z.object({
  name: z.string().max(200),
  rows: z.number().int().min(0),
  cycles: z.number().int().min(0).max(10_000),
  hasReturn: z.boolean(),
  earlier: z.array(z.array(z.object({ strain: ratio(), tension: tension() })).max(64)).max(60),
})

const protocol = {
  direction,
  state: clothState,
  method: testMethod.optional(),
  methodNote: z.string().trim().max(200, 'Keep it under 200 letters.').optional(),
  dwell: figure(0, 86_400).optional(),
  rest: figure(0, 100_000).optional(),
  angle: figure(0, 90).optional(),
  acceptableStrain: ratio(0.01, 6).optional(),
}

export const stretchTest = mirrors<StretchTest>()(
  z.discriminatedUnion('kind', [
    z.object({
      ...protocol,
      kind: z.literal('strip'),
      specimens: z.array(specimen).min(1, 'Enter at least one specimen.').max(20),
      way: z.enum(['weights', 'one load', 'spring scale', 'machine']).optional(),
      runs: z.array(tensileRecord).max(20).optional(),
    }),
    z.object({
      ...protocol,
      kind: z.literal('label'),
      stretch: ratio(0.01, 6),
      ruler: z.object({ rest: length(0, 5000), drawn: length(0, 30_000) }).optional(),
    }),
  ]),
)

export const loadCurve = mirrors<LoadCurve>()(
  z.object({
    kind: z.enum(['cubic', 'monotone', 'assumed']),
    a: tension(),
    b: tension(),
    knots: z.array(z.object({ strain: ratio(), tension: tension() })).max(500),
    testedTo: ratio(0),
    residual: figure(0),
    spread: figure(0, 100),
    specimens: z.number().int().min(0),
    points: z.array(z.object({ strain: ratio(), tension: tension(), specimen: z.number().int() })).max(4000),
  }),
)

export const stretchFigures = mirrors<StretchFigures>()(
  z.object({ stretch: ratio(), growth: ratio().nullable(), recovery: figure().nullable(), testTension: tension().nullable() }),
)

export const layerCloth = mirrors<LayerCloth>()(
  z.object({
    clothId: z.string().max(60),
    name: label,
    direction,
    angle: figure(0, 90).optional(),
    state: clothState,
    curve: loadCurve,
    figures: stretchFigures,
    thickness: length(0, 50),
    wearLimit: ratio(),
    pullOnLimit: ratio(),
    testedOn: z.string().max(40).nullable(),
  }),
)

const layer = mirrors<Layer>()(
  z.object({
    id: label,
    label,
    cloth: layerCloth,
    count: z.number().int().min(0).max(12),
    cutRatio: figure(0.5, 2),
    rigid: z.boolean().optional(),
    askedAngle: figure(0, 90).optional(),
  }),
)
export const layerPlan = mirrors<LayerPlan>()(z.object({ zone: label, layers: z.array(layer).max(12), state: clothState.optional() }))

const sewn = z.array(z.object({ layer: label, width: length(0, 3000) })).max(12)
const segment = z.object({ id: label, half, plan: layerPlan, share: figure(0, 1), sewn: sewn.optional() })
export const ringGeometry = mirrors<RingGeometry>()(
  z.object({
    level: label,
    name: label,
    girth: length(50, 5000),
    frontShare: figure(0.2, 0.8),
    segments: z.array(segment).max(60),
    rigidFront: length(0, 3000),
    rigidBack: length(0, 3000),
    gapFront: length(0, 3000),
    gapBack: length(0, 3000),
    squeeze: length(0, 500),
    aspect: figure(0.3, 4),
    aspectEstimated: z.boolean(),
    breath: length(0, 300),
  }),
)

const widths = z.array(length(0, 5000)).max(60)
export const ringMode = mirrors<RingMode>()(
  z.discriminatedUnion('solve', [
    z.object({ solve: z.literal('cut'), hold: pressure(0, 20_000) }),
    z.object({ solve: z.literal('tension'), widths }),
    z.object({ solve: z.literal('gap'), widths, tension: tension(0, 20_000), gapIn: half }),
  ]),
)

const interval = z.object({ low: figure(), high: figure() })
export const ringSolution = mirrors<RingSolution>()(
  z.object({
    level: label,
    name: label,
    mode: z.enum(['cut', 'tension', 'gap']),
    girth: length(),
    surface: length(),
    tension: tension(),
    segments: z.array(z.object({ id: label, half, zone: label, width: length(), strain: ratio() })),
    rigidFront: length(),
    rigidBack: length(),
    gapFront: length(),
    gapBack: length(),
    cut: length(),
    thickness: length(),
    k: figure(),
    negativeEase: figure(),
    pressure: pressure(),
    pressureBand: interval,
    cutBand: interval,
    band: z.enum(['light', 'easy', 'firm', 'strong', 'stop']),
    breathPressure: pressure(),
    breathBand: interval,
    breathShort: length(0).optional(),
    sidePressure: pressure(),
    frontPressure: pressure(),
    governs: z.enum(['hold', 'stretch', 'reduction']).nullable(),
    hold: pressure().nullable(),
    assumed: z.boolean(),
    extrapolated: z.boolean(),
    slack: length(),
    aspect: figure(),
    aspectEstimated: z.boolean(),
  }),
)
