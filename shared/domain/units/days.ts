const MS_PER_DAY = 86_400_000

/** Whole days from one ISO date (or date and time) to another; negative when the second is earlier, null where one is not a date. */
export function daysBetween(from: string, to: string): number | null {
  const days = (Date.parse(to.slice(0, 10)) - Date.parse(from.slice(0, 10))) / MS_PER_DAY
  return Number.isFinite(days) ? Math.round(days) : null
}
