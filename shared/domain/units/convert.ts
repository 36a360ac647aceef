import type { Mm, Newton, NewtonPerMetre, Pascal, Radian } from './brand'
import { mm, newton, newtonPerMetre, pascal, radian } from './brand'

/** Millimetres in an inch; exact. Source: international yard and pound agreement 1959. */
export const MM_PER_INCH = 25.4
/** Grams in an avoirdupois pound; exact. Source: international yard and pound agreement 1959. */
export const GRAM_PER_POUND = 453.59237
/** Ounces in a pound. */
export const OUNCE_PER_POUND = 16
/** Pounds in a stone, for body mass. */
export const POUND_PER_STONE = 14
/** Standard gravity, m/s²; exact. Source: ISO 80000-3. */
export const STANDARD_GRAVITY = 9.80665
/** Pascals in a conventional millimetre of mercury. Source: ISO 80000-4. */
export const PASCAL_PER_MMHG = 133.322
/** Pascals in a conventional centimetre of water. Source: ISO 80000-4. */
export const PASCAL_PER_CMH2O = 98.0665

/** Inches to mm. */
export const inchToMm = (inches: number): Mm => mm(inches * MM_PER_INCH)
/** mm to inches. */
export const mmToInch = (length: Mm): number => length / MM_PER_INCH
/** Centimetres to mm. */
export const cmToMm = (centimetres: number): Mm => mm(centimetres * 10)
/** mm to centimetres. */
export const mmToCm = (length: Mm): number => length / 10

/** The weight of a mass in grams under standard gravity, N: what a hanging weight pulls, hook and clamp counted by whoever weighs. */
export const gramForce = (grams: number): Newton => newton((grams / 1000) * STANDARD_GRAVITY)
/** The weight of a mass in kilograms, N. */
export const kilogramForce = (kilograms: number): Newton => newton(kilograms * STANDARD_GRAVITY)
/** The weight of a mass in pounds, N. */
export const poundForce = (pounds: number): Newton => gramForce(pounds * GRAM_PER_POUND)
/** The weight of a mass in ounces, N. */
export const ounceForce = (ounces: number): Newton => poundForce(ounces / OUNCE_PER_POUND)
/** Newton to the mass in kilograms that pulls as hard. */
export const newtonToKilogramForce = (load: Newton): number => load / STANDARD_GRAVITY
/** Pounds to kilograms. */
export const poundToKilogram = (pounds: number): number => (pounds * GRAM_PER_POUND) / 1000
/** Kilograms to pounds. */
export const kilogramToPound = (kilograms: number): number => (kilograms * 1000) / GRAM_PER_POUND

/** N per cm of cloth to N/m. */
export const newtonPerCm = (value: number): NewtonPerMetre => newtonPerMetre(value * 100)
/** N/m to N per cm of cloth, as screens show it. */
export const tensionToNewtonPerCm = (tension: NewtonPerMetre): number => tension / 100
/** Gram-force per cm of cloth to N/m. */
export const gramForcePerCm = (value: number): NewtonPerMetre => newtonPerMetre(gramForce(value) * 100)
/** Pound-force per inch of cloth to N/m. */
export const poundForcePerInch = (value: number): NewtonPerMetre => newtonPerMetre((poundForce(value) / MM_PER_INCH) * 1000)

/** Tension of a strip: load over width, N/m. Width in mm, over 0. */
export const loadOverWidth = (load: Newton, width: Mm): NewtonPerMetre => newtonPerMetre((load / width) * 1000)

/** kPa to Pa. */
export const kilopascal = (value: number): Pascal => pascal(value * 1000)
/** Pa to kPa. */
export const pascalToKilopascal = (pressure: Pascal): number => pressure / 1000
/** Millimetres of mercury to Pa. */
export const mmHgToPascal = (value: number): Pascal => pascal(value * PASCAL_PER_MMHG)
/** Pa to millimetres of mercury. */
export const pascalToMmHg = (pressure: Pascal): number => pressure / PASCAL_PER_MMHG
/** Centimetres of water to Pa. */
export const cmH2OToPascal = (value: number): Pascal => pascal(value * PASCAL_PER_CMH2O)

/** Degrees to radians. */
export const degreeToRadian = (degrees: number): Radian => radian((degrees * Math.PI) / 180)
/** Radians to degrees. */
export const radianToDegree = (angle: Radian): number => (angle * 180) / Math.PI

/** Strain of a cloth cut smaller by the share R of the body and worn at the body's size: R / (1 - R). Derived. */
export const reductionToStrain = (reduction: number): number => reduction / (1 - reduction)
