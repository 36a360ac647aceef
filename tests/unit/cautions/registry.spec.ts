import { describe, expect, it } from 'vitest'
import { CAUTION_REGISTRY, cautionForMaker, cautions, orderCautions } from '../../../shared/domain/cautions/registry'
import { pascal } from '../../../shared/domain/units/brand'

const garment = { kind: 'garment' } as const
const waist = { kind: 'ring', level: 'waist' } as const

describe('the registry of cautions', () => {
  it('has each code once, in kebab case, with a source', () => {
    const codes = Object.values(cautions).map((entry) => entry.code)
    expect(new Set(codes).size).toBe(codes.length)
    expect(CAUTION_REGISTRY.size).toBe(codes.length)
    for (const entry of CAUTION_REGISTRY.values()) {
      expect(entry.code).toMatch(/^[a-z]+(-[a-z]+)*$/)
      expect(entry.source.length).toBeGreaterThan(3)
    }
  })

  it('lets nobody clear a wearer’s limit, and everything else by name and reason', () => {
    const fixed = [...CAUTION_REGISTRY.values()].filter((entry) => !entry.clearable).map((entry) => entry.code)
    expect(fixed.sort()).toEqual([
      'cannot-leave-alone',
      'wearer-breath-stopped',
      'wearer-cap-at-rest',
      'wearer-cap-in-breath',
      'wearer-not-agreed',
      'wearer-rigid-over-breast',
    ])
  })

  it('keeps the severity rule with the code', () => {
    const facts = { ring: 'Waist', pressure: pascal(2400), limit: pascal(2000) }
    expect(cautions.holdHigh(waist, { ...facts, band: 'strong' }).severity).toBe('caution')
    expect(cautions.holdHigh(waist, { ...facts, band: 'stop' }).severity).toBe('stop')
    expect(
      cautions.notHeldUp(waist, { where: 'Bust', pressure: pascal(1), limit: pascal(600), strapless: true, capped: true }).severity,
    ).toBe('stop')
  })

  it('puts stops first and keeps the order else', () => {
    const facts = { ring: 'Waist', pressure: pascal(2400), limit: pascal(2000) }
    const found = [
      cautions.latex(garment, {}),
      cautions.holdHigh(waist, { ...facts, band: 'strong' }),
      cautions.nickel(garment, {}),
      cautions.holdHigh(waist, { ...facts, band: 'stop' }),
    ]
    expect(orderCautions(found).map((one) => one.severity)).toEqual(['stop', 'caution', 'note', 'note'])
    expect(orderCautions(found)[2]!.code).toBe('latex')
  })

  it('gives makers words that name no condition, and nothing of a code it does not know', () => {
    const flagged = ['pregnancy', 'nursing', 'reflux', 'breathing', 'circulation', 'child']
    const facts = { ring: 'Bust', pressure: pascal(700), limit: pascal(400), why: flagged.join(', ') }
    const found = [
      cautions.wearerCapAtRest(waist, facts),
      cautions.wearerCapInBreath(waist, facts),
      cautions.wearerBreathStopped(waist, { ring: 'Bust', short: 400 }),
      cautions.wearerNotAgreed(garment, { why: facts.why }),
      cautions.wearerRigidOverBreast(waist, { ring: 'Bust', rigid: 12 }),
      cautions.wearerMeasuringOld(garment, { days: 20, limit: 14 }),
      cautions.wearerAgeUnknown(waist, {}),
      cautions.cordsNearChildren(garment, {}),
    ]
    for (const one of found)
      expect(JSON.stringify(cautionForMaker(one))).not.toMatch(/pregnan|nursing|reflux|breath|circulat|child|\bage\b|14|400|700/i)
    expect(cautionForMaker({ ...found[0]!, code: 'unheard-of' })).toMatchObject({ figure: null, limit: null, code: 'wearer-limit' })
    expect(
      cautionForMaker(cautions.holdHigh(waist, { ring: 'Waist', pressure: pascal(2400), limit: pascal(2000), band: 'strong' })),
    ).toMatchObject({ figure: null, limit: null })
    expect(cautionForMaker(cautions.nickel(garment, {})).message).toContain('nickel')
  })
})
