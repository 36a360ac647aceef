import { pathReverse } from '../geometry/path'
import { moveBy } from '../geometry/transform'
import type { Transform } from '../geometry/transform'
import type { Point, Segment } from '../geometry/types'
import { fairBustCorner } from './bust-angle'
import type { BustAngle } from './bust-angle'
import type { Frame } from './frame'
import type { DrawnUpper } from './opening'
import type { SeamLine, Zone } from './panels'
import type { Stretch } from './stretches'
import type { BodiceStyle, EdgeNode } from './types'
import { railThen } from './wedges'
import type { Rail } from './wedges'

/** The two edges of a panel from the hem up. */
export interface PanelRails {
  readonly left: Rail
  readonly right: Rail
}

/** Panels with their edges up to the end and what bounds each of them above, from the centre outwards. */
export interface UpperHalf {
  readonly rails: readonly PanelRails[]
  readonly uppers: readonly (readonly Stretch[])[]
}

/** What the upper part of a half is drawn from. */
export interface UpperInput {
  readonly frame: Frame
  readonly style: BodiceStyle
  readonly zone: Zone
  readonly lines: readonly SeamLine[]
  /** Edges of the panels from the hem up to the bust. */
  readonly below: readonly PanelRails[]
  /** The edges above as drawn; not used under a top edge. */
  readonly drawn: DrawnUpper | null
}

/** Where a rail that ends at the bust ends. */
export const bustOf = (rail: Rail): Point => (rail.nodes.at(-1) as EdgeNode).at

/** The side panel's princess edge from the hem up: faired at the bust, turned above it. `above` is given unturned. */
export function turnedEdge(below: Rail, above: Rail, bust: BustAngle): { readonly rail: Rail; readonly turned: Transform } {
  if (bust.angle === 0)
    return { rail: { path: [...below.path, ...above.path], nodes: [...below.nodes, ...above.nodes.slice(1)] }, turned: moveBy(0, 0) }
  const edge = fairBustCorner(bust, above.path, pathReverse(below.path))
  const downwards = pathReverse(edge.down)
  const names = [...below.nodes.slice(0, -1), { name: 'fairing-below', at: (downwards.at(-1) as Segment).from, level: null }]
  const rail: Rail = { path: downwards, nodes: [...names, below.nodes.at(-1) as EdgeNode] }
  const upNodes = [{ name: 'fairing-above', level: null }, ...above.nodes.slice(1).map(({ name, level }) => ({ name, level }))]
  return {
    turned: edge.turned,
    rail: railThen(
      rail,
      edge.up.map((segment, index) => ({ segment, ...(upNodes[index] as Pick<EdgeNode, 'name' | 'level'>) })),
    ),
  }
}
