import { z } from 'zod'
import type { BodyLevel, DraftBody } from '../domain/body/types'
import type { Alteration, BodiceStyle, Draft, DraftPiece, LevelWidths } from '../domain/draft/types'
import { baseStyle } from '../domain/draft/style'
import type { Segment } from '../domain/geometry/types'
import { figure, length, mirrors, point } from './base'

export const levelId = z.enum(['top-edge', 'bust', 'underbust', 'waist', 'high-hip', 'hip'])
const seamLetter = z.enum(['a', 'b', 'c', 'd'])
const halfPieces = [
  'front-centre',
  'side-front',
  'side-back',
  'back-centre',
  'front',
  'back',
  'front-centre-a',
  'front-centre-b',
  'front-centre-c',
  'front-centre-d',
  'side-front-a',
  'side-front-b',
  'side-front-c',
  'side-front-d',
  'side-back-a',
  'side-back-b',
  'side-back-c',
  'side-back-d',
  'back-centre-a',
  'back-centre-b',
  'back-centre-c',
  'back-centre-d',
] as const
export const pieceId = z.enum([...halfPieces, ...halfPieces.map((id) => `right-${id}` as const)])
export const edgeId = z.enum([
  'centre',
  'neckline',
  'shoulder',
  'armhole',
  'princess',
  'side',
  'hem',
  'top',
  'seam-a',
  'seam-b',
  'seam-c',
  'seam-d',
  'shoulder-princess',
  'dart',
  'dart-beyond',
  'neckline-dart',
  'shoulder-dart',
  'armhole-dart',
  'top-dart',
])
const centreKind = z.enum(['fold', 'seam', 'zip', 'hook-tape', 'hooks', 'busk', 'lacing'])
const degree = figure(-360, 360)
const role = z.string().min(1).max(60)

const bodyKey = z.enum([
  'bustGirth',
  'underbustGirth',
  'waistGirth',
  'highHipGirth',
  'hipGirth',
  'neckBaseGirth',
  'shoulderLength',
  'shoulderSlope',
  'acrossBack',
  'acrossFront',
  'backWaistLength',
  'frontWaistLength',
  'neckShoulderToBustPoint',
  'sideWaistLength',
  'waistToHip',
  'bustPointDistance',
  'bustPointToUnderbust',
  'armscyeGirth',
])
const bodyFigure = figure(-10, 5000)
export const draftBody = mirrors<DraftBody>()(
  z.object({
    values: z.object({
      bustGirth: bodyFigure,
      underbustGirth: bodyFigure,
      waistGirth: bodyFigure,
      highHipGirth: bodyFigure,
      hipGirth: bodyFigure,
      neckBaseGirth: bodyFigure,
      shoulderLength: bodyFigure,
      shoulderSlope: bodyFigure,
      acrossBack: bodyFigure,
      acrossFront: bodyFigure,
      backWaistLength: bodyFigure,
      frontWaistLength: bodyFigure,
      neckShoulderToBustPoint: bodyFigure,
      sideWaistLength: bodyFigure,
      waistToHip: bodyFigure,
      bustPointDistance: bodyFigure,
      bustPointToUnderbust: bodyFigure,
      armscyeGirth: bodyFigure,
    }),
    estimated: z.array(bodyKey),
  }),
)

export const bodyLevel = mirrors<BodyLevel>()(
  z.object({ id: levelId, name: z.string(), y: length(), girth: length(), girthEstimated: z.boolean(), movedBy: length() }),
)

const shares = z
  .object({ centre: figure(0, 1), princess: figure(0, 1), side: figure(0, 1) })
  .refine((parts) => Math.abs(parts.centre + parts.princess + parts.side - 1) < 0.001, 'The three shares must make one whole.')

const halfPanels = z.object({
  princess: z.boolean(),
  further: z
    .array(
      z.object({
        id: seamLetter,
        beside: z.enum(['centre', 'side']),
        at: figure(0, 1).nullable(),
        end: figure(0, 1).nullable(),
        share: figure(0, 1),
        letOut: figure(0, 1).nullable(),
      }),
    )
    .max(4)
    .refine((seams) => new Set(seams.map(({ id }) => id)).size === seams.length, 'A seam stands only once.'),
})
const princessEnd = z.object({ edge: z.enum(['shoulder', 'armhole', 'neckline']), at: figure(0, 1) })
const edgeForm = z.enum(['straight', 'pointed', 'rounded'])
const necklineForm = z.enum(['round', 'square', 'v'])

/** Fields that older documents do not have yet are read as `baseStyle` has them. */
const BASE = baseStyle()

export const bodiceStyle = mirrors<BodiceStyle>()(
  z.object({
    centreFront: centreKind,
    centreBack: centreKind,
    right: z
      .object({
        panels: z.object({ front: halfPanels, back: halfPanels }),
        princessAt: figure(0.1, 0.9),
        princessEnd: z.object({ front: princessEnd, back: princessEnd }),
        backPrincessAt: figure(0.1, 0.9),
        neckline: z.object({ front: necklineForm, back: necklineForm }),
        necklineWidth: length(0, 200),
      })
      .nullable()
      .default(null),
    panels: z
      .object({ front: halfPanels, back: halfPanels })
      .default(() => ({ front: { princess: true, further: [] }, back: { princess: true, further: [] } })),
    hem: z.object({ level: z.enum(['underbust', 'waist', 'high-hip', 'hip']), below: length(-300, 500) }),
    hemShape: z
      .object({ form: edgeForm, front: length(-300, 300), back: length(-300, 300), side: length(-300, 300), curve: figure(0, 1) })
      .default(BASE.hemShape),
    neckline: z.object({ front: necklineForm, back: necklineForm }).default(BASE.neckline),
    top: z
      .object({ form: edgeForm, front: length(0, 300), back: length(-100, 300), side: length(-100, 300), curve: figure(0, 1) })
      .nullable()
      .default(null),
    princessEnd: z.object({ front: princessEnd, back: princessEnd }).default(BASE.princessEnd),
    backPrincessAt: figure(0.1, 0.9).default(BASE.backPrincessAt),
    letOut: z.object({ front: shares.nullable(), back: shares.nullable() }).default(BASE.letOut),
    openingsTake: z.object({ front: z.boolean(), back: z.boolean() }).default(BASE.openingsTake),
    bustAs: z.enum(['auto', 'seam', 'dart', 'ease']).default(BASE.bustAs),
    necklineFrontDepth: length(0, 400),
    necklineBackDepth: length(0, 500),
    necklineWidth: length(0, 200),
    princessAt: figure(0.1, 0.9),
    frontShares: shares,
    backShares: shares,
    verticalFactor: figure(0.7, 1.1),
    bustAngle: figure(0, 90).nullable(),
    underarmDrop: length(-20, 150),
    allowances: z.object({
      seam: length(0, 60),
      centre: length(0, 60),
      opening: length(0, 60).default(BASE.allowances.opening),
      shoulder: length(0, 60),
      neckline: length(0, 60),
      armhole: length(0, 60),
      hem: length(0, 100),
    }),
  }),
)

export const levelWidths = mirrors<LevelWidths>()(
  z.object({ level: levelId, front: length(0, 2500), back: length(0, 2500), gapFront: length(0, 1000), gapBack: length(0, 1000) }),
)

const named = {
  id: z.string().min(1).max(60),
  name: z.string().trim().min(1, 'Give the alteration a name.').max(120),
  on: z.boolean(),
}
export const alteration = mirrors<Alteration>()(
  z.discriminatedUnion('kind', [
    z.object({
      ...named,
      kind: z.literal('move'),
      role: z.object({ piece: pieceId, edge: edgeId, node: role, handle: z.enum(['before', 'after']).optional() }),
      dx: length(-500, 500),
      dy: length(-500, 500),
      carry: z.boolean(),
    }),
    z.object({
      ...named,
      kind: z.literal('girth'),
      level: levelId,
      amount: length(-500, 500),
      seams: z
        .array(z.object({ piece: pieceId, edge: edgeId }))
        .min(1, 'Choose a seam.')
        .max(40),
    }),
    z.object({ ...named, kind: z.literal('length'), below: levelId, by: length(-300, 300) }),
  ]),
)

const segment = mirrors<Segment>()(
  z.discriminatedUnion('kind', [
    z.object({ kind: z.literal('line'), from: point, to: point }),
    z.object({ kind: z.literal('cubic'), from: point, c1: point, c2: point, to: point }),
  ]),
)
const stroke = z.object({ from: point, to: point })
const edge = z.object({
  id: edgeId,
  kind: z.enum(['seam', 'fold', 'opening', 'finished']),
  nodes: z.array(z.object({ name: role, at: point, level: levelId.nullable() })).max(100),
  path: z.array(segment).max(100),
  mate: z.object({ piece: pieceId, edge: edgeId }).nullable(),
  allowance: length(0, 200),
  notches: z.array(z.object({ at: point, inward: point, kind: z.enum(['single', 'double']), pair: z.string().max(120) })).max(100),
})

export const draftPiece = mirrors<DraftPiece>()(
  z.object({
    id: pieceId,
    name: z.string().max(120),
    zone: z.enum(['front', 'back']),
    edges: z.array(edge).min(1).max(40),
    grain: stroke,
    stretch: stroke,
    levels: z.array(z.object({ level: levelId, from: point, to: point, width: length() })).max(20),
    labelAt: point,
    onFold: z.boolean(),
    quantity: z.number().int().min(1).max(20),
    cuttingLine: z.array(point).min(3).max(20_000),
  }),
)

const seamSide = z.object({ piece: pieceId, edge: edgeId, length: length() })
export const draft = mirrors<Draft>()(
  z.object({
    pieces: z.array(draftPiece).max(20),
    right: z.array(draftPiece).max(20).nullable().default(null),
    seams: z.array(z.object({ name: z.string(), a: seamSide, b: seamSide, difference: length() })),
    findings: z.array(
      z.object({
        code: z.enum([
          'bust-angle-negative',
          'bust-angle-large',
          'bust-angle-held',
          'bust-angle-eased',
          'bust-angle-dart',
          'bust-level-moved',
          'across-front-held',
          'across-back-held',
          'armhole-aim-off',
          'side-seam-moved',
          'piece-narrow',
        ]),
        piece: pieceId.nullable(),
        edge: edgeId.nullable(),
        value: figure(),
        unit: z.enum(['mm', 'degree']),
        message: z.string(),
      }),
    ),
    bustAngle: degree,
    armhole: z.object({ length: length(), aim: length() }),
    frame: z.record(point),
  }),
)
