import { asc, eq } from 'drizzle-orm'
import type { JobSheetView } from '#shared/schemas/shop'
import { benchRecords, jobs, operations, orderEvents, people, quotePrices, quotes } from '../../database/schema'
import { OPERATION_NAMES } from '#shared/schemas/shop'
import { takesWire } from '../../engine/planning'
import { assertRole, type ServiceContext } from '../context'
import { notFound } from '../errors'
import { toCentreView } from '../bench/view'
import { cautionsFor } from '../bench/cautions'
import { toSheet } from '../bench/sheet'
import { jobNumberOf } from '../jobs/refs'
import { workCentres } from '../../database/schema'
import { readJobs } from './read-jobs'

/** The sheet of one job: spring, routing, history. @throws DomainError not-found */
export async function getJob(context: ServiceContext, ref: string): Promise<JobSheetView> {
  assertRole(context, 'supervisor', 'operator', 'admin')
  const [view] = await readJobs(context.db, eq(jobs.number, jobNumberOf(ref)), { limit: 1, timeZone: context.timeZone })
  if (!view) throw notFound('job')
  const [row] = await context.db.select({ jobId: jobs.id, orderId: jobs.orderId, design: quotes.design, wireProductId: quotes.wireProductId }).from(jobs)
    .innerJoin(quotePrices, eq(quotePrices.id, jobs.quotePriceId)).innerJoin(quotes, eq(quotes.id, quotePrices.quoteId)).where(eq(jobs.number, jobNumberOf(ref)))
  const [centres, moves, records] = await Promise.all([
    context.db.select().from(workCentres).where(eq(workCentres.isActive, true)).orderBy(asc(workCentres.code)).limit(100),
    context.db.select({ at: orderEvents.at, who: people.name, words: orderEvents.why }).from(orderEvents).leftJoin(people, eq(people.id, orderEvents.personId)).where(eq(orderEvents.orderId, row!.orderId)).orderBy(asc(orderEvents.id)).limit(200),
    context.db.select({ at: benchRecords.at, who: people.name, act: benchRecords.act, kind: operations.kind, note: benchRecords.note }).from(benchRecords)
      .innerJoin(operations, eq(operations.id, benchRecords.operationId)).innerJoin(people, eq(people.id, benchRecords.personId)).where(eq(operations.jobId, row!.jobId)).orderBy(asc(benchRecords.at)).limit(500),
  ])
  const history = [
    ...moves.map(move => ({ at: move.at.toISOString(), who: move.who ?? 'Wirewright', words: move.words })),
    ...records.filter(record => record.act !== 'count').map(record => ({ at: record.at.toISOString(), who: record.who, words: `${OPERATION_NAMES[record.kind]}: ${record.act}${record.note ? `, ${record.note}` : ''}` })),
  ].sort((a, b) => a.at.localeCompare(b.at))
  const cautions = cautionsFor(view.operations.map(operation => operation.kind), row?.design ?? null)
  return { ...view, timeZone: context.timeZone, wireProductId: row?.wireProductId ?? null, design: row?.design ?? null, sheet: row?.design ? toSheet(row.design, view.wireKg) : null, centres: centres.filter(centre => takesWire(centre, row?.design?.wireDiameterMm ?? 0)).map(toCentreView), history, cautions }
}
