import type { MeasurementKey } from './types'

export type MeasurementUnit = 'length' | 'degree' | 'mass' | 'year'
export type MeasurementGroup = 'girths' | 'lengths' | 'widths' | 'other'

/** What the product knows of a measurement before anybody has taken it. */
export interface MeasurementEntry {
  readonly key: MeasurementKey
  /** Name by ISO 8559-1 where that standard has one (names from memory), else the trade's. */
  readonly name: string
  readonly unit: MeasurementUnit
  readonly group: MeasurementGroup
  /** Needed to draft, or optional. */
  readonly needed: boolean
  /** One line: how the tape runs. */
  readonly how: string
  /** The landmarks it hangs on, for the drawing. */
  readonly landmark: string
  /** Usual adult range in the stored unit (mm, degrees, kg, years). Outside it a caution asks to measure again. */
  readonly range: { readonly low: number; readonly high: number; readonly source: string; readonly memory: boolean }
}

const ANSUR_2 = 'ANSUR II women, P1 to P99 widened by half the span'
const ANSUR_88 = 'ANSUR 1988 women, mean ± 2.33 SD widened by half the span'
const MEMORY = 'from memory, order of magnitude'

/** P1 and P99 widened by half the span between them, and further to take in the ready size chart where it reaches beyond. */
const surveyed = (p1: number, p99: number, chart?: { readonly low?: number; readonly high?: number }) => {
  const wider = (p99 - p1) / 2
  return {
    low: Math.round(Math.min(p1 - wider, chart?.low ?? Infinity)),
    high: Math.round(Math.max(p99 + wider, chart?.high ?? 0)),
    source: chart ? `${ANSUR_2}, and the ready size chart` : ANSUR_2,
    memory: false,
  }
}

const Z99 = 2.33

/** The same from a mean and a standard deviation of the survey of 1988, taken as normal. */
const surveyed88 = (mean: number, deviation: number, chart?: { readonly low?: number; readonly high?: number }) => ({
  ...surveyed(mean - Z99 * deviation, mean + Z99 * deviation, chart),
  source: chart ? `${ANSUR_88}, and the ready size chart` : ANSUR_88,
})

const remembered = (low: number, high: number) => ({ low, high, source: MEMORY, memory: true })

type Row = Omit<MeasurementEntry, 'needed' | 'unit' | 'group'>

const girth = (needed: boolean, row: Row): MeasurementEntry => ({ ...row, needed, unit: 'length', group: 'girths' })
const length = (needed: boolean, row: Row): MeasurementEntry => ({ ...row, needed, unit: 'length', group: 'lengths' })
const width = (needed: boolean, row: Row): MeasurementEntry => ({ ...row, needed, unit: 'length', group: 'widths' })
const other = (unit: MeasurementUnit, row: Row): MeasurementEntry => ({ ...row, needed: false, unit, group: 'other' })

/** All measurements in the order in which they are taken: girths, lengths, widths, the rest; the needed ones of a group first. */
export const MEASUREMENT_CATALOGUE: readonly MeasurementEntry[] = [
  girth(true, {
    key: 'bustGirth',
    name: 'Bust girth',
    how: 'Level round the body over the fullest of the bust, breathing calmly, tape close and not drawn in.',
    landmark: 'Bust points, level all round.',
    range: surveyed(784, 1160),
  }),
  girth(true, {
    key: 'underbustGirth',
    name: 'Underbust girth',
    how: 'Level round the ribs right under the bust, breathing calmly.',
    landmark: 'Crease under the bust, level all round.',
    range: surveyed88(769.7, 51, { high: 1080 }),
  }),
  girth(true, {
    key: 'waistGirth',
    name: 'Waist girth (natural waist)',
    how: 'Round the narrowest of the trunk, or where it bends sideways; not at the navel.',
    landmark: 'Natural waist, between the lowest rib and the hip bone.',
    range: surveyed88(725.5, 63, { high: 1180 }),
  }),
  girth(true, {
    key: 'hipGirth',
    name: 'Hip girth',
    how: 'Level round the fullest of the seat.',
    landmark: 'Fullest of the seat, seen from the side.',
    range: surveyed(867, 1206),
  }),
  girth(true, {
    key: 'neckBaseGirth',
    name: 'Neck base girth',
    how: 'Round the base of the neck over the nape bone, the neck-shoulder points and the pit of the neck; tape on edge.',
    landmark: 'Nape bone, neck-shoulder points, front neck point.',
    range: surveyed(329, 423),
  }),
  girth(false, {
    key: 'navelWaistGirth',
    name: 'Waist girth at the navel',
    how: 'Level round the body at the navel; this is not the natural waist.',
    landmark: 'Navel, level all round.',
    range: surveyed(665, 1115),
  }),
  girth(false, {
    key: 'highHipGirth',
    name: 'High hip girth',
    how: 'Level round the body half-way between natural waist and hip.',
    landmark: 'Half-way between natural waist and hip level.',
    range: remembered(640, 1350),
  }),
  girth(false, {
    key: 'upperBustGirth',
    name: 'Upper bust girth',
    how: 'Round the body under the arms, over the bust in front, high at the back.',
    landmark: 'Arm pits, above the bust.',
    range: remembered(680, 1250),
  }),
  girth(false, {
    key: 'armscyeGirth',
    name: 'Armscye girth',
    how: 'Round the arm’s root over the shoulder point and under the arm, arm hanging.',
    landmark: 'Shoulder point and arm pit.',
    range: surveyed88(371.3, 23, { high: 530 }),
  }),
  girth(false, {
    key: 'trunkGirth',
    name: 'Vertical trunk girth',
    how: 'From one shoulder down the front, between the legs and up the back to the same place.',
    landmark: 'Middle of the shoulder, crotch.',
    range: surveyed(1394, 1745),
  }),
  girth(false, {
    key: 'shoulderGirth',
    name: 'Shoulder girth',
    how: 'Level round both arms and the chest at the widest of the shoulders, arms hanging.',
    landmark: 'Widest of the upper arms.',
    range: remembered(850, 1400),
  }),
  girth(false, {
    key: 'headGirth',
    name: 'Head girth',
    how: 'Round the head over the brow and the back of the head.',
    landmark: 'Brow, back of the head.',
    range: remembered(500, 630),
  }),
  girth(false, {
    key: 'handGirth',
    name: 'Hand girth',
    how: 'Round the knuckles with the thumb laid in, as a hand goes through a sleeve.',
    landmark: 'Knuckles and thumb.',
    range: remembered(160, 280),
  }),
  girth(false, {
    key: 'thighGirth',
    name: 'Thigh girth',
    how: 'Level round the thigh under the seat, standing.',
    landmark: 'Crease under the seat.',
    range: remembered(420, 880),
  }),
  girth(false, {
    key: 'upperArmGirth',
    name: 'Upper arm girth',
    how: 'Round the fullest of the upper arm, arm bent.',
    landmark: 'Fullest of the upper arm.',
    range: surveyed(244, 388, { high: 470 }),
  }),
  girth(false, {
    key: 'elbowGirth',
    name: 'Elbow girth',
    how: 'Round the bent elbow.',
    landmark: 'Tip of the elbow.',
    range: surveyed88(238.3, 13.4, { high: 360 }),
  }),
  girth(false, {
    key: 'wristGirth',
    name: 'Wrist girth',
    how: 'Round the wrist over its bone.',
    landmark: 'Wrist bone.',
    range: surveyed(138, 174, { high: 200 }),
  }),
  length(true, {
    key: 'backWaistLength',
    name: 'Back waist length',
    how: 'From the nape bone down the back to the natural waist.',
    landmark: 'Nape bone, natural waist.',
    range: surveyed88(367.3, 25),
  }),
  length(true, {
    key: 'frontWaistLength',
    name: 'Front waist length',
    how: 'From the neck-shoulder point over the bust point straight down to the natural waist.',
    landmark: 'Neck-shoulder point, bust point, natural waist.',
    range: remembered(340, 540),
  }),
  length(true, {
    key: 'neckShoulderToBustPoint',
    name: 'Neck-shoulder point to bust point',
    how: 'From the neck-shoulder point to the bust point.',
    landmark: 'Neck-shoulder point, bust point.',
    range: surveyed88(268, 22.3),
  }),
  length(true, {
    key: 'sideWaistLength',
    name: 'Side waist length',
    how: 'From the arm pit straight down to the natural waist.',
    landmark: 'Arm pit, natural waist.',
    range: remembered(130, 290),
  }),
  length(true, {
    key: 'waistToHip',
    name: 'Waist to hip',
    how: 'From the natural waist down the side to the hip level.',
    landmark: 'Natural waist, fullest of the seat.',
    range: remembered(150, 290),
  }),
  length(true, {
    key: 'shoulderLength',
    name: 'Shoulder length',
    how: 'From the neck-shoulder point to the shoulder point.',
    landmark: 'Neck-shoulder point, shoulder point.',
    range: surveyed(114, 160),
  }),
  length(false, {
    key: 'bustPointToUnderbust',
    name: 'Bust point to underbust',
    how: 'From the bust point down to the underbust level, along the body.',
    landmark: 'Bust point, crease under the bust.',
    range: remembered(40, 140),
  }),
  length(false, {
    key: 'armLength',
    name: 'Arm length',
    how: 'From the shoulder point over the bent elbow to the wrist bone.',
    landmark: 'Shoulder point, elbow, wrist bone.',
    range: surveyed(478, 611),
  }),
  width(true, {
    key: 'acrossBack',
    name: 'Across back width',
    how: 'Across the back between the arm creases, arms hanging.',
    landmark: 'Arm creases at the back.',
    range: surveyed(307, 445),
  }),
  width(true, {
    key: 'acrossFront',
    name: 'Across front width',
    how: 'Across the chest between the arm creases, arms hanging.',
    landmark: 'Arm creases in front.',
    range: remembered(250, 450),
  }),
  width(false, {
    key: 'bustPointDistance',
    name: 'Bust point distance',
    how: 'Straight between the bust points.',
    landmark: 'Bust points.',
    range: remembered(130, 300),
  }),
  width(false, {
    key: 'frontBustArc',
    name: 'Front bust arc',
    how: 'Over the bust from side line to side line, at the level of the bust girth.',
    landmark: 'Side lines, bust points.',
    range: remembered(350, 750),
  }),
  width(false, {
    key: 'bustBreadth',
    name: 'Bust breadth',
    how: 'Straight across from side to side at the bust level, with a rule.',
    landmark: 'Sides of the body at the bust level.',
    range: remembered(220, 420),
  }),
  width(false, {
    key: 'bustDepth',
    name: 'Bust depth',
    how: 'Straight from back to front at the bust level, with a rule.',
    landmark: 'Back and bust points.',
    range: remembered(180, 400),
  }),
  width(false, {
    key: 'waistBreadth',
    name: 'Waist breadth',
    how: 'Straight across from side to side at the natural waist, with a rule.',
    landmark: 'Sides of the body at the natural waist.',
    range: remembered(190, 420),
  }),
  width(false, {
    key: 'waistDepth',
    name: 'Waist depth',
    how: 'Straight from back to front at the natural waist, with a rule.',
    landmark: 'Back and front at the natural waist.',
    range: remembered(140, 380),
  }),
  width(false, {
    key: 'hipBreadth',
    name: 'Hip breadth',
    how: 'Straight across from side to side at the hip level, with a rule.',
    landmark: 'Sides of the body at the hip level.',
    range: remembered(270, 500),
  }),
  width(false, {
    key: 'hipDepth',
    name: 'Hip depth',
    how: 'Straight from back to front at the hip level, with a rule.',
    landmark: 'Seat and front at the hip level.',
    range: remembered(170, 400),
  }),
  other('degree', {
    key: 'shoulderSlope',
    name: 'Shoulder slope',
    how: 'Angle of the shoulder line below the horizontal, with an angle rule.',
    landmark: 'Neck-shoulder point, shoulder point.',
    range: remembered(10, 35),
  }),
  other('length', {
    key: 'stature',
    name: 'Stature',
    how: 'Standing without shoes against a wall.',
    landmark: 'Floor, top of the head.',
    range: surveyed(1483, 1778),
  }),
  other('mass', { key: 'mass', name: 'Body mass', how: 'On scales, in light clothes.', landmark: 'None.', range: remembered(38, 160) }),
  other('year', { key: 'age', name: 'Age', how: 'In whole years, as told.', landmark: 'None.', range: remembered(18, 90) }),
]

const byKey = new Map(MEASUREMENT_CATALOGUE.map((entry) => [entry.key, entry]))

/** The catalogue's entry of a measurement. */
export function measurementEntry(key: MeasurementKey): MeasurementEntry {
  const entry = byKey.get(key)
  if (!entry) throw new RangeError(`No measurement ${key}`)
  return entry
}

/** What a draft cannot do without, in order of entry. */
export const NEEDED_MEASUREMENTS: readonly MeasurementKey[] = MEASUREMENT_CATALOGUE.filter((entry) => entry.needed).map(
  (entry) => entry.key,
)
