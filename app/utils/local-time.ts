import { wallClock } from './plan-layout'

const pad = (value: number) => String(value).padStart(2, '0')

/** A moment as the value of a datetime-local field in a zone: `2026-12-09T10:30`. */
export function localOfInstant(moment: Date, timeZone: string): string {
  const { day, minute } = wallClock(moment, timeZone)
  return `${day}T${pad(Math.floor(minute / 60))}:${pad(minute % 60)}`
}

/** The moment of a datetime-local value in a zone, or null for what is no time. A time that the clocks skip is the one after. */
export function instantOfLocal(local: string, timeZone: string): Date | null {
  const wanted = Date.parse(`${local}:00Z`)
  if (!/^\d{4}-\d{2}-\d{2}T\d{2}:\d{2}$/.test(local) || Number.isNaN(wanted)) return null
  let guess = wanted
  // The zone's offset at the guess corrects the guess; twice is enough around a change of the clocks.
  for (let round = 0; round < 2; round += 1) guess += wanted - Date.parse(`${localOfInstant(new Date(guess), timeZone)}:00Z`)
  return new Date(guess)
}
