/** Expected failure as a value. A throw is a programmer's error. */
export type Result<T, P = Problem> = { readonly ok: true; readonly value: T } | { readonly ok: false; readonly problem: P }

/** Why something could not be computed, in words a drafter can act on. */
export interface Problem {
  /** Stable slug, kebab-case. */
  readonly code: string
  /** One plain sentence: what is wrong and where. */
  readonly message: string
  /** What to do next, or the nearest value that works. */
  readonly todo?: string
  /** Ring, piece, field or row it belongs to. */
  readonly at?: string
}

export const succeed = <T>(value: T): { readonly ok: true; readonly value: T } => ({ ok: true, value })
export const fail = <P = Problem>(problem: P): { readonly ok: false; readonly problem: P } => ({ ok: false, problem })
