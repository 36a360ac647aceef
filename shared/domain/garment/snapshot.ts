import type { BodyLevel, DraftBody, MeasuredValues, WearerFlags } from '../body/types'
import { cautionForMaker } from '../cautions/registry'
import type { Caution } from '../cautions/types'
import type { GarmentDocument } from '../document/types'
import type { Alteration, Draft } from '../draft/types'
import type { LayerCloth, LayerPlan, RingGeometry, RingSolution, TextileSettings } from '../textile/types'
import type { GarmentInput, GarmentSolution } from './types'

/** A ring as a version keeps it for everyone: cut widths and hold, nothing that is the body's own. */
export type KeptRing = Pick<
  RingSolution,
  | 'level'
  | 'name'
  | 'mode'
  | 'cut'
  | 'rigidFront'
  | 'rigidBack'
  | 'gapFront'
  | 'gapBack'
  | 'band'
  | 'pressure'
  | 'governs'
  | 'assumed'
  | 'extrapolated'
> & { readonly widths: readonly { readonly half: 'front' | 'back'; readonly width: number }[] }

/** What of a version stays when the wearer's body is erased: enough to print and to sew it. */
export interface VersionKept {
  readonly engine: string
  readonly document: GarmentDocument
  readonly plans: readonly LayerPlan[]
  readonly settings: TextileSettings
  readonly draft: Draft
  readonly parked: readonly Alteration[]
  readonly rings: readonly KeptRing[]
  readonly cautions: readonly Caution[]
  readonly settled: boolean
}

/** What of a version is the wearer's: blanked by erasure. */
export interface VersionBody {
  readonly measuredOn: string | null
  readonly measured: MeasuredValues
  readonly body: DraftBody
  readonly levels: readonly BodyLevel[]
  readonly ringInputs: readonly RingGeometry[]
  readonly rings: readonly RingSolution[]
  /** In the drafter's words, which may name the wearer's condition. */
  readonly cautions: readonly Caution[]
}

function keptRing(ring: RingSolution): KeptRing {
  const { level, name, mode, cut, rigidFront, rigidBack, gapFront, gapBack, band, pressure, governs, assumed, extrapolated } = ring
  const widths = ring.segments.map(({ half, width }) => ({ half, width }))
  return { level, name, mode, cut, rigidFront, rigidBack, gapFront, gapBack, band, pressure, governs, assumed, extrapolated, widths }
}

/** Cautions as everyone may read them for ever: in the maker's words, without those that speak of the body alone. */
export function plainCautions(cautions: readonly Caution[]): readonly Caution[] {
  return cautions.filter((caution) => caution.place.kind !== 'body').map(cautionForMaker)
}

/** A solved garment parted into what a version keeps and what is the wearer's body. Complete: nothing is left to references. */
export function splitBody(input: GarmentInput, solution: GarmentSolution): { readonly kept: VersionKept; readonly body: VersionBody } {
  const { engine, plans, draft, parked, cautions, settled, body, levels, ringInputs, rings } = solution
  return {
    kept: {
      engine,
      document: input.document,
      plans,
      settings: input.settings,
      draft,
      parked,
      rings: rings.map(keptRing),
      cautions: plainCautions(cautions),
      settled,
    },
    body: { measuredOn: input.measuredOn, measured: input.measured, body, levels, ringInputs, rings, cautions },
  }
}

/**
 * The input that a version was solved from, as far as it keeps it: its own plans, settings and measured body, so that a cloth tested again
 * or a new measuring changes nothing of it. Flags of the wearer are not kept in a version: those of today are given.
 */
export function inputOfVersion(kept: VersionKept, body: VersionBody, wearer: WearerFlags, today: string): GarmentInput {
  const cloths = new Map<string, LayerCloth[]>()
  for (const { cloth } of kept.plans.flatMap((plan) => plan.layers)) {
    const known = cloths.get(cloth.clothId) ?? []
    if (!known.some((one) => one.direction === cloth.direction && one.angle === cloth.angle && one.state === cloth.state)) known.push(cloth)
    cloths.set(cloth.clothId, known)
  }
  return {
    document: kept.document,
    measured: body.measured,
    measuredOn: body.measuredOn,
    wearer,
    cloths: [...cloths].map(([id, directions]) => ({ id, code: '', name: directions[0]!.name, archived: false, directions })),
    settings: kept.settings,
    today,
  }
}
