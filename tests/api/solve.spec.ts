import { beforeAll, describe, expect, it } from 'vitest'
import { readFitting } from '../../shared/domain/fit/fitting'
import type { FittingLevel } from '../../shared/domain/fit/types'
import { recut } from '../../shared/domain/garment/recut'
import type { GarmentInput } from '../../shared/domain/garment/types'
import { inventedInput } from '../fixtures/garment-inputs'
import { call, signIn } from './caller'

let maker: string
let drafter: string
beforeAll(async () => {
  maker = await signIn('maker')
  drafter = await signIn('drafter')
})

const strip = {
  kind: 'strip',
  direction: 'crosswise',
  state: 'dry',
  specimens: [
    {
      width: 50,
      gauge: 100,
      restLength: 103,
      readings: [
        { load: 5, length: 125, on: 'loading' },
        { load: 10, length: 150, on: 'loading' },
      ],
    },
  ],
}

/** A cloth that pulls 400 N/m per unit of strain, tested to 60 %. */
const layer = {
  id: 'shell',
  label: 'Shell',
  count: 1,
  cutRatio: 1,
  cloth: {
    clothId: 'a',
    name: 'A',
    direction: 'crosswise',
    state: 'dry',
    curve: { kind: 'cubic', a: 400, b: 0, knots: [], testedTo: 0.6, residual: 0, spread: 0, specimens: 3, points: [] },
    figures: { stretch: 0.6, growth: null, recovery: null, testTension: null },
    thickness: 0,
    wearLimit: 0.6,
    pullOnLimit: 0.6,
    testedOn: null,
  },
}
const plan = (zone: string) => ({ zone, layers: [layer] })
const ring = {
  level: 'waist',
  name: 'Waist',
  girth: 700,
  frontShare: 0.5,
  segments: [
    { id: 'f', half: 'front', plan: plan('front'), share: 1 },
    { id: 'b', half: 'back', plan: plan('back'), share: 1 },
  ],
  rigidFront: 0,
  rigidBack: 0,
  gapFront: 0,
  gapBack: 0,
  squeeze: 0,
  aspect: 1,
  aspectEstimated: false,
  breath: 20,
}

describe('stateless solving', () => {
  // Test-method formulas of the ASTM D3107 / EN 14704-1 kind: 100 mm held at 150, 103 after rest gives 50, 3 and 94 %.
  it('gives the figures and the curve of a stretch test', async () => {
    const { body } = await call('solve.curve', { body: { test: strip } }, maker)
    expect(body.figures.stretch).toBeCloseTo(0.5, 9)
    expect(body.figures.growth).toBeCloseTo(0.03, 9)
    expect(body.figures.recovery).toBeCloseTo(0.94, 9)
    // Derived: 5 N on 50 mm is 100 N/m at 25 %, 10 N is 200 N/m at 50 %: a line of 400 N/m.
    expect(body.curve.a).toBeCloseTo(400, 3)
    expect(body.curve.b).toBeCloseTo(0, 3)
  })

  // Laplace: 1 N/cm at 70 cm girth is .898 kPa (derived). At 400 N/m per unit of strain 100 N/m is 25 %, so the cut is 700 / 1.25 = 560.
  it('solves a ring from its cut', async () => {
    const { body } = await call(
      'solve.rings',
      { body: { rings: [{ geometry: ring, mode: { solve: 'tension', widths: [280, 280] } }] } },
      maker,
    )
    expect(body.rings[0].problem).toBeNull()
    expect(body.rings[0].solution.tension).toBeCloseTo(100, 6)
    expect(body.rings[0].solution.pressure / 1000).toBeCloseTo(0.898, 3)
  })

  it('gives each ring its own answer', async () => {
    const bare = { ...ring, level: 'bust', segments: [] }
    const { status, body } = await call(
      'solve.rings',
      {
        body: {
          rings: [
            { geometry: bare, mode: { solve: 'cut', hold: 900 } },
            { geometry: ring, mode: { solve: 'cut', hold: 600 } },
          ],
        },
      },
      maker,
    )
    expect(status).toBe(200)
    expect(body.rings[0].problem.code).toEqual(expect.any(String))
    expect(body.rings[1].solution.pressure).toBeCloseTo(600, 3)
  })

  it('drafts pieces from a body and widths, and lays them on pages', async () => {
    const values = {
      bustGirth: 900,
      underbustGirth: 760,
      waistGirth: 700,
      hipGirth: 980,
      neckBaseGirth: 370,
      shoulderLength: 124,
      acrossBack: 350,
      backWaistLength: 410,
      frontWaistLength: 425,
      neckShoulderToBustPoint: 265,
      sideWaistLength: 205,
      waistToHip: 205,
      bustPointDistance: 185,
    }
    const measured = Object.fromEntries(Object.entries(values).map(([key, value]) => [key, { value }]))
    const widths = (
      [
        ['bust', 207],
        ['underbust', 177],
        ['waist', 164],
        ['high-hip', 204],
        ['hip', 225],
      ] as const
    ).map(([level, half]) => ({ level, front: half, back: half, gapFront: 0, gapBack: 0 }))
    const pieces = await call('solve.pieces', { body: { measured, widths } }, maker)
    expect(pieces.status).toBe(200)
    expect(pieces.body.pieces).toHaveLength(4)
    for (const seam of pieces.body.seams) expect(Math.abs(seam.difference), seam.name).toBeLessThan(25)
    const tiles = await call('solve.tiles', { body: { pieces: pieces.body.pieces, paper: 'letter', margin: 12 } }, maker)
    expect(tiles.status).toBe(200)
    expect(tiles.body.margin).toBe(12)
    expect(tiles.body.tiles.length + tiles.body.blank.length).toBe(tiles.body.rows * tiles.body.columns)
  })

  it('says in the domain’s words why something cannot be computed', async () => {
    const answer = await call(
      'solve.pieces',
      {
        body: {
          measured: { bustGirth: { value: 900 } },
          widths: ['bust', 'underbust', 'waist', 'high-hip', 'hip'].map((level) => ({
            level,
            front: 200,
            back: 200,
            gapFront: 0,
            gapBack: 0,
          })),
        },
      },
      maker,
    )
    expect(answer.body.type).toBe('/problems/cannot-solve')
    expect(answer.body.problem.message).toContain('Not measured')
    const odd = await call(
      'solve.curve',
      { body: { test: { ...strip, specimens: [{ ...strip.specimens[0], readings: [{ load: -1, length: 120, on: 'loading' }] }] } } },
      maker,
    )
    expect(odd.body.fields[0].path).toBe('test.specimens.0.readings.0.load')
  })
})

/** The invented garment as the service takes it: ids as it writes them. */
const ids = { shell: 1, net: 2, lining: 3, label: 4, measuring: 5 } as const
const asSent = (input: GarmentInput): GarmentInput =>
  JSON.parse(JSON.stringify(input), (key, value: unknown) =>
    ['id', 'clothId', 'measuringId'].includes(key) && typeof value === 'string' && value in ids
      ? `0000000${ids[value as keyof typeof ids]}-0000-4000-8000-000000000000`
      : value,
  ) as GarmentInput

describe('stateless solving of a fitted garment', () => {
  const garment = asSent(inventedInput())

  it('says what a level reaches on the way on, and the pull it takes', async () => {
    const linear = { geometry: ring, widths: [300, 300] }
    const asked = (needs: number, opening: object) => ({ ring: linear, opening, needs })
    const { status, body } = await call(
      'solve.gettingIn',
      { body: { levels: [asked(800, { kind: 'closed' }), asked(1200, { kind: 'closed' }), asked(1200, { kind: 'by', width: 400 })] } },
      maker,
    )
    expect(status).toBe(200)
    // Derived: the pull-on limit is 60 % here, so 600 mm reach 960; 800 asks for 200 / 600 of strain at 400 N/m, 13.3 N on 100 mm.
    expect(body.levels[0]).toMatchObject({ verdict: 'passes', reach: expect.closeTo(960, 6) })
    expect(body.levels[0].pull).toBeCloseTo((400 * (200 / 600)) / 10, 6)
    expect(body.levels[1]).toMatchObject({ verdict: 'cannot', pull: null })
    expect(body.levels[2].verdict).toBe('passes')
    expect(body.cautions.map((one: { code: string }) => one.code)).toEqual(['cannot-get-in'])
  })

  it('lays a change beside the present rings', async () => {
    const { status, body } = await call(
      'solve.whatIf',
      { body: { input: garment, trials: [{ kind: 'count', zone: 'both', layer: 'net-1', count: 1 }] } },
      drafter,
    )
    expect(status).toBe(200)
    for (const one of body.rings) expect(one.cut).toBeLessThan(0)
    expect(body.document.plans.front[1].count).toBe(1)
  })

  it('says in words why a change cannot be solved, and by its field what is not one', async () => {
    const empty = await call('solve.whatIf', { body: { input: garment, trials: [{ kind: 'layers', zone: 'both', layers: [] }] } }, drafter)
    expect(empty.body).toMatchObject({ type: '/problems/cannot-solve', problem: { code: 'no-layers' } })
    const odd = await call(
      'solve.gettingIn',
      { body: { levels: [{ ring: { geometry: ring, widths: [1] }, opening: { kind: 'closed' }, needs: 800 }] } },
      maker,
    )
    expect(odd.body.fields[0].path).toBe('levels.0.ring.widths')
  })
})

describe('the API description', () => {
  it('has every route of the table, and no other', async () => {
    const { routes, routeIds } = await import('../../shared/schemas/routes')
    const { body } = await call('openapi.get')
    expect(body.openapi).toBe('3.1.0')
    const described = Object.entries(body.paths).flatMap(([path, methods]) =>
      Object.keys(methods as object).map((method) => `${method} ${path}`),
    )
    expect(described.toSorted()).toEqual(
      routeIds.map((id) => `${routes[id].method.toLowerCase()} ${routes[id].path.replace(':id', '{id}')}`).toSorted(),
    )
  })
})

describe('what follows a fitting', () => {
  it('recuts and reads a fitting as the domain does, and answers a garment that cannot be solved with the problem', async () => {
    const items = (await call('garments.list', {}, drafter)).body.items as { id: string; code: string }[]
    const input = async (code: string) =>
      (await call('garments.workingCopy', { id: items.find((one) => one.code === code)!.id }, drafter)).body
    const [fitted, final] = [await input('LS-031'), await input('LS-032')]
    const answer = await call('solve.recut', { body: { fitted: fitted.input, final: final.input } }, drafter)
    expect(answer.status).toBe(200)
    const own = recut(fitted.input, final.input)
    expect(answer.body).toEqual(JSON.parse(JSON.stringify(own.ok && own.value)))
    const bare = { ...final.input, document: { ...final.input.document, plans: { front: [], back: [] } } }
    const refused = await call('solve.recut', { body: { fitted: fitted.input, final: bare } }, drafter)
    expect(refused.body).toMatchObject({ status: 422, problem: { code: 'no-layers' } })

    const { ringInputs, rings } = fitted.solution
    const levels = [{ level: 'waist', gap: 38, feel: 'close', pull: { force: 2.4, tab: 40 } }] as unknown as readonly FittingLevel[]
    const body = { levels, geometries: ringInputs, rings, settings: fitted.input.settings }
    const read = await call('solve.fitting', { body }, drafter)
    expect(read.body).toEqual(JSON.parse(JSON.stringify(readFitting(levels, ringInputs, rings, fitted.input.settings))))
    expect(read.body.stiffness.pulls).toBe(1)
  })
})
