import { PlanningError } from './errors'
import { addDays, MINUTE_MS, toEpochMs, toLocalTime, weekdayOf } from '#shared/time/zone'

/** When a work centre works: one shift a day in the shop's zone. */
export interface WorkCalendar {
  /** IANA zone, such as Europe/Dublin. */
  timeZone: string
  /** Minutes after local midnight, 0 to 1439. */
  shiftStartMinute: number
  /** Minutes after local midnight, up to 1440, after the start. */
  shiftEndMinute: number
  /** ISO weekdays with a shift, Monday 1 to Sunday 7. */
  weekdays: readonly number[]
  /** ISO dates without a shift. */
  holidays: readonly string[]
}

/** A stretch of time, start included, end not; epoch ms. */
export interface Interval {
  startMs: number
  endMs: number
}

/** Monday to Friday. */
export const WORKING_WEEK: readonly number[] = [1, 2, 3, 4, 5]

/** A calendar with no shift for so long is taken to have none at all. */
const DAYS_WITHOUT_SHIFT = 400

/** Throws PlanningError `calendar-unreadable`. */
export function assertCalendar(calendar: WorkCalendar): void {
  const { shiftStartMinute: start, shiftEndMinute: end, weekdays } = calendar
  const isFine = Number.isInteger(start) && Number.isInteger(end) && start >= 0 && end <= 1440 && start < end
    && weekdays.every((weekday) => Number.isInteger(weekday) && weekday >= 1 && weekday <= 7)
  if (!isFine) throw new PlanningError('calendar-unreadable', 'A shift starts before it ends, on the same day, on weekdays 1 to 7.', 'shift')
}

/** True where the day has a shift. */
export function isWorkingDay(calendar: WorkCalendar, day: string): boolean {
  return calendar.weekdays.includes(weekdayOf(day)) && !calendar.holidays.includes(day)
}

function shiftOf(calendar: WorkCalendar, day: string): Interval {
  return {
    startMs: toEpochMs({ day, minute: calendar.shiftStartMinute }, calendar.timeZone),
    endMs: toEpochMs({ day, minute: calendar.shiftEndMinute }, calendar.timeZone),
  }
}

/** Shifts from the one running at `fromMs`, or the next, onwards without end. Throws PlanningError `never-open`. */
function* shiftsFrom(calendar: WorkCalendar, fromMs: number): Generator<Interval, never> {
  assertCalendar(calendar)
  if (!Number.isFinite(fromMs)) throw new PlanningError('date-unreadable', 'The plan needs a time to start from.', 'notBefore')
  let { day } = toLocalTime(fromMs, calendar.timeZone)
  let idleDays = 0
  for (;;) {
    if (isWorkingDay(calendar, day)) {
      const shift = shiftOf(calendar, day)
      if (shift.endMs > fromMs && shift.endMs > shift.startMs) {
        idleDays = 0
        yield shift
      }
    }
    idleDays += 1
    if (idleDays > DAYS_WITHOUT_SHIFT) throw neverOpen()
    day = addDays(day, 1)
  }
}

/** First instant at or after `fromMs` inside a shift. */
export function nextWorkingInstant(calendar: WorkCalendar, fromMs: number): number {
  for (const shift of shiftsFrom(calendar, fromMs)) return Math.max(fromMs, shift.startMs)
  return fromMs
}

/**
 * The instant when `minutes` of working time have passed since `fromMs`, counting open time only; work left at the end of a shift
 * goes on in the next. With 0 minutes it is `fromMs`. Throws PlanningError.
 */
export function addWorkingMinutes(calendar: WorkCalendar, fromMs: number, minutes: number): number {
  if (!Number.isFinite(minutes) || minutes < 0) throw new PlanningError('duration-unreadable', 'Working time is zero minutes or more.', 'minutes')
  if (minutes === 0) return fromMs
  let leftMs = Math.round(minutes * MINUTE_MS)
  for (const shift of shiftsFrom(calendar, fromMs)) {
    const startMs = Math.max(fromMs, shift.startMs)
    if (startMs + leftMs <= shift.endMs) return startMs + leftMs
    leftMs -= shift.endMs - startMs
  }
  return fromMs
}

/** Open time between two instants, in minutes; 0 where the second is not later. */
export function workingMinutesBetween(calendar: WorkCalendar, fromMs: number, toMs: number): number {
  let openMs = 0
  if (toMs <= fromMs) return 0
  for (const shift of shiftsFrom(calendar, fromMs)) {
    if (shift.startMs >= toMs) break
    openMs += Math.min(shift.endMs, toMs) - Math.max(shift.startMs, fromMs)
  }
  return openMs / MINUTE_MS
}

/** The day so many working days later; a closed day counts as the next open one. Throws PlanningError `never-open`. */
export function addWorkingDays(calendar: WorkCalendar, day: string, workingDays: number): string {
  assertCalendar(calendar)
  let current = nextWorkingDay(calendar, day)
  for (let left = workingDays; left > 0; left -= 1) current = nextWorkingDay(calendar, addDays(current, 1))
  return current
}

function nextWorkingDay(calendar: WorkCalendar, day: string): string {
  let current = day
  for (let idleDays = 0; !isWorkingDay(calendar, current); idleDays += 1) {
    if (idleDays > DAYS_WITHOUT_SHIFT) throw neverOpen()
    current = addDays(current, 1)
  }
  return current
}

function neverOpen(): PlanningError {
  return new PlanningError('never-open', 'This work centre has no shift in the next year.', 'calendar')
}
