import type { DraftPiece } from '../../shared/domain/draft/types'
import { pathFlatten } from '../../shared/domain/geometry/path'
import type { Point } from '../../shared/domain/geometry/types'
import { boundsOfPoints } from '../../shared/domain/output/placing'
import { cutLines, type PrintFacts } from '../../shared/domain/output/print-words'

/** Curves are written as chords that leave them by no more than this, mm. */
const CHORD = 0.005
const SPACING = 40
const TEXT_SIZE = 6

/** Layers by the convention, from memory where the standard could not be read: see `patternDxf`. */
const LAYER = {
  boundary: '1',
  turn: '2',
  curve: '3',
  notch: '4',
  fold: '6',
  grain: '7',
  internal: '8',
  seam: '14',
  text: '15',
} as const

type Group = readonly [code: number, value: string | number]

const real = (value: number) => (Math.abs(value) < 5e-7 ? '0.0' : value.toFixed(6))
const write = (groups: readonly Group[]): string =>
  groups.map(([code, value]) => `${code}\r\n${typeof value === 'number' && !INTEGERS.has(code) ? real(value) : value}\r\n`).join('')
/** Group codes that hold whole numbers. */
const INTEGERS = new Set([62, 66, 70, 71, 72, 73])

/** Signs outside of ASCII are written as the format's own escapes. */
const text = (value: string) =>
  [...value.replaceAll(/[\r\n]+/g, ' ')]
    .map((sign) => (sign.codePointAt(0)! < 127 ? sign : `\\U+${sign.codePointAt(0)!.toString(16).toUpperCase().padStart(4, '0')}`))
    .join('')

const blockName = (piece: DraftPiece) => piece.id.toUpperCase()

const at = ({ x, y }: Point): Group[] => [
  [10, x],
  [20, y],
  [30, 0],
]
function polyline(layer: string, points: readonly Point[], closed: boolean): Group[] {
  return [
    [0, 'POLYLINE'],
    [8, layer],
    [66, 1],
    ...at({ x: 0, y: 0 }),
    [70, closed ? 1 : 0],
    ...points.flatMap((point): Group[] => [[0, 'VERTEX'], [8, layer], ...at(point)]),
    [0, 'SEQEND'],
    [8, layer],
  ]
}
const point = (layer: string, place: Point): Group[] => [[0, 'POINT'], [8, layer], ...at(place)]
const line = (layer: string, from: Point, to: Point): Group[] => [[0, 'LINE'], [8, layer], ...at(from), [11, to.x], [21, to.y], [31, 0]]
const words = (place: Point, value: string): Group[] => [[0, 'TEXT'], [8, LAYER.text], ...at(place), [40, TEXT_SIZE], [1, text(value)]]

/** The seam line once round without a point twice, each point as a corner of the outline or one of its curves. */
function seamPoints(piece: DraftPiece): readonly { readonly at: Point; readonly corner: boolean }[] {
  return piece.edges.flatMap((edge) =>
    pathFlatten(edge.path, CHORD)
      .slice(0, -1)
      .map((place, index) => ({ at: place, corner: index === 0 })),
  )
}

function blockOf(piece: DraftPiece, facts: PrintFacts): Group[] {
  const seam = seamPoints(piece)
  const bounds = boundsOfPoints(piece.cuttingLine)
  const lines = [
    `PIECE NAME: ${piece.name}`,
    `QUANTITY: ${piece.quantity}${piece.onFold ? ' ON FOLD' : ''}`,
    'SIZE: MADE TO MEASURE',
    ...cutLines(piece, facts).map((one) => `CUT: ${one}`),
  ]
  return [
    [0, 'BLOCK'],
    [8, '0'],
    [2, blockName(piece)],
    [70, 0],
    ...at({ x: 0, y: 0 }),
    [3, blockName(piece)],
    ...polyline(LAYER.boundary, piece.cuttingLine, true),
    ...polyline(
      LAYER.seam,
      seam.map(({ at: place }) => place),
      true,
    ),
    ...seam.flatMap(({ at: place, corner }) => point(corner ? LAYER.turn : LAYER.curve, place)),
    ...piece.edges.flatMap((edge) => edge.notches.flatMap((notch) => point(LAYER.notch, notch.at))),
    ...piece.edges.filter((edge) => edge.kind === 'fold').flatMap((edge) => line(LAYER.fold, edge.nodes[0]!.at, edge.nodes.at(-1)!.at)),
    ...line(LAYER.grain, piece.grain.from, piece.grain.to),
    ...line(LAYER.internal, piece.stretch.from, piece.stretch.to),
    ...piece.levels.flatMap(({ from, to }) => line(LAYER.internal, from, to)),
    ...(facts.bones ?? [])
      .filter((bone) => bone.piece === piece.id)
      .flatMap((bone) => polyline(LAYER.internal, pathFlatten(bone.path, CHORD), false)),
    ...lines.flatMap((one, index) => words({ x: bounds.left + 5, y: piece.labelAt.y - index * TEXT_SIZE * 1.5 }, one)),
    [0, 'ENDBLK'],
    [8, '0'],
  ]
}

/**
 * A pattern as DXF after the conventions of ASTM D6673 (withdrawn 2019 without replacement): one block a piece, layers by number, metric
 * units, a style text in the drawing. Written in the older text form of the format (AC1009), which readers of later ones take as well.
 * Curves become chords (.005 mm). The same input gives the same bytes.
 */
export function patternDxf(pieces: readonly DraftPiece[], facts: PrintFacts): string {
  const placed = pieces.map((piece) => ({ piece, bounds: boundsOfPoints(piece.cuttingLine) }))
  let x = 0
  const inserts = placed.flatMap(({ piece, bounds }): Group[] => {
    const offset = x - bounds.left
    x += bounds.right - bounds.left + SPACING
    return [[0, 'INSERT'], [8, '0'], [2, blockName(piece)], ...at({ x: offset, y: 0 })]
  })
  const low = Math.min(0, ...placed.map(({ bounds }) => bounds.bottom)) - SPACING
  const style = [
    'ASTM/D6673 CONVENTIONS (WITHDRAWN 2019)',
    `STYLE NAME: ${facts.garmentCode} ${facts.version}`,
    `CREATION DATE: ${facts.printedOn}`,
    'AUTHOR: Tenterframe',
    'UNITS: METRIC',
  ]
  return write([
    [0, 'SECTION'],
    [2, 'HEADER'],
    [9, '$ACADVER'],
    [1, 'AC1009'],
    [9, '$INSUNITS'],
    [70, 4],
    [0, 'ENDSEC'],
    [0, 'SECTION'],
    [2, 'TABLES'],
    [0, 'TABLE'],
    [2, 'LAYER'],
    [70, Object.keys(LAYER).length + 1],
    ...['0', ...Object.values(LAYER)].flatMap((layer): Group[] => [
      [0, 'LAYER'],
      [2, layer],
      [70, 0],
      [62, 7],
      [6, 'CONTINUOUS'],
    ]),
    [0, 'ENDTAB'],
    [0, 'ENDSEC'],
    [0, 'SECTION'],
    [2, 'BLOCKS'],
    ...pieces.flatMap((piece) => blockOf(piece, facts)),
    [0, 'ENDSEC'],
    [0, 'SECTION'],
    [2, 'ENTITIES'],
    ...inserts,
    ...style.flatMap((one, index) => words({ x: 0, y: low - index * TEXT_SIZE * 1.5 }, one)),
    [0, 'ENDSEC'],
    [0, 'EOF'],
  ])
}
