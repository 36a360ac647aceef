import { z } from 'zod'
import { id, name, optionalLine, optionalText, revision } from './base'
import { garmentSummary } from './garments'

export const clientBody = z.object({
  name,
  email: z
    .union([z.literal('').transform(() => null), z.string().trim().max(200).email('This is not an e-mail address.')])
    .nullable()
    .default(null),
  phone: optionalLine,
  note: optionalText,
})
export const clientUpdate = clientBody.extend({ base: revision })

export const client = z.object({
  id,
  name: z.string(),
  email: z.string().nullable(),
  phone: z.string().nullable(),
  note: z.string().nullable(),
  revision,
  archivedAt: z.string().nullable(),
  updatedAt: z.string(),
})
export type ClientView = z.output<typeof client>

export const clientSummary = client.extend({ wearers: z.number().int(), garments: z.number().int() })

const clientWearer = z.object({
  id,
  name: z.string(),
  bornOn: z.string().nullable(),
  guardian: z.string().nullable(),
  measurings: z.number().int(),
  lastMeasuredOn: z.string().nullable(),
})
export const clientWhole = client.extend({ wearers: z.array(clientWearer), garments: z.array(garmentSummary) })
