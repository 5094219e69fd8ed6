/** A time zone or a day that is none. `message` can be shown to staff; `subject` is what was given. */
export class TimeError extends Error {
  constructor(readonly code: 'calendar-unreadable' | 'date-unreadable', message: string, readonly subject: string) {
    super(message)
    this.name = 'TimeError'
  }
}

export const MINUTE_MS = 60_000
const DAY_MS = 86_400_000

/** Wall-clock time of a zone: ISO date and minutes after midnight. */
export interface LocalTime {
  day: string
  minute: number
}

const formatters = new Map<string, Intl.DateTimeFormat>()

function formatterOf(timeZone: string): Intl.DateTimeFormat {
  const known = formatters.get(timeZone)
  if (known) return known
  try {
    const made = new Intl.DateTimeFormat('en-GB', {
      timeZone, hourCycle: 'h23', year: 'numeric', month: '2-digit', day: '2-digit', hour: '2-digit', minute: '2-digit', second: '2-digit',
    })
    formatters.set(timeZone, made)
    return made
  } catch {
    throw new TimeError('calendar-unreadable', `“${timeZone}” is no time zone.`, timeZone)
  }
}

/** The zone's wall clock at an instant, as if it were UTC, in epoch ms. */
function wallClockMs(epochMs: number, timeZone: string): number {
  const parts: Partial<Record<Intl.DateTimeFormatPartTypes, number>> = {}
  for (const { type, value } of formatterOf(timeZone).formatToParts(epochMs)) parts[type] = Number(value)
  return Date.UTC(parts.year ?? 0, (parts.month ?? 1) - 1, parts.day ?? 1, parts.hour ?? 0, parts.minute ?? 0, parts.second ?? 0)
}

/** Local day and minute of an instant. */
export function toLocalTime(epochMs: number, timeZone: string): LocalTime {
  const wallMs = wallClockMs(epochMs, timeZone)
  const dayMs = Math.floor(wallMs / DAY_MS) * DAY_MS
  return { day: new Date(dayMs).toISOString().slice(0, 10), minute: Math.floor((wallMs - dayMs) / MINUTE_MS) }
}

/**
 * Instant of a local day and minute (0 to 1440). A time that the clocks skip in spring becomes the instant they jump; of a time
 * that comes twice in autumn it is the first. Throws TimeError for a day that is no date.
 */
export function toEpochMs({ day, minute }: LocalTime, timeZone: string): number {
  const wallMs = dayNumber(day) * DAY_MS + minute * MINUTE_MS
  const offsetAt = (epochMs: number) => wallClockMs(epochMs, timeZone) - Math.floor(epochMs / 1000) * 1000
  // Offsets a day before and after bracket any change of the clocks.
  const before = offsetAt(wallMs - DAY_MS)
  const after = offsetAt(wallMs + DAY_MS)
  const byBefore = wallMs - before
  if (wallClockMs(byBefore, timeZone) === wallMs) return byBefore
  const byAfter = wallMs - after
  if (wallClockMs(byAfter, timeZone) === wallMs) return byAfter
  return firstInstantFrom(byAfter, byBefore, wallMs, timeZone)
}

/** Bisects for the jump of the clocks between two instants: the first whose wall clock is at or past `wallMs`. */
function firstInstantFrom(lowMs: number, highMs: number, wallMs: number, timeZone: string): number {
  let low = Math.min(lowMs, highMs)
  let high = Math.max(lowMs, highMs)
  while (high - low > 1000) {
    const middle = Math.floor((low + high) / 2000) * 1000
    if (wallClockMs(middle, timeZone) < wallMs) low = middle
    else high = middle
  }
  return high
}

function dayNumber(day: string): number {
  const ms = /^\d{4}-\d{2}-\d{2}$/.test(day) ? Date.parse(`${day}T00:00:00Z`) : Number.NaN
  if (Number.isNaN(ms) || new Date(ms).toISOString().slice(0, 10) !== day) throw new TimeError('date-unreadable', `“${day}” is no date.`, day)
  return ms / DAY_MS
}

/** The ISO date some calendar days later. */
export function addDays(day: string, days: number): string {
  return new Date((dayNumber(day) + days) * DAY_MS).toISOString().slice(0, 10)
}

/** ISO weekday, Monday 1 to Sunday 7. */
export function weekdayOf(day: string): number {
  // 1 January 1970 was a Thursday.
  return ((((dayNumber(day) + 3) % 7) + 7) % 7) + 1
}
