import type { HalfFrame } from './frame'
import { BLOCKS, lineOf } from './roles'
import type { BodiceStyle, CentreKind, FurtherSeam, HalfPanels, LineId, PieceId, SeamLetter, SeamShares } from './types'

export type Zone = 'front' | 'back'

/** A place at which a half is taken in: its seams, its centre and its side. */
export type WedgePlace = 'centre' | 'side' | LineId

/** A seam from the hem upwards with its place at the bust. */
export interface SeamLine {
  readonly id: LineId
  /** mm from the body's centre, at the bust. */
  readonly x: number
  readonly further: FurtherSeam | null
}

/** Panels of a half. */
export const panelCount = ({ princess, further }: HalfPanels): number => (princess ? 2 + further.length : 1)

const LETTERS: readonly SeamLetter[] = ['a', 'b', 'c', 'd']
/** Most panels of one half: a princess seam and a further seam for each letter. */
export const MOST_OF_HALF = LETTERS.length + 2
/** What a new seam takes of the shaping to begin with. Setting. */
const NEW_SHARE = 0.15

/**
 * A half with another number of panels: seams are added beside the side seam under the next free letter, or taken away from the last added;
 * those that stay keep their letter, place and share. One panel has no seam.
 */
export function withPanelCount(panels: HalfPanels, count: number): HalfPanels {
  if (count <= 1) return { princess: false, further: [] }
  const further = panels.further.slice(0, count - 2)
  for (const id of LETTERS) {
    if (further.length >= count - 2) break
    if (!further.some((seam) => seam.id === id)) {
      further.push({ id, beside: 'side', at: null, end: null, share: NEW_SHARE, letOut: null })
    }
  }
  return { princess: true, further }
}

/** Places between two: those that are given, the others (null) evenly between their neighbours. */
export function fillEvenly(places: readonly (number | null)[], from: number, to: number): readonly number[] {
  const known = [from, ...places, to]
  return places.map((place, index) => {
    if (place !== null) return place
    const own = index + 1
    let before = own
    while (known[before] === null) before -= 1
    let after = own
    while (known[after] === null) after += 1
    const [low, high] = [known[before] as number, known[after] as number]
    return low + ((high - low) * (own - before)) / (after - before)
  })
}

/** The seams of a half from its centre outwards, at the bust. */
export function seamLines(half: HalfFrame, panels: HalfPanels): readonly SeamLine[] {
  if (!panels.princess) return []
  const placeOf = (share: number) => half.centreX + share * half.width
  const beside = (side: FurtherSeam['beside']) => panels.further.filter((seam) => seam.beside === side)
  const run = (seams: readonly FurtherSeam[], from: number, to: number): readonly SeamLine[] => {
    const places = fillEvenly(
      seams.map(({ at }) => (at === null ? null : placeOf(at))),
      from,
      to,
    )
    return seams.map((seam, index) => ({ id: lineOf(seam.id), x: places[index] as number, further: seam }))
  }
  return [
    ...run(beside('centre'), half.centreX, half.princess.x),
    { id: 'princess', x: half.princess.x, further: null },
    ...run(beside('side'), half.princess.x, half.underarm.x),
  ]
}

/** The pieces of a half from its centre outwards, by the seams between them. */
export function pieceIdsOf(zone: Zone, lines: readonly SeamLine[]): readonly PieceId[] {
  if (lines.length === 0) return [zone]
  const [centre, side] = zone === 'front' ? [BLOCKS[0], BLOCKS[1]] : [BLOCKS[3], BLOCKS[2]]
  const ids: PieceId[] = [centre as PieceId]
  let block = centre
  lines.forEach((line, index) => {
    if (line.id === 'princess') block = side
    const next = lines[index + 1]
    const letter = block === centre ? line.further?.id : next?.further?.id
    ids.push((letter === undefined ? block : `${block}-${letter}`) as PieceId)
  })
  return ids
}

/** Whether a centre opens: by zip, hooks, busk or lacing. */
export const opens = (kind: CentreKind): boolean => kind !== 'fold' && kind !== 'seam'

/** Whether a centre takes a share of the wedge: a seam does, a fold cannot, an opening where it is asked to. */
export const centreTakes = (kind: CentreKind, openingTakes: boolean): boolean => kind === 'seam' || (kind !== 'fold' && openingTakes)

/** A half's wedge shares with those of a fold or an opening given to the other seams in proportion. */
export function sharesOf(shares: SeamShares, centre: CentreKind, openingTakes = false): SeamShares {
  if (centreTakes(centre, openingTakes)) return shares
  const rest = shares.princess + shares.side
  return { centre: 0, princess: shares.princess / rest, side: shares.side / rest }
}

/**
 * The share of every place of a half, sum 1: a fold's, a closed opening's and a missing princess seam's go to the others in
 * proportion; a further seam takes its own from all of them in proportion.
 */
function placeShares(
  list: SeamShares,
  panels: HalfPanels,
  takes: boolean,
  own: (seam: FurtherSeam) => number,
): ReadonlyMap<WedgePlace, number> {
  const base = { centre: takes ? list.centre : 0, princess: panels.princess ? list.princess : 0, side: list.side }
  const rest = base.centre + base.princess + base.side
  const further = panels.princess ? panels.further : []
  const left = 1 - further.reduce((sum, seam) => sum + own(seam), 0)
  return new Map<WedgePlace, number>([
    ...(['centre', 'princess', 'side'] as const).map((place) => [place, (base[place] / rest) * left] as const),
    ...further.map((seam) => [lineOf(seam.id), own(seam)] as const),
  ])
}

/** Shares of a half by whether it is taken in or let out. */
export interface PlaceShares {
  readonly takeIn: ReadonlyMap<WedgePlace, number>
  readonly letOut: ReadonlyMap<WedgePlace, number>
}

/** Shares with the centre's held, so that two halves which differ meet there: the others make up the rest in proportion. */
function withCentre(shares: ReadonlyMap<WedgePlace, number>, centre: number): ReadonlyMap<WedgePlace, number> {
  const others = 1 - (shares.get('centre') ?? 0)
  const scale = others > 0 ? (1 - centre) / others : 0
  return new Map([...shares].map(([place, share]) => [place, place === 'centre' ? centre : share * scale] as const))
}

/** What the centre of a half takes, taken in and let out. */
export interface CentreShare {
  readonly takeIn: number
  readonly letOut: number
}

/** Shares of a half; with `centre` its centre takes what that of the other half takes. */
export function sharesByPlace(zone: Zone, style: BodiceStyle, centre?: CentreShare): PlaceShares {
  const front = zone === 'front'
  const panels = style.panels[zone]
  const takes = centreTakes(front ? style.centreFront : style.centreBack, style.openingsTake[zone])
  const takeIn = front ? style.frontShares : style.backShares
  const own = {
    takeIn: placeShares(takeIn, panels, takes, ({ share }) => share),
    letOut: placeShares(style.letOut[zone] ?? takeIn, panels, takes, ({ share, letOut }) => letOut ?? share),
  }
  return centre === undefined ? own : { takeIn: withCentre(own.takeIn, centre.takeIn), letOut: withCentre(own.letOut, centre.letOut) }
}

/** What both centres take in a style. */
export function centreSharesOf(style: BodiceStyle): Readonly<Record<Zone, CentreShare>> {
  const of = (zone: Zone): CentreShare => {
    const { takeIn, letOut } = sharesByPlace(zone, style)
    return { takeIn: takeIn.get('centre') ?? 0, letOut: letOut.get('centre') ?? 0 }
  }
  return { front: of('front'), back: of('back') }
}
