import { eachFigures } from './test'
import type { StretchFigures, StretchTest } from './types'

/** One figure over the specimens of a test, in the figure's own unit. */
export interface Repeat {
  readonly mean: number
  /** Standard deviation over the specimens (n - 1); null with one. */
  readonly deviation: number | null
  readonly least: number
  readonly most: number
  readonly count: number
}

/** What the specimens of a test say together: null where none was read. */
export type Repeats = { readonly [Figure in keyof StretchFigures]: Repeat | null }

function repeatOf(values: readonly number[]): Repeat | null {
  if (values.length === 0) return null
  const mean = values.reduce((sum, value) => sum + value, 0) / values.length
  const squares = values.reduce((sum, value) => sum + (value - mean) ** 2, 0)
  return {
    mean,
    deviation: values.length > 1 ? Math.sqrt(squares / (values.length - 1)) : null,
    least: Math.min(...values),
    most: Math.max(...values),
    count: values.length,
  }
}

/** Mean and spread of stretch, growth, recovery and tension over the specimens, at the test load. A label has none. */
export function testRepeats(test: StretchTest): Repeats {
  const each = test.kind === 'label' ? [] : eachFigures(test.specimens).flatMap((one) => one ?? [])
  const of = (figure: keyof StretchFigures) => repeatOf(each.flatMap((one) => one[figure] ?? []))
  return { stretch: of('stretch'), growth: of('growth'), recovery: of('recovery'), testTension: of('testTension') }
}
