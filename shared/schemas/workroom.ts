import { z } from 'zod'
import type { TextileSettings } from '../domain/textile/types'
import { figure, id, length, mirrors, name, pressure, revision } from './base'
import { role } from './session'

/** Settings of a workroom. It may tighten a limit, never loosen it: the bounds are the product's own limits. */
export const textileSettings = mirrors<TextileSettings>()(
  z.object({
    largestReduction: figure(0.02, 0.2),
    defaultHold: pressure(100, 3300),
    fewSpecimensSpread: figure(0.15, 0.5),
    lacingGapLow: length(0, 200),
    lacingGapHigh: length(0, 300),
  }),
)

const zone = z
  .string()
  .max(60)
  .refine((text) => {
    try {
      new Intl.DateTimeFormat('en', { timeZone: text })
      return true
    } catch {
      return false
    }
  }, 'There is no such time zone.')

export const workroom = z.object({ id, name, zone, settings: textileSettings, revision, today: z.string() })
export type WorkroomView = z.output<typeof workroom>

export const workroomPatch = z.object({
  base: revision,
  name: name.optional(),
  zone: zone.optional(),
  settings: textileSettings.optional(),
})
export const member = z.object({ accountId: id, name: z.string(), email: z.string(), role, since: z.string() })
