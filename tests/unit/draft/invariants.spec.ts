import { existsSync, readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { completeBody } from '../../../shared/domain/body/complete'
import type { DraftBody, MeasurementKey } from '../../../shared/domain/body/types'
import { draftBodice } from '../../../shared/domain/draft/bodice'
import { pieceOutline } from '../../../shared/domain/draft/piece'
import { baseStyle } from '../../../shared/domain/draft/style'
import type { BodiceStyle, CentreKind, Draft, DraftInput } from '../../../shared/domain/draft/types'
import { mm } from '../../../shared/domain/units/brand'
import type { Result } from '../../../shared/domain/units/result'
import { generatedBody, seeded, surveyedBody } from '../../fixtures/bodies'
import type { GeneratedBody } from '../../fixtures/bodies'
import { bodyOf, draftOf, measuredOf, valueOf, widthsOf } from '../../fixtures/draft-inputs'
import {
  brokenOutlines,
  cornersAcrossSeams,
  untrueSeams,
  wrongAllowances,
  wrongMeasures,
  wrongWidths,
} from '../../fixtures/draft-invariants'
import { sizeChart } from '../../fixtures/size-chart'

const DRAFTS = process.env.TEST_DEPTH === 'full' ? 20_000 : 2_000
const CENTRES: readonly CentreKind[] = ['fold', 'seam', 'lacing']

const between = (random: () => number, low: number, high: number): number => low + (high - low) * random()

function randomStyle(random: () => number): BodiceStyle {
  const pick = <T>(from: readonly T[]): T => from[Math.floor(random() * from.length)]!
  const front = between(random, 0, 0.2)
  const princess = between(random, 0.3, 0.7)
  const level = pick(['waist', 'high-hip', 'hip'] as const)
  return {
    ...baseStyle(),
    centreFront: pick(CENTRES),
    centreBack: pick(CENTRES),
    hem: { level, below: mm(between(random, -20, 40)) },
    necklineFrontDepth: mm(between(random, 0, 110)),
    necklineBackDepth: mm(between(random, 10, 90)),
    necklineWidth: mm(between(random, 0, 50)),
    princessAt: between(random, 0.3, 0.7),
    frontShares: { centre: front, princess, side: 1 - front - princess },
    verticalFactor: between(random, 0.94, 1.02),
    underarmDrop: mm(between(random, -15, 5)),
  }
}

/** Reductions 0 to 25 % that differ front and back and a little from level to level; gaps where a centre is laced. */
function randomInput(body: DraftBody, random: () => number): DraftInput {
  const style = randomStyle(random)
  const gap = (kind: CentreKind) => (kind === 'lacing' ? between(random, 0, 80) : 0)
  const widths = widthsOf(body, {
    front: between(random, 0.02, 0.23),
    back: between(random, 0.02, 0.23),
    gapFront: gap(style.centreFront) / 2,
    gapBack: gap(style.centreBack),
  }).map((own) => ({
    ...own,
    front: mm(own.front * between(random, 0.98, 1.02)),
    back: mm(own.back * between(random, 0.98, 1.02)),
    gapBack: mm(own.gapBack * between(random, 0.8, 1.2)),
  }))
  return { body, style, widths }
}

interface Tally {
  drafted: number
  /** Drafted in the base style because the drawn one did not fit the body. */
  restyled: number
  plausible: number
  refusals: Map<string, number>
  broken: string[]
  checked: number
}

const tally = (): Tally => ({ drafted: 0, restyled: 0, plausible: 0, refusals: new Map(), broken: [], checked: 0 })

/** A style that a body cannot wear is the drafter's to change, not a refusal of the body: it is counted and drafted in the base style. */
function draftWorn(count: Tally, input: DraftInput): Result<Draft> {
  const { body, style } = input
  const first = draftBodice(input)
  if (first.ok || !(first.problem.at ?? '').startsWith('style.')) return first
  count.restyled += 1
  return draftBodice({
    ...input,
    style: { ...baseStyle(), princessAt: 0.4, centreFront: style.centreFront, centreBack: style.centreBack },
    body,
  })
}

function run(count: Tally, { values, plausible }: GeneratedBody, inputOf: (body: DraftBody) => DraftInput): void {
  const body = completeBody(measuredOf(values))
  const input = body.ok ? inputOf(body.value) : null
  const result = input === null ? body : draftWorn(count, input)
  if (plausible) count.plausible += 1
  if (!result.ok) {
    if (plausible) count.refusals.set(result.problem.code, (count.refusals.get(result.problem.code) ?? 0) + 1)
    return
  }
  if (input === null || !('pieces' in result.value)) return
  count.drafted += 1
  const draft = result.value
  const allowances = wrongAllowances(draft)
  count.checked += allowances.checked
  const broken = [
    ...brokenOutlines(draft),
    ...untrueSeams(draft),
    ...wrongWidths(draft, input),
    ...cornersAcrossSeams(draft),
    ...allowances.broken,
  ]
  if (broken.length > 0)
    count.broken.push(`${broken.join('; ')} <- ${JSON.stringify({ values, style: input.style, widths: input.widths })}`)
}

function report(name: string, count: Tally): void {
  const refused = [...count.refusals.values()].reduce((sum, own) => sum + own, 0)
  console.log(
    `${name}: ${count.drafted} drafted, ${count.restyled} of them restyled; of ${count.plausible} plausible bodies ${refused} refused ${JSON.stringify(Object.fromEntries(count.refusals))}`,
  )
  expect(count.broken.slice(0, 3)).toEqual([])
  expect(count.drafted).toBeGreaterThan(0)
  expect(count.checked).toBeGreaterThan(count.drafted * 30)
  expect(refused).toBeLessThan(0.01 * count.plausible)
}

describe('invariants 1, 2, 3, 5 and 8', () => {
  it(`hold for ${DRAFTS} generated bodies with random widths and styles`, () => {
    const random = seeded(20_120_416)
    const count = tally()
    for (let index = 0; index < DRAFTS; index += 1) run(count, generatedBody(random), (body) => randomInput(body, random))
    report('generated bodies', count)
  })

  it('hold for hard bodies: waist above bust, front short or long, folds and gaps at both centres', () => {
    const random = seeded(7)
    const count = tally()
    const lengths = [-20, -10, 0, 10, 40, 60, 70].map((d) => ({
      frontWaistLength: 376 + 0.055 * 371 + d,
      neckShoulderToBustPoint: 239.4 + d,
    }))
    const girths: readonly Partial<Record<MeasurementKey, number>>[] = [
      {},
      // From an open survey, girths only, by the list of outside checks: the waist is larger than the bust.
      { bustGirth: 986, underbustGirth: 817, waistGirth: 1069, hipGirth: 1135 },
      { bustGirth: 760, underbustGirth: 667, waistGirth: 600, hipGirth: 840, acrossBack: 331, acrossFront: 280 },
      { bustGirth: 1280, underbustGirth: 1031, waistGirth: 1120, hipGirth: 1320, acrossBack: 452, acrossFront: 432 },
    ]
    for (const girth of girths) {
      for (const length of lengths) {
        for (const centreFront of CENTRES) {
          for (const centreBack of CENTRES) {
            const values = bodyOf({ ...girth, ...length }).values
            run(count, { values, plausible: true }, (body) => {
              const input = randomInput(body, random)
              const widths = widthsOf(body, {
                front: 0.15,
                back: 0.1,
                gapFront: centreFront === 'lacing' ? 20 : 0,
                gapBack: centreBack === 'lacing' ? 70 : 0,
              })
              return { ...input, widths, style: { ...input.style, centreFront, centreBack } }
            })
          }
        }
      }
    }
    report('hard bodies', count)
  })

  it('hold for every size of the ready chart', () => {
    const random = seeded(11)
    const count = tally()
    for (const { values } of sizeChart()) {
      for (let round = 0; round < 10; round += 1) run(count, { values, plausible: true }, (body) => randomInput(body, random))
    }
    report('ready chart', count)
    expect(count.drafted).toBe(120)
  })

  const folder = process.env.TENTERFRAME_DATA
  const file = folder === undefined ? '' : `${folder}/ansur2_women_half.csv`
  if (!existsSync(file)) console.warn('SKIPPED: TENTERFRAME_DATA is not set, so the open survey was not drafted.')
  it.skipIf(!existsSync(file))('hold for the open survey (ANSUR II women, every second row)', () => {
    const [head, ...lines] = readFileSync(file, 'utf8').trim().split(/\r?\n/)
    const keys = head!.split(',')
    const random = seeded(13)
    const count = tally()
    for (const line of lines) {
      const row = Object.fromEntries(line.split(',').map((cell, index) => [keys[index]!, Number(cell)]))
      run(count, surveyedBody(row), (body) => randomInput(body, random))
    }
    report('open survey', count)
    expect(lines).toHaveLength(993)
  })
})

describe('invariant 6', () => {
  it('gives the same bytes for the same input, and lengths that finer flattening does not change', () => {
    const random = seeded(3)
    for (let index = 0; index < 40; index += 1) {
      const body = completeBody(measuredOf(generatedBody(random).values))
      const input = randomInput(valueOf(body), random)
      const [first, second] = [draftBodice(input), draftBodice(structuredClone(input))]
      expect(JSON.stringify(first)).toBe(JSON.stringify(second))
      if (!first.ok) continue
      for (const piece of first.value.pieces) {
        const girth = (tolerance: number) => {
          const outline = pieceOutline(piece.edges, tolerance)
          return outline.reduce((sum, at, place) => sum + Math.hypot(at.x - outline.at(place - 1)!.x, at.y - outline.at(place - 1)!.y), 0)
        }
        expect(Math.abs(girth(0.02) - girth(0.001))).toBeLessThan(0.05 * piece.edges.length)
      }
    }
  })
})

describe('invariant 7: measured back as a body', () => {
  it('reads the measurements again in the base style, to 1 mm', () => {
    const random = seeded(5)
    const excepted = new Map<string, number>()
    let drafted = 0
    for (let index = 0; index < DRAFTS / 4; index += 1) {
      const { values } = generatedBody(random)
      const body = valueOf(completeBody(measuredOf(values)))
      const reduction = between(random, 0, 0.25)
      const style = { ...baseStyle(), centreBack: CENTRES[index % 3]!, verticalFactor: index % 2 === 0 ? 1 : 0.97 }
      const widths = widthsOf(body, { front: reduction, back: reduction, gapBack: style.centreBack === 'lacing' ? 40 : 0 })
      const input = { body, style, widths }
      const draft = draftBodice(input)
      if (!draft.ok) continue
      drafted += 1
      expect(wrongMeasures(draft.value, input, reduction)).toEqual([])
      draft.value.findings.forEach(({ code }) => excepted.set(code, (excepted.get(code) ?? 0) + 1))
    }
    console.log(`measured back: ${drafted} drafts; said of them ${JSON.stringify(Object.fromEntries(excepted))}`)
    expect(drafted).toBeGreaterThan(DRAFTS / 5)
  })

  it('reads every size of the ready chart again', () => {
    for (const { values } of sizeChart()) {
      const body = valueOf(completeBody(measuredOf(values)))
      const input = { body, style: baseStyle(), widths: widthsOf(body, { front: 0.12, back: 0.12 }) }
      expect(wrongMeasures(draftOf(input), input, 0.12)).toEqual([])
    }
  })
})
