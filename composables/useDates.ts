/** Dates and times in the workroom's zone. */
export function useDates() {
  const { zone } = useSession()
  const shape = (options: Intl.DateTimeFormatOptions, timeZone: string) => new Intl.DateTimeFormat('en-GB', { ...options, timeZone })
  const atNoon = (isoDate: string) => new Date(`${isoDate.slice(0, 10)}T12:00:00Z`)

  return {
    /** A calendar date without a time: `12 Nov 2026`. */
    date: (isoDate: string | null) =>
      isoDate ? shape({ day: 'numeric', month: 'short', year: 'numeric' }, 'UTC').format(atNoon(isoDate)) : '',
    longDate: (isoDate: string) => shape({ weekday: 'long', day: 'numeric', month: 'long' }, 'UTC').format(atNoon(isoDate)),
    /** A moment: `12 Nov, 14:32`. */
    time: (moment: string) =>
      shape({ day: 'numeric', month: 'short', hour: '2-digit', minute: '2-digit' }, zone.value).format(new Date(moment)),
    /** Today in the workroom, as an ISO date. */
    today: () => new Intl.DateTimeFormat('en-CA', { timeZone: zone.value }).format(new Date()),
    /** Whole days from one ISO date to another. */
    daysBetween: (from: string, to: string) => Math.round((atNoon(to).getTime() - atNoon(from).getTime()) / 86_400_000),
  }
}
