/** A bundle from one workroom to another, and files that are none. ZIPs are read back by fflate and by Python's zipfile. */
import { execFileSync } from 'node:child_process'
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { strFromU8, strToU8, unzipSync, zipSync, type Zippable } from 'fflate'
import { beforeAll, describe, expect, inject, it } from 'vitest'
import { pathLength } from '../../shared/domain/geometry/path'
import type { Bundle, Imported } from '../../shared/schemas/bundle'
import type { GarmentSummary, WorkingCopyView } from '../../shared/schemas/garments'
import { routePath } from '../../shared/schemas/client'
import type { VersionSummary, VersionWhole } from '../../shared/schemas/versions'
import { call, SECOND, signIn } from './caller'

let drafter: string
let second: string
let version: string
let wearer: string
beforeAll(async () => {
  ;[drafter, second] = await Promise.all([signIn('drafter'), signIn('owner', SECOND)])
  const { items } = (await call('garments.list', {}, drafter)).body as { items: GarmentSummary[] }
  const versions = await call('versions.list', { id: items.find((one) => one.code === 'LS-032')!.id }, drafter)
  version = (versions.body.items as VersionSummary[]).find((one) => one.cleared)!.id
  const client = (await call('clients.create', { body: { name: 'Guest of the loft' } }, second)).body as { id: string }
  wearer = (await call('wearers.create', { id: client.id, body: { name: 'Guest' } }, second)).body.id as string
})

const bring = async (bytes: Uint8Array, query: object = { wearerId: wearer }, cookie = second) => {
  const base = inject('baseUrl')
  const answer = await fetch(`${base}${routePath('garments.import', { query })}`, {
    method: 'POST',
    headers: { origin: base, cookie, 'content-type': 'application/zip' },
    body: Buffer.from(bytes),
  })
  return { status: answer.status, body: await answer.json() }
}
const bundled = async (body: '0' | '1') =>
  new Uint8Array((await call('print.bundle', { id: version, query: { body } }, drafter)).body as ArrayBuffer)
const dataOf = (zip: Uint8Array) => JSON.parse(strFromU8(unzipSync(zip)['bundle.json']!)) as Bundle
const zipOf = (data: unknown, more: Zippable = {}) => zipSync({ 'bundle.json': strToU8(JSON.stringify(data)), ...more })

describe('a bundle of a version', () => {
  it('holds data with its schema, prints and a read-me, and any reader of ZIP opens it', async () => {
    const answer = await call('print.bundle', { id: version }, drafter)
    expect(answer.headers.get('content-type')).toBe('application/zip')
    expect(answer.headers.get('content-disposition')).toBe('attachment; filename="LS-032-version-1.zip"')
    const folder = mkdtempSync(join(tmpdir(), 'tenterframe-bundle-'))
    try {
      const file = join(folder, 'bundle.zip')
      writeFileSync(file, Buffer.from(answer.body as ArrayBuffer))
      const listed = execFileSync('python3', ['-m', 'zipfile', '-l', file], { encoding: 'utf8' })
      for (const name of [
        'bundle.json',
        'bundle.schema.json',
        'read-me.txt',
        'prints/pattern-A4.pdf',
        'prints/pieces.svg',
        'prints/pieces.dxf',
      ])
        expect(listed).toContain(name)
      expect(execFileSync('python3', ['-m', 'zipfile', '-t', file], { encoding: 'utf8' })).toContain('Done testing')
    } finally {
      rmSync(folder, { recursive: true, force: true })
    }
    const files = unzipSync(new Uint8Array(answer.body as ArrayBuffer))
    expect(strFromU8(files['prints/pattern-A4.pdf']!.subarray(0, 5))).toBe('%PDF-')
    expect(JSON.parse(strFromU8(files['bundle.schema.json']!)).required).toContain('document')
  })

  it('is the same file when it is asked for again', async () => {
    expect(Buffer.from(await bundled('1')).equals(Buffer.from(await bundled('1')))).toBe(true)
  })

  it('holds no name, no measuring and nothing of the body unless the measuring is asked for', async () => {
    const whole = (await call('versions.get', { id: version }, drafter)).body as VersionWhole
    const without = dataOf(await bundled('0'))
    expect(without.measuring).toBeNull()
    expect(without.document.measuringId).toBeNull()
    expect(without.kept.draft.frame).toEqual({})
    for (const said of Object.values(unzipSync(await bundled('1'))).map((bytes) => strFromU8(bytes))) {
      expect(said).not.toContain(whole.wearerName!)
      expect(said).not.toContain('pregnancy')
    }
    expect(dataOf(await bundled('1')).measuring!.values).toEqual(whole.body!.measured)
  })

  it('is not for makers', async () => {
    expect((await call('print.bundle', { id: version }, await signIn('maker'))).status).toBe(403)
  })
})

describe('a bundle brought into another workroom', () => {
  it('loses nothing: the same pieces, layers, cloths and tests, the measuring with the wearer chosen', async () => {
    const whole = (await call('versions.get', { id: version }, drafter)).body as VersionWhole
    const sent = dataOf(await bundled('1'))
    const { status, body } = await bring(await bundled('1'))
    expect(status).toBe(201)
    const { garment, cloths, pieces } = body as Imported
    expect(garment).toMatchObject({ code: 'LS-032', name: sent.garment.name, wearerId: wearer })
    expect(pieces).toEqual({ came: 'the same' })

    const copy = (await call('garments.workingCopy', { id: garment.id }, second)).body as WorkingCopyView
    expect(copy.input.measured).toEqual(whole.body!.measured)
    const edges = (draft: VersionWhole['kept']['draft']) =>
      draft.pieces.flatMap((piece) => piece.edges.map(({ id, path }) => [piece.id, id, pathLength(path).toFixed(4)]))
    expect(edges(copy.solution!.draft)).toEqual(edges(whole.kept.draft))

    const there = new Map(cloths.map((cloth, index) => [cloth.id, sent.cloths[index]!]))
    const back = (layers: readonly { readonly clothId: string }[] = []) =>
      layers.map((layer) => ({ ...layer, clothId: there.get(layer.clothId)!.id }))
    const { plans, measuringId, ...rest } = copy.document
    const { plans: before, measuringId: _, ...restBefore } = sent.document
    expect(measuringId).not.toBeNull()
    expect(rest).toEqual(restBefore)
    for (const zone of Object.keys(before) as (keyof typeof before)[]) expect(back(plans[zone])).toEqual(before[zone])
    for (const { id } of cloths) {
      const { tests, code, ...lot } = (await call('cloths.get', { id }, second)).body
      const from = there.get(id)!
      const { id: _id, tests: testsBefore, archived: _archived, code: codeBefore, ...lotBefore } = from
      expect(lot).toMatchObject(lotBefore)
      expect(code.startsWith(codeBefore)).toBe(true)
      expect(tests).toHaveLength(testsBefore.length)
      tests.forEach((test: object, index: number) => expect(test).toMatchObject(testsBefore[index]!))
    }
  })

  it('comes twice under codes of its own, and without a measuring says that it cannot be drafted', async () => {
    const { status, body } = await bring(await bundled('0'))
    expect(status).toBe(201)
    expect(body.garment.code).toBe('LS-032-2')
    for (const { code, before } of (body as Imported).cloths) expect(code).not.toBe(before)
    const client = (await call('clients.create', { body: { name: 'Not measured' } }, second)).body as { id: string }
    const unmeasured = (await call('wearers.create', { id: client.id, body: { name: 'Not measured' } }, second)).body.id as string
    const bare = await bring(await bundled('0'), { wearerId: unmeasured })
    expect(bare.body.pieces).toMatchObject({ came: 'none', message: expect.stringMatching(/[.]$/) })
  })

  it('wants a wearer of this workroom', async () => {
    const zip = await bundled('0')
    expect((await bring(zip, {})).body.fields).toMatchObject([{ path: 'wearerId', message: 'Choose a wearer.' }])
    const whole = (await call('garments.list', {}, drafter)).body as { items: GarmentSummary[] }
    const foreign = await bring(zip, { wearerId: whole.items.find((one) => one.wearerId)!.wearerId })
    expect([foreign.status, foreign.body.fields[0].path]).toEqual([422, 'wearerId'])
  })
})

describe('a file that is no bundle', () => {
  const lotsNow = async () => ((await call('cloths.list', { query: { limit: 100 } }, second)).body.items as unknown[]).length
  const said = async (bytes: Uint8Array) => {
    const { status, body } = await bring(bytes)
    return [status, body.fields?.[0]?.path, body.fields?.[0]?.message]
  }

  it('is refused at its field, and nothing of it stays', async () => {
    const lots = await lotsNow()
    const good = dataOf(await bundled('0'))
    const whole = await bundled('0')
    const refused = (what: string) => [422, 'bundle', expect.stringContaining(what)]
    expect(await said(strToU8('Dear workroom'))).toEqual(refused('is no bundle'))
    expect(await said(zipSync({ 'letter.txt': strToU8('hello') }))).toEqual(refused('is no bundle'))
    expect(await said(whole.subarray(0, 4000))).toEqual(refused('broken or cut short'))
    expect(await said(zipSync({ 'bundle.json': strToU8('{"kind":') }))).toEqual(refused('cannot be read'))
    expect(await said(zipOf(good, { '../../etc/passwd': strToU8('x') }))).toEqual(refused('outside of itself'))
    expect(await said(zipOf(good, { 'C:\\system': strToU8('x') }))).toEqual(refused('outside of itself'))
    expect(await said(zipOf({ hello: 'world' }))).toEqual([422, 'bundle.kind', 'This is not the data of a bundle.'])
    expect(await said(zipOf({ ...good, schema: 2 }))).toEqual([422, 'bundle.schema', expect.stringContaining('newer')])
    expect((await said(zipOf({ ...good, cloths: [] })))[1]).toMatch(/^bundle\.document\.plans\.front\.0\.clothId$/)
    const thin = good.cloths.map((cloth, index) => (index === 0 ? { ...cloth, thickness: 'thin' } : cloth))
    expect((await said(zipOf({ ...good, cloths: thin })))[1]).toBe('bundle.cloths.0.thickness')
    expect(await lotsNow()).toBe(lots)
  })

  it('that bursts when it is unpacked is stopped early', async () => {
    const bomb = zipSync({ 'bundle.json': new Uint8Array(400_000_000) }, { level: 9 })
    expect(bomb.length).toBeLessThan(1_000_000)
    // The size that the file says of itself is made small, in both places where a ZIP keeps it.
    const lying = Buffer.from(bomb)
    for (let at = lying.indexOf('PK\u0003\u0004'); at >= 0; at = -1) lying.writeUInt32LE(100, at + 22)
    const central = lying.lastIndexOf('PK\u0001\u0002')
    lying.writeUInt32LE(100, central + 24)
    for (const file of [bomb, lying]) {
      const began = performance.now()
      expect(await said(file)).toEqual([422, 'bundle', expect.stringContaining('unpacks to more')])
      expect(performance.now() - began).toBeLessThan(3000)
    }
    expect((await call('health.get')).status).toBe(200)
  })
})
