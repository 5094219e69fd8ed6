import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import Stripe from 'stripe'
import { postForm, refusalOf, sessionParams, startBench } from './set-up'
import type { Bench } from './set-up'

let bench: Bench
beforeAll(async () => { bench = await startBench({ webhookUrl: null }) })
afterAll(() => bench.close())
beforeEach(() => bench.control.reset())

async function openSessions(): Promise<number> {
  return (await bench.stripe.checkout.sessions.list({ limit: 100 })).data.length
}

describe('FK-5 idempotency keys', () => {
  it('replays the first answer and makes one object', async () => {
    const first = await bench.stripe.checkout.sessions.create(sessionParams(), { idempotencyKey: 'attempt-1' })
    const again = await bench.stripe.checkout.sessions.create(sessionParams(), { idempotencyKey: 'attempt-1' })
    expect(again.id).toBe(first.id)
    expect(again.lastResponse.headers['idempotent-replayed']).toBe('true')
    expect(first.lastResponse.headers['idempotent-replayed']).toBeUndefined()
    expect(again.lastResponse.requestId).not.toBe(first.lastResponse.requestId)
    expect(again.lastResponse.headers['original-request']).toBe(first.lastResponse.requestId)
    expect(await openSessions()).toBe(1)
  })

  it('compares parameters, not their order', async () => {
    const one = await postForm(bench.running, '/v1/customers', 'name=A&email=a%40example.com', { 'idempotency-key': 'order-2' })
    const two = await postForm(bench.running, '/v1/customers', 'email=a%40example.com&name=A', { 'idempotency-key': 'order-2' })
    expect(two.body).toEqual(one.body)
  })

  it('refuses the same key with other parameters or another path', async () => {
    await bench.stripe.checkout.sessions.create(sessionParams(), { idempotencyKey: 'attempt-2' })
    const other = await refusalOf(bench.stripe.checkout.sessions.create(sessionParams({ client_reference_id: 'another' }), { idempotencyKey: 'attempt-2' }))
    expect(other).toBeInstanceOf(Stripe.errors.StripeIdempotencyError)
    expect(other.statusCode).toBe(400)
    expect(await refusalOf(bench.stripe.customers.create({}, { idempotencyKey: 'attempt-2' }))).toBeInstanceOf(Stripe.errors.StripeIdempotencyError)
    expect(await openSessions()).toBe(1)
  })

  it('answers 409 while the twin is running, and the replay afterwards', async () => {
    await bench.control.addFailure({ kind: 'slow', delayMs: 150 })
    const first = bench.stripe.checkout.sessions.create(sessionParams(), { idempotencyKey: 'attempt-3' })
    await new Promise(resolve => setTimeout(resolve, 50))
    const twin = await refusalOf(bench.stripe.checkout.sessions.create(sessionParams(), { idempotencyKey: 'attempt-3' }))
    expect([twin.statusCode, twin.code]).toEqual([409, 'idempotency_key_in_use'])
    const made = await first
    expect((await bench.stripe.checkout.sessions.create(sessionParams(), { idempotencyKey: 'attempt-3' })).id).toBe(made.id)
    expect(await openSessions()).toBe(1)
  })

  it('keeps a 500 and replays it', async () => {
    await bench.control.addFailure({ status: 500 })
    const first = await refusalOf(bench.stripe.checkout.sessions.create(sessionParams(), { idempotencyKey: 'attempt-4' }))
    expect([first.statusCode, first.type]).toEqual([500, 'StripeAPIError'])
    const again = await refusalOf(bench.stripe.checkout.sessions.create(sessionParams(), { idempotencyKey: 'attempt-4' }))
    expect([again.statusCode, again.headers?.['idempotent-replayed']]).toEqual([500, 'true'])
    expect(await openSessions()).toBe(0)
  })

  it('can do the work although it answers 500', async () => {
    await bench.control.addFailure({ status: 500, isExecuted: true })
    await refusalOf(bench.stripe.checkout.sessions.create(sessionParams(), { idempotencyKey: 'attempt-5' }))
    expect(await openSessions()).toBe(1)
  })

  it('keeps a refusal by the state of an object', async () => {
    const { id } = await bench.stripe.checkout.sessions.create(sessionParams())
    await bench.stripe.checkout.sessions.expire(id)
    const first = await refusalOf(bench.stripe.checkout.sessions.expire(id, {}, { idempotencyKey: 'expire-1' }))
    const again = await refusalOf(bench.stripe.checkout.sessions.expire(id, {}, { idempotencyKey: 'expire-1' }))
    expect([first.statusCode, again.statusCode, again.headers?.['idempotent-replayed']]).toEqual([400, 400, 'true'])
  })

  it.each([
    ['a validation failure', async () => {
      await refusalOf(bench.stripe.checkout.sessions.create({ ...sessionParams(), mode: undefined }, { idempotencyKey: 'attempt-6' }))
    }],
    ['a 429', async () => {
      await bench.control.addFailure({ status: 429 })
      expect(await refusalOf(bench.stripe.checkout.sessions.create(sessionParams(), { idempotencyKey: 'attempt-6' }))).toBeInstanceOf(Stripe.errors.StripeRateLimitError)
    }],
  ])('does not keep %s', async (_name, failOnce) => {
    await failOnce()
    const made = await bench.stripe.checkout.sessions.create(sessionParams(), { idempotencyKey: 'attempt-6' })
    expect(made.lastResponse.headers['idempotent-replayed']).toBeUndefined()
    expect(await openSessions()).toBe(1)
  })

  it('keeps a key for 24 hours and forgets it afterwards', async () => {
    const first = await bench.stripe.customers.create({ name: 'A' }, { idempotencyKey: 'customer-1' })
    await bench.control.setClockOffset(24 * 3600 - 60)
    expect((await bench.stripe.customers.create({ name: 'A' }, { idempotencyKey: 'customer-1' })).id).toBe(first.id)
    await bench.control.setClockOffset(24 * 3600 + 60)
    expect((await bench.stripe.customers.create({ name: 'A' }, { idempotencyKey: 'customer-1' })).id).not.toBe(first.id)
  })

  it('takes 255 characters and refuses 256', async () => {
    expect(await bench.stripe.customers.create({}, { idempotencyKey: 'k'.repeat(255) })).toMatchObject({ object: 'customer' })
    expect(await refusalOf(bench.stripe.customers.create({}, { idempotencyKey: 'k'.repeat(256) }))).toMatchObject({ statusCode: 400 })
  })

  it('makes one session of a lost answer and its repetition', async () => {
    await bench.control.addFailure({ kind: 'lostAnswer' })
    // The SDK itself repeats once after a broken connection, with the same key.
    const made = await bench.stripe.checkout.sessions.create(sessionParams(), { idempotencyKey: 'attempt-7' })
    expect(made.lastResponse.headers['idempotent-replayed']).toBe('true')
    expect(await openSessions()).toBe(1)
    const requests = (await bench.control.listRequests()).filter(request => request.method === 'POST')
    expect(requests.map(request => [request.idempotencyKey, request.isReplay])).toEqual([['attempt-7', false], ['attempt-7', true]])
  })
})

describe('FK-4 errors on demand reach the SDK as their class', () => {
  const classes: [number, string, Record<string, string>][] = [
    [400, 'StripeInvalidRequestError', {}],
    [401, 'StripeAuthenticationError', {}],
    [402, 'StripeCardError', { decline_code: 'insufficient_funds' }],
    [403, 'StripePermissionError', {}],
    [404, 'StripeInvalidRequestError', { code: 'resource_missing' }],
    [409, 'StripeAPIError', { code: 'idempotency_key_in_use' }],
    [429, 'StripeRateLimitError', {}],
    [500, 'StripeAPIError', {}],
    [503, 'StripeAPIError', {}],
  ]
  it.each(classes)('%i becomes %s', async (status, type, fields) => {
    await bench.control.addFailure({ status, error: fields })
    const refusal = await refusalOf(bench.stripe.customers.create({}))
    expect(refusal).toMatchObject({ statusCode: status, type, ...fields })
    expect(refusal.message).not.toBe('')
    expect(await bench.stripe.customers.create({})).toMatchObject({ object: 'customer' })
  })

  it('names what is missing with 404', async () => {
    for (const call of [bench.stripe.charges.retrieve('ch_none'), bench.stripe.paymentIntents.retrieve('pi_none'), bench.stripe.refunds.retrieve('re_none'),
      bench.stripe.events.retrieve('evt_none'), bench.stripe.customers.retrieve('cus_none'), bench.stripe.checkout.sessions.retrieve('cs_none')]) {
      expect(await refusalOf(call)).toMatchObject({ statusCode: 404, code: 'resource_missing', type: 'StripeInvalidRequestError' })
    }
    expect(await refusalOf(bench.stripe.products.list())).toMatchObject({ statusCode: 404 })
  })

  it('breaks connections and lets requests hang, for as many as were asked and where they were asked', async () => {
    await bench.control.addFailure({ kind: 'reset', times: 2, method: 'POST', pathPrefix: '/v1/customers' })
    expect(await bench.stripe.events.list()).toMatchObject({ object: 'list' })
    expect(await refusalOf(bench.stripe.customers.create({}))).toMatchObject({ type: 'StripeConnectionError' })
    expect(await bench.stripe.customers.create({})).toMatchObject({ object: 'customer' })
    await bench.control.addFailure({ kind: 'hang', delayMs: 600 })
    const hung = await refusalOf(bench.stripe.customers.create({}, { timeout: 100 }))
    expect(hung.message).toContain('timeout')
    expect((await bench.stripe.customers.list()).data).toHaveLength(1)
  })
})

describe('limits of the door', () => {
  it('answers 413 to a body above 1 MiB and 403 to a foreign host name', async () => {
    expect((await postForm(bench.running, '/v1/customers', `name=${'x'.repeat(1024 * 1024)}`)).status).toBe(413)
    const { request } = await import('node:http')
    const status = await new Promise((resolve) => {
      request({ host: '127.0.0.1', port: bench.running.port, path: '/_fake/health', headers: { host: 'shop.example.com' } }, (answer) => {
        answer.resume()
        resolve(answer.statusCode)
      }).end()
    })
    expect(status).toBe(403)
  })
})
