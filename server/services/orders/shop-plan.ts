import { and, asc, eq, isNotNull, ne, sql } from 'drizzle-orm'
import { holidays, operations, workCentres } from '../../database/schema'
import type { Database, Queryable } from '../../database/client'
import { addDays, addWorkingDays, toEpochMs, toLocalTime, WORKING_WEEK, type Interval, type PlanCentre, type WorkCalendar } from '../../engine/planning'
import { rememberFor } from '../remember'

const NOON = 12 * 60
const SATURDAY = 6

/** The plan as it stands: work centres, closed days and what is taken. */
export type ShopPlan = { closedDays: readonly string[], centres: readonly Omit<PlanCentre, 'calendar'>[], shifts: ReadonlyMap<string, Omit<WorkCalendar, 'timeZone' | 'holidays'>>, busyByCentre: Readonly<Record<string, Interval[]>> }

/** Reads the plan as the caller's transaction sees it, from a moment on: for whoever places operations. `exceptJobId` leaves one job's own places out. */
export async function readPlan(db: Queryable, { from, exceptJobId }: { from?: Date, exceptJobId?: string } = {}): Promise<ShopPlan> {
  // One after another: a transaction has one connection, which takes one statement at a time.
  const centreRows = await db.select().from(workCentres).where(eq(workCentres.isActive, true)).orderBy(asc(workCentres.code)).limit(100)
  const closedRows = await db.select({ day: holidays.day }).from(holidays).limit(1_000)
  const taken = await db.select({
    centreId: operations.workCentreId,
    startMs: sql<string>`extract(epoch from lower(${operations.plannedSpan})) * 1000`, endMs: sql<string>`extract(epoch from upper(${operations.plannedSpan})) * 1000`,
  }).from(operations)
    .where(and(isNotNull(operations.workCentreId), sql`upper(${operations.plannedSpan}) > ${from ? sql`${from.toISOString()}::timestamptz` : sql`now()`}`, exceptJobId ? ne(operations.jobId, exceptJobId) : undefined)).limit(20_000)
  const busyByCentre: Record<string, Interval[]> = {}
  for (const { centreId, startMs, endMs } of taken) {
    if (centreId !== null) (busyByCentre[centreId] ??= []).push({ startMs: Number(startMs), endMs: Number(endMs) })
  }
  return {
    closedDays: closedRows.map(row => row.day),
    centres: centreRows.map(({ id, kind, wireFromMm, wireToMm }) => ({ id, kind, wireFromMm, wireToMm })),
    shifts: new Map(centreRows.map(row => [row.id, {
      shiftStartMinute: row.shiftStartMinute, shiftEndMinute: row.shiftEndMinute, weekdays: row.worksSaturday ? [...WORKING_WEEK, SATURDAY] : WORKING_WEEK,
    }])),
    busyByCentre,
  }
}

/** The same for a promise; kept for two seconds, since a promise reserves nothing. */
export const readShopPlan: (db: Database) => Promise<ShopPlan> = rememberFor(2_000, db => readPlan(db))

/** Days on which the office answers and goods leave: Monday to Friday, no closed day. */
export const officeCalendarOf = (plan: Pick<ShopPlan, 'closedDays'>, timeZone: string): WorkCalendar =>
  ({ timeZone, shiftStartMinute: 8 * 60, shiftEndMinute: 17 * 60, weekdays: WORKING_WEEK, holidays: plan.closedDays })

/** Work centres with their shifts in the shop's zone. */
export const planCentresOf = (plan: ShopPlan, timeZone: string): PlanCentre[] =>
  plan.centres.flatMap((centre) => {
    const shift = plan.shifts.get(centre.id)
    return shift ? [{ ...centre, calendar: { ...shift, timeZone, holidays: plan.closedDays } }] : []
  })

/** Today in the shop's zone, YYYY-MM-DD. */
export const shopDayOf = ({ now, timeZone }: { now: Date, timeZone: string }): string => toLocalTime(now.getTime(), timeZone).day

/** By when a person answers: noon of the next working day. */
export function answerByOf(plan: Pick<ShopPlan, 'closedDays'>, { now, timeZone }: { now: Date, timeZone: string }): Date {
  const calendar = officeCalendarOf(plan, timeZone)
  const day = addWorkingDays(calendar, addDays(shopDayOf({ now, timeZone }), 1), 0)
  return new Date(toEpochMs({ day, minute: NOON }, timeZone))
}
