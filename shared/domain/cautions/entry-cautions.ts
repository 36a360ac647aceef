import type { Mm } from '../units/brand'
import { fixedDecimal, formatLength } from '../units/format'
import { defineCaution } from './define'

interface PassFacts {
  readonly ring: string
  /** What it has to pass, in words. */
  readonly over: string
  readonly reach: Mm
  readonly needs: Mm
}

/** Closures open, a level does not go over what it has to pass. */
export const cannotGetIn = defineCaution<PassFacts & { readonly said: boolean }>('cannot-get-in', {
  severity: ({ said }) => (said ? 'stop' : 'caution'),
  message: ({ ring, over, reach, needs, said }) =>
    `${ring} reaches ${formatLength(reach, 'cm')} ${said ? 'with its closures open' : 'closed'}; it has to pass the ${over}, ${formatLength(needs, 'cm')}.`,
  maker: ({ ring }) => `${ring} may not go over the body.`,
  figure: ({ reach }) => ({ value: reach, unit: 'mm' }),
  limit: ({ needs }) => ({ value: needs, unit: 'mm' }),
  source: 'pull-on limit of the cloths, .9 of the tested stretch: a setting',
  todo: ({ said }) =>
    said ? 'Open it wider, step into it instead, or cut that level larger.' : 'Say how it opens, under Getting in and out in the layers.',
  private: true,
})

/** It goes on, but hardly. */
export const tightToGetIn = defineCaution<PassFacts>('tight-to-get-in', {
  severity: 'caution',
  message: ({ ring, over, reach, needs }) =>
    `${ring} is tight on the way: it reaches ${formatLength(reach, 'cm')} and has to pass the ${over}, ${formatLength(needs, 'cm')}.`,
  maker: ({ ring }) => `${ring} is tight on the way on and off.`,
  figure: ({ reach }) => ({ value: reach, unit: 'mm' }),
  limit: ({ needs }) => ({ value: needs, unit: 'mm' }),
  source: 'setting: within 3 % (common practice)',
  todo: 'Try it on before the final cloth is cut.',
  private: true,
})

/** It goes on, with more pull than a hand likes. */
export const hardToPullOn = defineCaution<{ readonly ring: string; readonly pull: number; readonly limit: number }>('hard-to-pull-on', {
  severity: 'caution',
  message: ({ ring, pull }) => `${ring} takes a pull of ${fixedDecimal(pull, 0)} N on every 100 mm of its height to go on.`,
  maker: ({ ring }) => `${ring} takes a hard pull to go on.`,
  figure: ({ pull }) => ({ value: pull, unit: 'N' }),
  limit: ({ limit }) => ({ value: limit, unit: 'N' }),
  source: 'setting',
  todo: 'Open it wider; seams and hems have to stand that pull.',
  private: true,
})

/** Opens at the back alone, and nobody is named who opens it. */
export const noDresser = defineCaution<Record<string, never>>('no-dresser', {
  severity: 'stop',
  message: () => 'It opens at the back alone and no dresser is named: the wearer cannot get out alone and quickly.',
  maker: 'Opens at the back alone; no dresser is named.',
  source: 'safety rule of the workroom: out alone and quickly; local codes decide',
  todo: 'Name a dresser who stays within call, or give it a release at the front that the wearer can reach.',
})
