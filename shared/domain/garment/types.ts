import type { BodyLevel, DraftBody, MeasuredValues, WearerFlags } from '../body/types'
import type { Passing } from '../body/passing'
import type { Caution } from '../cautions/types'
import type { GarmentDocument } from '../document/types'
import type { Alteration, Draft } from '../draft/types'
import type { LevelPass } from '../textile/getting-in'
import type { LayerCloth, LayerPlan, RingGeometry, RingSolution, TextileSettings } from '../textile/types'
import type { Mm } from '../units/brand'
import type { Problem } from '../units/result'

/** A cloth lot with its tested directions, as a garment needs it. */
export interface GarmentCloth {
  readonly id: string
  readonly code: string
  readonly name: string
  readonly archived: boolean
  readonly directions: readonly LayerCloth[]
  /** For a rigid layer of a cloth that nobody tested; absent: as its tests have it. */
  readonly thickness?: Mm
}

export interface GarmentInput {
  readonly document: GarmentDocument
  readonly measured: MeasuredValues
  readonly measuredOn: string | null
  readonly wearer: WearerFlags
  readonly cloths: readonly GarmentCloth[]
  readonly settings: TextileSettings
  /** ISO date, for the age of measurings and tests. */
  readonly today: string
}

/** A level on the way on and off, and what it passes there. */
export interface GarmentPass extends LevelPass {
  readonly over: Passing['over']
  readonly estimated: boolean
  readonly from: string
}

export interface GarmentSolution {
  readonly engine: string
  readonly body: DraftBody
  readonly levels: readonly BodyLevel[]
  readonly plans: readonly LayerPlan[]
  readonly ringInputs: readonly RingGeometry[]
  readonly rings: readonly RingSolution[]
  readonly draft: Draft
  /** Alterations whose role is gone: kept, listed, not applied. */
  readonly parked: readonly Alteration[]
  readonly cautions: readonly Caution[]
  /** Rounds of solve, draft, read and correct that were needed; settled or not. */
  readonly rounds: number
  readonly settled: boolean
  /** The way on and off, level by level. */
  readonly passes: readonly GarmentPass[]
  /** By level, what alterations add to the cut girth. */
  readonly alterationGirth: readonly { readonly level: string; readonly by: Mm }[]
}

/** Why a garment cannot be solved yet: which step is missing something. */
export interface GarmentProblem extends Problem {
  readonly step: 'body' | 'cloth' | 'layers' | 'draft'
}
