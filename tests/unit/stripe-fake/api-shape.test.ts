import { readFileSync } from 'node:fs'
import { createRequire } from 'node:module'
import { dirname, join } from 'node:path'
import type Stripe from 'stripe'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { createSdk, refusalOf, sessionParams, startBench } from './set-up'
import type { Bench } from './set-up'

let bench: Bench
beforeAll(async () => { bench = await startBench() })
afterAll(() => bench.close())
beforeEach(() => bench.control.reset())

/** The required fields of an interface in the SDK's own type files: the documented fields that are always there. */
function documentedFields(file: string, name: string): string[] {
  const entry = createRequire(import.meta.url).resolve('stripe')
  const source = readFileSync(join(dirname(entry), '..', 'esm', 'resources', file), 'utf8')
  const start = source.indexOf(`export interface ${name} {`)
  const block = source.slice(start, source.indexOf('\n}', start)).replaceAll(/\/\*[\s\S]*?\*\//g, '')
  return [...block.matchAll(/^ {4}(\w+): /gm)].map(match => match[1] ?? '')
}

async function paidSession(): Promise<{ session: Stripe.Checkout.Session, intentId: string, chargeId: string }> {
  const { id } = await bench.stripe.checkout.sessions.create(sessionParams())
  await bench.control.setOutcome(id, 'paid')
  const session = await bench.stripe.checkout.sessions.retrieve(id)
  const intentId = String(session.payment_intent)
  const intent = await bench.stripe.paymentIntents.retrieve(intentId)
  return { session, intentId, chargeId: String(intent.latest_charge) }
}

describe('FK-1 every resource answers the unmodified SDK', () => {
  it('opens, reads, lists and expires sessions and lists their items', async () => {
    const opened = await bench.stripe.checkout.sessions.create(sessionParams())
    expect(opened).toMatchObject({
      object: 'checkout.session', status: 'open', payment_status: 'unpaid', amount_total: 123_450, currency: 'eur', payment_intent: null,
      livemode: false, url: `${bench.running.url}/c/pay/${opened.id}`, client_reference_id: 'order-17-deposit-1',
      metadata: { order: '17', attempt: '1', kind: 'deposit' },
    })
    expect(await bench.stripe.checkout.sessions.retrieve(opened.id)).toMatchObject({ id: opened.id })
    expect((await bench.stripe.checkout.sessions.list({ status: 'open' })).data.map(session => session.id)).toEqual([opened.id])
    const items = await bench.stripe.checkout.sessions.listLineItems(opened.id)
    expect(items.data).toMatchObject([{ object: 'item', description: 'Deposit on order 17', amount_total: 123_450, quantity: 1 }])
    const expired = await bench.stripe.checkout.sessions.expire(opened.id)
    expect(expired).toMatchObject({ status: 'expired', url: null })
  })

  it('reads payment intents and charges, refunds them, and keeps customers and events', async () => {
    const { session, intentId, chargeId } = await paidSession()
    expect(session).toMatchObject({ status: 'complete', payment_status: 'paid', url: null })
    expect(await bench.stripe.paymentIntents.retrieve(intentId)).toMatchObject({
      status: 'succeeded', amount_received: 123_450, metadata: { order: '17', attempt: '1', kind: 'deposit' }, description: 'Order 17',
    })
    expect(await bench.stripe.charges.retrieve(chargeId)).toMatchObject({ status: 'succeeded', captured: true, payment_intent: intentId })
    const refund = await bench.stripe.refunds.create({ payment_intent: intentId, amount: 450, reason: 'requested_by_customer' })
    expect(await bench.stripe.refunds.retrieve(refund.id)).toMatchObject({ amount: 450, status: 'succeeded', charge: chargeId })
    expect((await bench.stripe.refunds.list({ payment_intent: intentId })).data).toHaveLength(1)
    const customer = await bench.stripe.customers.create({ email: 'buyer@example.com', name: 'A Buyer' })
    expect(await bench.stripe.customers.retrieve(customer.id)).toMatchObject({ email: 'buyer@example.com' })
    const events = await bench.stripe.events.list({ type: 'checkout.session.completed' })
    expect(await bench.stripe.events.retrieve(events.data[0]?.id ?? '')).toMatchObject({ type: 'checkout.session.completed' })
  })
})

describe('FK-2 requests are read strictly', () => {
  it('answers 401 without a key and with a wrong one', async () => {
    const none = await fetch(`${bench.running.url}/v1/events`)
    expect(none.status).toBe(401)
    const wrong = await refusalOf(createSdk(bench.running, 'sk_test_somebody_else').events.list())
    expect(wrong.type).toBe('StripeAuthenticationError')
    expect(wrong.message).not.toContain('somebody_else')
  })

  it('refuses another API version', async () => {
    const refusal = await refusalOf(bench.stripe.events.list({}, { apiVersion: '2020-08-27' }))
    expect(refusal).toMatchObject({ statusCode: 400, type: 'StripeInvalidRequestError' })
  })

  // Each line: what is changed of a good request, and the code and parameter of the refusal.
  const price = { currency: 'eur', unit_amount: 5000, product_data: { name: 'Spring' } }
  const refused: [string, object, { code?: string, param: string }][] = [
    ['a name that no version has', { colour: 'red' }, { code: 'parameter_unknown', param: 'colour' }],
    ['a name that this version has no more', { payment_method_types: ['card'] }, { code: 'parameter_unknown', param: 'payment_method_types' }],
    ['a nested unknown name', { line_items: [{ quantity: 1, price_data: { ...price, weight: 3 } }] }, { code: 'parameter_unknown', param: 'line_items[0][price_data][weight]' }],
    ['an amount with a fraction', { line_items: [{ quantity: 1, price_data: { ...price, unit_amount: 50.5 } }] }, { code: 'parameter_invalid_integer', param: 'line_items[0][price_data][unit_amount]' }],
    ['a quantity in words', { line_items: [{ quantity: 'two', price_data: price }] }, { code: 'parameter_invalid_integer', param: 'line_items[0][quantity]' }],
    ['a truth value in words', { allow_promotion_codes: 'maybe' }, { param: 'allow_promotion_codes' }],
    ['text where a list belongs', { line_items: 'springs' }, { param: 'line_items' }],
    ['a list where text belongs', { success_url: ['http://127.0.0.1/'] }, { param: 'success_url' }],
    ['a mode that does not exist', { mode: 'barter' }, { param: 'mode' }],
    ['a currency that does not exist', { line_items: [{ quantity: 1, price_data: { ...price, currency: 'zzz' } }] }, { param: 'line_items[0][price_data][currency]' }],
    ['no items', { line_items: undefined }, { code: 'parameter_missing', param: 'line_items' }],
    ['no name for the product', { line_items: [{ quantity: 1, price_data: { ...price, product_data: {} } }] }, { code: 'parameter_missing', param: 'line_items[0][price_data][product_data]' }],
    ['no address to return to', { success_url: undefined }, { code: 'parameter_missing', param: 'success_url' }],
    ['an address that is none', { cancel_url: 'shop' }, { code: 'url_invalid', param: 'cancel_url' }],
    ['an address that would run a script', { cancel_url: 'javascript:alert(1)' }, { code: 'url_invalid', param: 'cancel_url' }],
    ['an e-mail address that is none', { customer_email: 'buyer' }, { code: 'email_invalid', param: 'customer_email' }],
    ['empty text', { client_reference_id: '' }, { code: 'parameter_invalid_empty', param: 'client_reference_id' }],
    ['a reference of 201 characters', { client_reference_id: 'x'.repeat(201) }, { param: 'client_reference_id' }],
    ['51 metadata keys', { metadata: Object.fromEntries(Array.from({ length: 51 }, (_, index) => [`k${index}`, 'v'])) }, { param: 'metadata' }],
    ['a metadata name of 41 characters', { metadata: { ['n'.repeat(41)]: 'v' } }, { param: 'metadata' }],
    ['a metadata value of 501 characters', { payment_intent_data: { metadata: { note: 'v'.repeat(501) } } }, { param: 'payment_intent_data[metadata][note]' }],
    ['a total of 49 cents', { line_items: [{ quantity: 1, price_data: { ...price, unit_amount: 49 } }] }, { code: 'amount_too_small', param: 'line_items' }],
    ['a total of nine digits', { line_items: [{ quantity: 1, price_data: { ...price, unit_amount: 100_000_000 } }] }, { code: 'amount_too_large', param: 'line_items' }],
    ['thousandths that do not end in 0', { line_items: [{ quantity: 1, price_data: { ...price, currency: 'kwd', unit_amount: 5124 } }] }, { code: 'invalid_charge_amount', param: 'line_items' }],
    ['two currencies', { line_items: [{ quantity: 1, price_data: price }, { quantity: 1, price_data: { ...price, currency: 'usd' } }] }, { param: 'line_items' }],
    ['a customer that does not exist', { customer_email: undefined, customer: 'cus_nobody' }, { code: 'resource_missing', param: 'customer' }],
  ]

  it.each(refused)('refuses %s', async (_name, overrides, wanted) => {
    const refusal = await refusalOf(bench.stripe.checkout.sessions.create({ ...sessionParams(), ...overrides } as Stripe.Checkout.SessionCreateParams))
    expect(refusal.type).toBe('StripeInvalidRequestError')
    expect({ code: refusal.code, param: refusal.param }).toEqual({ code: wanted.code, param: wanted.param })
    expect((await bench.stripe.checkout.sessions.list()).data).toEqual([])
  })

  it('takes the limits themselves: 200 characters, 50 keys of 40 with values of 500', async () => {
    const metadata = Object.fromEntries(Array.from({ length: 50 }, (_, index) => [`${index}`.padEnd(40, 'n'), 'v'.repeat(500)]))
    const session = await bench.stripe.checkout.sessions.create(sessionParams({ metadata, client_reference_id: 'x'.repeat(200) }))
    expect(session.metadata).toEqual(metadata)
  })

  it('holds expires_at between 30 minutes and 24 hours (PAY-16)', async () => {
    const nowS = Math.floor(Date.now() / 1000)
    for (const offsetS of [29 * 60 + 59 - 2, 24 * 3600 + 3]) {
      expect(await refusalOf(bench.stripe.checkout.sessions.create(sessionParams({ expires_at: nowS + offsetS })))).toMatchObject({ param: 'expires_at' })
    }
    for (const offsetS of [30 * 60 + 2, 24 * 3600 - 2]) {
      expect(await bench.stripe.checkout.sessions.create(sessionParams({ expires_at: nowS + offsetS }))).toMatchObject({ expires_at: nowS + offsetS })
    }
  })

  it('sums lines exactly, decimals of a minor unit rounded half up once per line', async () => {
    const session = await bench.stripe.checkout.sessions.create(sessionParams({ line_items: [
      { quantity: 3, price_data: { currency: 'eur', unit_amount: 1999, product_data: { name: 'Spring A' } } },
      { quantity: 1000, price_data: { currency: 'eur', unit_amount_decimal: '12.3455' as unknown as Stripe.Decimal, product_data: { name: 'Spring B' } } },
    ] }))
    // 3 × 19.99 = 59.97; 1000 × 0.123455 = 123.455, half up 123.46 (minor 12345.5 → 12346).
    expect(session.amount_total).toBe(5997 + 12_346)
  })

  it('charges zero-decimal currencies in whole units (PAY-2)', async () => {
    const session = await bench.stripe.checkout.sessions.create(sessionParams({
      line_items: [{ quantity: 1, price_data: { currency: 'JPY', unit_amount: 500, product_data: { name: 'Spring' } } }],
    }))
    expect(session).toMatchObject({ amount_total: 500, currency: 'jpy', payment_method_types: ['card'] })
    expect(await (await fetch(String(session.url))).text()).toContain('Pay JPY 500')
  })
})

describe('FK-3 objects, lists and identifiers are those of the pinned version', () => {
  it('answers every documented field, nulls included', async () => {
    const { session, intentId, chargeId } = await paidSession()
    const refund = await bench.stripe.refunds.create({ charge: chargeId, amount: 100 })
    const opened = await bench.stripe.checkout.sessions.create(sessionParams())
    const shapes: [string, string, object][] = [
      ['Checkout/Sessions.d.ts', 'Session', session],
      ['Checkout/Sessions.d.ts', 'Session', opened],
      ['PaymentIntents.d.ts', 'PaymentIntent', await bench.stripe.paymentIntents.retrieve(intentId)],
      ['Charges.d.ts', 'Charge', await bench.stripe.charges.retrieve(chargeId)],
      ['Refunds.d.ts', 'Refund', refund],
      ['Customers.d.ts', 'Customer', await bench.stripe.customers.create({})],
      ['Events.d.ts', 'EventBase', (await bench.stripe.events.list()).data[0] ?? {}],
      ['LineItems.d.ts', 'LineItem', (await bench.stripe.checkout.sessions.listLineItems(opened.id)).data[0] ?? {}],
    ]
    for (const [file, name, answered] of shapes) {
      const wanted = documentedFields(file, name)
      expect(wanted.length, name).toBeGreaterThan(7)
      expect(Object.keys(answered), name).toEqual(expect.arrayContaining(wanted))
    }
  })

  it('marks each kind of object with its prefix and each answer with a request id', async () => {
    const { session, intentId, chargeId } = await paidSession()
    const refund = await bench.stripe.refunds.create({ charge: chargeId })
    const customer = await bench.stripe.customers.create({})
    const [event] = (await bench.stripe.events.list({ limit: 1 })).data
    expect(session.id).toMatch(/^cs_test_[A-Za-z0-9]{60}$/)
    expect([intentId, chargeId, refund.id, customer.id, event?.id]).toEqual([
      expect.stringMatching(/^pi_\w{24}$/), expect.stringMatching(/^ch_\w{24}$/), expect.stringMatching(/^re_\w{24}$/),
      expect.stringMatching(/^cus_\w{14}$/), expect.stringMatching(/^evt_\w{24}$/),
    ])
    expect(customer.lastResponse.requestId).toMatch(/^req_\w{14}$/)
    expect((await refusalOf(bench.stripe.charges.retrieve('ch_none'))).requestId).toMatch(/^req_\w{14}$/)
  })

  it('lists newest first in pages of 10, both ways', async () => {
    const ids: string[] = []
    for (let count = 0; count < 13; count += 1) ids.unshift((await bench.stripe.checkout.sessions.create(sessionParams())).id)
    const first = await bench.stripe.checkout.sessions.list()
    expect(first).toMatchObject({ object: 'list', has_more: true, url: '/v1/checkout/sessions' })
    expect(first.data.map(session => session.id)).toEqual(ids.slice(0, 10))
    const second = await bench.stripe.checkout.sessions.list({ starting_after: ids[9] })
    expect([second.data.map(session => session.id), second.has_more]).toEqual([ids.slice(10), false])
    const before = await bench.stripe.checkout.sessions.list({ ending_before: ids[12], limit: 3 })
    expect([before.data.map(session => session.id), before.has_more]).toEqual([ids.slice(9, 12), true])
    const all: string[] = []
    for await (const session of bench.stripe.checkout.sessions.list({ limit: 4 })) all.push(session.id)
    expect(all).toEqual(ids)
    for (const limit of [0, 101]) expect(await refusalOf(bench.stripe.checkout.sessions.list({ limit }))).toMatchObject({ param: 'limit' })
    expect(await refusalOf(bench.stripe.checkout.sessions.list({ starting_after: 'cs_test_none' }))).toMatchObject({ code: 'resource_missing' })
  })

  it('filters sessions by payment intent, state and time', async () => {
    const { session, intentId } = await paidSession()
    await bench.stripe.checkout.sessions.create(sessionParams())
    const idsOf = async (params: Stripe.Checkout.SessionListParams) => (await bench.stripe.checkout.sessions.list(params)).data.map(found => found.id)
    expect(await idsOf({ payment_intent: intentId })).toEqual([session.id])
    expect(await idsOf({ status: 'complete' })).toEqual([session.id])
    expect(await idsOf({ created: { gt: session.created + 60 } })).toEqual([])
    expect(await idsOf({ created: { gte: session.created, lt: session.created + 60 }, status: 'complete' })).toEqual([session.id])
  })

  it('expands references, several levels deep and inside lists', async () => {
    const { session, intentId } = await paidSession()
    const expanded = await bench.stripe.checkout.sessions.retrieve(session.id, { expand: ['payment_intent.latest_charge.balance_transaction', 'line_items.data.price.product'] })
    const intent = expanded.payment_intent as Stripe.PaymentIntent
    expect(intent).toMatchObject({ id: intentId, latest_charge: { object: 'charge', amount: 123_450 } })
    expect(expanded.line_items?.data[0]?.price?.product).toMatchObject({ object: 'product', name: 'Deposit on order 17' })
    const listed = await bench.stripe.checkout.sessions.list({ expand: ['data.payment_intent'] })
    expect(listed.data[0]?.payment_intent).toMatchObject({ id: intentId })
    const refusal = await refusalOf(bench.stripe.checkout.sessions.retrieve(session.id, { expand: ['amount_total'] }))
    expect(refusal).toMatchObject({ statusCode: 400, param: 'expand' })
  })
})
