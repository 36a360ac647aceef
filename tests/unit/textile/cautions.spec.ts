import { describe, expect, it } from 'vitest'
import { cautionForMaker, stopsOf } from '../../../shared/domain/cautions/registry'
import type { JudgedRing, TextileContext } from '../../../shared/domain/textile/cautions'
import { heldUpCautions, lacingCautions, planCautions, ringCautions, textileCautions } from '../../../shared/domain/textile/cautions'
import { DEFAULT_TEXTILE_SETTINGS } from '../../../shared/domain/textile/defaults'
import { solveRing } from '../../../shared/domain/textile/ring'
import type { LayerCloth, LayerPlan, RingGeometry } from '../../../shared/domain/textile/types'
import { mm, pascal, strain } from '../../../shared/domain/units/brand'
import { cloth, FREE, layer, must, plan, ring, segment } from './cloths'

const strong = plan(layer(cloth(900, 500, { spread: 0 })))
const around = (of: LayerPlan, more: Partial<RingGeometry> = {}) =>
  ring([segment('front', of), segment('back', of)], { breath: mm(0), ...more })
const judged = (geometry: RingGeometry, hold: number, settings = FREE): JudgedRing => ({
  geometry,
  solution: must(solveRing(geometry, { solve: 'cut', hold: pascal(hold) }, settings)),
  asked: pascal(hold),
})
const codes = (found: readonly { code: string; severity: string }[]) => found.map((one) => `${one.code}:${one.severity}`)
const context = (of: LayerCloth, more: Partial<TextileContext> = {}): TextileContext => ({
  rings: [judged(around(plan(layer(of))), 900)],
  plans: [plan(layer(of))],
  directions: [of],
  state: 'dry',
  use: { water: false, strapless: false },
  flagged: false,
  settings: DEFAULT_TEXTILE_SETTINGS,
  today: '2024-06-01',
  ...more,
})

describe('cautions of a ring', () => {
  it.each([
    [900, []],
    [1500, ['hold-high:note']],
    [2500, ['hold-high:caution']],
    [3200, ['hold-high:caution']],
    [3400, ['hold-high:stop', 'breath-high:caution', 'side-high:caution']],
    [4800, ['hold-high:stop', 'breath-high:stop', 'side-high:caution']],
  ])('at %d Pa are %j', (hold, expected) => {
    expect(codes(ringCautions(judged(around(strong), hold)))).toEqual(expected)
  })

  it('judge hold at the upper end of its band', () => {
    const wide = plan(layer(cloth(900, 0, { spread: 0.1 })))
    expect(codes(ringCautions(judged(around(wide), 1200)))).toEqual(['hold-high:note'])
  })

  it('say which limit kept the hold from being reached', () => {
    const light = plan(layer(cloth(40, 20, { wear: 0.35 })))
    const [found] = ringCautions(judged(around(light), 900, DEFAULT_TEXTILE_SETTINGS))
    expect(found).toMatchObject({ code: 'hold-not-reached', severity: 'note', limit: { value: 900 } })
    expect(found!.message).toContain('largest reduction governs')
  })

  it('tell that a hold was lowered for a wearer’s limit, to makers without figures', () => {
    const lowered = { ...judged(around(strong), 600), asked: pascal(900) }
    const [found] = ringCautions(lowered)
    expect(found).toMatchObject({ code: 'hold-lowered', severity: 'note', figure: { value: 600 }, limit: { value: 900 } })
    expect(cautionForMaker(found!)).toMatchObject({ code: 'wearer-limit', message: 'Limit set for this wearer.', figure: null })
  })

  it('tell a fixed half, little stretching width, wear and tested range passed', () => {
    const short = plan(layer(cloth(200, 0, { spread: 0, wear: 0.2, testedTo: 0.4 })))
    const geometry = around(short, { rigidFront: mm(360), rigidBack: mm(140) })
    const asCut = must(solveRing(geometry, { solve: 'tension', widths: [mm(0), mm(120)] }, FREE))
    expect(asCut.extrapolated).toBe(true)
    expect(codes(ringCautions({ geometry, solution: asCut, asked: pascal(900) }))).toEqual(
      expect.arrayContaining([
        'wear-limit-passed:caution',
        'test-extrapolated:caution',
        'stretching-width-little:caution',
        'half-fixed:caution',
      ]),
    )
  })

  it('tell a slack ring and halves that stretch differently', () => {
    const slack = must(solveRing(around(strong), { solve: 'tension', widths: [mm(360), mm(360)] }, FREE))
    expect(codes(ringCautions({ geometry: around(strong), solution: slack, asked: pascal(900) }))).toEqual(['ring-slack:caution'])
    const uneven = ring([segment('front', plan(layer(cloth(250, 0)))), segment('back', strong)], { breath: mm(0) })
    expect(codes(ringCautions(judged(uneven, 900)))).toContain('halves-differ:note')
  })

  it('never put a body girth into a maker’s words', () => {
    const found = ringCautions(judged(around(strong, { girth: mm(713) }), 4800))
    for (const one of found) expect(one.makerMessage).not.toMatch(/713|71\.3|kPa/)
  })
})

describe('cautions of a lacing', () => {
  it('tell a gap out of range, and the level that opens the V and by how much', () => {
    const laced = (level: string, gap: number) => judged({ ...around(strong, { gapBack: mm(gap) }), level, name: level }, 900)
    const found = lacingCautions([laced('bust', 50), laced('waist', 90), laced('hip', 50)], DEFAULT_TEXTILE_SETTINGS)
    expect(found.map((one) => [one.code, one.place])).toEqual([
      ['gap-out-of-range', { kind: 'ring', level: 'waist' }],
      ['gap-uneven', { kind: 'ring', level: 'waist' }],
    ])
    expect(found[1]!.message).toContain('27 mm wider')
    expect(lacingCautions([laced('bust', 30), laced('waist', 40), laced('hip', 50)], DEFAULT_TEXTILE_SETTINGS)).toEqual([])
  })
})

describe('what keeps it up', () => {
  const at = (level: string, hold: number) => judged({ ...around(strong), level, name: level }, hold)

  it('asks for 400 Pa at one ring above the waist', () => {
    expect(heldUpCautions([at('bust', 450), at('underbust', 200)], false, false)).toEqual([])
    expect(codes(heldUpCautions([at('bust', 300), at('underbust', 200), at('waist', 2000)], false, false))).toEqual(['not-held-up:caution'])
  })

  it('asks strapless for 600 at the top edge and 1300 at underbust or waist', () => {
    expect(heldUpCautions([at('bust', 650), at('waist', 1350)], true, false)).toEqual([])
    expect(codes(heldUpCautions([at('bust', 500), at('waist', 1200)], true, false))).toEqual(['not-held-up:caution', 'not-held-up:caution'])
  })

  it('lets a wearer’s limit go first: hangs from its straps, or stops when strapless', () => {
    const [found] = heldUpCautions([at('bust', 300)], false, true)
    expect(found!.message).toContain('hangs from its straps, not from hold')
    expect(codes(heldUpCautions([at('bust', 300)], true, true))).toEqual(['not-held-up:stop'])
  })
})

describe('cautions of a test', () => {
  it('has nothing to say of a good one', () => {
    expect(planCautions(context(cloth(900, 500)))).toEqual([])
  })

  it('stops an assumed cloth for firm hold or a flagged wearer, and cautions else', () => {
    const assumed = cloth(1000, 0, { kind: 'assumed', testedTo: 0.5 })
    const firm = [judged(around(plan(layer(assumed))), 1400)]
    expect(codes(planCautions(context(assumed)))).toEqual(['test-assumed:caution'])
    expect(codes(planCautions(context(assumed, { rings: firm })))).toEqual(['test-assumed:stop'])
    expect(codes(planCautions(context(assumed, { flagged: true })))).toEqual(['test-assumed:stop'])
    expect(planCautions(context(assumed))[0]!.message).toContain('Hold unknown, pull a strip')
  })

  it('tells a single specimen, an old test, low recovery, high growth', () => {
    const poor = cloth(900, 500)
    const worn: LayerCloth = {
      ...poor,
      curve: { ...poor.curve, specimens: 1, spread: 0.15 },
      figures: { ...poor.figures, recovery: 0.85, growth: strain(0.08) },
      testedOn: '2022-06-01',
    }
    expect(codes(planCautions(context(worn)))).toEqual([
      'test-few-specimens:caution',
      'test-old:caution',
      'recovery-low:caution',
      'growth-high:caution',
    ])
    expect(codes(planCautions(context({ ...worn, testedOn: '2023-06-02' })))).not.toContain('test-old:caution')
  })

  it('tells a dry test for a water garment, and a direction that stretches less', () => {
    const across = cloth(900, 500)
    const along: LayerCloth = { ...across, direction: 'lengthwise', figures: { ...across.figures, stretch: strain(1.4) } }
    const wet: LayerCloth = { ...across, state: 'wet' }
    expect(codes(planCautions(context(across, { use: { water: true, strapless: false } })))).toEqual(['test-dry-for-water:caution'])
    expect(planCautions(context(across, { use: { water: true, strapless: false }, directions: [across, wet] }))).toEqual([])
    expect(codes(planCautions(context(across, { state: 'wet' })))).toEqual(['test-dry-for-water:caution'])
    expect(codes(planCautions(context(across, { directions: [across, along] })))).toEqual(['low-stretch-direction:caution'])
  })

  it('carries the standing notes, more of them for water, and no stop among them', () => {
    const dry = textileCautions(context(cloth(900, 500)))
    const water = textileCautions(context(cloth(900, 500), { use: { water: true, strapless: false } }))
    expect(dry.map((one) => one.code)).toEqual(expect.arrayContaining(['take-it-off', 'no-medical-device', 'nickel', 'latex']))
    expect(water.map((one) => one.code)).toEqual(expect.arrayContaining(['no-buoyancy-aid', 'release-in-water']))
    expect(stopsOf(water)).toEqual([])
  })
})
