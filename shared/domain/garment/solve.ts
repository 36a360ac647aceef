import { completeBody } from '../body/complete'
import { bodyLevels, topEdgeLevel } from '../body/levels'
import type { BodyLevel, DraftBody, LevelId } from '../body/types'
import { wearerLimits } from '../body/wearer'
import type { LevelChoice } from '../document/types'
import { DEFAULT_HOLD, freshLevel } from '../document/fresh'
import { applyAlterations } from '../draft/alterations'
import { draftBodice } from '../draft/bodice'
import { allPieces, blockOf } from '../draft/roles'
import { checkStyle } from '../draft/style'
import type { Draft, LevelWidths } from '../draft/types'
import { cappedHold } from '../textile/hold'
import { solveRing } from '../textile/ring'
import { stackOfSegment } from '../textile/segment'
import { strainOfStack } from '../textile/stack'
import type { RingGeometry, RingSolution } from '../textile/types'
import { mm, type Mm } from '../units/brand'
import { fail, succeed, type Problem, type Result } from '../units/result'
import { garmentCautions } from './cautions'
import { passesOf } from './passes'
import { standingStiffness, zonePlans } from './plans'
import { gapsOf, modeOf, ringGeometry } from './rings'
import { rigidLargest, rigidMoved, type RigidWidths } from '../structure/rigid'
import { isStructured, rigidOf } from './structure'
import type { GarmentInput, GarmentProblem, GarmentSolution } from './types'
import { bustSplit, dividesHalves, EVEN_SPLIT, EXTRA_ZONES, zoneSegments, type BustSplit, type ZonePlans, type ZoneSegment } from './zones'

/** Stored with every version, so that it is known which arithmetic made it. */
export const ENGINE = 'tenterframe-1'

/** The loop is settled when the tension on the widths read is this near to the one asked for, and no width moves by more. */
const TENSION_TOLERANCE = 0.005
const WIDTH_TOLERANCE = mm(0.05)
const MOST_ROUNDS = 8
/** Rigid widths stand when none moves by more than this, mm. */
const RIGID_TOLERANCE = WIDTH_TOLERANCE
const MOST_STRUCTURE_ROUNDS = 4

interface Level {
  readonly body: BodyLevel
  readonly choice: LevelChoice
  /** The segments of the ring, each with the pieces it runs over. */
  readonly parts: readonly ZoneSegment[]
  readonly geometry: RingGeometry
  readonly solved: RingSolution
  /** Rigid widths of bones and closures it was solved with. */
  readonly stiff: RigidWidths | undefined
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
  const lacking = topEdgeProblem(input)
  if (lacking !== null) return fail(lacking)

  const stiffness = standingStiffness(document)
  const tested = zonePlans(document, input.cloths, null)
  if (!tested.ok) return tested
  const learnt = stiffness ? zonePlans(document, input.cloths, stiffness) : tested
  if (!learnt.ok) return learnt
  const plansAt = (level: LevelId) => (stiffness?.levels?.includes(level) === false ? tested.value : learnt.value)
  const plans = learnt.value

  const first = solveLevels(input, body.value, plansAt, EVEN_SPLIT, [])
  if (!first.ok) return first
  let levels = first.value
  const structured = isStructured(document)
  if (dividesHalves(plans) || structured) {
    const drafted = draftFrom(input, body.value, levels, new Map(levels.map((level) => [level.body.id, clothWidths(level.solved)])))
    if (!drafted.ok) return atStep('draft', drafted.problem)
    const split = dividesHalves(plans) ? bustSplit(drafted.value) : EVEN_SPLIT
    const again = solveLevels(input, body.value, plansAt, split, rigidOf(document, allPieces(drafted.value), idsOf(levels)))
    if (!again.ok) return again
    levels = again.value
  }

  let settled = settle(input, body.value, levels)
  if (!settled.ok) return atStep('draft', settled.problem)
  // Channels lean as the pieces do: once the pieces stand, the rigid widths are read again, until they stay.
  for (let round = 1; structured && round <= MOST_STRUCTURE_ROUNDS; round++) {
    const before = levels.flatMap(({ stiff }) => stiff ?? [])
    const read = rigidOf(document, allPieces(settled.value.draft), idsOf(levels))
    const now = round === 1 ? read : rigidLargest(before, read)
    if (rigidMoved(before, now) <= RIGID_TOLERANCE) break
    const again = solveLevels(input, body.value, plansAt, dividesHalves(plans) ? bustSplit(settled.value.draft) : EVEN_SPLIT, now)
    if (!again.ok) return again
    levels = again.value
    settled = settle(input, body.value, levels)
    if (!settled.ok) return atStep('draft', settled.problem)
  }
  const { draft: plain, rounds, done } = settled.value

  const altered = applyAlterations(plain, document.alterations)
  const rings: RingSolution[] = []
  const ringInputs: RingGeometry[] = []
  for (const level of levels) {
    const widths = widthsRead(altered.draft, level)
    if (!widths) continue
    const read = solveRing(level.geometry, { solve: 'tension', widths }, input.settings)
    if (!read.ok) return atStep('layers', { ...read.problem, at: level.body.id })
    ringInputs.push(level.geometry)
    rings.push({ ...read.value, mode: level.solved.mode, governs: level.solved.governs, hold: level.solved.hold })
  }

  const alterationGirth = levels.flatMap((level) => {
    const before = widthsRead(plain, level)
    const after = widthsRead(altered.draft, level)
    return before && after ? [{ level: level.body.id, by: mm(sumOf(after) - sumOf(before)) }] : []
  })

  const found = {
    levels: levels.map((level) => level.body),
    plans: [plans.front, plans.back, ...EXTRA_ZONES.flatMap((zone) => plans[zone] ?? [])],
    ringInputs,
    rings,
    draft: altered.draft,
  }
  const solution: Omit<GarmentSolution, 'cautions'> = {
    engine: ENGINE,
    body: body.value,
    ...found,
    parked: document.alterations.filter((one) => altered.effects.some((effect) => effect.id === one.id && isNotApplied(effect.state))),
    passes: passesOf(input, found),
    rounds,
    settled: done,
    alterationGirth,
  }
  return succeed({ ...solution, cautions: garmentCautions(input, solution, altered.effects) })
}

/** What a strapless bodice lacks to hang from its top edge; null with shoulders. */
function topEdgeProblem({ document, measured }: GarmentInput): GarmentProblem | null {
  if (document.style.top === null) return null
  if (!(Number(measured.upperBustGirth?.value) > 0)) {
    return {
      step: 'body',
      code: 'upper-bust-missing',
      message: 'A strapless bodice hangs from its top edge, and the upper bust girth is not measured.',
      todo: 'Measure it round the body under the arms, or take shoulders.',
      at: 'upperBustGirth',
    }
  }
  const choice = document.levels.find((one) => one.level === 'top-edge') ?? freshLevel('top-edge')
  if (choice.solve !== 'cut' || choice.hold > 0) return null
  return {
    step: 'layers',
    code: 'top-edge-without-hold',
    message: 'The top edge holds nothing: a strapless bodice would slip.',
    todo: `Choose a hold there; ${DEFAULT_HOLD} Pa is easy.`,
    at: 'top-edge',
  }
}

/** The levels of the body, and above them a strapless bodice's top edge where it is lowest, so that it crosses every piece. */
function levelsOf({ document, measured }: GarmentInput, body: DraftBody): readonly BodyLevel[] {
  const { top, verticalFactor } = document.style
  const girth = measured.upperBustGirth?.value
  if (top === null || girth === undefined) return bodyLevels(body)
  const heights = top.form === 'straight' ? [top.side] : [top.front, top.back, top.side]
  return [topEdgeLevel(body, girth, Math.min(...heights) / verticalFactor), ...bodyLevels(body)]
}

/** The ring of every level of the body under the plans of its zones. */
function solveLevels(
  input: GarmentInput,
  body: DraftBody,
  plansAt: (level: LevelId) => ZonePlans,
  split: BustSplit,
  structure: readonly RigidWidths[],
): Result<readonly Level[], GarmentProblem> {
  const { document } = input
  const levels: Level[] = []
  for (const level of levelsOf(input, body)) {
    const choice = document.levels.find((one) => one.level === level.id) ?? freshLevel(level.id)
    const plans = plansAt(level.id)
    const more = { split, exertion: document.use.exertion }
    const stiff = structure.find((one) => one.level === level.id)
    const geometry = ringGeometry(level, { ...withRigid(choice, stiff), ...gapsOf(document, choice) }, plans, input.measured, more)
    const solved = solveLevel(input, choice, geometry)
    if (!solved.ok) return atStep('layers', { ...solved.problem, at: solved.problem.at ?? level.id })
    const parts = zoneSegments(plans, level.id, split)
    levels.push({ body: level, choice, parts, geometry: withGaps(geometry, solved.value), solved: solved.value, stiff })
  }
  return succeed(levels)
}

const idsOf = (levels: readonly Level[]): readonly LevelId[] => levels.map((level) => level.body.id)

/** What was typed and what bones and closures bring, together. */
function withRigid(choice: LevelChoice, stiff: RigidWidths | undefined): LevelChoice {
  if (!stiff) return choice
  const sewn = [...(choice.sewn ?? []), ...stiff.sewn]
  return {
    ...choice,
    rigidFront: mm(choice.rigidFront + stiff.front),
    rigidBack: mm(choice.rigidBack + stiff.back),
    ...(sewn.length > 0 ? { sewn } : {}),
  }
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

const draftFrom = (input: GarmentInput, body: DraftBody, levels: readonly Level[], cloth: ReadonlyMap<LevelId, ClothWidths>) =>
  draftBodice({
    body,
    style: input.document.style,
    widths: levels.filter(({ body: { id } }) => id !== 'top-edge').map((level) => levelWidths(level, cloth.get(level.body.id)!)),
    ...levels
      .filter(({ body: { id } }) => id === 'top-edge')
      .map((level) => {
        const { front, back } = levelWidths(level, cloth.get('top-edge')!)
        return { above: { y: level.body.y, front, back } }
      })[0],
  })

/** Solve, draft, read, correct. */
function settle(
  input: GarmentInput,
  body: DraftBody,
  levels: readonly Level[],
): Result<{ readonly draft: Draft; readonly rounds: number; readonly done: boolean }> {
  const cloth = new Map<LevelId, ClothWidths>(levels.map((level) => [level.body.id, clothWidths(level.solved)]))
  for (let round = 1; ; round++) {
    const drafted = draftFrom(input, body, levels, cloth)
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

const sumOf = (widths: readonly Mm[]): number => widths.reduce((sum, width) => sum + width, 0)

/**
 * Cloth of each segment once round the body as it lies on the pieces, mm; the rigid width of a half is taken off its pieces in proportion,
 * because nobody says yet on which of them it lies. Null where the level does not cross them all.
 */
function widthsRead(draft: Draft, level: Level): readonly Mm[] | null {
  const onPieces = new Map<string, number>()
  // The right half lies once round the body beside the left one; where it mirrors it, the left one stands for both.
  for (const piece of [...draft.pieces, ...(draft.right ?? draft.pieces)]) {
    const crossing = piece.levels.find((one) => one.level === level.body.id)
    if (!crossing) return null
    const part = blockOf(piece.id)
    onPieces.set(part, (onPieces.get(part) ?? 0) + crossing.width)
  }
  const paper = level.parts.map((part) => part.pieces.reduce((sum, piece) => sum + (onPieces.get(piece) ?? 0), 0))
  const half = (side: 'front' | 'back') => paper.reduce((sum, width, i) => (level.parts[i]!.half === side ? sum + width : sum), 0)
  const cloth = {
    front: 1 - level.geometry.rigidFront / half('front'),
    back: 1 - level.geometry.rigidBack / half('back'),
  }
  return paper.map((width, i) => mm(width * cloth[level.parts[i]!.half]))
}

/** Factor on the cloth that brings the widths read, at the tension asked for, round the body once. */
function correctionOf({ solved, geometry }: Level, read: readonly Mm[]): number {
  const reach = geometry.segments.reduce(
    (sum, segment, i) => sum + read[i]! * (1 + strainOfStack(stackOfSegment(segment, read[i]!), solved.tension)),
    0,
  )
  return (solved.surface - geometry.rigidFront - geometry.rigidBack - geometry.gapFront - geometry.gapBack) / reach
}

/** How far the tension on the widths read is from the one asked for, as a part of it. */
function tensionMiss(input: GarmentInput, level: Level, read: readonly Mm[]): number {
  const solved = solveRing(level.geometry, { solve: 'tension', widths: read }, input.settings)
  return solved.ok && level.solved.tension > 0 ? Math.abs(solved.value.tension / level.solved.tension - 1) : 0
}
