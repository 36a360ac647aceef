import { z } from 'zod'
import type { Mm, Newton, NewtonPerMetre, Pascal, Strain } from '../domain/units/brand'

/** A schema whose input and output are the same type of the domain. */
export type SchemaOf<T> = z.ZodType<T, z.ZodTypeDef, T>

/** Holds a schema against a type of the domain: compiles only when what it lets through is such a value. */
export const mirrors =
  <T>() =>
  <S extends z.ZodType<T, z.ZodTypeDef, unknown>>(schema: S): SchemaOf<T> =>
    schema as unknown as SchemaOf<T>

const branded = <T>(schema: z.ZodNumber): SchemaOf<T> => schema as unknown as SchemaOf<T>

/** A finite number. JSON carries no others. */
export const figure = (low = -1e9, high = 1e9) =>
  z
    .number({ required_error: 'Enter a number.', invalid_type_error: 'Enter a number.' })
    .finite()
    .min(low, `Not under ${low}.`)
    .max(high, `Not over ${high}.`)

/** Millimetres. */
export const length = (low = -100_000, high = 100_000): SchemaOf<Mm> => branded<Mm>(figure(low, high))
export const tension = (low = 0, high = 1e7): SchemaOf<NewtonPerMetre> => branded<NewtonPerMetre>(figure(low, high))
export const load = (low = 0, high = 5000): SchemaOf<Newton> => branded<Newton>(figure(low, high))
export const pressure = (low = 0, high = 1e7): SchemaOf<Pascal> => branded<Pascal>(figure(low, high))
export const ratio = (low = -10, high = 1000): SchemaOf<Strain> => branded<Strain>(figure(low, high))

export const id = z.string().uuid('This is not an id of ours.')
export const revision = z.number().int().min(1)
export const isoDate = z
  .string()
  .regex(/^\d{4}-\d{2}-\d{2}$/, 'Write the date as year-month-day.')
  .refine((text) => {
    const date = new Date(`${text}T00:00:00Z`)
    return !Number.isNaN(date.getTime()) && date.toISOString().startsWith(text)
  }, 'There is no such date.')
export const moment = z.string().datetime({ offset: true })

/** A name that must be there. */
export const name = z.string({ required_error: 'Give a name.' }).trim().min(1, 'Give a name.').max(120, 'Keep it under 120 letters.')
export const line = z.string().trim().max(200, 'Keep it under 200 letters.')
export const text = z.string().trim().max(4000, 'Keep it under 4,000 letters.')
export const optionalLine = line.nullable().default(null)
export const optionalText = text.nullable().default(null)

export const point = z.object({ x: figure(), y: figure() })

/** Names the row that an address points at. */
export const idParams = z.object({ id })

export const pageQuery = z.object({
  q: z.string().trim().max(80).optional(),
  cursor: z.string().max(200).optional(),
  limit: z.coerce.number().int().min(1).max(100).default(50),
  archived: z.enum(['no', 'yes']).default('no'),
})
export type PageQuery = z.output<typeof pageQuery>

export const page = <S extends z.ZodTypeAny>(item: S) => z.object({ items: z.array(item), nextCursor: z.string().nullable() })
export const list = <S extends z.ZodTypeAny>(item: S) => z.object({ items: z.array(item) })
export const done = z.object({ done: z.literal(true) })
