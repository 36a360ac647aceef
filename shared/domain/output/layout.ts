import { BLOCKS, blockOf, isRight } from '../draft/roles'
import type { DraftPiece } from '../draft/types'
import { insideAtHeight } from './crossings'
import { boundsOfPoints, placePoint } from './placing'
import type { Placement } from './types'

/** Where a piece lies from the centre front round to the centre back; pieces of one part keep the order of the draft, a right half comes last. */
const wearingPlace = (piece: DraftPiece): number => BLOCKS.indexOf(blockOf(piece.id)) + (isRight(piece.id) ? BLOCKS.length : 0)

/** Height between the level lines on which two cutting lines are compared when pieces are pushed together, mm. */
const ROW = 2

/** Back pieces are drawn with the centre on the other side; those of a right half that differs lie the other way round again. */
export const isMirrored = (piece: Pick<DraftPiece, 'id' | 'zone'>): boolean => (piece.zone === 'back') !== isRight(piece.id)
const upright = (piece: DraftPiece): Placement => ({ piece: piece.id, mirrored: isMirrored(piece), offset: { x: 0, y: 0 } })

/**
 * Where the pieces lie on the drafting plane, from the left edge x = 0. Back pieces are mirrored so that the centre back
 * lies at the right. `wearing`: in wearing order, waist lines at y = 0, `spacing` mm between their bounding rectangles.
 * `packed`: pushed together until their cutting lines keep `spacing` mm (to 2 mm), in rows no wider than `width`, the
 * first row on top; grain lines stay upright. A piece wider than `width` has a row of its own.
 */
export function layoutPieces(pieces: readonly DraftPiece[], mode: 'wearing' | 'packed', spacing: number, width = Infinity): Placement[] {
  const ordered = [...pieces].sort((a, b) => wearingPlace(a) - wearingPlace(b))
  return mode === 'wearing' ? wearing(ordered, spacing) : packed(ordered, spacing, width)
}

function wearing(pieces: readonly DraftPiece[], spacing: number): Placement[] {
  let x = 0
  return pieces.map((piece) => {
    const placement = upright(piece)
    const bounds = boundsOfPoints(piece.cuttingLine.map((point) => placePoint(point, placement)))
    const offset = { x: x - bounds.left, y: 0 }
    x += bounds.right - bounds.left + spacing
    return { ...placement, offset }
  })
}

interface Profile {
  readonly bottom: number
  readonly left: readonly number[]
  readonly right: readonly number[]
}

/** Leftmost and rightmost x of a piece in rows of 2 mm from its bottom, each row reaching `reach` mm up and down. */
function profile(piece: DraftPiece, reach: number): Profile {
  const outline = piece.cuttingLine.map((point) => placePoint(point, upright(piece)))
  const { bottom, top } = boundsOfPoints(outline)
  const rows = Math.max(1, Math.ceil((top - bottom) / ROW))
  const extents = Array.from({ length: rows }, () => ({ left: Infinity, right: -Infinity }))
  const widen = (row: number, x: number) => {
    const extent = extents[Math.min(rows - 1, Math.max(0, row))]!
    extent.left = Math.min(extent.left, x)
    extent.right = Math.max(extent.right, x)
  }
  extents.forEach((_, row) => {
    for (const [left, right] of insideAtHeight(outline, bottom + (row + 0.5) * ROW)) {
      widen(row, left)
      widen(row, right)
    }
  })
  for (const { x, y } of outline) widen(Math.floor((y - bottom) / ROW), x)
  const reachRows = Math.ceil(reach / ROW)
  const around = (row: number) => extents.slice(Math.max(0, row - reachRows), row + reachRows + 1)
  return {
    bottom,
    left: extents.map((_, row) => Math.min(...around(row).map((extent) => extent.left))),
    right: extents.map((_, row) => Math.max(...around(row).map((extent) => extent.right))),
  }
}

function packed(pieces: readonly DraftPiece[], spacing: number, width: number): Placement[] {
  const placed: Placement[] = []
  let top = 0
  let row: { piece: DraftPiece; profile: Profile; x: number }[] = []
  const close = () => {
    if (row.length === 0) return
    const highest = Math.max(...row.map(({ piece }) => boundsOfPoints(piece.cuttingLine).top))
    const lowest = Math.min(...row.map(({ piece }) => boundsOfPoints(piece.cuttingLine).bottom))
    for (const { piece, x } of row) placed.push({ ...upright(piece), offset: { x, y: top - highest } })
    top -= highest - lowest + spacing
    row = []
  }
  for (const piece of pieces) {
    const outline = piece.cuttingLine.map((point) => placePoint(point, upright(piece)))
    const bounds = boundsOfPoints(outline)
    const own = profile(piece, spacing / 2)
    let x = xBeside(row, own, spacing, bounds.left)
    if (row.length > 0 && x + bounds.right > width) {
      close()
      x = -bounds.left
    }
    row.push({ piece, profile: own, x })
  }
  close()
  return placed
}

function xBeside(row: readonly { profile: Profile; x: number }[], own: Profile, spacing: number, left: number): number {
  let x = -left
  for (const { profile: other, x: otherX } of row) {
    const shift = Math.round((own.bottom - other.bottom) / ROW)
    own.left.forEach((ownLeft, i) => {
      const right = other.right[i + shift]
      if (right !== undefined && Number.isFinite(right) && Number.isFinite(ownLeft)) x = Math.max(x, otherX + right + spacing - ownLeft)
    })
  }
  return x
}
