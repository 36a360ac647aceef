import { halfOf } from './roles'
import type { BodiceStyle, PieceId } from './types'

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
