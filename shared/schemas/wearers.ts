import { z } from 'zod'
import type { WearerFlags } from '../domain/body/types'
import { id, isoDate, line, mirrors, name, optionalLine, optionalText, revision } from './base'

/** Health data: what changes limits, with the purpose it was asked for and the wearer's consent. */
export const flagsBody = z
  .object({
    pregnancy: z.boolean(),
    nursing: z.boolean(),
    reflux: z.boolean(),
    breathing: z.boolean(),
    circulation: z.boolean(),
    child: z.boolean(),
    practitionerAgreed: z.boolean(),
    purpose: line.min(1, 'Say what the answer is needed for.'),
    consentNoted: z.boolean(),
    consentBy: optionalLine,
  })
  .refine((flags) => flags.consentNoted, { path: ['consentNoted'], message: 'Note the consent of the wearer, or of the guardian, first.' })

export const wearerFlags = mirrors<WearerFlags>()(
  z.object({
    pregnancy: z.boolean(),
    nursing: z.boolean(),
    reflux: z.boolean(),
    breathing: z.boolean(),
    circulation: z.boolean(),
    child: z.boolean(),
    practitionerAgreed: z.boolean(),
    age: z.number().int().min(0).max(130).nullable(),
  }),
)

export const flagsView = z.object({
  pregnancy: z.boolean(),
  nursing: z.boolean(),
  reflux: z.boolean(),
  breathing: z.boolean(),
  circulation: z.boolean(),
  child: z.boolean(),
  practitionerAgreed: z.boolean(),
  purpose: z.string(),
  consentNoted: z.boolean(),
  consentBy: z.string().nullable(),
  notedAt: z.string(),
  notedBy: z.string().nullable(),
})

export const wearerBody = z.object({
  name,
  bornOn: isoDate.nullable().default(null),
  /** Who agreed for a minor. */
  guardian: optionalLine,
  note: optionalText,
})
export const wearerUpdate = wearerBody.extend({ base: revision })

export const wearer = z.object({
  id,
  clientId: id,
  clientName: z.string(),
  name: z.string(),
  bornOn: z.string().nullable(),
  age: z.number().int().nullable(),
  guardian: z.string().nullable(),
  note: z.string().nullable(),
  flags: flagsView.nullable(),
  measurings: z.number().int(),
  lastMeasuredOn: z.string().nullable(),
  revision,
  updatedAt: z.string(),
})
export type WearerView = z.output<typeof wearer>
