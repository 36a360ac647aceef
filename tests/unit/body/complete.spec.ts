import { describe, expect, it } from 'vitest'
import { completeBody } from '../../../shared/domain/body/complete'
import { bodyLevels } from '../../../shared/domain/body/levels'
import type { MeasuredValues, MeasurementKey } from '../../../shared/domain/body/types'

const measured = (values: Partial<Record<MeasurementKey, number>>): MeasuredValues =>
  Object.fromEntries(Object.entries(values).map(([key, value]) => [key, { value }]))

/** An invented wearer. */
const wearer: Partial<Record<MeasurementKey, number>> = {
  bustGirth: 920,
  underbustGirth: 779,
  waistGirth: 760,
  hipGirth: 1000,
  neckBaseGirth: 371,
  shoulderLength: 138,
  acrossBack: 369,
  backWaistLength: 376,
  neckShoulderToBustPoint: 274,
  sideWaistLength: 183,
  waistToHip: 221,
}

describe('a body to draft from', () => {
  it('is completed with estimates that are named', () => {
    const result = completeBody(measured(wearer))
    if (!result.ok) throw new Error(result.problem.message)
    const { values, estimated } = result.value
    expect(values).toMatchObject({ frontWaistLength: 431, bustPointToUnderbust: 75, shoulderSlope: 21, highHipGirth: 760 + 0.62 * 240 })
    expect(values.bustPointDistance).toBeCloseTo(197.8, 6)
    expect(values.armscyeGirth).toBeCloseTo(377.2, 6)
    expect(values.acrossFront).toBeLessThanOrEqual(values.acrossBack - 20)
    expect([...estimated].sort()).toEqual(
      [
        'acrossFront',
        'armscyeGirth',
        'bustPointDistance',
        'bustPointToUnderbust',
        'frontWaistLength',
        'highHipGirth',
        'shoulderSlope',
      ].sort(),
    )
  })

  it('keeps what is measured', () => {
    const result = completeBody(measured({ ...wearer, shoulderSlope: 24, frontWaistLength: 440 }))
    expect(result.ok && result.value.values).toMatchObject({ shoulderSlope: 24, frontWaistLength: 440 })
  })

  it('does not take the navel waist for the natural one', () => {
    const { waistGirth: _, ...rest } = wearer
    const result = completeBody(measured({ ...rest, navelWaistGirth: 830 }))
    expect(result).toMatchObject({ ok: false, problem: { code: 'natural-waist-missing', at: 'waistGirth' } })
  })

  it('names what is missing', () => {
    const { underbustGirth: _, neckBaseGirth: __, ...rest } = wearer
    const result = completeBody(measured(rest))
    expect(result).toMatchObject({ ok: false, problem: { code: 'measurement-missing', at: 'underbustGirth,neckBaseGirth' } })
  })
})

describe('levels', () => {
  it('lie over the natural waist', () => {
    const result = completeBody(measured(wearer))
    if (!result.ok) throw new Error(result.problem.message)
    expect(bodyLevels(result.value).map(({ id, y, movedBy }) => [id, y, movedBy])).toEqual([
      ['bust', 157, 0],
      ['underbust', 82, 0],
      ['waist', 0, 0],
      ['high-hip', -110.5, 0],
      ['hip', -221, 0],
    ])
  })

  it('lower a bust level that stands at or above the underarm', () => {
    const result = completeBody(measured({ ...wearer, neckShoulderToBustPoint: 240, frontWaistLength: 431 }))
    if (!result.ok) throw new Error(result.problem.message)
    expect(bodyLevels(result.value)[0]).toMatchObject({ id: 'bust', y: 173, movedBy: 18 })
  })
})
