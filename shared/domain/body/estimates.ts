/**
 * Estimates of what a measuring leaves out; lengths mm, slope degrees. Each is shown as an estimate wherever it is used.
 * Sources: the drafting notes; the ready size chart with its provenance; regression on ANSUR II (2012) women.
 */

/** From the bust point down to the natural waist, on the front of the body. Assumption of the drafting notes. */
export const BUST_POINT_TO_WAIST = 157

/** Front waist length from the neck-shoulder point over the bust point to the natural waist. */
export const estimateFrontWaistLength = (neckShoulderToBustPoint: number): number => neckShoulderToBustPoint + BUST_POINT_TO_WAIST

/** Neck-shoulder point to bust point from the front waist length: the same assumption read the other way. */
export const estimateNeckShoulderToBustPoint = (frontWaistLength: number): number => frontWaistLength - BUST_POINT_TO_WAIST

/** Distance between the bust points: .215 of the bust girth (tables from memory give .21 to .22). */
export const estimateBustPointDistance = (bustGirth: number): number => 0.215 * bustGirth

/** Bust point to underbust: assumption. */
export const BUST_POINT_TO_UNDERBUST = 75

/** Shoulder slope in degrees: assumption; handbooks from memory say 18 to 25. */
export const SHOULDER_SLOPE = 21

/** Across front: the ready chart's line, at most the across back less 20 mm. */
export const estimateAcrossFront = (bustGirth: number, acrossBack: number): number => Math.min(0.356 * bustGirth + 9.4, acrossBack - 20)

/** High hip girth: the waist and .62 of the way to the hip. Assumption of the ready chart. */
export const estimateHighHipGirth = (waistGirth: number, hipGirth: number): number => waistGirth + 0.62 * (hipGirth - waistGirth)

/** Armscye girth: .41 of the bust girth, as the drafting notes take it. */
export const estimateArmscyeGirth = (bustGirth: number): number => 0.41 * bustGirth

/** Neck base girth by regression on ANSUR II women. */
export const estimateNeckBaseGirth = (bustGirth: number, hipGirth: number, stature: number): number =>
  108.3 + 0.1124 * bustGirth + 0.0439 * hipGirth + 0.0685 * stature
