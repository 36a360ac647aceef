import Papa from 'papaparse'
import { machineExtension, machineLoad, machineNumber, recogniseColumns, type TensileColumns } from '../domain/textile/tensile-table'
import { readTensile, type TensileReading } from '../domain/textile/tensile'
import type { Mm } from '../domain/units/brand'
import type { Problem } from '../domain/units/result'

export interface TensileAsk {
  /** A file, its text, or a stream of it. */
  readonly file: File | string | NodeJS.ReadableStream
  /** Encoding of a stream; a file says its own. */
  readonly encoding?: string
  readonly width: Mm
  readonly gauge: Mm
  /** What the person chose where it was not recognised. */
  readonly chosen: Partial<TensileColumns>
}
export type TensileAnswer =
  | { readonly kind: 'read'; readonly reading: TensileReading; readonly columns: TensileColumns }
  | { readonly kind: 'ask'; readonly headings: readonly string[]; readonly columns: TensileColumns }
  | { readonly kind: 'problem'; readonly problem: Problem }

/** Rows looked through for the first that holds figures. */
const HEAD = 60

/** The encoding that the first bytes of a file name: machines write UTF-16 with its mark, or UTF-8. */
export function encodingOf(head: Uint8Array): string {
  if (head[0] === 0xff && head[1] === 0xfe) return 'utf-16le'
  return head[0] === 0xfe && head[1] === 0xff ? 'utf-16be' : 'utf-8'
}

/** Reads a machine's file in chunks, so that it never stands in memory as a whole table. */
export async function readMachineFile({ file, encoding, width, gauge, chosen }: TensileAsk): Promise<TensileAnswer> {
  const isFile = typeof file === 'object' && 'slice' in file
  const read = isFile ? encodingOf(new Uint8Array(await file.slice(0, 2).arrayBuffer())) : encoding
  return new Promise((done) => {
    const head: string[][] = []
    const loads: number[] = []
    const extensions: number[] = []
    let columns: TensileColumns | null = null
    let headings: readonly string[] = []
    let skipped = 0
    const isFigures = (row: readonly string[]) => row.filter((cell) => Number.isFinite(machineNumber(cell))).length >= 2
    const answer = (said: TensileAnswer) => done(said)

    function take(row: readonly string[]) {
      if (!columns) return
      const load = machineLoad(machineNumber(row[columns.load!] ?? ''), columns.loadUnit!)
      const extension = machineExtension(machineNumber(row[columns.extension!] ?? ''), columns.lengthUnit!, gauge)
      if (Number.isFinite(load) && Number.isFinite(extension)) {
        loads.push(load)
        extensions.push(extension)
      } else skipped++
    }
    /** True once the columns stand, or the reading has ended with a question or a problem. */
    function begin(): boolean {
      const first = head.findIndex(isFigures)
      if (first < 0) return false
      const names = first > 0 ? head[first - 1]! : head[first]!.map((_, i) => `column ${i + 1}`)
      const named = recogniseColumns(names)
      const over = first > 1 ? recogniseColumns(head[first - 2]!, names) : named
      const found = named.load !== null || named.extension !== null ? named : over
      headings = found === over && over !== named ? head[first - 2]! : names
      const whole = { ...found, ...chosen }
      if (
        whole.load === null ||
        whole.extension === null ||
        whole.loadUnit === null ||
        whole.lengthUnit === null ||
        whole.load === whole.extension
      ) {
        answer({ kind: 'ask', headings, columns: whole })
        return true
      }
      columns = whole
      for (const row of head.slice(first)) take(row)
      return true
    }

    let asked = false
    Papa.parse<string[]>(file as File, {
      ...(read === undefined ? {} : { encoding: read }),
      skipEmptyLines: 'greedy',
      chunk: (results, parser) => {
        for (const row of results.data) {
          if (columns) take(row)
          else if (!asked) {
            head.push(row)
            if (head.length >= HEAD) asked = begin() && !columns
          }
        }
        if (asked) parser.abort()
        if (!columns && !asked && head.length >= HEAD) parser.abort()
      },
      error: () =>
        answer({
          kind: 'problem',
          problem: { code: 'file-unreadable', message: 'This file cannot be read.', todo: 'Export it again as CSV.' },
        }),
      complete: () => {
        if (!columns && !asked) asked = begin() && !columns
        if (asked) return
        if (!columns) {
          return answer({
            kind: 'problem',
            problem: {
              code: 'no-figures',
              message: 'No rows of figures are found in this file: it is no run of a tensile machine.',
              todo: 'Export load and extension as CSV, a row a reading.',
            },
          })
        }
        if (skipped > loads.length) {
          return answer({
            kind: 'problem',
            problem: {
              code: 'columns-without-figures',
              message: 'Most rows hold no figures in these columns.',
              todo: 'Choose the columns of load and extension.',
            },
          })
        }
        const read = readTensile({ loads, extensions }, { width, gauge })
        answer(read.ok ? { kind: 'read', reading: read.value, columns } : { kind: 'problem', problem: read.problem })
      },
    })
  })
}
