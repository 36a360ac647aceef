import { setResponseHeader, setResponseStatus, type H3Event } from 'h3'
import { problems, type ProblemDetails, type ProblemSlug } from '../../shared/types/problem-details'
import type { RefusalDetails } from '../services/refusal'

/** The one place where a refusal becomes an answer (RFC 9457). */
export function problemAnswer(event: H3Event, slug: ProblemSlug, details: RefusalDetails = {}): ProblemDetails {
  const { status, title } = problems[slug]
  setResponseStatus(event, status)
  setResponseHeader(event, 'content-type', 'application/problem+json')
  if (details.retryAfterSeconds !== undefined) setResponseHeader(event, 'retry-after', details.retryAfterSeconds)
  return { type: `/problems/${slug}`, title, status, instance: event.path.split('?')[0]!, ...details }
}
