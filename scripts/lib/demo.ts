import { sql } from 'kysely'
import type { LevelId } from '../../shared/domain/body/types'
import type { Alteration, DraftPiece } from '../../shared/domain/draft/types'
import { DEFAULT_CLOSURES } from '../../shared/domain/structure/lacing'
import { layOutBones } from '../../shared/domain/structure/lay-out'
import { DEFAULT_STOCK } from '../../shared/domain/structure/stock'
import type { StructureChoice } from '../../shared/domain/structure/types'
import type { GarmentDocument, LayerChoice } from '../../shared/domain/document/types'
import { DEFAULT_TEXTILE_SETTINGS } from '../../shared/domain/textile/defaults'
import { mm, newton, pascal } from '../../shared/domain/units/brand'
import { DEMO_ACCOUNTS, DEMO_ZONE } from '../../shared/demo'
import { enterWorkroom, type Database, type Work } from '../../server/db/client'
import { createClient } from '../../server/services/clients'
import { keepBoneStock } from '../../server/services/bone-stock'
import { archiveCloth, createCloth, createTest } from '../../server/services/cloths'
import { recordFitting } from '../../server/services/fittings'
import { createGarment } from '../../server/services/garments'
import { createMeasuring } from '../../server/services/measurings'
import { measurePrinter } from '../../server/services/printers'
import { dateIn, type Room } from '../../server/services/room'
import { clearVersion, createVersion } from '../../server/services/versions'
import { createWearer, noteFlags } from '../../server/services/wearers'
import { getWorkingCopy, saveWorkingCopy } from '../../server/services/working-copy'
import { DEMO_CLOTHS, stripTest } from './demo-cloths'
import { DEMO_CLIENTS, fromCm, type DemoClient } from './demo-people'
import { hashPassword } from './hash-password'

export interface DemoIds {
  readonly workroom: string
  readonly accounts: Readonly<Record<string, string>>
}

/** Founds a workroom with its people, as the owner of the database: no route does that yet. */
async function found(owner: Work, name: string): Promise<DemoIds> {
  const accounts: Record<string, string> = {}
  let workroom = ''
  for (const account of DEMO_ACCOUNTS.filter((one) => one.workroom === name)) {
    const hash = await hashPassword(account.password)
    const made = await sql<{ id: string }>`select account_create(${account.email}, ${account.name}, ${hash}) as id`.execute(owner)
    const id = made.rows[0]!.id
    accounts[account.role] = id
    if (account.role === 'owner') {
      const settings = JSON.stringify(DEFAULT_TEXTILE_SETTINGS)
      const house = await sql<{ id: string }>`select workroom_found(${name}, ${DEMO_ZONE}, ${settings}::jsonb, ${id}::uuid) as id`.execute(
        owner,
      )
      workroom = house.rows[0]!.id
    } else {
      await sql`select membership_add(${workroom}::uuid, ${id}::uuid, ${account.role})`.execute(owner)
    }
  }
  return { workroom, accounts }
}

async function seedCloths(room: Room): Promise<Record<string, string>> {
  const ids: Record<string, string> = {}
  for (const { fields, tests, others } of DEMO_CLOTHS) {
    const { id } = await createCloth(room, fields)
    ids[fields.code] = id
    const noted = {
      testedOn: '2026-10-05',
      tester: 'Dario Anselm',
      cycles: 5,
      note: 'Strips with weights, 60 s at each load, rested 30 min. Figures invented for the demo.',
    }
    for (const test of tests) await createTest(room, id, { ...noted, test: stripTest(test) })
    for (const other of others) await createTest(room, id, { ...noted, ...other })
  }
  return ids
}

async function seedPeople(room: Room, clients: readonly DemoClient[]): Promise<Record<string, string>> {
  const ids: Record<string, string> = {}
  for (const { wearers, ...fields } of clients) {
    const client = await createClient(room, fields)
    for (const { flags, measurings, ...wearer } of wearers) {
      const { id } = await createWearer(room, client.id, wearer)
      ids[wearer.name] = id
      if (flags) await noteFlags(room, id, flags)
      for (const { cm, ...measuring } of measurings)
        await createMeasuring(room, id, { ...measuring, measuredBy: 'Dario Anselm', values: fromCm(cm) })
    }
  }
  return ids
}

interface DemoGarment {
  readonly code: string
  readonly name: string
  readonly wearer: string
  readonly dueOn: string
  readonly stage: 'enquiry' | 'drafting' | 'mock-up' | 'fitting' | 'cut' | 'handed-over'
  readonly note: string | null
  /** Label and cloth code, from the outside in. */
  readonly layers: readonly (readonly [string, string])[]
  /** Pa, at every level or by level. */
  readonly hold?: number | Readonly<Partial<Record<LevelId, number>>>
  readonly alterations?: readonly Alteration[]
  readonly centreBack: 'lacing' | 'seam'
  readonly boned?: true
}

/** A laced back stands open by 50 mm at every level and by 320 mm unlaced, with a dresser at hand; a seam takes no gap. */
const withBack = (document: GarmentDocument, centreBack: DemoGarment['centreBack']): GarmentDocument => ({
  ...document,
  style: { ...document.style, centreBack },
  use: centreBack === 'lacing' ? { ...document.use, opens: 'part', dresser: 'Mirela Quist' } : document.use,
  levels: document.levels.map((level) => ({
    ...level,
    gapBack: mm(centreBack === 'lacing' ? 50 : 0),
    opening: centreBack === 'lacing' ? mm(320) : null,
  })),
})

const GARMENTS: readonly DemoGarment[] = [
  {
    code: 'LS-031',
    centreBack: 'lacing',
    boned: true,
    name: 'Heron bodice, mock-up',
    wearer: 'Ilse Marenbach',
    dueOn: '2026-12-18',
    stage: 'mock-up',
    note: 'Two light layers, to see the lines; taken in at the waist on the wearer.',
    layers: [
      ['Mock-up', 'MU-02'],
      ['Light net', 'PN-12'],
    ],
    hold: { bust: 320, underbust: 320, waist: 420, 'high-hip': 300, hip: 300 },
    alterations: [
      {
        id: 'fitted-waist',
        kind: 'move',
        name: 'side front, side seam at waist',
        role: { piece: 'side-front', edge: 'side', node: 'waist' },
        dx: mm(-3),
        dy: mm(0),
        carry: true,
        on: true,
      },
    ],
  },
  {
    code: 'LS-032',
    centreBack: 'lacing',
    boned: true,
    name: 'Heron bodice',
    wearer: 'Ilse Marenbach',
    dueOn: '2027-01-22',
    stage: 'cut',
    note: 'Shell, two power nets and lining.',
    layers: [
      ['Shell', 'SH-14'],
      ['Power net outer', 'PN-30'],
      ['Power net inner', 'PN-30'],
      ['Lining', 'LN-05'],
    ],
  },
  {
    code: 'LS-040',
    centreBack: 'lacing',
    name: 'Chorus bodice',
    wearer: 'Tomma Felsing',
    dueOn: '2027-02-05',
    stage: 'drafting',
    note: null,
    layers: [
      ['Shell', 'SH-09'],
      ['Light net', 'PN-12'],
      ['Lining', 'LN-05'],
    ],
    hold: 700,
  },
  {
    code: 'AR-007',
    centreBack: 'lacing',
    name: 'Pairs dress bodice',
    wearer: 'Annika Roswald',
    dueOn: '2026-12-30',
    stage: 'drafting',
    note: 'Laced back.',
    layers: [
      ['Shell', 'VL-21'],
      ['Lining', 'LN-05'],
    ],
  },
]

const layersOf = (garment: DemoGarment, cloths: Readonly<Record<string, string>>, zone: string): LayerChoice[] =>
  garment.layers.map(([label, code], i) => ({
    id: `${zone}-${i + 1}`,
    label,
    clothId: cloths[code]!,
    direction: 'crosswise',
    count: 1,
    cutRatio: 1,
  }))

async function seedGarment(
  room: Room,
  garment: DemoGarment,
  wearers: Readonly<Record<string, string>>,
  cloths: Readonly<Record<string, string>>,
) {
  const { code, name, dueOn, stage, note } = garment
  const { id } = await createGarment(room, { code, name, dueOn, stage, note, wearerId: wearers[garment.wearer]! })
  const copy = await getWorkingCopy(room, id)
  const plain: GarmentDocument = {
    ...copy.document,
    plans: { front: layersOf(garment, cloths, 'front'), back: layersOf(garment, cloths, 'back') },
    levels: copy.document.levels.map((level) => ({
      ...level,
      hold: pascal((typeof garment.hold === 'object' ? garment.hold[level.level] : garment.hold) ?? level.hold),
    })),
    alterations: garment.alterations ?? [],
  }
  const saved = await saveWorkingCopy(room, id, { base: copy.revision, document: withBack(plain, garment.centreBack) })
  if (!saved.solution) throw new Error(`${code} does not solve: ${saved.problem?.message}`)
  if (!garment.boned) return { id, saved }
  const structure = bonesFor(saved.solution.draft.pieces)
  const boned = await saveWorkingCopy(room, id, { base: saved.revision, document: { ...saved.document, structure } })
  if (!boned.solution) throw new Error(`${code} does not solve with its bones: ${boned.problem?.message}`)
  return { id, saved: boned }
}

/** Spiral bones over the panels, two beside the eyelets of a laced back, all under shell and outer net. */
function bonesFor(pieces: readonly DraftPiece[]): StructureChoice {
  const stock = DEFAULT_STOCK.find(({ id }) => id === 'spiral-stainless-6')!
  const counts: Readonly<Record<string, number>> = { 'front-centre': 1, 'side-front': 2, 'side-back': 1 }
  const bones = pieces.flatMap(
    (piece) =>
      layOutBones(
        piece,
        counts[piece.id] ?? 0,
        stock,
        `bone-${piece.id}`,
        (index) => `${piece.name} bone${counts[piece.id] === 1 ? '' : ` ${index + 1}`}`,
      ).bones,
  )
  const [back] = layOutBones(
    pieces.find(({ id }) => id === 'back-centre')!,
    1,
    stock,
    'bone-back-centre',
    () => 'Bone',
  ).bones
  const beside = [0.08, 0.5].map((at, index) => ({
    ...back!,
    id: `bone-eyelets-${index}`,
    name: index === 0 ? 'Bone at the laced edge' : 'Bone beyond the eyelets',
    place: { kind: 'panel' as const, piece: 'back-centre' as const, at },
    top: { kind: 'level' as const, level: 'bust' as const, above: mm(50) },
  }))
  return {
    bones: [...bones, ...beside].map((bone) => ({ ...bone, under: 2 })),
    closures: { front: null, back: DEFAULT_CLOSURES.lacing },
  }
}

/** Loads the demo workroom, and a small second one that must stay apart from it, through the same
 * services as the routes. One transaction: all of it or nothing. */
export function seedDemo(owner: Database, now: Date): Promise<{ readonly first: DemoIds; readonly second: DemoIds }> {
  return owner.transaction().execute(async (db) => {
    const first = await found(db, 'Lake Stage Costume Room')
    const second = await found(db, 'North Quay Sewing Loft')
    const today = dateIn(DEMO_ZONE, now)

    await enterWorkroom(db, first.workroom)
    {
      const as = (role: 'owner' | 'drafter'): Room => ({ db, workroom: first.workroom, account: first.accounts[role]!, role, now, today })
      const room = as('drafter')
      const cloths = await seedCloths(room)
      const wearers = await seedPeople(room, DEMO_CLIENTS)
      for (const garment of GARMENTS) {
        const { id, saved } = await seedGarment(room, garment, wearers, cloths)
        if (garment.code === 'LS-031') {
          const fits = await createVersion(room, id, {
            base: saved.revision,
            name: 'Mock-up that fits',
            note: 'Fitted; to be recut in the final cloth.',
          })
          await recordFitting(room, id, {
            versionId: fits.id,
            fittedOn: '2026-11-24',
            note: 'Laced by Mirela; the waist a little narrow.',
            levels: [
              { level: 'bust', gap: mm(52), feel: 'right', pull: null },
              { level: 'underbust', gap: mm(50), feel: 'right', pull: null },
              { level: 'waist', gap: mm(38), feel: 'close', pull: { force: newton(2.4), tab: mm(40) } },
              { level: 'high-hip', gap: mm(51), feel: 'right', pull: null },
            ],
          })
        }
        if (garment.code !== 'LS-032') continue
        const version = await createVersion(room, id, { base: saved.revision, name: 'First cut', note: 'After the mock-up fitting.' })
        if (version.stops > 0)
          throw new Error(`${garment.code} has a stop: ${saved.solution!.cautions.find((one) => one.severity === 'stop')?.message}`)
        await clearVersion(as('owner'), version.id, { name: null, reason: null })
      }
      const remnant = await createCloth(room, {
        code: 'RM-01',
        name: 'Remnant, last season',
        lot: null,
        supplier: null,
        composition: '',
        mass: null,
        thickness: 0.5,
        width: null,
        note: null,
      })
      await archiveCloth(room, remnant.id, true)
      await keepBoneStock(room, {
        name: 'Spiral steel 8 mm, stainless',
        kind: 'spiral-steel',
        width: mm(8),
        thickness: mm(1.6),
        modulus: 190,
        stiffness: 0.0045,
        rusts: false,
        leastRadius: mm(70),
        lengths: [],
      })
      await measurePrinter(room, { name: 'Office printer', acrossMm: 99.4, alongMm: 99.8 })
    }

    await enterWorkroom(db, second.workroom)
    {
      const room: Room = { db, workroom: second.workroom, account: second.accounts.owner!, role: 'owner', now, today }
      const { id } = await createCloth(room, { ...DEMO_CLOTHS[0]!.fields, code: 'NQ-1', name: 'Shell, quay blue' })
      await createTest(room, id, {
        testedOn: '2026-09-14',
        tester: null,
        cycles: 3,
        note: null,
        test: stripTest(DEMO_CLOTHS[0]!.tests[0]!),
      })
      const wearers = await seedPeople(room, [
        { ...DEMO_CLIENTS[1]!, name: 'Quay Rowing Revue', wearers: [{ ...DEMO_CLIENTS[1]!.wearers[0]!, name: 'Solveig Amsel' }] },
      ])
      const garment: DemoGarment = {
        code: 'NQ-01',
        centreBack: 'seam',
        name: 'Revue bodice',
        wearer: 'Solveig Amsel',
        dueOn: '2027-01-09',
        stage: 'drafting',
        note: null,
        layers: [['Shell', 'NQ-1']],
      }
      const { id: made, saved } = await seedGarment(room, garment, wearers, { 'NQ-1': id })
      const one = await createVersion(room, made, { base: saved.revision, name: 'Draft one', note: null })
      await recordFitting(room, made, {
        versionId: one.id,
        fittedOn: '2026-11-20',
        note: null,
        levels: [{ level: 'waist', gap: null, feel: 'right', pull: null }],
      })
      await keepBoneStock(room, {
        name: 'Plastic 8 mm',
        kind: 'plastic',
        width: mm(8),
        thickness: mm(1.5),
        modulus: 2.5,
        stiffness: null,
        rusts: false,
        leastRadius: mm(300),
        lengths: [],
      })
      await measurePrinter(room, { name: 'Loft plotter', acrossMm: 100.2, alongMm: 100 })
    }
    return { first, second }
  })
}
