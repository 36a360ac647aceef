import type { Working, WorkingInput } from '../units/working'
import type { ClosureReading } from './closure'
import { EYELET_FROM_END } from './lacing'
import { CHANNEL_OVER_BONE, stockStiffness, TIP_CLEARANCE } from './stock'
import type { ClosureChoice, LaidBone } from './types'

const input = (symbol: string, label: string, value: number, unit: WorkingInput['unit'], from: WorkingInput['from']): WorkingInput => ({
  symbol,
  label,
  value,
  unit,
  from,
})

/** The working behind the length a bone is cut to. */
export function cutWorking(bone: LaidBone): Working {
  return {
    title: `${bone.name}: cut length`,
    formula: 'cut = channel - 2 tip',
    inputs: [
      input('channel', 'Channel, along its curve', bone.channel, 'mm', 'computed'),
      input('tip', 'Clearance at each tip', TIP_CLEARANCE, 'mm', 'assumed'),
    ],
    result: { value: bone.cut, unit: 'mm' },
    source: 'tip clearance by common practice, from memory (setting)',
    notes: [
      'Insert, mark, then cut: the channel grows as the bone goes in.',
      `Its channel is ${bone.channelWidth.toFixed(0)} mm wide: the bone and ${CHANNEL_OVER_BONE} mm.`,
      `Stiffness across its thickness ${(stockStiffness(bone.stock) * 1000).toFixed(1)} mN m² (E w t³ / 12, or as measured).`,
    ],
  }
}

/** The working behind what a bone takes of a level. */
export function crossingWorking(bone: LaidBone, level: string, name: string): Working | null {
  const crossing = bone.crossings.find((one) => one.level === level)
  if (!crossing) return null
  return {
    title: `${bone.name}: rigid width at the ${name.toLowerCase()}`,
    formula: 'count × channel / cos(tilt)',
    inputs: [
      input('count', 'Once in each half, or once at a centre', bone.count, 'count', 'computed'),
      input('channel', 'Width of the channel', bone.channelWidth, 'mm', 'computed'),
      input('tilt', 'Off upright', (crossing.tilt * 180) / Math.PI, 'degree', 'computed'),
    ],
    result: { value: crossing.width * bone.count, unit: 'mm' },
    source: 'derived',
    notes: ['What is rigid does not stretch: the cloth beside it is cut so that the hold stays as asked for.'],
  }
}

/** The working behind the cord of a lacing. */
export function cordWorking(closure: ClosureReading, choice: ClosureChoice): Working {
  return {
    title: `Cord at the centre ${closure.half}`,
    formula: '2 (H + sum sqrt(H² + V²) + L); with one H and V: 2 (H + (P - 1) sqrt(H² + V²) + L)',
    inputs: [
      input('P', 'Pairs of eyelets', closure.eyelets.length, 'count', 'computed'),
      input('L', 'Left free at each end', choice.ends, 'mm', 'chosen'),
      input('edge', 'Length of the edge', closure.length, 'mm', 'computed'),
    ],
    result: { value: closure.cord ?? 0, unit: 'mm' },
    source: 'published shoelace length formulas, read',
    notes: [
      'H is the gap at each pair and half of the rigid width on each side; V the way to the next pair.',
      `The first and the last eyelet stand ${EYELET_FROM_END} mm from the ends.`,
      'Take it longer where it has to be laced wide open without being drawn out.',
    ],
  }
}
