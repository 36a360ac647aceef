import { z } from 'zod'
import type { Caution } from '../domain/cautions/types'
import type { GarmentDocument } from '../domain/document/types'
import type { GarmentCloth, GarmentInput, GarmentProblem, GarmentSolution } from '../domain/garment/types'
import { figure, id, isoDate, length, mirrors, name, optionalText, point, pressure, revision, tension } from './base'
import { structureChoice } from './structure'
import { alteration, bodiceStyle, bodyLevel, draft, draftBody, levelId } from './draft'
import { measuredValues } from './measuring'
import { clothState, direction, layerCloth, layerPlan, ringGeometry, ringSolution } from './textile'
import { wearerFlags } from './wearers'
import { textileSettings } from './workroom'

/** A layer as it is chosen. */
export const layerChoice = z.object({
  id: z.string().min(1).max(60),
  label: z.string().trim().min(1, 'Name the layer.').max(80),
  clothId: z.string().uuid('Choose a cloth.'),
  direction,
  count: z.number().int().min(1, 'At least one.').max(12, 'Not over twelve.'),
  cutRatio: figure(0.5, 2),
  angle: figure(0, 90).optional(),
  rigid: z.boolean().optional(),
  sewnTo: z.string().min(1).max(60).optional(),
})
const layerChoices = z.array(layerChoice).max(12)

const levelChoice = z.object({
  level: levelId,
  hold: pressure(0, 20_000),
  solve: z.enum(['cut', 'tension', 'gap']),
  cut: length(0, 5000).nullable(),
  lacingTension: tension(0, 20_000).nullable(),
  rigidFront: length(0, 2000),
  rigidBack: length(0, 2000),
  gapFront: length(0, 2000),
  gapBack: length(0, 2000),
  squeeze: length(0, 500),
  opening: length(0, 3000).nullable().default(null),
  sewn: z
    .array(z.object({ half: z.enum(['front', 'back']), layer: z.string().min(1).max(60), width: length(0, 2000) }))
    .max(24)
    .optional(),
})

/** What the bench edits and the working copy stores. */
export const garmentDocument = mirrors<GarmentDocument>()(
  z.object({
    schema: z.literal(1),
    measuringId: z.string().uuid().nullable(),
    state: clothState,
    use: z.object({
      water: z.boolean(),
      strapless: z.boolean(),
      exertion: z.enum(['calm', 'stage', 'skating', 'swimming']).default('calm'),
      way: z.enum(['overhead', 'step-in']).default('overhead'),
      opens: z.enum(['unsaid', 'closed', 'part', 'whole']).default('unsaid'),
      frontRelease: z.boolean().default(false),
      dresser: z.string().trim().max(120).default(''),
    }),
    plans: z.object({
      front: layerChoices,
      back: layerChoices,
      side: layerChoices.optional(),
      cups: layerChoices.optional(),
      yoke: layerChoices.optional(),
      sleeve: layerChoices.optional(),
      waistPanel: layerChoices.optional(),
    }),
    levels: z
      .array(levelChoice)
      .max(6)
      .refine((levels) => new Set(levels.map((one) => one.level)).size === levels.length, 'A level stands only once.'),
    style: bodiceStyle,
    alterations: z.array(alteration).max(500),
    acknowledged: z
      .array(
        z.object({
          key: z.string().max(120),
          reason: z.string().trim().min(1, 'Say why.').max(500),
          by: z.string().max(160),
          on: isoDate,
        }),
      )
      .max(200)
      .default([]),
    stiffness: z
      .object({
        factor: z.number().min(0.05).max(20),
        uncertainty: z.number().min(0).max(5),
        learntOn: isoDate,
        plan: z.string().max(8000).optional(),
        levels: z.array(z.string().max(40)).max(12).optional(),
      })
      .nullable()
      .default(null),
    structure: structureChoice.optional(),
    alteredIn: z.string().max(8000).optional(),
  }),
)

const unit = z.enum(['mm', 'Pa', 'N', 'N/m', 'ratio', 'percent', 'degree', 'count'])
const cautionFigure = z.object({ value: z.number(), unit }).nullable()
export const caution = mirrors<Caution>()(
  z.object({
    code: z.string(),
    severity: z.enum(['note', 'caution', 'stop']),
    place: z.discriminatedUnion('kind', [
      z.object({ kind: z.literal('garment') }),
      z.object({ kind: z.literal('body'), measurement: z.string() }),
      z.object({ kind: z.literal('ring'), level: z.string() }),
      z.object({ kind: z.literal('plan'), zone: z.string(), layer: z.string().optional() }),
      z.object({ kind: z.literal('cloth'), cloth: z.string(), direction: z.string().optional() }),
      z.object({ kind: z.literal('piece'), piece: z.string(), edge: z.string().optional(), node: z.string().optional() }),
      z.object({ kind: z.literal('alteration'), alteration: z.string() }),
    ]),
    message: z.string(),
    makerMessage: z.string(),
    figure: cautionFigure,
    limit: cautionFigure,
    source: z.string(),
    todo: z.string(),
    clearable: z.boolean(),
  }),
)

export const garmentCloth = mirrors<GarmentCloth>()(
  z.object({
    id,
    code: z.string(),
    name: z.string(),
    archived: z.boolean(),
    directions: z.array(layerCloth),
    thickness: length(0, 50).optional(),
  }),
)

export const garmentInput = mirrors<GarmentInput>()(
  z.object({
    document: garmentDocument,
    measured: measuredValues,
    measuredOn: z.string().nullable(),
    wearer: wearerFlags,
    cloths: z.array(garmentCloth),
    settings: textileSettings,
    today: z.string(),
  }),
)

export const garmentSolution = mirrors<GarmentSolution>()(
  z.object({
    engine: z.string(),
    body: draftBody,
    levels: z.array(bodyLevel),
    plans: z.array(layerPlan),
    ringInputs: z.array(ringGeometry),
    rings: z.array(ringSolution),
    draft,
    parked: z.array(alteration),
    cautions: z.array(caution),
    rounds: z.number().int(),
    settled: z.boolean(),
    passes: z
      .array(
        z.object({
          level: z.string(),
          name: z.string(),
          needs: length(),
          reach: length(),
          limit: tension(),
          tension: tension().nullable(),
          pull: z.number().nullable(),
          verdict: z.enum(['open', 'passes', 'tight', 'cannot']),
          over: z.enum(['shoulders', 'bust', 'high hip', 'hip', 'head']),
          estimated: z.boolean(),
          from: z.string(),
        }),
      )
      .default([]),
    alterationGirth: z.array(z.object({ level: z.string(), by: length() })),
  }),
)

export const garmentProblem = mirrors<GarmentProblem>()(
  z.object({
    step: z.enum(['body', 'cloth', 'layers', 'draft']),
    code: z.string(),
    message: z.string(),
    todo: z.string().optional(),
    at: z.string().optional(),
  }),
)

export const stages = ['enquiry', 'drafting', 'mock-up', 'fitting', 'cut', 'handed-over'] as const
export const stage = z.enum(stages)

export const garmentBody = z.object({
  /** Short and the workroom's own: it stands on every paper instead of a name. */
  code: z.string({ required_error: 'Give a code.' }).trim().min(1, 'Give a code.').max(24, 'Keep it under 24 letters.'),
  name,
  wearerId: id,
  dueOn: isoDate.nullable().default(null),
  stage: stage.default('enquiry'),
  note: optionalText,
})
export const garmentUpdate = garmentBody.omit({ wearerId: true }).extend({ base: revision })

const clearedMark = z.object({ at: z.string(), by: z.string() }).nullable()

/** Names are null for a maker. */
export const garmentSummary = z.object({
  id,
  code: z.string(),
  name: z.string(),
  wearerId: id.nullable(),
  wearerName: z.string().nullable(),
  clientId: id.nullable(),
  clientName: z.string().nullable(),
  dueOn: z.string().nullable(),
  stage,
  latestVersion: z.object({ id, number: z.number().int(), name: z.string(), cleared: clearedMark }).nullable(),
  /** Cutting lines of the last good draft, thinned for a small picture; mm, y up. */
  outlines: z.array(z.object({ piece: z.string(), points: z.array(point) })).nullable(),
  updatedAt: z.string(),
  archivedAt: z.string().nullable(),
})
export type GarmentSummary = z.output<typeof garmentSummary>

export const garmentWhole = garmentSummary.extend({ note: z.string().nullable(), revision })

export const workingCopySave = z.object({ base: revision, document: garmentDocument })

/** `solution` of the document as saved, or the `problem` that keeps it from being drafted, beside the last good one. */
export const workingCopy = z.object({
  garmentId: id,
  garmentCode: z.string(),
  garmentName: z.string(),
  wearerId: id,
  wearerName: z.string(),
  revision,
  document: garmentDocument,
  savedAt: z.string(),
  savedBy: z.string().nullable(),
  input: garmentInput,
  solution: garmentSolution.nullable(),
  problem: garmentProblem.nullable(),
  lastGood: z.object({ revision, solution: garmentSolution }).nullable(),
})
export type WorkingCopyView = z.output<typeof workingCopy>
