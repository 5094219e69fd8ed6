import { addWorkingMinutes, nextWorkingInstant, type Interval, type WorkCalendar } from './calendar'
import { PlanningError } from './errors'
import { MINUTE_MS } from '#shared/time/zone'

/** Sorted, merged copy of busy stretches. Throws PlanningError `interval-unreadable`. */
export function mergeIntervals(intervals: readonly Interval[]): Interval[] {
  const merged: Interval[] = []
  for (const { startMs, endMs } of [...intervals].sort((a, b) => a.startMs - b.startMs)) {
    if (!Number.isFinite(startMs) || !Number.isFinite(endMs) || endMs < startMs) {
      throw new PlanningError('interval-unreadable', 'A stretch of time ends after it starts.', 'busy')
    }
    const last = merged[merged.length - 1]
    if (last && startMs <= last.endMs) last.endMs = Math.max(last.endMs, endMs)
    else if (endMs > startMs) merged.push({ startMs, endMs })
  }
  return merged
}

export interface SlotRequest {
  calendar: WorkCalendar
  /** Stretches the centre is taken or down. */
  busy: readonly Interval[]
  /** Working time needed, above 0. */
  durationMinutes: number
  notBeforeMs: number
}

/**
 * The earliest stretch in which an operation can be done without touching a busy one. It starts inside a shift and holds its
 * centre through closed hours until it is done. Throws PlanningError.
 */
export function earliestSlot({ calendar, busy, durationMinutes, notBeforeMs }: SlotRequest): Interval {
  if (!Number.isFinite(durationMinutes) || durationMinutes <= 0) {
    throw new PlanningError('duration-unreadable', 'An operation takes more than no time.', 'durationMinutes')
  }
  const place = (fromMs: number): Interval => {
    // On the whole minute: a plan is read by people.
    const startMs = nextWorkingInstant(calendar, Math.ceil(fromMs / MINUTE_MS) * MINUTE_MS)
    return { startMs, endMs: addWorkingMinutes(calendar, startMs, durationMinutes) }
  }
  let fromMs = notBeforeMs
  for (const taken of mergeIntervals(busy)) {
    if (taken.endMs <= fromMs) continue
    // A gap shorter than the bare duration cannot hold it, so the calendar need not be asked.
    if (taken.startMs - fromMs >= durationMinutes * MINUTE_MS) {
      const slot = place(fromMs)
      if (slot.endMs <= taken.startMs) return slot
    }
    fromMs = taken.endMs
  }
  return place(fromMs)
}
