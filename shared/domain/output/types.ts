import type { Path, Point } from '../geometry/types'
import type { Mm } from '../units/brand'

/** What a drawn thing is; screens and prints give each role its own line, never colour alone. */
export type DrawingRole =
  | 'seam-line'
  | 'cutting-line'
  | 'fold'
  | 'notch'
  | 'grain'
  | 'stretch'
  | 'level'
  | 'bone'
  | 'stretch-tick'
  | 'point'
  | 'label'
  | 'label-small'

/** A drawing operation in millimetres on the drafting plane, y up. The board and the print draw the same ones. */
export type DrawingOperation =
  | { readonly kind: 'path'; readonly role: DrawingRole; readonly piece: string | null; readonly path: Path; readonly closed: boolean }
  | {
      readonly kind: 'text'
      readonly role: DrawingRole
      readonly piece: string | null
      readonly at: Point
      readonly text: string
      /** Cap height is about .7 of it. */
      readonly size: Mm
      readonly align: 'start' | 'middle' | 'end'
    }

/** Where a piece lies on the drafting plane: mirrored first if asked, then moved. */
export interface Placement {
  readonly piece: string
  readonly mirrored: boolean
  readonly offset: Point
}
