import DxfParser from 'dxf-parser'
import sharp from 'sharp'
import { beforeAll, describe, expect, it } from 'vitest'
import type { GarmentSummary } from '../../shared/schemas/garments'
import type { VersionSummary } from '../../shared/schemas/versions'
import { call, SECOND, signIn } from './caller'

let drafter: string
let maker: string
let version: string
beforeAll(async () => {
  ;[drafter, maker] = await Promise.all([signIn('drafter'), signIn('maker')])
  const { items } = (await call('garments.list', {}, drafter)).body as { items: GarmentSummary[] }
  const versions = await call('versions.list', { id: items.find((one) => one.code === 'LS-032')!.id }, drafter)
  version = (versions.body.items as VersionSummary[]).find((one) => one.cleared)!.id
})
const text = (body: ArrayBuffer) => new TextDecoder().decode(body)

describe('files for other programs', () => {
  it('gives the pieces as SVG, DXF and a preview, to a maker as well', async () => {
    const svg = await call('print.svg', { id: version }, maker)
    expect(svg.headers.get('content-type')).toContain('image/svg+xml')
    expect(svg.headers.get('content-disposition')).toBe('attachment; filename="LS-032-version-1.svg"')
    expect(text(svg.body)).toContain('<g id="side-front-cutting-line"')
    const seamOnly = await call('print.svg', { id: version, query: { lines: 'seam' } }, maker)
    expect(text(seamOnly.body)).not.toContain('cutting-line"')
    const dxf = new DxfParser().parseSync(text((await call('print.dxf', { id: version }, maker)).body))!
    expect(Object.keys(dxf.blocks)).toContain('SIDE-FRONT')
    const png = await sharp(Buffer.from((await call('print.png', { id: version }, maker)).body)).metadata()
    expect(png).toMatchObject({ format: 'png' })
    expect(png.width!).toBeGreaterThan(500)
  })

  it('holds no name and no girth of the body', async () => {
    for (const route of ['print.svg', 'print.dxf'] as const) {
      const said = text((await call(route, { id: version }, drafter)).body)
      for (const secret of ['Ilse', 'Marenbach', 'Lake Stage']) expect(said).not.toContain(secret)
    }
  })
})

describe('prints on other papers', () => {
  it('lays chosen pieces on a roll, and says by the field what cannot be laid', async () => {
    const roll = await call('print.tiles', { id: version, query: { paper: 'roll-914', pieces: 'front-centre,side-front' } }, drafter)
    expect(roll.body.tiles).toHaveLength(1)
    expect(roll.body.outlines).toHaveLength(2)
    const typed = await call('print.tiles', { id: version, query: { paper: 'typed', width: 300 } }, drafter)
    expect(typed.status).toBe(422)
    expect(typed.body.problem).toMatchObject({ code: 'paper-size-unlikely', at: 'height' })
    const none = await call('print.tiles', { id: version, query: { pieces: 'sleeve' } }, drafter)
    expect(none.body.problem.code).toBe('nothing-to-print')
  })
})

describe('printers that were measured', () => {
  it('are named, measured again under the same name, used by a print, and put away', async () => {
    const first = await call('printers.measure', { body: { name: 'Hall printer', acrossMm: 98, alongMm: 100.5 } }, maker)
    expect(first.status).toBe(201)
    const again = await call('printers.measure', { body: { name: 'hall PRINTER', acrossMm: 99, alongMm: 100.5 } }, drafter)
    expect(again.body).toMatchObject({ id: first.body.id, acrossMm: 99 })
    const plain = await call('print.tiles', { id: version }, drafter)
    const corrected = await call('print.tiles', { id: version, query: { printer: first.body.id } }, drafter)
    const width = plain.body.orientation === 'portrait' ? 'width' : 'height'
    if (corrected.body.orientation === plain.body.orientation)
      expect(corrected.body.page[width]).toBeCloseTo((plain.body.page[width] * 99) / 100, 6)
    expect((await call('print.pattern', { id: version, query: { printer: first.body.id } }, maker)).headers.get('content-type')).toBe(
      'application/pdf',
    )
    expect((await call('printers.remove', { id: first.body.id }, drafter)).status).toBe(200)
    const left = (await call('printers.list', {}, drafter)).body.items as { name: string }[]
    expect(left.map((one) => one.name)).not.toContain('hall PRINTER')
  })

  it('more than 10 % off are refused by the field, and none of another workroom is taken', async () => {
    const off = await call('printers.measure', { body: { name: 'Far off', acrossMm: 88, alongMm: 100 } }, drafter)
    expect(off.status).toBe(422)
    expect(off.body.fields).toMatchObject([{ path: 'acrossMm' }])
    expect(off.body.fields[0].message).toContain('more than 10 % off')
    const second = await signIn('owner', SECOND)
    const foreign = ((await call('printers.list', {}, second)).body.items as { id: string }[])[0]!
    const taken = await call('print.tiles', { id: version, query: { printer: foreign.id } }, drafter)
    expect(taken.status).toBe(422)
    expect(taken.body.fields).toMatchObject([{ path: 'printer' }])
  })
})
