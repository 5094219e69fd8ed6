import { and, eq } from 'drizzle-orm'
import { OPERATION_KINDS } from '#shared/schemas/shop'
import { jobs, operations, orders, quotePrices, quotes, wireReservations } from '../../database/schema'
import type { Transaction } from '../context'
import { lockFreeKg } from '../wire/free-kg'
import { jobRefOf } from './refs'

/**
 * Makes the job of an accepted order: its routing with the minutes that were priced, and its wire set aside.
 * Called inside the transaction that books the deposit; the database refuses a job without one, and a second job.
 * @throws Error when the order has no accepted rung; that is a defect, never the customer's doing
 */
export async function createJob(tx: Transaction, { orderId, now }: { orderId: string, now: Date }): Promise<{ jobId: string, jobRef: string }> {
  const [rung] = await tx.select({
    quotePriceId: quotePrices.id, quantity: quotePrices.quantity, plannedMinutes: quotePrices.plannedMinutes, wireKg: quotePrices.wirePlannedKg,
    promisedOn: quotePrices.dispatchOn, wireProductId: quotes.wireProductId,
  }).from(orders)
    .innerJoin(quotes, eq(quotes.id, orders.acceptedQuoteId))
    .innerJoin(quotePrices, and(eq(quotePrices.quoteId, quotes.id), eq(quotePrices.quantity, orders.acceptedQuantity)))
    .where(eq(orders.id, orderId))
  if (!rung?.wireProductId) throw new Error(`order ${orderId} has no accepted rung to make a job of`)

  const freeKg = await lockFreeKg(tx, rung.wireProductId)
  const [job] = await tx.insert(jobs).values({
    orderId, quotePriceId: rung.quotePriceId, quantity: rung.quantity, promisedOn: rung.promisedOn, waitsForWire: freeKg < Number(rung.wireKg), createdAt: now,
  }).returning({ id: jobs.id, number: jobs.number })
  const jobId = job!.id

  const steps = OPERATION_KINDS.flatMap(kind => rung.plannedMinutes[kind] ? [{ kind, ...rung.plannedMinutes[kind] }] : [])
  await tx.insert(operations).values(steps.map((step, index) => ({
    jobId, position: index + 1, kind: step.kind, setUpMinutes: String(step.setUpMinutes), runMinutes: String(step.runMinutes),
  })))
  await tx.insert(wireReservations).values({ jobId, wireProductId: rung.wireProductId, massKg: rung.wireKg })
  return { jobId, jobRef: jobRefOf(job!.number) }
}
