import { and, asc, eq } from 'drizzle-orm'
import type { OrderState } from '#shared/schemas/order-states'
import type { OrderStatusView } from '#shared/schemas/quote'
import { OPERATION_NAMES } from '#shared/schemas/shop'
import { jobs, operations, orderEvents, quotePrices, quotes } from '../../database/schema'
import type { Queryable } from '../../database/client'
import type { ServiceContext } from '../context'
import { findSentRevision } from '../quotes/find-revision'
import { workingPointsOf } from '../springs/requirement'
import { requireOwnOrder, type OrderRecord } from './access'
import { paidMinor as readPaidMinor } from '../payments/amount-due'
import { findPaymentStatus, paymentKindOf } from './payment-status'
import { orderRefOf } from './reference'

/**
 * Where an order stands, for its signed-in customer: what was accepted, what was paid, what happened and what is being done.
 * @throws DomainError not-found for anybody else
 */
export async function getOrderStatus(context: ServiceContext, { ref }: { ref: string }): Promise<OrderStatusView> {
  const order = await requireOwnOrder(context, ref)
  const { db } = context
  const [accepted, sent, paidMinor, events, job] = await Promise.all([
    findAccepted(db, order), order.state === 'enquiry' ? null : findSentRevision(db, order.id), readPaidMinor(db, order.id), listEvents(db, order.id), findJob(db, order.id),
  ])
  const quote = accepted?.quote ?? sent
  const balanceMinor = accepted ? accepted.rung.grossMinor - accepted.rung.depositMinor : null
  return {
    ref: orderRefOf(order.number), title: order.title, firm: order.firmName, state: order.state, version: order.version, quantity: order.acceptedQuantity,
    currency: quote?.currency ?? 'eur', design: quote?.design ?? null, points: workingPointsOf(order.request.requirement),
    grossMinor: accepted?.rung.grossMinor ?? null, depositMinor: accepted?.rung.depositMinor ?? null, balanceMinor, paidMinor,
    promisedOn: job?.promisedOn ?? accepted?.rung.dispatchOn ?? null, quoteRevision: quote?.revision ?? null,
    events, operations: job ? await listOperations(db, job.id) : [],
    canPay: payableOf(order.state, { isDepositDue: (accepted?.rung.depositMinor ?? 0) > 0, isBalanceDue: accepted !== null && accepted.rung.grossMinor > paidMinor }),
    payment: await findPaymentStatus(db, order.id, paymentKindOf(order.state)),
  }
}

function payableOf(state: OrderState, { isDepositDue, isBalanceDue }: { isDepositDue: boolean, isBalanceDue: boolean }): OrderStatusView['canPay'] {
  if (state === 'accepted' && isDepositDue) return 'deposit'
  return (state === 'finished' || state === 'dispatched') && isBalanceDue ? 'balance' : null
}

async function findAccepted(db: Queryable, { acceptedQuoteId, acceptedQuantity }: OrderRecord) {
  if (acceptedQuoteId === null || acceptedQuantity === null) return null
  const [row] = await db.select({ quote: quotes, rung: quotePrices }).from(quotes)
    .innerJoin(quotePrices, and(eq(quotePrices.quoteId, quotes.id), eq(quotePrices.quantity, acceptedQuantity))).where(eq(quotes.id, acceptedQuoteId))
  return row ?? null
}

async function listEvents(db: Queryable, orderId: string): Promise<OrderStatusView['events']> {
  const rows = await db.select({ at: orderEvents.at, to: orderEvents.toState, why: orderEvents.why }).from(orderEvents)
    .where(eq(orderEvents.orderId, orderId)).orderBy(asc(orderEvents.id)).limit(200)
  return rows.map(row => ({ ...row, at: row.at.toISOString() }))
}

async function findJob(db: Queryable, orderId: string) {
  const [job] = await db.select({ id: jobs.id, promisedOn: jobs.promisedOn }).from(jobs).where(eq(jobs.orderId, orderId))
  return job ?? null
}

async function listOperations(db: Queryable, jobId: string): Promise<OrderStatusView['operations']> {
  const rows = await db.select({ kind: operations.kind, state: operations.state, finishedAt: operations.finishedAt }).from(operations)
    .where(eq(operations.jobId, jobId)).orderBy(asc(operations.position))
  return rows.map(row => ({ name: OPERATION_NAMES[row.kind], state: row.state, finishedAt: row.finishedAt?.toISOString() ?? null }))
}
