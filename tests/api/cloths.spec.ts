import { readFileSync } from 'node:fs'
import sharp from 'sharp'
import { beforeAll, describe, expect, inject, it } from 'vitest'
import { routePath } from '../../shared/schemas/client'
import type { TestDraft } from '../../shared/schemas/test-draft'
import { SECOND, call, signIn } from './caller'

let drafter: string
let maker: string
let cloth: string

const strip = (length = 150) => ({
  kind: 'strip',
  direction: 'crosswise',
  state: 'dry',
  way: 'weights',
  method: 'workroom strip',
  dwell: 60,
  rest: 30,
  specimens: [{ width: 50, gauge: 100, readings: [{ load: 10, length, on: 'loading' }], restLength: 103 }],
})
const entry = (value: number | null, typed = '') => ({ value, typed })
const draft: TestDraft = {
  kind: 'strip',
  method: 'workroom strip',
  methodNote: '',
  direction: 'angle',
  angle: entry(30, '30'),
  state: 'wet',
  testedOn: '2026-11-30',
  tester: '',
  cycles: 'four or so',
  dwell: '60',
  rest: '',
  acceptable: entry(null),
  note: '',
  loadUnit: 'g',
  hook: entry(0.2, '20 g'),
  widths: [entry(50, '50 mm')],
  gauges: [entry(null, 'ten cm')],
  rests: [entry(null)],
  rows: [{ load: entry(1, '100 g'), on: 'loading', lengths: [entry(null, '1,234')] }],
  runs: [],
  stretch: entry(null),
  ruler: { rest: entry(null), drawn: entry(null) },
}
const noted = { testedOn: '2026-11-30', tester: 'Dario Anselm', cycles: 4, note: null }

/** Sends bytes as the whole body. */
async function send(id: string, bytes: Uint8Array | ReadableStream, cookie: string, type = 'image/jpeg') {
  const base = inject('baseUrl')
  const answer = await fetch(`${base}${routePath('tests.attachPhoto', { id })}`, {
    method: 'PUT',
    headers: { origin: base, cookie, 'content-type': type },
    body: bytes as BodyInit,
    duplex: 'half',
  } as RequestInit)
  return { status: answer.status, body: await answer.json() }
}

beforeAll(async () => {
  ;[drafter, maker] = await Promise.all([signIn('drafter'), signIn('maker')])
  const made = await call(
    'cloths.create',
    { body: { code: `T-${Date.now() % 1e6}`, name: 'Ripple knit', composition: '', thickness: 0.5 } },
    drafter,
  )
  cloth = made.body.id
})

describe('an unfinished test', () => {
  it('is kept as it was typed, counts for nothing, and is finished under the same id', async () => {
    const kept = await call('tests.create', { id: cloth, body: { ...noted, cycles: null, draft } }, maker)
    expect(kept.status).toBe(201)
    expect(kept.body).toMatchObject({ test: null, draft, revision: 1 })
    const seen = await call('cloths.get', { id: cloth }, maker)
    expect(seen.body.tests.find((one: { id: string }) => one.id === kept.body.id).draft).toEqual(draft)
    expect(seen.body.directions).toEqual([])

    const again = await call(
      'tests.update',
      { id: kept.body.id, body: { ...noted, base: 1, draft: { ...draft, note: 'to go on' } } },
      maker,
    )
    expect(again.body).toMatchObject({ revision: 2, draft: { note: 'to go on' } })
    const done = await call('tests.update', { id: kept.body.id, body: { ...noted, base: 2, test: strip() } }, maker)
    expect(done.body).toMatchObject({ id: kept.body.id, draft: null, revision: 3 })
    const [direction] = (await call('cloths.get', { id: cloth }, maker)).body.directions
    expect(direction).toMatchObject({ testId: kept.body.id, direction: 'crosswise', layer: { figures: { stretch: 0.5 } } })

    const back = await call('tests.update', { id: kept.body.id, body: { ...noted, base: 3, draft } }, maker)
    expect(back.status).toBe(422)
    expect(back.body.detail).toContain('stays finished')
  })

  it('is neither both nor neither', async () => {
    for (const body of [noted, { ...noted, draft, test: strip() }]) {
      const answer = await call('tests.create', { id: cloth, body }, drafter)
      expect(answer.status).toBe(422)
      expect(answer.body.fields[0].path).toBe('test')
    }
  })
})

describe('a strip at a typed angle', () => {
  it('stands for itself beside the named directions', async () => {
    const made = await call(
      'tests.create',
      { id: cloth, body: { ...noted, test: { ...strip(140), direction: 'bias', angle: 30 } } },
      drafter,
    )
    expect(made.status).toBe(201)
    const { directions } = (await call('cloths.get', { id: cloth }, drafter)).body
    expect(directions.find((one: { angle?: number }) => one.angle === 30)).toMatchObject({ direction: 'bias', layer: { angle: 30 } })
  })
})

describe('a photograph of the strip', () => {
  /** A picture that names a place, a camera and how it was held, made here. */
  const picture = (orientation: 1 | 6) =>
    sharp({ create: { width: 3000, height: 1000, channels: 3, background: '#c8be9f' } })
      .withExif({
        IFD0: { Make: 'Invented camera' },
        IFD3: { GPSLatitudeRef: 'N', GPSLatitude: '47/1 30/1 0/1', GPSLongitudeRef: 'E', GPSLongitude: '9/1 44/1 0/1' },
      })
      .withMetadata({ orientation })
      .jpeg()
      .toBuffer()
  /** The pointer to the place in Exif, tag 0x8825 of type LONG, in either order of bytes. Source: CIPA DC-008, Exif 2.3 (memory). */
  const hasPlace = (bytes: Buffer) => bytes.includes(Buffer.from('25880400', 'hex')) || bytes.includes(Buffer.from('88250004', 'hex'))
  let test: string
  beforeAll(async () => {
    test = (await call('tests.create', { id: cloth, body: { ...noted, test: { ...strip(), state: 'wet' } } }, drafter)).body.id
  })

  it('is drawn anew: upright, at most 2000 pixels long, without place or camera', async () => {
    const source = await picture(1)
    expect(source.includes('Invented camera')).toBe(true)
    const before = await sharp(source).metadata()
    expect(hasPlace(before.exif!)).toBe(true)

    const answer = await send(test, source, maker)
    expect(answer.status).toBe(200)
    const side = { width: 2000, height: 667 }
    expect(answer.body.photo).toMatchObject(side)

    const got = await call('tests.photo', { id: test }, maker)
    expect(got.status).toBe(200)
    expect(got.headers.get('content-type')).toBe('image/webp')
    expect(got.headers.get('cache-control')).toContain('no-store')
    const bytes = Buffer.from(got.body as ArrayBuffer)
    expect(bytes.includes('Invented camera')).toBe(false)
    expect(hasPlace(bytes)).toBe(false)
    const after = await sharp(bytes).metadata()
    expect(after).toMatchObject({ format: 'webp', ...side })
    expect([after.exif, after.xmp, after.iptc, after.icc]).toEqual([undefined, undefined, undefined, undefined])
  })

  it('is turned upright as the camera noted', async () => {
    const answer = await send(test, await picture(6), maker)
    expect(answer.body.photo).toMatchObject({ width: 667, height: 2000 })
  })

  it('is seen by its own workroom alone', async () => {
    const other = await signIn('owner', SECOND)
    expect((await call('tests.photo', { id: test }, other)).status).toBe(404)
    expect((await call('tests.photo', { id: test })).status).toBe(401)
    expect((await send(test, await picture(6), other)).status).toBe(404)
  })

  it('is refused at its field when it is no picture, another format, cut short, empty or too large', async () => {
    const said = async (bytes: Uint8Array | ReadableStream) => {
      const { status, body } = await send(test, bytes, drafter)
      return [status, body.fields?.[0]?.path, body.fields?.[0]?.message]
    }
    expect(await said(readFileSync('package.json'))).toEqual([422, 'photo', expect.stringContaining('no picture')])
    const tiff = await sharp(await picture(6))
      .tiff()
      .toBuffer()
    expect(await said(tiff)).toEqual([422, 'photo', expect.stringContaining('JPEG, PNG and WebP')])
    const whole = await picture(6)
    expect(await said(whole.subarray(0, whole.length >> 1))).toEqual([422, 'photo', expect.stringContaining('no picture')])
    expect(await said(new Uint8Array())).toEqual([422, 'photo', 'Choose a file.'])
    const large = new Uint8Array(26_000_000)
    expect(await said(large)).toEqual([413, 'photo', expect.stringContaining('larger than 25 MB')])
    const unsaid = new ReadableStream({
      start(controller) {
        for (let i = 0; i < 26; i++) controller.enqueue(new Uint8Array(1_000_000))
        controller.close()
      },
    })
    expect(await said(unsaid)).toEqual([413, 'photo', expect.stringContaining('larger than 25 MB')])
    expect((await call('tests.photo', { id: test }, drafter)).status).toBe(200)
  })

  it('is removed when asked, and then there is none', async () => {
    const removed = await call('tests.removePhoto', { id: test }, drafter)
    expect(removed.body.photo).toBeNull()
    const none = await call('tests.photo', { id: test }, drafter)
    expect([none.status, none.body.type]).toEqual([409, '/problems/no-photo'])
  })
})
