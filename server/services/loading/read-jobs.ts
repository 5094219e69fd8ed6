import { and, asc, eq, inArray, sql, type SQL } from 'drizzle-orm'
import type { JobView } from '#shared/schemas/shop'
import { getMaterial } from '#shared/spring/materials'
import { toLocalTime } from '../../engine/planning'
import { jobs, operations, orders, quotePrices, quotes, workCentres } from '../../database/schema'
import type { Queryable } from '../context'
import { operationColumns, toOperationView } from '../jobs/operation-columns'
import { jobRefOf } from '../jobs/refs'
import { orderRefOf } from '../orders/reference'

/** Jobs with their operations, oldest first. At most `limit`. */
export async function readJobs(db: Queryable, where: SQL | undefined, options: { limit: number, timeZone: string }): Promise<JobView[]> {
  const rows = await db.select({ job: jobs, order: orders, design: quotes.design, wireKg: quotePrices.wirePlannedKg })
    .from(jobs).innerJoin(orders, eq(orders.id, jobs.orderId)).innerJoin(quotePrices, eq(quotePrices.id, jobs.quotePriceId)).innerJoin(quotes, eq(quotes.id, quotePrices.quoteId))
    .where(where).orderBy(asc(jobs.createdAt), asc(jobs.id)).limit(options.limit)
  if (rows.length === 0) return []
  const steps = await db.select(operationColumns).from(operations).leftJoin(workCentres, eq(workCentres.id, operations.workCentreId))
    .where(inArray(operations.jobId, rows.map(row => row.job.id))).orderBy(asc(operations.jobId), asc(operations.position))
  return rows.map(({ job, order, design, wireKg }): JobView => {
    const own = steps.filter(step => step.jobId === job.id)
    const last = own.every(step => step.endsAt !== null) ? own.reduce<Date | null>((latest, step) => latest && latest > step.endsAt! ? latest : step.endsAt, null) : null
    const leavesOn = last ? toLocalTime(last.getTime(), options.timeZone).day : null
    return {
      ref: jobRefOf(job.number), orderRef: orderRefOf(order.number), customer: order.firmName, title: order.title, quantity: job.quantity, state: job.state, version: job.version,
      promisedOn: job.promisedOn, neededOn: order.neededOn, waitsForWire: job.waitsForWire, wireKg: Number(wireKg), createdAt: job.createdAt.toISOString(),
      wire: design ? `${getMaterial(design.material).name}, ${design.wireDiameterMm.toFixed(2)} mm` : '',
      leavesOn, isLate: job.promisedOn !== null && leavesOn !== null && leavesOn > job.promisedOn, operations: own.map(toOperationView),
    }
  })
}

/** Jobs that Loading shows between two moments: those not finished, and those with an operation planned in the span. */
export const openOrPlannedBetween = (from: Date, to: Date): SQL | undefined => and(
  sql`${jobs.state} <> 'cancelled'`,
  sql`(${jobs.state} in ('to-plan', 'planned', 'in-work') or exists (select 1 from operations o where o.job_id = ${jobs.id} and o.planned_span && tstzrange(${from.toISOString()}::timestamptz, ${to.toISOString()}::timestamptz)))`,
)
