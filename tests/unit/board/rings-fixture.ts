import type { Caution } from '../../../shared/domain/cautions/types'
import type { HoldBand, RingSolution } from '../../../shared/domain/textile/types'
import { mm, newtonPerMetre, pascal, strain } from '../../../shared/domain/units/brand'

interface Sketch {
  readonly level: string
  readonly name: string
  readonly girth: number
  readonly front: number
  readonly back: number
  readonly hold: number
  readonly band: HoldBand
  readonly rigidFront?: number
  readonly rigidBack?: number
  readonly gapBack?: number
  readonly governs?: RingSolution['governs']
}

/** An invented ring whose parts end where the body ends: for drawing, not a solution. */
export function ring(sketch: Sketch): RingSolution {
  const { girth, front, back, rigidFront = 0, rigidBack = 0, gapBack = 0, hold } = sketch
  const surface = girth + Math.PI * 1.6
  const widthFront = (surface * 0.52 - rigidFront) / (1 + front)
  const widthBack = (surface * 0.48 - rigidBack - gapBack) / (1 + back)
  const cut = widthFront + widthBack + rigidFront + rigidBack
  const segment = (id: string, half: 'front' | 'back', width: number, worn: number) => ({
    id,
    half,
    zone: half,
    width: mm(width),
    strain: strain(worn),
  })
  return {
    level: sketch.level,
    name: sketch.name,
    mode: 'cut',
    girth: mm(girth),
    surface: mm(surface),
    tension: newtonPerMetre((hold * girth) / 2 / Math.PI / 1000),
    segments: [
      segment('front-centre', 'front', widthFront * 0.45, front),
      segment('side-front', 'front', widthFront * 0.55, front),
      segment('side-back', 'back', widthBack * 0.55, back),
      segment('back-centre', 'back', widthBack * 0.45, back),
    ],
    rigidFront: mm(rigidFront),
    rigidBack: mm(rigidBack),
    gapFront: mm(0),
    gapBack: mm(gapBack),
    cut: mm(cut),
    thickness: mm(1.6),
    k: cut / girth,
    negativeEase: 100 * (1 - (cut + gapBack) / girth),
    pressure: pascal(hold),
    pressureBand: { low: hold * 0.8, high: hold * 1.2 },
    cutBand: { low: cut * 0.98, high: cut * 1.02 },
    band: sketch.band,
    breathPressure: pascal(hold * 1.3),
    breathBand: { low: hold * 1.05, high: hold * 1.55 },
    sidePressure: pascal(hold * 1.2),
    frontPressure: pascal(hold * 0.85),
    governs: sketch.governs ?? 'hold',
    hold: pascal(sketch.governs === 'stretch' ? hold * 1.3 : hold),
    assumed: false,
    extrapolated: false,
    slack: mm(0),
    aspect: 1.1,
    aspectEstimated: true,
  }
}

export const rings: readonly RingSolution[] = [
  ring({
    level: 'bust',
    name: 'Bust',
    girth: 920,
    front: 0.13,
    back: 0.16,
    hold: 1050,
    band: 'easy',
    rigidFront: 24,
    rigidBack: 30,
    gapBack: 40,
    governs: 'stretch',
  }),
  ring({
    level: 'underbust',
    name: 'Underbust',
    girth: 780,
    front: 0.18,
    back: 0.21,
    hold: 1620,
    band: 'firm',
    rigidFront: 24,
    rigidBack: 30,
    gapBack: 52,
  }),
  ring({
    level: 'waist',
    name: 'Waist',
    girth: 720,
    front: 0.21,
    back: 0.25,
    hold: 2400,
    band: 'strong',
    rigidFront: 24,
    rigidBack: 30,
    gapBack: 72,
  }),
  ring({
    level: 'high-hip',
    name: 'High hip',
    girth: 880,
    front: 0.1,
    back: 0.12,
    hold: 900,
    band: 'easy',
    gapBack: 36,
    governs: 'reduction',
  }),
  ring({ level: 'hip', name: 'Hip', girth: 970, front: 0.04, back: 0.05, hold: 320, band: 'light', governs: 'stretch' }),
]

export const caution = (level: string, severity: Caution['severity'], message: string): Caution => ({
  code: `invented-${severity}`,
  severity,
  place: { kind: 'ring', level },
  message,
  makerMessage: message,
  figure: { value: 2400, unit: 'Pa' },
  limit: { value: 2000, unit: 'Pa' },
  source: 'invented for this test',
  todo: 'Ask for less hold, or take a layer out.',
  clearable: true,
})

export const cautions: readonly Caution[] = [
  caution('waist', 'caution', 'The waist holds strongly: short wear only.'),
  caution('hip', 'note', 'The hip lies light.'),
]
