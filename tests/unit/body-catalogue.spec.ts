import { describe, expect, it } from 'vitest'
import { MEASUREMENT_CATALOGUE, NEEDED_MEASUREMENTS, measurementEntry } from '../../shared/domain/body/catalogue'
import { checkMeasuring, isSameMeasured } from '../../shared/domain/body/plausibility'
import type { MeasuredValues, MeasurementKey, WearerFlags } from '../../shared/domain/body/types'
import { waistLimit, wearerCautions, wearerLimits } from '../../shared/domain/body/wearer'
import { cautionForMaker, stopsOf } from '../../shared/domain/cautions/registry'
import { mm, pascal } from '../../shared/domain/units/brand'

const measured = (values: Partial<Record<MeasurementKey, number>>): MeasuredValues =>
  Object.fromEntries(Object.entries(values).map(([key, value]) => [key, { value }]))
const codes = (found: readonly { code: string }[]) => found.map((one) => one.code)

const nobody: WearerFlags = {
  pregnancy: false,
  nursing: false,
  reflux: false,
  breathing: false,
  circulation: false,
  child: false,
  practitionerAgreed: false,
  age: 30,
}
const quiet = (level: string, upper: number, rigid = 0) => ({
  level,
  name: level,
  upperAtRest: pascal(upper),
  upperInBreath: pascal(upper),
  rigid: mm(rigid),
})

describe('the catalogue of measurements', () => {
  it('has each key once, with a rising range and words for how and where', () => {
    expect(new Set(MEASUREMENT_CATALOGUE.map((entry) => entry.key)).size).toBe(39)
    for (const entry of MEASUREMENT_CATALOGUE) {
      expect(entry.range.low).toBeLessThan(entry.range.high)
      expect(entry.range.low).toBeGreaterThan(0)
      expect(entry.how).toMatch(/\.$/)
      expect(entry.range.memory).toBe(entry.range.source.includes('memory'))
    }
  })

  it('needs what a draft cannot do without', () => {
    expect([...NEEDED_MEASUREMENTS].sort()).toEqual(
      [
        'bustGirth',
        'underbustGirth',
        'waistGirth',
        'hipGirth',
        'neckBaseGirth',
        'shoulderLength',
        'acrossBack',
        'acrossFront',
        'backWaistLength',
        'frontWaistLength',
        'neckShoulderToBustPoint',
        'sideWaistLength',
        'waistToHip',
      ].sort(),
    )
  })

  it('says which waist it means', () => {
    expect(measurementEntry('waistGirth').name).toContain('natural')
    expect(measurementEntry('navelWaistGirth').name).toContain('navel')
  })
})

describe('plausibility', () => {
  const usual = measured({
    bustGirth: 920,
    underbustGirth: 780,
    waistGirth: 740,
    hipGirth: 1000,
    backWaistLength: 400,
    frontWaistLength: 425,
  })

  it('has nothing to say of a usual body', () => {
    expect(checkMeasuring(usual)).toEqual([])
  })

  it('asks about inches taken for centimetres, and never stops', () => {
    const found = checkMeasuring(measured({ bustGirth: 365 }))
    expect(codes(found)).toEqual(['measurement-outside-range'])
    expect(stopsOf(found)).toEqual([])
    expect(found[0]!.message).toContain('36.5 cm')
  })

  it('holds no child against an adult range', () => {
    expect(checkMeasuring(measured({ bustGirth: 620, hipGirth: 640, stature: 1250 }), null, { child: true })).toEqual([])
  })

  it('asks about a change by far beyond the observer error only', () => {
    expect(codes(checkMeasuring(measured({ waistGirth: 790 }), measured({ waistGirth: 740 })))).toEqual(['measurement-changed'])
    expect(checkMeasuring(measured({ waistGirth: 780 }), measured({ waistGirth: 740 }))).toEqual([])
    expect(codes(checkMeasuring(measured({ backWaistLength: 435 }), measured({ backWaistLength: 400 })))).toEqual(['measurement-changed'])
  })

  it('keeps body girths from makers', () => {
    const [found] = checkMeasuring(measured({ bustGirth: 365 }))
    const said = JSON.stringify(cautionForMaker(found!))
    expect(said).not.toMatch(/36|bust|range/i)
  })

  it('takes a repeated measurement within twice the observer error as the same', () => {
    expect(isSameMeasured('bustGirth', 920, 943)).toBe(true)
    expect(isSameMeasured('bustGirth', 920, 945)).toBe(false)
    expect(isSameMeasured('backWaistLength', 400, 415)).toBe(true)
    expect(isSameMeasured('backWaistLength', 400, 417)).toBe(false)
  })
})

describe('limits of a wearer', () => {
  it('take the lowest of the caps at each level', () => {
    expect(wearerLimits(nobody, 'bust').cap).toBeNull()
    expect(wearerLimits({ ...nobody, pregnancy: true }, 'hip').cap).toBe(400)
    expect(wearerLimits({ ...nobody, nursing: true }, 'underbust')).toMatchObject({ cap: 400, rigidAllowed: false })
    expect(wearerLimits({ ...nobody, nursing: true }, 'hip')).toMatchObject({ cap: null, rigidAllowed: true })
    for (const flag of ['reflux', 'breathing', 'circulation', 'child'] as const) {
      expect(wearerLimits({ ...nobody, [flag]: true }, 'bust').cap).toBe(1300)
    }
    expect(wearerLimits({ ...nobody, reflux: true, pregnancy: true }, 'waist')).toMatchObject({ cap: 400, why: ['pregnancy'] })
  })

  it('fall with age at the waist and never below nothing', () => {
    expect(waistLimit(20)).toBeGreaterThan(waistLimit(60))
    expect(waistLimit(130)).toBe(0)
    expect(wearerLimits({ ...nobody, age: null }, 'waist').cap).toBeCloseTo(15 * 133.322, 6)
  })

  it('stop what passes them, at rest and in a breath, and nobody may clear that', () => {
    const flags = { ...nobody, circulation: true, practitionerAgreed: true }
    expect(wearerCautions(flags, [quiet('bust', 1300)], null)).toEqual([])
    const found = wearerCautions(flags, [quiet('bust', 1310)], null)
    expect(codes(found)).toEqual(['wearer-cap-at-rest', 'wearer-cap-in-breath'])
    expect(found.every((one) => one.severity === 'stop' && !one.clearable)).toBe(true)
    for (const one of found) {
      expect(one.makerMessage).toBe('Limit set for this wearer.')
      expect(JSON.stringify(cautionForMaker(one))).not.toMatch(/circulation|1310|kPa/)
    }
  })

  it('stop without a practitioner’s agreement, on a bone while nursing, on an old measuring in pregnancy ask again', () => {
    expect(codes(wearerCautions({ ...nobody, reflux: true }, [], null))).toEqual(['wearer-not-agreed'])
    expect(codes(wearerCautions({ ...nobody, nursing: true, practitionerAgreed: true }, [quiet('bust', 300, 18)], null))).toEqual([
      'wearer-rigid-over-breast',
    ])
    expect(codes(wearerCautions({ ...nobody, pregnancy: true, practitionerAgreed: true }, [], 15))).toEqual(['wearer-measuring-old'])
    expect(wearerCautions({ ...nobody, pregnancy: true, practitionerAgreed: true }, [], 14)).toEqual([])
  })

  it('warn of cords on a child’s garment', () => {
    expect(codes(wearerCautions({ ...nobody, child: true, practitionerAgreed: true }, [], null))).toEqual(['cords-near-children'])
  })
})
