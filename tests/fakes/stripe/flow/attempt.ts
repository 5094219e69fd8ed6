import type Stripe from 'stripe'
import { getTestCard } from '../cards'
import type { TestCard } from '../cards'
import { NO_REQUEST } from '../cause'
import type { Fake } from '../fake'
import { createChargeObject } from '../resources/charges'
import { createCustomer } from '../resources/customers'
import { createPaymentIntentObject } from '../resources/payment-intents'
import { emptyCustomerDetails } from '../resources/session-object'
import type { SessionSetup } from '../state'
import { createPaymentMethod } from './payment-methods'
import type { Payer } from './payment-methods'
import { bookLater, captureCharge } from './settlement'

/** How a try to pay ended. */
export type AttemptOutcome = 'paid' | 'declined' | 'asks' | 'processing'

/** What the payer chose: a test card, or the bank debit and how it will end (null: only by hand). */
export type AttemptMethod = { card: TestCard } | { debitOutcome: 'succeeded' | 'failed' | null }

function setupOf(fake: Fake, session: Stripe.Checkout.Session): SessionSetup {
  const setup = fake.state.setups[session.id]
  if (!setup) throw new Error(`Session ${session.id} has no set-up`)
  return setup
}

/** The session's payment intent, made now if this is the first try. */
function ensurePaymentIntent(fake: Fake, session: Stripe.Checkout.Session): Stripe.PaymentIntent {
  const present = typeof session.payment_intent === 'string' ? fake.state.paymentIntents[session.payment_intent] : undefined
  if (present) return present
  const intent = createPaymentIntentObject(session, setupOf(fake, session), fake.clock.nowS())
  fake.state.paymentIntents[intent.id] = intent
  session.payment_intent = intent.id
  fake.emit('payment_intent.created', intent, NO_REQUEST)
  return intent
}

function failIntent(fake: Fake, intent: Stripe.PaymentIntent, error: Omit<Stripe.PaymentIntent.LastPaymentError, 'type'>, type: 'card_error' | 'invalid_request_error'): void {
  intent.status = 'requires_payment_method'
  intent.next_action = null
  intent.payment_method = null
  intent.last_payment_error = { type, ...error }
  fake.emit('payment_intent.payment_failed', intent, NO_REQUEST)
}

function decline(fake: Fake, intent: Stripe.PaymentIntent, method: Stripe.PaymentMethod, card: TestCard): AttemptOutcome {
  const charge = createChargeObject(intent, method, { status: 'failed', card }, { createdS: fake.clock.nowS(), isAuthenticated: false })
  fake.state.charges[charge.id] = charge
  intent.latest_charge = charge.id
  fake.emit('charge.failed', charge, NO_REQUEST)
  failIntent(fake, intent, {
    charge: charge.id,
    code: card.code ?? 'card_declined',
    ...(card.declineCode ? { decline_code: card.declineCode } : {}),
    doc_url: `https://stripe.com/docs/error-codes/${(card.code ?? 'card_declined').replaceAll('_', '-')}`,
    message: card.message ?? 'Your card was declined.',
    payment_method: method,
  }, 'card_error')
  return 'declined'
}

function completeSession(fake: Fake, session: Stripe.Checkout.Session, payer: Payer, paymentStatus: 'paid' | 'unpaid'): void {
  session.status = 'complete'
  session.payment_status = paymentStatus
  session.url = null
  session.customer_details = { ...emptyCustomerDetails(payer.email ?? ''), email: payer.email, name: payer.name, individual_name: payer.name }
  if (session.customer_creation === 'always' && session.customer === null) {
    session.customer = createCustomer(fake, { email: payer.email ?? undefined, name: payer.name ?? undefined }, NO_REQUEST).id
  }
  fake.emit('checkout.session.completed', session, NO_REQUEST)
}

function pay(fake: Fake, session: Stripe.Checkout.Session, intent: Stripe.PaymentIntent, method: Stripe.PaymentMethod, settings: { card: TestCard, payer: Payer, isAuthenticated: boolean }): AttemptOutcome {
  const charge = createChargeObject(intent, method, { status: 'succeeded' }, { createdS: fake.clock.nowS(), isAuthenticated: settings.isAuthenticated })
  fake.state.charges[charge.id] = charge
  setupOf(fake, session).cardUsed = settings.card.number
  captureCharge(fake, intent, charge)
  completeSession(fake, session, settings.payer, 'paid')
  bookLater(fake, charge)
  if (settings.card.isDisputed) fake.scheduler.plan('openDispute', charge.id, 'succeeded', fake.options.settleAfterMs)
  return 'paid'
}

function startDebit(fake: Fake, session: Stripe.Checkout.Session, intent: Stripe.PaymentIntent, method: Stripe.PaymentMethod, settings: { payer: Payer, debitOutcome: 'succeeded' | 'failed' | null }): AttemptOutcome {
  const charge = createChargeObject(intent, method, { status: 'pending' }, { createdS: fake.clock.nowS(), isAuthenticated: false })
  fake.state.charges[charge.id] = charge
  intent.latest_charge = charge.id
  intent.status = 'processing'
  fake.emit('payment_intent.processing', intent, NO_REQUEST)
  fake.emit('charge.pending', charge, NO_REQUEST)
  completeSession(fake, session, settings.payer, 'unpaid')
  if (settings.debitOutcome) fake.scheduler.plan('settlePayment', intent.id, settings.debitOutcome, fake.options.settleAfterMs)
  return 'processing'
}

/**
 * One try to pay an open session, carried out at once and without waiting, so that two requests can never both pay.
 * Throws when the session is not open: the caller shows its state instead.
 */
export function attemptPayment(fake: Fake, session: Stripe.Checkout.Session, chosen: AttemptMethod, payer: Payer): AttemptOutcome {
  if (session.status !== 'open') throw new Error(`Session ${session.id} is ${session.status}`)
  const setup = setupOf(fake, session)
  setup.nextAttemptNumber += 1
  setup.cardAwaitingAuthentication = null
  const intent = ensurePaymentIntent(fake, session)
  const currency = session.currency ?? ''
  const method = createPaymentMethod('card' in chosen ? chosen.card : 'delayed', currency, payer, fake.clock.nowS())
  fake.state.paymentMethods[method.id] = method
  intent.payment_method = method.id
  intent.last_payment_error = null
  intent.next_action = null
  if (!('card' in chosen)) return startDebit(fake, session, intent, method, { payer, debitOutcome: chosen.debitOutcome })
  if (chosen.card.outcome === 'declines') return decline(fake, intent, method, chosen.card)
  if (chosen.card.outcome === 'succeeds') return pay(fake, session, intent, method, { card: chosen.card, payer, isAuthenticated: false })
  setup.cardAwaitingAuthentication = chosen.card.number
  intent.status = 'requires_action'
  intent.next_action = {
    type: 'redirect_to_url',
    redirect_to_url: { return_url: `${fake.baseUrl}/c/pay/${session.id}`, url: `${fake.baseUrl}/c/pay/${session.id}/authenticate` },
  }
  fake.emit('payment_intent.requires_action', intent, NO_REQUEST)
  return 'asks'
}

/** Ends the second step that a session waits for. Throws when it waits for none. */
export function endAuthentication(fake: Fake, session: Stripe.Checkout.Session, isPassed: boolean): AttemptOutcome {
  const setup = setupOf(fake, session)
  const intent = typeof session.payment_intent === 'string' ? fake.state.paymentIntents[session.payment_intent] : undefined
  const method = typeof intent?.payment_method === 'string' ? fake.state.paymentMethods[intent.payment_method] : undefined
  if (session.status !== 'open' || setup.cardAwaitingAuthentication === null || !intent || !method) {
    throw new Error(`Session ${session.id} waits for no second step`)
  }
  const card = getTestCard(setup.cardAwaitingAuthentication)
  setup.cardAwaitingAuthentication = null
  setup.nextAttemptNumber += 1
  const { email, name } = method.billing_details
  if (isPassed) {
    intent.next_action = null
    return pay(fake, session, intent, method, { card, payer: { email, name }, isAuthenticated: true })
  }
  failIntent(fake, intent, {
    code: 'payment_intent_authentication_failure',
    doc_url: 'https://stripe.com/docs/error-codes/payment-intent-authentication-failure',
    message: 'The second step with the bank was not completed. Choose a different payment method or try again.',
    payment_method: method,
  }, 'invalid_request_error')
  return 'declined'
}
