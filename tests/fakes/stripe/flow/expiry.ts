import type Stripe from 'stripe'
import { NO_REQUEST } from '../cause'
import type { Cause } from '../cause'
import type { Fake } from '../fake'

/** Closes an open session for good: its page stops taking payments and an unfinished payment intent is cancelled. */
export function expireSession(fake: Fake, session: Stripe.Checkout.Session, cause: Cause): Stripe.Checkout.Session {
  session.status = 'expired'
  session.url = null
  const setup = fake.state.setups[session.id]
  if (setup) setup.cardAwaitingAuthentication = null
  const intent = typeof session.payment_intent === 'string' ? fake.state.paymentIntents[session.payment_intent] : undefined
  if (intent && intent.status !== 'succeeded') {
    intent.status = 'canceled'
    intent.canceled_at = fake.clock.nowS()
    intent.cancellation_reason = 'expired'
    intent.next_action = null
    fake.emit('payment_intent.canceled', intent, cause)
  }
  fake.emit('checkout.session.expired', session, cause)
  return session
}

/** Expires the sessions whose time is over; answers how many. */
export function expireDueSessions(fake: Fake): number {
  const nowS = fake.clock.nowS()
  const due = Object.values(fake.state.sessions).filter(session => session.status === 'open' && session.expires_at <= nowS)
  for (const session of due) expireSession(fake, session, NO_REQUEST)
  return due.length
}
