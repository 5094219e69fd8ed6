import { addWorkingDays, type WorkCalendar } from './calendar'
import { placeJob, type PlacedJob, type PlaceJobRequest } from './place-job'
import { addDays, toEpochMs, toLocalTime } from '#shared/time/zone'

export interface PromiseRequest extends Omit<PlaceJobRequest, 'notBeforeMs'> {
  /** The moment of asking. */
  nowMs: number
  /** Calendar days until the wire is here, counted from the deposit; 0 where it is in stock. */
  wireLeadDays: number
  /** Calendar days the date waits for the deposit. */
  depositHoldDays: number
  /** Working days kept in hand. */
  bufferDays: number
  /** Days on which goods leave. */
  shopCalendar: WorkCalendar
}

export interface PromisedDate {
  /** ISO date that is promised. */
  dispatchOn: string
  /** Last ISO date the deposit may arrive for the promise to hold. */
  depositBy: string
  /** The placing it comes from; nothing is reserved by it. */
  placing: PlacedJob
}

/**
 * The date the order form promises, found by really placing the job in the plan as it stands: work begins the day after the last
 * day for the deposit, or when the wire is here, and days are kept in hand at the end. Throws PlanningError.
 */
export function promiseDate(request: PromiseRequest): PromisedDate {
  const { nowMs, wireLeadDays, depositHoldDays, bufferDays, shopCalendar, ...job } = request
  const depositBy = addDays(toLocalTime(nowMs, shopCalendar.timeZone).day, depositHoldDays)
  const firstDay = addDays(depositBy, 1 + wireLeadDays)
  const notBeforeMs = Math.max(nowMs, toEpochMs({ day: firstDay, minute: 0 }, shopCalendar.timeZone))
  const placing = placeJob({ ...job, notBeforeMs })
  return { dispatchOn: addWorkingDays(shopCalendar, placing.dispatchOn, bufferDays), depositBy, placing }
}

/** Days to wait for wire: none where the free stock covers the job. Masses in kg. */
export function wireWaitDays({ neededKg, freeStockKg, leadDays }: { neededKg: number, freeStockKg: number, leadDays: number }): number {
  return freeStockKg >= neededKg ? 0 : leadDays
}
