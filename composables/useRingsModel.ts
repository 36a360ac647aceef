import type { RingReading } from '#shared/domain/textile/reading-working'
import type { HoldBand, RingSolution } from '#shared/domain/textile/types'

/** Distance of two stretch ticks at rest, mm; on the body it is drawn times (1 + strain). */
export const TICK_REST = 5
/** Every tenth tick is long, so that the strain of one ring can be read against the next: 50 mm at rest. */
export const TICKS_PER_LONG = 10

/**
 * Upper ends of the hold bands, Pa. Source: Anthropometry, Apparel Sizing and Design, ch. 13, table 13.5. Drawn only: the band of a
 * ring comes with its solution.
 */
export const HOLD_BAND_ENDS: readonly { readonly band: HoldBand; readonly to: number }[] = [
  { band: 'light', to: 400 },
  { band: 'easy', to: 1300 },
  { band: 'firm', to: 2000 },
  { band: 'strong', to: 3300 },
  { band: 'stop', to: Number.POSITIVE_INFINITY },
]
/** Right end of the drawn hold scale, Pa: what presses harder stands at the end with a double mark. */
export const HOLD_SCALE_END = 4200

/** The readings of a ring that open their working. */
export type RingFigure = RingReading

/** One part of a ring laid end to end, mm from the centre front on the body. */
export interface RingPart {
  readonly kind: 'cloth' | 'rigid' | 'gap'
  readonly half: 'front' | 'back'
  readonly from: number
  readonly to: number
  readonly strain: number
}

/** Half a ring, centre front to centre back, as it lies on the body. Lengths mm. */
export interface RingBarModel {
  readonly parts: readonly RingPart[]
  readonly length: number
  /** Half of what the ring goes round; the parts end there unless the ring lies loose. */
  readonly body: number
  /** Where front and back meet. */
  readonly side: number
}

interface Laid {
  readonly kind: RingPart['kind']
  readonly half: RingPart['half']
  readonly width: number
  readonly strain: number
}

/**
 * Parts of one half, from the centre outwards. The solution knows how much of a half is rigid, not where: it stands beside a gap (a
 * lacing is boned there), else shared evenly over the joins of the segments, else in the middle.
 */
function layHalf(ring: RingSolution, half: 'front' | 'back'): Laid[] {
  const gap = (half === 'front' ? ring.gapFront : ring.gapBack) / 2
  const rigid = (half === 'front' ? ring.rigidFront : ring.rigidBack) / 2
  const listed = ring.segments.filter((segment) => segment.half === half)
  const segments = half === 'front' ? listed : [...listed].reverse()
  const cloth = segments.map((segment): Laid => ({
    kind: 'cloth',
    half,
    width: (segment.width / 2) * (1 + segment.strain),
    strain: segment.strain,
  }))
  const solid = (width: number): Laid => ({ kind: 'rigid', half, width, strain: 0 })
  const laid: Laid[] = gap > 0 ? [{ kind: 'gap', half, width: gap, strain: 0 }] : []
  if (rigid <= 0) return [...laid, ...cloth]
  if (gap > 0 || cloth.length === 0) return [...laid, solid(rigid), ...cloth]
  const [only] = cloth
  if (cloth.length === 1 && only) return [...laid, { ...only, width: only.width / 2 }, solid(rigid), { ...only, width: only.width / 2 }]
  const each = rigid / (cloth.length - 1)
  return [...laid, ...cloth.flatMap((part, index) => (index === 0 ? [part] : [solid(each), part]))]
}

/** A ring laid end to end, centre front at 0. */
export function ringBar(ring: RingSolution): RingBarModel {
  const front = layHalf(ring, 'front')
  const laid = [...front, ...layHalf(ring, 'back').reverse()]
  const parts: RingPart[] = []
  let at = 0
  let side = 0
  laid.forEach((part, index) => {
    if (index === front.length) side = at
    if (part.width > 0) parts.push({ kind: part.kind, half: part.half, from: at, to: at + part.width, strain: part.strain })
    at += Math.max(part.width, 0)
  })
  if (laid.length === front.length) side = at
  return { parts, length: at, body: ring.surface / 2, side }
}

/** Ticks of a cloth part: places in mm from the centre front, the long ones marked. */
export function ringTicks(part: RingPart, rest: number = TICK_REST): { readonly at: number; readonly long: boolean }[] {
  const step = rest * (1 + part.strain)
  if (part.kind !== 'cloth' || !(step > 0)) return []
  const every = Math.max(1, Math.round((TICK_REST * TICKS_PER_LONG) / rest))
  const count = Math.ceil((part.to - part.from) / step - 1e-6) - 1
  return Array.from({ length: Math.max(count, 0) }, (_, index) => ({ at: part.from + (index + 1) * step, long: (index + 1) % every === 0 }))
}

/** The one body scale of a garment, mm: its longest half ring, or half body where a ring is shorter. */
export function ringScale(rings: readonly RingSolution[]): number {
  return rings.reduce((longest, ring) => {
    const bar = ringBar(ring)
    return Math.max(longest, bar.length, bar.body)
  }, 1)
}

/** Cords across a gap: lines between the two edges that cross in pairs, `height` from top to bottom. */
export function gapCords(from: number, to: number, height: number, crossings = 3): string {
  const step = height / crossings
  return Array.from({ length: crossings }, (_, index) => {
    const top = index * step
    const bottom = top + step
    return `M${from} ${top}L${to} ${bottom}M${to} ${top}L${from} ${bottom}`
  }).join('')
}

/** Place on the hold scale, 0 to 1; beyond the end it stays at the end. */
export const holdPlace = (pascal: number): number => Math.min(Math.max(pascal / HOLD_SCALE_END, 0), 1)

/** Mean strain of a half, weighted by cut width; null where nothing stretches. */
export function halfStrain(ring: RingSolution, half: 'front' | 'back'): number | null {
  const segments = ring.segments.filter((segment) => segment.half === half && segment.width > 0)
  const width = segments.reduce((sum, segment) => sum + segment.width, 0)
  return width > 0 ? segments.reduce((sum, segment) => sum + segment.strain * segment.width, 0) / width : null
}
