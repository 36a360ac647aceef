/**
 * A close-fitting woven block drawn by hand from the demo wearer's figures, step by step as handbooks of flat pattern cutting teach it (steps
 * and eases from memory; common practice), beside the program's pieces in the base style: once without ease, once as the cloths ask.
 * `npx jiti tests/external/hand-draft.ts out.svg` writes the sheet.
 */
import { writeFileSync } from 'node:fs'
import { completeBody } from '../../shared/domain/body/complete'
import type { DraftBody } from '../../shared/domain/body/types'
import { baseStyle } from '../../shared/domain/draft/style'
import type { Draft, DraftPiece } from '../../shared/domain/draft/types'
import { solveGarment } from '../../shared/domain/garment/solve'
import { pathFlatten } from '../../shared/domain/geometry/path'
import type { Point } from '../../shared/domain/geometry/types'
import { mm } from '../../shared/domain/units/brand'
import { DEMO_CLIENTS, fromCm } from '../../scripts/lib/demo-people'
import { draftOf, valueOf, widthsOf } from '../fixtures/draft-inputs'
import { inventedDocument, inventedInput } from '../fixtures/garment-inputs'

/** One half of the block: its outline from the centre hem round, its darts, and the points that the steps set. Mm, x from the centre, y over the waist. */
export interface HandHalf {
  readonly outline: readonly Point[]
  readonly darts: readonly (readonly [Point, Point, Point])[]
  readonly points: Readonly<Record<string, Point>>
}

export interface HandDraft {
  readonly back: HandHalf
  readonly front: HandHalf
  readonly steps: readonly string[]
}

/** Woven eases of a close-fitting block, whole girth, mm: common practice, from memory. */
export const EASE = { bust: 100, waist: 60, hip: 50 }
const SHOULDER_EASE = 10
const ACROSS_EASE = 5

const at = (x: number, y: number): Point => ({ x, y })
const turned = (degrees: number, length: number): Point =>
  at(length * Math.cos((degrees * Math.PI) / 180), -length * Math.sin((degrees * Math.PI) / 180))
const plus = (a: Point, b: Point): Point => at(a.x + b.x, a.y + b.y)

/** Points of a hand-drawn curve: through `via`, a quadratic is near enough for the eye. */
function curve(from: Point, via: Point, to: Point, count = 16): readonly Point[] {
  const c = at(2 * via.x - (from.x + to.x) / 2, 2 * via.y - (from.y + to.y) / 2)
  return Array.from({ length: count }, (_, index) => {
    const t = (index + 1) / count
    return at((1 - t) ** 2 * from.x + 2 * t * (1 - t) * c.x + t * t * to.x, (1 - t) ** 2 * from.y + 2 * t * (1 - t) * c.y + t * t * to.y)
  })
}

/** The block by hand. */
export function handDraft({ values: v }: DraftBody): HandDraft {
  const bust = (v.bustGirth + EASE.bust) / 2
  const [backWidth, frontWidth] = [bust / 2 - 5, bust / 2 + 5]
  const neck = v.neckBaseGirth / 5 - 2
  const armholeLine = v.sideWaistLength
  const hip = -v.waistToHip
  const waist = (v.waistGirth + EASE.waist) / 2
  const taken = bust - waist
  const side = taken * 0.15
  const backDart = taken * 0.3
  const frontDart = taken * 0.4
  const hipWidth = (v.hipGirth + EASE.hip) / 2
  const [backHip, frontHip] = [hipWidth / 2 + 5, hipWidth / 2 - 5]

  const nape = at(0, v.backWaistLength)
  const backNeck = at(neck, v.backWaistLength + 0.055 * v.neckBaseGirth)
  const backTip = plus(backNeck, turned(v.shoulderSlope - 2, v.shoulderLength + SHOULDER_EASE))
  const acrossBack = at(v.acrossBack / 2 + ACROSS_EASE, armholeLine + (backTip.y - armholeLine) * 0.45)
  const backUnderarm = at(backWidth, armholeLine)
  const back: HandHalf = {
    outline: [
      at(0, hip),
      at(backHip, hip),
      ...curve(at(backHip, hip), at(backWidth - side * 0.85, hip * 0.35), at(backWidth - side, 0)),
      backUnderarm,
      ...curve(backUnderarm, at(acrossBack.x + 3, armholeLine + 22), acrossBack),
      ...curve(acrossBack, plus(acrossBack, at(-1, (backTip.y - acrossBack.y) / 2)), backTip),
      backNeck,
      ...curve(backNeck, at(neck * 0.62, nape.y + 3), nape),
    ],
    darts: [[at(backWidth * 0.45 - backDart / 2, 0), at(backWidth * 0.45, armholeLine - 20), at(backWidth * 0.45 + backDart / 2, 0)]],
    points: { nape, 'neck-shoulder': backNeck, 'shoulder-end': backTip, across: acrossBack, underarm: backUnderarm },
  }

  const frontNeck = at(neck - 3, v.frontWaistLength)
  const frontCentre = at(0, frontNeck.y - v.neckBaseGirth / 5)
  const bustPoint = at(v.bustPointDistance / 2, v.frontWaistLength - v.neckShoulderToBustPoint)
  // The dart's width is read from a table of sizes: 70 mm at bust 88 cm, 6 mm more for each 4 cm.
  const dartWidth = 70 + ((v.bustGirth - 880) / 40) * 6
  const dartFrom = plus(frontNeck, turned(v.shoulderSlope + 2, v.shoulderLength / 2))
  const reach = Math.hypot(dartFrom.x - bustPoint.x, dartFrom.y - bustPoint.y)
  const open = 2 * Math.asin(dartWidth / 2 / reach)
  const toward = Math.atan2(dartFrom.y - bustPoint.y, dartFrom.x - bustPoint.x)
  const dartTo = plus(bustPoint, at(reach * Math.cos(toward - open), reach * Math.sin(toward - open)))
  const frontTip = plus(dartTo, turned(v.shoulderSlope + 2 + (open * 180) / Math.PI, v.shoulderLength / 2))
  const acrossFront = at(v.acrossFront / 2 + ACROSS_EASE + dartWidth * 0.55, armholeLine + (frontTip.y - armholeLine) * 0.42)
  const frontUnderarm = at(frontWidth, armholeLine)
  const front: HandHalf = {
    outline: [
      at(0, hip),
      at(frontHip, hip),
      ...curve(at(frontHip, hip), at(frontWidth - side * 0.85, hip * 0.35), at(frontWidth - side, 0)),
      frontUnderarm,
      ...curve(frontUnderarm, at(acrossFront.x + 2, armholeLine + 18), acrossFront),
      ...curve(acrossFront, plus(acrossFront, at(-2, (frontTip.y - acrossFront.y) / 2)), frontTip),
      dartTo,
      bustPoint,
      dartFrom,
      frontNeck,
      ...curve(frontNeck, at((neck - 3) * 0.75, frontCentre.y + 14), frontCentre),
    ],
    darts: [[at(bustPoint.x - frontDart / 2, 0), at(bustPoint.x, bustPoint.y - 25), at(bustPoint.x + frontDart / 2, 0)]],
    points: {
      'neck-shoulder': frontNeck,
      'shoulder-end': frontTip,
      'bust-point': bustPoint,
      across: acrossFront,
      underarm: frontUnderarm,
      'dart-from': dartFrom,
      'dart-to': dartTo,
    },
  }
  const cm = (length: number) => (length / 10).toFixed(1)
  return {
    back,
    front,
    steps: [
      `Square a rectangle: half bust + ${cm(EASE.bust / 2)} = ${cm(bust)} wide; back waist length ${cm(v.backWaistLength)}.`,
      `Armhole line at the side waist length, ${cm(armholeLine)} over the waist.`,
      `Side line: back ${cm(backWidth)}, front ${cm(frontWidth)}.`,
      `Back neck: a fifth of the neck less .2 = ${cm(neck)} wide; rise ${cm(0.055 * v.neckBaseGirth)}.`,
      `Back shoulder: slope ${(v.shoulderSlope - 2).toFixed(0)}°, length ${cm(v.shoulderLength)} + 1 eased in.`,
      `Across back: half ${cm(v.acrossBack / 2)} + .5. Armhole through it.`,
      `Front neck point at the front waist length ${cm(v.frontWaistLength)}; neck a fifth of the neck deep.`,
      `Bust point: ${cm(v.neckShoulderToBustPoint)} below the neck point, ${cm(v.bustPointDistance / 2)} from the centre.`,
      `Shoulder dart from a table of sizes: ${cm(dartWidth)} wide (${((open * 180) / Math.PI).toFixed(1)}°).`,
      `Across front: half ${cm(v.acrossFront / 2)} + .5, beyond the dart. Armhole through it.`,
      `Waist: half + ${cm(EASE.waist / 2)}; ${cm(taken)} taken in: back dart 30 %, front dart 40 %, side seam 15 % on each edge.`,
      `Hip line ${cm(v.waistToHip)} below: half + ${cm(EASE.hip / 2)}.`,
    ],
  }
}

/** The demo wearer, the hand draft, and the program's pieces in the base style without ease and in four layers. */
export function bothDrafts(): { readonly body: DraftBody; readonly hand: HandDraft; readonly still: Draft; readonly solved: Draft } {
  const wearer = DEMO_CLIENTS.flatMap((client) => client.wearers).find((one) => one.name === 'Ilse Marenbach')!
  const measured = fromCm(wearer.measurings.at(-1)!.cm)
  const body = valueOf(completeBody(measured))
  const plain = inventedDocument()
  const levels = plain.levels.map((level) => ({ ...level, gapFront: mm(0), gapBack: mm(0), rigidFront: mm(0), rigidBack: mm(0) }))
  const garment = valueOf(solveGarment(inventedInput({ measured, document: { ...plain, style: baseStyle(), levels, alterations: [] } })))
  return {
    body,
    hand: handDraft(body),
    still: draftOf({ body, style: baseStyle(), widths: widthsOf(body, { front: 0, back: 0 }) }),
    solved: garment.draft,
  }
}

const line = (points: readonly Point[], shift: Point) =>
  points.map(({ x, y }, index) => `${index === 0 ? 'M' : 'L'}${(x + shift.x).toFixed(1)} ${(shift.y - y).toFixed(1)}`).join('')

function pieces(draft: Draft, zone: 'front' | 'back', shift: Point, style: string): string {
  const outline = (piece: DraftPiece) => piece.edges.flatMap((edge) => pathFlatten(edge.path))
  return draft.pieces
    .filter((piece) => piece.zone === zone)
    .map((piece) => `<path d="${line(outline(piece), shift)}Z" ${style}/>`)
    .join('\n')
}

/** The sheet: the hand draft with its steps, and over it the program's pieces, 1 user unit = 1 mm. */
export function handDraftSheet(): string {
  const { hand, still, solved } = bothDrafts()
  const top = Math.max(...[...hand.front.outline, ...hand.back.outline].map(({ y }) => y)) + 40
  const low = Math.min(...hand.front.outline.map(({ y }) => y))
  const half = (name: 'back' | 'front', shift: Point) => {
    const own = hand[name]
    const marks = Object.entries(own.points).map(
      ([label, { x, y }]) =>
        `<circle cx="${(x + shift.x).toFixed(1)}" cy="${(shift.y - y).toFixed(1)}" r="2"/><text x="${(x + shift.x + 4).toFixed(1)}" y="${(shift.y - y - 3).toFixed(1)}" font-size="8">${label.replaceAll('-', ' ')}</text>`,
    )
    return [
      pieces(still, name, shift, 'fill="none" stroke="#24508c" stroke-width=".8" stroke-dasharray="1.5 2"'),
      pieces(solved, name, shift, 'fill="#24508c" fill-opacity=".07" stroke="#24508c" stroke-width="1.2"'),
      `<path d="${line(own.outline, shift)}Z" fill="none" stroke="#1f1f1b" stroke-width="1"/>`,
      ...own.darts.map((dart) => `<path d="${line(dart, shift)}" fill="none" stroke="#1f1f1b" stroke-width=".8" stroke-dasharray="6 3"/>`),
      `<g fill="#1f1f1b">${marks.join('')}</g>`,
      `<text x="${shift.x}" y="${(shift.y - low + 22).toFixed(0)}" font-size="13" font-weight="600">Half ${name}</text>`,
    ].join('\n')
  }
  const height = top - low + 300
  const text = hand.steps.map((step, index) => `<tspan x="20" dy="15">${index + 1}. ${step}</tspan>`).join('')
  return `<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 760 ${height.toFixed(0)}" width="760mm" height="${height.toFixed(0)}mm" font-family="Inter, sans-serif">
<rect width="100%" height="100%" fill="#f6f4ec"/>
${half('back', at(40, top))}
${half('front', at(400, top))}
<text x="20" y="${(top - low + 50).toFixed(0)}" font-size="11"><tspan x="20" dy="0" font-weight="600">Black: woven block by hand. Blue dotted: our pieces without ease. Blue filled: our pieces in four stretched layers.</tspan>${text}</text>
</svg>
`
}

if (process.argv[1]?.endsWith('hand-draft.ts') && process.argv[2]) writeFileSync(process.argv[2], handDraftSheet())
