import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import type Stripe from 'stripe'
import { PAGE_COLOURS } from '../../fakes/stripe/pages/stylesheet'
import { HOOK_SECRET, sessionParams, startBench } from './set-up'
import type { Bench } from './set-up'

let bench: Bench
beforeAll(async () => { bench = await startBench() })
afterAll(() => bench.close())
beforeEach(async () => {
  await bench.control.reset()
  bench.receiver.received.length = 0
})

async function open(overrides: Partial<Stripe.Checkout.SessionCreateParams> = {}): Promise<{ id: string, url: string }> {
  const session = await bench.stripe.checkout.sessions.create(sessionParams(overrides))
  return { id: session.id, url: String(session.url) }
}

async function page(url: string): Promise<{ status: number, markup: string, headers: Headers }> {
  const response = await fetch(url, { redirect: 'manual' })
  return { status: response.status, markup: await response.text(), headers: response.headers }
}

/** The number that the page's form carries, as a browser would send it back. */
function attemptIn(markup: string): string {
  return /name="attempt" value="(\d+)"/.exec(markup)?.[1] ?? ''
}

async function submit(url: string, fields: Record<string, string>, attempt?: string): Promise<{ status: number, location: string, markup: string }> {
  const response = await fetch(url, {
    method: 'POST', redirect: 'manual', body: new URLSearchParams({ attempt: attempt ?? attemptIn((await page(url)).markup), ...fields }),
  })
  return { status: response.status, location: response.headers.get('location') ?? '', markup: await response.text() }
}

async function chargesOf(sessionId: string): Promise<Stripe.Charge[]> {
  const session = await bench.stripe.checkout.sessions.retrieve(sessionId)
  return (await bench.stripe.charges.list({ payment_intent: String(session.payment_intent) })).data
}

describe('the payment page', () => {
  it('says that no money moves, what is paid for and how much, and links back', async () => {
    const { url } = await open()
    const { status, markup } = await page(url)
    expect(status).toBe(200)
    expect(markup).toContain('This is a fake for trying things out. No money moves.')
    expect(markup).toContain('<h1>Pay EUR 1,234.50</h1>')
    expect(markup).toContain('Deposit on order 17')
    expect(markup).toContain('buyer@example.com')
    expect(markup).toContain('<a href="http://127.0.0.1:3999/quote">')
    for (const number of ['4242 4242 4242 4242', '4000 0000 0000 0002', '4000 0025 0000 3155']) expect(markup).toContain(`Test card ${number}`)
  })

  it('has a language, one title and heading, no script, and a label for each field', async () => {
    const { url } = await open({ customer_email: undefined })
    const { markup } = await page(url)
    expect(markup).toMatch(/<html lang="en-GB">/)
    expect(markup.match(/<title>/g)).toHaveLength(1)
    expect(markup.match(/<h1>/g)).toHaveLength(1)
    expect(markup).not.toMatch(/<script|\son\w+=|style="/)
    const fields = [...markup.matchAll(/<input (?!type="hidden")[^>]*id="([^"]+)"/g)].map(match => match[1])
    expect(fields).toHaveLength(10)
    for (const id of fields) expect(markup).toContain(`<label for="${id}">`)
    const described = [...markup.matchAll(/aria-describedby="([^"]+)"/g)].flatMap(match => match[1]?.split(' ') ?? [])
    for (const id of described) expect(markup).toContain(`id="${id}"`)
  })

  it('comes with strict headers that still let the form end at the shop', async () => {
    const { headers } = await page((await open()).url)
    expect(headers.get('content-security-policy')).toBe(
      'default-src \'none\'; style-src \'self\'; form-action \'self\' http://127.0.0.1:3999; base-uri \'none\'; frame-ancestors \'none\'',
    )
    expect(headers.get('x-content-type-options')).toBe('nosniff')
    expect(headers.get('cache-control')).toBe('no-store')
    expect(headers.get('x-frame-options')).toBe('DENY')
    const style = await fetch(`${bench.running.url}/c/style.css`)
    expect([style.status, style.headers.get('content-type')]).toEqual([200, 'text/css; charset=utf-8'])
  })

  it('writes text of a request as text', async () => {
    const { url } = await open({ line_items: [{ quantity: 1, price_data: { currency: 'eur', unit_amount: 100, product_data: { name: '<script>alert("1")</script>' } } }] })
    const { markup } = await page(url)
    expect(markup).not.toContain('<script>')
    expect(markup).toContain('&lt;script&gt;alert(&quot;1&quot;)&lt;/script&gt;')
  })

  it('uses colours with enough contrast (WCAG 2.2: 4.5 for text, 3 for outlines)', () => {
    const luminance = (colour: string) => {
      const [red = 0, green = 0, blue = 0] = [1, 3, 5].map((start) => {
        const part = Number.parseInt(colour.slice(start, start + 2), 16) / 255
        return part <= 0.04045 ? part / 12.92 : ((part + 0.055) / 1.055) ** 2.4
      })
      return 0.2126 * red + 0.7152 * green + 0.0722 * blue
    }
    const contrast = (one: string, other: string) => {
      const [light = 0, dark = 0] = [luminance(one), luminance(other)].sort((first, second) => second - first)
      return (light + 0.05) / (dark + 0.05)
    }
    const { ground, text, quiet, band, line, error, button, buttonText } = PAGE_COLOURS
    for (const [front, back] of [[text, ground], [quiet, ground], [text, band], [error, ground], [buttonText, button]] as const) {
      expect(contrast(front, back), `${front} on ${back}`).toBeGreaterThanOrEqual(4.5)
    }
    expect(contrast(line, ground)).toBeGreaterThanOrEqual(3)
  })
})

describe('paying on the page', () => {
  it('takes the working card and returns to the shop with the session’s id', async () => {
    const { id, url } = await open()
    const answer = await submit(url, { choice: '4242424242424242', name: 'B. Buyer' })
    expect([answer.status, answer.location]).toEqual([303, `http://127.0.0.1:3999/paid?session=${id}`])
    expect(await bench.stripe.checkout.sessions.retrieve(id)).toMatchObject({
      status: 'complete', payment_status: 'paid', customer_details: { email: 'buyer@example.com', name: 'B. Buyer' },
    })
    await bench.receiver.waitFor(4)
    const last = bench.receiver.received[3]
    expect(bench.stripe.webhooks.constructEvent(last?.body ?? '', last?.signature ?? '', HOOK_SECRET).type).toBe('checkout.session.completed')
  })

  it('charges once however often the button is pressed', async () => {
    const { id, url } = await open()
    const attempt = attemptIn((await page(url)).markup)
    const answers = await Promise.all(Array.from({ length: 20 }, () => submit(url, { choice: '4242424242424242' }, attempt)))
    expect(new Set(answers.map(answer => `${answer.status} ${answer.location}`))).toEqual(new Set([`303 http://127.0.0.1:3999/paid?session=${id}`]))
    expect(await chargesOf(id)).toHaveLength(1)
    expect((await bench.stripe.events.list({ type: 'checkout.session.completed' })).data).toHaveLength(1)
  })

  it('shows a decline and lets the customer try again', async () => {
    const { id, url } = await open()
    const attempt = attemptIn((await page(url)).markup)
    const answers = [await submit(url, { choice: '4000000000000002' }, attempt), await submit(url, { choice: '4000000000000002' }, attempt)]
    expect(answers.map(answer => [answer.status, answer.location])).toEqual([[303, `/c/pay/${id}`], [303, `/c/pay/${id}`]])
    const { markup } = await page(url)
    expect(markup).toContain('<title>Problem: Pay EUR 1,234.50')
    expect(markup).toMatch(/role="alert">.*Your card was declined\. Nothing was taken\./)
    expect((await chargesOf(id)).map(charge => charge.status)).toEqual(['failed'])
    expect((await submit(url, { choice: '4242424242424242' })).location).toContain('/paid?session=')
    expect((await chargesOf(id)).map(charge => charge.status)).toEqual(['succeeded', 'failed'])
  })

  it('asks for the second step, takes its failure, and takes its success', async () => {
    const { id, url } = await open()
    const first = await submit(url, { choice: '4000002500003155' })
    expect(first.location).toBe(`/c/pay/${id}/authenticate`)
    const authenticateUrl = `${bench.running.url}${first.location}`
    const step = await page(authenticateUrl)
    expect(step.markup).toContain('Complete authentication')
    expect(step.markup).toContain('Fail authentication')
    expect(step.markup).toContain('No money moves.')
    const failed = await submit(authenticateUrl, { result: 'fail' })
    expect(failed.location).toBe(`/c/pay/${id}`)
    expect((await page(url)).markup).toContain('The second step with the bank was not completed.')
    expect((await page(authenticateUrl)).headers.get('location')).toBe(`/c/pay/${id}`)
    await submit(url, { choice: '4000002500003155' })
    const attempt = attemptIn((await page(authenticateUrl)).markup)
    const answers = await Promise.all([submit(authenticateUrl, { result: 'complete' }, attempt), submit(authenticateUrl, { result: 'complete' }, attempt)])
    expect(answers.map(answer => answer.location)).toEqual(Array.from({ length: 2 }, () => `http://127.0.0.1:3999/paid?session=${id}`))
    expect(await chargesOf(id)).toHaveLength(1)
  })

  it.each([
    ['debit_succeeds', 'paid', 'checkout.session.async_payment_succeeded'],
    ['debit_fails', 'unpaid', 'checkout.session.async_payment_failed'],
  ])('takes a bank debit that ends later: %s', async (choice, paymentStatus, type) => {
    const { id, url } = await open()
    expect((await submit(url, { choice })).location).toContain('/paid?session=')
    expect(await bench.stripe.checkout.sessions.retrieve(id)).toMatchObject({ status: 'complete', payment_status: 'unpaid' })
    await expect.poll(async () => (await bench.stripe.events.list({ type })).data.length, { timeout: 3000 }).toBe(1)
    expect(await bench.stripe.checkout.sessions.retrieve(id)).toMatchObject({ payment_status: paymentStatus })
  })

  it('offers the bank debit only where the currency and the session allow it', async () => {
    const cardOnly = await open({ allowed_payment_method_types: ['card'] })
    expect((await page(cardOnly.url)).markup).not.toContain('Bank debit')
    const forced = await submit(cardOnly.url, { choice: 'debit_succeeds' })
    expect([forced.status, forced.markup.includes('The bank debit is not offered')]).toEqual([422, true])
    const debitOnly = await open({ excluded_payment_method_types: ['card'] })
    const { markup } = await page(debitOnly.url)
    expect([markup.includes('Bank debit'), markup.includes('Card number')]).toEqual([true, false])
  })

  it('takes a typed test number instead of the choice, and keeps only its last digits', async () => {
    const { id, url } = await open()
    await submit(url, { choice: '4000000000000002', number: '5555 5555 5555 4444', expiry: '12 / 34', cvc: '123' })
    const [charge] = await chargesOf(id)
    expect(charge?.payment_method_details?.card).toMatchObject({ brand: 'mastercard', last4: '4444' })
    expect(JSON.stringify([await bench.stripe.events.list({ limit: 100 }), charge])).not.toContain('5555555555554444')
  })

  // 4111 1111 1111 1111 is a well-known number that is none of the fake's own (from memory).
  it.each([
    ['a number that is no test number', { number: '4111 1111 1111 1111' }, 'number', 'none of the test numbers'],
    ['a month that is past', { number: '4242424242424242', expiry: '01/20' }, 'expiry', 'This date is past'],
    ['a month that is none', { number: '4242424242424242', expiry: '13/34' }, 'expiry', 'month and year'],
    ['a security code in letters', { number: '4242424242424242', cvc: 'abc' }, 'cvc', 'three or four digits'],
  ])('says where and what is wrong with %s, and charges nothing', async (_name, fields, field, message) => {
    const { id, url } = await open()
    const answer = await submit(url, { choice: '4242424242424242', ...fields } as Record<string, string>)
    expect(answer.status).toBe(422)
    expect(answer.markup).toMatch(new RegExp(`id="${field}"[^>]* aria-invalid="true"`))
    expect(answer.markup).toMatch(new RegExp(`id="${field}-error">[^<]*${message}`))
    expect(answer.markup).toContain('Something needs correcting')
    expect(await bench.stripe.checkout.sessions.retrieve(id)).toMatchObject({ status: 'open', payment_intent: null })
  })

  it('asks for an e-mail address when none is known, and hands it on', async () => {
    const { id, url } = await open({ customer_email: undefined, customer_creation: 'always' })
    const missing = await submit(url, { choice: '4242424242424242', email: 'nobody' })
    expect([missing.status, missing.markup.includes('value="nobody"')]).toEqual([422, true])
    expect(missing.markup).toContain('<a href="#email">')
    await submit(url, { choice: '4000000000000002', email: 'new@example.com' })
    expect((await page(url)).markup).toContain('value="new@example.com"')
    await submit(url, { choice: '4242424242424242', email: 'new@example.com' })
    const session = await bench.stripe.checkout.sessions.retrieve(id, { expand: ['customer'] })
    expect(session).toMatchObject({ customer_details: { email: 'new@example.com' }, customer: { email: 'new@example.com' } })
  })
})

describe('pages of sessions that take no payment', () => {
  it('says what became of them', async () => {
    const paid = await open()
    await bench.control.setOutcome(paid.id, 'paid')
    expect((await page(paid.url)).markup).toContain('EUR 1,234.50 counts as paid.')
    const waiting = await open()
    await bench.control.setOutcome(waiting.id, 'asyncPending')
    expect((await page(waiting.url)).markup).toContain('on its way from the bank')
    const expired = await open()
    await bench.stripe.checkout.sessions.expire(expired.id)
    const closed = await page(expired.url)
    expect([closed.status, closed.markup.includes('This payment page is closed')]).toEqual([410, true])
    expect((await submit(expired.url, { choice: '4242424242424242' }, '1')).status).toBe(410)
    expect(await bench.stripe.checkout.sessions.retrieve(expired.id)).toMatchObject({ payment_intent: null })
    expect((await page(`${bench.running.url}/c/pay/cs_test_none`)).status).toBe(404)
  })

  it('closes a page whose time is over, without waiting for the clockwork', async () => {
    const { url } = await open()
    await bench.control.setClockOffset(24 * 3600 + 1)
    expect((await page(url)).status).toBe(410)
  })
})
