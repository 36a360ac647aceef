import { pathLength } from '../geometry/path'
import { lineSegment } from '../geometry/segment'
import { moveBy } from '../geometry/transform'
import { shoulderOf } from './edges'
import type { Frame, HalfFrame } from './frame'
import type { Zone } from './panels'
import { armholeStretch, necklineStretch, nearestOn } from './stretches'
import type { Stretch } from './stretches'
import type { BodiceStyle } from './types'
import { railOf } from './wedges'

/** Where the bust angle opens: at a share of an edge; the princess seam's end, or a dart's. */
export interface Opening {
  readonly edge: 'neckline' | 'shoulder' | 'armhole'
  readonly share: number
}

/** Edges of a half above the bust as drawn, unturned, the armhole down to the underarm turned back. */
export interface DrawnUpper {
  readonly neckline: Stretch
  readonly shoulder: Stretch
  readonly armhole: Stretch
}

/** Draws the edges above the bust of a half in the frame in which its armhole is drawn. */
export function drawnUpper(half: HalfFrame, zone: Zone, style: BodiceStyle): DrawnUpper {
  const shoulder = shoulderOf(half, style)
  const depth = zone === 'front' ? style.necklineFrontDepth : style.necklineBackDepth
  const centre = { x: half.centreX, y: half.neckCentre.y - depth }
  return {
    neckline: necklineStretch(shoulder, centre, style.neckline[zone]),
    shoulder: {
      edge: 'shoulder',
      id: 'shoulder',
      part: 'whole',
      rail: railOf(['neck', 'tip'], [lineSegment(shoulder.neck, shoulder.end)]),
    },
    armhole: armholeStretch({ ...half, underarm: half.underarmDrawn }, shoulder, moveBy(0, 0)),
  }
}

/** A dart keeps this far from the ends of the edge it opens into, as a share of that edge. */
const DART_FROM_END = 0.12

/** Where a dart from the bust point opens: in the nearest of neckline and armhole. */
export function dartOpening(frame: Frame, drawn: DrawnUpper): Opening {
  const clear = (share: number) => Math.min(1 - DART_FROM_END, Math.max(DART_FROM_END, share))
  // Of a square neckline only the level part: a dart does not open in its corner.
  const cornered = drawn.neckline.rail.nodes.some(({ name }) => name === 'corner')
  const level = cornered
    ? { ...drawn.neckline, rail: { ...drawn.neckline.rail, path: drawn.neckline.rail.path.slice(0, 1) } }
    : drawn.neckline
  const part = cornered ? pathLength(level.rail.path) / pathLength(drawn.neckline.rail.path) : 1
  const [neckline, armhole] = [nearestOn(level, frame.bust.bustPoint), nearestOn(drawn.armhole, frame.bust.bustPoint)]
  return neckline.distance < armhole.distance
    ? { edge: 'neckline', share: clear(neckline.share) * part }
    : { edge: 'armhole', share: clear(armhole.share) }
}

/** Where the half's upper edges part at the bust point: at the princess seam, at a dart, or nowhere. */
export function openingOf(
  input: { readonly frame: Frame; readonly style: BodiceStyle; readonly zone: Zone },
  drawn: DrawnUpper,
): Opening | null {
  const { frame, style, zone } = input
  if (style.panels[zone].princess) {
    const { edge, at } = style.princessEnd[zone]
    return { edge, share: edge === 'shoulder' ? style.princessAt : at }
  }
  return zone === 'front' && frame.bust.angle > 0 ? dartOpening(frame, drawn) : null
}
