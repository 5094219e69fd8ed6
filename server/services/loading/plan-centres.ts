import { and, asc, eq, gte, isNotNull, sql } from 'drizzle-orm'
import { WORKING_WEEK, type Interval, type PlanCentre } from '../../engine/planning'
import { holidays, operations, workCentres } from '../../database/schema'
import type { Queryable } from '../context'

const SATURDAY = 6

/** The work centres as the planning engine takes them, with their shifts and the shop's holidays. */
export async function readPlanCentres(db: Queryable, timeZone: string): Promise<PlanCentre[]> {
  const closed = (await db.select({ day: holidays.day }).from(holidays).where(gte(holidays.day, sql`current_date - 1`)).orderBy(asc(holidays.day)).limit(400)).map(row => row.day)
  const rows = await db.select().from(workCentres).where(eq(workCentres.isActive, true)).orderBy(asc(workCentres.code)).limit(100)
  return rows.map(row => ({
    id: row.id, kind: row.kind, wireFromMm: row.wireFromMm, wireToMm: row.wireToMm,
    calendar: { timeZone, shiftStartMinute: row.shiftStartMinute, shiftEndMinute: row.shiftEndMinute, weekdays: row.worksSaturday ? [...WORKING_WEEK, SATURDAY] : WORKING_WEEK, holidays: closed },
  }))
}

/** Stretches in which work centres are taken from a moment on, by centre. */
export async function readBusy(db: Queryable, from: Date, except: { jobId?: string } = {}): Promise<Record<string, Interval[]>> {
  const rows = await db.select({ centreId: operations.workCentreId, jobId: operations.jobId, startMs: sql<string>`extract(epoch from lower(${operations.plannedSpan})) * 1000`, endMs: sql<string>`extract(epoch from upper(${operations.plannedSpan})) * 1000` })
    .from(operations).where(and(isNotNull(operations.plannedSpan), sql`upper(${operations.plannedSpan}) > ${from.toISOString()}::timestamptz`)).limit(20_000)
  const busy: Record<string, Interval[]> = {}
  for (const row of rows) {
    if (row.jobId === except.jobId) continue
    ;(busy[row.centreId!] ??= []).push({ startMs: Number(row.startMs), endMs: Number(row.endMs) })
  }
  return busy
}
