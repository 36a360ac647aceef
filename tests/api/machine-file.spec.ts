import { beforeAll, describe, expect, inject, it } from 'vitest'
import { routePath } from '../../shared/schemas/client'
import { signIn } from './caller'

let cookie: string
beforeAll(async () => {
  cookie = await signIn('maker')
})

const strip = { width: 50, gauge: 100 }
async function send(body: BodyInit, query: object = strip) {
  const base = inject('baseUrl')
  const answer = await fetch(`${base}${routePath('solve.run', { query })}`, {
    method: 'POST',
    headers: { origin: base, cookie, 'content-type': 'text/csv' },
    body,
    duplex: 'half',
  } as RequestInit)
  return { status: answer.status, body: await answer.json() }
}

/** Invented: cycles to 60 mm, 0.15 N a mm on the way out and a tenth less on the way back. */
function csv(heading: string, row: (extension: number, load: number) => string, rows = 2000, cycles = 5): string {
  const each = rows / cycles
  const lines = [heading]
  for (let i = 0; i < rows; i++) {
    const part = (i % each) / each
    const extension = 60 * (1 - Math.abs(2 * part - 1))
    lines.push(row(extension, 0.15 * extension * (part > 0.5 ? 0.9 : 1)))
  }
  return lines.join('\n')
}
const plain = (rows?: number) => csv('Time (s),Extension (mm),Load (N)', (e, l) => `0,${e.toFixed(4)},${l.toFixed(5)}`, rows)

describe('a machine’s file', () => {
  it('gives its last loading and the return after it, thinned, and keeps the earlier ones for drawing', async () => {
    const { status, body } = await send(plain())
    expect(status).toBe(200)
    expect(body).toMatchObject({ rows: 2000, cycles: 5, hasReturn: true, specimen: { width: 50, gauge: 100, restLength: null } })
    expect(body.earlier).toHaveLength(4)
    expect(body.specimen.readings.length).toBeLessThan(45)
    const top = body.specimen.readings.reduce((most: { load: number }, one: { load: number }) => (one.load > most.load ? one : most))
    expect(top).toMatchObject({ length: expect.closeTo(160, 6), load: expect.closeTo(9, 6) })
  })

  it.each([
    ['semicolons and decimal commas', csv('Kraft;Extension (cm);Load (cN)', (e, l) => `0;${e / 10};${l * 100}`.replaceAll('.', ','))],
    ['tabs and a row of units', csv('Load\tElongation\n[kgf]\t[%]', (e, l) => `${l / 9.80665}\t${e}`)],
    ['inches and pounds', csv('Force (lbf),Displacement / inch', (e, l) => `${l / 4.4482216152605},${e / 25.4}`)],
  ])('reads %s', async (_, text) => {
    const { status, body } = await send(text)
    expect(status).toBe(200)
    const longest = Math.max(...body.specimen.readings.map((one: { length: number }) => one.length))
    const largest = Math.max(...body.specimen.readings.map((one: { load: number }) => one.load))
    expect([longest, largest]).toEqual([expect.closeTo(160, 3), expect.closeTo(9, 3)])
  })

  it('reads UTF-16 as some machines write it', async () => {
    const { status, body } = await send(Buffer.from(`\ufeff${plain()}`, 'utf16le'))
    expect([status, body.rows]).toEqual([200, 2000])
  })

  it('asks back what it does not say, and reads it with the answer', async () => {
    const text = csv('a,b', (e, l) => `${l},${e}`)
    const asked = await send(text)
    expect(asked.status).toBe(422)
    expect(asked.body).toMatchObject({
      type: '/problems/columns-unclear',
      ask: { headings: ['a', 'b'], columns: { load: null, loadUnit: null, extension: null, lengthUnit: null } },
      fields: [{ path: 'file' }],
    })
    const read = await send(text, { ...strip, load: 0, loadUnit: 'N', extension: 1, lengthUnit: 'mm' })
    expect([read.status, read.body.cycles]).toEqual([200, 5])
  })

  it('is refused at its field when it is something else, empty, or 51 MB', async () => {
    const said = async (body: BodyInit) => {
      const answer = await send(body)
      return [answer.status, answer.body.fields?.[0]?.path, answer.body.fields?.[0]?.message]
    }
    expect(await said('Dear workroom,\nthe cloth is on its way.\n')).toEqual([
      422,
      'file',
      expect.stringContaining('no run of a tensile machine'),
    ])
    expect(await said(new Uint8Array(200_000))).toEqual([422, 'file', expect.stringMatching(/[.]$/)])
    expect(await said('')).toEqual([422, 'file', 'Choose a file.'])
    expect(await said(new Uint8Array(51_000_000))).toEqual([413, 'file', expect.stringContaining('larger than 50 MB')])
    const flat = csv('Extension (mm),Load (N)', () => '5,1')
    expect(await said(flat)).toEqual([422, 'file', expect.stringContaining('does not get longer')])
  })

  it('is read in turn when many come at once', async () => {
    const answers = await Promise.all(Array.from({ length: 6 }, (_, i) => send(plain(1000 + 100 * i))))
    expect(answers.map(({ status, body }) => [status, body.rows])).toEqual(Array.from({ length: 6 }, (_, i) => [200, 1000 + 100 * i]))
  })

  it('leaves the server answering while it reads a large one', async () => {
    const large = plain(600_000)
    const base = inject('baseUrl')
    let answered = 0
    let longest = 0
    let reading = true
    const sent = send(large).finally(() => (reading = false))
    while (reading) {
      const began = performance.now()
      expect((await fetch(`${base}/api/health`)).ok).toBe(true)
      longest = Math.max(longest, performance.now() - began)
      answered++
      await new Promise((wait) => setTimeout(wait, 10))
    }
    const { status, body } = await sent
    expect([status, body.rows]).toEqual([200, 600_000])
    expect(answered).toBeGreaterThan(5)
    expect(longest).toBeLessThan(500)
  })
})
