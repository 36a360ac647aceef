import type { LevelId } from '../body/types'
import { pathCrossingsAtHeight } from '../geometry/crossings'
import { pathLength } from '../geometry/path'
import type { Point } from '../geometry/types'
import { mm } from '../units/brand'
import { fail, succeed } from '../units/result'
import type { Problem, Result } from '../units/result'
import { princessAbove, shoulderOf } from './edges'
import { draftFrame } from './frame'
import type { Frame } from './frame'
import { outlineIsSound, readPiece } from './piece'
import type { LevelHeight, PieceSketch } from './piece'
import { drawnHalves, sketchPieces } from './pieces'
import { degrees, millimetres } from './say'
import { foldProblem, rightProblem, withRightHalf } from './right-half'
import { halfOf, wholeEdge } from './roles'
import { compareSeams, withNotches } from './seams'
import { checkStyle } from './style'
import { changesFor, drawnProblem, heldFrame } from './upper-limits'
import type { BodiceStyle, Draft, DraftFinding, DraftInput, DraftPiece, EdgeId, PieceEdge, PieceId } from './types'
import { wedgesOf } from './wedges'

const LEVELS: readonly LevelId[] = ['bust', 'underbust', 'waist', 'high-hip', 'hip']
/** Levels must lie at least this far apart, mm. */
const LEAST_BETWEEN_LEVELS = 10
/** A hem this near to a level lies on it, mm. */
const HEM_ON_LEVEL = 0.01
/** A difference from the armhole aim above this is said, mm. */
export const ARMHOLE_AIM_OFF = 30
/** A side seam that moves by more than this is said, mm. */
const SIDE_SEAM_MOVED = 1
/** A piece narrower than this at a level is said, mm. */
const NARROW_PIECE = 25
/** Cloth that must lie between the centre edge and the bust point, mm. */
const LEAST_TO_BUST_POINT = 15

/** The princess seam passes at least this far inside the across point, mm. */
const LEAST_BESIDE_ARMHOLE = 12

/** Levels by the names they have in the draft's frame. */
const levelName = (level: LevelId): string => `level-${level}`

function widthProblem({ widths, style, above }: DraftInput): Problem | null {
  if (style.top !== null && above === undefined) {
    return {
      code: 'top-without-level',
      message: 'A strapless bodice hangs from a level above the bust, and there is none.',
      todo: 'Measure the upper bust girth and choose the hold there, or take shoulders.',
      at: 'style.top',
    }
  }
  if (above !== undefined && !(above.front > 0 && above.back > 0 && Number.isFinite(above.front + above.back + above.y))) {
    return {
      code: 'width-missing',
      message: 'The level above the bust has no width to draft.',
      todo: 'Solve its ring first.',
      at: 'style.top',
    }
  }
  for (const level of LEVELS) {
    const own = widths.find((candidate) => candidate.level === level)
    const values = own === undefined ? [] : [own.front, own.back, own.gapFront, own.gapBack]
    if (own === undefined || !values.every(Number.isFinite) || own.front <= 0 || own.back <= 0 || own.gapFront < 0 || own.gapBack < 0) {
      return { code: 'width-missing', message: `The ${level} level has no width to draft.`, todo: 'Solve its ring first.', at: level }
    }
    if (own.gapFront > 0 && style.centreFront !== 'lacing') return gapProblem(level, 'front')
    if (own.gapBack > 0 && style.centreBack !== 'lacing') return gapProblem(level, 'back')
  }
  return null
}

const gapProblem = (level: LevelId, half: 'front' | 'back'): Problem => ({
  code: 'gap-without-lacing',
  message: `The ${level} level has a gap at the centre ${half}, which is not laced.`,
  todo: `Lace the centre ${half} or set its gap to 0.`,
  at: level,
})

function frameProblem(frame: Frame): Problem | null {
  for (const [index, level] of LEVELS.slice(1).entries()) {
    const above = LEVELS[index] as LevelId
    const apart = frame.heightOf(above) - frame.heightOf(level)
    if (!(apart >= LEAST_BETWEEN_LEVELS)) {
      return {
        code: 'levels-too-near',
        message: `The ${level} level lies ${millimetres(apart)} below the ${above} level; ${LEAST_BETWEEN_LEVELS} mm is the least.`,
        todo: 'Measure the front waist length, the neck-shoulder point to bust point, the bust point to underbust and the waist to hip again.',
        at: level,
      }
    }
  }
  const { front, back } = frame
  if (frame.above !== null && !(frame.above.y - frame.heightOf('bust') >= LEAST_BETWEEN_LEVELS)) {
    return {
      code: 'levels-too-near',
      message: `The level above the bust lies ${millimetres(frame.above.y - frame.heightOf('bust'))} above it; ${LEAST_BETWEEN_LEVELS} mm is the least.`,
      todo: 'Measure the upper bust further up.',
      at: 'above',
    }
  }
  const beside = Math.min(front.princess.x - front.centreX, front.underarm.x - front.princess.x)
  if (!(beside >= LEAST_TO_BUST_POINT)) {
    return {
      code: 'bust-point-outside',
      message: `The bust point lies ${millimetres(beside)} from the edge of the half front; ${LEAST_TO_BUST_POINT} mm is the least.`,
      todo: 'Check the bust point distance, narrow the gap at the centre front or ask for a lighter hold at the bust.',
      at: 'bust',
    }
  }
  const shoulder = Math.min(front.shoulderEnd.y - front.underarmDrawn.y, back.shoulderEnd.y - back.underarm.y)
  if (!(shoulder >= 60)) {
    return {
      code: 'armhole-too-shallow',
      message: `The shoulder end lies only ${millimetres(shoulder)} above the underarm.`,
      todo: 'Measure the back waist length, the front waist length and the side waist length again.',
      at: 'sideWaistLength',
    }
  }
  return null
}

/** How far the princess seams that end on the shoulder pass inside the across point, the nearer of front and back, mm. */
function princessInsideAcross(frame: Frame, style: BodiceStyle): number {
  return Math.min(
    ...(['front', 'back'] as const).map((zone) => {
      if (style.top !== null || !style.panels[zone].princess || style.princessEnd[zone].edge !== 'shoulder') return Infinity
      const half = frame[zone]
      const seam = pathCrossingsAtHeight([princessAbove(half, shoulderOf(half, style))], half.across.y)[0]
      return seam === undefined ? Infinity : half.across.x - seam.x
    }),
  )
}

function princessProblem(frame: Frame, style: BodiceStyle): Problem | null {
  if (princessInsideAcross(frame, style) >= LEAST_BESIDE_ARMHOLE) return null
  const works = (share: number) => princessInsideAcross(frame, { ...style, princessAt: share }) >= LEAST_BESIDE_ARMHOLE
  const nearest = Array.from(
    { length: Math.round(style.princessAt * 100) - 20 },
    (_, step) => Math.round(style.princessAt * 100 - step - 1) / 100,
  ).find(works)
  return {
    code: 'princess-near-armhole',
    message: `The princess seam would pass nearer than ${LEAST_BESIDE_ARMHOLE} mm to the armhole.`,
    todo:
      nearest === undefined
        ? 'No place on the shoulder works: measure across front and across back again, or ask for a lighter hold at the bust.'
        : `Let it meet the shoulder nearer to the neck: the nearest share that works is ${nearest}.`,
    at: 'style.princessAt',
  }
}

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

/** Heights of the levels of a draft on its pieces. */
export function levelHeightsOf(draft: Draft): readonly LevelHeight[] {
  return (['top-edge', ...LEVELS] as const).flatMap((level) => {
    const at = draft.frame[levelName(level)]
    return at === undefined ? [] : [{ level, y: at.y }]
  })
}

/** A draft's frame with its levels at other heights. */
export const withLevelHeights = (frame: Draft['frame'], heights: readonly LevelHeight[]): Draft['frame'] => ({
  ...frame,
  ...Object.fromEntries(heights.map(({ level, y }) => [levelName(level), { x: 0, y }])),
})

/** Length of the armhole, front and back together, mm; 0 without shoulders. */
export const armholeLength = (pieces: readonly DraftPiece[]): number =>
  pieces
    .flatMap(({ edges }) => edges)
    .filter(({ id }) => wholeEdge(id) === 'armhole')
    .reduce((sum, { path }) => sum + pathLength(path), 0)

const EDGE_WORDS: Readonly<Partial<Record<EdgeId, string>>> = { neckline: 'neckline', armhole: 'armhole', top: 'top edge' }

/** The dart that takes the place of a princess seam: said, with its width at the mouth. */
function dartFinding(pieces: readonly DraftPiece[], { bust }: Frame): readonly DraftFinding[] {
  const piece = pieces.find(({ edges }) => edges.some(({ id }) => id === 'dart'))
  const leg = piece?.edges.findIndex(({ id }) => id === 'dart') ?? -1
  const own = piece?.edges[leg]
  if (piece === undefined || own === undefined) return []
  const into = EDGE_WORDS[wholeEdge((piece.edges[leg + 1] as PieceEdge).id)] ?? 'edge'
  const mouth = 2 * pathLength(own.path) * Math.sin(bust.angle / 2)
  const shown = (bust.angle * 180) / Math.PI
  return [
    {
      code: 'bust-angle-dart',
      piece: piece.id,
      edge: 'dart',
      value: shown,
      unit: 'degree',
      message: `The bust angle of ${degrees(shown)} is a dart from the bust point into the ${into}, ${millimetres(mouth)} wide at its mouth.`,
    },
  ]
}

/** A finding on the piece that has its edge, the one nearest to the side; on that half's side piece where none has. */
function placedFinding(finding: DraftFinding, pieces: readonly DraftPiece[]): DraftFinding {
  if (finding.piece === null || pieces.some(({ id }) => id === finding.piece)) return finding
  const half = pieces.filter(({ zone }) => zone === halfOf(finding.piece as PieceId))
  const wide = halfOf(finding.piece) === 'front' ? [...half].reverse() : half
  const own = wide.find(({ edges }) => edges.some(({ id }) => id === finding.edge))
  const edge =
    own === undefined && finding.edge === 'princess' && half.some(({ edges }) => edges.some(({ id }) => id === 'dart')) ? 'dart' : null
  return { ...finding, piece: (own ?? wide[0])?.id ?? null, edge: own === undefined ? edge : finding.edge }
}

/** What is said of the armhole and of narrow pieces; read again after alterations. */
export function readFindings(pieces: readonly DraftPiece[], aim: number): readonly DraftFinding[] {
  const off = armholeLength(pieces) - aim
  const findings: DraftFinding[] = []
  if (Math.abs(off) > ARMHOLE_AIM_OFF) {
    findings.push({
      code: 'armhole-aim-off',
      piece: null,
      edge: 'armhole',
      value: off,
      unit: 'mm',
      message: `The armhole is ${millimetres(Math.abs(off))} ${off > 0 ? 'longer' : 'shorter'} than its aim; ${off > 0 ? 'raise' : 'lower'} the underarm or measure the armscye again.`,
    })
  }
  return [...findings, ...narrowFindings(pieces)]
}

/** Pieces that are very narrow at a level. */
export function narrowFindings(pieces: readonly DraftPiece[]): readonly DraftFinding[] {
  const findings: DraftFinding[] = []
  for (const piece of pieces) {
    const narrowest = piece.levels.reduce(
      (least, level) => (level.width < least.width ? level : least),
      piece.levels[0] ?? { width: Infinity, level: '' },
    )
    if (narrowest.width >= NARROW_PIECE) continue
    findings.push({
      code: 'piece-narrow',
      piece: piece.id,
      edge: null,
      value: narrowest.width,
      unit: 'mm',
      message: `${piece.name} is only ${millimetres(narrowest.width)} wide at the ${narrowest.level} level.`,
    })
  }
  return findings
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
  const wrong = frameProblem(frame) ?? princessProblem(frame, style) ?? drawnProblem(frame, style, drawn)
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
      ...frame.findings.map((finding) => placedFinding(finding, pieces)),
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
  const right = draftHalf({ ...input, style: { ...style, ...style.right, right: null } })
  if (!right.ok) return fail(rightProblem(right.problem))
  return succeed(withRightHalf(left.value, right.value))
}
