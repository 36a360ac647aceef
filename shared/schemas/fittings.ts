import { z } from 'zod'
import type { FittingLevel } from '../domain/fit/types'
import { id, isoDate, length, load, mirrors, optionalText } from './base'
import { levelId } from './draft'

export const fittingLevel = mirrors<FittingLevel>()(
  z.object({
    level: levelId,
    gap: length(0, 2000).nullable(),
    feel: z.enum(['loose', 'right', 'close', 'hard', 'hurts']).nullable(),
    pull: z.object({ force: load(0, 500), tab: length(5, 500) }).nullable(),
  }),
)

/** A fitting as it was taken: the version that was worn, and what was seen of it level by level. */
export const fittingBody = z.object({
  versionId: id,
  fittedOn: isoDate,
  note: optionalText,
  levels: z
    .array(fittingLevel)
    .min(1, 'Note at least one level.')
    .max(5)
    .refine((levels) => new Set(levels.map((one) => one.level)).size === levels.length, 'A level stands only once.'),
})

export const fitting = fittingBody.extend({
  id,
  versionNumber: z.number().int(),
  versionName: z.string(),
  note: z.string().nullable(),
  savedAt: z.string(),
  savedBy: z.string().nullable(),
})
export type FittingView = z.output<typeof fitting>
