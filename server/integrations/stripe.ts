import Stripe from 'stripe'
import type { Currency } from '#shared/money/index'

/** How the deployment reaches Stripe. An empty host is Stripe's own. */
export type StripeSettings = { secretKey: string, host: string, port: number | '', protocol: 'http' | 'https' }

/** The version whose objects our code reads: the one the SDK is typed for. A newer one is taken together with the SDK. */
export const STRIPE_API_VERSION = '2026-10-28.endive'

/** The SDK with short timeouts: a payment page that does not open in eight seconds is better tried again. */
export function createStripe({ secretKey, host, port, protocol }: StripeSettings): Stripe {
  return new Stripe(secretKey, {
    apiVersion: STRIPE_API_VERSION, timeout: 8_000, maxNetworkRetries: 2, telemetry: false,
    ...(host ? { host, protocol } : {}), ...(host && port ? { port } : {}),
  })
}

/** What is asked of Stripe for one attempt. Only ids of ours, nothing about the person. */
export type SessionRequest = {
  paymentId: string, orderId: string, orderRef: string, kind: string, attempt: number, amountMinor: number, currency: Currency, expiresAt: Date, what: string, returnUrl: string,
}

/** The parameters of a Checkout Session; the same attempt always gives the same ones, as its idempotency key demands. */
export function buildSessionParams(request: SessionRequest): Stripe.Checkout.SessionCreateParams {
  const metadata = { payment_id: request.paymentId, order_id: request.orderId, order_ref: request.orderRef, kind: request.kind, attempt: String(request.attempt) }
  return {
    mode: 'payment',
    client_reference_id: request.paymentId,
    metadata,
    payment_intent_data: { metadata },
    line_items: [{ quantity: 1, price_data: { currency: request.currency, unit_amount: request.amountMinor, product_data: { name: request.what } } }],
    expires_at: Math.floor(request.expiresAt.getTime() / 1000),
    success_url: `${request.returnUrl}?session_id={CHECKOUT_SESSION_ID}`,
    cancel_url: request.returnUrl,
  }
}
