import type { GarmentDocument, LayerChoice } from './types'

const layerKey = ({ clothId, direction, angle, count, cutRatio, rigid }: LayerChoice): string =>
  [clothId, angle ?? direction, count, cutRatio, ...(rigid ? ['rigid'] : [])].join(' ')

/** The layers of a garment in one line: the same for two documents whose cloth pulls the same. Labels and ids are left out. */
export function planKey(plans: GarmentDocument['plans']): string {
  return Object.entries(plans)
    .filter(([, layers]) => layers.length > 0)
    .sort(([one], [other]) => (one < other ? -1 : 1))
    .map(([zone, layers]) => `${zone}: ${layers.map(layerKey).join(', ')}`)
    .join('; ')
}
