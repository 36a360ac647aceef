import type { BodyLevel } from '../body/types'
import { pathFlatten } from '../geometry/path'
import { pointDistance } from '../geometry/point'
import type { Path } from '../geometry/types'
import type { Problem } from '../units/result'
import { princessAbove, seamAbove, shoulderOf } from './edges'
import { draftFrame } from './frame'
import type { Frame } from './frame'
import { panelCount, seamLines } from './panels'
import type { DrawnHalves } from './pieces'
import { halfOf } from './roles'
import type { Zone } from './panels'
import { millimetres } from './say'
import { cutStretch } from './stretches'
import type { BodiceStyle, DraftInput, PieceId } from './types'
import { drawnUpper, openingOf } from './upper'
import type { DrawnUpper } from './upper'
import { wedgesOf } from './wedges'

const ZONES: readonly Zone[] = ['front', 'back']

/** The turned end of a princess seam or dart in the armhole stays this far above the underarm, mm. */
const ABOVE_UNDERARM = 15

/** And this far inside it, mm. */
const INSIDE_UNDERARM = 15

/** Room left to the bust angle's turned end on the armhole, above the underarm and inside it, mm; infinite where it opens elsewhere. */
function turnedEndRoom(frame: Frame, style: BodiceStyle): number {
  const drawn = drawnUpper(frame.front, 'front', style)
  const opening = openingOf({ frame, style, zone: 'front' }, drawn)
  if (opening === null || opening.edge !== 'armhole') return Infinity
  const end = cutStretch(drawn.armhole, opening.share, 'princess')[0].rail.nodes.at(-1)
  if (end === undefined) return Infinity
  const turned = frame.bust.turn(end.at)
  return Math.min(turned.y - frame.front.underarm.y - ABOVE_UNDERARM, frame.front.underarm.x - turned.x - INSIDE_UNDERARM)
}

/**
 * The frame with the bust angle no larger than a seam or dart into the armhole allows: its turned end 15 mm above the
 * underarm and inside it, to a hundredth of a degree.
 */
export function heldFrame(input: DraftInput, frame: Frame): Frame {
  const { style } = input
  if (style.top !== null || frame.bust.angle === 0 || turnedEndRoom(frame, style) >= 0) return frame
  let low = 0
  let high = frame.bust.angle
  while (high - low > 1.7e-4) {
    const middle = (low + high) / 2
    const tried = draftFrame(input, middle)
    if (turnedEndRoom(tried, style) >= 0) low = middle
    else high = middle
  }
  return draftFrame(input, low)
}

/** Cloth left between a neckline and what it must not touch, mm: the armhole, and a princess seam that does not end in it. */
const NECKLINE_TO_ARMHOLE = 25
const NECKLINE_TO_PRINCESS = 10
/** A further seam's panel is at least this wide at the bust, and at every other level, mm. */
const LEAST_PANEL = 25
const LEAST_PANEL_ELSEWHERE = 10

function nearest(one: Path, other: Path): number {
  const [a, b] = [pathFlatten(one, 0.5), pathFlatten(other, 0.1)]
  let least = Infinity
  a.forEach((at, index) => {
    const before = a[index - 1]
    if (before === undefined) return
    for (const place of b) {
      const length = pointDistance(before, at)
      const t = Math.min(
        1,
        Math.max(0, ((place.x - before.x) * (at.x - before.x) + (place.y - before.y) * (at.y - before.y)) / (length * length)),
      )
      least = Math.min(least, Math.hypot(place.x - before.x - (at.x - before.x) * t, place.y - before.y - (at.y - before.y) * t))
    }
  })
  return least
}

/** The princess seam above the bust as drawn, unturned. */
function princessDrawn(frame: Frame, style: BodiceStyle, zone: Zone, drawn: DrawnUpper): Path | null {
  if (!style.panels[zone].princess) return null
  const { edge, at } = style.princessEnd[zone]
  const half = frame[zone]
  if (edge === 'shoulder') return [princessAbove(half, shoulderOf(half, style))]
  const end = cutStretch(drawn[edge], at, 'princess')[0].rail.path.at(-1)
  if (end === undefined) return null
  const along = {
    x: end.to.x - (end.kind === 'cubic' ? end.c2.x : end.from.x),
    y: end.to.y - (end.kind === 'cubic' ? end.c2.y : end.from.y),
  }
  return [seamAbove(half.princess, end.to, along)]
}

/** How much cloth a neckline leaves beyond what it must, the least of both limits, mm; negative: too little. */
function necklineRoom(frame: Frame, style: BodiceStyle, zone: Zone, drawn = drawnUpper(frame[zone], zone, style)): number {
  const beside = nearest(drawn.neckline.rail.path, drawn.armhole.rail.path) - NECKLINE_TO_ARMHOLE
  if (style.princessEnd[zone].edge === 'neckline') return beside
  const princess = princessDrawn(frame, style, zone, drawn)
  return princess === null ? beside : Math.min(beside, nearest(drawn.neckline.rail.path, princess) - NECKLINE_TO_PRINCESS)
}

function necklineProblem(frame: Frame, style: BodiceStyle, zone: Zone, drawn: DrawnUpper): Problem | null {
  if (necklineRoom(frame, style, zone, drawn) >= 0) return null
  const key = zone === 'front' ? 'necklineFrontDepth' : 'necklineBackDepth'
  const found = (['necklineWidth', key] as const).flatMap((at) => {
    for (let value = Math.floor(style[at]); value >= 0; value -= 2) {
      if (necklineRoom(frame, { ...style, [at]: value }, zone) >= 0) return [{ at, value }]
    }
    return []
  })[0]
  return {
    code: 'neckline-near-edge',
    message: `The ${zone} neckline comes too near to the armhole or the princess seam.`,
    todo:
      found === undefined
        ? `Take a narrower and higher ${zone} neckline, or let the princess seam end elsewhere.`
        : `The nearest ${found.at === key ? 'depth' : 'width taken off the shoulder'} that works is ${found.value} mm.`,
    at: `style.${found?.at ?? key}`,
  }
}

const LEVELS: readonly BodyLevel['id'][] = ['bust', 'underbust', 'waist', 'high-hip', 'hip']

/** Panels of a half with further seams, at the level where they are narrowest. */
function panelProblem(frame: Frame, style: BodiceStyle, zone: Zone): Problem | null {
  const panels = style.panels[zone]
  if (panels.further.length === 0) return null
  const half = frame[zone]
  const wedges = wedgesOf(frame, style)
  const room = (
    own: typeof panels,
    ownStyle: BodiceStyle,
  ): { readonly least: number; readonly level: BodyLevel['id']; readonly limit: number } => {
    const lines = seamLines(half, own)
    const used = ownStyle === style ? wedges : wedgesOf(frame, ownStyle)
    let worst: { least: number; level: BodyLevel['id']; limit: number } = { least: Infinity, level: 'bust', limit: LEAST_PANEL }
    for (const level of LEVELS) {
      const places = [
        { left: used.at(zone, 'centre', level), right: used.at(zone, 'centre', level) },
        ...lines.map(({ id, x }) => ({ left: x - used.at(zone, id, level), right: x + used.at(zone, id, level) })),
        { left: half.underarm.x - used.at(zone, 'side', level), right: 0 },
      ]
      const limit = level === 'bust' ? LEAST_PANEL : LEAST_PANEL_ELSEWHERE
      places.slice(1).forEach((place, index) => {
        const width = place.left - (places[index] as { right: number }).right
        if (width - limit < worst.least - worst.limit) worst = { least: width, level, limit }
      })
    }
    return worst
  }
  const worst = room(panels, style)
  if (worst.least >= worst.limit) return null
  const message = `A panel of the half ${zone} would be ${millimetres(Math.max(0, worst.least))} wide at the ${worst.level} level; ${worst.limit} mm is the least.`
  const even = { ...panels, further: panels.further.map((seam) => ({ ...seam, at: null })) }
  const works = (own: typeof panels) => {
    const found = room(own, { ...style, panels: { ...style.panels, [zone]: own } })
    return found.least >= found.limit
  }
  const count = panelCount(panels)
  if (panels.further.some(({ at }) => at !== null) && works(even)) {
    return {
      code: 'panels-too-narrow',
      message,
      todo: 'Divided evenly, the panels work: leave their places empty.',
      at: `style.panels.${zone}`,
    }
  }
  for (let fewer = panels.further.length - 1; fewer > 0; fewer -= 1) {
    if (!works({ ...even, further: even.further.slice(0, fewer) })) continue
    return { code: 'panels-too-narrow', message, todo: `The most panels that work here are ${fewer + 2}.`, at: `style.panels.${zone}` }
  }
  return { code: 'panels-too-narrow', message, todo: `Take two panels instead of ${count}.`, at: `style.panels.${zone}` }
}

/** What of a style does not work on the drawn frame: necklines, panels; null when all does. */
export function drawnProblem(frame: Frame, style: BodiceStyle, drawn: DrawnHalves): Problem | null {
  for (const zone of ZONES) {
    const found = panelProblem(frame, style, zone) ?? (drawn === null ? null : necklineProblem(frame, style, zone, drawn[zone]))
    if (found !== null) return found
  }
  return null
}

/** Another style, and what was changed in it. */
export interface StyleChange {
  readonly style: BodiceStyle
  readonly at: string
  readonly todo: string
}

/** Shares of an edge about one, nearest first. */
const sharesAbout = (at: number, low: number, high: number): readonly number[] =>
  Array.from(
    { length: 24 },
    (_, step) => Math.round((at + (step % 2 === 0 ? -1 : 1) * Math.ceil((step + 1) / 2) * 0.05) * 100) / 100,
  ).filter((share) => share >= low && share <= high)

/** Changes of a style that may keep a crossed outline from crossing itself, the smallest of each kind first. */
export function changesFor(piece: PieceId, style: BodiceStyle): readonly StyleChange[] {
  const zone = halfOf(piece)
  const panels = style.panels[zone]
  const end = style.princessEnd[zone]
  const withPanels = (further: typeof panels.further): BodiceStyle => ({
    ...style,
    panels: { ...style.panels, [zone]: { ...panels, further } },
  })
  const ends: readonly StyleChange[] =
    style.top !== null || !panels.princess || end.edge === 'shoulder'
      ? []
      : [
          ...sharesAbout(end.at, end.edge === 'armhole' ? 0.2 : 0.25, end.edge === 'armhole' ? 0.75 : 0.85).map((at) => ({
            style: { ...style, princessEnd: { ...style.princessEnd, [zone]: { ...end, at } } },
            at: `style.princessEnd.${zone}.at`,
            todo: `The nearest share of the ${end.edge} at which the princess seam can end is ${at}.`,
          })),
          {
            style: { ...style, princessEnd: { ...style.princessEnd, [zone]: { edge: 'shoulder', at: end.at } } },
            at: `style.princessEnd.${zone}`,
            todo: 'Let the princess seam end on the shoulder.',
          },
        ]
  const further: readonly StyleChange[] = panels.further
    .map((_, index) => panels.further.slice(0, panels.further.length - 1 - index))
    .map((fewer) => ({
      style: withPanels(fewer.map((seam) => ({ ...seam, at: null, end: null }))),
      at: `style.panels.${zone}`,
      todo: `The most panels that work here are ${fewer.length + 2}.`,
    }))
  const shape: readonly StyleChange[] =
    style.hemShape.form === 'straight'
      ? []
      : [{ style: { ...style, hemShape: { ...style.hemShape, form: 'straight' } }, at: 'style.hemShape', todo: 'A straight hem works.' }]
  return [...ends, ...further, ...shape]
}
