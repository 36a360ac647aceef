import { z } from 'zod'
import { id, length, name, optionalText } from './base'
import { clothBody, testFields } from './cloths'
import { garmentBody, garmentDocument, garmentWhole } from './garments'
import { measuringBody } from './measuring'
import { versionKept } from './versions'

/** A garment's bundle as it comes from another workroom. */
export const bundleUpload = { field: 'bundle', limit: 20_000_000, media: ['application/zip'] } as const

/** The file of a bundle that is read when it is brought in; everything else in it is for people. */
export const BUNDLE_FILE = 'bundle.json'

/** Tests as they stand, newest first, so that the same one stands for each direction and state. */
export const bundleCloth = clothBody.extend({ id, archived: z.boolean(), tests: z.array(testFields).max(200) })

/** A version with all it was made from. `measuring` only where it was asked for; never a name, never health data. */
export const bundle = z.object({
  kind: z.literal('tenterframe-bundle', { errorMap: () => ({ message: 'This is not the data of a bundle.' }) }),
  schema: z.literal(1, { errorMap: () => ({ message: 'This bundle is newer than this workroom can read.' }) }),
  garment: garmentBody.pick({ code: true, name: true }),
  version: z.object({ number: z.number().int().min(1), name, note: optionalText, savedAt: z.string().max(40), engine: z.string().max(80) }),
  document: garmentDocument,
  cloths: z.array(bundleCloth).max(60),
  measuring: measuringBody.nullable(),
  /** Pieces, rings and plans as they were saved. */
  kept: versionKept,
})
export type Bundle = z.output<typeof bundle>

export const bundleQuery = z.object({ body: z.enum(['0', '1']).default('0') })

export const importQuery = z.object({
  /** Whose the garment is to be here. */
  wearerId: z.string({ required_error: 'Choose a wearer.' }).uuid('Choose a wearer.'),
})

/** What became of a bundle: the garment, its new lots, and how far its pieces lie from those in the bundle. */
export const imported = z.object({
  garment: garmentWhole,
  cloths: z.array(z.object({ id, code: z.string(), before: z.string() })),
  pieces: z.discriminatedUnion('came', [
    z.object({ came: z.literal('the same') }),
    z.object({ came: z.literal('other'), by: length().nullable() }),
    z.object({ came: z.literal('none'), message: z.string() }),
  ]),
})
export type Imported = z.output<typeof imported>
