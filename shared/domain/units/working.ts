/** The working behind a figure on the screen: opened by whoever asks where the figure comes from. */
export interface Working {
  readonly title: string
  /** In plain symbols, e.g. `P = T / r`. */
  readonly formula: string
  readonly inputs: readonly WorkingInput[]
  readonly result: {
    readonly value: number
    readonly unit: WorkingUnit
    /** Between which the cloth's spread, or a learnt factor's standard error, puts the result; absent where there is none. */
    readonly band?: { readonly low: number; readonly high: number }
  }
  /** Publication, standard or `common practice`; values from memory are marked so. */
  readonly source: string
  /** Limits and the direction of the error, one sentence each. */
  readonly notes: readonly string[]
}

export interface WorkingInput {
  readonly symbol: string
  readonly label: string
  readonly value: number
  readonly unit: WorkingUnit
  /** Where the input comes from: measured, estimated, setting, computed. */
  readonly from: 'measured' | 'estimate' | 'setting' | 'computed' | 'chosen' | 'assumed'
}

/** The screen converts mm, N/m and Pa to the person's units; the rest is shown as it stands. */
export type WorkingUnit = 'mm' | 'N/m' | 'N' | 'Pa' | 'ratio' | 'percent' | 'degree' | 'count' | 'year' | 'none'
