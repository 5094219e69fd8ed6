import { readFileSync } from 'node:fs'
import { join } from 'node:path'
import { afterEach, describe, expect, inject, it } from 'vitest'
import { booksOf, query } from './support/database'
import { mailsTo, waitForMail } from './support/mailbox'
import { acceptOrder, newAddress, openDeposit, orderReadyToPay, type AcceptedOrder } from './support/orders'
import { useServices } from './support/services'
import { deliver, endSession, sessionsOf, signEvent, stripeSdk, tellStripe } from './support/stripe'
import { Visitor } from './support/visitor'

const services = useServices()
const oncePaid = { state: 'deposit-paid', paid: 1, captures: 1, jobs: 1, creditMinor: 0, depositMails: 1 }
const untilPaid = (order: AcceptedOrder, timeout = 40_000) => expect.poll(() => booksOf(order.ref), { timeout, interval: 200 }).toEqual(oncePaid)
const depositMails = async (order: AcceptedOrder) => (await mailsTo(order.email)).filter(mail => /deposit received/i.test(mail.subject))
const wait = (ms: number) => new Promise(resolve => setTimeout(resolve, ms))

/** Asserts one job, one deposit, and each e-mail once, after a moment in which a second one could still come. */
async function expectAllOnce(order: AcceptedOrder): Promise<void> {
  await untilPaid(order)
  await waitForMail(order.email, /deposit received/i, 40_000)
  await wait(2_500)
  expect(await booksOf(order.ref)).toEqual(oncePaid)
  expect(await depositMails(order)).toHaveLength(1)
  const subjects = (await mailsTo(order.email)).map(mail => mail.subject)
  expect(new Set(subjects).size).toBe(subjects.length)
}

afterEach(async () => {
  await services.database.start()
  await services.stripeFake.start()
  await services.mail.start()
  await services.app.start()
  await tellStripe('failures/clear')
  await tellStripe('switches/clear')
})

describe('the app, killed with -9', () => {
  it('between the payment and its webhook, books the deposit once after its restart', async () => {
    const order = await orderReadyToPay('killed')
    const sessionId = await openDeposit(order)
    await services.app.kill()
    await endSession(sessionId, 'paid')
    await wait(1_000)
    expect((await booksOf(order.ref)).state).toBe('accepted')
    await services.app.start()
    await expectAllOnce(order)
  })

  it('in the moment it has taken an event, loses nothing of it (PAY-26)', async () => {
    const order = await orderReadyToPay('taken')
    const sessionId = await openDeposit(order)
    await tellStripe('switches', { drop: true, times: 50, everyAttempt: true })
    await endSession(sessionId, 'paid')
    // Stripe is slow to answer, so the worker is in the middle of it when the process dies.
    await tellStripe('failures', { kind: 'slow', delayMs: 3_000, times: 1, method: 'GET', pathPrefix: '/v1/checkout/sessions' })
    const event = signEvent({ type: 'checkout.session.completed', object: { id: sessionId, object: 'checkout.session' } })
    expect((await deliver(event.payload, event.signature)).status).toBe(200)
    await wait(300)
    await services.app.kill()
    expect(await query(`select state::text, attempts from stripe_events where id = $1`, [event.id])).toEqual([{ state: 'waiting', attempts: 1 }])
    expect((await booksOf(order.ref)).captures).toBe(0)
    await tellStripe('failures/clear')
    await services.app.start()
    // The claim of the dead process runs out by itself; the test does not wait a minute and a half for it.
    await query(`update stripe_events set run_at = now() where id = $1 and state = 'waiting'`, [event.id])
    await expectAllOnce(order)
  })

  it('while Stripe opens the page, opens it once: the next click finishes the same attempt (PAY-10, PAY-11)', async () => {
    const order = await orderReadyToPay('opening')
    await tellStripe('failures', { kind: 'slow', delayMs: 4_000, times: 1, method: 'POST', pathPrefix: '/v1/checkout/sessions' })
    const click = order.customer.post(`/api/orders/${order.ref}/pay`, { kind: 'deposit' }).catch(() => null)
    await wait(800)
    const open = await query<{ state: string }>(`select p.state::text from payments p join orders o on o.id = p.order_id where o.number = $1`, [Number(order.ref.slice(3))])
    expect(open).toEqual([{ state: 'opening' }])
    // No transaction of ours is open while Stripe is asked (REL-4).
    expect(await query(`select 1 from pg_stat_activity where application_name = 'wirewright' and state like 'idle in transaction%'`)).toEqual([])
    await services.app.kill()
    await click
    await tellStripe('failures/clear')
    await services.app.start()
    await wait(4_000)
    const sessionId = await openDeposit(order)
    expect((await sessionsOf(order.ref)).map(session => session.id)).toEqual([sessionId])
    await endSession(sessionId, 'paid')
    await expectAllOnce(order)
  })
})

describe('the mail inbox, away for a while', () => {
  it('gets each e-mail once when it is back, in the order in which things happened, and no page waits for it (MAIL-3, REL-17)', async () => {
    const order = await orderReadyToPay('inbox')
    const sessionId = await openDeposit(order)
    await services.mail.stop()
    await endSession(sessionId, 'paid')
    await untilPaid(order)
    const second = await acceptOrder(order.email)
    const startMs = performance.now()
    expect((await new Visitor().get('/api/health')).status).toBe(200)
    expect(performance.now() - startMs).toBeLessThan(1_000)
    await expect.poll(async () => (await query<{ attempts: number }>(`select coalesce(max(attempts), 0)::int as attempts from outbox where recipient = $1 and sent_at is null`, [order.email]))[0]?.attempts, { timeout: 20_000 }).toBeGreaterThan(1)
    await services.mail.start()
    await waitForMail(order.email, new RegExp(`confirm your address.*${second.ref}`, 'i'), 90_000)
    await wait(2_500)
    const subjects = (await mailsTo(order.email)).map(mail => mail.subject)
    expect(subjects.filter(subject => /deposit received/i.test(subject))).toHaveLength(1)
    expect(new Set(subjects).size).toBe(subjects.length)
    const sent = await query<{ kind: string }>(`select kind from outbox where recipient = $1 and sent_at is not null order by sent_at`, [order.email])
    const written = await query<{ kind: string }>(`select kind from outbox where recipient = $1 order by created_at, id`, [order.email])
    expect(sent).toEqual(written)
  })
})

describe('the database, away for a while', () => {
  it('has events answered with 503, and redelivered ones are taken when it is back (PAY-27)', async () => {
    const order = await orderReadyToPay('database')
    const sessionId = await openDeposit(order)
    await services.database.stop()
    const { payload, signature } = signEvent({ type: 'checkout.session.completed', object: { id: sessionId, object: 'checkout.session' } })
    expect((await deliver(payload, signature)).status).toBe(503)
    await endSession(sessionId, 'paid')
    await services.database.start()
    await expectAllOnce(order)
  })
})

describe('Stripe, away for a while', () => {
  it('has paying answered with words and a time to wait, and nothing else is touched (REL-17)', async () => {
    const order = await orderReadyToPay('stripe')
    await services.stripeFake.stop()
    const { status, body, headers } = await order.customer.post<{ detail: string }>(`/api/orders/${order.ref}/pay`, { kind: 'deposit' })
    expect(status).toBe(503)
    expect(body.detail).toMatch(/nothing was taken/i)
    expect(Number(headers.get('retry-after'))).toBeGreaterThan(0)
    expect((await order.customer.get(`/api/orders/${order.ref}`)).status).toBe(200)
    await services.stripeFake.start()
    await endSession(await openDeposit(order), 'paid')
    await expectAllOnce(order)
  })

  it('loses all its events: the state is right after the timer has read it back (PAY-39)', async () => {
    const order = await orderReadyToPay('lost')
    const sessionId = await openDeposit(order)
    await tellStripe('switches', { drop: true, times: 50, everyAttempt: true })
    await endSession(sessionId, 'paid')
    const { createDatabase, createPool } = await import('#server/database/client')
    const { reconcilePayments } = await import('#server/services/payments/reconcile')
    const pool = createPool(inject('databaseUrl'), () => undefined)
    try {
      const { failed } = await reconcilePayments(createDatabase(pool), { stripe: stripeSdk(), livemode: false, origin: inject('baseUrl') }, { olderThanMinutes: 0 })
      expect(failed).toBe(0)
    }
    finally {
      await pool.end()
    }
    await expectAllOnce(order)
  })
})

describe('a stop that was asked for', () => {
  it('finishes the requests under way, closes what it holds and ends within ten seconds (REL-10)', async () => {
    const orders = await Promise.all([orderReadyToPay('stop-a'), orderReadyToPay('stop-b'), orderReadyToPay('stop-c')])
    await tellStripe('failures', { kind: 'slow', delayMs: 2_000, times: 3, method: 'POST', pathPrefix: '/v1/checkout/sessions' })
    const clicks = orders.map(order => order.customer.post(`/api/orders/${order.ref}/pay`, { kind: 'deposit' }))
    await wait(500)
    const startMs = performance.now()
    await services.app.stop()
    expect(performance.now() - startMs).toBeLessThan(10_000)
    expect((await Promise.all(clicks)).map(answer => answer.status)).toEqual([200, 200, 200])
    const log = readFileSync(join(inject('logFolder'), 'app.log'), 'utf8').trim().split('\n')
    expect(log.filter(line => line.includes('"event":"stopping"')).length).toBeGreaterThan(0)
    expect(log.at(-1)).toContain('"event":"stopped"')
    await services.app.start()
    const email = newAddress('after')
    await acceptOrder(email)
    await waitForMail(email, /confirm your address/i)
  })
})
