import { mm, type Mm } from '../units/brand'
import type { BoneStock, StockKind } from './types'

/** Channel over bone, mm. Source: corsetry teacher's page, read: bone 7, channel 9. */
export const CHANNEL_OVER_BONE = mm(2)
/** Free at each tip of a bone in its channel, mm. Setting; common practice, from memory. */
export const TIP_CLEARANCE = mm(6)

/** Names of the kinds in the trade's words. */
export const STOCK_WORDS: Readonly<Record<StockKind, string>> = {
  'flat-steel': 'flat steel',
  'spiral-steel': 'spiral steel',
  plastic: 'plastic',
  wire: 'wire',
}

const lengths = (...all: readonly number[]): readonly Mm[] => all.map(mm)

/**
 * A stock to begin with. Moduli from memory (steel 200, plastic 2.5 GPa; a spiral gives far more than its width of steel would, from a bent
 * sample); least radii edgeways and lengths by common practice: the workroom measures its own.
 */
export const DEFAULT_STOCK: readonly BoneStock[] = [
  {
    id: 'flat-steel-7',
    name: 'Flat steel 7 mm, coated',
    kind: 'flat-steel',
    width: mm(7),
    thickness: mm(0.5),
    modulus: 200,
    stiffness: null,
    rusts: true,
    leastRadius: mm(1500),
    lengths: lengths(150, 200, 250, 300, 350, 400),
  },
  {
    id: 'spiral-steel-6',
    name: 'Spiral steel 6 mm, galvanised',
    kind: 'spiral-steel',
    width: mm(6),
    thickness: mm(1.5),
    modulus: 200,
    stiffness: 0.003,
    rusts: true,
    leastRadius: mm(60),
    lengths: [],
  },
  {
    id: 'spiral-stainless-6',
    name: 'Spiral steel 6 mm, stainless',
    kind: 'spiral-steel',
    width: mm(6),
    thickness: mm(1.5),
    modulus: 190,
    stiffness: 0.003,
    rusts: false,
    leastRadius: mm(60),
    lengths: [],
  },
  {
    id: 'plastic-6',
    name: 'Plastic 6 mm',
    kind: 'plastic',
    width: mm(6),
    thickness: mm(1.5),
    modulus: 2.5,
    stiffness: null,
    rusts: false,
    leastRadius: mm(250),
    lengths: [],
  },
  {
    id: 'wire-3',
    name: 'Cup wire 3 mm, coated',
    kind: 'wire',
    width: mm(3),
    thickness: mm(1),
    modulus: 200,
    stiffness: null,
    rusts: true,
    leastRadius: mm(35),
    lengths: [],
  },
]

/** Bending stiffness E w t³ / 12 of a flat strip, N m²: GPa and mm. Derived (beam of rectangular section). */
export const stripStiffness = (modulus: number, width: Mm, thickness: Mm): number =>
  (modulus * 1e9 * (width / 1000) * (thickness / 1000) ** 3) / 12

/** Stiffness of a stock, N m²: as measured, else computed from its section. */
export const stockStiffness = (stock: BoneStock): number => stock.stiffness ?? stripStiffness(stock.modulus, stock.width, stock.thickness)

export const channelWidth = (stock: Pick<BoneStock, 'width'>): Mm => mm(stock.width + CHANNEL_OVER_BONE)

/** The length to buy for a cut: the shortest that is long enough; null where it is cut from the roll or none is. */
export const lengthToBuy = (stock: BoneStock, cut: Mm): Mm | null =>
  [...stock.lengths].sort((a, b) => a - b).find((length) => length >= cut) ?? null
