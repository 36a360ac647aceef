/**
 * Every way in which the API refuses. `type` of a problem is `/problems/<slug>` (RFC 9457, section 3.1.1); screens and
 * tests key on the slug.
 */
export const problems = {
  'invalid-input': { status: 422, title: 'Something in the form needs another look.' },
  'not-signed-in': { status: 401, title: 'Sign in first.' },
  'sign-in-refused': { status: 401, title: 'E-mail address or password does not fit.' },
  'too-many-attempts': { status: 429, title: 'Too many attempts. Wait a little, then try again.' },
  'wrong-origin': { status: 403, title: 'This request came from another site.' },
  'not-allowed': { status: 403, title: 'Your role does not include this.' },
  'not-cleared': { status: 403, title: 'This is not cleared for cutting yet.' },
  'not-found': { status: 404, title: 'There is no such thing in this workroom.' },
  'method-not-allowed': { status: 405, title: 'This address does not take that method.' },
  stale: { status: 409, title: 'Somebody saved this meanwhile.' },
  'code-taken': { status: 409, title: 'This code is already in use.' },
  'no-photo': { status: 409, title: 'There is no photograph on this test.' },
  archived: { status: 409, title: 'This is archived.' },
  'already-cleared': { status: 409, title: 'This version is cleared already.' },
  'stop-stands': { status: 409, title: 'A stop stands on this version.' },
  'stop-barred': { status: 409, title: 'A stop on this version cannot be cleared by anyone.' },
  'cannot-draft': { status: 422, title: 'The garment cannot be drafted as it stands.' },
  'cannot-solve': { status: 422, title: 'This cannot be computed as it stands.' },
  'columns-unclear': { status: 422, title: 'This file does not say all of its columns.' },
  'too-large': { status: 413, title: 'This is more than one request may carry.' },
  'not-ready': { status: 503, title: 'The workroom is not ready yet.' },
  unexpected: { status: 500, title: 'Something went wrong on our side.' },
} as const satisfies Record<string, { readonly status: number; readonly title: string }>

export type ProblemSlug = keyof typeof problems

/** One field that needs another look: `path` as in the body, dotted. */
export interface FieldProblem {
  readonly path: string
  readonly message: string
}

/** RFC 9457 problem details with our own members. `theirs` is what was saved meanwhile (409 stale). */
export interface ProblemDetails {
  readonly type: `/problems/${ProblemSlug}`
  readonly title: string
  readonly status: number
  readonly detail?: string
  readonly instance?: string
  readonly fields?: readonly FieldProblem[]
  readonly theirs?: unknown
  /** Why the domain refused, with its next step. */
  readonly problem?: {
    readonly code: string
    readonly message: string
    readonly todo?: string
    readonly at?: string
    readonly step?: string
  }
  /** What has to be chosen before a machine's file can be read: its headings, and which columns and units were recognised. */
  readonly ask?: {
    readonly headings: readonly string[]
    readonly columns: {
      readonly load: number | null
      readonly loadUnit: string | null
      readonly extension: number | null
      readonly lengthUnit: string | null
    }
  }
  readonly retryAfterSeconds?: number
}

/** Slug of a problem that came over the wire; null when it is none of ours. */
export function problemSlug(value: unknown): ProblemSlug | null {
  if (typeof value !== 'object' || value === null || !('type' in value) || typeof value.type !== 'string') return null
  const slug = value.type.replace(/^\/problems\//, '')
  return slug in problems ? (slug as ProblemSlug) : null
}
