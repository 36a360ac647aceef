import { completeBody } from '../body/complete'
import { bodyLevels } from '../body/levels'
import type { BodyLevel } from '../body/types'
import { wearerLimits } from '../body/wearer'
import type { LevelChoice } from '../document/types'
import { freshLevel } from '../document/fresh'
import { applyAlterations } from '../draft/alterations'
import { draftBodice } from '../draft/bodice'
import { checkStyle } from '../draft/style'
import type { Draft, LevelWidths } from '../draft/types'
import { cappedHold } from '../textile/hold'
import { solveRing } from '../textile/ring'
import { planStrainAt } from '../textile/plan'
import type { LayerPlan, RingGeometry, RingMode, RingSolution } from '../textile/types'
import { mm } from '../units/brand'
import { fail, succeed, type Problem, type Result } from '../units/result'
import { garmentCautions } from './cautions'
import { passesOf } from './passes'
import { planOf } from './plans'
import { gapsOf, modeOf, ringGeometry } from './rings'
import type { GarmentInput, GarmentProblem, GarmentSolution } from './types'

/** Stored with every version, so that it is known which arithmetic made it. */
export const ENGINE = 'tenterframe-1'

/** The loop is settled when the tension on the widths read is this near to the one asked for, and no width moves by more. */
const TENSION_TOLERANCE = 0.005
const WIDTH_TOLERANCE = mm(0.05)
const MOST_ROUNDS = 8

interface Level {
  readonly body: BodyLevel
  readonly choice: LevelChoice
  readonly geometry: RingGeometry
  readonly solved: RingSolution
}

/** Half widths of cloth (without rigid parts) at a level: what the loop corrects. */
interface ClothWidths {
  readonly front: number
  readonly back: number
}

const atStep = (step: GarmentProblem['step'], problem: Problem): { readonly ok: false; readonly problem: GarmentProblem } =>
  fail({ ...problem, step })

/**
 * A whole garment from what was measured and chosen: body, rings, draft, and the rings once more from the widths read on
 * the pieces. The side seam moves cloth between front and back; where their plans differ the widths are corrected in
 * proportion until the tension is the one asked for (.5 %) and no width moves .05 mm, at most 8 rounds; else `settled` is
 * false and a caution says so. Deterministic; about a millisecond. Problems name the step that lacks something.
 */
export function solveGarment(input: GarmentInput): Result<GarmentSolution, GarmentProblem> {
  const { document } = input
  const body = completeBody(input.measured)
  if (!body.ok) return atStep('body', body.problem)
  const [styleProblem] = checkStyle(document.style, body.value)
  if (styleProblem) return atStep('draft', styleProblem)

  const front = planOf('front', document.plans.front, input.cloths, document.state, document.stiffness)
  if (!front.ok) return front
  const back = planOf('back', document.plans.back, input.cloths, document.state, document.stiffness)
  if (!back.ok) return back
  const plans = { front: front.value, back: back.value }

  const levels: Level[] = []
  for (const level of bodyLevels(body.value)) {
    const choice = document.levels.find((one) => one.level === level.id) ?? freshLevel(level.id)
    const geometry = ringGeometry(level, { ...choice, ...gapsOf(document, choice) }, plans, input.measured, document.use.exertion)
    const solved = solveLevel(input, choice, geometry)
    if (!solved.ok) return atStep('layers', { ...solved.problem, at: solved.problem.at ?? level.id })
    levels.push({ body: level, choice, geometry: withGaps(geometry, solved.value), solved: solved.value })
  }

  const settled = settle(input, body.value, levels)
  if (!settled.ok) return atStep('draft', settled.problem)
  const { draft: plain, rounds, done } = settled.value

  const altered = applyAlterations(plain, document.alterations)
  const rings: RingSolution[] = []
  const ringInputs: RingGeometry[] = []
  for (const level of levels) {
    const widths = widthsRead(altered.draft, level)
    if (!widths) continue
    const read = solveRing(level.geometry, tensionMode(widths), input.settings)
    if (!read.ok) return atStep('layers', { ...read.problem, at: level.body.id })
    ringInputs.push(level.geometry)
    rings.push({ ...read.value, mode: level.solved.mode, governs: level.solved.governs, hold: level.solved.hold })
  }

  const alterationGirth = levels.flatMap((level) => {
    const before = widthsRead(plain, level)
    const after = widthsRead(altered.draft, level)
    return before && after ? [{ level: level.body.id, by: mm(2 * (after.front + after.back - before.front - before.back)) }] : []
  })

  const solution: Omit<GarmentSolution, 'cautions'> = {
    engine: ENGINE,
    body: body.value,
    levels: levels.map((level) => level.body),
    plans: [plans.front, plans.back],
    ringInputs,
    rings,
    draft: altered.draft,
    parked: document.alterations.filter((one) => altered.effects.some((effect) => effect.id === one.id && isNotApplied(effect.state))),
    passes: passesOf(
      input,
      levels.map((level) => level.body),
      ringInputs,
      rings,
    ),
    rounds,
    settled: done,
    alterationGirth,
  }
  return succeed({ ...solution, cautions: garmentCautions(input, solution, altered.effects) })
}

const isNotApplied = (state: string): boolean => state === 'parked' || state === 'refused'

/** The level's ring as chosen: the cut from the (capped) hold first, then the typed cut or the gap on top of it. */
function solveLevel(input: GarmentInput, choice: LevelChoice, geometry: RingGeometry): Result<RingSolution> {
  const cap = wearerLimits(input.wearer, geometry.level).cap
  const cut = solveRing(geometry, { solve: 'cut', hold: cappedHold(choice.hold, cap, geometry, input.settings) }, input.settings)
  if (!cut.ok) return cut
  const mode = modeOf(input.document, choice, cut.value)
  if (mode === null) return cut
  return solveRing(geometry, mode, input.settings)
}

const withGaps = (geometry: RingGeometry, solved: RingSolution): RingGeometry => ({
  ...geometry,
  gapFront: solved.gapFront,
  gapBack: solved.gapBack,
})

/** Solve, draft, read, correct. */
function settle(
  input: GarmentInput,
  body: Parameters<typeof draftBodice>[0]['body'],
  levels: readonly Level[],
): Result<{ readonly draft: Draft; readonly rounds: number; readonly done: boolean }> {
  const cloth = new Map<string, ClothWidths>(levels.map((level) => [level.body.id, clothWidths(level.solved)]))
  for (let round = 1; ; round++) {
    const drafted = draftBodice({
      body,
      style: input.document.style,
      widths: levels.map((level) => levelWidths(level, cloth.get(level.body.id)!)),
    })
    if (!drafted.ok) return drafted
    let done = true
    for (const level of levels) {
      const read = widthsRead(drafted.value, level)
      if (!read || level.solved.mode !== 'cut' || level.solved.slack > 0) continue
      const correction = correctionOf(level, read)
      const now = cloth.get(level.body.id)!
      const moves = Math.max(now.front, now.back) * Math.abs(correction - 1)
      if (moves <= WIDTH_TOLERANCE && tensionMiss(input, level, read) <= TENSION_TOLERANCE) continue
      done = false
      cloth.set(level.body.id, { front: now.front * correction, back: now.back * correction })
    }
    if (done || round === MOST_ROUNDS) return succeed({ draft: drafted.value, rounds: round, done })
  }
}

function clothWidths(solved: RingSolution): ClothWidths {
  const half = (side: 'front' | 'back') =>
    solved.segments.filter((segment) => segment.half === side).reduce((sum, segment) => sum + segment.width, 0) / 2
  return { front: half('front'), back: half('back') }
}

function levelWidths(level: Level, cloth: ClothWidths): LevelWidths {
  return {
    level: level.body.id,
    front: mm(cloth.front + level.geometry.rigidFront / 2),
    back: mm(cloth.back + level.geometry.rigidBack / 2),
    gapFront: level.geometry.gapFront,
    gapBack: level.geometry.gapBack,
  }
}

/** Cloth of one half of the body by zone as it lies on the pieces; null where the level does not cross them all. */
function widthsRead(draft: Draft, level: Level): ClothWidths | null {
  const widths = { front: -level.geometry.rigidFront / 2, back: -level.geometry.rigidBack / 2 }
  for (const piece of draft.pieces) {
    const crossing = piece.levels.find((one) => one.level === level.body.id)
    if (!crossing) return null
    widths[piece.zone] += crossing.width
  }
  return widths
}

const tensionMode = (widths: ClothWidths): RingMode => ({ solve: 'tension', widths: [mm(2 * widths.front), mm(2 * widths.back)] })

/** Factor on the cloth that brings the widths read, at the tension asked for, round the body once. */
function correctionOf(level: Level, read: ClothWidths): number {
  const { solved, geometry } = level
  const reach = (['front', 'back'] as const).reduce((sum, half) => {
    const plan = geometry.segments.find((segment) => segment.half === half)!.plan
    return sum + 2 * read[half] * (1 + strainOf(plan, solved))
  }, 0)
  return (solved.surface - geometry.rigidFront - geometry.rigidBack - geometry.gapFront - geometry.gapBack) / reach
}

/** How far the tension on the widths read is from the one asked for, as a part of it. */
function tensionMiss(input: GarmentInput, level: Level, read: ClothWidths): number {
  const solved = solveRing(level.geometry, tensionMode(read), input.settings)
  return solved.ok && level.solved.tension > 0 ? Math.abs(solved.value.tension / level.solved.tension - 1) : 0
}

const strainOf = (plan: LayerPlan, solved: RingSolution): number => planStrainAt(plan, solved.tension)
