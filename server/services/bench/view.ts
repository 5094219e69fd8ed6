import { and, asc, eq, inArray, ne, sql } from 'drizzle-orm'
import type { BenchOperation, BenchView, CentreView } from '#shared/schemas/shop'
import { benchRecords, jobs, operations, orders, quotePrices, quotes, workCentres } from '../../database/schema'
import { assertRole, type ServiceContext } from '../context'
import { notFound } from '../errors'
import { operationColumns, toOperationView } from '../jobs/operation-columns'
import { jobRefOf } from '../jobs/refs'
import { cautionsFor } from './cautions'
import { readClock } from './clock'
import { toSheet } from './sheet'

/** How many operations after the current one are shown. */
const NEXT_SHOWN = 4

export const toCentreView = (row: typeof workCentres.$inferSelect): CentreView => ({
  id: row.id, code: row.code, name: row.name, kind: row.kind, wireFromMm: row.wireFromMm, wireToMm: row.wireToMm, shiftStartMinute: row.shiftStartMinute, shiftEndMinute: row.shiftEndMinute,
})

/**
 * What an operator sees at a work centre: the operation in work, or the next one planned, with its set-up sheet.
 * @throws DomainError not-found for a centre that does not exist
 */
export async function getBench(context: ServiceContext, code: string): Promise<BenchView> {
  assertRole(context, 'operator', 'supervisor', 'admin')
  return readBench(context, code)
}

/** The same, for a caller whose rights were checked. */
export async function readBench({ db, now, timeZone }: Pick<ServiceContext, 'db' | 'now' | 'timeZone'>, code: string): Promise<BenchView> {
  const [centre] = await db.select().from(workCentres).where(eq(workCentres.code, code))
  if (!centre) throw notFound('work centre')
  const rows = await db.select({
    ...operationColumns, jobNumber: jobs.number, quantity: jobs.quantity, customer: orders.firmName, title: orders.title, design: quotes.design, wireKg: quotePrices.wirePlannedKg,
    previousDone: sql<boolean>`not exists (select 1 from operations before where before.job_id = ${operations.jobId} and before.position < ${operations.position} and before.state <> 'finished')`,
  }).from(operations)
    .innerJoin(jobs, eq(jobs.id, operations.jobId)).innerJoin(orders, eq(orders.id, jobs.orderId))
    .innerJoin(quotePrices, eq(quotePrices.id, jobs.quotePriceId)).innerJoin(quotes, eq(quotes.id, quotePrices.quoteId))
    .innerJoin(workCentres, eq(workCentres.id, operations.workCentreId))
    .where(and(eq(operations.workCentreId, centre.id), ne(operations.state, 'finished'), ne(jobs.state, 'cancelled')))
    .orderBy(sql`(${operations.state} in ('setting-up', 'running', 'paused')) desc`, asc(sql`lower(${operations.plannedSpan})`))
    .limit(NEXT_SHOWN + 1)

  const ids = rows.map(row => row.id)
  const records = ids.length === 0 ? [] : await db.select({ operationId: benchRecords.operationId, act: benchRecords.act, at: benchRecords.at, good: benchRecords.good, scrap: benchRecords.scrap })
    .from(benchRecords).where(inArray(benchRecords.operationId, ids)).orderBy(asc(benchRecords.at))
  const views = rows.map((row): BenchOperation => {
    const own = records.filter(record => record.operationId === row.id)
    return {
      ...toOperationView(row), jobRef: jobRefOf(row.jobNumber), customer: row.customer, title: row.title, quantity: row.quantity, previousDone: row.previousDone,
      goodSoFar: own.reduce((sum, record) => sum + record.good, 0), scrapSoFar: own.reduce((sum, record) => sum + record.scrap, 0),
      runningSince: readClock(own, now).runningSince?.toISOString() ?? null,
    }
  })
  const first = rows[0]
  return {
    timeZone, centre: toCentreView(centre), current: views[0] ?? null, next: views.slice(1),
    sheet: first?.design ? toSheet(first.design, Number(first.wireKg)) : null, cautions: first ? cautionsFor([first.kind], first.design) : [],
  }
}

