import type { Working, WorkingInput } from '../units/working'
import type { LayerShare } from './contributions'
import { sewnWidth } from './stack'
import type { Layer, RingSegment } from './types'

/** What of a layer opens its working. */
export type LayerFigure = 'pull' | 'stretchLeft' | 'thickness' | 'width'

const input = (symbol: string, label: string, value: number, unit: WorkingInput['unit'], from: WorkingInput['from']): WorkingInput => ({
  symbol,
  label,
  value,
  unit,
  from,
})

/** The working behind what one layer brings to a segment at the garment's strain e; `width` is the segment's, mm. */
export function layerWorking(
  layer: Layer,
  share: LayerShare,
  segment: RingSegment,
  width: number,
  e: number,
  figure: LayerFigure,
): Working {
  const rho = sewnWidth(segment.sewn, layer.id)
  const from = layer.cloth.curve.kind === 'assumed' ? ('assumed' as const) : ('measured' as const)
  const name = layer.label.toLowerCase()
  const laid = [
    input('e', 'Strain of the garment', e, 'ratio', 'computed'),
    input('r', 'Cut ratio of the layer', layer.cutRatio, 'ratio', 'chosen'),
    ...(rho > 0
      ? [
          input('rho', 'Rigid width sewn to this layer', rho, 'mm', 'chosen'),
          input('w', 'Cloth width of the segment', width, 'mm', 'computed'),
        ]
      : []),
  ]
  const own = rho > 0 ? '((1 + e) w - rho) / (r w - rho) - 1' : '(1 + e) / r - 1'
  switch (figure) {
    case 'pull':
      return {
        title: `Pull, ${name}`,
        formula: layer.rigid ? '0 up to r - 1; beyond it what the ring asks, not known from its stretch' : `n T(x), x = ${own}`,
        inputs: [
          ...laid,
          input('n', 'Layers of it', layer.count, 'count', 'chosen'),
          input('x', 'Strain of the layer', share.strain, 'ratio', 'computed'),
          ...(layer.rigid
            ? []
            : [
                input('a', 'Slope at no stretch', layer.cloth.curve.a, 'N/m', from),
                input('b', 'Stiffening', layer.cloth.curve.b, 'N/m', from),
              ]),
        ],
        result: { value: share.tension ?? 0, unit: 'N/m' },
        source: 'derived: layers side by side follow one strain and their tensions add',
        notes: [
          ...(share.tension === null ? ['The layer is at its stop: the figure is the least it carries.'] : []),
          'Two equal layers have measured 1.3 to 1.7 times one where the sum says 2.',
          'A slack layer pulls nothing.',
        ],
      }
    case 'stretchLeft':
      return {
        title: `Stretch left, ${name}`,
        formula: layer.rigid ? 'r - 1 - e' : rho > 0 ? '(rho + (r w - rho)(1 + u)) / w - 1 - e' : 'r (1 + u) - 1 - e',
        inputs: [...laid, ...(layer.rigid ? [] : [input('u', 'Wear limit of the cloth', share.wearLimit, 'ratio', 'setting')])],
        result: { value: share.stretchLeft, unit: 'ratio' },
        source: 'wear limit: the strain of acceptable recovery, else half the tested stretch (workroom setting)',
        notes: ['Below zero the limit is passed. The least of the layers is what the plan has left.'],
      }
    case 'thickness':
      return {
        title: `Thickness, ${name}`,
        formula: 'n t',
        inputs: [
          input('n', 'Layers of it', layer.count, 'count', 'chosen'),
          input('t', 'Thickness of one', layer.cloth.thickness, 'mm', 'measured'),
        ],
        result: { value: share.thickness, unit: 'mm' },
        source: 'derived',
        notes: ['Measured at rest; stretched cloth is thinner, so the middle of the layers lies a little further in.'],
      }
    case 'width':
      return {
        title: `Cut width, ${name}`,
        formula: 'q r w; q = 1 + 2 pi z / (G + pi t), 1 for layers cut as one',
        inputs: [
          input('q', 'Turn of cloth', share.turn, 'ratio', 'computed'),
          input('r', 'Cut ratio of the layer', layer.cutRatio, 'ratio', 'chosen'),
          input('w', 'Cloth width of the segment', width, 'mm', 'computed'),
        ],
        result: { value: share.width, unit: 'mm' },
        source: 'derived: the circle that lies z outside or inside the middle of the layers',
        notes: ['For a layer that is a piece of its own. The body is taken as round here: a flat front turns less.'],
      }
  }
}
