import { buffer } from 'node:stream/consumers'
import { zodToJsonSchema } from 'zod-to-json-schema'
import { BUNDLE_FILE, bundle, type Bundle } from '../../shared/schemas/bundle'
import type { LengthUnit } from '../../shared/schemas/session'
import { DEFAULT_PRINT } from '../../shared/domain/output/print-set'
import { findClothsByIds, findTestsOfCloths } from '../db/queries/cloths'
import { findGarmentById } from '../db/queries/garments'
import { writeBundleFile, type BundleEntry } from '../files/bundle-file'
import { loadPrintFonts } from '../print/fonts'
import { patternDxf } from '../print/pattern-dxf'
import { renderPatternPdf } from '../print/pattern-pdf'
import { patternSvg } from '../print/pattern-svg'
import { testOf } from './cloths'
import { patternOfVersion, printOfVersion } from './print'
import { found, refuse } from './refusal'
import type { Room } from './room'
import { getVersion } from './versions'

/** What a version was made from, for another workroom. Without the body nothing stays that speaks of it. */
async function bundleOf(room: Room, id: string, withBody: boolean): Promise<Bundle> {
  const { db, workroom } = room
  const version = await getVersion(room, id)
  if (withBody && !version.body)
    refuse('invalid-input', { fields: [{ path: 'body', message: 'The body of this version was erased. Take the bundle without it.' }] })
  const garment = found(await findGarmentById(db, workroom, version.garmentId))
  const document = { ...version.kept.document, measuringId: withBody ? version.kept.document.measuringId : null }
  const used = [...new Set(Object.values(document.plans).flatMap((layers) => (layers ?? []).map(({ clothId }) => clothId)))]
  const cloths = (await findClothsByIds(db, workroom, used)).toSorted((one, other) => used.indexOf(one.id) - used.indexOf(other.id))
  const tests = await findTestsOfCloths(db, workroom, used)
  const { draft } = version.kept
  return bundle.parse({
    kind: 'tenterframe-bundle',
    schema: 1,
    garment: { code: garment.code, name: garment.name },
    version: {
      number: version.number,
      name: version.name,
      note: version.note,
      savedAt: version.savedAt,
      engine: version.engine,
    },
    document,
    cloths: cloths.map((cloth) => ({
      ...cloth,
      archived: cloth.archivedAt !== null,
      tests: tests.filter(({ clothId, archivedAt }) => clothId === cloth.id && archivedAt === null).map(testOf),
    })),
    measuring:
      withBody && version.body
        ? { measuredOn: version.body.measuredOn ?? room.today, measuredBy: null, note: null, values: version.body.measured }
        : null,
    kept: { ...version.kept, document, draft: withBody ? draft : { ...draft, frame: {}, findings: [] } },
  } satisfies Record<keyof Bundle, unknown>)
}

const READ_ME = (title: string, withBody: boolean) =>
  [
    `${title}: a bundle of Tenterframe.`,
    '',
    `${BUNDLE_FILE}: the version with its layers, cloths, tests and pieces, lengths in millimetres. A workroom brings it in under Garments.`,
    'bundle.schema.json: what stands in it, as JSON Schema.',
    'prints: the pattern on A4 at actual size (100 %), and the pieces as SVG and DXF.',
    withBody
      ? 'With the measuring of the wearer, because it was asked for. Pass it on only as the wearer agreed.'
      : 'Without the measuring of the wearer.',
    'Flags about health are never in a bundle: the workroom that brings it in asks for them again.',
    'Ease and hold are computed from tests of these lots. Test your own lot before you cut.',
    '',
  ].join('\r\n')

/** A version as a bundle: data with its schema, pieces and prints. */
export async function bundleFile(room: Room, id: string, withBody: boolean, unit: LengthUnit) {
  const data = await bundleOf(room, id, withBody)
  const { set, title } = await printOfVersion(room, id, { ...DEFAULT_PRINT, lines: 'both', layout: 'packed' }, unit)
  const pattern = await patternOfVersion(room, id, 'both', unit)
  const fonts = await loadPrintFonts()
  const text = (value: string) => new TextEncoder().encode(value)
  const createdAt = new Date(`${room.today}T00:00:00Z`)
  const entries: BundleEntry[] = [
    { name: BUNDLE_FILE, bytes: text(JSON.stringify(data)) },
    { name: 'bundle.schema.json', bytes: text(JSON.stringify(zodToJsonSchema(bundle, { target: 'jsonSchema2019-09' }), null, 1)) },
    { name: 'read-me.txt', bytes: text(READ_ME(title, withBody)) },
    { name: 'prints/pattern-A4.pdf', bytes: await buffer(renderPatternPdf({ set, title, createdAt }, fonts)), packed: true },
    { name: 'prints/pieces.svg', bytes: text(patternSvg(pattern.drawing, title, fonts)) },
    { name: 'prints/pieces.dxf', bytes: text(patternDxf(pattern.pieces, pattern.facts)) },
  ]
  return { bytes: writeBundleFile(entries), file: `${title.replace(/[^\w.-]+/g, '-')}.zip` }
}
