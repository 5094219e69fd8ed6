import { and, asc, eq, lt, notInArray, or, sql } from 'drizzle-orm'
import { orders, payments } from '../../database/schema'
import type { Database } from '../../database/client'
import { log } from '../../utils/log'
import { DomainError } from '../errors'
import { isUnfinished, type PaymentRow } from './attempts'
import { PAYABLE_IN } from './amount-due'
import { closeSession } from './close'
import type { PaymentDesk } from './desk'
import { createSession } from './open'
import { findSession, syncSession } from './sync'

const BATCH = 200
/** An attempt younger than this may still be in the hands of the request that opened it. */
const OPENING_MINUTES = 2

/**
 * Reads attempts that are not finished back from Stripe, oldest first, in case a webhook was lost or a process died half way.
 * One that fails does not stop the others. Safe beside other processes: reading twice changes nothing.
 */
export async function reconcilePayments(db: Database, desk: PaymentDesk, { olderThanMinutes }: { olderThanMinutes: number }): Promise<{ read: number, failed: number }> {
  const rows = await db.select().from(payments)
    .where(and(isUnfinished(), lt(payments.createdAt, sql`now() - make_interval(mins => ${olderThanMinutes})`))).orderBy(asc(payments.createdAt)).limit(BATCH)
  let failed = 0
  for (const payment of rows) {
    try {
      await reconcilePayment(db, desk, payment)
    }
    catch (error) {
      failed += 1
      log.error('payment-reconcile', error, { payment: payment.id })
    }
  }
  return { read: rows.length, failed }
}

async function reconcilePayment(db: Database, desk: PaymentDesk, payment: PaymentRow): Promise<void> {
  if (payment.stripeSessionId) {
    await syncSession(db, desk, payment.stripeSessionId)
    return
  }
  const ageMs = Date.now() - payment.createdAt.getTime()
  if (ageMs < OPENING_MINUTES * 60_000) return
  const sessionId = await findSession(desk, payment)
  if (sessionId) {
    await syncSession(db, desk, sessionId)
    return
  }
  // The key still answers within a day: the attempt is completed as it was meant. Later it is closed, and paying again makes the next one.
  const [order] = await db.select({ id: orders.id, number: orders.number, state: orders.state }).from(orders).where(eq(orders.id, payment.orderId))
  const isMeant = order && PAYABLE_IN[payment.kind].includes(order.state) && payment.expiresAt.getTime() - Date.now() > 60 * 60_000
  if (isMeant) await createSession(db, desk, order, payment)
  else await db.update(payments).set({ state: 'expired' }).where(and(eq(payments.id, payment.id), eq(payments.state, 'opening')))
}

/** Closes the open pages of orders that take no such payment any more: withdrawn, revised, cancelled. */
export async function closeUnwantedPayments(db: Database, desk: PaymentDesk): Promise<number> {
  const rows = await db.select({ payment: payments }).from(payments).innerJoin(orders, eq(orders.id, payments.orderId)).where(and(
    sql`${payments.state} in ('opening', 'open')`, lt(payments.createdAt, sql`now() - make_interval(secs => 10)`),
    or(and(eq(payments.kind, 'deposit'), notInArray(orders.state, [...PAYABLE_IN.deposit])), and(eq(payments.kind, 'balance'), notInArray(orders.state, [...PAYABLE_IN.balance]))),
  )).limit(BATCH)
  for (const { payment } of rows) {
    try {
      await closeSession(db, desk, payment)
    }
    catch (error) {
      log.error('payment-close', error, { payment: payment.id })
      // Stripe does not answer: the others wait for the next turn, so that they hold up nobody's event meanwhile.
      if (error instanceof DomainError && error.code === 'unavailable') break
    }
  }
  return rows.length
}
