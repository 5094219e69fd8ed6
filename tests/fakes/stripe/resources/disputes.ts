import type Stripe from 'stripe'
import { resourceMissing } from '../errors'
import { NO_REQUEST } from '../cause'
import type { Fake } from '../fake'
import type { FormTable } from '../form-decoding'
import { createId } from '../ids'
import { listPage, matchesCreated } from '../lists'
import type { ListPage } from '../lists'
import { createdFilter, expandParam, listParams, parseParams, text } from '../params'
import { createBalanceTransaction } from './balance-transactions'

const RESPONSE_TIME_S = 7 * 24 * 60 * 60

const NO_EVIDENCE: Stripe.Dispute.Evidence = {
  access_activity_log: null, billing_address: null, cancellation_policy: null, cancellation_policy_disclosure: null,
  cancellation_rebuttal: null, customer_communication: null, customer_email_address: null, customer_name: null,
  customer_purchase_ip: null, customer_signature: null, duplicate_charge_documentation: null, duplicate_charge_explanation: null,
  duplicate_charge_id: null, enhanced_evidence: {}, product_description: null, receipt: null, refund_policy: null,
  refund_policy_disclosure: null, refund_refusal_explanation: null, service_date: null, service_documentation: null,
  shipping_address: null, shipping_carrier: null, shipping_date: null, shipping_documentation: null, shipping_tracking_number: null,
  uncategorized_file: null, uncategorized_text: null,
}

/** Opens a dispute over a captured charge and withdraws the money. Answers null when there is nothing to dispute. */
export function openDispute(fake: Fake, chargeId: string, settings: { amountMinor?: number, reason?: string }): Stripe.Dispute | null {
  const charge = fake.state.charges[chargeId]
  if (!charge || charge.status !== 'succeeded' || charge.disputed) return null
  const amountMinor = settings.amountMinor ?? charge.amount_captured - charge.amount_refunded
  const createdS = fake.clock.nowS()
  const dispute: Stripe.Dispute = {
    id: createId('dispute'),
    object: 'dispute',
    amount: amountMinor,
    balance_transactions: [],
    charge: charge.id,
    created: createdS,
    currency: charge.currency,
    enhanced_eligibility_types: [],
    evidence: NO_EVIDENCE,
    evidence_details: {
      due_by: createdS + RESPONSE_TIME_S, enhanced_eligibility: {}, has_evidence: false, past_due: false, submission_count: 0,
      submission_method: 'not_submitted',
    },
    intended_submission_method: null,
    is_charge_refundable: false,
    livemode: false,
    metadata: {},
    network_reason_code: '10.4',
    payment_intent: charge.payment_intent,
    payment_method_details: { type: 'card', card: { brand: 'visa', case_type: 'chargeback', network: 'visa', network_reason_code: '10.4' } },
    reason: settings.reason ?? 'fraudulent',
    status: 'needs_response',
  }
  fake.state.disputes[dispute.id] = dispute
  charge.disputed = true
  fake.emit('charge.dispute.created', dispute, NO_REQUEST)
  dispute.balance_transactions.push(createBalanceTransaction(fake, {
    amountMinor: -amountMinor, currency: charge.currency, sourceId: dispute.id, type: 'adjustment', category: 'dispute',
  }))
  fake.emit('charge.dispute.funds_withdrawn', dispute, NO_REQUEST)
  return dispute
}

/** Closes an open dispute; a won one brings the money back. Answers null when it is unknown or closed. */
export function closeDispute(fake: Fake, disputeId: string, outcome: 'won' | 'lost'): Stripe.Dispute | null {
  const dispute = fake.state.disputes[disputeId]
  if (!dispute || dispute.status === 'won' || dispute.status === 'lost') return null
  const previous = { status: dispute.status }
  dispute.status = outcome
  if (outcome === 'won') {
    dispute.balance_transactions.push(createBalanceTransaction(fake, {
      amountMinor: dispute.amount, currency: dispute.currency, sourceId: dispute.id, type: 'adjustment', category: 'dispute_reversal',
    }))
    fake.emit('charge.dispute.funds_reinstated', dispute, NO_REQUEST)
  }
  fake.emit('charge.dispute.closed', dispute, NO_REQUEST, previous)
  return dispute
}

/** GET /v1/disputes/:id */
export function retrieveDispute(fake: Fake, id: string, form: FormTable): Stripe.Dispute {
  parseParams(form, expandParam)
  const dispute = fake.state.disputes[id]
  if (!dispute) throw resourceMissing('dispute', id)
  return dispute
}

/** GET /v1/disputes */
export function listDisputes(fake: Fake, form: FormTable): ListPage<Stripe.Dispute> {
  const read = parseParams(form, { ...listParams, charge: text(), created: createdFilter(), payment_intent: text() })
  const matching = Object.values(fake.state.disputes).filter(dispute => matchesCreated(dispute.created, read.created)
    && (read.charge === undefined || dispute.charge === read.charge)
    && (read.payment_intent === undefined || dispute.payment_intent === read.payment_intent))
  return listPage(matching, '/v1/disputes', read)
}
