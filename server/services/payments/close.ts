import { and, eq } from 'drizzle-orm'
import Stripe from 'stripe'
import { log } from '../../utils/log'
import { payments } from '../../database/schema'
import type { Database } from '../../database/client'
import { DomainError } from '../errors'
import type { PaymentRow } from './attempts'
import type { PaymentDesk } from './desk'
import { findSession, syncSession } from './sync'

/**
 * Closes an attempt that should take no money any more: its session is expired at Stripe first, and what Stripe then says is what
 * counts. When it was paid in the same moment, it is booked instead.
 * @throws DomainError unavailable when Stripe does not answer; the attempt stays open
 */
export async function closeSession(db: Database, desk: PaymentDesk, payment: PaymentRow): Promise<void> {
  try {
    const sessionId = payment.stripeSessionId ?? await findSession(desk, payment)
    if (!sessionId) {
      // Stripe has never heard of it: the process died before the call, or the call never arrived.
      await db.update(payments).set({ state: 'expired' }).where(and(eq(payments.id, payment.id), eq(payments.state, 'opening')))
      return
    }
    try {
      await desk.stripe.checkout.sessions.expire(sessionId)
    }
    catch (error) {
      // It is complete or expired already; the sync reads which.
      if (!(error instanceof Stripe.errors.StripeInvalidRequestError)) throw error
    }
    await syncSession(db, desk, sessionId)
  }
  catch (error) {
    if (!(error instanceof Stripe.errors.StripeError)) throw error
    log.warn('payment-close-unanswered', { payment: payment.id, type: error.type })
    throw new DomainError('unavailable', 'The payment service does not answer just now. Nothing was taken. Try again in a minute.', [], 30)
  }
}
