import { beforeAll, describe, expect, it } from 'vitest'
import { call, SECOND, signIn } from './caller'

let drafter: string
let maker: string
beforeAll(async () => {
  ;[drafter, maker] = await Promise.all([signIn('drafter'), signIn('maker')])
})
const stock = {
  name: 'Flat steel 5 mm, coated',
  kind: 'flat-steel',
  width: 5,
  thickness: 0.5,
  modulus: 200,
  stiffness: null,
  rusts: true,
  leastRadius: 1500,
  lengths: [200, 250],
}
const names = async (cookie: string) => ((await call('stock.list', {}, cookie)).body.items as { name: string }[]).map((one) => one.name)

describe('bones in stock', () => {
  it('are kept by name, changed under it, put away and brought back, by who drafts', async () => {
    const first = await call('stock.save', { body: stock }, drafter)
    expect(first.status).toBe(201)
    const again = await call('stock.save', { body: { ...stock, name: 'FLAT steel 5 mm, coated', leastRadius: 1200 } }, drafter)
    expect(again.body).toMatchObject({ id: first.body.id, leastRadius: 1200, lengths: [200, 250] })
    expect(await names(maker)).toContain('FLAT steel 5 mm, coated')
    expect((await call('stock.save', { body: stock }, maker)).status).toBe(403)
    await call('stock.remove', { id: first.body.id }, drafter)
    expect(await names(drafter)).not.toContain('FLAT steel 5 mm, coated')
    expect((await call('stock.save', { body: stock }, drafter)).body.id).toBe(first.body.id)
  })

  it('are refused by the field, and stay in their workroom', async () => {
    const refused = await call('stock.save', { body: { ...stock, name: ' ', width: 0, lengths: [5] } }, drafter)
    expect(refused.status).toBe(422)
    expect(refused.body.fields.map((field: { path: string }) => field.path)).toEqual(
      expect.arrayContaining(['name', 'width', expect.stringMatching(/^lengths/)]),
    )
    const second = await signIn('owner', SECOND)
    expect(await names(second)).not.toContain(stock.name)
  })
})
