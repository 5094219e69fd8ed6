import type Stripe from 'stripe'
import { NO_REQUEST } from '../cause'
import type { Fake } from '../fake'
import { createBalanceTransaction } from '../resources/balance-transactions'

const BOOKING_DELAY_MS = 1000

/** Records that the money of a charge has arrived: charge and payment intent succeed, in this order. */
export function captureCharge(fake: Fake, intent: Stripe.PaymentIntent, charge: Stripe.Charge): void {
  charge.status = 'succeeded'
  charge.paid = true
  charge.captured = true
  charge.amount_captured = charge.amount
  intent.status = 'succeeded'
  intent.amount_received = intent.amount
  intent.latest_charge = charge.id
  intent.next_action = null
  intent.last_payment_error = null
  fake.emit('charge.succeeded', charge, NO_REQUEST)
  fake.emit('payment_intent.succeeded', intent, NO_REQUEST)
}

/** With asynchronous capture the balance is booked a moment later, told by charge.updated. */
export function bookLater(fake: Fake, charge: Stripe.Charge): void {
  fake.scheduler.plan('bookCharge', charge.id, 'succeeded', BOOKING_DELAY_MS)
}

/** Books a captured charge in the balance, once. */
export function bookCharge(fake: Fake, chargeId: string): void {
  const charge = fake.state.charges[chargeId]
  if (!charge || charge.balance_transaction !== null) return
  charge.balance_transaction = createBalanceTransaction(fake, {
    amountMinor: charge.amount_captured, currency: charge.currency, sourceId: charge.id, type: 'charge', category: 'charge',
  }).id
  fake.emit('charge.updated', charge, NO_REQUEST, { balance_transaction: null })
}

function sessionOf(fake: Fake, intent: Stripe.PaymentIntent): Stripe.Checkout.Session | undefined {
  return Object.values(fake.state.sessions).find(session => session.payment_intent === intent.id)
}

/** Ends a bank debit that is under way; does nothing when it has ended before. Answers whether it did something. */
export function settlePayment(fake: Fake, intentId: string, outcome: 'succeeded' | 'failed'): boolean {
  const intent = fake.state.paymentIntents[intentId]
  const charge = typeof intent?.latest_charge === 'string' ? fake.state.charges[intent.latest_charge] : undefined
  if (!intent || !charge || intent.status !== 'processing') return false
  fake.scheduler.cancel(intentId)
  const session = sessionOf(fake, intent)
  if (outcome === 'succeeded') {
    captureCharge(fake, intent, charge)
    if (session) {
      session.payment_status = 'paid'
      fake.emit('checkout.session.async_payment_succeeded', session, NO_REQUEST)
    }
    bookLater(fake, charge)
    return true
  }
  charge.status = 'failed'
  charge.failure_code = 'insufficient_funds'
  charge.failure_message = 'The customer’s account has insufficient funds to cover this payment.'
  fake.emit('charge.failed', charge, NO_REQUEST)
  intent.status = 'requires_payment_method'
  intent.payment_method = null
  intent.last_payment_error = { type: 'card_error', code: 'insufficient_funds', charge: charge.id, message: charge.failure_message }
  fake.emit('payment_intent.payment_failed', intent, NO_REQUEST)
  if (session) fake.emit('checkout.session.async_payment_failed', session, NO_REQUEST)
  return true
}
