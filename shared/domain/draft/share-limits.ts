import type { Problem } from '../units/result'
import { centreTakes } from './panels'
import type { Zone } from './panels'
import type { BodiceStyle, FurtherSeam, SeamShares } from './types'

/** What further seams may take of the wedge together. */
const FURTHER_MOST = 0.9

function listProblems(at: string, what: string, shares: SeamShares): readonly Problem[] {
  const values = [shares.centre, shares.princess, shares.side]
  const sum = values.reduce((total, share) => total + share, 0)
  if (values.every((share) => Number.isFinite(share) && share >= 0) && Math.abs(sum - 1) <= 1e-6) return []
  return [
    {
      code: 'style-shares',
      message: `The seams' shares of the ${what} must be 0 or more and add up to 1; they add up to ${sum.toFixed(2)}.`,
      todo: `Change one of them by ${(1 - sum).toFixed(2)}, so that they add up to 1.`,
      at: `style.${at}`,
    },
  ]
}

/** A list whose every share lies at seams that the half does not have, or that may not take any. */
function idleProblems(at: string, what: string, shares: SeamShares, style: BodiceStyle, zone: Zone): readonly Problem[] {
  const takes = centreTakes(zone === 'front' ? style.centreFront : style.centreBack, style.openingsTake[zone])
  const left = shares.side + (style.panels[zone].princess ? shares.princess : 0) + (takes ? shares.centre : 0)
  if (left > 1e-9) return []
  return [
    {
      code: 'style-shares-idle',
      message: `All shares of the ${what} lie at a centre or princess seam that can take none.`,
      todo: 'Give the side seam a share: 0.38 in front, 0.36 at the back to begin with.',
      at: `style.${at}`,
    },
  ]
}

/** Wedge shares of a half that do not sum, lie where nothing can be taken in, or leave nothing to the others. */
export function shareProblems(style: BodiceStyle, zone: Zone): readonly Problem[] {
  const key = zone === 'front' ? 'frontShares' : 'backShares'
  const lists = [
    { at: key, what: zone, list: style[key] },
    ...(style.letOut[zone] === null ? [] : [{ at: `letOut.${zone}`, what: `${zone} where it is let out`, list: style.letOut[zone] }]),
  ]
  const sums = lists.flatMap(({ at, what, list }) => {
    const wrong = listProblems(at, what, list)
    return wrong.length > 0 ? wrong : idleProblems(at, what, list, style, zone)
  })
  const further = style.panels[zone].further
  const taken = (own: (seam: FurtherSeam) => number) => further.reduce((sum, seam) => sum + own(seam), 0)
  const most = Math.max(
    taken(({ share }) => share),
    taken(({ share, letOut }) => letOut ?? share),
  )
  const single = further.some(({ share, letOut }) => !(share >= 0) || !((letOut ?? 0) >= 0))
  if (most <= FURTHER_MOST && !single) return sums
  return [
    ...sums,
    {
      code: 'style-shares-further',
      message: `The further seams of the ${zone} take ${Number.isFinite(most) ? most.toFixed(2) : 'no number'} of the shaping together.`,
      todo: `Give each of them at most ${(Math.floor((FURTHER_MOST / Math.max(1, further.length)) * 100) / 100).toFixed(2)}.`,
      at: `style.panels.${zone}`,
    },
  ]
}
