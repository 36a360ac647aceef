import type { Bounds } from '#shared/domain/output/placing'
import type { Point } from '#shared/domain/geometry/types'

/** How the drafting plane (mm, y up) lies on the screen (px, y down): px a mm, and where the plane's origin stands. */
export interface BoardView {
  readonly scale: number
  readonly x: number
  readonly y: number
}

export interface ScreenSize {
  readonly width: number
  readonly height: number
}

/** Smallest and largest scale, px a mm: a room of pieces, and a stitch. */
export const SCALE_LEAST = 0.08
export const SCALE_MOST = 24
/** One press of a zoom key or button. */
export const ZOOM_STEP = 1.25

export const toScreen = (view: BoardView, point: Point): Point => ({ x: view.x + point.x * view.scale, y: view.y - point.y * view.scale })
export const toPlane = (view: BoardView, point: Point): Point => ({
  x: (point.x - view.x) / view.scale,
  y: (view.y - point.y) / view.scale,
})

export const panBy = (view: BoardView, dx: number, dy: number): BoardView => ({ ...view, x: view.x + dx, y: view.y + dy })

const clampScale = (scale: number): number => Math.min(Math.max(scale, SCALE_LEAST), SCALE_MOST)

/** Zoomed by a factor about a place on the screen, which keeps its point of the plane. */
export function zoomAt(view: BoardView, at: Point, factor: number): BoardView {
  const scale = clampScale(view.scale * factor)
  const ratio = scale / view.scale
  return { scale, x: at.x - (at.x - view.x) * ratio, y: at.y - (at.y - view.y) * ratio }
}

/** Two fingers: their middle carries the plane, their distance scales it. */
export function pinchView(view: BoardView, before: readonly [Point, Point], after: readonly [Point, Point]): BoardView {
  const middle = ([a, b]: readonly [Point, Point]): Point => ({ x: (a.x + b.x) / 2, y: (a.y + b.y) / 2 })
  const apart = ([a, b]: readonly [Point, Point]): number => Math.max(Math.hypot(a.x - b.x, a.y - b.y), 1)
  const [from, to] = [middle(before), middle(after)]
  return zoomAt(panBy(view, to.x - from.x, to.y - from.y), to, apart(after) / apart(before))
}

export interface Padding {
  readonly left: number
  readonly right: number
  readonly top: number
  readonly bottom: number
}

/** The whole of some bounds in the middle of the screen, `padding` px clear. */
export function fitView(bounds: Bounds, size: ScreenSize, padding: Padding): BoardView {
  const width = Math.max(bounds.right - bounds.left, 1)
  const height = Math.max(bounds.top - bounds.bottom, 1)
  const free = {
    width: Math.max(size.width - padding.left - padding.right, 40),
    height: Math.max(size.height - padding.top - padding.bottom, 40),
  }
  const scale = clampScale(Math.min(free.width / width, free.height / height))
  return {
    scale,
    x: padding.left + (free.width - width * scale) / 2 - bounds.left * scale,
    y: padding.top + (free.height - height * scale) / 2 + bounds.top * scale,
  }
}

/** Dots of the drafting paper, mm: 25 mm or 1 in, and the coarser steps (x 2, x 4, x 10) where they would run together on the screen. */
export function dotStep(scale: number, unit: 'cm' | 'in', leastPx = 14): number {
  const base = unit === 'in' ? 25.4 : 25
  const step = [1, 2, 4, 10].find((times) => base * times * scale >= leastPx) ?? 20
  return base * step
}

/** A round length for the scale bar, mm, that is at most `mostPx` wide. */
export function scaleBarLength(scale: number, unit: 'cm' | 'in', mostPx = 120): number {
  const lengths = unit === 'in' ? [0.25, 0.5, 1, 2, 4, 8, 16].map((inches) => inches * 25.4) : [1, 2, 5, 10, 20, 50, 100, 200, 500]
  return [...lengths].reverse().find((length) => length * scale <= mostPx) ?? lengths[0]!
}

/** Places on a line pushed apart to keep `least` between neighbours, near where they were, in the order of `places`. */
export function spreadApart(places: readonly number[], least: number): number[] {
  const order = places.map((place, index) => ({ place, index })).sort((a, b) => a.place - b.place)
  let clusters: { members: typeof order; centre: number }[] = []
  const span = (cluster: { members: unknown[] }) => (cluster.members.length - 1) * least
  for (const item of order) {
    let cluster = { members: [item], centre: item.place }
    let last = clusters[clusters.length - 1]
    while (last && last.centre + span(last) / 2 + least > cluster.centre - span(cluster) / 2) {
      const members = [...last.members, ...cluster.members]
      cluster = { members, centre: members.reduce((sum, each) => sum + each.place, 0) / members.length }
      clusters = clusters.slice(0, -1)
      last = clusters[clusters.length - 1]
    }
    clusters = [...clusters, cluster]
  }
  const spread: number[] = new Array(places.length).fill(0)
  for (const cluster of clusters)
    cluster.members.forEach((item, at) => {
      spread[item.index] = cluster.centre - span(cluster) / 2 + at * least
    })
  return spread
}
