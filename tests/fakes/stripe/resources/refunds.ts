import type Stripe from 'stripe'
import { getTestCard } from '../cards'
import { invalidRequest, missingParameter, refusedByState, resourceMissing } from '../errors'
import { NO_REQUEST } from '../cause'
import type { Cause } from '../cause'
import type { Fake } from '../fake'
import type { FormTable } from '../form-decoding'
import { createId } from '../ids'
import { listPage, matchesCreated } from '../lists'
import type { ListPage } from '../lists'
import { formatAmount } from '../money'
import { createdFilter, expandParam, integer, listParams, metadata, parseParams, text, unmodelled } from '../params'
import { createBalanceTransaction } from './balance-transactions'
import { getCharge } from './charges'
import { getPaymentIntent } from './payment-intents'

const createParams = {
  ...expandParam,
  amount: integer({ min: 1 }),
  charge: text(),
  currency: unmodelled(),
  customer: unmodelled(),
  instructions_email: unmodelled(),
  metadata: metadata(),
  origin: unmodelled(),
  payment_intent: text(),
  reason: text({ oneOf: ['duplicate', 'fraudulent', 'requested_by_customer'] }),
  refund_application_fee: unmodelled(),
  reverse_transfer: unmodelled(),
}

type Plan = 'succeeded' | 'pending' | 'failed' | 'pendingThenSucceeds' | 'succeedsThenFails'

function findRefundableCharge(fake: Fake, read: { charge?: string, payment_intent?: string }): Stripe.Charge {
  if (read.charge !== undefined) return getCharge(fake, read.charge, 'charge')
  if (read.payment_intent === undefined) throw missingParameter('payment_intent')
  const intent = getPaymentIntent(fake, read.payment_intent)
  if (intent.status !== 'succeeded' || typeof intent.latest_charge !== 'string') {
    throw refusedByState(`This PaymentIntent (${intent.id}) does not have a successful charge to refund.`, { code: 'payment_intent_unexpected_state', param: 'payment_intent' })
  }
  return getCharge(fake, intent.latest_charge)
}

function planFor(fake: Fake, charge: Stripe.Charge): Plan {
  const next = fake.state.nextRefundOutcomes.shift()
  if (next) return next
  const session = Object.values(fake.state.sessions).find(candidate => candidate.payment_intent === charge.payment_intent)
  const cardUsed = session ? fake.state.setups[session.id]?.cardUsed : null
  return (cardUsed ? getTestCard(cardUsed).refund : undefined) ?? 'succeeded'
}

/** POST /v1/refunds */
export function createRefund(fake: Fake, form: FormTable, cause: Cause): Stripe.Refund {
  const read = parseParams(form, createParams)
  if (read.charge !== undefined && read.payment_intent !== undefined) {
    throw invalidRequest('You may only specify one of these parameters: charge, payment_intent.', { code: 'parameters_exclusive', param: 'charge' })
  }
  const charge = findRefundableCharge(fake, read)
  const remainingMinor = charge.amount_captured - charge.amount_refunded
  const amountMinor = read.amount ?? remainingMinor
  if (charge.status !== 'succeeded') throw refusedByState(`Charge ${charge.id} has not succeeded and cannot be refunded.`, { code: 'charge_not_refundable', param: 'charge' })
  if (charge.disputed) throw refusedByState(`Charge ${charge.id} has been charged back; cannot issue a refund.`, { code: 'charge_disputed', param: 'charge' })
  if (remainingMinor <= 0) throw refusedByState(`Charge ${charge.id} has already been refunded.`, { code: 'charge_already_refunded', param: 'charge' })
  if (amountMinor > remainingMinor) {
    throw refusedByState(
      `Refund amount (${formatAmount(amountMinor, charge.currency)}) is greater than unrefunded amount on charge (${formatAmount(remainingMinor, charge.currency)})`,
      { param: 'amount' },
    )
  }
  const plan = planFor(fake, charge)
  const refund: Stripe.Refund = {
    id: createId('refund'),
    object: 'refund',
    amount: amountMinor,
    balance_transaction: createBalanceTransaction(fake, {
      amountMinor: -amountMinor, currency: charge.currency, sourceId: charge.id, type: 'refund', category: 'refund',
    }).id,
    charge: charge.id,
    created: fake.clock.nowS(),
    currency: charge.currency,
    customer: typeof charge.customer === 'string' ? charge.customer : null,
    customer_account: null,
    destination_details: { type: 'card', card: { reference_status: 'pending', reference_type: 'acquirer_reference_number', type: 'refund' } },
    metadata: read.metadata ?? {},
    payment_intent: typeof charge.payment_intent === 'string' ? charge.payment_intent : null,
    payment_method: charge.payment_method,
    ...(plan === 'pending' || plan === 'failed' || plan === 'pendingThenSucceeds' ? { pending_reason: 'processing' } : {}),
    reason: read.reason ?? null,
    receipt_number: null,
    source_transfer_reversal: null,
    status: plan === 'succeeded' || plan === 'succeedsThenFails' ? 'succeeded' : 'pending',
    transfer_reversal: null,
  }
  fake.state.refunds[refund.id] = refund
  fake.emit('refund.created', refund, cause)
  applyToCharge(fake, charge, amountMinor, cause)
  if (plan === 'pendingThenSucceeds') fake.scheduler.plan('settleRefund', refund.id, 'succeeded', fake.options.settleAfterMs)
  if (plan === 'succeedsThenFails') fake.scheduler.plan('settleRefund', refund.id, 'failed', fake.options.settleAfterMs)
  const answered = structuredClone(refund)
  if (plan === 'failed') settleRefund(fake, refund.id, 'failed')
  return answered
}

function applyToCharge(fake: Fake, charge: Stripe.Charge, amountMinor: number, cause: Cause): void {
  const previous = { amount_refunded: charge.amount_refunded, refunded: charge.refunded }
  charge.amount_refunded += amountMinor
  charge.refunded = charge.amount_refunded === charge.amount_captured
  fake.emit('charge.refunded', charge, cause, previous)
}

/** Ends a refund: it went through, or it failed and the money is back. Answers whether it did something. */
export function settleRefund(fake: Fake, refundId: string, outcome: 'succeeded' | 'failed'): boolean {
  const refund = fake.state.refunds[refundId]
  if (!refund || refund.status === 'failed' || refund.status === outcome) return false
  fake.scheduler.cancel(refundId)
  const previous = { status: refund.status }
  refund.status = outcome
  delete refund.pending_reason
  if (outcome === 'succeeded') {
    fake.emit('refund.updated', refund, NO_REQUEST, previous)
    fake.emit('charge.refund.updated', refund, NO_REQUEST, previous)
    return true
  }
  refund.failure_reason = 'expired_or_canceled_card'
  refund.failure_balance_transaction = createBalanceTransaction(fake, {
    amountMinor: refund.amount, currency: refund.currency, sourceId: refund.id, type: 'refund_failure', category: 'refund_failure',
  }).id
  const charge = typeof refund.charge === 'string' ? fake.state.charges[refund.charge] : undefined
  if (charge) {
    charge.amount_refunded -= refund.amount
    charge.refunded = false
  }
  fake.emit('refund.updated', refund, NO_REQUEST, previous)
  fake.emit('refund.failed', refund, NO_REQUEST, previous)
  fake.emit('charge.refund.updated', refund, NO_REQUEST, previous)
  return true
}

/** GET /v1/refunds/:id */
export function retrieveRefund(fake: Fake, id: string, form: FormTable): Stripe.Refund {
  parseParams(form, expandParam)
  const refund = fake.state.refunds[id]
  if (!refund) throw resourceMissing('refund', id)
  return refund
}

/** GET /v1/refunds */
export function listRefunds(fake: Fake, form: FormTable): ListPage<Stripe.Refund> {
  const read = parseParams(form, { ...listParams, charge: text(), created: createdFilter(), payment_intent: text() })
  const matching = Object.values(fake.state.refunds).filter(refund => matchesCreated(refund.created, read.created)
    && (read.charge === undefined || refund.charge === read.charge)
    && (read.payment_intent === undefined || refund.payment_intent === read.payment_intent))
  return listPage(matching, '/v1/refunds', read)
}
