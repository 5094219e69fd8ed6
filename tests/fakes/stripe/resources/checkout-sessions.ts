import type Stripe from 'stripe'
import { invalidRequest, missingParameter, refusedByState, resourceMissing } from '../errors'
import type { Cause } from '../cause'
import type { Fake } from '../fake'
import { expireSession } from '../flow/expiry'
import { createId } from '../ids'
import { delayedMethodFor } from '../flow/payment-methods'
import { listPage, matchesCreated } from '../lists'
import type { ListPage } from '../lists'
import { readCurrency } from '../money'
import { expandParam, listParams, parseParams } from '../params'
import type { FormTable } from '../form-decoding'
import type { WireLineItem } from '../state'
import { buildLineItems } from './line-items'
import { createSessionObject } from './session-object'
import { sessionCreateParams, sessionListParams } from './session-params'

const MIN_LIFE_S = 30 * 60
const MAX_LIFE_S = 24 * 60 * 60

/** A session by id; 404 when there is none. */
export function getSession(fake: Fake, id: string): Stripe.Checkout.Session {
  const session = fake.state.sessions[id]
  if (!session) throw resourceMissing('checkout.session', id, 'session')
  return session
}

function readExpiry(expiresAtS: number | undefined, nowS: number): number {
  if (expiresAtS === undefined) return nowS + MAX_LIFE_S
  if (expiresAtS < nowS + MIN_LIFE_S) {
    throw invalidRequest('The `expires_at` timestamp must be at least 30 minutes from Checkout Session creation.', { param: 'expires_at' })
  }
  if (expiresAtS > nowS + MAX_LIFE_S) {
    throw invalidRequest('The `expires_at` timestamp must be less than 24 hours from Checkout Session creation.', { param: 'expires_at' })
  }
  return expiresAtS
}

function readMethodTypes(currency: string, allowed: string[] | undefined, excluded: string[] | undefined): string[] {
  const delayed = delayedMethodFor(currency)
  const offered = ['card', ...(delayed ? [delayed] : [])]
    .filter(type => (!allowed || allowed.includes(type)) && !excluded?.includes(type))
  if (offered.length === 0) {
    throw invalidRequest('No payment method is left for this currency.', { param: allowed ? 'allowed_payment_method_types' : 'excluded_payment_method_types' })
  }
  return offered
}

/** POST /v1/checkout/sessions */
export function createSession(fake: Fake, form: FormTable): Stripe.Checkout.Session {
  const read = parseParams(form, sessionCreateParams)
  const createdS = fake.clock.nowS()
  if (read.mode === undefined) throw missingParameter('mode')
  if (read.mode !== 'payment') throw invalidRequest(`The payment fake does not model mode '${read.mode}'.`, { param: 'mode' })
  if (read.ui_mode !== undefined && read.ui_mode !== 'hosted_page') throw invalidRequest(`The payment fake does not model ui_mode '${read.ui_mode}'.`, { param: 'ui_mode' })
  if (read.success_url === undefined) throw missingParameter('success_url')
  if (read.line_items === undefined) throw missingParameter('line_items')
  if (read.customer !== undefined && read.customer_email !== undefined) {
    throw invalidRequest('You may only specify one of these parameters: customer, customer_email.', { code: 'parameters_exclusive', param: 'customer' })
  }
  const customer = read.customer === undefined ? null : fake.state.customers[read.customer]
  if (customer === undefined) throw resourceMissing('customer', read.customer ?? '', 'customer')
  const lines = buildLineItems(read.line_items, createdS)
  if (read.currency !== undefined && readCurrency(read.currency, 'currency') !== lines.currency) {
    throw invalidRequest('The currency must be that of the line items.', { param: 'currency' })
  }
  const expiresAtS = readExpiry(read.expires_at, createdS)
  const id = createId('session')
  const session = createSessionObject({
    id,
    url: `${fake.baseUrl}/c/pay/${id}`,
    createdS,
    expiresAtS,
    amountMinor: lines.totalMinor,
    currency: lines.currency,
    successUrl: read.success_url,
    cancelUrl: read.cancel_url ?? null,
    clientReferenceId: read.client_reference_id ?? null,
    customer: customer?.id ?? null,
    customerCreation: customer ? null : read.customer_creation ?? 'if_required',
    customerEmail: read.customer_email ?? null,
    locale: read.locale ?? null,
    metadata: read.metadata ?? {},
    paymentMethodTypes: readMethodTypes(lines.currency, read.allowed_payment_method_types, read.excluded_payment_method_types),
    allowedPaymentMethodTypes: read.allowed_payment_method_types ?? null,
    excludedPaymentMethodTypes: read.excluded_payment_method_types ?? null,
    submitType: read.submit_type ?? null,
    integrationIdentifier: read.integration_identifier ?? null,
    originContext: read.origin_context ?? null,
    billingAddressCollection: read.billing_address_collection ?? null,
    isPhoneCollected: read.phone_number_collection?.enabled ?? false,
    isAdaptivePricing: read.adaptive_pricing?.enabled ?? false,
    arePromotionCodesAllowed: read.allow_promotion_codes ?? null,
    branding: {
      backgroundColor: read.branding_settings?.background_color ?? '#ffffff',
      borderStyle: read.branding_settings?.border_style ?? 'rectangular',
      buttonColor: read.branding_settings?.button_color ?? '#16191f',
      displayName: read.branding_settings?.display_name ?? 'Oxmere Spring Works',
      fontFamily: read.branding_settings?.font_family ?? 'default',
    },
    customText: {
      after_submit: toMessage(read.custom_text?.after_submit),
      shipping_address: toMessage(read.custom_text?.shipping_address),
      submit: toMessage(read.custom_text?.submit),
      terms_of_service_acceptance: toMessage(read.custom_text?.terms_of_service_acceptance),
    },
  })
  fake.state.sessions[id] = session
  fake.state.lineItems[id] = lines.items
  for (const product of lines.products) fake.state.products[product.id] = product
  fake.state.setups[id] = {
    description: read.payment_intent_data?.description ?? null,
    paymentMetadata: read.payment_intent_data?.metadata ?? {},
    receiptEmail: read.payment_intent_data?.receipt_email ?? null,
    statementDescriptor: read.payment_intent_data?.statement_descriptor ?? null,
    statementDescriptorSuffix: read.payment_intent_data?.statement_descriptor_suffix ?? null,
    setupFutureUsage: read.payment_intent_data?.setup_future_usage ?? null,
    transferGroup: read.payment_intent_data?.transfer_group ?? null,
    nextAttemptNumber: 1,
    cardAwaitingAuthentication: null,
    cardUsed: null,
  }
  return session
}

function toMessage(read: { message?: string } | undefined): { message: string } | null {
  return read?.message === undefined ? null : { message: read.message }
}

/** GET /v1/checkout/sessions/:id */
export function retrieveSession(fake: Fake, id: string, form: FormTable): Stripe.Checkout.Session {
  parseParams(form, expandParam)
  return getSession(fake, id)
}

/** GET /v1/checkout/sessions */
export function listSessions(fake: Fake, form: FormTable): ListPage<Stripe.Checkout.Session> {
  const read = parseParams(form, sessionListParams)
  const matching = Object.values(fake.state.sessions).filter(session => matchesCreated(session.created, read.created)
    && (read.customer === undefined || session.customer === read.customer)
    && (read.payment_intent === undefined || session.payment_intent === read.payment_intent)
    && (read.status === undefined || session.status === read.status)
    && (read.customer_details?.email === undefined || session.customer_details?.email === read.customer_details.email))
  return listPage(matching, '/v1/checkout/sessions', read)
}

/** POST /v1/checkout/sessions/:id/expire */
export function expireSessionByRequest(fake: Fake, id: string, form: FormTable, cause: Cause): Stripe.Checkout.Session {
  parseParams(form, expandParam)
  const session = getSession(fake, id)
  if (session.status !== 'open') {
    throw refusedByState(`Only Checkout Sessions with a status in ["open"] can be expired. This Checkout Session has a status of \`${session.status}\`.`)
  }
  return expireSession(fake, session, cause)
}

/** GET /v1/checkout/sessions/:id/line_items, in the order in which they were given. */
export function listSessionLineItems(fake: Fake, id: string, form: FormTable): ListPage<WireLineItem> {
  const read = parseParams(form, listParams)
  getSession(fake, id)
  const items = fake.state.lineItems[id] ?? []
  return listPage([...items].reverse(), `/v1/checkout/sessions/${id}/line_items`, read)
}
