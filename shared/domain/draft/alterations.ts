import { pathEndTangent, pathStartTangent } from '../geometry/path'
import { pointAdd, vectorDot, vectorRight, vectorUnit } from '../geometry/point'
import type { Path, Point } from '../geometry/types'
import { mm } from '../units/brand'
import type { Problem } from '../units/result'
import { girthMoves, withMoves } from './alter-girth'
import { heightsAfter, LEAST_BETWEEN, lengthened, mostShortened, stretchBelow } from './alter-length'
import { levelHeightsOf, withLevelHeights } from './draft-levels'
import { armholeLength, narrowFindings, readFindings } from './findings'
import { moveIn, placeOf, withEdges, type Place } from './edge-moves'
import { outlineIsSound, readPiece, type LevelHeight } from './piece'
import { centreSeams, rightSeams } from './right-half'
import { inRightHalf, isRight } from './roles'
import { compareSeams, matesTravelAlike, withNotches } from './seams'
import type { Alteration, Draft, DraftPiece, GirthAlteration, LengthAlteration, MoveAlteration, PointRole } from './types'

/** What became of one alteration. */
export interface AlterationEffect {
  readonly id: string
  readonly state: 'applied' | 'off' | 'parked' | 'refused'
  /** Roles that moved with it: its own, and the mate's when it was carried. */
  readonly moved: readonly PointRole[]
  /** Carried was asked for and the mate has no such point: the seam's difference then says so. */
  readonly notCarried: boolean
  /** Why it was refused. */
  readonly problem: Problem | null
}

/** A draft with its alterations. */
export interface AlteredDraft {
  readonly draft: Draft
  /** Alterations whose role is gone: kept, not applied. */
  readonly parked: readonly Alteration[]
  /** One for each alteration, in order. */
  readonly effects: readonly AlterationEffect[]
}

/** Direction of travel along an edge at a node; between two segments the mean of both. */
function alongAt(path: Path, index: number): Point {
  const before = path[index - 1]
  const after = path[index]
  const into = before === undefined ? null : pathEndTangent([before])
  const out = after === undefined ? null : pathStartTangent([after])
  if (into === null) return out ?? { x: 0, y: 1 }
  return out === null ? into : vectorUnit(pointAdd(into, out))
}

/** The mate's same point and the same move there: as far outwards, as far along the seam. */
function carried(
  pieces: readonly DraftPiece[],
  place: Place,
  role: PointRole,
  by: Point,
): { readonly role: PointRole; readonly by: Point } | null {
  const { mate } = place.edge
  if (mate === null || (mate.piece === role.piece && mate.edge === role.edge)) return null
  const alike = matesTravelAlike(role.edge)
  const turned = { before: 'after', after: 'before' } as const
  const handle = role.handle === undefined || alike ? role.handle : turned[role.handle]
  const mateRole: PointRole = { piece: mate.piece, edge: mate.edge, node: role.node, ...(handle === undefined ? {} : { handle }) }
  const matePlace = placeOf(pieces, mateRole)
  if (matePlace === null) return null
  const own = alongAt(place.edge.path, place.index)
  const there = alongAt(matePlace.edge.path, matePlace.index)
  const along = vectorDot(by, own) * (alike ? 1 : -1)
  const outwards = vectorDot(by, vectorRight(own))
  const normal = vectorRight(there)
  return { role: mateRole, by: { x: there.x * along + normal.x * outwards, y: there.y * along + normal.y * outwards } }
}

const effect = (id: string, state: AlterationEffect['state'], rest: Partial<AlterationEffect> = {}): AlterationEffect => ({
  id,
  state,
  moved: [],
  notCarried: false,
  problem: null,
  ...rest,
})

/** What alterations work on: the pieces, and where the levels lie on them. */
interface Altered {
  readonly pieces: readonly DraftPiece[]
  readonly heights: readonly LevelHeight[]
}

interface Step extends Altered {
  readonly effect: AlterationEffect
}

const refused = (now: Altered, { id }: Alteration, problem: Problem): Step => ({ ...now, effect: effect(id, 'refused', { problem }) })

/** The step, unless it makes an outline cross itself: then the pieces stay and the piece is named. */
function unlessCrossed(now: Altered, next: Altered, alteration: Alteration, done: AlterationEffect): Step {
  const crossed = next.pieces.find((piece, index) => piece.edges !== now.pieces[index]?.edges && !outlineIsSound(piece.edges))
  if (crossed === undefined) return { ...next, effect: done }
  return refused(now, alteration, {
    code: 'alteration-crosses',
    message: `“${alteration.name}” would make the outline of ${crossed.name.toLowerCase()} cross itself.`,
    todo:
      alteration.kind === 'move' ? 'Move the point less far, or switch the alteration off.' : 'Take a smaller amount, or switch it off.',
    at: crossed.id,
  })
}

function applyMove(now: Altered, alteration: MoveAlteration): Step {
  const { id, role } = alteration
  const { pieces } = now
  const place = placeOf(pieces, role)
  if (place === null) return { ...now, effect: effect(id, 'parked') }
  const by = { x: alteration.dx, y: alteration.dy }
  const mate = alteration.carry ? carried(pieces, place, role, by) : null
  let next = withEdges(pieces, role.piece, moveIn(place, role.handle, by))
  if (mate !== null) next = withEdges(next, mate.role.piece, moveIn(placeOf(next, mate.role) as Place, mate.role.handle, mate.by))
  const seam = place.edge.mate !== null && place.edge.mate.piece !== role.piece
  const done = effect(id, 'applied', {
    moved: mate === null ? [role] : [role, mate.role],
    notCarried: alteration.carry && seam && mate === null,
  })
  return unlessCrossed(now, { ...now, pieces: next }, alteration, done)
}

function applyGirth(now: Altered, alteration: GirthAlteration): Step {
  const moves = girthMoves(now.pieces, alteration)
  if (moves === null) return { ...now, effect: effect(alteration.id, 'parked') }
  const done = effect(alteration.id, 'applied', { moved: moves.map(({ role }) => role) })
  return unlessCrossed(now, { ...now, pieces: withMoves(now.pieces, moves) }, alteration, done)
}

function applyLength(now: Altered, alteration: LengthAlteration): Step {
  const stretch = stretchBelow(now.heights, alteration)
  if (stretch === null) return { ...now, effect: effect(alteration.id, 'parked') }
  const most = mostShortened(stretch)
  if (alteration.by < most) {
    return refused(now, alteration, {
      code: 'alteration-too-short',
      message: `“${alteration.name}” would bring two levels nearer than ${LEAST_BETWEEN} mm.`,
      todo: `Shorten it by ${Math.floor(-most)} mm at most.`,
      at: alteration.below,
    })
  }
  const next = {
    pieces: lengthened(now.pieces, stretch, alteration.by),
    heights: heightsAfter(now.heights, stretch, alteration.by),
  }
  return unlessCrossed(now, next, alteration, effect(alteration.id, 'applied'))
}

function applyOne(now: Altered, alteration: Alteration): Step {
  if (!alteration.on) return { ...now, effect: effect(alteration.id, 'off') }
  switch (alteration.kind) {
    case 'move':
      return applyMove(now, alteration)
    case 'girth':
      return applyGirth(now, alteration)
    case 'length':
      return applyLength(now, alteration)
  }
}

/** An operation on the whole girth or length as the right half has it: on the same roles there. */
const onRight = (alteration: Alteration): Alteration =>
  alteration.kind === 'girth'
    ? { ...alteration, seams: alteration.seams.map((seam) => ({ ...seam, piece: inRightHalf(seam.piece) })) }
    : alteration

/** Both halves, the right one where it differs. */
interface AlteredHalves {
  readonly left: Altered
  readonly right: Altered | null
}

/**
 * One operation on both halves: a move on the half that has its point, all others on both or on neither, so that no half is let out,
 * taken in or lengthened alone.
 */
function applyOnHalves(now: AlteredHalves, alteration: Alteration): AlteredHalves & { readonly effect: AlterationEffect } {
  if (alteration.kind === 'move' && isRight(alteration.role.piece) && now.right !== null) {
    const { effect: done, ...right } = applyOne(now.right, alteration)
    return { ...now, right, effect: done }
  }
  const { effect: done, ...left } = applyOne(now.left, alteration)
  if (now.right === null || alteration.kind === 'move' || done.state !== 'applied') return { ...now, left, effect: done }
  const { effect: other, ...right } = applyOne(now.right, onRight(alteration))
  if (other.state !== 'applied') return { ...now, effect: { ...other, id: alteration.id } }
  return { left, right, effect: { ...done, moved: [...done.moved, ...other.moved] } }
}

/** Altered pieces with everything on them read again. */
const readAgain = (before: readonly DraftPiece[], { pieces, heights }: Altered): readonly DraftPiece[] =>
  withNotches(pieces.map((piece, index) => (piece === before[index] ? piece : readPiece(piece, heights))))

/**
 * A draft with named operations on its roles, in order. One whose role the draft no longer has is parked, never moved to a neighbour; one
 * that would make an outline cross itself is refused and says which piece. Seams, levels, notches, cutting lines, the armhole and what is
 * said of it are read again. Levels keep their heights but for what is lengthened. The draft given stays as it is.
 */
export function applyAlterations(draft: Draft, alterations: readonly Alteration[]): AlteredDraft {
  const before = levelHeightsOf(draft)
  let now: AlteredHalves = {
    left: { pieces: draft.pieces, heights: before },
    right: draft.right === null ? null : { pieces: draft.right, heights: before },
  }
  const effects: AlterationEffect[] = []
  for (const alteration of alterations) {
    const { effect: done, ...next } = applyOnHalves(now, alteration)
    now = next
    effects.push(done)
  }
  const parked = alterations.filter((_, index) => effects[index]?.state === 'parked')
  const { left, right } = now
  if (left.pieces === draft.pieces && (right?.pieces ?? null) === draft.right) return { draft, parked, effects }
  const read = readAgain(draft.pieces, left)
  const readRight = right === null || draft.right === null ? null : readAgain(draft.right, right)
  const stays = draft.findings.filter(({ code }) => code !== 'armhole-aim-off' && code !== 'piece-narrow')
  return {
    draft: {
      ...draft,
      pieces: read,
      right: readRight,
      seams: [
        ...compareSeams(read),
        ...(readRight === null ? [] : [...rightSeams(compareSeams(readRight)), ...centreSeams(read, readRight)]),
      ],
      findings: [...stays, ...readFindings(read, draft.armhole.aim), ...narrowFindings(readRight ?? [])],
      armhole: { length: mm(armholeLength(read)), aim: draft.armhole.aim },
      frame: left.heights === before ? draft.frame : withLevelHeights(draft.frame, left.heights),
    },
    parked,
    effects,
  }
}
