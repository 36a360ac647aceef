import * as body from './body-cautions'
import * as closure from './closure-cautions'
import * as cloth from './cloth-cautions'
import type { CautionMaker } from './define'
import * as draft from './draft-cautions'
import * as entry from './entry-cautions'
import * as fit from './fit-cautions'
import * as hold from './hold-cautions'
import * as layer from './layer-cautions'
import * as standing from './standing-notes'
import * as structure from './structure-cautions'
import type { Caution, Severity } from './types'
import * as wearer from './wearer-cautions'

/** Every code there is, by the room that finds it. A caution is built by calling its entry with its place and facts. */
export const cautions = {
  ...hold,
  ...layer,
  ...cloth,
  ...body,
  ...wearer,
  ...draft,
  ...closure,
  ...entry,
  ...fit,
  ...structure,
  ...standing,
} as const

/** The registry by code: source, whether a stop of it may be cleared, whether its figures are the wearer's own. */
export const CAUTION_REGISTRY: ReadonlyMap<string, Pick<CautionMaker<never>, 'code' | 'source' | 'clearable' | 'private'>> = new Map(
  Object.values(cautions).map((entry) => [
    entry.code,
    { code: entry.code, source: entry.source, clearable: entry.clearable, private: entry.private },
  ]),
)

const RANK: Readonly<Record<Severity, number>> = { stop: 0, caution: 1, note: 2 }

/** Cautions in the order in which they are read: stops first, then as they were found. */
export const orderCautions = (found: readonly Caution[]): readonly Caution[] =>
  [...found].sort((one, other) => RANK[one.severity] - RANK[other.severity])

/** The stops of a list that keep a version from being cleared for cutting. */
export const stopsOf = (found: readonly Caution[]): readonly Caution[] => found.filter((caution) => caution.severity === 'stop')

/**
 * A caution as a maker may read it: the maker's words alone, without pressures (with a pull they would give the girth away); what speaks of
 * the wearer's body or health loses its code, figure, limit, source and place too.
 */
export function cautionForMaker(caution: Caution): Caution {
  const known = CAUTION_REGISTRY.get(caution.code)
  if (known && !known.private) {
    const pressure = caution.figure?.unit === 'Pa'
    return { ...caution, message: caution.makerMessage, figure: pressure ? null : caution.figure, limit: pressure ? null : caution.limit }
  }
  return {
    ...caution,
    code: 'wearer-limit',
    message: caution.makerMessage,
    place: { kind: 'garment' },
    figure: null,
    limit: null,
    source: '',
    todo: 'Ask the drafter.',
  }
}
