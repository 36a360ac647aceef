import type { Mm, Strain } from '../units/brand'
import { strain } from '../units/brand'
import type { Result } from '../units/result'
import { fail, succeed } from '../units/result'
import { LARGEST_STRAIN } from './check-test'

/**
 * Stretch of a ruler pull, (drawn - rest) / rest: marks on folded cloth drawn by hand along a ruler. The hand's load is not known, so the
 * curve that follows is the assumed one. Source: the trade's ruler test (read).
 */
export function rulerStretch(rest: Mm, drawn: Mm): Result<Strain> {
  if (!(rest > 0 && Number.isFinite(rest)))
    return fail({
      code: 'gauge-impossible',
      message: 'The marks have no distance at rest.',
      todo: 'Measure between the marks before drawing the cloth.',
      at: 'ruler.rest',
    })
  if (!(drawn > rest))
    return fail({
      code: 'reading-shorter',
      message: 'The marks are no further apart than at rest.',
      todo: 'Measure them again while the cloth is drawn, or enter cloth that does not stretch as a rigid width.',
      at: 'ruler.drawn',
    })
  const stretch = (drawn - rest) / rest
  if (!(stretch <= LARGEST_STRAIN))
    return fail({
      code: 'reading-impossible',
      message: 'No cloth stretches that far.',
      todo: 'Check both lengths and their units.',
      at: 'ruler.drawn',
    })
  return succeed(strain(stretch))
}
