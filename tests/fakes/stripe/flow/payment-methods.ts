import type Stripe from 'stripe'
import type { TestCard } from '../cards'
import { createId } from '../ids'

/** Which bank debit goes with a currency: these settle days later in the real world, seconds later here. */
const DELAYED_METHODS: Record<string, 'sepa_debit' | 'bacs_debit' | 'us_bank_account'> = {
  eur: 'sepa_debit', gbp: 'bacs_debit', usd: 'us_bank_account',
}

/** What is known of the person who pays. */
export interface Payer { email: string | null, name: string | null }

/** The bank debit offered for a currency, or none. */
export function delayedMethodFor(currency: string): 'sepa_debit' | 'bacs_debit' | 'us_bank_account' | null {
  return DELAYED_METHODS[currency] ?? null
}

function billingDetails(payer: Payer): Stripe.Charge.BillingDetails {
  return {
    address: { city: null, country: null, line1: null, line2: null, postal_code: null, state: null },
    email: payer.email,
    name: payer.name,
    phone: null,
    tax_id: null,
  }
}

/** A payment method made on the pay page; of a card only brand and last four digits are kept (PAY-21). */
export function createPaymentMethod(method: TestCard | 'delayed', currency: string, payer: Payer, createdS: number): Stripe.PaymentMethod {
  const base = {
    id: createId('paymentMethod'),
    object: 'payment_method' as const,
    allow_redisplay: 'limited' as const,
    billing_details: billingDetails(payer),
    created: createdS,
    customer: null,
    customer_account: null,
    livemode: false,
    metadata: {},
  }
  if (method !== 'delayed') {
    return {
      ...base,
      type: 'card',
      card: {
        brand: method.brand,
        checks: { address_line1_check: null, address_postal_code_check: null, cvc_check: 'pass' },
        country: 'DE',
        display_brand: method.brand,
        exp_month: 12,
        exp_year: 2034,
        fingerprint: `fake${method.number.slice(-4)}`,
        funding: 'credit',
        generated_from: null,
        last4: method.number.slice(-4),
        networks: { available: [method.brand], preferred: null },
        regulated_status: 'unregulated',
        three_d_secure_usage: { supported: true },
        wallet: null,
      },
    }
  }
  const type = delayedMethodFor(currency)
  if (type === 'sepa_debit') {
    return { ...base, type, sepa_debit: { bank_code: '37040044', branch_code: '', country: 'DE', fingerprint: 'fake3201', generated_from: { charge: null, setup_attempt: null }, last4: '3201' } }
  }
  if (type === 'bacs_debit') return { ...base, type, bacs_debit: { fingerprint: 'fake2345', last4: '2345', sort_code: '108800' } }
  return {
    ...base,
    type: 'us_bank_account',
    us_bank_account: {
      account_holder_type: 'individual', account_type: 'checking', bank_name: 'STRIPE TEST BANK', financial_connections_account: null,
      fingerprint: 'fake6789', last4: '6789', networks: { preferred: 'ach', supported: ['ach'] }, routing_number: '110000000', status_details: {},
    },
  }
}

/** The details a charge repeats of its payment method. */
export function chargeMethodDetails(method: Stripe.PaymentMethod, amountMinor: number, isAuthenticated: boolean): Stripe.Charge.PaymentMethodDetails {
  if (method.card) {
    const { brand, last4, exp_month, exp_year, fingerprint, funding, country } = method.card
    return {
      type: 'card',
      card: {
        amount_authorized: amountMinor,
        authorization_code: '123456',
        brand,
        checks: { address_line1_check: null, address_postal_code_check: null, cvc_check: 'pass' },
        country,
        electronic_commerce_indicator: isAuthenticated ? '05' : null,
        exp_month,
        exp_year,
        extended_authorization: { status: 'disabled' },
        fingerprint: fingerprint ?? null,
        funding,
        incremental_authorization: { status: 'unavailable' },
        installments: null,
        last4,
        mandate: null,
        multicapture: { status: 'unavailable' },
        network: brand,
        network_token: { used: false },
        network_transaction_id: null,
        overcapture: { maximum_amount_capturable: amountMinor, status: 'unavailable' },
        regulated_status: 'unregulated',
        three_d_secure: isAuthenticated
          ? {
              authentication_flow: 'challenge', electronic_commerce_indicator: '05', exemption_indicator: null,
              result: 'authenticated', result_reason: null, transaction_id: null, version: '2.2.0',
            }
          : null,
        transaction_link_id: null,
        wallet: null,
      },
    }
  }
  if (method.sepa_debit) {
    const { bank_code, branch_code, country, fingerprint, last4 } = method.sepa_debit
    return { type: 'sepa_debit', sepa_debit: { bank_code, branch_code, country, fingerprint, last4, mandate: null } }
  }
  if (method.bacs_debit) return { type: 'bacs_debit', bacs_debit: { ...method.bacs_debit, mandate: null } }
  return {
    type: 'us_bank_account',
    us_bank_account: {
      account_holder_type: 'individual', account_type: 'checking', bank_name: 'STRIPE TEST BANK', fingerprint: 'fake6789',
      last4: '6789', payment_reference: null, routing_number: '110000000',
    },
  }
}
