import type { Mm, NewtonPerMetre, Strain } from '../units/brand'
import { mm, newtonPerMetre, strain } from '../units/brand'
import { tensionAt } from './load-curve'
import { turnOfCloth } from './plan'
import { layerStrainIn } from './segment'
import { sewnWidth } from './stack'
import type { RingSegment } from './types'

/** What one layer of a segment brings, all of its count together. */
export interface LayerShare {
  readonly id: string
  readonly label: string
  readonly count: number
  readonly rigid: boolean
  /** Its own strain, negative while it lies slack. */
  readonly strain: Strain
  /** What it pulls, N/m; null for a rigid layer at its stop: what it carries is not known from its stretch. */
  readonly tension: NewtonPerMetre | null
  /** Its part of what the layers pull together, 0 to 1; null where a rigid layer carries an unknown part. */
  readonly pullShare: number | null
  /** Further strain of the garment until this layer meets its wear limit, or a rigid one its stop; negative: passed. */
  readonly stretchLeft: Strain
  /** The same until its pull-on limit. */
  readonly pullOnLeft: Strain
  /** Limits as strains of the layer itself, for the ticks of a picture; 0 for a rigid layer. */
  readonly wearLimit: Strain
  readonly pullOnLimit: Strain
  readonly testedTo: Strain
  readonly thickness: Mm
  readonly thicknessShare: number
  /** q: how much wider a piece of its own is cut for lying outside or inside the plan's middle; 1 for layers cut as one. */
  readonly turn: number
  /** Width this layer is cut, q r w, mm once round the body: what a piece of its own is drafted to. */
  readonly width: Mm
}

/** How far past its stop a strain is still read as on it. */
const AT_STOP = 1e-9

/**
 * What each layer of a segment contributes when the garment's strain is e: stretch left, pull and thickness. Layers from the outside in.
 * Width of the segment and girth in mm. A layer of cut ratio 1 is cut with the others and gets no turn.
 */
export function layerShares(segment: RingSegment, width: Mm, e: number, girth: Mm): readonly LayerShare[] {
  const { plan } = segment
  const rows = plan.layers.map((layer, i) => {
    const share = width > 0 ? sewnWidth(segment.sewn, layer.id) / width : 0
    const own = layerStrainIn(segment, layer, width, e)
    const rigid = layer.rigid === true
    const limit = (at: number) => share + (layer.cutRatio - share) * (1 + at) - 1 - e
    return {
      layer,
      own,
      rigid,
      stopped: rigid && layer.count > 0 && own >= -AT_STOP,
      tension: rigid ? 0 : layer.count * tensionAt(layer.cloth.curve, own),
      stretchLeft: strain(limit(rigid ? 0 : layer.cloth.wearLimit)),
      pullOnLeft: strain(limit(rigid ? 0 : layer.cloth.pullOnLimit)),
      thickness: layer.count * layer.cloth.thickness,
      turn: layer.cutRatio === 1 ? 1 : turnOfCloth(plan, i, girth),
    }
  })
  const pull = rows.reduce((sum, row) => sum + row.tension, 0)
  const thickness = rows.reduce((sum, row) => sum + row.thickness, 0)
  const unknown = rows.some((row) => row.stopped)
  return rows.map((row) => ({
    id: row.layer.id,
    label: row.layer.label,
    count: row.layer.count,
    rigid: row.rigid,
    strain: row.own,
    tension: row.stopped ? null : newtonPerMetre(row.tension),
    pullShare: unknown ? null : pull > 0 ? row.tension / pull : 0,
    stretchLeft: row.stretchLeft,
    pullOnLeft: row.pullOnLeft,
    wearLimit: strain(row.rigid ? 0 : row.layer.cloth.wearLimit),
    pullOnLimit: strain(row.rigid ? 0 : row.layer.cloth.pullOnLimit),
    testedTo: strain(row.rigid ? 0 : row.layer.cloth.curve.testedTo),
    thickness: mm(row.thickness),
    thicknessShare: thickness > 0 ? row.thickness / thickness : 0,
    turn: row.turn,
    width: mm(row.turn * row.layer.cutRatio * width),
  }))
}
