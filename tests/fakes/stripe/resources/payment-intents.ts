import type Stripe from 'stripe'
import { resourceMissing } from '../errors'
import type { Fake } from '../fake'
import type { FormTable } from '../form-decoding'
import { createClientSecret, createId } from '../ids'
import { listPage, matchesCreated } from '../lists'
import type { ListPage } from '../lists'
import { createdFilter, expandParam, listParams, parseParams, text } from '../params'
import type { SessionSetup } from '../state'

/** The payment intent of a session, made when the customer first confirms: nothing is tried yet. */
export function createPaymentIntentObject(session: Stripe.Checkout.Session, setup: SessionSetup, createdS: number): Stripe.PaymentIntent {
  const id = createId('paymentIntent')
  const amountMinor = session.amount_total ?? 0
  return {
    id,
    object: 'payment_intent',
    allowed_payment_method_types: session.allowed_payment_method_types,
    amount: amountMinor,
    amount_capturable: 0,
    amount_details: { tip: {} },
    amount_received: 0,
    application: null,
    application_fee_amount: null,
    automatic_payment_methods: { allow_redirects: 'always', enabled: true },
    canceled_at: null,
    cancellation_reason: null,
    capture_method: 'automatic_async',
    client_secret: createClientSecret(id),
    confirmation_method: 'automatic',
    created: createdS,
    currency: session.currency ?? '',
    customer: typeof session.customer === 'string' ? session.customer : null,
    customer_account: null,
    description: setup.description,
    excluded_payment_method_types: session.excluded_payment_method_types ?? null,
    last_payment_error: null,
    latest_charge: null,
    livemode: false,
    managed_payments: { enabled: false },
    metadata: setup.paymentMetadata,
    next_action: null,
    on_behalf_of: null,
    payment_method: null,
    payment_method_configuration_details: session.payment_method_configuration_details,
    payment_method_options: { card: { installments: null, mandate_options: null, network: null, request_three_d_secure: 'automatic' } },
    payment_method_types: session.payment_method_types,
    payment_record: null,
    processing: null,
    receipt_email: setup.receiptEmail,
    review: null,
    setup_future_usage: setup.setupFutureUsage,
    shipping: null,
    source: null,
    statement_descriptor: setup.statementDescriptor,
    statement_descriptor_suffix: setup.statementDescriptorSuffix,
    status: 'requires_payment_method',
    transfer_data: null,
    transfer_group: setup.transferGroup,
  }
}

/** A payment intent by id; 404 when there is none. */
export function getPaymentIntent(fake: Fake, id: string): Stripe.PaymentIntent {
  const intent = fake.state.paymentIntents[id]
  if (!intent) throw resourceMissing('payment_intent', id, 'intent')
  return intent
}

/** GET /v1/payment_intents/:id */
export function retrievePaymentIntent(fake: Fake, id: string, form: FormTable): Stripe.PaymentIntent {
  parseParams(form, { ...expandParam, client_secret: text() })
  return getPaymentIntent(fake, id)
}

/** GET /v1/payment_intents */
export function listPaymentIntents(fake: Fake, form: FormTable): ListPage<Stripe.PaymentIntent> {
  const read = parseParams(form, { ...listParams, created: createdFilter(), customer: text() })
  const matching = Object.values(fake.state.paymentIntents).filter(intent => matchesCreated(intent.created, read.created)
    && (read.customer === undefined || intent.customer === read.customer))
  return listPage(matching, '/v1/payment_intents', read)
}
