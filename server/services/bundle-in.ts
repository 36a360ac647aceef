import type { GarmentDocument } from '../../shared/domain/document/types'
import { allPieces } from '../../shared/domain/draft/roles'
import type { DraftPiece } from '../../shared/domain/draft/types'
import { layerCloth } from '../../shared/domain/textile/cloth'
import { mm } from '../../shared/domain/units/brand'
import { bundle, bundleUpload, type Bundle, type Imported } from '../../shared/schemas/bundle'
import { insertCloth, insertTest, setClothArchived, takenClothCodes } from '../db/queries/cloths'
import { takenGarmentCodes } from '../db/queries/garments'
import type { BundleFileProblem } from '../files/bundle-file'
import { createGarment } from './garments'
import { createMeasuring } from './measurings'
import { refuse } from './refusal'
import type { Room } from './room'
import { getWorkingCopy, saveWorkingCopy } from './working-copy'

const { field } = bundleUpload
const SAID: Readonly<Record<BundleFileProblem, string>> = {
  'not-a-bundle': 'This file is no bundle: there is no bundle.json in it. Choose the ZIP as it came from the other workroom.',
  broken: 'This ZIP is broken or cut short. Have it sent again.',
  'too-large-inside': 'This ZIP unpacks to more than a bundle can hold. It was not read further.',
  'outside-names': 'This ZIP names places outside of itself, which no bundle does. It was not read further.',
  'not-json': 'The data in this bundle cannot be read. Have it sent again.',
}
/** Messages of one foreign file that are of use. */
const MOST_MESSAGES = 12
/** Millimetres: pieces that lie closer than this are the same; sums of the same figures in another order differ by far less. */
const SAME_PIECES = 0.001

/** The data of a bundle held against its schema; a refusal says which part of it. */
export function bundleFrom(read: { readonly data: unknown } | BundleFileProblem): Bundle {
  if (typeof read === 'string') return refuse('invalid-input', { fields: [{ path: field, message: SAID[read] }] })
  const parsed = bundle.safeParse(read.data)
  if (parsed.success) return checked(parsed.data)
  const fields = parsed.error.issues.map(({ path, message }) => ({ path: [field, ...path].join('.'), message }))
  return refuse('invalid-input', {
    detail: `This bundle does not hold what it should: ${fields[0]!.path.slice(field.length + 1) || 'its data'}: ${fields[0]!.message}`,
    fields: fields.slice(0, MOST_MESSAGES),
  })
}

/** What the schema cannot say: layers of cloths that are there, tests that give a curve, no lot twice. */
function checked(data: Bundle): Bundle {
  const problem = (path: string, message: string) =>
    refuse('invalid-input', { detail: message, fields: [{ path: `${field}.${path}`, message }] })
  const ids = data.cloths.map(({ id }) => id)
  if (new Set(ids).size !== ids.length) problem('cloths', 'A cloth stands in this bundle twice.')
  for (const [zone, layers] of Object.entries(data.document.plans))
    layers?.forEach(({ clothId, label }, index) => {
      if (!ids.includes(clothId))
        problem(`document.plans.${zone}.${index}.clothId`, `The cloth of the layer ${label} is not in this bundle.`)
    })
  data.cloths.forEach((cloth, at) =>
    cloth.tests.forEach(({ test, testedOn }, index) => {
      const layer = test && layerCloth({ clothId: cloth.id, name: cloth.name, thickness: cloth.thickness, testedOn }, test)
      if (layer && !layer.ok) problem(`cloths.${at}.tests.${index}.test`, layer.problem.message)
    }),
  )
  return data
}

/** The code itself, or with the first number behind it that nobody has; codes are at most 24 letters. */
function freeCode(code: string, taken: readonly string[]): string {
  const candidates = codesLike(code)
  return candidates.find((one) => !taken.includes(one)) ?? refuse('code-taken', { detail: `There are too many of the code ${code} here.` })
}
const codesLike = (code: string) => [code, ...Array.from({ length: 98 }, (_, i) => `${code.slice(0, 21)}-${i + 2}`)]

/** Brings a bundle in as a garment of a wearer here: lots and tests anew, the measuring where it came with it. */
export async function importBundle(room: Room, wearerId: string, data: Bundle): Promise<Imported> {
  const { db, workroom } = room
  const code = freeCode(data.garment.code, await takenGarmentCodes(db, workroom, codesLike(data.garment.code)))
  const garment = await createGarment(room, {
    code,
    name: data.garment.name,
    wearerId,
    dueOn: null,
    stage: 'drafting',
    note: `Brought in from a bundle: ${data.garment.code} version ${data.version.number}, ${data.version.name}.`,
  })
  const cloths = await bringCloths(room, data)
  const lots = new Map(cloths.map(({ before, id }) => [before, id]))
  const measuring = data.measuring && (await createMeasuring(room, wearerId, data.measuring))
  const own = await getWorkingCopy(room, garment.id)
  const document = withLots(data.document, lots, measuring?.id ?? own.document.measuringId)
  const saved = await saveWorkingCopy(room, garment.id, { base: own.revision, document })
  return {
    garment,
    cloths: cloths.map(({ id, code: now, before }) => ({ id, code: now, before: data.cloths.find((one) => one.id === before)!.code })),
    pieces: saved.solution
      ? compared(allPieces(saved.solution.draft), allPieces(data.kept.draft))
      : { came: 'none', message: saved.problem!.message },
  }
}

async function bringCloths(room: Room, data: Bundle) {
  const { db, workroom, account, now } = room
  const brought: { readonly before: string; readonly id: string; readonly code: string }[] = []
  for (const { id: before, tests, archived, ...fields } of data.cloths) {
    const taken = await takenClothCodes(db, workroom, codesLike(fields.code))
    const { id, code } = await insertCloth(db, workroom, { ...fields, code: freeCode(fields.code, taken) }, account, now)
    // Tests stand newest first; of one day the later entered stands first, so they are entered a moment apart.
    for (const [index, test] of tests.toReversed().entries())
      await insertTest(db, workroom, id, test, account, new Date(now.getTime() + index))
    if (archived) await setClothArchived(db, workroom, id, now, account, now)
    brought.push({ before, id, code })
  }
  return brought
}

/** The document with the lots of this workroom; what it keeps of its layers in one line names them as well. */
function withLots(document: GarmentDocument, lots: ReadonlyMap<string, string>, measuringId: string | null): GarmentDocument {
  const renamed = (line: string) => [...lots].reduce((text, [before, now]) => text.replaceAll(before, now), line)
  const plans = Object.fromEntries(
    Object.entries(document.plans).map(([zone, layers]) => [
      zone,
      layers?.map((layer) => ({ ...layer, clothId: lots.get(layer.clothId) ?? layer.clothId })),
    ]),
  ) as unknown as GarmentDocument['plans']
  const { stiffness, alteredIn } = document
  return {
    ...document,
    measuringId,
    plans,
    ...(stiffness?.plan === undefined ? {} : { stiffness: { ...stiffness, plan: renamed(stiffness.plan) } }),
    ...(alteredIn === undefined ? {} : { alteredIn: renamed(alteredIn) }),
  }
}

/** How far the pieces lie from those in the bundle: other settings, flags or measures make other pieces. */
function compared(now: readonly DraftPiece[], before: readonly DraftPiece[]): Imported['pieces'] {
  const pairs = now.map((piece) => [piece, before.find(({ id }) => id === piece.id)] as const)
  const alike = now.length === before.length && pairs.every(([piece, other]) => other?.cuttingLine.length === piece.cuttingLine.length)
  if (!alike) return { came: 'other', by: null }
  const by = Math.max(
    0,
    ...pairs.map(([piece, other]) =>
      piece.cuttingLine.reduce(
        (most, { x, y }, i) => Math.max(most, Math.hypot(x - other!.cuttingLine[i]!.x, y - other!.cuttingLine[i]!.y)),
        0,
      ),
    ),
  )
  return by <= SAME_PIECES ? { came: 'the same' } : { came: 'other', by: mm(by) }
}
