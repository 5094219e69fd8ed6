import type Stripe from 'stripe'
import { eq, or } from 'drizzle-orm'
import { orders, payments } from '../../database/schema'
import type { Database, Transaction } from '../../database/client'
import { log } from '../../utils/log'
import { inTransaction } from '../context'
import type { PaymentRow } from './attempts'
import { bookCapture, type Capture } from './book-capture'
import type { PaymentDesk } from './desk'
import { readSession, type SessionReading } from './read-session'
import { tellFailed } from './tell-failed'

/** What came of reading a session: `applied` also when everything was known already. */
export type SyncOutcome = { outcome: 'applied' | 'not-ours' | 'quarantined', words: string }

/** Stripe's present state of a session, with the payment behind it. */
export const fetchSession = (desk: PaymentDesk, sessionId: string): Promise<Stripe.Checkout.Session> =>
  desk.stripe.checkout.sessions.retrieve(sessionId, { expand: ['payment_intent'] })

/**
 * Brings our record of an attempt to what Stripe says now. Whoever calls it (the webhook's job, the page the customer returns to,
 * the timer) and however often, the outcome is the same: states only move forwards, and money is booked once.
 */
export async function syncSession(db: Database, desk: PaymentDesk, sessionId: string): Promise<SyncOutcome> {
  const session = await fetchSession(desk, sessionId)
  return inTransaction(db, tx => applySession(tx, desk, session))
}

/** Looks up the session of an attempt whose answer was lost, by the id that we gave it. Null when Stripe has none. */
export async function findSession(desk: PaymentDesk, payment: Pick<PaymentRow, 'id' | 'createdAt'>): Promise<string | null> {
  const createdS = Math.floor(payment.createdAt.getTime() / 1000)
  const list = desk.stripe.checkout.sessions.list({ created: { gte: createdS - 3_600, lte: createdS + 25 * 3_600 }, limit: 100 })
  for await (const session of list) {
    if (session.client_reference_id === payment.id) return session.id
  }
  return null
}

async function applySession(tx: Transaction, desk: PaymentDesk, session: Stripe.Checkout.Session): Promise<SyncOutcome> {
  const reference = /^[0-9a-f-]{36}$/.test(session.client_reference_id ?? '') ? session.client_reference_id : null
  const [known] = await tx.select({ id: payments.id, orderId: payments.orderId }).from(payments)
    .where(or(eq(payments.stripeSessionId, session.id), reference ? eq(payments.id, reference) : undefined))
  if (!known) return { outcome: 'not-ours', words: 'no attempt of ours' }

  // One order of locks everywhere: order, payment, ledger.
  const [order] = await tx.select().from(orders).where(eq(orders.id, known.orderId)).for('update')
  const [payment] = await tx.select().from(payments).where(eq(payments.id, known.id)).for('update')
  if (!order || !payment) throw new Error(`payment ${known.id} has no order`)

  const reading = readSession(session, payment, desk.livemode)
  if (reading.state === 'mismatch') {
    log.error('payment-quarantined', new Error(reading.words), { payment: payment.id, session: session.id })
    return { outcome: 'quarantined', words: reading.words }
  }
  return { outcome: 'applied', words: await moveForward(tx, desk, { order, payment }, reading) }
}

type Subject = Pick<Capture, 'order' | 'payment'>

async function moveForward(tx: Transaction, desk: PaymentDesk, subject: Subject, reading: Exclude<SessionReading, { state: 'mismatch' }>): Promise<string> {
  const { payment } = subject
  const isFinal = payment.state === 'paid' || payment.state === 'failed' || payment.state === 'expired'
  if (reading.state === 'paid') return bookCapture(tx, desk, { ...subject, fact: reading.fact, paymentIntentId: reading.paymentIntentId, sessionId: reading.sessionId })
  if (isFinal) return `stays ${payment.state}`
  if (reading.state === 'open' && payment.state === 'processing') return 'stays processing'

  await tx.update(payments).set({
    state: reading.state, stripeSessionId: reading.sessionId, ...(reading.paymentIntentId ? { stripePaymentIntentId: reading.paymentIntentId } : {}), ...(reading.url ? { url: reading.url } : {}),
  }).where(eq(payments.id, payment.id))
  if (reading.state === 'failed') await tellFailed(tx, desk, subject)
  return reading.state
}
