import type { LevelId } from '../body/types'
import { mm, type Mm } from '../units/brand'
import type { LaidBone } from './types'

/** Rigid widths of one level that bones and closures bring, mm once round the body. */
export interface RigidWidths {
  readonly level: LevelId
  readonly front: Mm
  readonly back: Mm
  /** Channels sewn to one layer alone. */
  readonly sewn: readonly { readonly half: 'front' | 'back'; readonly layer: string; readonly width: Mm }[]
}

/** Closures as they add to every level: both sides together. */
export interface ClosureWidths {
  readonly front: Mm
  readonly back: Mm
}

/**
 * What laid bones and closures take of every level. A bone counts in each half of the body in which it lies; one in the side seam goes half
 * to the front and half to the back. Sewn to one layer it is rigid in that one alone. Millimetres once round.
 */
export function rigidWidths(levels: readonly LevelId[], bones: readonly LaidBone[], closures: ClosureWidths): readonly RigidWidths[] {
  return levels.map((level) => {
    const all = { front: closures.front as number, back: closures.back as number }
    const sewn = new Map<string, { half: 'front' | 'back'; layer: string; width: number }>()
    const put = (half: 'front' | 'back', layer: string | null, width: number) => {
      if (layer === null) {
        all[half] += width
        return
      }
      const key = `${half} ${layer}`
      const known = sewn.get(key)
      sewn.set(key, { half, layer, width: (known?.width ?? 0) + width })
    }
    for (const bone of bones) {
      const crossing = bone.crossings.find((one) => one.level === level)
      if (!crossing) continue
      const width = crossing.width * bone.count
      if (bone.inSideSeam) {
        put('front', bone.channelOn, width / 2)
        put('back', bone.channelOn, width / 2)
      } else put(bone.zone, bone.channelOn, width)
    }
    return {
      level,
      front: mm(all.front),
      back: mm(all.back),
      sewn: [...sewn.values()].map((one) => ({ ...one, width: mm(one.width) })),
    }
  })
}

/** The largest difference between two sets of rigid widths, mm. */
export function rigidMoved(before: readonly RigidWidths[], after: readonly RigidWidths[]): number {
  return after.reduce((most, one) => {
    const old = before.find(({ level }) => level === one.level)
    const layers = new Set([...(old?.sewn ?? []), ...one.sewn].map(({ half, layer }) => `${half} ${layer}`))
    const widthOf = (widths: RigidWidths | undefined, key: string) =>
      widths?.sewn.reduce((sum, { half, layer, width }) => (`${half} ${layer}` === key ? sum + width : sum), 0) ?? 0
    return Math.max(
      most,
      Math.abs(one.front - (old?.front ?? 0)),
      Math.abs(one.back - (old?.back ?? 0)),
      ...[...layers].map((key) => Math.abs(widthOf(one, key) - widthOf(old, key))),
    )
  }, 0)
}

/** The larger of both at every level: a bone that ends about on a level must not come and go from round to round. */
export function rigidLargest(before: readonly RigidWidths[], after: readonly RigidWidths[]): readonly RigidWidths[] {
  return after.map((one) => {
    const old = before.find(({ level }) => level === one.level)
    if (!old) return one
    const more = old.sewn.filter((own) => !one.sewn.some(({ half, layer }) => half === own.half && layer === own.layer))
    const sewn = one.sewn.map((own) => {
      const known = old.sewn.find(({ half, layer }) => half === own.half && layer === own.layer)
      return known && known.width > own.width ? known : own
    })
    return { level: one.level, front: mm(Math.max(old.front, one.front)), back: mm(Math.max(old.back, one.back)), sewn: [...sewn, ...more] }
  })
}
