import { pathLength, pathPointAt, pathSplitAt, pathStart, pathStartTangent, pathTransform } from '../geometry/path'
import { pointAdd, pointAlong, pointSubtract, pointTurn, vectorLength, vectorUnit } from '../geometry/point'
import { cubicSegment } from '../geometry/segment'
import { moveBy, transformThen, turnAbout } from '../geometry/transform'
import type { Transform } from '../geometry/transform'
import type { Path, Point } from '../geometry/types'
import { degrees, millimetres } from './say'
import type { BodiceStyle, DraftFinding } from './types'

/** Degrees: the bust angle is said from the first and held at the second. */
export const BUST_ANGLE_LARGE = 30
export const BUST_ANGLE_MOST = 42

/** The bust angle and how it turns points. */
export interface BustAngle {
  /** Radians; 0 or more. */
  readonly angle: number
  readonly bustPoint: Point
  /** d times the vertical factor: how much longer the front is than the back, mm. */
  readonly longer: number
  /** Turned outward and down about the bust point, as the side piece lies on the cloth. */
  readonly turn: (at: Point) => Point
  /** Turned back up, as the upper frame is drawn. */
  readonly turnBack: (at: Point) => Point
  readonly findings: readonly DraftFinding[]
}

const finding = (code: DraftFinding['code'], value: number, unit: DraftFinding['unit'], message: string): DraftFinding => ({
  code,
  piece: 'side-front',
  edge: 'princess',
  value,
  unit,
  message,
})

/** The angle in radians that the lengths ask for; a quarter turn where none is enough. */
export function bustAngleAsked(bustPoint: Point, underarm: Point, longer: number): number {
  const arm = pointSubtract(underarm, bustPoint)
  const sine = (arm.y + longer) / vectorLength(arm)
  return sine >= 1 ? Math.PI / 2 : Math.asin(sine) - Math.atan2(arm.y, arm.x)
}

/** The front may be this much longer than the back and be eased rather than darted, mm. */
export const EASED_AT_MOST = 10

/** What is done with the bust angle; `longer` is d on the body, mm. */
export function bustTaken({ bustAs, panels, bustAngle }: BodiceStyle, longer: number): 'seam' | 'dart' | 'ease' {
  if (bustAs !== 'auto') return bustAs
  if (panels.front.princess) return 'seam'
  return bustAngle === null && longer <= EASED_AT_MOST ? 'ease' : 'dart'
}

/**
 * The bust angle: what the shoulder beyond the princess seam turns about the bust point, so that the front armhole is as
 * deep as the back's although the front is longer. 0 where the front is shorter (measure again) or is eased; held at 42° or at
 * `most` radians. A chosen angle in degrees goes before the lengths.
 */
export function bustAngle(input: {
  readonly bustPoint: Point
  readonly underarm: Point
  readonly longer: number
  readonly chosen: number | null
  readonly eased?: boolean
  readonly most?: number | undefined
}): BustAngle {
  const { bustPoint, underarm, longer, chosen, eased = false } = input
  const most = input.most ?? (BUST_ANGLE_MOST * Math.PI) / 180
  const asked = eased
    ? 0
    : chosen === null
      ? Math.max(0, longer <= 0 ? 0 : bustAngleAsked(bustPoint, underarm, longer))
      : (chosen * Math.PI) / 180
  const angle = Math.min(asked, most)
  const findings: DraftFinding[] = []
  if (chosen === null && longer < 0) {
    findings.push(
      finding(
        'bust-angle-negative',
        longer,
        'mm',
        `The front waist length is ${millimetres(-longer)} shorter than the back's: no bust angle. Measure both again.`,
      ),
    )
  }
  if (eased && longer > 0) {
    findings.push(
      finding(
        'bust-angle-eased',
        longer,
        'mm',
        `The front is ${millimetres(longer)} longer than the back over the bust; it is eased into the armhole, without seam or dart.`,
      ),
    )
  }
  if (asked > most) {
    const lifted = pointTurn(underarm, bustPoint, angle).y - underarm.y
    findings.push(
      finding(
        'bust-angle-held',
        longer - lifted,
        'mm',
        `The bust angle is held at ${degrees((most * 180) / Math.PI)}; ${millimetres(longer - lifted)} of the front's length stay in the armhole.`,
      ),
    )
  } else if (angle >= (BUST_ANGLE_LARGE * Math.PI) / 180) {
    const shown = (angle * 180) / Math.PI
    findings.push(
      finding(
        'bust-angle-large',
        shown,
        'degree',
        `The bust angle is ${degrees(shown)}: check front waist length and bust point, and try it in a mock-up.`,
      ),
    )
  }
  return {
    angle,
    bustPoint,
    longer,
    turn: (at) => pointTurn(at, bustPoint, -angle),
    turnBack: (at) => pointTurn(at, bustPoint, angle),
    findings,
  }
}

/** Length of seam over which the corner at the bust is faired, on each side of the bust point, mm. */
export const FAIRING = 40
/** Handle at the bust point as a share of that length: short enough that the edge grows by at most .6 mm at 35°. */
const FAIRING_HANDLE = 0.26

/** The side piece's princess edge above and below the bust, both read from the bust point outwards. */
export interface FairedEdge {
  /** From the bust point up: the faired stretch, then the turned seam. */
  readonly up: Path
  /** From the bust point down: the faired stretch, then the seam below. */
  readonly down: Path
  /** Where everything that turns with the shoulder goes: turned, then moved down its seam by the excess. */
  readonly turned: Transform
  /** How far it moved down, mm. */
  readonly excess: number
}

/** A path with its first stretch redrawn so that it leaves `from` in `direction`. */
function faired(path: Path, from: Point, direction: Point): Path {
  const reach = Math.min(FAIRING, pathLength(path.slice(0, 1)) * 0.8)
  const rest = pathSplitAt(path, reach)[1]
  const to = pathStart(rest)
  const handle = reach / 3
  return [
    cubicSegment(from, pointAlong(from, direction, reach * FAIRING_HANDLE), pointAlong(to, pathStartTangent(rest), -handle), to),
    ...rest,
  ]
}

/** Direction through the corner: half-way between where the seam comes from and goes to over the faired stretches. */
function cornerBisector(bust: BustAngle, up: Path, down: Path): Point {
  const below = vectorUnit(pointSubtract(bust.bustPoint, pathPointAt(down, FAIRING)))
  const above = vectorUnit(pointSubtract(bust.turn(pathPointAt(up, FAIRING)), bust.bustPoint))
  return vectorUnit(pointAdd(below, above))
}

/**
 * The corner that the bust angle leaves on the side piece, faired by two cubics through the bust point along the
 * bisector. Each is a little longer than the corner, so the turned part moves down its seam as a whole until the edge is
 * as long as its mate's again. `up` and `down` start at the bust point; `up` is given unturned.
 */
export function fairBustCorner(bust: BustAngle, up: Path, down: Path): FairedEdge {
  const turn = turnAbout(bust.bustPoint, -bust.angle)
  if (bust.angle === 0) return { up, down, turned: turn, excess: 0 }
  const bisector = cornerBisector(bust, up, down)
  const seam = pointTurn({ x: 0, y: 1 }, { x: 0, y: 0 }, -bust.angle)
  const fairedDown = faired(down, bust.bustPoint, { x: -bisector.x, y: -bisector.y })
  const asked = pathLength(up) + pathLength(down)
  const below = pathLength(fairedDown)
  let excess = 0
  for (let round = 0; ; round += 1) {
    const turned = transformThen(turn, moveBy(-seam.x * excess, -seam.y * excess))
    const fairedUp = faired(pathTransform(up, turned), bust.bustPoint, bisector)
    const over = pathLength(fairedUp) + below - asked
    if (Math.abs(over) < 1e-4 || round === 8) return { up: fairedUp, down: fairedDown, turned, excess }
    excess += over
  }
}
