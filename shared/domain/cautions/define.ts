import type { Caution, CautionPlace, Severity } from './types'

/** A figure or a limit of a caution. */
export type CautionFigure = NonNullable<Caution['figure']>

/** What the registry holds of one code. `F` is what a caution of the code has to be told. */
export interface CautionEntry<F> {
  readonly severity: Severity | ((facts: F) => Severity)
  /** For owner and drafter: one plain sentence. */
  readonly message: (facts: F) => string
  /** For makers: never a condition, a name or a body girth. */
  readonly maker: string | ((facts: F) => string)
  readonly figure?: (facts: F) => CautionFigure | null
  readonly limit?: (facts: F) => CautionFigure | null
  readonly source: string
  readonly todo: string | ((facts: F) => string)
  /** False: nobody may clear it when it is a stop. Default true. */
  readonly clearable?: boolean
  /** True: its figure and limit speak of the wearer's body or health, and makers never see them. */
  readonly private?: boolean
}

/** Builds the cautions of one code. */
export interface CautionMaker<F> {
  (place: CautionPlace, facts: F): Caution
  readonly code: string
  readonly source: string
  readonly clearable: boolean
  readonly private: boolean
}

const told = <F, V extends string>(value: V | ((facts: F) => V), facts: F): V => (typeof value === 'function' ? value(facts) : value)

/** One code of the registry, and the only way to build a caution of it. */
export function defineCaution<F>(code: string, entry: CautionEntry<F>): CautionMaker<F> {
  const clearable = entry.clearable ?? true
  const make = (place: CautionPlace, facts: F): Caution => ({
    code,
    severity: told(entry.severity, facts),
    place,
    message: entry.message(facts),
    makerMessage: told(entry.maker, facts),
    figure: entry.figure?.(facts) ?? null,
    limit: entry.limit?.(facts) ?? null,
    source: entry.source,
    todo: told(entry.todo, facts),
    clearable,
  })
  return Object.assign(make, { code, source: entry.source, clearable, private: entry.private ?? false })
}
