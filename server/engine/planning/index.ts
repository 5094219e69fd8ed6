export { PlanningError, type PlanningErrorCode } from './errors'
export { addDays, TimeError, toEpochMs, toLocalTime, weekdayOf, type LocalTime } from '#shared/time/zone'
export {
  addWorkingDays, addWorkingMinutes, assertCalendar, isWorkingDay, nextWorkingInstant, WORKING_WEEK, workingMinutesBetween,
  type Interval, type WorkCalendar,
} from './calendar'
export { earliestSlot, mergeIntervals, type SlotRequest } from './slot'
export { buildRouting, type RoutingOperation } from './routing'
export { placeJob, takesWire, type PlacedJob, type PlacedOperation, type PlaceJobRequest, type PlanCentre } from './place-job'
export { promiseDate, wireWaitDays, type PromisedDate, type PromiseRequest } from './promise-date'
