/** A moment as the shop writes it: `9 Dec, 10:20`. */
export function momentText(iso: string, timeZone?: string): string {
  return new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'short', hour: '2-digit', minute: '2-digit', timeZone }).format(new Date(iso))
}

/** The time of day of a moment: `10:20`. */
export function timeText(iso: string, timeZone?: string): string {
  return new Intl.DateTimeFormat('en-GB', { hour: '2-digit', minute: '2-digit', timeZone }).format(new Date(iso))
}

/** A calendar day or moment as `14 Dec 2026`. */
export function dayText(iso: string, timeZone?: string): string {
  const isDay = iso.length === 10
  return new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'short', year: 'numeric', timeZone: isDay ? 'UTC' : timeZone }).format(new Date(iso))
}

/** Minutes as a person plans them: `45 min`, `2.5 h`. */
export function minutesText(minutes: number): string {
  return minutes < 90 ? `${Math.round(minutes)}\u202fmin` : `${(minutes / 60).toFixed(1)}\u202fh`
}
