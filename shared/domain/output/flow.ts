import { words } from './sheet'
import type { SheetOperation } from './sheet'
import { textWidth, wrapText } from './text-width'
import type { TextWeight } from './text-width'

/** Line height over text size. */
export const LEADING = 1.45

/** A column of words that grows downwards. Positions mm on the page, y up. */
export interface Flow {
  readonly left: number
  readonly width: number
  /** Upper edge of what comes next. */
  readonly y: number
  readonly operations: readonly SheetOperation[]
}

export interface ParagraphStyle {
  readonly size: number
  readonly weight?: TextWeight
  readonly role?: 'text' | 'quiet'
  /** Left free before the lines, mm. */
  readonly indent?: number
  /** Left free under the paragraph, mm. */
  readonly after?: number
}

/** The flow with a paragraph set under it, wrapped to its width. */
export function paragraph(flow: Flow, text: string, style: ParagraphStyle): Flow {
  const { size, weight = 'regular', role = 'text', indent = 0, after = 0 } = style
  const lines = wrapText(text, size, flow.width - indent, weight)
  const operations = lines.map((line, i) =>
    words(role, { x: flow.left + indent, y: flow.y - size * (1 + i * LEADING) }, line, size, 'start', weight),
  )
  return { ...flow, y: flow.y - lines.length * size * LEADING - after, operations: [...flow.operations, ...operations] }
}

/** A label in quiet ink with its words beside it, the words wrapped in their own column. */
export function entry(flow: Flow, label: string, text: string, size: number, labelWidth: number): Flow {
  const named: Flow = {
    ...flow,
    operations: [...flow.operations, words('quiet', { x: flow.left, y: flow.y - size }, label, size)],
  }
  return paragraph(named, text, { size, indent: labelWidth, after: size * 0.35 })
}

export interface TableColumn {
  /** Share of the flow's width. */
  readonly share: number
  readonly align?: 'start' | 'end'
}

/** A table row: each cell wrapped in its column, the row as high as its highest cell. */
export function tableRow(
  flow: Flow,
  columns: readonly TableColumn[],
  cells: readonly string[],
  size: number,
  weight: TextWeight = 'regular',
): Flow {
  let x = flow.left
  let lines = 1
  const operations: SheetOperation[] = []
  columns.forEach(({ share, align = 'start' }, i) => {
    const width = flow.width * share
    const wrapped = wrapText(cells[i] ?? '', size, width - 3, weight)
    wrapped.forEach((line, n) =>
      operations.push(
        words('text', { x: align === 'start' ? x : x + width - 3, y: flow.y - size * (1 + n * LEADING) }, line, size, align, weight),
      ),
    )
    lines = Math.max(lines, wrapped.length)
    x += width
  })
  return { ...flow, y: flow.y - lines * size * LEADING - size * 0.25, operations: [...flow.operations, ...operations] }
}

/** Largest size up to `size` at which a line fits the width, not under `least`. */
export function fittingSize(text: string, size: number, least: number, width: number, weight: TextWeight): number {
  const needed = textWidth(text, size, weight)
  return needed <= width ? size : Math.max(least, (size * width) / needed)
}
