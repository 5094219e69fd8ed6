import { and, asc, eq, gte, lt } from 'drizzle-orm'
import type { LoadingView } from '#shared/schemas/shop'
import { holidays, workCentres } from '../../database/schema'
import { assertRole, type ServiceContext } from '../context'
import { toCentreView } from '../bench/view'
import { toLocalTime } from '../../engine/planning'
import { openOrPlannedBetween, readJobs } from './read-jobs'

/** Jobs shown at once; a shop of this size has fewer open. */
const JOBS_SHOWN = 200
const DAY_MS = 86_400_000

/** What runs where from a day on, and what is paid but not planned. Unpaid orders have no job, so they never appear. */
export async function getLoading(context: ServiceContext, input: { from?: string, days: number }): Promise<LoadingView> {
  assertRole(context, 'supervisor', 'operator', 'admin')
  const from = input.from ?? toLocalTime(context.now.getTime(), context.timeZone).day
  // A day's margin on both sides, so that the zone of the shop never cuts an operation off.
  const start = new Date(Date.parse(`${from}T00:00:00Z`) - DAY_MS)
  const end = new Date(start.getTime() + (input.days + 2) * DAY_MS)
  const to = new Date(Date.parse(`${from}T00:00:00Z`) + input.days * DAY_MS).toISOString().slice(0, 10)
  const [centres, jobList, closed] = await Promise.all([
    context.db.select().from(workCentres).where(eq(workCentres.isActive, true)).orderBy(asc(workCentres.code)).limit(100),
    readJobs(context.db, openOrPlannedBetween(start, end), { limit: JOBS_SHOWN, timeZone: context.timeZone }),
    context.db.select().from(holidays).where(and(gte(holidays.day, from), lt(holidays.day, to))).orderBy(asc(holidays.day)).limit(100),
  ])
  return { from, to, timeZone: context.timeZone, centres: centres.map(toCentreView), jobs: jobList, holidays: closed }
}
