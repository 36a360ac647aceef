import { formatLength, formatPercent, formatPressureIn, formatTension } from '#shared/domain/units/format'
import { mm, pascal } from '#shared/domain/units/brand'
import type { Governs, HoldBand, RingSolution } from '#shared/domain/textile/types'
import { halfStrain, ringBar } from './useRingsModel'
import type { RingFigure } from './useRingsModel'

export type RingUnit = 'cm' | 'in'

/** What a band means to the wearer, one or two words. */
export const BAND_WORDS: Readonly<Record<HoldBand, string>> = {
  light: 'lies light',
  easy: 'all day',
  firm: 'casual wear at most',
  strong: 'short wear',
  stop: 'too hard',
}

const GOVERNS_WORDS: Readonly<Record<Governs, string>> = {
  hold: 'hold governs',
  stretch: 'stretch governs',
  reduction: 'reduction governs',
}

/** Which of hold, stretch and largest reduction set the cut; else how the ring was solved. */
export function governsWords(ring: RingSolution): string {
  if (ring.governs) return GOVERNS_WORDS[ring.governs]
  return ring.mode === 'gap' ? 'gap follows from cut and lacing' : 'cut as typed'
}

/** Level names with a break allowed where a narrow strip needs one. */
export const narrowName = (name: string): string => name.replace(/^(under)(bust)$/i, '$1\u00AD$2')

export interface RingFigureText {
  readonly figure: RingFigure
  readonly label: string
  readonly value: string
  readonly unit?: string
}

function split(text: string): { readonly value: string; readonly unit?: string } {
  const at = text.lastIndexOf(' ')
  return at < 0 ? { value: text } : { value: text.slice(0, at), unit: text.slice(at + 1) }
}

/** One figure of a ring as it is written: name of the level in the label, value, thin unit. */
export function ringFigure(ring: RingSolution, figure: RingFigure, unit: RingUnit): RingFigureText {
  const of = (label: string, text: string): RingFigureText => ({ figure, label: `${ring.name}, ${label}`, ...split(text) })
  switch (figure) {
    case 'pressure':
      return of('hold', formatPressureIn(ring.pressure, 'kPa'))
    case 'breath':
      return of('hold at a deep breath', formatPressureIn(ring.breathPressure, 'kPa'))
    case 'side':
      return of('hold at the side', formatPressureIn(ring.sidePressure, 'kPa'))
    case 'front':
      return of('hold in front', formatPressureIn(ring.frontPressure, 'kPa'))
    case 'hold':
      return of('hold asked for', formatPressureIn(ring.hold ?? pascal(0), 'kPa'))
    case 'tension':
      return of('pull of the cloth', formatTension(ring.tension))
    case 'cut':
      return of('cut girth', formatLength(ring.cut, unit))
    case 'negativeEase':
      return of('ease', formatPercent(-ring.negativeEase / 100, 1))
    case 'k':
      return of('cut over body', formatPercent(ring.k, 1))
    case 'gap':
      return of('gap', formatLength(mm(ring.gapFront + ring.gapBack), unit))
    case 'slack':
      return of('lies loose by', formatLength(ring.slack, unit))
    case 'strain':
      return { figure, label: `${ring.name}, stretch of the cloth`, value: strainWords(ring) }
    case 'governs':
      return { figure, label: `${ring.name}, what set the cut`, value: governsWords(ring) }
  }
}

/** `12 % front, 15 % back`, or one figure where both halves stretch alike. */
export function strainWords(ring: RingSolution): string {
  const [front, back] = [halfStrain(ring, 'front'), halfStrain(ring, 'back')]
  if (front === null && back === null) return 'none'
  if (front === null || back === null) return formatPercent(front ?? back ?? 0)
  const [frontText, backText] = [formatPercent(front), formatPercent(back)]
  return frontText === backText ? frontText : `${frontText} front, ${backText} back`
}

/** Whole mmHg, as it stands beside kPa. */
export const mmHgWords = (value: number): string => formatPressureIn(pascal(value), 'mmHg', 0)

/** Low and high in one unit: `0.72 to 1.10 kPa`. */
export function pressureRange(low: number, high: number): string {
  return `${split(formatPressureIn(pascal(low), 'kPa')).value} to ${formatPressureIn(pascal(high), 'kPa')}`
}

/** The drawn half ring in words, for those who listen: parts in order, centre front to centre back. */
export function ringBarWords(ring: RingSolution, unit: RingUnit): string {
  const parts = ringBar(ring).parts.map((part) => {
    const length = formatLength(mm(part.to - part.from), unit)
    if (part.kind === 'cloth') return `${part.half} cloth ${length}, stretched ${formatPercent(part.strain)}`
    return part.kind === 'rigid' ? `rigid ${length} in the ${part.half}` : `open ${length} in the ${part.half}, half the gap`
  })
  return `${ring.name}, half the body from centre front to centre back: ${parts.join('; ')}.`
}
