import { draftFrame } from './frame'
import type { Frame } from './frame'
import { drawnUpper, openingOf } from './opening'
import { cutStretch } from './stretches'
import type { BodiceStyle, DraftInput } from './types'

/** The turned end of a princess seam or dart in the armhole stays this far above the underarm, mm. */
const ABOVE_UNDERARM = 15

/** And this far inside it, mm. */
const INSIDE_UNDERARM = 15

/** Room left to the bust angle's turned end on the armhole, above the underarm and inside it, mm; infinite where it opens elsewhere. */
function turnedEndRoom(frame: Frame, style: BodiceStyle): number {
  const drawn = drawnUpper(frame.front, 'front', style)
  const opening = openingOf({ frame, style, zone: 'front' }, drawn)
  if (opening === null || opening.edge !== 'armhole') return Infinity
  const end = cutStretch(drawn.armhole, opening.share, 'princess')[0].rail.nodes.at(-1)
  if (end === undefined) return Infinity
  const turned = frame.bust.turn(end.at)
  return Math.min(turned.y - frame.front.underarm.y - ABOVE_UNDERARM, frame.front.underarm.x - turned.x - INSIDE_UNDERARM)
}

/**
 * The frame with the bust angle no larger than a seam or dart into the armhole allows: its turned end 15 mm above the
 * underarm and inside it, to a hundredth of a degree.
 */
export function heldFrame(input: DraftInput, frame: Frame): Frame {
  const { style } = input
  if (style.top !== null || frame.bust.angle === 0 || turnedEndRoom(frame, style) >= 0) return frame
  let low = 0
  let high = frame.bust.angle
  while (high - low > 1.7e-4) {
    const middle = (low + high) / 2
    const tried = draftFrame(input, middle)
    if (turnedEndRoom(tried, style) >= 0) low = middle
    else high = middle
  }
  return draftFrame(input, low)
}
