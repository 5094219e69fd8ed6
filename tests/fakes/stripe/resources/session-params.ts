import { bool, createdFilter, email, expandParam, hash, integer, list, listParams, metadata, text, unmodelled, url } from '../params'
import { lineItemsParam } from './line-items'

const LOCALES = ('auto bg cs da de el en en-GB es es-419 et fi fil fr fr-CA hi-IN hr hu id it ja ko lt lv ms mt nb nl pl pt pt-BR ro ru sk sl sv th tr vi '
  + 'zh zh-HK zh-TW').split(' ')

const message = hash({ message: text({ maxLength: 1200 }) }, ['message'])

/**
 * Parameters of opening a session in the pinned version, read off the SDK's types. There is no `payment_method_types` any
 * more: that name is refused as unknown. Documented ones that we have no use for are named, and refused as not modelled.
 */
export const sessionCreateParams = {
  ...expandParam,
  adaptive_pricing: hash({ enabled: bool() }),
  after_expiration: unmodelled(),
  allow_promotion_codes: bool(),
  allowed_payment_method_types: list(text()),
  automatic_tax: unmodelled(),
  billing_address_collection: text({ oneOf: ['auto', 'required'] }),
  branding_settings: hash({
    background_color: text({ pattern: /^#[0-9a-fA-F]{6}$/ }),
    border_style: text({ oneOf: ['pill', 'rectangular', 'rounded'] }),
    button_color: text({ pattern: /^#[0-9a-fA-F]{6}$/ }),
    display_name: text({ maxLength: 200 }),
    font_family: text(),
    icon: unmodelled(),
    logo: unmodelled(),
  }),
  cancel_url: url(),
  client_reference_id: text({ maxLength: 200 }),
  consent_collection: unmodelled(),
  currency: text({ pattern: /^[A-Za-z]{3}$/ }),
  custom_fields: unmodelled(),
  custom_text: hash({ after_submit: message, shipping_address: message, submit: message, terms_of_service_acceptance: message }),
  customer: text(),
  customer_account: unmodelled(),
  customer_creation: text({ oneOf: ['always', 'if_required'] }),
  customer_email: email(),
  customer_update: unmodelled(),
  discounts: unmodelled(),
  excluded_payment_method_types: list(text()),
  expires_at: integer(),
  integration_identifier: text(),
  invoice_creation: unmodelled(),
  line_items: lineItemsParam,
  locale: text({ oneOf: LOCALES }),
  managed_payments: unmodelled(),
  metadata: metadata(),
  mode: text({ oneOf: ['payment', 'setup', 'subscription'] }),
  name_collection: unmodelled(),
  optional_items: unmodelled(),
  origin_context: text({ oneOf: ['mobile_app', 'web'] }),
  payment_intent_data: hash({
    application_fee_amount: unmodelled(),
    capture_method: text({ oneOf: ['automatic', 'automatic_async'] }),
    description: text({ maxLength: 1000 }),
    metadata: metadata(),
    on_behalf_of: unmodelled(),
    receipt_email: email(),
    setup_future_usage: text({ oneOf: ['off_session', 'on_session'] }),
    shipping: unmodelled(),
    statement_descriptor: text({ maxLength: 22 }),
    statement_descriptor_suffix: text({ maxLength: 22 }),
    transfer_data: unmodelled(),
    transfer_group: text(),
  }),
  payment_method_collection: unmodelled(),
  payment_method_configuration: unmodelled(),
  payment_method_data: unmodelled(),
  payment_method_options: unmodelled(),
  permissions: unmodelled(),
  phone_number_collection: hash({ enabled: bool() }, ['enabled']),
  redirect_on_completion: unmodelled(),
  return_url: unmodelled(),
  saved_payment_method_options: unmodelled(),
  setup_intent_data: unmodelled(),
  shipping_address_collection: unmodelled(),
  shipping_options: unmodelled(),
  submit_type: text({ oneOf: ['auto', 'book', 'donate', 'pay', 'subscribe'] }),
  subscription_data: unmodelled(),
  success_url: url(),
  tax_id_collection: unmodelled(),
  ui_mode: text({ oneOf: ['elements', 'embedded_page', 'form', 'hosted_page'] }),
  wallet_options: unmodelled(),
}

/** Parameters of listing sessions. */
export const sessionListParams = {
  ...listParams,
  created: createdFilter(),
  customer: text(),
  customer_account: unmodelled(),
  customer_details: hash({ email: email() }, ['email']),
  payment_intent: text(),
  payment_link: unmodelled(),
  status: text({ oneOf: ['complete', 'expired', 'open'] }),
  subscription: unmodelled(),
}
