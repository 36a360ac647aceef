import type { EntryWay } from '../body/passing'
import type { LevelId } from '../body/types'
import type { Acknowledged } from '../cautions/acknowledge'
import type { Alteration, BodiceStyle } from '../draft/types'
import type { StructureChoice } from '../structure/types'
import type { Exertion } from '../textile/defaults'
import type { Stiffness } from '../textile/stiffness'
import type { ClothDirection, ClothState } from '../textile/types'
import type { Mm, NewtonPerMetre, Pascal } from '../units/brand'

export interface LayerChoice {
  readonly id: string
  readonly label: string
  readonly clothId: string
  readonly direction: ClothDirection
  readonly count: number
  readonly cutRatio: number
  /** Typed direction, degrees from the lengthwise, 0 to 90: the nearest tested one is taken in place of `direction`. */
  readonly angle?: number
  /** A layer without stretch: it gives up to its cut ratio and no further, and needs no stretch test. */
  readonly rigid?: boolean
  /** Id of the layer it is sewn to all over; absent: it floats between the seams. Said on the paper; nothing is computed from it. */
  readonly sewnTo?: string
}

/** A rigid width sewn to one layer alone, the others floating over it: a channel on the lining. Once round the body, in one half. */
export interface SewnChoice {
  readonly half: 'front' | 'back'
  readonly layer: string
  readonly width: Mm
}

export interface LevelChoice {
  readonly level: LevelId
  readonly hold: Pascal
  /** `cut` solves the cut from the hold; `tension` keeps a typed cut; `gap` solves the gap from cut and lacing tension. */
  readonly solve: 'cut' | 'tension' | 'gap'
  /** Typed cut girth, cloth and rigid widths without the gap; used by `tension` and `gap`. */
  readonly cut: Mm | null
  readonly lacingTension: NewtonPerMetre | null
  readonly rigidFront: Mm
  readonly rigidBack: Mm
  readonly gapFront: Mm
  readonly gapBack: Mm
  readonly squeeze: Mm
  /** How far the closures open here while it is put on, mm; null: as far as it stands open when worn. */
  readonly opening: Mm | null
  readonly sewn?: readonly SewnChoice[]
}

/** Zones that may have layers of their own, beside front and back. */
export type ExtraZone = 'side' | 'cups' | 'yoke' | 'sleeve' | 'waistPanel'

/** The layers of each zone. A zone that is absent has those of the half it lies in. */
export type ZoneChoices = { readonly front: readonly LayerChoice[]; readonly back: readonly LayerChoice[] } & {
  readonly [Zone in ExtraZone]?: readonly LayerChoice[]
}

/** How it is worn, put on and left. */
export interface GarmentUse {
  readonly water: boolean
  readonly strapless: boolean
  readonly exertion: Exertion
  readonly way: EntryWay
  /** `unsaid` until somebody says it; `part`: by the opening of each level. */
  readonly opens: 'unsaid' | 'closed' | 'part' | 'whole'
  /** The wearer can open it alone at the front. */
  readonly frontRelease: boolean
  /** Who stays within call to open it; empty when nobody is named. */
  readonly dresser: string
}

/** What the bench edits and the working copy stores. Everything computed is left out. */
export interface GarmentDocument {
  readonly schema: 1
  readonly measuringId: string | null
  readonly state: ClothState
  readonly use: GarmentUse
  readonly plans: ZoneChoices
  readonly levels: readonly LevelChoice[]
  readonly style: BodiceStyle
  readonly alterations: readonly Alteration[]
  /** Cautions seen and answered for. One whose figures have changed since no longer stands. */
  readonly acknowledged: readonly Acknowledged[]
  /** What a fitting taught of the cloth; null until one did, or once it was dropped. */
  readonly stiffness: Stiffness | null
  /** Bones and what is stiff of the closures; absent in documents older than it. */
  readonly structure?: StructureChoice
  /** The layers that the first standing alteration was made in, as `planKey` writes them; absent in documents older than this. */
  readonly alteredIn?: string
}
