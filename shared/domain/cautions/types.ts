export type Severity = 'note' | 'caution' | 'stop'

/** Where a caution belongs, so that the screen can stand it there and the list can jump to it. */
export type CautionPlace =
  | { readonly kind: 'garment' }
  | { readonly kind: 'body'; readonly measurement: string }
  | { readonly kind: 'ring'; readonly level: string }
  | { readonly kind: 'plan'; readonly zone: string; readonly layer?: string }
  | { readonly kind: 'cloth'; readonly cloth: string; readonly direction?: string }
  | { readonly kind: 'piece'; readonly piece: string; readonly edge?: string; readonly node?: string }
  | { readonly kind: 'alteration'; readonly alteration: string }

/** A finding with its figure, its limit and what to do. Built only by the registry in this folder. */
export interface Caution {
  readonly code: string
  readonly severity: Severity
  readonly place: CautionPlace
  /** One plain sentence for owner and drafter. */
  readonly message: string
  /** What a maker may read: never a wearer's condition, a name or a body girth. */
  readonly makerMessage: string
  readonly figure: { readonly value: number; readonly unit: 'mm' | 'Pa' | 'N' | 'N/m' | 'ratio' | 'percent' | 'degree' | 'count' } | null
  readonly limit: { readonly value: number; readonly unit: 'mm' | 'Pa' | 'N' | 'N/m' | 'ratio' | 'percent' | 'degree' | 'count' } | null
  /** Source of the limit. */
  readonly source: string
  readonly todo: string
  /** False for stops that nobody may clear: a wearer's cap; cannot get out in water or as a child. */
  readonly clearable: boolean
}
