import type { Mm, NewtonPerMetre, Pascal } from '../units/brand'
import { formatPercent, formatPressure, formatTension, plainDecimal } from '../units/format'
import type { CautionFigure } from './define'
import { defineCaution } from './define'

const pa = (value: number): CautionFigure => ({ value, unit: 'Pa' })
const millimetre = (value: number): CautionFigure => ({ value, unit: 'mm' })
const ratio = (value: number): CautionFigure => ({ value, unit: 'ratio' })

const BANDS = 'Anthropometry, Apparel Sizing and Design, ch. 13, table 13.5 (read)'

/** A pressure of a ring against a limit. `ring` is the name of the level. */
export interface PressureFacts {
  readonly ring: string
  readonly pressure: Pascal
  readonly limit: Pascal
}

/** Hold firm (note), strong (caution) or above all bands (stop), at the upper end of its band. */
export const holdHigh = defineCaution<PressureFacts & { readonly band: 'firm' | 'strong' | 'stop' }>('hold-high', {
  severity: ({ band }) => (band === 'stop' ? 'stop' : band === 'strong' ? 'caution' : 'note'),
  message: ({ ring, pressure, band }) =>
    band === 'stop'
      ? `${ring} may press up to ${formatPressure(pressure)}: more than a garment of this kind should.`
      : band === 'strong'
        ? `${ring} may press up to ${formatPressure(pressure)}: strong, for short wear only.`
        : `${ring} may press up to ${formatPressure(pressure)}: firm, the limit for casual wear.`,
  maker: ({ ring, band }) => `${ring}: hold ${band === 'stop' ? 'above its limit' : band}.`,
  figure: ({ pressure }) => pa(pressure),
  limit: ({ limit }) => pa(limit),
  source: BANDS,
  todo: ({ band }) =>
    band === 'firm'
      ? 'Say how long it will be worn, and hear how it feels at the fitting.'
      : 'Ask for less hold, take a lighter layer plan, or cut the ring larger.',
})

/** The ring presses less than asked, because the stretch or the largest reduction governs. */
export const holdNotReached = defineCaution<{
  readonly ring: string
  readonly pressure: Pascal
  readonly asked: Pascal
  readonly governs: 'stretch' | 'reduction'
}>('hold-not-reached', {
  severity: 'note',
  message: ({ ring, pressure, asked, governs }) =>
    `${ring} reaches ${formatPressure(pressure)} of the ${formatPressure(asked)} asked for: ${governs === 'stretch' ? 'the stretch of the cloth' : 'the largest reduction'} governs.`,
  maker: ({ ring }) => `${ring}: lighter than was asked for.`,
  figure: ({ pressure }) => pa(pressure),
  limit: ({ asked }) => pa(asked),
  source: 'largest reduction 10 to 20 %: common practice; wear limit: workroom setting',
  todo: 'Add a layer or a stronger cloth if the hold is needed; else leave it.',
})

/** Pressure at a deep breath, at the upper end of its band. */
export const breathHigh = defineCaution<PressureFacts & { readonly stops: boolean }>('breath-high', {
  severity: ({ stops }) => (stops ? 'stop' : 'caution'),
  message: ({ ring, pressure, stops }) =>
    `${ring} may press up to ${formatPressure(pressure)} at a deep breath${stops ? ', where wearers complain' : ''}.`,
  maker: ({ ring }) => `${ring}: presses hard at a deep breath.`,
  figure: ({ pressure }) => pa(pressure),
  limit: ({ limit }) => pa(limit),
  source:
    'caution 3300 Pa: end of the strong band, table 13.5 (read); stop 4700 Pa: complaints at 35 mmHg, Gau 1998 (read); added girth from memory',
  todo: 'Ask for less hold, or put more cloth that stretches into the ring.',
})

/** The peak at the sides of an elliptic body. */
export const sideHigh = defineCaution<PressureFacts & { readonly estimated: boolean }>('side-high', {
  severity: 'caution',
  message: ({ ring, pressure, estimated }) =>
    `${ring} peaks at the sides at ${formatPressure(pressure)}${estimated ? ', for an estimated breadth and depth' : ''}.`,
  maker: ({ ring }) => `${ring}: presses hardest at the sides.`,
  figure: ({ pressure }) => pa(pressure),
  limit: ({ limit }) => pa(limit),
  source: `end of the strong band, ${BANDS}; ellipse: derived from Laplace`,
  todo: ({ estimated }) =>
    estimated ? 'Measure breadth and depth at this level, or ask for less hold.' : 'Ask for less hold, and keep bones off the sides.',
})

/** Cloth worn beyond its wear limit. */
export const wearLimitPassed = defineCaution<{
  readonly ring: string
  readonly zone: string
  readonly strain: number
  readonly limit: number
}>('wear-limit-passed', {
  severity: 'caution',
  message: ({ ring, zone, strain, limit }) =>
    `${ring}, ${zone}: worn at ${formatPercent(strain)} stretch, beyond its wear limit of ${formatPercent(limit)}.`,
  maker: ({ ring, zone }) => `${ring}, ${zone}: stretched beyond its wear limit.`,
  figure: ({ strain }) => ratio(strain),
  limit: ({ limit }) => ratio(limit),
  source: 'wear limit: the strain of acceptable recovery, else half the tested stretch (workroom setting)',
  todo: 'Cut the ring larger, or test at which stretch the cloth still recovers.',
})

/** Too little cloth that stretches between rigid parts. */
export const stretchingWidthLittle = defineCaution<{ readonly ring: string; readonly share: number; readonly limit: number }>(
  'stretching-width-little',
  {
    severity: 'caution',
    message: ({ ring, share }) => `${ring}: only ${formatPercent(share)} of its way round stretches; the rest is rigid or gap.`,
    maker: ({ ring }) => `${ring}: little cloth that stretches.`,
    figure: ({ share }) => ratio(share),
    limit: ({ limit }) => ratio(limit),
    source: 'workroom setting without a source',
    todo: 'Use narrower channels or fewer of them; otherwise every millimetre of the body shows as pull.',
  },
)

/** A half whose rigid widths and gap reach its arc. */
export const halfFixed = defineCaution<{ readonly ring: string; readonly half: 'front' | 'back' }>('half-fixed', {
  severity: 'caution',
  message: ({ ring, half }) =>
    `${ring}: the ${half} is fixed by its rigid width; the other half takes all of the stretch and the side line moves.`,
  maker: ({ ring, half }) => `${ring}: no stretch in the ${half}.`,
  source: 'derived',
  todo: 'Make the rigid parts of that half narrower.',
})

/** Front and back worn at very different stretch. */
export const halvesDiffer = defineCaution<{ readonly ring: string; readonly front: number; readonly back: number; readonly limit: number }>(
  'halves-differ',
  {
    severity: 'note',
    message: ({ ring, front, back }) =>
      `${ring}: front worn at ${formatPercent(front)}, back at ${formatPercent(back)} stretch; prints and lines will not match across the side seam.`,
    maker: ({ ring }) => `${ring}: front and back stretch differently.`,
    figure: ({ front, back }) => ratio(Math.abs(front - back)),
    limit: ({ limit }) => ratio(limit),
    source: 'workroom setting without a source',
    todo: 'Bring the two layer plans nearer to each other if a pattern has to match.',
  },
)

/** A ring that lies loose on the body. */
export const ringSlack = defineCaution<{ readonly ring: string; readonly slack: Mm }>('ring-slack', {
  severity: 'caution',
  message: ({ ring, slack }) => `${ring} lies ${plainDecimal(slack, 1)} mm loose on the body and holds nothing.`,
  maker: ({ ring }) => `${ring}: lies loose.`,
  figure: ({ slack }) => millimetre(slack),
  source: 'derived',
  todo: 'Cut the ring smaller, or leave it loose on purpose.',
})

/** A lacing gap out of its range. */
export const gapOutOfRange = defineCaution<{ readonly ring: string; readonly gap: Mm; readonly low: Mm; readonly high: Mm }>(
  'gap-out-of-range',
  {
    severity: 'caution',
    message: ({ ring, gap, low, high }) => `${ring}: the lacing gap of ${plainDecimal(gap, 0)} mm is not between ${low} and ${high} mm.`,
    maker: ({ ring, gap }) => `${ring}: lacing gap ${plainDecimal(gap, 0)} mm.`,
    figure: ({ gap }) => millimetre(gap),
    limit: ({ gap, low, high }) => millimetre(gap < low ? low : high),
    source: 'lacing gap 30 to 80 mm: common practice, no source',
    todo: ({ gap, low }) =>
      gap < low ? 'Cut the ring smaller: a gap this narrow leaves nothing to lace in.' : 'Cut the ring larger, or widen the modesty panel.',
  },
)

/** A lacing gap that opens in a V. */
export const gapUneven = defineCaution<{ readonly ring: string; readonly gap: Mm; readonly mean: Mm; readonly limit: Mm }>('gap-uneven', {
  severity: 'caution',
  message: ({ ring, gap, mean }) =>
    `${ring}: the lacing gap is ${plainDecimal(Math.abs(gap - mean), 0)} mm ${gap > mean ? 'wider' : 'narrower'} than the mean of the lacing.`,
  maker: ({ ring, gap, mean }) =>
    `${ring}: lacing gap ${plainDecimal(Math.abs(gap - mean), 0)} mm ${gap > mean ? 'wider' : 'narrower'} than the others.`,
  figure: ({ gap, mean }) => millimetre(gap - mean),
  limit: ({ limit }) => millimetre(limit),
  source: 'common practice, no source',
  todo: ({ gap, mean }) =>
    gap > mean ? 'Let this level out: it is tighter than the others.' : 'Take this level in: it is looser than the others.',
})

/** Pull on a closure, told where one is under tension. */
export const closurePull = defineCaution<{ readonly ring: string; readonly tension: NewtonPerMetre; readonly limit: NewtonPerMetre }>(
  'closure-pull',
  {
    severity: 'caution',
    message: ({ ring, tension }) => `${ring}: the closure carries ${formatTension(tension)}, and gapes between its hooks.`,
    maker: ({ ring, tension }) => `${ring}: the closure carries ${formatTension(tension)}.`,
    figure: ({ tension }) => ({ value: tension, unit: 'N/m' }),
    limit: ({ limit }) => ({ value: limit, unit: 'N/m' }),
    source: 'workroom setting, common practice',
    todo: 'Set the hooks closer, or put a bone on each side of the closure.',
  },
)

/** What has to keep the garment up is not known: only a stretch percentage of the cloth is. */
export const heldUpUnknown = defineCaution<{ readonly where: string; readonly limit: Pascal }>('held-up-unknown', {
  severity: 'caution',
  message: ({ where, limit }) => `Hold unknown, pull a strip: ${where} is asked to hold ${formatPressure(limit)} to keep it up.`,
  maker: 'Hold unknown, pull a strip.',
  limit: ({ limit }) => pa(limit),
  source: 'assumption: the stretch was read somewhere between 100 and 500 N/m; what keeps it up is a workroom setting',
  todo: 'Hang known weights on a strip and enter the lengths.',
})

/** What has to keep the garment up is not there. */
export const notHeldUp = defineCaution<{
  readonly where: string
  readonly pressure: Pascal
  readonly limit: Pascal
  readonly strapless: boolean
  readonly capped: boolean
}>('not-held-up', {
  severity: ({ strapless, capped }) => (strapless && capped ? 'stop' : 'caution'),
  message: ({ where, pressure, limit, strapless, capped }) =>
    capped && !strapless
      ? `It hangs from its straps, not from hold: ${where} holds ${formatPressure(pressure)}.`
      : strapless
        ? `Nothing keeps it up: strapless asks for ${formatPressure(limit)} at ${where}, which holds ${formatPressure(pressure)}.`
        : `Little keeps it up: ${where} holds ${formatPressure(pressure)} of ${formatPressure(limit)}.`,
  maker: ({ strapless }) => (strapless ? 'Strapless, and little hold keeps it up.' : 'It hangs from its straps, not from hold.'),
  figure: ({ pressure }) => pa(pressure),
  limit: ({ limit }) => pa(limit),
  source: 'assumption, a workroom setting',
  todo: ({ strapless, capped }) =>
    strapless && capped
      ? 'Give it straps: this wearer’s limit goes before what keeps it up.'
      : capped
        ? 'Make the straps carry it.'
        : 'Ask for more hold there, or let straps carry it.',
})
