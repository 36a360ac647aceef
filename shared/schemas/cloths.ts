import { z } from 'zod'
import { figure, id, isoDate, length, line, name, optionalLine, optionalText, revision } from './base'
import { testDraft } from './test-draft'
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

/** A photograph of a strip as it comes from a telephone. */
export const photoUpload = { field: 'photo', limit: 25_000_000, media: ['image/jpeg', 'image/png', 'image/webp'] } as const

/** A test as it is entered. */
export const testFields = z.object({
  testedOn: isoDate,
  tester: optionalLine,
  /** Stretches before the first reading. */
  cycles: z.number().int().min(0).max(1000).nullable().default(null),
  note: optionalText,
  /** What was read; null while the test is unfinished. */
  test: stretchTest.nullable().default(null),
  /** An unfinished test as it was typed; null once it is finished. No garment uses it. */
  draft: testDraft.nullable().default(null),
})
const isEither = (body: { readonly test: unknown; readonly draft: unknown }) => (body.test === null) !== (body.draft === null)
const either = { path: ['test'], message: 'Send either the test, or what is typed of an unfinished one.' }
export const testBody = testFields.refine(isEither, either)
export const testUpdate = testFields.extend({ base: revision }).refine(isEither, either)

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
  test: stretchTest.nullable(),
  draft: testDraft.nullable(),
  /** Photograph of the strip, pixels; null without one. */
  photo: z.object({ width: z.number().int(), height: z.number().int(), at: z.string() }).nullable(),
  revision,
  archivedAt: z.string().nullable(),
  updatedAt: z.string(),
})
export type ClothTest = z.output<typeof clothTest>

/** What a test gives, or why it gives nothing yet. The newest test of each direction and state stands for the lot. */
export const clothDirection = z.object({
  testId: id,
  direction,
  /** Degrees from the lengthwise, where the strip was cut at a typed angle. */
  angle: z.number().optional(),
  state: clothState,
  layer: layerCloth.nullable(),
  problem: z.object({ code: z.string(), message: z.string(), todo: z.string().optional(), at: z.string().optional() }).nullable(),
})

export const clothSummary = cloth.extend({ directions: z.array(clothDirection) })
export const clothWhole = cloth.extend({ tests: z.array(clothTest), directions: z.array(clothDirection) })
