import type { DraftPiece } from '../draft/types'
import { pathEnd } from '../geometry/path'
import { mm, type Mm } from '../units/brand'
import { layBone } from './bone'
import { boneFindings } from './rules'
import { channelWidth } from './stock'
import type { Bone, BoneStock } from './types'

/** Ends inside the edges to begin with: an armhole asks for more than another finished edge. */
export const END_CLEAR = { armhole: mm(20), finished: mm(13) }
const MOST_CLEAR = 400
/** Bones laid out end no further than this above the bust line, whatever the piece does above it, mm. Setting; common practice. */
const ABOVE_BUST = 60

/** Vertical bones laid out on a panel. */
export interface LaidOut {
  readonly bones: readonly Bone[]
  /** How many fit when fewer than asked for do. */
  readonly fits: number
}

/**
 * `count` vertical bones evenly over a panel, each ending where every rule of bones is kept, as a start. Where so many do not fit, as many as
 * do. Ids are made from `prefix`.
 */
export function layOutBones(
  piece: DraftPiece,
  count: number,
  stock: BoneStock,
  prefix: string,
  nameOf: (index: number) => string,
): LaidOut {
  for (let fits = count; fits > 0; fits--) {
    const bones = evenly(piece, fits, stock, prefix, nameOf)
    if (bones !== null) return { bones, fits }
  }
  return { bones: [], fits: 0 }
}

function evenly(
  piece: DraftPiece,
  count: number,
  stock: BoneStock,
  prefix: string,
  nameOf: (index: number) => string,
): readonly Bone[] | null {
  const narrowest = Math.min(...piece.levels.map(({ width }) => width))
  if (narrowest / (count + 1) < 2 * channelWidth(stock)) return null
  const bones: Bone[] = []
  for (let index = 0; index < count; index++) {
    const bone = withEnds(piece, (index + 1) / (count + 1), stock, `${prefix}-${index}`, nameOf(index))
    if (bone === null) return null
    bones.push(bone)
  }
  const laid = bones.flatMap((bone) => {
    const found = layBone(bone, [piece], [stock])
    return found.ok ? [found.value] : []
  })
  return laid.length === count && boneFindings(laid, [piece]).length === 0 ? bones : null
}

/** The bone at a share of the panel with the least clearance at both ends that keeps the rules. */
function withEnds(piece: DraftPiece, at: number, stock: BoneStock, id: string, name: string): Bone | null {
  const make = (bottom: Mm, top: Mm): Bone => ({
    id,
    name,
    stock: stock.id,
    place: { kind: 'panel', piece: piece.id, at },
    bottom: { kind: 'edge', clear: bottom },
    top: { kind: 'edge', clear: top },
    channelOn: null,
    under: null,
    on: true,
  })
  for (let top = END_CLEAR.finished as number; top <= MOST_CLEAR; top += 2) {
    const bone = make(END_CLEAR.finished, mm(top))
    const laid = layBone(bone, [piece], [stock])
    if (!laid.ok) return null
    const bust = piece.levels.find(({ level }) => level === 'bust')
    if (bust && pathEnd(laid.value.path).y > (bust.from.y + bust.to.y) / 2 + ABOVE_BUST) continue
    if (boneFindings([laid.value], [piece]).length === 0) return bone
  }
  return null
}
