import type Stripe from 'stripe'
import type { TestCard } from '../cards'
import { resourceMissing } from '../errors'
import type { Fake } from '../fake'
import { chargeMethodDetails } from '../flow/payment-methods'
import type { FormTable } from '../form-decoding'
import { createId } from '../ids'
import { listPage, matchesCreated } from '../lists'
import type { ListPage } from '../lists'
import { createdFilter, expandParam, listParams, parseParams, text } from '../params'

/** How a charge stands when it is made. */
export type ChargeOutcome = { status: 'succeeded' | 'pending' } | { status: 'failed', card: TestCard }

const APPROVED: Stripe.Charge.Outcome = {
  advice_code: null, network_advice_code: null, network_decline_code: null, network_status: 'approved_by_network', reason: null,
  risk_level: 'normal', risk_score: 12, seller_message: 'Payment complete.', type: 'authorized',
}

function declinedOutcome(card: TestCard): Stripe.Charge.Outcome {
  return {
    ...APPROVED, network_status: 'declined_by_network', network_decline_code: '01', advice_code: 'try_again_later',
    reason: card.declineCode ?? card.code ?? 'generic_decline', seller_message: 'The bank did not return any further details with this decline.',
    type: 'issuer_declined',
  }
}

/** A charge of the pinned version with every documented field, nulls included (FK-3). */
export function createChargeObject(
  intent: Stripe.PaymentIntent, method: Stripe.PaymentMethod, outcome: ChargeOutcome, settings: { createdS: number, isAuthenticated: boolean },
): Stripe.Charge {
  const hasFailed = outcome.status === 'failed'
  return {
    id: createId('charge'),
    object: 'charge',
    amount: intent.amount,
    amount_captured: outcome.status === 'succeeded' ? intent.amount : 0,
    amount_refunded: 0,
    application: null,
    application_fee: null,
    application_fee_amount: null,
    balance_transaction: null,
    billing_details: method.billing_details,
    calculated_statement_descriptor: 'OXMERE SPRING WORKS',
    captured: outcome.status === 'succeeded',
    created: settings.createdS,
    currency: intent.currency,
    customer: intent.customer,
    description: intent.description,
    disputed: false,
    failure_balance_transaction: null,
    failure_code: hasFailed ? outcome.card.code ?? 'card_declined' : null,
    failure_message: hasFailed ? outcome.card.message ?? 'Your card was declined.' : null,
    fraud_details: {},
    livemode: false,
    metadata: intent.metadata,
    on_behalf_of: null,
    outcome: hasFailed ? declinedOutcome(outcome.card) : APPROVED,
    paid: outcome.status === 'succeeded',
    payment_intent: intent.id,
    payment_method: method.id,
    payment_method_details: chargeMethodDetails(method, intent.amount, settings.isAuthenticated),
    radar_options: {},
    receipt_email: intent.receipt_email,
    receipt_number: null,
    receipt_url: null,
    refunded: false,
    review: null,
    shipping: null,
    source: null,
    source_transfer: null,
    statement_descriptor: intent.statement_descriptor,
    statement_descriptor_suffix: intent.statement_descriptor_suffix,
    status: outcome.status,
    transfer_data: null,
    transfer_group: intent.transfer_group,
  }
}

/** A charge by id; 404 when there is none. */
export function getCharge(fake: Fake, id: string, param = 'id'): Stripe.Charge {
  const charge = fake.state.charges[id]
  if (!charge) throw resourceMissing('charge', id, param)
  return charge
}

/** GET /v1/charges/:id */
export function retrieveCharge(fake: Fake, id: string, form: FormTable): Stripe.Charge {
  parseParams(form, expandParam)
  return getCharge(fake, id)
}

/** GET /v1/charges */
export function listCharges(fake: Fake, form: FormTable): ListPage<Stripe.Charge> {
  const read = parseParams(form, { ...listParams, created: createdFilter(), customer: text(), payment_intent: text(), transfer_group: text() })
  const matching = Object.values(fake.state.charges).filter(charge => matchesCreated(charge.created, read.created)
    && (read.customer === undefined || charge.customer === read.customer)
    && (read.payment_intent === undefined || charge.payment_intent === read.payment_intent)
    && (read.transfer_group === undefined || charge.transfer_group === read.transfer_group))
  return listPage(matching, '/v1/charges', read)
}
