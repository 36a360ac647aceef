import { z } from 'zod'
import type { StructureChoice } from '../domain/structure/types'
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

const closure = z.object({ rigid: length(0, 200), pitch: length(0, 200), waistPitch: length(0, 200), ends: length(0, 2000) }).nullable()

export const structureChoice = mirrors<StructureChoice>()(
  z.object({ bones: z.array(bone).max(120), closures: z.object({ front: closure, back: closure }) }),
)
