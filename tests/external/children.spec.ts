import { describe, expect, it } from 'vitest'
import { wearerCautions, wearerLimits } from '../../shared/domain/body/wearer'
import { cautions } from '../../shared/domain/cautions/registry'

const child = {
  pregnancy: false,
  nursing: false,
  reflux: false,
  breathing: false,
  circulation: false,
  child: true,
  practitionerAgreed: true,
  age: 7,
}

describe('children, metal, water: cautions, not legal advice; the local code decides', () => {
  // EN 14682:2014 by a market authority's page (read): no neck ties or cords at 7 years or under, or 134 cm or under.
  it('warns of cords on a child’s garment with both limits of the page', () => {
    const [found] = wearerCautions(child, [], null)
    expect(found).toMatchObject({ code: 'cords-near-children', severity: 'caution' })
    expect(found!.message).toMatch(/7 years or under, or 134 cm or under/)
    // The standard leaves out dancewear and theatrical costume, but not swimwear (read).
    expect(found!.source).toMatch(/leaves out dancewear and theatrical costume, not swimwear; local law decides/)
  })

  // REACH annex XVII entry 27 (read): at most .5 ug/cm2/week.
  it('carries the nickel limit with its source', () => {
    const note = cautions.nickel({ kind: 'garment' }, {})
    expect(note.message).toContain('.5 µg/cm² a week')
    expect(note.source).toContain('REACH annex XVII entry 27')
  })

  // Table 13.5 (read): the easy band ends at 1300 Pa; a child is held to it, by careful practice.
  it('holds a child to the easy band at every level', () => {
    for (const level of ['bust', 'underbust', 'high-hip', 'hip']) expect(wearerLimits(child, level).cap).toBe(1300)
    expect(wearerLimits(child, 'waist').cap).toBe(1300)
  })

  it('says that it is no buoyancy aid and no medical device, and when to take it off', () => {
    expect(cautions.noBuoyancyAid({ kind: 'garment' }, {}).message).toContain('no buoyancy aid')
    expect(cautions.noMedicalDevice({ kind: 'garment' }, {}).message).toContain('no medical device')
    expect(cautions.takeItOff({ kind: 'garment' }, {}).message).toMatch(/numb, breathless.*in pain/)
  })
})
