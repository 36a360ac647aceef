import type { Problem } from '../units/result'
import { LEVELS } from './draft-levels'
import type { Frame } from './frame'
import { panelCount, seamLines } from './panels'
import type { Zone } from './panels'
import { millimetres } from './say'
import type { BodiceStyle } from './types'
import { wedgesOf } from './wedges'

/** A further seam's panel is at least this wide at the bust, and at every other level, mm. */
const LEAST_PANEL = 25
const LEAST_PANEL_ELSEWHERE = 10

/** Panels of a half with further seams, at the level where they are narrowest. */
export function panelProblem(frame: Frame, style: BodiceStyle, zone: Zone): Problem | null {
  const panels = style.panels[zone]
  if (panels.further.length === 0) return null
  const half = frame[zone]
  const wedges = wedgesOf(frame, style)
  const room = (
    own: typeof panels,
    ownStyle: BodiceStyle,
  ): { readonly least: number; readonly level: (typeof LEVELS)[number]; readonly limit: number } => {
    const lines = seamLines(half, own)
    const used = ownStyle === style ? wedges : wedgesOf(frame, ownStyle)
    let worst: { least: number; level: (typeof LEVELS)[number]; limit: number } = { least: Infinity, level: 'bust', limit: LEAST_PANEL }
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
