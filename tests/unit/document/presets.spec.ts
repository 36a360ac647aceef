import { describe, expect, it } from 'vitest'
import { applyCommand, invertDiff, replayDiff } from '../../../shared/domain/document/commands'
import { PLAN_PRESETS, plansOfPreset } from '../../../shared/domain/document/presets'
import type { GarmentDocument } from '../../../shared/domain/document/types'
import { solveGarment } from '../../../shared/domain/garment/solve'
import { zoneShares } from '../../../shared/domain/garment/layer-shares'
import { garmentDocument } from '../../../shared/schemas/garments'
import { CLOTHS, inventedDocument, inventedInput } from '../../fixtures/garment-inputs'

const now = inventedDocument()
const fallback = { clothId: CLOTHS[0]!.id, direction: 'crosswise' as const }

const withCloth = (plans: GarmentDocument['plans'], clothId: string) =>
  Object.fromEntries(Object.entries(plans).map(([zone, layers]) => [zone, layers.map((layer) => ({ ...layer, clothId }))]))

describe('a plan to start from', () => {
  it.each(PLAN_PRESETS.map((preset) => [preset.id, preset] as const))('%s is stored, solves, and is undone in one step', (_, preset) => {
    const plans = plansOfPreset(preset, now.plans, fallback, 'new')
    const { document, diff } = applyCommand(now, { kind: 'set-plans', plans, label: preset.name })
    expect(diff.changes.map((change) => change.key)).toEqual(['plans'])
    expect(replayDiff(document, invertDiff(diff))).toEqual(now)
    const stored = withCloth(plans, '2f1c6d3e-0f5b-4f0e-9d57-1c2f8b5a7e10')
    expect(garmentDocument.parse({ ...document, measuringId: null, plans: stored }).plans).toEqual(stored)

    const every = Object.values(plans).flat()
    const known = new Set(CLOTHS.map((cloth) => cloth.id))
    for (const layer of every) {
      expect(known.has(layer.clothId)).toBe(true)
      if (layer.sewnTo !== undefined) expect(every.some((one) => one.id === layer.sewnTo)).toBe(true)
    }
    const solved = solveGarment(inventedInput({ document }))
    expect(solved.ok ? null : solved.problem).toBeNull()
  })

  it('keeps the cloth of a layer of the same name, of the outermost and of the innermost', () => {
    const [shell, lining] = [now.plans.front[0]!, now.plans.front.at(-1)!]
    const swim = PLAN_PRESETS.find((preset) => preset.id === 'swim')!
    const plans = plansOfPreset(swim, now.plans, fallback, 'new')
    expect(plans.front.map((layer) => layer.clothId)).toEqual([shell.clothId, lining.clothId])
    expect(plans.back).toEqual(plans.front)
  })

  it('gives every layer of a zone an id of its own', () => {
    for (const preset of PLAN_PRESETS) {
      const plans = plansOfPreset(preset, now.plans, fallback, 'new')
      for (const layers of Object.values(plans)) expect(new Set(layers.map((layer) => layer.id)).size).toBe(layers.length)
    }
  })
})

describe('what the layers of a zone bring', () => {
  const waist = PLAN_PRESETS.find((preset) => preset.id === 'waist-panel')!
  const document = { ...now, plans: plansOfPreset(waist, now.plans, fallback, 'new') }
  const solved = solveGarment(inventedInput({ document }))
  if (!solved.ok) throw new Error(solved.problem.message)

  it('adds up to the tension of the ring where the zone lies', () => {
    const here = zoneShares(solved.value, 'waistPanel', 'bust')!
    expect(here.level).toBe('waist')
    expect(here.levels).toEqual(['waist'])
    const ring = solved.value.rings.find((one) => one.level === 'waist')!
    const pull = here.shares.reduce((sum, share) => sum + share.tension!, 0)
    expect(pull / ring.tension).toBeCloseTo(1, 6)
    expect(here.shares.reduce((sum, share) => sum + share.thicknessShare, 0)).toBeCloseTo(1, 12)
  })

  it('follows the level asked for, and shows a zone on no level by itself', () => {
    expect(zoneShares(solved.value, 'front', 'bust')!.level).toBe('bust')
    const yoke = PLAN_PRESETS.find((preset) => preset.id === 'sheer-yoke')!
    const sheer = solveGarment(inventedInput({ document: { ...now, plans: plansOfPreset(yoke, now.plans, fallback, 'new') } }))
    if (!sheer.ok) throw new Error(sheer.problem.message)
    expect(zoneShares(sheer.value, 'yoke', 'bust')).toMatchObject({ level: null, strain: 0.15, levels: [] })
    expect(zoneShares(sheer.value, 'cups', 'bust')).toBeNull()
  })
})
