import type { Path, Point } from '../geometry/types'
import type { Bounds } from './placing'
import type { TextWeight } from './text-width'
import type { DrawingRole } from './types'

/** What a thing drawn on a page is, beside the drawing of the pieces; the print gives each role its line or ink. */
export type SheetRole = 'text' | 'quiet' | 'pale' | 'rule' | 'frame' | 'join' | 'join-mark' | 'map-sheet' | 'map-piece' | 'map-blank'

/** A drawing operation on a page: millimetres from its lower left corner, y up. */
export type SheetOperation =
  | { readonly kind: 'path'; readonly role: SheetRole | DrawingRole; readonly path: Path; readonly closed: boolean }
  | {
      readonly kind: 'text'
      readonly role: SheetRole
      readonly at: Point
      readonly text: string
      readonly size: number
      readonly align: 'start' | 'middle' | 'end'
      readonly weight: TextWeight
    }

/** One page of a print set. */
export interface Sheet {
  readonly kind: 'overview' | 'measure' | 'tile'
  /** Tile name, or what the page is. */
  readonly name: string
  /** Drawn first, under the pieces. */
  readonly under: readonly SheetOperation[]
  /** The part of the drafting plane shown on the page at true scale, its lower left corner at `at`; null on pages of words. */
  readonly drawing: { readonly area: Bounds; readonly at: Point } | null
  readonly operations: readonly SheetOperation[]
}

/** An operation moved on its page, mm. */
export function movedOperation(operation: SheetOperation, dx: number, dy: number): SheetOperation {
  const by = ({ x, y }: Point): Point => ({ x: x + dx, y: y + dy })
  if (operation.kind === 'text') return { ...operation, at: by(operation.at) }
  const path = operation.path.map((segment) =>
    segment.kind === 'line'
      ? { ...segment, from: by(segment.from), to: by(segment.to) }
      : { ...segment, from: by(segment.from), c1: by(segment.c1), c2: by(segment.c2), to: by(segment.to) },
  )
  return { ...operation, path }
}

/** A straight stroke. */
export const stroke = (role: SheetRole | DrawingRole, from: Point, to: Point): SheetOperation => ({
  kind: 'path',
  role,
  path: [{ kind: 'line', from, to }],
  closed: false,
})

/** A closed polygon. */
export const polygon = (role: SheetRole, points: readonly Point[]): SheetOperation => ({
  kind: 'path',
  role,
  path: points.map((from, i) => ({ kind: 'line', from, to: points[(i + 1) % points.length]! })),
  closed: true,
})

/** An upright rectangle. */
export const rectangle = (role: SheetRole, { left, bottom, right, top }: Bounds): SheetOperation =>
  polygon(role, [
    { x: left, y: bottom },
    { x: right, y: bottom },
    { x: right, y: top },
    { x: left, y: top },
  ])

/** A line of text; `at` is its baseline. */
export const words = (
  role: SheetRole,
  at: Point,
  text: string,
  size: number,
  align: 'start' | 'middle' | 'end' = 'start',
  weight: TextWeight = 'regular',
): SheetOperation => ({ kind: 'text', role, at, text, size, align, weight })
