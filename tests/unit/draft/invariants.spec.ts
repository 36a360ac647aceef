import { existsSync, readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { completeBody } from '../../../shared/domain/body/complete'
import { bodyLevels } from '../../../shared/domain/body/levels'
import type { DraftBody, MeasurementKey } from '../../../shared/domain/body/types'
import { draftBodice } from '../../../shared/domain/draft/bodice'
import { pieceOutline } from '../../../shared/domain/draft/piece'
import { isRight } from '../../../shared/domain/draft/roles'
import { baseStyle } from '../../../shared/domain/draft/style'
import type {
  BodiceStyle,
  CentreKind,
  Draft,
  DraftInput,
  FurtherSeam,
  HalfPanels,
  PrincessEnd,
  SeamShares,
} from '../../../shared/domain/draft/types'
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
  wrongWidthAbove,
  wrongWidths,
} from '../../fixtures/draft-invariants'
import { sizeChart } from '../../fixtures/size-chart'

const DRAFTS = process.env.TEST_DEPTH === 'full' ? 20_000 : 2_000
const CENTRES: readonly CentreKind[] = ['fold', 'seam', 'zip', 'hook-tape', 'hooks', 'busk', 'lacing']

const between = (random: () => number, low: number, high: number): number => low + (high - low) * random()
const pickFrom = <T>(random: () => number, from: readonly T[]): T => from[Math.floor(random() * from.length)]!

/** Shares of a half that sum to 1. */
function randomShares(random: () => number, centreMost: number): SeamShares {
  const centre = between(random, 0, centreMost)
  const princess = between(random, 0.3, 0.7)
  return { centre, princess, side: 1 - centre - princess }
}

function randomPanels(random: () => number, count: number): HalfPanels {
  if (count === 1) return { princess: false, further: [] }
  const besideCentre = random() < 0.25 ? Math.min(1, count - 2) : 0
  const further = Array.from({ length: count - 2 }, (_, index): FurtherSeam => ({
    id: (['a', 'b', 'c', 'd'] as const)[index]!,
    beside: index < besideCentre ? 'centre' : 'side',
    at: null,
    end: null,
    share: between(random, 0.05, 0.25),
    letOut: random() < 0.3 ? between(random, 0, 0.3) : null,
  }))
  return { princess: true, further }
}

/** Two to six panels a half; a quarter of all has the four panels of the base style. */
function randomHalves(random: () => number): BodiceStyle['panels'] {
  if (random() < 0.25) return baseStyle().panels
  const whole = 2 + Math.floor(random() * 5)
  const front = Math.min(whole - 1, Math.max(1, Math.round(whole / 2 + between(random, -1.2, 1.2))))
  return { front: randomPanels(random, front), back: randomPanels(random, whole - front) }
}

function randomEnd(random: () => number): PrincessEnd {
  const edge = pickFrom(random, ['shoulder', 'shoulder', 'armhole', 'neckline'] as const)
  return { edge, at: edge === 'neckline' ? between(random, 0.4, 0.8) : between(random, 0.25, 0.6) }
}

function randomShape(random: () => number): BodiceStyle['hemShape'] {
  const form = pickFrom(random, ['straight', 'pointed', 'rounded'] as const)
  return {
    form,
    front: mm(between(random, -10, 60)),
    back: mm(between(random, -10, 60)),
    side: mm(between(random, -10, 20)),
    curve: random(),
  }
}

function randomStyle(random: () => number): BodiceStyle {
  const level = pickFrom(random, ['waist', 'high-hip', 'hip'] as const)
  const low = random() < 0.5
  return {
    ...baseStyle(),
    centreFront: pickFrom(random, CENTRES),
    centreBack: pickFrom(random, CENTRES),
    panels: randomHalves(random),
    hem: { level, below: mm(between(random, -20, 40)) },
    hemShape: randomShape(random),
    neckline: {
      front: pickFrom(random, ['round', 'square', 'v'] as const),
      back: pickFrom(random, ['round', 'square', 'v'] as const),
    },
    necklineFrontDepth: mm(between(random, 0, low ? 110 : 60)),
    necklineBackDepth: mm(between(random, 10, 90)),
    necklineWidth: mm(between(random, 0, 50)),
    princessAt: between(random, 0.3, 0.7),
    princessEnd: { front: randomEnd(random), back: randomEnd(random) },
    backPrincessAt: between(random, 0.36, 0.5),
    frontShares: randomShares(random, 0.2),
    backShares: randomShares(random, 0.2),
    letOut: { front: random() < 0.4 ? randomShares(random, 0.2) : null, back: random() < 0.4 ? randomShares(random, 0.2) : null },
    openingsTake: { front: random() < 0.3, back: random() < 0.3 },
    verticalFactor: between(random, 0.94, 1.02),
    underarmDrop: mm(between(random, -15, 0)),
  }
}

/** Widths above the bust and a top edge there: front and back narrower than at the bust by what an upper bust is (assumed). */
function strapless(input: DraftInput, random: () => number): DraftInput {
  const bust = input.widths.find(({ level }) => level === 'bust')!
  const { values } = input.body
  const room = values.sideWaistLength - bodyLevels(input.body)[0]!.y
  const side = Math.max(15, Math.min(room, 60) * input.style.verticalFactor - between(random, 0, 5))
  return {
    ...input,
    style: {
      ...input.style,
      top: {
        form: pickFrom(random, ['straight', 'pointed', 'rounded'] as const),
        front: mm(side + between(random, 0, 30)),
        back: mm(Math.max(15, side - between(random, 0, 25))),
        side: mm(side),
        curve: random(),
      },
    },
    above: {
      y: mm(Math.max(values.sideWaistLength, values.sideWaistLength - room + 25)),
      front: mm(bust.front * between(random, 0.84, 0.95)),
      back: mm(bust.back * between(random, 0.93, 1.01)),
    },
  }
}

/** A right half of its own, with centres that can be parted. */
function withRight(style: BodiceStyle, random: () => number): BodiceStyle {
  const parted = (kind: CentreKind): CentreKind => (kind === 'fold' ? 'busk' : kind)
  const { panels, princessAt, princessEnd, backPrincessAt, neckline } = randomStyle(random)
  return {
    ...style,
    centreFront: parted(style.centreFront),
    centreBack: parted(style.centreBack),
    right: { panels, princessAt, princessEnd, backPrincessAt, neckline, necklineWidth: style.necklineWidth },
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
  const input = { body, style: random() < 0.1 ? withRight(style, random) : style, widths }
  return random() < 0.15 ? strapless(input, random) : input
}

interface Tally {
  drafted: number
  /** Drafted in the base style because the drawn one did not fit the body. */
  restyled: number
  /** Why: problems of style and how often. */
  misfits: Map<string, number>
  plausible: number
  /** Drafted with a right half that differs. */
  twoHalves: number
  refusals: Map<string, number>
  broken: string[]
  checked: number
}

const tally = (): Tally => ({
  drafted: 0,
  restyled: 0,
  misfits: new Map(),
  plausible: 0,
  twoHalves: 0,
  refusals: new Map(),
  broken: [],
  checked: 0,
})

/** A style that a body cannot wear is the drafter's to change, not a refusal of the body: it is counted and drafted in the base style. */
function draftWorn(count: Tally, asked: DraftInput): { readonly input: DraftInput; readonly result: Result<Draft> } {
  const { body, style, widths } = asked
  const first = draftBodice(asked)
  if (first.ok || !(first.problem.at ?? '').startsWith('style.')) return { input: asked, result: first }
  count.restyled += 1
  count.misfits.set(first.problem.code, (count.misfits.get(first.problem.code) ?? 0) + 1)
  const input = { widths, style: { ...baseStyle(), princessAt: 0.4, centreFront: style.centreFront, centreBack: style.centreBack }, body }
  return { input, result: draftBodice(input) }
}

/** Each half that was drafted with what it was drafted from. */
function halvesOf(draft: Draft, input: DraftInput): readonly { readonly half: Draft; readonly own: DraftInput }[] {
  if (draft.right === null) return [{ half: draft, own: input }]
  const seamsOf = (right: boolean) => draft.seams.filter(({ a }) => isRight(a.piece) === right)
  return [
    { half: { ...draft, seams: seamsOf(false) }, own: input },
    {
      half: { ...draft, pieces: draft.right, seams: seamsOf(true) },
      own: { ...input, style: { ...input.style, ...input.style.right } },
    },
  ]
}

function run(count: Tally, { values, plausible }: GeneratedBody, inputOf: (body: DraftBody) => DraftInput): void {
  const body = completeBody(measuredOf(values))
  const asked = body.ok ? inputOf(body.value) : null
  const worn = asked === null ? null : draftWorn(count, asked)
  const input = worn?.input ?? null
  const result = worn?.result ?? body
  if (plausible) count.plausible += 1
  if (!result.ok) {
    console.log(
      'REFUSED',
      JSON.stringify(result.problem),
      JSON.stringify({ values, style: input?.style, widths: input?.widths, above: input?.above }),
    )
    if (plausible) count.refusals.set(result.problem.code, (count.refusals.get(result.problem.code) ?? 0) + 1)
    return
  }
  if (input === null || !('pieces' in result.value)) return
  count.drafted += 1
  const draft = result.value
  const broken = halvesOf(draft, input).flatMap(({ half, own }) => {
    const allowances = wrongAllowances(half)
    count.checked += allowances.checked
    return [
      ...brokenOutlines(half),
      ...untrueSeams(half),
      ...wrongWidths(half, own),
      ...wrongWidthAbove(half, own),
      ...cornersAcrossSeams(half, own),
      ...allowances.broken,
    ]
  })
  if (draft.right !== null) count.twoHalves += 1
  if (broken.length > 0)
    count.broken.push(`${broken.join('; ')} <- ${JSON.stringify({ values, style: input.style, widths: input.widths })}`)
}

function report(name: string, count: Tally): void {
  const refused = [...count.refusals.values()].reduce((sum, own) => sum + own, 0)
  console.log(
    `${name}: ${count.drafted} drafted, ${count.twoHalves} with a right half of its own, ${count.restyled} of them restyled ${JSON.stringify(Object.fromEntries(count.misfits))}; of ${count.plausible} plausible bodies ${refused} refused ${JSON.stringify(Object.fromEntries(count.refusals))}`,
  )
  expect(count.broken.slice(0, 3)).toEqual([])
  expect(count.drafted).toBeGreaterThan(0)
  expect(count.checked).toBeGreaterThan(count.drafted * 30)
  expect(refused).toBeLessThan(0.01 * count.plausible)
}

const HARD_CENTRES: readonly CentreKind[] = ['fold', 'seam', 'lacing']

const HARD_GIRTHS: readonly Partial<Record<MeasurementKey, number>>[] = [
  {},
  // From an open survey, girths only, by the list of outside checks: the waist is larger than the bust.
  { bustGirth: 986, underbustGirth: 817, waistGirth: 1069, hipGirth: 1135 },
  { bustGirth: 760, underbustGirth: 667, waistGirth: 600, hipGirth: 840, acrossBack: 331, acrossFront: 280 },
  { bustGirth: 1280, underbustGirth: 1031, waistGirth: 1120, hipGirth: 1320, acrossBack: 452, acrossFront: 432 },
]

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
    for (const girth of HARD_GIRTHS) {
      for (const length of lengths) {
        for (const centreFront of HARD_CENTRES) {
          for (const centreBack of HARD_CENTRES) {
            const values = bodyOf({ ...girth, ...length }).values
            run(count, { values, plausible: true }, (body) => {
              const input = randomInput(body, random)
              const widths = widthsOf(body, {
                front: 0.15,
                back: 0.1,
                gapFront: centreFront === 'lacing' ? 20 : 0,
                gapBack: centreBack === 'lacing' ? 70 : 0,
              })
              const right = centreFront === 'fold' || centreBack === 'fold' ? null : input.style.right
              return { ...input, widths, style: { ...input.style, right, centreFront, centreBack } }
            })
          }
        }
      }
    }
    report('hard bodies', count)
  })

  it('hold for two to six panels a half on hard bodies, however they are divided', () => {
    const random = seeded(17)
    const count = tally()
    for (const girth of HARD_GIRTHS) {
      for (const d of [-20, 5, 25, 45]) {
        const values = bodyOf({ ...girth, frontWaistLength: 376 + 0.055 * 371 + d, neckShoulderToBustPoint: 239.4 + d }).values
        for (let front = 1; front <= 5; front += 1) {
          for (let back = 1; front + back <= 6; back += 1) {
            run(count, { values, plausible: true }, (body) => {
              const panels = { front: randomPanels(random, front), back: randomPanels(random, back) }
              const style: BodiceStyle = { ...baseStyle(), panels, necklineBackDepth: mm(20), centreBack: back % 2 === 0 ? 'seam' : 'fold' }
              return { body, style, widths: widthsOf(body, { front: 0.12, back: 0.12 }) }
            })
          }
        }
      }
    }
    report('divided halves', count)
    expect(count.drafted).toBe(4 * 4 * 15)
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
      const style = { ...baseStyle(), centreBack: HARD_CENTRES[index % 3]!, verticalFactor: index % 2 === 0 ? 1 : 0.97 }
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
