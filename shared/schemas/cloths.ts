import { z } from 'zod'
import { figure, id, isoDate, length, line, name, optionalLine, optionalText, revision } from './base'
import { clothState, direction, layerCloth, stretchTest } from './textile'

export const clothBody = z.object({
  /** Short and the workroom's own, e.g. on the bolt's tag. */
  code: z.string({ required_error: 'Give a code.' }).trim().min(1, 'Give a code.').max(24, 'Keep it under 24 letters.'),
  name,
  lot: optionalLine,
  supplier: optionalLine,
  composition: line.default(''),
  /** Grams per square metre. */
  mass: figure(5, 2000).nullable().default(null),
  thickness: length(0.05, 20),
  width: length(100, 4000).nullable().default(null),
  note: optionalText,
})
export const clothUpdate = clothBody.extend({ base: revision })

export const testBody = z.object({
  testedOn: isoDate,
  tester: optionalLine,
  /** Stretches before the first reading. */
  cycles: z.number().int().min(0).max(1000).nullable().default(null),
  note: optionalText,
  test: stretchTest,
})
export const testUpdate = testBody.extend({ base: revision })

export const cloth = z.object({
  id,
  code: z.string(),
  name: z.string(),
  lot: z.string().nullable(),
  supplier: z.string().nullable(),
  composition: z.string(),
  mass: z.number().nullable(),
  thickness: length(),
  width: length().nullable(),
  note: z.string().nullable(),
  revision,
  archivedAt: z.string().nullable(),
  updatedAt: z.string(),
})
export type ClothView = z.output<typeof cloth>

export const clothTest = z.object({
  id,
  clothId: id,
  testedOn: z.string(),
  tester: z.string().nullable(),
  cycles: z.number().int().nullable(),
  note: z.string().nullable(),
  test: stretchTest,
  revision,
  archivedAt: z.string().nullable(),
})
export type ClothTest = z.output<typeof clothTest>

/** What a test gives, or why it gives nothing yet. The newest test of each direction and state stands for the lot. */
export const clothDirection = z.object({
  testId: id,
  direction,
  state: clothState,
  layer: layerCloth.nullable(),
  problem: z.object({ code: z.string(), message: z.string(), todo: z.string().optional(), at: z.string().optional() }).nullable(),
})

export const clothSummary = cloth.extend({ directions: z.array(clothDirection) })
export const clothWhole = cloth.extend({ tests: z.array(clothTest), directions: z.array(clothDirection) })
