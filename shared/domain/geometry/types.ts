/** A point on the drafting plane: millimetres, x away from the centre line, y up, waist line at y = 0. */
export interface Point {
  readonly x: number
  readonly y: number
}

export interface LineSegment {
  readonly kind: 'line'
  readonly from: Point
  readonly to: Point
}

export interface CubicSegment {
  readonly kind: 'cubic'
  readonly from: Point
  readonly c1: Point
  readonly c2: Point
  readonly to: Point
}

export type Segment = LineSegment | CubicSegment

/** Consecutive segments, each starting where the one before ended. */
export type Path = readonly Segment[]
