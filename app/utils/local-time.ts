import { toEpochMs, toLocalTime } from '#shared/time/zone'

const pad = (value: number) => String(value).padStart(2, '0')

/** A moment as the value of a datetime-local field in a zone: `2026-12-09T10:30`. */
export function localOfInstant(moment: Date, timeZone: string): string {
  const { day, minute } = toLocalTime(moment.getTime(), timeZone)
  return `${day}T${pad(Math.floor(minute / 60))}:${pad(minute % 60)}`
}

/** The moment of a datetime-local value in a zone, or null for what is no time. A time that the clocks skip is the instant they jump. */
export function instantOfLocal(local: string, timeZone: string): Date | null {
  const [, day, hour, minute] = /^(\d{4}-\d{2}-\d{2})T(\d{2}):(\d{2})$/.exec(local) ?? []
  if (day === undefined || Number.isNaN(Date.parse(`${local}:00Z`))) return null
  return new Date(toEpochMs({ day, minute: Number(hour) * 60 + Number(minute) }, timeZone))
}
