import { pathFlatten } from '../geometry/path'
import { pointAlong, pointDistance, vectorLeft, vectorUnit } from '../geometry/point'
import type { Path, Point } from '../geometry/types'
import type { LaidBone } from '../structure/types'

/** Chords leave the curve of a channel by no more than this on a drawing, mm. */
const CHORDS = 0.05

/** The channel of a bone as a closed outline: its curve with half its width to either side, square at the ends. */
export function boneOutline({ path, channelWidth }: Pick<LaidBone, 'path' | 'channelWidth'>): Path {
  const points = pathFlatten(path, CHORDS).filter((at, index, all) => index === 0 || pointDistance(at, all[index - 1]!) > 1e-6)
  const side = (way: 1 | -1): Point[] =>
    points.map((at, index) => {
      const [before, after] = [points[Math.max(0, index - 1)]!, points[Math.min(points.length - 1, index + 1)]!]
      const along = vectorUnit({ x: after.x - before.x, y: after.y - before.y })
      return pointAlong(at, vectorLeft(along), (way * channelWidth) / 2)
    })
  const outline = [...side(1), ...side(-1).reverse()]
  return outline.map((from, index) => ({ kind: 'line', from, to: outline[(index + 1) % outline.length]! }))
}
