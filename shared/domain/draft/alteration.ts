import type { LevelId } from '../body/types'
import type { Mm } from '../units/brand'
import type { EdgeId, PieceId, PointRole } from './types'

interface Named {
  readonly id: string
  readonly name: string
  readonly on: boolean
}

/** A move of one point or handle, mm in the piece's frame. */
export interface MoveAlteration extends Named {
  readonly kind: 'move'
  readonly role: PointRole
  readonly dx: Mm
  readonly dy: Mm
  /** Carry to the mate: the same amount outwards and along the seam there. */
  readonly carry: boolean
}

/** A seam by one of its two edges; a centre seam by its own. */
export interface SeamRole {
  readonly piece: PieceId
  readonly edge: EdgeId
}

/** Let out (above 0) or take in at one level, shared evenly over the seams chosen and over both edges of each. */
export interface GirthAlteration extends Named {
  readonly kind: 'girth'
  readonly level: LevelId
  /** Whole girth, mm, both halves of the body together. */
  readonly amount: Mm
  readonly seams: readonly SeamRole[]
}

/** Lengthen (above 0) or shorten all pieces alike between a level and the next one below it. */
export interface LengthAlteration extends Named {
  readonly kind: 'length'
  readonly below: LevelId
  readonly by: Mm
}

/** A named operation on roles, which survives a redraft from another body, plan or size. */
export type Alteration = MoveAlteration | GirthAlteration | LengthAlteration
