import type { ExtraZone, GarmentDocument, LayerChoice } from './types'

/** What a preset asks of one layer; which cloth it is stays the drafter's choice. */
export interface PresetLayer {
  readonly label: string
  readonly count: number
  readonly cutRatio: number
  readonly rigid?: true
  /** Label of the layer it is sewn to all over. */
  readonly sewnTo?: string
}

/** A layer plan to start from: layers outermost first. Zones left out have those of front and back. */
export interface PlanPreset {
  readonly id: string
  readonly name: string
  readonly words: string
  readonly front: readonly PresetLayer[]
  /** Absent: as in front. */
  readonly back?: readonly PresetLayer[]
  readonly zones?: Readonly<Partial<Record<ExtraZone, readonly PresetLayer[]>>>
}

const layer = (label: string, count = 1, more: Partial<PresetLayer> = {}): PresetLayer => ({ label, count, cutRatio: 1, ...more })

/** Plans of our own to start from: common practice of workrooms, not a recommendation for one cloth. */
export const PLAN_PRESETS: readonly PlanPreset[] = [
  {
    id: 'mock-up',
    name: 'Mock-up, two layers',
    words: 'Two layers of one cheap cloth, to fit on.',
    front: [layer('mock-up', 2)],
  },
  {
    id: 'swim',
    name: 'Swim, shell and lining',
    words: 'Two layers that dry; look at it wet as well.',
    front: [layer('shell'), layer('lining')],
  },
  {
    id: 'held',
    name: 'Held stage bodice, four layers',
    words: 'Shell, two layers of power net that hold, lining.',
    front: [layer('shell'), layer('power net', 2), layer('lining')],
  },
  {
    id: 'held-front',
    name: 'Held front, lighter back',
    words: 'Power net in front alone: the same tension runs round, the front gives less.',
    front: [layer('shell'), layer('power net', 2), layer('lining')],
    back: [layer('shell'), layer('lining')],
  },
  {
    id: 'waist-panel',
    name: 'Shell and lining, waist panel',
    words: 'Two layers, and a panel of power net round the waist on the lining.',
    front: [layer('shell'), layer('lining')],
    zones: { waistPanel: [layer('shell'), layer('power net', 1, { sewnTo: 'lining' }), layer('lining')] },
  },
  {
    id: 'sheer-yoke',
    name: 'Three layers, sheer yoke',
    words: 'Shell, power net and lining; one layer above.',
    front: [layer('shell'), layer('power net'), layer('lining')],
    zones: { yoke: [layer('yoke')] },
  },
  {
    id: 'fixed-lining',
    name: 'Shell over a lining without stretch',
    words: 'The lining is cut wider, gives so far and stops: a bodice that is laced, not pulled on.',
    front: [layer('shell'), layer('lining', 1, { cutRatio: 1.15, rigid: true })],
  },
]

/**
 * The plans of a preset. A layer keeps the cloth that a layer of the same label has now; the outermost and the innermost keep theirs;
 * what is left takes the cloth given. Ids are new, made from `prefix`; the same label has the same id in front and back.
 */
export function plansOfPreset(
  preset: PlanPreset,
  now: GarmentDocument['plans'],
  fallback: Pick<LayerChoice, 'clothId' | 'direction'>,
  prefix: string,
): GarmentDocument['plans'] {
  const standing = [...now.front, ...now.back]
  const outermost = now.front[0] ?? fallback
  const innermost = now.front.at(-1) ?? fallback
  const make = (layers: readonly PresetLayer[], zone: string): readonly LayerChoice[] => {
    const idOf = (label: string) => `${prefix}-${zone}-${layers.findIndex((one) => one.label === label)}`
    return layers.map((one, index): LayerChoice => {
      const same = standing.find((other) => other.label === one.label)
      const like = same ?? (index === 0 ? outermost : index === layers.length - 1 ? innermost : fallback)
      return {
        id: idOf(one.label),
        label: one.label,
        clothId: like.clothId,
        direction: like.direction,
        count: one.count,
        cutRatio: one.cutRatio,
        ...(same?.angle === undefined ? {} : { angle: same.angle }),
        ...(one.rigid ? { rigid: true } : {}),
        ...(one.sewnTo === undefined ? {} : { sewnTo: idOf(one.sewnTo) }),
      }
    })
  }
  return {
    front: make(preset.front, 'body'),
    back: preset.back ? make(preset.back, 'back') : make(preset.front, 'body'),
    ...Object.fromEntries(Object.entries(preset.zones ?? {}).map(([zone, layers]) => [zone, make(layers, zone)])),
  }
}
