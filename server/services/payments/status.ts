import { and, eq } from 'drizzle-orm'
import Stripe from 'stripe'
import type { PaymentStatus } from '#shared/schemas/payment'
import { payments } from '../../database/schema'
import { log } from '../../utils/log'
import type { ServiceContext } from '../context'
import { DomainError, notFound } from '../errors'
import { findOrder, isOwnOrder } from '../orders/access'
import { findPaymentStatus, paymentKindOf } from '../orders/payment-status'
import type { PaymentDesk } from './desk'
import { syncSession } from './sync'

/**
 * The state of an order's payment for its owner. When they come back from Stripe's page before the webhook, Stripe is asked; a
 * session that is not the order's own is passed over. Looking never makes anything paid.
 * @throws DomainError unauthenticated, not-found
 */
export async function readPayment(context: Pick<ServiceContext, 'db' | 'actor'>, desk: PaymentDesk, { ref, sessionId }: { ref: string, sessionId?: string }): Promise<PaymentStatus> {
  const { db, actor } = context
  if (!actor) throw new DomainError('unauthenticated', 'Sign in first.')
  const order = await findOrder(db, ref)
  if (!order || !isOwnOrder(actor, order)) throw notFound('order')
  if (sessionId === undefined) return findPaymentStatus(db, order.id, paymentKindOf(order.state))

  const find = () => db.select({ kind: payments.kind, state: payments.state, amountMinor: payments.amountMinor, currency: payments.currency }).from(payments)
    .where(and(eq(payments.orderId, order.id), eq(payments.stripeSessionId, sessionId)))
  const [attempt] = await find()
  if (!attempt) return findPaymentStatus(db, order.id, paymentKindOf(order.state))
  if (attempt.state === 'paid' || attempt.state === 'failed') return attempt
  try {
    await syncSession(db, desk, sessionId)
  }
  catch (error) {
    // The webhook or the timer brings it; the page says that it is being confirmed.
    if (!(error instanceof Stripe.errors.StripeError)) throw error
    log.warn('payment-read-unanswered', { order: ref, type: error.type })
  }
  const [now] = await find()
  return now ?? attempt
}
