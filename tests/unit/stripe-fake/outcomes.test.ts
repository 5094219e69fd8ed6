import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import type Stripe from 'stripe'
import { refusalOf, sessionParams, startBench } from './set-up'
import type { Bench } from './set-up'

let bench: Bench
beforeAll(async () => { bench = await startBench() })
afterAll(() => bench.close())
beforeEach(() => bench.control.reset())

async function open(overrides: Partial<Stripe.Checkout.SessionCreateParams> = {}): Promise<string> {
  return (await bench.stripe.checkout.sessions.create(sessionParams(overrides))).id
}

async function pay(card?: string): Promise<{ sessionId: string, intentId: string, chargeId: string }> {
  const sessionId = await open()
  const session = await bench.control.setOutcome(sessionId, 'paid', card ? { card } : {})
  const intentId = String(session.payment_intent)
  return { sessionId, intentId, chargeId: String((await bench.stripe.paymentIntents.retrieve(intentId)).latest_charge) }
}

async function eventTypes(): Promise<string[]> {
  return (await bench.stripe.events.list({ limit: 100 })).data.map(event => event.type).reverse()
}

describe('FK-7 outcomes of a session', () => {
  it('declined: the session stays open, the reason is told, and a second try can pay', async () => {
    const id = await open()
    await bench.control.setOutcome(id, 'declined')
    const session = await bench.stripe.checkout.sessions.retrieve(id, { expand: ['payment_intent'] })
    expect(session).toMatchObject({ status: 'open', payment_status: 'unpaid' })
    expect(session.payment_intent).toMatchObject({
      status: 'requires_payment_method', last_payment_error: { type: 'card_error', code: 'card_declined', decline_code: 'generic_decline' },
    })
    expect(await eventTypes()).toEqual(['payment_intent.created', 'charge.failed', 'payment_intent.payment_failed'])
    await bench.control.setOutcome(id, 'paid')
    const charges = await bench.stripe.charges.list({ payment_intent: (session.payment_intent as Stripe.PaymentIntent).id })
    expect(charges.data.map(charge => charge.status)).toEqual(['succeeded', 'failed'])
  })

  it('authentication: waits as requires_action, then pays or fails', async () => {
    const id = await open()
    const waiting = await bench.control.setOutcome(id, 'authenticationRequired')
    const intentId = String(waiting.payment_intent)
    expect(await bench.stripe.paymentIntents.retrieve(intentId)).toMatchObject({
      status: 'requires_action', next_action: { type: 'redirect_to_url', redirect_to_url: { url: `${bench.running.url}/c/pay/${id}/authenticate` } },
    })
    await bench.control.setOutcome(id, 'authenticationFailed')
    expect(await bench.stripe.paymentIntents.retrieve(intentId)).toMatchObject({
      status: 'requires_payment_method', last_payment_error: { code: 'payment_intent_authentication_failure' },
    })
    await bench.control.setOutcome(id, 'authenticated')
    const paid = await bench.stripe.paymentIntents.retrieve(intentId, { expand: ['latest_charge'] })
    expect(paid).toMatchObject({ status: 'succeeded', next_action: null })
    expect((paid.latest_charge as Stripe.Charge).payment_method_details?.card?.three_d_secure).toMatchObject({ result: 'authenticated' })
    expect(await eventTypes()).toEqual([
      'payment_intent.created', 'payment_intent.requires_action', 'payment_intent.payment_failed',
      'payment_intent.requires_action', 'charge.succeeded', 'payment_intent.succeeded', 'checkout.session.completed',
    ])
  })

  it.each([
    ['asyncSucceeded', 'paid', ['charge.succeeded', 'payment_intent.succeeded', 'checkout.session.async_payment_succeeded']],
    ['asyncFailed', 'unpaid', ['charge.failed', 'payment_intent.payment_failed', 'checkout.session.async_payment_failed']],
  ] as const)('delayed: completed and unpaid, then %s', async (outcome, paymentStatus, last) => {
    const id = await open()
    await bench.control.setOutcome(id, 'asyncPending')
    expect(await bench.stripe.checkout.sessions.retrieve(id)).toMatchObject({ status: 'complete', payment_status: 'unpaid' })
    const first = ['payment_intent.created', 'payment_intent.processing', 'charge.pending', 'checkout.session.completed']
    expect(await eventTypes()).toEqual(first)
    await bench.control.setOutcome(id, outcome)
    expect(await bench.stripe.checkout.sessions.retrieve(id)).toMatchObject({ payment_status: paymentStatus })
    expect(await eventTypes()).toEqual([...first, ...last])
    await expect(bench.control.setOutcome(id, 'asyncSucceeded')).rejects.toThrow(/400/)
  })

  it('expiry: by request, by time, and never of a paid one', async () => {
    const byTime = await open({ expires_at: Math.floor(Date.now() / 1000) + 1805 })
    const paid = await open()
    await bench.control.setOutcome(byTime, 'declined')
    await bench.control.setOutcome(paid, 'paid')
    await bench.control.setClockOffset(1900)
    const expired = await bench.stripe.checkout.sessions.retrieve(byTime, { expand: ['payment_intent'] })
    expect(expired).toMatchObject({ status: 'expired', url: null, payment_intent: { status: 'canceled', cancellation_reason: 'expired' } })
    expect((await eventTypes()).slice(-2)).toEqual(['payment_intent.canceled', 'checkout.session.expired'])
    await bench.control.setClockOffset(25 * 3600)
    expect(await bench.stripe.checkout.sessions.retrieve(paid)).toMatchObject({ status: 'complete', payment_status: 'paid' })
    expect(await refusalOf(bench.stripe.checkout.sessions.expire(paid))).toMatchObject({ statusCode: 400 })
    await expect(bench.control.setOutcome(byTime, 'paid')).rejects.toThrow(/400.*expired/)
  })

  it('books the balance a moment after the payment, with charge.updated', async () => {
    const { chargeId } = await pay()
    expect(await bench.stripe.charges.retrieve(chargeId)).toMatchObject({ balance_transaction: null })
    await expect.poll(async () => (await bench.stripe.charges.retrieve(chargeId)).balance_transaction, { timeout: 4000 }).toMatch(/^txn_/)
    const booked = await bench.stripe.charges.retrieve(chargeId, { expand: ['balance_transaction'] })
    expect(booked.balance_transaction).toMatchObject({ amount: 123_450, net: 123_450, source: chargeId, type: 'charge' })
    expect((await eventTypes()).at(-1)).toBe('charge.updated')
  })
})

describe('FK-7 refunds', () => {
  it('in parts and in whole, never above what was captured', async () => {
    const { intentId, chargeId } = await pay()
    await bench.stripe.refunds.create({ payment_intent: intentId, amount: 23_450, metadata: { request: '1' } })
    expect(await bench.stripe.charges.retrieve(chargeId)).toMatchObject({ amount_refunded: 23_450, refunded: false })
    const above = await refusalOf(bench.stripe.refunds.create({ charge: chargeId, amount: 100_001 }))
    expect(above).toMatchObject({ statusCode: 400, param: 'amount' })
    const rest = await bench.stripe.refunds.create({ payment_intent: intentId })
    expect(rest.amount).toBe(100_000)
    expect(await bench.stripe.charges.retrieve(chargeId)).toMatchObject({ amount_refunded: 123_450, refunded: true })
    expect(await refusalOf(bench.stripe.refunds.create({ charge: chargeId }))).toMatchObject({ code: 'charge_already_refunded' })
    expect((await eventTypes()).filter(type => type.includes('refund'))).toEqual(['refund.created', 'charge.refunded', 'refund.created', 'charge.refunded'])
    const refunded = await bench.stripe.events.list({ type: 'charge.refunded' })
    expect(refunded.data.map(event => (event.data.object as Stripe.Charge).amount_refunded)).toEqual([123_450, 23_450])
  })

  it('of which two at once take the rest only once', async () => {
    const { chargeId } = await pay()
    const both = await Promise.allSettled([bench.stripe.refunds.create({ charge: chargeId }), bench.stripe.refunds.create({ charge: chargeId })])
    expect(both.map(result => result.status).sort()).toEqual(['fulfilled', 'rejected'])
  })

  it('pending, then through', async () => {
    const { chargeId } = await pay()
    await bench.control.planRefunds(['pending'])
    const refund = await bench.stripe.refunds.create({ charge: chargeId, amount: 100 })
    expect(refund).toMatchObject({ status: 'pending', pending_reason: 'processing' })
    await bench.control.endRefund(refund.id, 'succeeded')
    const through = await bench.stripe.refunds.retrieve(refund.id)
    expect(through.status).toBe('succeeded')
    expect(through.pending_reason).toBeUndefined()
    expect((await eventTypes()).slice(-2)).toEqual(['refund.updated', 'charge.refund.updated'])
  })

  it('failed: the money is back on the charge', async () => {
    const { chargeId } = await pay()
    await bench.control.planRefunds(['failed'])
    const refund = await bench.stripe.refunds.create({ charge: chargeId, amount: 100 })
    expect(await bench.stripe.refunds.retrieve(refund.id)).toMatchObject({ status: 'failed', failure_reason: 'expired_or_canceled_card' })
    expect(await bench.stripe.charges.retrieve(chargeId)).toMatchObject({ amount_refunded: 0, refunded: false })
    expect(await eventTypes()).toContain('refund.failed')
    await expect(bench.control.endRefund(refund.id, 'succeeded')).rejects.toThrow(/400/)
  })

  it('by test card: one goes through late, one fails late', async () => {
    const late = await pay('4000000000007726')
    const failing = await pay('4000000000005126')
    const [lateRefund, failingRefund] = [await bench.stripe.refunds.create({ charge: late.chargeId }), await bench.stripe.refunds.create({ charge: failing.chargeId })]
    expect([lateRefund.status, failingRefund.status]).toEqual(['pending', 'succeeded'])
    await expect.poll(async () => (await bench.stripe.refunds.retrieve(lateRefund.id)).status, { timeout: 3000 }).toBe('succeeded')
    await expect.poll(async () => (await bench.stripe.refunds.retrieve(failingRefund.id)).status, { timeout: 3000 }).toBe('failed')
  })

  it('refused for a payment that did not succeed, an unknown charge, or both names at once', async () => {
    const session = await bench.control.setOutcome(await open(), 'declined')
    const intent = String(session.payment_intent)
    expect(await refusalOf(bench.stripe.refunds.create({ payment_intent: intent }))).toMatchObject({ code: 'payment_intent_unexpected_state' })
    expect(await refusalOf(bench.stripe.refunds.create({ charge: 'ch_none' }))).toMatchObject({ statusCode: 404 })
    expect(await refusalOf(bench.stripe.refunds.create({}))).toMatchObject({ code: 'parameter_missing' })
    expect(await refusalOf(bench.stripe.refunds.create({ charge: 'ch_x', payment_intent: intent }))).toMatchObject({ code: 'parameters_exclusive' })
  })
})

describe('FK-7 disputes', () => {
  it.each([
    ['won', ['charge.dispute.funds_reinstated', 'charge.dispute.closed'], 0],
    ['lost', ['charge.dispute.closed'], -123_450],
  ] as const)('opened and %s', async (outcome, last, balanceMinor) => {
    const { chargeId } = await pay()
    const dispute = await bench.control.openDispute(chargeId)
    expect(dispute).toMatchObject({ status: 'needs_response', amount: 123_450, charge: chargeId })
    expect(await bench.stripe.charges.retrieve(chargeId)).toMatchObject({ disputed: true })
    expect(await refusalOf(bench.stripe.refunds.create({ charge: chargeId }))).toMatchObject({ code: 'charge_disputed' })
    await bench.control.endDispute(dispute.id, outcome)
    const closed = await bench.stripe.disputes.retrieve(dispute.id)
    expect(closed.status).toBe(outcome)
    expect(closed.balance_transactions.reduce((sum, entry) => sum + entry.amount, 0)).toBe(balanceMinor)
    expect((await eventTypes()).filter(type => type.includes('dispute'))).toEqual(['charge.dispute.created', 'charge.dispute.funds_withdrawn', ...last])
    await expect(bench.control.endDispute(dispute.id, 'won')).rejects.toThrow(/400/)
  })
})
