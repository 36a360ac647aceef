import type { TensileAnswer } from '../../shared/utils/machine-file'
import type { RouteAnswer } from '../../shared/schemas/routes'
import { refuse } from './refusal'

/** What was read of a machine's file; a question where it does not say its columns, a problem at the field where it is no run. */
export function runOf(said: TensileAnswer): RouteAnswer<'solve.run'> {
  if (said.kind === 'ask') {
    const { headings, columns } = said
    return refuse('columns-unclear', {
      ask: { headings, columns },
      fields: [{ path: 'file', message: 'Say which columns hold load and extension, and their units.' }],
    })
  }
  if (said.kind === 'problem') {
    const { problem } = said
    return refuse('cannot-solve', { problem, fields: [{ path: 'file', message: problem.message }] })
  }
  return { ...said.reading, columns: said.columns }
}
