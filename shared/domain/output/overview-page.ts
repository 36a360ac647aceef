import type { DraftPiece } from '../draft/types'
import type { Point } from '../geometry/types'
import { formatLength } from '../units/format'
import { mm } from '../units/brand'
import { entry, fittingSize, paragraph, tableRow } from './flow'
import type { Flow, TableColumn } from './flow'
import { ACTUAL_SIZE, allowanceState, cutLines, layersOf, SAFETY_LINE } from './print-words'
import type { PrintedLines, PrintFacts } from './print-words'
import { isRoll } from './paper'
import { correctionWords } from './printer-correction'
import { polygon, rectangle, stroke, words } from './sheet'
import type { Sheet, SheetOperation } from './sheet'
import type { TilePlan } from './tiles'
import type { DrawingRole } from './types'

const BODY = 3.2
const SECTION = 4.2

export interface OverviewInput {
  /** Which outlines are drawn. */
  readonly lines: PrintedLines
  readonly plan: TilePlan
  readonly facts: PrintFacts
  readonly pieces: readonly DraftPiece[]
  /** Cutting lines on the drafting plane, for the tile map. */
  readonly outlines: readonly (readonly Point[])[]
}

/** The first pages of a print set: what it is, the tile map, how to print and tape, what to cut, what to mind. */
export function overviewPages(input: OverviewInput): readonly Sheet[] {
  const { plan } = input
  const [left, right, top, bottom] = [plan.margin, plan.page.width - plan.margin, plan.page.height - plan.margin, plan.margin]
  const fresh: Flow = { left, width: right - left, y: top, operations: [] }
  const pages: Flow[] = []
  let flow = headPart(fresh, input)
  for (const section of [...cautionParts(input), ...cuttingParts(input), ...boneParts(input), linesPart(input)]) {
    const next = section(flow)
    if (next.y >= bottom) flow = next
    else {
      pages.push(flow)
      flow = section(fresh)
    }
  }
  pages.push(flow)
  return pages.map((page, i) => ({
    kind: 'overview',
    name: i === 0 ? 'Overview' : `Overview ${i + 1}`,
    under: [],
    drawing: null,
    operations: page.operations,
  }))
}

function heading(flow: Flow, text: string): Flow {
  const y = flow.y - 3.5
  const ruled: Flow = {
    ...flow,
    y: y - 1.5,
    operations: [...flow.operations, stroke('rule', { x: flow.left, y }, { x: flow.left + flow.width, y })],
  }
  return paragraph(ruled, text, { size: SECTION, weight: 'semibold', after: 0.8 })
}

function headPart(flow: Flow, { plan, facts, pieces, outlines, lines }: OverviewInput): Flow {
  const title = `${facts.garmentCode} · ${facts.version}`
  const size = fittingSize(title, 8.5, 4, flow.width, 'semibold')
  let head = paragraph(flow, title, { size, weight: 'semibold' })
  head = paragraph(head, `Pattern print, ${facts.printedOn}`, { size: BODY * 1.1, role: 'quiet', after: 3 })
  const column = flow.width * 0.5
  let left: Flow = { ...head, width: column - 6 }
  const label = 25
  const { paper, orientation, tiles, rows, columns, margin, overlap, blank } = plan
  const leftOut = blank.length > 0 ? `; ${blank.join(', ')} blank, left out` : ''
  const length = (value: number) => formatLength(mm(value), facts.unit)
  const rules: readonly (readonly [string, string])[] = [
    [
      'Paper',
      isRoll(paper.id)
        ? `${paper.name}; margins ${length(margin)}`
        : `${paper.name}, ${orientation === 'portrait' ? 'upright' : 'lying'}; margins ${length(margin)}, ${overlap === 0 ? 'edges butt' : `overlap ${length(overlap)}`}`,
    ],
    ['Tiles', `${tiles.length} in ${rows} ${rows === 1 ? 'row' : 'rows'} of ${columns}${leftOut}`],
    [
      'Scale',
      `true size${facts.printer ? `, ${correctionWords(facts.printer)}` : ''}; units ${facts.unit === 'cm' ? 'centimetres' : 'inches'}`,
    ],
    ['Allowance', allowanceState(pieces, facts.unit, lines)],
  ]
  for (const [name, text] of rules) left = entry(left, name, text, BODY, label)
  left = { ...left, y: left.y - 2 }
  left = paragraph(left, 'Print', { size: SECTION, weight: 'semibold', after: 0.8 })
  left = paragraph(left, `${ACTUAL_SIZE} Print the page with the squares first and measure it.`, { size: BODY, after: 1.5 })
  if (tiles.length > 1) {
    left = paragraph(left, 'Tape', { size: SECTION, weight: 'semibold', after: 0.8 })
    const taping = `Go row by row from the top, each row from left to right: ${tapingOrder(plan)}. Cut each tile along its join lines at the left and above, lay it on the neighbour named there until the crosses meet, and tape. Then join the rows.`
    left = paragraph(left, taping, { size: BODY })
  }
  const map = tileMap(plan, outlines, {
    left: flow.left + column,
    top: head.y,
    width: flow.width - column,
    height: Math.max(70, head.y - left.y),
  })
  return { ...head, y: Math.min(left.y, map.y) - 1, operations: [...left.operations, ...map.operations] }
}

/** `A1 to A4, B1 to B4`: runs of tiles that are printed next to each other. */
function tapingOrder({ tiles }: TilePlan): string {
  const runs: { first: string; last: string; row: number; column: number; length: number }[] = []
  for (const { name, row, column } of tiles) {
    const run = runs[runs.length - 1]
    if (run && run.row === row && run.column === column - 1) Object.assign(run, { last: name, column, length: run.length + 1 })
    else runs.push({ first: name, last: name, row, column, length: 1 })
  }
  return runs
    .map(({ first, last, length }) => (length === 1 ? first : length === 2 ? `${first}, ${last}` : `${first} to ${last}`))
    .join('; ')
}

function tileMap(
  plan: TilePlan,
  outlines: readonly (readonly Point[])[],
  box: { left: number; top: number; width: number; height: number },
): { y: number; operations: readonly SheetOperation[] } {
  const { whole } = plan
  const scale = Math.min(box.width / (whole.right - whole.left), box.height / (whole.top - whole.bottom))
  const left = box.left + box.width - (whole.right - whole.left) * scale
  const place = ({ x, y }: Point): Point => ({ x: left + (x - whole.left) * scale, y: box.top - (whole.top - y) * scale })
  const operations: SheetOperation[] = outlines.map((outline) => polygon('map-piece', outline.map(place)))
  for (const { cell, name } of plan.tiles) {
    const [low, high] = [place({ x: cell.left, y: cell.bottom }), place({ x: cell.right, y: cell.top })]
    operations.push(rectangle('map-sheet', { left: low.x, bottom: low.y, right: high.x, top: high.y }))
    operations.push(words('text', { x: low.x + 1.4, y: high.y - 4 }, name, 3.4, 'start', 'semibold'))
  }
  return { y: box.top - (whole.top - whole.bottom) * scale, operations }
}

type Part = (flow: Flow) => Flow

function cuttingParts({ facts, pieces }: OverviewInput): Part[] {
  const columns: readonly TableColumn[] = [{ share: 0.16 }, { share: 0.34 }, { share: 0.5 }]
  const rows = pieces.map((piece): Part => (flow) => {
    const cloths = layersOf(piece, facts)
      .filter((layer) => layer.count > 0)
      .map((layer) => `${layer.label.toLowerCase()}: ${layer.cloth}`)
    return tableRow(flow, columns, [piece.name, cutLines(piece, facts).join(', '), cloths.join('; ')], BODY)
  })
  const [first, ...others] = rows
  const pieceParts: Part[] = first
    ? [(flow) => first(tableRow(heading(flow, 'Pieces'), columns, ['Piece', 'Cut', 'Cloth'], BODY, 'semibold')), ...others]
    : []
  const rings: readonly TableColumn[] = [{ share: 0.2 }, { share: 0.12, align: 'end' }, { share: 0.68 }]
  const ringPart: Part = (flow) =>
    facts.rings.reduce(
      (sofar, ring) => tableRow(sofar, rings, [ring.name, formatLength(ring.cut, facts.unit), ring.hold], BODY),
      tableRow(heading(flow, 'Cut girths, cloth and rigid parts without the gap'), rings, ['Level', 'Cut', 'Hold'], BODY, 'semibold'),
    )
  return facts.rings.length > 0 ? [...pieceParts, ringPart] : pieceParts
}

/** Bones to cut, the same ones together. What is said of cutting them is common practice. */
function boneParts({ facts, pieces }: OverviewInput): Part[] {
  const bones = (facts.bones ?? []).filter((bone) => pieces.some((piece) => piece.id === bone.piece))
  if (bones.length === 0) return []
  const columns: readonly TableColumn[] = [
    { share: 0.34 },
    { share: 0.3 },
    { share: 0.12, align: 'end' },
    { share: 0.12, align: 'end' },
    { share: 0.12, align: 'end' },
  ]
  const length = (value: number) => formatLength(mm(value), facts.unit)
  const rows = bones.map(
    (bone): Part =>
      (flow) =>
        tableRow(flow, columns, [bone.name, bone.stock.name, `${bone.count} ×`, length(bone.cut), length(bone.channel)], BODY),
  )
  const [first, ...others] = rows
  const note: Part = (flow) =>
    paragraph(flow, 'Insert each bone, mark it, then cut and cap it: the channel grows as the bone goes in.', { size: BODY })
  return [
    (flow) => first!(tableRow(heading(flow, 'Bones'), columns, ['Bone', 'Stock', 'Cut', 'Length', 'Channel'], BODY, 'semibold')),
    ...others,
    note,
  ]
}

function cautionParts({ facts }: OverviewInput): Part[] {
  const sentence =
    (severity: string, text: string): Part =>
    (flow) =>
      entry(flow, severity, text, BODY, 18)
  const [first, ...others] = facts.cautions.map((caution) => sentence(caution.severity, caution.makerMessage))
  const safety: Part = (flow) => paragraph(flow, SAFETY_LINE, { size: BODY, after: 0 })
  if (!first) return [(flow) => safety(paragraph(heading(flow, 'To mind'), 'No open cautions.', { size: BODY, after: 0.8 }))]
  return [(flow) => first(heading(flow, 'To mind')), ...others, safety]
}

const lineSamples: readonly (readonly [DrawingRole, string])[] = [
  ['cutting-line', 'cutting line'],
  ['seam-line', 'seam line'],
  ['fold', 'fold'],
  ['level', 'level line'],
  ['bone', 'bone channel'],
  ['grain', 'grain line'],
  ['stretch', 'greatest stretch'],
  ['notch', 'notch: one front, two back'],
  ['stretch-tick', 'stretch ticks, as worn'],
]

const linesPart =
  ({ lines, facts }: OverviewInput): Part =>
  (flow) => {
    const samples = lineSamples.filter(
      ([role]) =>
        (role !== 'cutting-line' || lines !== 'seam') &&
        (role !== 'seam-line' || lines !== 'cutting') &&
        (role !== 'stretch-tick' || facts.strains) &&
        (role !== 'bone' || (facts.bones ?? []).length > 0),
    )
    const titled = heading(flow, 'Lines')
    const perRow = Math.max(1, Math.floor(flow.width / 62))
    const operations = samples.flatMap(([role, text], i): SheetOperation[] => {
      const x = flow.left + (i % perRow) * (flow.width / perRow)
      const y = titled.y - 2.6 - Math.floor(i / perRow) * 5.6
      return [...lineSample(role, x, y), words('text', { x: x + 22, y: y - 1.1 }, text, BODY)]
    })
    return { ...titled, y: titled.y - Math.ceil(samples.length / perRow) * 5.6, operations: [...titled.operations, ...operations] }
  }

const SAMPLE = 18

function lineSample(role: DrawingRole, x: number, y: number): SheetOperation[] {
  if (role === 'notch')
    return [0, 1, 2].map((i) => stroke('notch', { x: x + [4, 11, 14][i]!, y: y - 1.8 }, { x: x + [4, 11, 14][i]!, y: y + 1.8 }))
  if (role === 'stretch-tick') return [1, 5, 9, 13, 17].map((at) => stroke(role, { x: x + at, y: y - 1.5 }, { x: x + at, y: y + 1.5 }))
  const ends = { from: { x, y }, to: { x: x + SAMPLE, y } }
  const line = stroke(role, ends.from, ends.to)
  if (role !== 'grain' && role !== 'stretch') return [line]
  const heads = [0, SAMPLE].flatMap((at) => {
    const inward = at === 0 ? 2.4 : -2.4
    return [1, -1].map((side) => stroke(role, { x: x + at + inward, y: y + side }, { x: x + at, y }))
  })
  const pull =
    role === 'stretch'
      ? [2.5, 4.5, 6.5].map((at) => stroke(role, { x: x + SAMPLE / 2 + at, y: y - 1.2 }, { x: x + SAMPLE / 2 + at, y: y + 1.2 }))
      : []
  return [line, ...heads, ...pull]
}
