import type { Mm } from '../units/brand'
import { plainDecimal } from '../units/format'
import { defineCaution } from './define'

/** A typed direction was not tested; the nearest tested one stands in. Angles in degrees from the lengthwise. */
export const directionNearest = defineCaution<{
  readonly cloth: string
  readonly asked: number
  readonly taken: string
  readonly off: number
}>('direction-nearest', {
  severity: 'note',
  message: ({ cloth, asked, taken, off }) =>
    `${cloth} is laid at ${plainDecimal(asked, 1)}°, which was not tested; its ${taken} test, ${plainDecimal(off, 1)}° away, stands in.`,
  maker: ({ cloth, asked }) => `${cloth}: laid at ${plainDecimal(asked, 1)}° from the lengthwise.`,
  figure: ({ off }) => ({ value: off, unit: 'degree' }),
  limit: () => ({ value: 0, unit: 'degree' }),
  source: 'workroom rule: the nearest tested direction, and it is said',
  todo: 'Pull a strip cut in that direction.',
})

/** Rigid layers stop the ring before a breath is full. */
export const breathStopped = defineCaution<{ readonly ring: string; readonly short: Mm }>('breath-stopped', {
  severity: 'stop',
  message: ({ ring, short }) =>
    `${ring}: its rigid layers stop a deep breath ${plainDecimal(short, 1)} mm before it is full, and the hold rises without limit.`,
  maker: ({ ring }) => `${ring}: rigid layers leave no room to breathe.`,
  figure: ({ short }) => ({ value: short, unit: 'mm' }),
  limit: () => ({ value: 0, unit: 'mm' }),
  source: 'derived: added girth of a breath from memory, stop of a rigid layer r - 1',
  todo: 'Cut the rigid layers larger than the others, or let one segment of the ring stretch.',
})

/** A zone has a plan of its own, and the draft has no piece of its own for it. */
export const zoneNotDrafted = defineCaution<{ readonly zone: string; readonly part: boolean }>('zone-not-drafted', {
  severity: 'note',
  message: ({ zone, part }) =>
    part
      ? `The ${zone} has layers of its own, which the rings read; the draft has no seam that parts it from the rest yet.`
      : `The ${zone} has layers of its own; no ring of this draft goes through it, and nothing is computed from them.`,
  maker: ({ zone }) => `The ${zone} has layers of its own.`,
  source: 'limit of the draft',
  todo: ({ part }) => (part ? 'Part it by a seam on the paper, or leave its layers as those around it.' : 'Plan it by hand.'),
})

/** Alterations were made in one layer plan and stand in another, in millimetres. */
export const alterationsCopied = defineCaution<{ readonly count: number }>('alterations-copied', {
  severity: 'caution',
  message: ({ count }) =>
    `${count === 1 ? 'An alteration was' : `${count} alterations were`} made in another layer plan and copied in millimetres: in these layers they change the hold by another amount.`,
  maker: 'Alterations of the mock-up are being taken over.',
  figure: ({ count }) => ({ value: count, unit: 'count' }),
  limit: () => ({ value: 0, unit: 'count' }),
  source: 'derived: the same millimetres are another strain in another plan',
  todo: 'Recut at equal hold from the version that fitted, which takes them over in hold.',
})
