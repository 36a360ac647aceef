import { allPieces } from '../draft/roles'
import type { LevelId } from '../body/types'
import { cautions } from '../cautions/registry'
import type { Caution } from '../cautions/types'
import type { GarmentDocument } from '../document/types'
import type { Draft, DraftPiece } from '../draft/types'
import { layBone } from '../structure/bone'
import { mostTensionAt, opensAt, readClosure, type ClosureReading } from '../structure/closure'
import { rigidWidths, type RigidWidths } from '../structure/rigid'
import { boneFindings } from '../structure/rules'
import { DEFAULT_STOCK } from '../structure/stock'
import type { BoneFault, BoneStock, LaidBone, StructureChoice } from '../structure/types'
import type { LayerPlan, RingSolution } from '../textile/types'
import { mm } from '../units/brand'

const NOTHING: StructureChoice = { bones: [], closures: { front: null, back: null } }

/** What is stiff of a document; nothing in documents older than it. */
export const structureOf = (document: Pick<GarmentDocument, 'structure'>): StructureChoice => document.structure ?? NOTHING

/** What the bones of a document may be cut from: the list that comes with the product, and the workroom's own that it keeps. */
export const stockOf = (document: Pick<GarmentDocument, 'structure'>): readonly BoneStock[] => [
  ...DEFAULT_STOCK,
  ...(structureOf(document).stock ?? []),
]

/** Whether bones or closures of the document take anything of its rings. */
export function isStructured(document: Pick<GarmentDocument, 'structure' | 'style'>): boolean {
  const { bones } = structureOf(document)
  const widths = closureWidths(document)
  return bones.some(({ on }) => on) || widths.front > 0 || widths.back > 0
}

function closureWidths({ structure, style }: Pick<GarmentDocument, 'structure' | 'style'>) {
  const { closures } = structureOf({ structure })
  return {
    front: mm(opensAt(style.centreFront) ? (closures.front?.rigid ?? 0) : 0),
    back: mm(opensAt(style.centreBack) ? (closures.back?.rigid ?? 0) : 0),
  }
}

/** The bones of a document on the pieces of a draft, and those that cannot lie where they are asked for. */
export function laidBones(
  document: Pick<GarmentDocument, 'structure'>,
  pieces: readonly DraftPiece[],
): { readonly bones: readonly LaidBone[]; readonly faults: readonly BoneFault[] } {
  const bones: LaidBone[] = []
  const faults: BoneFault[] = []
  for (const bone of structureOf(document).bones) {
    if (!bone.on) continue
    const laid = layBone(bone, pieces, stockOf(document))
    if (laid.ok) bones.push(laid.value)
    else faults.push(laid.problem)
  }
  return { bones, faults }
}

/** Rigid widths that bones and closures bring to every level, mm once round. */
export const rigidOf = (
  document: Pick<GarmentDocument, 'structure' | 'style'>,
  pieces: readonly DraftPiece[],
  levels: readonly LevelId[],
): readonly RigidWidths[] => rigidWidths(levels, laidBones(document, pieces).bones, closureWidths(document))

/** The closures of a document on its draft, read with the gaps and tensions of its rings. */
export function closuresOf(
  { structure, style }: Pick<GarmentDocument, 'structure' | 'style'>,
  draft: Draft,
  rings: readonly RingSolution[],
): readonly ClosureReading[] {
  const { closures } = structureOf({ structure })
  return (['front', 'back'] as const).flatMap((half) => {
    const choice = closures[half]
    if (choice === null) return []
    const levels = rings.flatMap((ring) => {
      const y = draft.frame[`level-${ring.level}`]?.y
      return y === undefined
        ? []
        : [{ level: ring.level, name: ring.name, y, gap: half === 'front' ? ring.gapFront : ring.gapBack, tension: ring.tension }]
    })
    const reading = readClosure(half, half === 'front' ? style.centreFront : style.centreBack, choice, draft.pieces, levels)
    return reading ? [reading] : []
  })
}

/** Bones this near to a laced edge stand beside its eyelets, mm. Setting. */
const BESIDE_EYELETS = 60
/** A covering layer thinner than this does not hide a bone, mm. Setting, common practice. */
const THIN = 0.5

function bonesBesideLacing(half: 'front' | 'back', bones: readonly LaidBone[], pieces: readonly DraftPiece[]): number {
  const piece = pieces.find((one) => one.zone === half && one.edges.some((edge) => edge.id === 'centre'))
  if (!piece) return 0
  const near = ({ crossings }: LaidBone) =>
    crossings.length > 0 &&
    crossings.every(({ level, at }) => {
      const across = piece.levels.find((one) => one.level === level)
      return across !== undefined && at.x - across.from.x <= BESIDE_EYELETS
    })
  return bones.filter((bone) => bone.piece === piece.id && near(bone)).length
}

/** How many layers cover a bone outwards, and how thick they are. */
function coverOf(bone: LaidBone, plans: readonly LayerPlan[]): { readonly count: number; readonly thickness: number } | null {
  const plan = plans.find((one) => one.zone === bone.zone)
  if (!plan || bone.under === null) return null
  let count = 0
  let thickness = 0
  for (const layer of plan.layers) {
    for (let i = 0; i < layer.count && count < bone.under; i++) {
      count++
      thickness += layer.cloth.thickness
    }
  }
  return { count, thickness }
}

/** Cautions of bones and closures. */
export function structureCautions(facts: {
  readonly document: GarmentDocument
  readonly draft: Draft
  readonly rings: readonly RingSolution[]
  readonly plans: readonly LayerPlan[]
}): readonly Caution[] {
  const { document, draft, rings, plans } = facts
  const { bones, faults } = laidBones(document, allPieces(draft))
  const found: Caution[] = faults.map((fault) => cautions.boneNotLaid({ kind: 'garment' }, fault))
  const makers = {
    'bone-near-armhole': cautions.boneNearArmhole,
    'bone-near-edge': cautions.boneNearEdge,
    'bones-close': cautions.bonesClose,
    'bone-bends-tight': cautions.boneBendsTight,
  } as const
  for (const { code, piece, edge, ...rest } of boneFindings(bones, allPieces(draft)))
    found.push(makers[code]({ kind: 'piece', piece, ...(edge ? { edge } : {}) }, rest))
  for (const bone of bones) {
    const cover = coverOf(bone, plans)
    if (cover && cover.count <= 1 && cover.thickness < THIN)
      found.push(cautions.boneRidge({ kind: 'piece', piece: bone.piece }, { name: bone.name, cover: cover.count }))
  }
  if (document.use.water)
    for (const stock of new Set(bones.filter((bone) => bone.stock.rusts).map((bone) => bone.stock.name)))
      found.push(cautions.boneRusts({ kind: 'garment' }, { stock }))
  for (const half of ['front', 'back'] as const) {
    const kind = half === 'front' ? document.style.centreFront : document.style.centreBack
    if (kind === 'lacing') {
      const beside = bonesBesideLacing(half, bones, draft.pieces)
      if (beside < 2) found.push(cautions.lacingUnboned({ kind: 'garment' }, { half, bones: beside }))
    }
    if (kind === 'hook-tape') found.push(cautions.hookTapeUnderlap({ kind: 'garment' }, { half }))
  }
  for (const closure of closuresOf(document, draft, rings)) {
    const choice = structureOf(document).closures[closure.half]!
    if (closure.kind !== 'hook-tape' && closure.kind !== 'hooks') continue
    const limit = mostTensionAt(choice.pitch)
    for (const { level, name, tension } of closure.pulls)
      if (tension > limit) found.push(cautions.closurePull({ kind: 'ring', level }, { ring: name, tension, limit }))
  }
  return found
}
