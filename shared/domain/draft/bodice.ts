import type { Point } from '../geometry/types'
import { mm } from '../units/brand'
import { fail, succeed } from '../units/result'
import type { Problem, Result } from '../units/result'
import { levelName, LEVELS } from './draft-levels'
import { armholeLength, dartFinding, placedFinding, readFindings } from './findings'
import { draftFrame } from './frame'
import type { Frame } from './frame'
import { frameProblem, princessProblem, widthProblem } from './frame-limits'
import { heldFrame } from './held-angle'
import { necklineProblem } from './neckline-limits'
import { panelProblem } from './panel-limits'
import { centreSharesOf } from './panels'
import { outlineIsSound, readPiece } from './piece'
import type { LevelHeight, PieceSketch } from './piece'
import { drawnHalves, sketchPieces } from './pieces'
import type { DrawnHalves } from './pieces'
import { foldProblem, rightProblem, withRightHalf } from './right-half'
import { millimetres } from './say'
import { compareSeams, withNotches } from './seams'
import { checkStyle } from './style'
import { changesFor } from './style-changes'
import type { BodiceStyle, Draft, DraftInput } from './types'
import { wedgesOf } from './wedges'

/** A hem this near to a level lies on it, mm. */
const HEM_ON_LEVEL = 0.01
/** A side seam that moves by more than this is said, mm. */
const SIDE_SEAM_MOVED = 1

function hemHeightOf(frame: Frame, style: BodiceStyle): number {
  const asked = frame.heightOf(style.hem.level) - style.hem.below
  const level = LEVELS.find((own) => Math.abs(frame.heightOf(own) - asked) < HEM_ON_LEVEL)
  return level === undefined ? asked : frame.heightOf(level)
}

function frameRecord(frame: Frame): Readonly<Record<string, Point>> {
  const { front, back } = frame
  return {
    nape: { x: 0, y: back.neckCentre.y },
    'back-neck-shoulder': back.neckShoulder,
    'back-shoulder-end': back.shoulderEnd,
    'back-across': back.across,
    'back-underarm': back.underarm,
    'front-neck': { x: 0, y: front.neckCentre.y },
    'front-neck-shoulder': front.neckShoulder,
    'front-shoulder-end': front.shoulderEnd,
    'front-across': front.across,
    'front-underarm': front.underarm,
    'front-underarm-turned-back': front.underarmDrawn,
    'bust-point': front.princess,
    'back-princess': back.princess,
    ...(frame.above === null ? {} : { [levelName('top-edge')]: { x: 0, y: frame.above.y } }),
    ...Object.fromEntries(LEVELS.map((level) => [levelName(level), { x: 0, y: frame.heightOf(level) }])),
  }
}

/** What of a style does not work on the drawn frame: panels, necklines; null when all does. */
function drawnProblem(frame: Frame, style: BodiceStyle, drawn: DrawnHalves): Problem | null {
  for (const zone of ['front', 'back'] as const) {
    const found = panelProblem(frame, style, zone) ?? (drawn === null ? null : necklineProblem(frame, style, zone, drawn[zone]))
    if (found !== null) return found
  }
  return null
}

interface Sketched {
  readonly frame: Frame
  readonly sketches: readonly PieceSketch[]
}

/** Frame and edges, or why not; `crossed` is a piece whose outline would cross itself. */
function sketchBodice(input: DraftInput): Result<Sketched, Problem & { readonly crossed?: PieceSketch }> {
  const { body, style } = input
  const problem = checkStyle(style, body)[0] ?? widthProblem(input)
  if (problem !== null) return fail(problem)
  const frame = heldFrame(input, draftFrame(input))
  const drawn = drawnHalves(frame, style)
  const wrong = frameProblem(frame, style) ?? princessProblem(frame, style) ?? drawnProblem(frame, style, drawn)
  if (wrong !== null) return fail(wrong)
  const sketches = sketchPieces(frame, style, hemHeightOf(frame, style), drawn)
  const crossed = sketches.find((piece) => !outlineIsSound(piece.edges))
  if (crossed === undefined) return succeed({ frame, sketches })
  return fail({ code: 'outline-crosses', message: `${crossed.name} would cross its own outline.`, crossed })
}

/** An outline that crosses itself, with the smallest change of style that keeps it from it. */
function crossedProblem(input: DraftInput, { id, name }: PieceSketch): Problem {
  const message = `${name} would cross its own outline.`
  const works = changesFor(id, input.style).find(({ style }) => sketchBodice({ ...input, style }).ok)
  if (works !== undefined) return { code: 'outline-crosses', message, todo: works.todo, at: works.at }
  return {
    code: 'outline-crosses',
    message,
    todo: 'Bring the levels nearer to each other, take a higher neckline or a smaller bust angle.',
    at: id,
  }
}

/** The bodice with one style for both halves. */
function draftHalf(input: DraftInput): Result<Draft> {
  const { body, style } = input
  const sketched = sketchBodice(input)
  if (!sketched.ok) {
    const { crossed } = sketched.problem
    return fail(crossed === undefined ? sketched.problem : crossedProblem(input, crossed))
  }
  const { frame, sketches } = sketched.value
  const heights: readonly LevelHeight[] = [
    ...(frame.above === null ? [] : [{ level: 'top-edge' as const, y: frame.above.y }]),
    ...LEVELS.map((level) => ({ level, y: frame.heightOf(level) })),
  ]
  const pieces = withNotches(sketches.map((piece) => readPiece(piece, heights)))
  const aim = style.top === null ? body.values.armscyeGirth * frame.milder : 0
  const moved = wedgesOf(frame, style).sideMoved('waist')
  return succeed({
    pieces,
    right: null,
    seams: compareSeams(pieces),
    findings: [
      ...frame.findings
        .filter(({ code }) => style.top === null || !code.startsWith('across-'))
        .map((finding) => placedFinding(finding, pieces)),
      ...dartFinding(pieces, frame),
      ...(Math.abs(moved) > SIDE_SEAM_MOVED
        ? [
            {
              code: 'side-seam-moved',
              piece: null,
              edge: 'side',
              value: moved,
              unit: 'mm',
              message: `The side seam stands ${millimetres(Math.abs(moved))} further to the ${moved > 0 ? 'back' : 'front'} at the waist, so that both its edges are alike.`,
            } as const,
          ]
        : []),
      ...readFindings(pieces, aim),
    ],
    bustAngle: (frame.bust.angle * 180) / Math.PI,
    armhole: { length: mm(armholeLength(pieces)), aim: mm(aim) },
    frame: frameRecord(frame),
  })
}

/**
 * The bodice of one half of the body: its pieces with notches, grain, levels and cutting line, its seams compared, and
 * what had to be decided or held. Widths on the pieces are those of the rings, front and back together, to .5 mm at every
 * level that crosses all pieces. A right half that differs is drafted from the same widths. It is a draft: it says nothing of the fit.
 */
export function draftBodice(input: DraftInput): Result<Draft> {
  const { style } = input
  if (style.right === null) return draftHalf(input)
  const fold = (['front', 'back'] as const).find((half) => (half === 'front' ? style.centreFront : style.centreBack) === 'fold')
  if (fold !== undefined) return fail(foldProblem(fold))
  const left = draftHalf({ ...input, style: { ...style, right: null } })
  if (!left.ok) return left
  const right = draftHalf({ ...input, centreShares: centreSharesOf(style), style: { ...style, ...style.right, right: null } })
  if (!right.ok) return fail(rightProblem(right.problem))
  return succeed(withRightHalf(left.value, right.value))
}
