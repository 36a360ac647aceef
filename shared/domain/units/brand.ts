/**
 * Branded numbers. Lengths are millimetres everywhere in the domain and the API, tension is force per width of cloth,
 * strain is a ratio. Only `domain/units` converts; a brand is put on at an edge and never cast elsewhere.
 */
export type Mm = number & { readonly __unit: 'mm' }
export type NewtonPerMetre = number & { readonly __unit: 'N/m' }
export type Newton = number & { readonly __unit: 'N' }
export type Pascal = number & { readonly __unit: 'Pa' }
/** A ratio of lengths: .25 means 25 % longer. */
export type Strain = number & { readonly __unit: 'strain' }
export type Radian = number & { readonly __unit: 'rad' }

export const mm = (value: number): Mm => value as Mm
export const newtonPerMetre = (value: number): NewtonPerMetre => value as NewtonPerMetre
export const newton = (value: number): Newton => value as Newton
export const pascal = (value: number): Pascal => value as Pascal
export const strain = (value: number): Strain => value as Strain
export const radian = (value: number): Radian => value as Radian
