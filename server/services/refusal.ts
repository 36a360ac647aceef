import type { ProblemDetails, ProblemSlug } from '../../shared/types/problem-details'

export type RefusalDetails = Pick<ProblemDetails, 'detail' | 'fields' | 'theirs' | 'problem' | 'ask' | 'retryAfterSeconds'>

/** A use case says no. It leaves as problem details. */
export class Refusal extends Error {
  constructor(
    readonly slug: ProblemSlug,
    readonly details: RefusalDetails = {},
  ) {
    super(details.detail ?? slug)
    this.name = 'Refusal'
  }
}

export function refuse(slug: ProblemSlug, details: RefusalDetails = {}): never {
  throw new Refusal(slug, details)
}

/** For rows that a check before has found. */
export function found<T>(row: T | undefined): T {
  return row === undefined ? refuse('not-found') : row
}

/** A unique key of PostgreSQL said no. */
export const isTaken = (error: unknown): boolean => error instanceof Error && 'code' in error && error.code === '23505'
