import { defineCaution } from './define'

/** It opens behind alone: nobody opens that on their own body quickly. On dry land a named dresser makes it a caution. */
export const cannotLeaveAlone = defineCaution<{ readonly because: 'water' | 'child' | null; readonly dresser: string }>(
  'cannot-leave-alone',
  {
    severity: ({ because }) => (because === null ? 'caution' : 'stop'),
    message: ({ because, dresser }) =>
      because === 'water'
        ? 'It opens at the back alone: in water the wearer cannot get out alone and quickly.'
        : because === 'child'
          ? 'It opens at the back alone: a child cannot get out alone and quickly.'
          : `It opens at the back alone: ${dresser} has to stay within call while it is worn.`,
    maker: 'The only opening is at the back.',
    source: 'safety rule of the workroom: out alone and quickly; local codes decide',
    todo: ({ because }) =>
      because === null
        ? 'Say so to wearer and dresser, or give it a release at the front that the wearer can reach.'
        : 'Give it an opening at the front that the wearer can reach.',
    clearable: false,
  },
)

/** No opening at all: whether it goes over shoulders or hips is not known from the rings alone. */
export const noOpening = defineCaution<Record<string, never>>('no-opening', {
  severity: 'note',
  message: () => 'The bodice has no opening: try on the mock-up whether it goes over shoulders and hips, and comes off again.',
  maker: 'No opening: it is pulled on.',
  source: 'common practice',
  todo: 'Try it on before the final cloth is cut.',
})
