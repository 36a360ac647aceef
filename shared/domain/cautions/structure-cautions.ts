import { defineCaution } from './define'

const BENDS = 'least radius of the stock as the workroom has it; common practice'

/** A bone whose piece, seam, level or stock is gone: kept, not laid. */
export const boneNotLaid = defineCaution<{ readonly message: string; readonly todo: string }>('bone-not-laid', {
  severity: 'caution',
  message: ({ message }) => message,
  maker: 'A bone is not laid.',
  source: 'derived',
  todo: ({ todo }) => todo,
})

interface Near {
  readonly name: string
  readonly value: number
  readonly limit: number
}
const mm = (value: number) => `${value.toFixed(0)} mm`

export const boneNearArmhole = defineCaution<Near>('bone-near-armhole', {
  severity: 'caution',
  message: ({ name, value }) => `${name} ends ${mm(value)} from the armhole: it stabs when the arm comes down.`,
  maker: ({ name }) => `${name} ends near the armhole.`,
  figure: ({ value }) => ({ value, unit: 'mm' }),
  limit: ({ limit }) => ({ value: limit, unit: 'mm' }),
  source: 'common practice, from memory',
  todo: 'Let it end lower, or further from the armhole.',
})
export const boneNearEdge = defineCaution<Near>('bone-near-edge', {
  severity: 'caution',
  message: ({ name, value }) => `${name} ends ${mm(value)} from a finished edge: there is no room to turn the edge and cap the bone.`,
  maker: ({ name }) => `${name} ends near a finished edge.`,
  figure: ({ value }) => ({ value, unit: 'mm' }),
  limit: ({ limit }) => ({ value: limit, unit: 'mm' }),
  source: 'couture practice page, read (1/2 in)',
  todo: 'Let it end further inside.',
})
export const bonesClose = defineCaution<Near>('bones-close', {
  severity: 'caution',
  message: ({ name, value }) => `${name} lie ${mm(value)} apart: nothing between them stretches.`,
  maker: ({ name }) => `${name} lie close together.`,
  figure: ({ value }) => ({ value, unit: 'mm' }),
  limit: ({ limit }) => ({ value: limit, unit: 'mm' }),
  source: 'common practice: two channel widths',
  todo: 'Move one of them, or leave it out.',
})
export const boneBendsTight = defineCaution<Near>('bone-bends-tight', {
  severity: 'caution',
  message: ({ name, value }) => `${name} bends to a radius of ${mm(value)} within the cloth, tighter than its stock does.`,
  maker: ({ name }) => `${name} bends tightly.`,
  figure: ({ value }) => ({ value, unit: 'mm' }),
  limit: ({ limit }) => ({ value: limit, unit: 'mm' }),
  source: BENDS,
  todo: 'Take a stock that bends edgeways (a spiral), or lay it straighter.',
})
export const boneRusts = defineCaution<{ readonly stock: string }>('bone-rusts', {
  severity: 'caution',
  message: ({ stock }) => `${stock} rusts once its coating is cut, and this garment goes into water.`,
  maker: ({ stock }) => `${stock} must not get wet.`,
  source: 'common practice',
  todo: 'Take stainless steel or plastic, and cap every end.',
})
export const boneRidge = defineCaution<{ readonly name: string; readonly cover: number }>('bone-ridge', {
  severity: 'caution',
  message: ({ name, cover }) =>
    cover === 0
      ? `${name} lies outermost: its ridge shows.`
      : `${name} is covered by one thin layer: its ridge shows, the more the paler the cloth is.`,
  maker: ({ name }) => `The ridge of ${name.toLowerCase()} may show.`,
  source: 'common practice',
  todo: 'Lay it one layer further in, or pad its channel.',
})
export const lacingUnboned = defineCaution<{ readonly half: 'front' | 'back'; readonly bones: number }>('lacing-unboned', {
  severity: 'caution',
  message: ({ half, bones }) =>
    `The lacing at the centre ${half} has ${bones === 0 ? 'no bone' : 'one bone'} beside its eyelets: the edge gathers between them.`,
  maker: ({ half }) => `The lacing at the centre ${half} wants a bone on each side of its eyelets.`,
  figure: ({ bones }) => ({ value: bones, unit: 'count' }),
  source: 'common practice',
  todo: 'Lay a bone on each side of the eyelets, and a modesty panel where skin must not show.',
})
export const hookTapeUnderlap = defineCaution<{ readonly half: 'front' | 'back' }>('hook-tape-underlap', {
  severity: 'note',
  message: ({ half }) => `A continuous hook tape at the centre ${half} leaves no room for an underlap behind it.`,
  maker: 'No underlap behind a continuous hook tape.',
  source: 'common practice',
  todo: 'For an under-placket take single hooks, or an extension.',
})
