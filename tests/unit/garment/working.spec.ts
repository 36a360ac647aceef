import { evaluate } from 'mathjs'
import { describe, expect, it } from 'vitest'
import { readFitting } from '../../../shared/domain/fit/fitting'
import { levelReadingWorking, stiffnessWorking } from '../../../shared/domain/fit/working'
import { recut } from '../../../shared/domain/garment/recut'
import { solveGarment } from '../../../shared/domain/garment/solve'
import { recutAlterationWorking, recutWorking } from '../../../shared/domain/garment/working'
import { layerShares } from '../../../shared/domain/textile/contributions'
import { layerWorking } from '../../../shared/domain/textile/layer-working'
import { ringWorking } from '../../../shared/domain/textile/working'
import { mm, newton } from '../../../shared/domain/units/brand'
import type { Working } from '../../../shared/domain/units/working'
import { inventedDocument, inventedInput, layers } from '../../fixtures/garment-inputs'

const input = inventedInput()
const solved = solveGarment(input)
if (!solved.ok) throw new Error(solved.problem.message)
const { rings, ringInputs } = solved.value
const given = (working: Working, symbol: string) => working.inputs.find((one) => one.symbol === symbol)!.value
const whole = (working: Working) => {
  expect(working.formula.length).toBeGreaterThan(2)
  expect(working.source.length).toBeGreaterThan(5)
  expect(working.notes.length).toBeGreaterThan(0)
  expect(Number.isFinite(working.result.value)).toBe(true)
  for (const one of working.inputs) expect(Number.isFinite(one.value)).toBe(true)
}

describe('the working behind what a layer brings', () => {
  const segment = { ...ringInputs[2]!.segments[0]!, sewn: [{ layer: 'lining-2', width: mm(40) }] }
  const { width, strain: e } = rings[2]!.segments[0]!
  const shares = layerShares(segment, width, e, mm(720))

  it('gives its result again when it is worked by mathjs', () => {
    segment.plan.layers.forEach((layer, i) => {
      for (const figure of ['pull', 'stretchLeft', 'thickness', 'width'] as const)
        whole(layerWorking(layer, shares[i]!, segment, width, e, figure))
      const pull = layerWorking(layer, shares[i]!, segment, width, e, 'pull')
      if (layer.cloth.curve.kind === 'cubic') {
        const scope = { n: given(pull, 'n'), x: given(pull, 'x'), a: given(pull, 'a'), b: given(pull, 'b') }
        expect(pull.result.value).toBeCloseTo(evaluate('n * (a * x + b * x^3)', scope) as number, 6)
      }
      const cut = layerWorking(layer, shares[i]!, segment, width, e, 'width')
      expect(cut.result.value).toBeCloseTo(
        evaluate('q * r * w', { q: given(cut, 'q'), r: given(cut, 'r'), w: given(cut, 'w') }) as number,
        9,
      )
    })
    const lining = segment.plan.layers.findIndex((layer) => layer.id === 'lining-2')
    const left = layerWorking(segment.plan.layers[lining]!, shares[lining]!, segment, width, e, 'stretchLeft')
    const scope = Object.fromEntries(['rho', 'r', 'w', 'u', 'e'].map((symbol) => [symbol, given(left, symbol)]))
    expect(left.result.value).toBeCloseTo(evaluate('(rho + (r * w - rho) * (1 + u)) / w - 1 - e', scope) as number, 12)
  })

  it('carries the band that the spread of the cloth puts on a hold, a breath and a cut', () => {
    for (const figure of ['pressure', 'breath', 'cut'] as const) {
      const { result } = ringWorking(rings[0]!, ringInputs[0]!, figure)
      expect(result.band!.low).toBeLessThan(result.value)
      expect(result.band!.high).toBeGreaterThan(result.value)
    }
  })
})

describe('the working behind a fitting', () => {
  const seen = rings.map((ring, i) => ({
    level: ring.level as 'waist',
    gap: mm(ring.gapBack + 4 * i),
    feel: null,
    pull: i < 2 ? { force: newton(ring.tension * 0.06), tab: mm(50) } : null,
  }))
  const reading = readFitting(seen, ringInputs, rings, input.settings)

  it('gives its results again, with the band of the factor', () => {
    for (const level of reading.levels) {
      const working = levelReadingWorking(level)
      whole(working)
      expect(working.result.value).toBeCloseTo(given(working, 'T model') / (given(working, 'c') * given(working, 'T drafted')), 9)
    }
    const working = stiffnessWorking(reading)!
    whole(working)
    const pairs = reading.levels.filter((one) => one.measured !== null).map((one) => one.level)
    const top = pairs.reduce((sum, level) => sum + given(working, `T ${level}`) * given(working, `model ${level}`), 0)
    const bottom = pairs.reduce((sum, level) => sum + given(working, `model ${level}`) ** 2, 0)
    expect(working.result.value).toBeCloseTo(top / bottom, 9)
    expect(working.result.band!.high).toBeGreaterThan(working.result.value)
  })

  it('is none for a stiffness that no pull was taken for', () => {
    expect(
      stiffnessWorking(
        readFitting(
          seen.map((one) => ({ ...one, pull: null })),
          ringInputs,
          rings,
          input.settings,
        ),
      ),
    ).toBeNull()
  })
})

describe('the working behind a recut', () => {
  const two = layers(['shell', 1], ['lining', 1])
  const made = recut(inventedInput({ document: inventedDocument({ plans: { front: two, back: two } }) }), input)
  if (!made.ok) throw new Error(made.problem.message)

  it('gives the change of each level again, for both targets', () => {
    for (const target of ['fitted', 'own'] as const) {
      for (const step of made.value.targets[target].steps) {
        const working = recutWorking(made.value, target, step)
        whole(working)
        expect(working.result.value).toBeCloseTo(given(working, 'w') - given(working, 'w fitted'), 9)
      }
    }
  })

  it('gives an alteration in the final layers again', () => {
    const working = recutAlterationWorking({ id: 'a', name: 'side seam', before: mm(4), after: mm(2.6), factor: 0.65 })
    whole(working)
    expect(working.result.value).toBeCloseTo(given(working, 'before') * given(working, 'factor'), 9)
  })
})
