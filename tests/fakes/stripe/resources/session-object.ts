import type Stripe from 'stripe'

/** What differs between new sessions; everything else is the same for each of ours. */
export interface NewSession {
  id: string
  url: string
  createdS: number
  expiresAtS: number
  amountMinor: number
  currency: string
  successUrl: string
  cancelUrl: string | null
  clientReferenceId: string | null
  customer: string | null
  customerCreation: string | null
  customerEmail: string | null
  locale: string | null
  metadata: Record<string, string>
  paymentMethodTypes: string[]
  allowedPaymentMethodTypes: string[] | null
  excludedPaymentMethodTypes: string[] | null
  submitType: string | null
  integrationIdentifier: string | null
  originContext: string | null
  billingAddressCollection: string | null
  isPhoneCollected: boolean
  isAdaptivePricing: boolean
  arePromotionCodesAllowed: boolean | null
  branding: { backgroundColor: string, borderStyle: string, buttonColor: string, displayName: string, fontFamily: string }
  customText: Stripe.Checkout.Session['custom_text']
}

/** A session of the pinned version with every documented field, nulls included (FK-3). */
export function createSessionObject(fresh: NewSession): Stripe.Checkout.Session {
  return {
    id: fresh.id,
    object: 'checkout.session',
    adaptive_pricing: { enabled: fresh.isAdaptivePricing },
    after_expiration: null,
    allow_promotion_codes: fresh.arePromotionCodesAllowed,
    allowed_payment_method_types: fresh.allowedPaymentMethodTypes,
    amount_subtotal: fresh.amountMinor,
    amount_total: fresh.amountMinor,
    automatic_tax: { enabled: false, liability: null, provider: null, status: null },
    billing_address_collection: fresh.billingAddressCollection,
    branding_settings: {
      background_color: fresh.branding.backgroundColor,
      border_style: fresh.branding.borderStyle,
      button_color: fresh.branding.buttonColor,
      display_name: fresh.branding.displayName,
      font_family: fresh.branding.fontFamily,
      icon: null,
      logo: null,
    },
    cancel_url: fresh.cancelUrl,
    client_reference_id: fresh.clientReferenceId,
    client_secret: null,
    collected_information: { business_name: null, individual_name: null, shipping_details: null },
    consent: null,
    consent_collection: null,
    created: fresh.createdS,
    currency: fresh.currency,
    currency_conversion: null,
    custom_fields: [],
    custom_text: fresh.customText,
    customer: fresh.customer,
    customer_account: null,
    customer_creation: fresh.customerCreation,
    customer_details: fresh.customerEmail === null ? null : emptyCustomerDetails(fresh.customerEmail),
    customer_email: fresh.customerEmail,
    discounts: [],
    ...(fresh.excludedPaymentMethodTypes ? { excluded_payment_method_types: fresh.excludedPaymentMethodTypes } : {}),
    expires_at: fresh.expiresAtS,
    integration_identifier: fresh.integrationIdentifier,
    invoice: null,
    invoice_creation: {
      enabled: false,
      invoice_data: {
        account_tax_ids: null, custom_fields: null, description: null, footer: null, issuer: null, metadata: {}, rendering_options: null,
      },
    },
    livemode: false,
    locale: fresh.locale,
    managed_payments: { enabled: false },
    metadata: fresh.metadata,
    mode: 'payment',
    optional_items: null,
    origin_context: fresh.originContext,
    payment_intent: null,
    payment_link: null,
    payment_method_collection: 'if_required',
    payment_method_configuration_details: { id: 'pmc_1WirewrightFake', parent: null },
    payment_method_options: { card: { request_three_d_secure: 'automatic' } },
    payment_method_types: fresh.paymentMethodTypes,
    payment_status: 'unpaid',
    permissions: null,
    phone_number_collection: { enabled: fresh.isPhoneCollected },
    recovered_from: null,
    saved_payment_method_options: null,
    setup_intent: null,
    shipping_address_collection: null,
    shipping_cost: null,
    shipping_options: [],
    status: 'open',
    submit_type: fresh.submitType,
    subscription: null,
    success_url: fresh.successUrl,
    total_details: { amount_discount: 0, amount_shipping: 0, amount_tax: 0 },
    ui_mode: 'hosted_page',
    url: fresh.url,
    wallet_options: null,
  }
}

/** Customer details of which only the e-mail address is known. */
export function emptyCustomerDetails(email: string): Stripe.Checkout.Session.CustomerDetails {
  return { address: null, business_name: null, email, individual_name: null, name: null, phone: null, tax_exempt: 'none', tax_ids: null }
}
