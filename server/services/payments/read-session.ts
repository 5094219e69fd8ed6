import type Stripe from 'stripe'
import type { PaymentRow } from './attempts'

type Ids = { sessionId: string, paymentIntentId: string | null, url: string | null }
/** What a session means for its attempt. `fact` names the capture, so that it is booked once. */
export type SessionReading =
  | { state: 'mismatch', words: string }
  | Ids & { state: 'open' | 'processing' | 'failed' | 'expired' }
  | Ids & { state: 'paid', fact: string }

/**
 * Reads a session against what was asked for: ids, amount, currency, mode and livemode must all be ours before it means
 * anything. A value that this version does not know is a mismatch, never a guess.
 */
export function readSession(session: Stripe.Checkout.Session, payment: Pick<PaymentRow, 'id' | 'stripeSessionId' | 'amountMinor' | 'currency'>, livemode: boolean): SessionReading {
  // An expired session takes no money, whatever else it says.
  if (session.status === 'expired' && session.client_reference_id === payment.id) return { sessionId: session.id, paymentIntentId: null, url: null, state: 'expired' }
  const expected: [string, unknown, unknown][] = [
    ['client_reference_id', session.client_reference_id, payment.id],
    ['metadata.payment_id', session.metadata?.payment_id, payment.id],
    ['amount_total', session.amount_total, payment.amountMinor],
    ['currency', session.currency, payment.currency],
    ['mode', session.mode, 'payment'],
    ['livemode', session.livemode, livemode],
    ['id', session.id, payment.stripeSessionId ?? session.id],
  ]
  const wrong = expected.find(([, got, wanted]) => got !== wanted)
  if (wrong) return { state: 'mismatch', words: `${wrong[0]} is ${String(wrong[1]).slice(0, 80)}, not ${String(wrong[2]).slice(0, 80)}` }

  const intent = typeof session.payment_intent === 'object' ? session.payment_intent : null
  const paymentIntentId = intent?.id ?? (typeof session.payment_intent === 'string' ? session.payment_intent : null)
  const ids = { sessionId: session.id, paymentIntentId, url: session.url }
  if (session.status === 'open') return { ...ids, state: 'open' }
  if (session.status !== 'complete') return { state: 'mismatch', words: `status is ${String(session.status).slice(0, 40)}` }
  if (session.payment_status === 'paid' || session.payment_status === 'no_payment_required') return { ...ids, state: 'paid', fact: `capture:${paymentIntentId ?? session.id}` }
  if (session.payment_status !== 'unpaid') return { state: 'mismatch', words: `payment_status is ${String(session.payment_status).slice(0, 40)}` }
  // Complete and unpaid is a slow payment, until its intent wants another means of payment: then it has failed.
  return { ...ids, state: intent?.status === 'requires_payment_method' || intent?.status === 'canceled' ? 'failed' : 'processing' }
}
