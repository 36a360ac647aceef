import { z } from 'zod'
import type { MeasuredValues, MeasurementKey } from '../domain/body/types'
import { figure, id, isoDate, line, mirrors, optionalText, revision, type SchemaOf } from './base'

/** Keys of the measurements in the order of the catalogue; a key missing here does not compile. */
const keys: Readonly<Record<MeasurementKey, true>> = {
  bustGirth: true,
  underbustGirth: true,
  waistGirth: true,
  navelWaistGirth: true,
  highHipGirth: true,
  hipGirth: true,
  upperBustGirth: true,
  neckBaseGirth: true,
  shoulderLength: true,
  shoulderSlope: true,
  acrossBack: true,
  acrossFront: true,
  backWaistLength: true,
  frontWaistLength: true,
  neckShoulderToBustPoint: true,
  sideWaistLength: true,
  waistToHip: true,
  bustPointDistance: true,
  bustPointToUnderbust: true,
  frontBustArc: true,
  armscyeGirth: true,
  trunkGirth: true,
  shoulderGirth: true,
  headGirth: true,
  handGirth: true,
  thighGirth: true,
  upperArmGirth: true,
  elbowGirth: true,
  wristGirth: true,
  armLength: true,
  bustBreadth: true,
  bustDepth: true,
  waistBreadth: true,
  waistDepth: true,
  hipBreadth: true,
  hipDepth: true,
  stature: true,
  mass: true,
  age: true,
}
export const measurementKeys = Object.keys(keys) as MeasurementKey[]

/** Only what no body can be is refused; what is unlikely is a caution by the field. Lengths mm, slope degrees, mass kg, age years. */
const bounds: Readonly<Partial<Record<MeasurementKey, readonly [number, number]>>> = {
  shoulderSlope: [-10, 60],
  mass: [2, 400],
  age: [0, 120],
}

const measured = (key: MeasurementKey) => {
  const [low, high] = bounds[key] ?? [5, 3000]
  return z.object({ value: figure(low, high), typed: z.string().max(40).optional() })
}

const shape = Object.fromEntries(measurementKeys.map((key) => [key, measured(key).optional()])) as unknown as Record<
  MeasurementKey,
  z.ZodOptional<SchemaOf<{ value: number; typed?: string }>>
>
export const measuredValues = mirrors<MeasuredValues>()(z.object(shape).strict())

export const measuringBody = z.object({
  measuredOn: isoDate,
  measuredBy: line.nullable().default(null),
  note: optionalText,
  values: measuredValues,
})
export const measuringUpdate = measuringBody.extend({ base: revision })

export const measuring = z.object({
  id,
  wearerId: id,
  measuredOn: z.string(),
  measuredBy: z.string().nullable(),
  note: z.string().nullable(),
  values: measuredValues,
  revision,
  updatedAt: z.string(),
  updatedBy: z.string().nullable(),
})
export type Measuring = z.output<typeof measuring>
