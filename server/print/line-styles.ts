import type { SheetRole } from '../../shared/domain/output/sheet'
import type { DrawingRole } from '../../shared/domain/output/types'

/** How a role is printed: width and dashes in mm, grey from 0 (black) to 1. Told apart by line, never by colour. */
export interface LineStyle {
  readonly width: number
  readonly grey: number
  readonly dash?: readonly number[]
  readonly fill?: number
}

export const LINE_STYLES: Readonly<Record<DrawingRole | SheetRole, LineStyle>> = {
  'cutting-line': { width: 0.4, grey: 0 },
  'seam-line': { width: 0.25, grey: 0, dash: [4, 2] },
  fold: { width: 0.4, grey: 0, dash: [9, 2, 1.5, 2] },
  notch: { width: 0.4, grey: 0 },
  grain: { width: 0.3, grey: 0 },
  stretch: { width: 0.3, grey: 0 },
  level: { width: 0.2, grey: 0.35, dash: [0.6, 1.6] },
  bone: { width: 0.2, grey: 0.2, fill: 0.86 },
  'stretch-tick': { width: 0.15, grey: 0.5 },
  point: { width: 0.2, grey: 0 },
  label: { width: 0.25, grey: 0 },
  'label-small': { width: 0.25, grey: 0.15 },
  text: { width: 0.25, grey: 0 },
  quiet: { width: 0.25, grey: 0.38 },
  pale: { width: 0.25, grey: 0.85 },
  rule: { width: 0.2, grey: 0.55 },
  frame: { width: 0.25, grey: 0 },
  join: { width: 0.2, grey: 0.45, dash: [2, 2] },
  'join-mark': { width: 0.25, grey: 0.2 },
  'map-sheet': { width: 0.2, grey: 0.4 },
  'map-piece': { width: 0.25, grey: 0.3, fill: 0.92 },
  'map-blank': { width: 0.2, grey: 0.8 },
}
