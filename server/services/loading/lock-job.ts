import { asc, eq } from 'drizzle-orm'
import { jobs, operations, orders, quotePrices, quotes, workCentres } from '../../database/schema'
import type { Transaction } from '../context'
import { notFound } from '../errors'
import { operationColumns, type OperationRow } from '../jobs/operation-columns'

export type LockedJob = { job: typeof jobs.$inferSelect, orderId: string, wireDiameterMm: number, operations: OperationRow[] }

/**
 * Locks a job for a change of its plan, in the one order that everybody keeps: order, job, operations.
 * @throws DomainError not-found
 */
export async function lockJob(tx: Transaction, jobId: string): Promise<LockedJob> {
  const [order] = await tx.select({ id: orders.id }).from(orders).innerJoin(jobs, eq(jobs.orderId, orders.id)).where(eq(jobs.id, jobId)).for('update', { of: orders })
  const [job] = await tx.select().from(jobs).where(eq(jobs.id, jobId)).for('update')
  if (!order || !job) throw notFound('job')
  const [quote] = await tx.select({ design: quotes.design }).from(quotePrices).innerJoin(quotes, eq(quotes.id, quotePrices.quoteId)).where(eq(quotePrices.id, job.quotePriceId))
  const steps = await tx.select(operationColumns).from(operations).leftJoin(workCentres, eq(workCentres.id, operations.workCentreId))
    .where(eq(operations.jobId, jobId)).orderBy(asc(operations.position))
  return { job, orderId: order.id, wireDiameterMm: quote?.design?.wireDiameterMm ?? 0, operations: steps }
}

export const spanOf = (startMs: number, endMs: number): string => `[${new Date(startMs).toISOString()},${new Date(endMs).toISOString()})`
