import { z } from 'zod'
import type { VersionBody, VersionKept } from '../domain/garment/snapshot'
import { figure, id, length, mirrors, name, optionalText, pressure, revision } from './base'
import { alteration, bodyLevel, draft, draftBody } from './draft'
import { caution, garmentDocument } from './garments'
import { measuredValues } from './measuring'
import { layerPlan, ringGeometry, ringSolution } from './textile'
import { textileSettings } from './workroom'

export const versionBody = z.object({ base: revision, name, note: optionalText })
export const restoreBody = z.object({ base: revision })

/** Name and reason are asked for only where stops stand. */
export const clearanceBody = z.object({
  name: z.string().trim().max(120).nullable().default(null),
  reason: z.string().trim().max(1000).nullable().default(null),
})

const keptRing = z.object({
  level: z.string(),
  name: z.string(),
  mode: z.enum(['cut', 'tension', 'gap']),
  cut: length(),
  rigidFront: length(),
  rigidBack: length(),
  gapFront: length(),
  gapBack: length(),
  band: z.enum(['light', 'easy', 'firm', 'strong', 'stop']),
  pressure: pressure(),
  governs: z.enum(['hold', 'stretch', 'reduction']).nullable(),
  assumed: z.boolean(),
  extrapolated: z.boolean(),
  widths: z.array(z.object({ half: z.enum(['front', 'back']), width: figure() })),
})

export const versionKept = mirrors<VersionKept>()(
  z.object({
    engine: z.string(),
    document: garmentDocument,
    plans: z.array(layerPlan),
    settings: textileSettings,
    draft,
    parked: z.array(alteration),
    rings: z.array(keptRing),
    cautions: z.array(caution),
    settled: z.boolean(),
  }),
)

export const versionWearer = mirrors<VersionBody>()(
  z.object({
    measuredOn: z.string().nullable(),
    measured: measuredValues,
    body: draftBody,
    levels: z.array(bodyLevel),
    ringInputs: z.array(ringGeometry),
    rings: z.array(ringSolution),
    cautions: z.array(caution),
  }),
)

/** `name` and `reason` stand where the owner cleared stops; the reason is not for makers. */
const clearance = z.object({ at: z.string(), by: z.string(), name: z.string().nullable(), reason: z.string().nullable() })

export const versionSummary = z.object({
  id,
  garmentId: id,
  garmentCode: z.string(),
  number: z.number().int(),
  name: z.string(),
  note: z.string().nullable(),
  savedAt: z.string(),
  savedBy: z.string().nullable(),
  engine: z.string(),
  stops: z.number().int(),
  cautions: z.number().int(),
  /** A stop stands that nobody may clear. */
  barred: z.boolean(),
  cleared: clearance.nullable(),
  bodyErased: z.boolean(),
})
export type VersionSummary = z.output<typeof versionSummary>

/** `body` and `wearerName` are null for a maker, and once the body was erased. */
export const versionWhole = versionSummary.extend({ kept: versionKept, body: versionWearer.nullable(), wearerName: z.string().nullable() })
export type VersionWhole = z.output<typeof versionWhole>
