import { z } from 'zod'
import type { TensileReading } from '../domain/textile/tensile'
import type { TensileColumns } from '../domain/textile/tensile-table'
import { length, mirrors } from './base'
import { specimen, tensileRecord } from './textile'

const column = z.coerce.number().int().min(0).max(500)
/** The strip that a machine's file was run on, and what its headings do not say: columns from 0, units as written. */
export const runQuery = z.object({
  width: z.coerce.number().pipe(length(1, 500)),
  gauge: z.coerce.number().pipe(length(1, 5000)),
  load: column.optional(),
  loadUnit: z.enum(['N', 'kN', 'cN', 'kgf', 'gf', 'lbf']).optional(),
  extension: column.optional(),
  lengthUnit: z.enum(['mm', 'cm', 'm', 'in', '%']).optional(),
})
/** What a machine's file gave, and which columns it was read from. */
export type MachineRun = TensileReading & { readonly columns: TensileColumns }
/** A run as one specimen, its thousands of rows thinned. */
export const runAnswer = mirrors<MachineRun>()(
  tensileRecord.omit({ name: true }).extend({
    specimen,
    columns: z.object({
      load: z.number().nullable(),
      loadUnit: z.enum(['N', 'kN', 'cN', 'kgf', 'gf', 'lbf']).nullable(),
      extension: z.number().nullable(),
      lengthUnit: z.enum(['mm', 'cm', 'm', 'in', '%']).nullable(),
    }),
  }),
)
export const runUpload = { field: 'file', limit: 50_000_000, media: ['text/csv'] } as const
