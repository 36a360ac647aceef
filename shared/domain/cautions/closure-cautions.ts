import { defineCaution } from './define'

/** The only opening is a lacing behind: nobody closes or opens that on their own body quickly. */
export const cannotLeaveAlone = defineCaution<{ readonly because: 'water' | 'child' | null }>('cannot-leave-alone', {
  severity: ({ because }) => (because === null ? 'caution' : 'stop'),
  message: ({ because }) =>
    because === 'water'
      ? 'The only opening is a lacing at the back: in water the wearer cannot get out alone and quickly.'
      : because === 'child'
        ? 'The only opening is a lacing at the back: a child cannot get out alone and quickly.'
        : 'The only opening is a lacing at the back: the wearer cannot get out alone.',
  maker: 'The only opening is at the back.',
  source: 'safety rule of the workroom: out alone and quickly; local codes decide',
  todo: ({ because }) =>
    because === null
      ? 'Name a dresser who stays within call, or give it an opening at the front.'
      : 'Give it an opening at the front that the wearer can reach.',
  clearable: false,
})

/** No opening at all: whether it goes over shoulders or hips is not known from the rings alone. */
export const noOpening = defineCaution<Record<string, never>>('no-opening', {
  severity: 'note',
  message: () => 'The bodice has no opening: try on the mock-up whether it goes over shoulders and hips, and comes off again.',
  maker: 'No opening: it is pulled on.',
  source: 'common practice',
  todo: 'Try it on before the final cloth is cut.',
})
