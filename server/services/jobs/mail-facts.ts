import { eq, sql } from 'drizzle-orm'
import { jobs, operations, orders, quotePrices, quotes } from '../../database/schema'
import type { Transaction } from '../context'
import { orderRefOf } from '../orders/reference'
import { findAmountDue } from '../payments/amount-due'

/** What the e-mails about a job tell. */
export type JobMailFacts = {
  recipient: string, orderId: string, about: { orderRef: string, title: string, contactName: string }, quantity: number, currency: string,
  /** What is still to be paid. */
  balanceMinor: number,
  /** Day the last operation ends, in the shop's zone, when every one is placed. */
  leavesOn: string | null, orderUrl: string,
}

/** Reads what e-mails about a job tell, as it stands in the caller's transaction. */
export async function readJobMailFacts(tx: Transaction, jobId: string, options: { origin: string, timeZone: string }): Promise<JobMailFacts> {
  const [row] = await tx.select({
    orderId: orders.id, number: orders.number, email: orders.contactEmail, title: orders.title, name: orders.contactName,
    quantity: jobs.quantity, currency: quotes.currency,
  }).from(jobs).innerJoin(orders, eq(orders.id, jobs.orderId)).innerJoin(quotePrices, eq(quotePrices.id, jobs.quotePriceId)).innerJoin(quotes, eq(quotes.id, quotePrices.quoteId))
    .where(eq(jobs.id, jobId))
  if (!row) throw new Error(`job ${jobId} is gone`)
  const due = await findAmountDue(tx, row.orderId, 'balance')
  const [plan] = await tx.select({
    leavesOn: sql<string | null>`case when bool_and(${operations.plannedSpan} is not null) then to_char(max(upper(${operations.plannedSpan})) at time zone ${options.timeZone}, 'YYYY-MM-DD') end`,
  }).from(operations).where(eq(operations.jobId, jobId))
  const ref = orderRefOf(row.number)
  return {
    recipient: row.email, orderId: row.orderId, about: { orderRef: ref, title: row.title, contactName: row.name }, quantity: row.quantity, currency: row.currency,
    balanceMinor: due?.amountMinor ?? 0, leavesOn: plan?.leavesOn ?? null, orderUrl: `${options.origin}/account/orders/${ref}`,
  }
}
