/** Millimetres in a sentence, to a tenth. */
export const millimetres = (value: number): string => `${Math.round(value * 10) / 10} mm`

/** Degrees in a sentence, to a tenth. */
export const degrees = (value: number): string => `${Math.round(value * 10) / 10}°`
