import { execFileSync } from 'node:child_process'
import { mkdtempSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import pg from 'pg'
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest'
import type { GarmentDocument } from '../../shared/domain/document/types'
import type { GarmentSummary } from '../../shared/schemas/garments'
import { call, signIn } from './caller'

let owner: string
let drafter: string
let maker: string
let db: pg.Client
let bodice: GarmentSummary
let mockUp: GarmentSummary
beforeAll(async () => {
  ;[owner, drafter, maker] = await Promise.all([signIn('owner'), signIn('drafter'), signIn('maker')])
  const { items } = (await call('garments.list', {}, owner)).body as { items: GarmentSummary[] }
  bodice = items.find((one) => one.code === 'LS-032')!
  mockUp = items.find((one) => one.code === 'LS-031')!
  db = new pg.Client({ connectionString: inject('ownerUrl') })
  await db.connect()
})
afterAll(() => db.end())

const copyOf = async (garment: string) => (await call('garments.workingCopy', { id: garment }, drafter)).body
const save = (garment: string, base: number, document: GarmentDocument) =>
  call('garments.saveWorkingCopy', { id: garment, body: { base, document } }, drafter)
const pdfText = (bytes: ArrayBuffer): string => {
  const file = join(mkdtempSync(join(tmpdir(), 'tf-print-')), 'pattern.pdf')
  writeFileSync(file, Buffer.from(bytes))
  return execFileSync('pdftotext', ['-layout', file, '-'], { encoding: 'utf8' })
}

describe('working copies', () => {
  it('solve on the server, and show the turn from stretch or reduction to hold as layers are added', async () => {
    const governs = async (garment: string) => {
      const { revision, document } = await copyOf(garment)
      const levels = document.levels.map((level: object) => ({ ...level, hold: 900 }))
      // Without bones: what is rigid gives no stretch, and shows the turn later.
      const structure = { bones: [], closures: { front: null, back: null } }
      const saved = await save(garment, revision, { ...document, levels, structure, alterations: [] })
      await save(garment, saved.body.revision, document)
      return saved.body.solution.rings.map((ring: { governs: string }) => ring.governs)
    }
    expect(await governs(bodice.id)).toContain('hold')
    expect(await governs(mockUp.id)).not.toContain('hold')
  })

  it('answer 409 with theirs to a stale base, and keep what stands', async () => {
    const copy = await copyOf(mockUp.id)
    const first = await save(mockUp.id, copy.revision, { ...copy.document, use: { water: true, strapless: false } })
    expect(first.body.revision).toBe(copy.revision + 1)
    const stale = await save(mockUp.id, copy.revision, copy.document)
    expect(stale.status).toBe(409)
    expect(stale.body.theirs.revision).toBe(copy.revision + 1)
    expect(stale.body.theirs.document.use.water).toBe(true)
  })

  it('keep the last good draft when a new input cannot be drafted', async () => {
    const copy = await copyOf(mockUp.id)
    const broken = await save(mockUp.id, copy.revision, { ...copy.document, plans: { ...copy.document.plans, back: [] } })
    expect(broken.status).toBe(200)
    expect(broken.body.solution).toBeNull()
    expect(broken.body.problem).toMatchObject({ code: 'no-layers', step: 'layers', at: 'back' })
    expect(broken.body.lastGood.revision).toBe(copy.revision)
    expect(broken.body.lastGood.solution.draft.pieces).toHaveLength(4)
    const version = await call('versions.create', { id: mockUp.id, body: { base: broken.body.revision, name: 'Not drafted' } }, drafter)
    expect(version.body.type).toBe('/problems/cannot-draft')
    const mended = await save(mockUp.id, broken.body.revision, copy.document)
    expect(mended.body.lastGood.revision).toBe(mended.body.revision)
  })

  it('refuse a document that no bench could have made, at its field', async () => {
    const copy = await copyOf(mockUp.id)
    const style = { ...copy.document.style, princessAt: 2 }
    const answer = await save(mockUp.id, copy.revision, { ...copy.document, style })
    expect(answer.body.fields[0].path).toBe('document.style.princessAt')
  })
})

describe('versions', () => {
  it('keep a complete copy that the database itself will not change', async () => {
    const copy = await copyOf(bodice.id)
    const before = (await call('versions.get', { id: bodice.latestVersion!.id }, owner)).body
    await save(bodice.id, copy.revision, { ...copy.document, state: 'wet' })
    const after = (await call('versions.get', { id: bodice.latestVersion!.id }, owner)).body
    expect(after).toEqual(before)
    expect(after.kept.draft.pieces).toEqual(copy.solution.draft.pieces)
    expect(after.body.rings).toEqual(copy.solution.rings)
    expect(after.wearerName).toBe(bodice.wearerName)
  })

  it('are restored as a new working copy', async () => {
    const copy = await copyOf(bodice.id)
    const version = (await call('versions.get', { id: bodice.latestVersion!.id }, owner)).body
    const stale = await call('versions.restore', { id: version.id, body: { base: copy.revision - 1 || 99 } }, drafter)
    expect(stale.status).toBe(409)
    const restored = await call('versions.restore', { id: version.id, body: { base: copy.revision } }, drafter)
    expect(restored.body.document).toEqual(version.kept.document)
    expect(restored.body.revision).toBe(copy.revision + 1)
  })

  it('take numbers one after another, also when saved at once', async () => {
    const { revision } = await copyOf(mockUp.id)
    const last = (await call('versions.list', { id: mockUp.id }, drafter)).body.items[0].number as number
    const made = await Promise.all(
      ['a', 'b', 'c'].map((name) => call('versions.create', { id: mockUp.id, body: { base: revision, name } }, drafter)),
    )
    expect(made.map((one) => one.body.number).toSorted()).toEqual([last + 1, last + 2, last + 3])
  })

  it('show a maker cleared ones alone, without name, girth or condition', async () => {
    const { items } = (await call('garments.list', {}, maker)).body as { items: GarmentSummary[] }
    expect(items.map((one) => one.code)).toEqual(['LS-032'])
    expect((await call('garments.get', { id: mockUp.id }, maker)).body.type).toBe('/problems/not-cleared')
    const uncleared = (await call('versions.list', { id: mockUp.id }, drafter)).body.items[0]
    expect((await call('versions.list', { id: mockUp.id }, maker)).body.items).toEqual([])
    for (const route of ['versions.get', 'print.tiles', 'print.pattern'] as const) {
      expect((await call(route, { id: uncleared.id }, maker)).body.type).toBe('/problems/not-cleared')
    }
    const version = (await call('versions.get', { id: bodice.latestVersion!.id }, maker)).body
    expect(version.body).toBeNull()
    expect(version.wearerName).toBeNull()
    const seen = JSON.stringify([items, version])
    for (const name of bodice.wearerName!.split(' ')) expect(seen).not.toContain(name)
    for (const word of ['"girth"', 'Girth"', '"frame":{"', '"measured"', '"body":{']) expect(seen, word).not.toContain(word)
    expect(version.kept.document.measuringId).toBeNull()
    expect(JSON.stringify(version.kept)).not.toMatch(/reflux|pregnan|nursing|circulation/i)
  })

  it('are cleared over a stop by the owner alone, by name and reason, and never over a stop that is barred', async () => {
    const [version] = (await call('versions.list', { id: mockUp.id }, drafter)).body.items
    const set = async (stops: number, barred: boolean) => {
      await db.query('begin')
      await db.query(`select set_config('tenterframe.workroom', $1, true)`, [inject('first').workroom])
      await db.query('update version set stops = $1, barred = $2 where id = $3', [stops, barred, version.id])
      await db.query('commit')
    }
    const clear = (cookie: string, body: object = {}) => call('versions.clear', { id: version.id, body }, cookie)
    await set(1, true)
    expect((await clear(owner, { name: 'Orla Winterfeld', reason: 'Seen.' })).body.type).toBe('/problems/stop-barred')
    await set(1, false)
    expect((await clear(drafter, { name: 'Dario Anselm', reason: 'Seen.' })).body.type).toBe('/problems/stop-stands')
    expect((await clear(owner)).body.fields.map((one: { path: string }) => one.path)).toEqual(['name', 'reason'])
    const cleared = await clear(owner, { name: 'Orla Winterfeld', reason: 'Fitted on the stand, worn for one scene.' })
    expect(cleared.body.cleared).toMatchObject({ by: 'Orla Winterfeld', reason: 'Fitted on the stand, worn for one scene.' })
    expect((await clear(owner, { name: 'a', reason: 'b' })).body.type).toBe('/problems/already-cleared')
    const list = (await call('versions.list', { id: mockUp.id }, maker)).body.items
    expect(list[0].cleared.reason).toBeNull()
  })
})

describe('what a version outlives', () => {
  it('prints, with tiles and a PDF, though its cloth is archived', async () => {
    const version = (await call('versions.get', { id: bodice.latestVersion!.id }, owner)).body
    const used = version.kept.document.plans.front[0].clothId
    expect((await call('cloths.archive', { id: used }, drafter)).body.archivedAt).not.toBeNull()
    expect((await call('versions.get', { id: version.id }, owner)).body).toEqual(version)
    const tiles = (await call('print.tiles', { id: version.id, query: { paper: 'A3' } }, maker)).body
    expect([tiles.page.width, tiles.page.height].toSorted()).toEqual([297, 420])
    const pdf = await call('print.pattern', { id: version.id }, maker)
    expect(pdf.headers.get('content-type')).toBe('application/pdf')
    const text = pdfText(pdf.body)
    expect(text).toContain('LS-032')
    expect(text).not.toContain(bodice.wearerName!.split(' ')[1])
    const copy = await copyOf(bodice.id)
    expect(copy.input.cloths.find((one: { id: string }) => one.id === used).archived).toBe(true)
    expect(copy.solution).not.toBeNull()
    await call('cloths.restore', { id: used }, drafter)
  })

  it('prints, marked, though its body was erased', async () => {
    const { id } = bodice.latestVersion!
    await db.query('begin')
    await db.query(`select set_config('tenterframe.workroom', $1, true)`, [inject('first').workroom])
    await db.query('select version_body_erase($1, now())', [bodice.wearerId])
    await db.query('commit')
    const version = (await call('versions.get', { id }, owner)).body
    expect(version).toMatchObject({ body: null, wearerName: null, bodyErased: true })
    expect(version.kept.draft.pieces).toHaveLength(4)
    expect(pdfText((await call('print.pattern', { id }, owner)).body)).toContain('body erased')
  })
})
