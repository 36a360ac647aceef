import { bodyLevels, FRONT_SHARE } from '../body/levels'
import type { BodyLevel } from '../body/types'
import { pointAlong } from '../geometry/point'
import type { Point } from '../geometry/types'
import { bustAngle, bustTaken } from './bust-angle'
import type { BustAngle } from './bust-angle'
import { millimetres } from './say'
import type { DraftFinding, DraftInput, LevelWidths } from './types'

/** The across point stays this far inside the underarm, mm. */
const ACROSS_INSIDE_UNDERARM = 12
/** Height of the across point: share of the way from underarm to shoulder end. */
const ACROSS_AT = 0.45
/** The back shoulder lies flatter and the front steeper than the measured slope, degrees. */
const SHOULDER_TURN = 2

/** The points from which one half (front or back) is drawn; mm, x from the body's centre, y over the waist. */
export interface HalfFrame {
  /** Half the gap at the centre at the bust, where the centre edge stands above the bust too. */
  readonly centreX: number
  /** Half width on the pieces at the bust. */
  readonly width: number
  readonly neckShoulder: Point
  /** At the centre, on the neck base. */
  readonly neckCentre: Point
  /** Direction from the neck-shoulder point to the shoulder end. */
  readonly shoulderAlong: Point
  readonly shoulderLength: number
  readonly shoulderEnd: Point
  readonly across: Point
  readonly underarm: Point
  /** The underarm in the frame in which the armhole is drawn: in front turned back about the bust point. */
  readonly underarmDrawn: Point
  /** Where the princess seam stands at the bust. */
  readonly princess: Point
}

/** The frame of a bodice: both halves before styling, in front with everything above the bust unturned. */
export interface Frame {
  readonly levels: readonly BodyLevel[]
  /** Heights of the levels on the pieces: the body's times the vertical factor. */
  readonly heightOf: (level: BodyLevel['id']) => number
  readonly widthsOf: (level: BodyLevel['id']) => LevelWidths
  readonly front: HalfFrame
  readonly back: HalfFrame
  readonly bust: BustAngle
  /** The level above the bust: its height on the pieces and what the seams take in there; in front less the bust angle's own opening. */
  readonly above: { readonly y: number; readonly takenFront: number; readonly takenBack: number } | null
  /** What the centres take where another half says it. */
  readonly centreShares: DraftInput['centreShares']
  /** k_u: what shoulder length, across back and across front are multiplied by. */
  readonly milder: number
  readonly findings: readonly DraftFinding[]
}

function acrossPoint(width: number, shoulderEnd: Point, underarm: Point): { readonly at: Point; readonly heldBy: number } {
  const most = underarm.x - ACROSS_INSIDE_UNDERARM
  const x = Math.min(width, most)
  return { at: { x, y: underarm.y + ACROSS_AT * (shoulderEnd.y - underarm.y) }, heldBy: width - x }
}

function acrossFinding(half: 'front' | 'back', heldBy: number): readonly DraftFinding[] {
  if (heldBy <= 0) return []
  return [
    {
      code: half === 'front' ? 'across-front-held' : 'across-back-held',
      piece: half === 'front' ? 'side-front' : 'side-back',
      edge: 'armhole',
      value: heldBy,
      unit: 'mm',
      message: `The across ${half} point is held ${ACROSS_INSIDE_UNDERARM} mm inside the underarm, ${millimetres(heldBy)} narrower than measured.`,
    },
  ]
}

/**
 * The frame by the drafting notes. Heights times the vertical factor; shoulder length, across back and across front times
 * the milder factor; widths at the bust as given. `mostAngle` (radians) holds the bust angle lower than the notes do. The front shoulder stands 3 mm nearer to the neck than the back's.
 */
export function draftFrame({ body, style, widths, above, centreShares }: DraftInput, mostAngle?: number): Frame {
  const { values } = body
  const v = style.verticalFactor
  const levels = bodyLevels(body)
  const heightOf = (id: BodyLevel['id']) => (levels.find((level) => level.id === id) as BodyLevel).y * v
  const widthsOf = (id: BodyLevel['id']) => widths.find((own) => own.level === id) as LevelWidths
  const bust = widthsOf('bust')
  const [gapFront, gapBack] = [bust.gapFront / 2, bust.gapBack / 2]
  const milder = 1 - (1 - (bust.front + bust.back + gapFront + gapBack) / (values.bustGirth / 2)) / 2
  const neck = values.neckBaseGirth / 5 - 2
  const rise = 0.055 * values.neckBaseGirth
  const shoulderLength = values.shoulderLength * milder
  const slope = (turn: number): Point => {
    const angle = ((values.shoulderSlope + turn) * Math.PI) / 180
    return { x: Math.cos(angle), y: -Math.sin(angle) }
  }

  const backNeckShoulder = { x: neck, y: (values.backWaistLength + rise) * v }
  const backAlong = slope(-SHOULDER_TURN)
  const backEnd = pointAlong(backNeckShoulder, backAlong, shoulderLength)
  const backUnderarm = { x: bust.back + gapBack, y: values.sideWaistLength * v - style.underarmDrop }
  const backAcross = acrossPoint((values.acrossBack / 2) * milder, backEnd, backUnderarm)

  const frontNeckShoulder = { x: neck - 3, y: values.frontWaistLength * v }
  const frontAlong = slope(SHOULDER_TURN)
  const frontEnd = pointAlong(frontNeckShoulder, frontAlong, shoulderLength)
  const frontArc = (FRONT_SHARE.bust * values.bustGirth) / 2
  // The gap does not stretch: only the cloth beside it is shared out.
  const bustPoint = {
    x: gapFront + ((values.bustPointDistance / 2 - gapFront) * bust.front) / (frontArc - gapFront),
    y: heightOf('bust'),
  }
  const frontUnderarm = { x: bust.front + gapFront, y: backUnderarm.y }
  const frontLonger = values.frontWaistLength - values.backWaistLength - rise
  const angle = bustAngle({
    bustPoint,
    underarm: { x: frontUnderarm.x, y: values.sideWaistLength * v },
    longer: frontLonger * v,
    chosen: style.bustAngle,
    eased: bustTaken(style, frontLonger) === 'ease',
    most: mostAngle,
  })
  const frontDrawn = angle.turnBack(frontUnderarm)
  const frontAcross = acrossPoint((values.acrossFront / 2) * milder, frontEnd, frontDrawn)
  const movedBy = levels[0]?.movedBy ?? 0

  return {
    levels,
    heightOf,
    widthsOf,
    milder,
    centreShares,
    bust: angle,
    above:
      above === undefined
        ? null
        : {
            y: above.y * v,
            takenFront: bust.front - above.front - 2 * Math.tan(angle.angle / 2) * (above.y * v - bustPoint.y),
            takenBack: bust.back - above.back,
          },
    front: {
      centreX: gapFront,
      width: bust.front,
      neckShoulder: frontNeckShoulder,
      // The front neck is as deep as it is wide at the back: front and back necklines then measure the neck base girth (derived).
      neckCentre: { x: gapFront, y: (values.frontWaistLength - neck) * v },
      shoulderAlong: frontAlong,
      shoulderLength,
      shoulderEnd: frontEnd,
      across: frontAcross.at,
      underarm: frontUnderarm,
      underarmDrawn: frontDrawn,
      princess: bustPoint,
    },
    back: {
      centreX: gapBack,
      width: bust.back,
      neckShoulder: backNeckShoulder,
      neckCentre: { x: gapBack, y: values.backWaistLength * v },
      shoulderAlong: backAlong,
      shoulderLength,
      shoulderEnd: backEnd,
      across: backAcross.at,
      underarm: backUnderarm,
      underarmDrawn: backUnderarm,
      princess: { x: gapBack + style.backPrincessAt * bust.back, y: heightOf('bust') },
    },
    findings: [
      ...angle.findings,
      ...(movedBy > 0
        ? [
            {
              code: 'bust-level-moved',
              piece: null,
              edge: null,
              value: movedBy,
              unit: 'mm',
              message: `The bust level lies at or above the underarm and is drawn ${millimetres(movedBy)} lower; measure the bust girth there.`,
            } as const,
          ]
        : []),
      ...acrossFinding('front', frontAcross.heldBy),
      ...acrossFinding('back', backAcross.heldBy),
    ],
  }
}
