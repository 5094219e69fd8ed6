import type Stripe from 'stripe'
import { describe, expect, it } from 'vitest'
import { buildSessionParams, createStripe, STRIPE_API_VERSION } from '../../../server/integrations/stripe'
import { readSession } from '../../../server/services/payments/read-session'
import { eventDelayS } from '../../../server/services/stripe-events/work'

const payment = { id: '0b7f3c1e-6a54-4d6e-9d1b-3f0f6a1c2b4d', stripeSessionId: 'cs_1', amountMinor: 23_616, currency: 'eur' }
const session = {
  id: 'cs_1', client_reference_id: payment.id, metadata: { payment_id: payment.id }, amount_total: 23_616, currency: 'eur', mode: 'payment', livemode: false,
  status: 'complete', payment_status: 'paid', payment_intent: { id: 'pi_1', status: 'succeeded' }, url: null,
}
const read = (change: object, of: Parameters<typeof readSession>[1] = payment) => readSession({ ...session, ...change } as unknown as Stripe.Checkout.Session, of, false)

describe('what a session means (PAY-31, PAY-32)', () => {
  it('is paid only when everything is what was asked for', () => {
    expect(read({})).toEqual({ state: 'paid', fact: 'capture:pi_1', sessionId: 'cs_1', paymentIntentId: 'pi_1', url: null })
    expect(read({ payment_status: 'no_payment_required', payment_intent: null })).toMatchObject({ state: 'paid', fact: 'capture:cs_1' })
    for (const change of [{ amount_total: 23_615 }, { amount_total: null }, { currency: 'EUR' }, { livemode: true }, { mode: 'setup' }, { id: 'cs_2' }, { client_reference_id: null }, { metadata: null }, { metadata: {} }, { payment_status: 'new' }, { status: null }]) {
      expect([change, read(change).state]).toEqual([change, 'mismatch'])
    }
  })

  it('is on its way, failed, open or expired by status and intent', () => {
    expect(read({ payment_status: 'unpaid', payment_intent: { id: 'pi_1', status: 'processing' } }).state).toBe('processing')
    expect(read({ payment_status: 'unpaid', payment_intent: { id: 'pi_1', status: 'requires_action' } }).state).toBe('processing')
    expect(read({ payment_status: 'unpaid', payment_intent: { id: 'pi_1', status: 'requires_payment_method' } }).state).toBe('failed')
    expect(read({ status: 'open', payment_status: 'unpaid', payment_intent: null, url: 'https://pay.example' })).toMatchObject({ state: 'open', url: 'https://pay.example' })
    expect(read({ status: 'expired', payment_status: 'unpaid' }).state).toBe('expired')
  })

  it('is taken as expired even when its amount is another: it brings no money', () => {
    expect(read({ status: 'expired', amount_total: 1 }).state).toBe('expired')
    expect(read({ status: 'expired', client_reference_id: 'other' }).state).toBe('mismatch')
  })

  it('finds the attempt whose answer was lost by the id we gave it', () => {
    expect(read({ id: 'cs_9' }, { ...payment, stripeSessionId: null }).state).toBe('paid')
  })
})

describe('what Stripe is asked (PAY-14, PAY-19)', () => {
  const request = { paymentId: payment.id, orderId: '1b7f3c1e-6a54-4d6e-9d1b-3f0f6a1c2b4d', orderRef: 'OX-2417', kind: 'deposit', attempt: 2, amountMinor: 23_616, currency: 'eur' as const, expiresAt: new Date('2026-12-02T10:00:00.900Z'), what: 'Deposit for order OX-2417', returnUrl: 'https://oxmere.example/account/orders/OX-2417' }

  it('is the same for the same attempt, within the limits of metadata', () => {
    const params = buildSessionParams(request)
    expect(buildSessionParams(request)).toEqual(params)
    for (const metadata of [params.metadata, params.payment_intent_data?.metadata]) {
      const entries = Object.entries(metadata ?? {})
      expect(entries.length).toBeGreaterThan(0)
      expect(entries.length).toBeLessThanOrEqual(50)
      for (const [name, value] of entries) expect(name.length <= 40 && !/[[\]]/.test(name) && String(value).length <= 500).toBe(true)
    }
    expect(params.client_reference_id!.length).toBeLessThanOrEqual(200)
    expect(params.expires_at).toBe(1_796_205_600)
    expect(params.success_url).toBe('https://oxmere.example/account/orders/OX-2417?session_id={CHECKOUT_SESSION_ID}')
  })

  it('goes by an SDK with a pinned version, a short timeout, and the configured host', () => {
    const stripe = createStripe({ secretKey: 'sk_test_x', host: '127.0.0.1', port: 4242, protocol: 'http' })
    expect(stripe.getApiField('version')).toBe(STRIPE_API_VERSION)
    expect(stripe.getApiField('timeout')).toBeLessThanOrEqual(10_000)
    expect(stripe.getMaxNetworkRetries()).toBe(2)
    expect([stripe.getApiField('host'), Number(stripe.getApiField('port')), stripe.getApiField('protocol')]).toEqual(['127.0.0.1', 4242, 'http'])
    expect(createStripe({ secretKey: 'sk_live_x', host: '', port: '', protocol: 'https' }).getApiField('host')).toBe('api.stripe.com')
  })
})

describe('waiting between tries of an event', () => {
  it('doubles up to ten minutes', () => {
    expect([1, 2, 5].map(attempts => eventDelayS(attempts, 0.5))).toEqual([1, 2, 16])
    expect(eventDelayS(20, 1)).toBe(750)
  })
})
