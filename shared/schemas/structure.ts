import { z } from 'zod'
import type { BoneStock, StructureChoice } from '../domain/structure/types'
import { figure, length, mirrors } from './base'
import { edgeId, levelId, pieceId } from './draft'

const end = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('edge'), clear: length(0, 1000) }),
  z.object({ kind: z.literal('level'), level: levelId, above: length(-500, 500) }),
])
const onLevel = z.object({ level: levelId, at: figure(0, 1) })

const bone = z.object({
  id: z.string().min(1).max(60),
  name: z.string().trim().min(1, 'Name the bone.').max(80),
  stock: z.string().max(60),
  place: z.discriminatedUnion('kind', [
    z.object({ kind: z.literal('seam'), piece: pieceId, edge: edgeId }),
    z.object({ kind: z.literal('panel'), piece: pieceId, at: figure(0, 1) }),
    z.object({ kind: z.literal('free'), piece: pieceId, from: onLevel, to: onLevel, bow: length(-200, 200) }),
  ]),
  bottom: end,
  top: end,
  channelOn: z.string().max(60).nullable(),
  under: z.number().int().min(0).max(40).nullable(),
  on: z.boolean(),
})

/** A stock as it is typed. Lengths mm, modulus GPa, stiffness N m². */
export const boneStockBody = z.object({
  name: z.string().trim().min(1, 'Name the stock.').max(60),
  kind: z.enum(['flat-steel', 'spiral-steel', 'plastic', 'wire']),
  width: length(1, 40),
  thickness: length(0.1, 10),
  modulus: figure(0.1, 400),
  stiffness: figure(0, 5).nullable(),
  rusts: z.boolean(),
  leastRadius: length(1, 5000),
  lengths: z.array(length(20, 2000)).max(60),
})
export const boneStock = mirrors<BoneStock>()(boneStockBody.extend({ id: z.string().max(60) }))

const closure = z.object({ rigid: length(0, 200), pitch: length(0, 200), waistPitch: length(0, 200), ends: length(0, 2000) }).nullable()

export const structureChoice = mirrors<StructureChoice>()(
  z.object({
    bones: z.array(bone).max(120),
    closures: z.object({ front: closure, back: closure }),
    stock: z.array(boneStock).max(60).optional(),
  }),
)
