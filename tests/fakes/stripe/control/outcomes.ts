import type Stripe from 'stripe'
import { findTestCard, getTestCard } from '../cards'
import { invalidRequest, refusedByState } from '../errors'
import { NO_REQUEST } from '../cause'
import type { Fake } from '../fake'
import { attemptPayment, endAuthentication } from '../flow/attempt'
import { expireSession } from '../flow/expiry'
import { settlePayment } from '../flow/settlement'
import { getSession } from '../resources/checkout-sessions'
import { readJsonBody } from './json-body'

/** What can be made to happen to a session without its page. */
export const SESSION_OUTCOMES = [
  'paid', 'declined', 'authenticationRequired', 'authenticated', 'authenticationFailed',
  'asyncPending', 'asyncSucceeded', 'asyncFailed', 'expired',
] as const

/** One of the outcomes a session can be given. */
export type SessionOutcome = typeof SESSION_OUTCOMES[number]

const CARD_FOR: Partial<Record<SessionOutcome, string>> = {
  paid: '4242424242424242', declined: '4000000000000002', authenticationRequired: '4000002500003155',
}

function authenticate(fake: Fake, session: Stripe.Checkout.Session, isPassed: boolean, payer: { email: string | null, name: string | null }): void {
  if (fake.state.setups[session.id]?.cardAwaitingAuthentication === null) {
    attemptPayment(fake, session, { card: getTestCard('4000002500003155') }, payer)
  }
  endAuthentication(fake, session, isPassed)
}

/** POST /_fake/sessions/:id/outcome: plays the customer, the bank or time. */
export function applySessionOutcome(fake: Fake, id: string, body: string): object {
  const reader = readJsonBody(body)
  const outcome = reader.required('outcome', SESSION_OUTCOMES)
  const email = reader.text('email') ?? null
  const name = reader.text('name') ?? null
  const cardNumber = reader.text('card')
  reader.done()
  const session = getSession(fake, id)
  const payer = { email: session.customer_email ?? email ?? 'customer@example.com', name }
  const isSettling = (outcome === 'asyncSucceeded' || outcome === 'asyncFailed') && session.status === 'complete'
  if (session.status !== 'open' && !isSettling) throw refusedByState(`The session is ${session.status}.`)
  if (isSettling) {
    const intentId = typeof session.payment_intent === 'string' ? session.payment_intent : ''
    if (!settlePayment(fake, intentId, outcome === 'asyncSucceeded' ? 'succeeded' : 'failed')) throw refusedByState('The payment is not under way.')
  } else if (outcome === 'expired') {
    expireSession(fake, session, NO_REQUEST)
  } else if (outcome === 'authenticated' || outcome === 'authenticationFailed') {
    authenticate(fake, session, outcome === 'authenticated', payer)
  } else if (outcome === 'asyncPending' || outcome === 'asyncSucceeded' || outcome === 'asyncFailed') {
    attemptPayment(fake, session, { debitOutcome: null }, payer)
    if (outcome !== 'asyncPending') settlePayment(fake, String(session.payment_intent), outcome === 'asyncSucceeded' ? 'succeeded' : 'failed')
  } else {
    const card = findTestCard(cardNumber ?? CARD_FOR[outcome] ?? '')
    if (!card) throw invalidRequest('card must be a test number.', { param: 'card' })
    attemptPayment(fake, session, { card }, payer)
  }
  return session
}
