import type { LevelId } from '../body/types'
import type { Acknowledged } from '../cautions/acknowledge'
import { edgeWords, lowerFirst, pieceWords } from '../draft/roles'
import type { Alteration, BodiceStyle, GirthAlteration, LengthAlteration, MoveAlteration, PointRole } from '../draft/types'
import type { Bone, BoneStock, ClosureChoice, StructureChoice } from '../structure/types'
import type { Stiffness } from '../textile/stiffness'
import type { ClothState } from '../textile/types'
import { mm, type Mm } from '../units/brand'
import { freshLevel } from './fresh'
import { planKey } from './plan-key'
import type { GarmentDocument, LayerChoice, LevelChoice } from './types'

export type Zone = keyof GarmentDocument['plans']

/** Everything the bench can do to a document. One command is one undo step. */
export type Command =
  | { readonly kind: 'choose-measuring'; readonly measuringId: string | null }
  | { readonly kind: 'set-state'; readonly state: ClothState }
  | { readonly kind: 'set-use'; readonly use: Partial<GarmentDocument['use']> }
  | { readonly kind: 'set-layers'; readonly zone: Zone | 'both'; readonly layers: readonly LayerChoice[] }
  /** The layers of all zones at once: a preset. */
  | { readonly kind: 'set-plans'; readonly plans: GarmentDocument['plans']; readonly label: string }
  | { readonly kind: 'set-level'; readonly level: LevelId | 'all'; readonly patch: Partial<Omit<LevelChoice, 'level'>> }
  | { readonly kind: 'set-style'; readonly patch: Partial<BodiceStyle> }
  | { readonly kind: 'set-stiffness'; readonly stiffness: Stiffness | null }
  | { readonly kind: 'acknowledge'; readonly acknowledged: Acknowledged }
  | { readonly kind: 'withdraw-acknowledgement'; readonly key: string }
  | {
      readonly kind: 'move-point'
      readonly role: PointRole
      readonly dx: Mm
      readonly dy: Mm
      readonly carry: boolean
      readonly id: string
    }
  | { readonly kind: 'set-move'; readonly role: PointRole; readonly dx: Mm; readonly dy: Mm; readonly carry: boolean; readonly id: string }
  /** Further alterations after those that stand: a let-out, a lengthening, what trues a seam. One step, however many. */
  | { readonly kind: 'add-alterations'; readonly alterations: readonly Alteration[]; readonly label: string }
  | { readonly kind: 'change-alteration'; readonly id: string; readonly patch: AlterationPatch }
  | { readonly kind: 'remove-alteration'; readonly id: string }
  | { readonly kind: 'order-alteration'; readonly id: string; readonly to: number }
  /** Bones added or, by their ids, in place of those that stand. */
  | { readonly kind: 'set-bones'; readonly bones: readonly Bone[]; readonly label: string; readonly stock?: readonly BoneStock[] }
  | { readonly kind: 'remove-bone'; readonly id: string }
  | { readonly kind: 'set-closure'; readonly half: 'front' | 'back'; readonly closure: ClosureChoice | null }
  /** A whole document in place of this one: a recut, a trial. */
  | { readonly kind: 'take-over'; readonly document: GarmentDocument; readonly label: string }

/** What may be changed of an alteration that stands; what its kind does not have is left out. */
export type AlterationPatch = Partial<
  Pick<MoveAlteration, 'name' | 'on' | 'dx' | 'dy' | 'carry'> & Pick<GirthAlteration, 'amount' | 'seams'> & Pick<LengthAlteration, 'by'>
>

/** What a command changed, key by key, so that it can be undone and redone without the command. */
export interface DocumentDiff {
  readonly label: string
  readonly changes: readonly DocumentChange[]
}

export type DocumentChange = {
  [Key in keyof GarmentDocument]-?: { readonly key: Key; readonly before: GarmentDocument[Key]; readonly after: GarmentDocument[Key] }
}[keyof GarmentDocument]

/** True when both name the same point or handle. */
export function sameRole(a: PointRole, b: PointRole): boolean {
  return a.piece === b.piece && a.edge === b.edge && a.node === b.node && a.handle === b.handle
}

/** A point or handle in the trade's words: `side front, princess seam at the bust`. */
export function roleWords(role: PointRole): string {
  const piece = lowerFirst(pieceWords(role.piece))
  const edge = role.edge === 'centre' ? 'centre edge' : edgeWords(role.edge)
  const handle = role.handle ? `, curve ${role.handle}` : ''
  return `${piece}, ${edge} at ${role.node.replaceAll('-', ' ')}${handle}`
}

/**
 * The document after a command, and the difference. Pure; the document given stays as it is. A command that names what is
 * not there leaves the document unchanged and gives an empty difference.
 */
export function applyCommand(
  document: GarmentDocument,
  command: Command,
): { readonly document: GarmentDocument; readonly diff: DocumentDiff } {
  const next = changed(document, command)
  return { document: next, diff: { label: commandWords(command), changes: differences(document, next) } }
}

/** A zone in the trade's words. */
export const zoneWords = (zone: Zone): string => (zone === 'waistPanel' ? 'waist panel' : zone)

/** The same difference the other way round. */
export function invertDiff(diff: DocumentDiff): DocumentDiff {
  return {
    label: diff.label,
    changes: diff.changes.map((change) => ({ key: change.key, before: change.after, after: change.before }) as DocumentChange),
  }
}

/** The document with a difference replayed on it. */
export function replayDiff(document: GarmentDocument, diff: DocumentDiff): GarmentDocument {
  return diff.changes.reduce((current, change) => ({ ...current, [change.key]: change.after }), document)
}

function changed(document: GarmentDocument, command: Command): GarmentDocument {
  switch (command.kind) {
    case 'choose-measuring':
      return { ...document, measuringId: command.measuringId }
    case 'set-state':
      return { ...document, state: command.state }
    case 'set-use':
      return { ...document, use: { ...document.use, ...command.use } }
    case 'set-layers':
      return { ...document, plans: withLayers(document.plans, command.zone, command.layers) }
    case 'set-plans':
      return { ...document, plans: command.plans }
    case 'set-level':
      return { ...document, levels: withLevel(document.levels, command.level, command.patch) }
    case 'set-style':
      return styled(document, command.patch)
    case 'acknowledge':
      return {
        ...document,
        acknowledged: [...document.acknowledged.filter((one) => one.key !== command.acknowledged.key), command.acknowledged],
      }
    case 'withdraw-acknowledgement':
      return { ...document, acknowledged: document.acknowledged.filter((one) => one.key !== command.key) }
    case 'set-stiffness':
      return { ...document, stiffness: command.stiffness }
    case 'move-point':
    case 'set-move':
      return {
        ...document,
        alterations: moved(document.alterations, command),
        ...(document.alterations.length === 0 ? { alteredIn: planKey(document.plans) } : {}),
      }
    case 'add-alterations':
      return {
        ...document,
        alterations: [...document.alterations, ...command.alterations],
        ...(document.alterations.length === 0 ? { alteredIn: planKey(document.plans) } : {}),
      }
    case 'change-alteration':
      return {
        ...document,
        alterations: document.alterations.map((one) => (one.id === command.id ? patched(one, command.patch) : one)),
      }
    case 'remove-alteration':
      return { ...document, alterations: document.alterations.filter((one) => one.id !== command.id) }
    case 'order-alteration':
      return { ...document, alterations: ordered(document.alterations, command.id, command.to) }
    case 'set-bones':
      return withStructure(document, ({ bones, stock = [] }) => ({
        ...(command.stock?.length
          ? { stock: [...stock.filter((one) => !command.stock!.some(({ id }) => id === one.id)), ...command.stock] }
          : {}),
        bones: [
          ...bones.map((one) => command.bones.find((next) => next.id === one.id) ?? one),
          ...command.bones.filter((next) => !bones.some((one) => one.id === next.id)),
        ],
      }))
    case 'remove-bone':
      return withStructure(document, ({ bones }) => ({ bones: bones.filter((one) => one.id !== command.id) }))
    case 'set-closure':
      return withStructure(document, ({ closures }) => ({ closures: { ...closures, [command.half]: command.closure } }))
    case 'take-over':
      return command.document
  }
}

/** A level that the document does not have yet is put in as a fresh one: a top edge before it is chosen. */
function withLevel(
  levels: readonly LevelChoice[],
  level: LevelId | 'all',
  patch: Partial<Omit<LevelChoice, 'level'>>,
): readonly LevelChoice[] {
  if (level !== 'all' && !levels.some((own) => own.level === level)) return [{ ...freshLevel(level), ...patch }, ...levels]
  return levels.map((own) => (level === 'all' || own.level === level ? { ...own, ...patch } : own))
}

/** A style taken over; with a top edge the garment is strapless and has a level there. The level is kept for the day it is strapless again. */
function styled(document: GarmentDocument, patch: Partial<BodiceStyle>): GarmentDocument {
  const style = { ...document.style, ...patch }
  if (patch.top === undefined) return { ...document, style }
  const has = document.levels.some(({ level }) => level === 'top-edge')
  return {
    ...document,
    style,
    use: { ...document.use, strapless: style.top !== null },
    levels: style.top === null || has ? document.levels : [freshLevel('top-edge'), ...document.levels],
  }
}

function withStructure(document: GarmentDocument, change: (now: StructureChoice) => Partial<StructureChoice>): GarmentDocument {
  const now = document.structure ?? { bones: [], closures: { front: null, back: null } }
  return { ...document, structure: { ...now, ...change(now) } }
}

/** A zone beside front and back is there while it has layers. */
function withLayers(plans: GarmentDocument['plans'], zone: Zone | 'both', layers: readonly LayerChoice[]): GarmentDocument['plans'] {
  if (zone === 'both') return { ...plans, front: layers, back: layers }
  if (zone === 'front' || zone === 'back' || layers.length > 0) return { ...plans, [zone]: layers }
  const { [zone]: _without, ...others } = plans
  return others
}

function patched(alteration: Alteration, patch: AlterationPatch): Alteration {
  const own = Object.entries(patch).filter(([key]) => key in alteration)
  return { ...alteration, ...Object.fromEntries(own) }
}

type MoveCommand = Extract<Command, { kind: 'move-point' | 'set-move' }>

/** One alteration a point and way of carrying: a further move of the same point adds to it, an exact one replaces it. */
function moved(alterations: readonly Alteration[], command: MoveCommand): readonly Alteration[] {
  const standing = alterations.find(
    (one): one is MoveAlteration => one.kind === 'move' && one.on && one.carry === command.carry && sameRole(one.role, command.role),
  )
  if (standing) {
    const base = command.kind === 'set-move' ? { dx: 0, dy: 0 } : standing
    const dx = mm(base.dx + command.dx)
    const dy = mm(base.dy + command.dy)
    if (dx === 0 && dy === 0) return alterations.filter((one) => one !== standing)
    return alterations.map((one) => (one === standing ? { ...one, dx, dy } : one))
  }
  if (command.dx === 0 && command.dy === 0) return alterations
  const { id, role, dx, dy, carry } = command
  return [...alterations, { id, kind: 'move', name: roleWords(role), role, dx, dy, carry, on: true }]
}

function ordered(alterations: readonly Alteration[], id: string, to: number): readonly Alteration[] {
  const one = alterations.find((candidate) => candidate.id === id)
  if (!one) return alterations
  const rest = alterations.filter((candidate) => candidate !== one)
  const place = Math.max(0, Math.min(rest.length, to))
  return [...rest.slice(0, place), one, ...rest.slice(place)]
}

function differences(before: GarmentDocument, after: GarmentDocument): readonly DocumentChange[] {
  return (Object.keys(after) as (keyof GarmentDocument)[])
    .filter((key) => before[key] !== after[key] && JSON.stringify(before[key]) !== JSON.stringify(after[key]))
    .map((key) => ({ key, before: before[key], after: after[key] }) as DocumentChange)
}

function commandWords(command: Command): string {
  switch (command.kind) {
    case 'choose-measuring':
      return 'measuring'
    case 'set-state':
      return 'dry or wet'
    case 'set-use':
      return 'use'
    case 'set-layers':
      return command.zone === 'both' ? 'layers' : `layers, ${zoneWords(command.zone)}`
    case 'set-level':
      return command.level === 'all' ? 'all levels' : command.level.replace('-', ' ')
    case 'set-style':
      return 'style'
    case 'acknowledge':
    case 'withdraw-acknowledgement':
      return 'caution acknowledged'
    case 'set-stiffness':
      return 'stiffness learnt'
    case 'move-point':
    case 'set-move':
      return roleWords(command.role)
    case 'change-alteration':
      return 'alteration'
    case 'remove-alteration':
      return 'alteration removed'
    case 'order-alteration':
      return 'order of alterations'
    case 'remove-bone':
      return 'bone removed'
    case 'set-closure':
      return `closure at the centre ${command.half}`
    case 'set-plans':
    case 'set-bones':
    case 'add-alterations':
    case 'take-over':
      return command.label
  }
}
