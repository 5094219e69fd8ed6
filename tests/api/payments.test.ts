import { describe, expect, inject, it } from 'vitest'
import { formatMoney } from '#shared/money/index'
import type { PaymentStatus } from '#shared/schemas/payment'
import type { Problem } from '#shared/schemas/problem'
import { booksOf, cancelAcceptedOrder, query } from './support/database'
import { mailsTo, waitForMail } from './support/mailbox'
import { acceptOrder, newAddress, openDeposit, orderReadyToPay, orderView, sessionIdOf, type AcceptedOrder } from './support/orders'
import { makeJob } from './support/shop-floor'
import { endSession, sessionsOf, stripeSdk, tellStripe } from './support/stripe'
import { signInAsRole, Visitor } from './support/visitor'

const oncePaid = { state: 'deposit-paid', paid: 1, captures: 1, jobs: 1, creditMinor: 0, depositMails: 1 }
const untilPaid = (order: AcceptedOrder) => expect.poll(() => booksOf(order.ref), { timeout: 20_000, interval: 200 }).toEqual(oncePaid)
const pay = (order: AcceptedOrder, visitor = order.customer) => visitor.post<{ url: string } & Problem>(`/api/orders/${order.ref}/pay`, { kind: 'deposit' })

describe('opening the pay page', () => {
  it('asks Stripe for the accepted deposit, with our ids on session and intent and nothing about the person (PAY-7, PAY-14, PAY-15, PAY-16)', async () => {
    const order = await orderReadyToPay('open')
    const sessionId = await openDeposit(order)
    const session = await stripeSdk().checkout.sessions.retrieve(sessionId, { expand: ['line_items'] })
    const view = await orderView(order)
    expect(session).toMatchObject({ mode: 'payment', currency: 'eur', amount_total: view.depositMinor })
    expect(session.metadata).toMatchObject({ order_ref: order.ref, kind: 'deposit', attempt: '1', payment_id: session.client_reference_id })
    expect(JSON.stringify([session.metadata, session.client_reference_id, session.line_items])).not.toMatch(/tarnbeck|varrow|bottle/i)
    expect(session.success_url).toBe(`${inject('baseUrl')}/account/orders/${order.ref}?session_id={CHECKOUT_SESSION_ID}`)
    const aheadMinutes = (session.expires_at - Date.now() / 1000) / 60
    expect(aheadMinutes).toBeGreaterThan(30)
    expect(aheadMinutes).toBeLessThan(24 * 60)
  })

  it('takes no amount from the client (PAY-7)', async () => {
    const order = await orderReadyToPay('amount')
    const { status } = await order.customer.post(`/api/orders/${order.ref}/pay`, { kind: 'deposit', amountMinor: 1, currency: 'jpy' })
    expect(status).toBe(422)
    expect(await sessionsOf(order.ref)).toHaveLength(0)
  })

  it('opens one session for twenty clicks at once, and reuses it later (PAY-17)', async () => {
    const order = await orderReadyToPay('clicks')
    const answers = await Promise.all(Array.from({ length: 20 }, () => pay(order)))
    expect(answers.map(answer => answer.status)).toEqual(Array.from({ length: 20 }, () => 200))
    expect(new Set(answers.map(answer => answer.body.url)).size).toBe(1)
    expect((await pay(order)).body.url).toBe(answers[0]!.body.url)
    expect(await sessionsOf(order.ref)).toHaveLength(1)
  })

  it('makes a new attempt after the page has expired, with a new key (PAY-11, PAY-16)', async () => {
    const order = await orderReadyToPay('expired')
    const first = await openDeposit(order)
    await endSession(first, 'expired')
    await expect.poll(async () => (await query<{ state: string }>(`select state::text from payments where stripe_session_id = $1`, [first]))[0]?.state, { timeout: 10_000 }).toBe('expired')
    const second = await openDeposit(order)
    expect(second).not.toBe(first)
    const attempts = await query<{ attempt: number, key: string }>(`select attempt, idempotency_key as key from payments p join orders o on o.id = p.order_id where o.number = $1 order by attempt`, [Number(order.ref.slice(3))])
    expect(attempts.map(row => row.attempt)).toEqual([1, 2])
    expect(new Set(attempts.map(row => row.key)).size).toBe(2)
    await endSession(second, 'paid')
    await untilPaid(order)
  })

  it('closes the open page and makes a new attempt when the amount is another (PAY-17)', async () => {
    const order = await orderReadyToPay('changed')
    const first = await openDeposit(order)
    await query(`update orders set accepted_quantity = 100 where number = $1`, [Number(order.ref.slice(3))])
    const second = await openDeposit(order)
    expect(second).not.toBe(first)
    expect((await stripeSdk().checkout.sessions.retrieve(first)).status).toBe('expired')
    expect((await sessionsOf(order.ref)).filter(session => session.status === 'open')).toHaveLength(1)
  })

  it.each([
    ['a broken connection after Stripe did the work', { kind: 'lostAnswer', times: 1 }],
    ['three broken connections', { kind: 'lostAnswer', times: 3 }],
    ['a 500 that Stripe keeps for the key, after the work', { kind: 'answer', status: 500, isExecuted: true, isStored: true, times: 1 }],
    ['a 500 that Stripe keeps for the key, before the work', { kind: 'answer', status: 500, isExecuted: false, isStored: true, times: 1 }],
    ['a 429', { kind: 'answer', status: 429, times: 1 }],
  ])('opens one session in spite of %s (PAY-13)', async (_name, failure) => {
    const order = await orderReadyToPay('unsure')
    await tellStripe('failures', { ...failure, method: 'POST', pathPrefix: '/v1/checkout/sessions' })
    try {
      const first = await pay(order)
      expect([200, 503]).toContain(first.status)
      if (first.status === 503) expect(first.body.detail).toMatch(/nothing was taken/i)
    }
    finally {
      await tellStripe('failures/clear')
    }
    expect((await pay(order)).status).toBe(200)
    expect(await sessionsOf(order.ref)).toHaveLength(1)
  })

  it('is refused to a stranger, another customer, staff, a guest with the link, and before the acceptance (S-46)', async () => {
    const order = await orderReadyToPay('mine')
    const other = await orderReadyToPay('theirs')
    expect((await pay(order, other.customer)).status).toBe(404)
    expect((await pay(order, await signInAsRole('estimator'))).status).toBe(404)
    const guest = new Visitor()
    expect((await guest.post(`/api/orders/${order.ref}/pay?key=${order.key}`, { kind: 'deposit' })).status).toBe(401)
    const unconfirmed = await acceptOrder(newAddress('unconfirmed'))
    expect((await pay(unconfirmed)).status).toBe(401)
    expect((await order.customer.post('/api/orders/OX-999999/pay', { kind: 'deposit' })).status).toBe(404)
    expect((await order.customer.post(`/api/orders/${order.ref}/pay`, { kind: 'balance' })).status).toBe(409)
  })
})

describe('the deposit', () => {
  it('makes the order paid, the job with its routing, the wire set aside, balanced books and one mail, in one step', async () => {
    const order = await orderReadyToPay('deposit')
    await endSession(await openDeposit(order), 'paid')
    await untilPaid(order)
    const [job] = await query<{ operations: number, reserved: string, kinds: string }>(`
      select (select count(*)::int from operations x where x.job_id = j.id) as operations, (select string_agg(x.kind::text, ' ' order by x.position) from operations x where x.job_id = j.id) as kinds, r.mass_kg as reserved
      from jobs j join orders o on o.id = j.order_id join wire_reservations r on r.job_id = j.id where o.number = $1`, [Number(order.ref.slice(3))])
    expect(job?.kinds).toMatch(/^coiling stress-relief/)
    expect(Number(job?.reserved)).toBeGreaterThan(0)
    const entries = await query<{ account: string, minor: number }>(`
      select e.account, e.amount_minor::int as minor from ledger_entries e join ledger_transactions t on t.id = e.transaction_id join orders o on o.id = t.order_id where o.number = $1 order by e.account`, [Number(order.ref.slice(3))])
    const view = await orderView(order)
    expect(entries).toEqual([{ account: 'cash-at-stripe', minor: view.depositMinor }, { account: 'deposits-held', minor: -view.depositMinor! }])
    expect(view).toMatchObject({ state: 'deposit-paid', paidMinor: view.depositMinor, canPay: null })
    const mail = await waitForMail(order.email, /deposit received/i)
    expect(mail.text).toContain(`${inject('baseUrl')}/account/orders/${order.ref}`)
    expect((await pay(order)).status).toBe(409)
  })

  it('is known on the return page before any webhook, and looking makes nothing paid (PAY-15, PAY-39)', async () => {
    const order = await orderReadyToPay('return')
    const sessionId = await openDeposit(order)
    const look = (id: string) => order.customer.get<PaymentStatus>(`/api/orders/${order.ref}/payment?session_id=${id}`)
    expect((await look(sessionId)).body.state).toBe('open')
    const other = await orderReadyToPay('other')
    const foreign = await openDeposit(other)
    await tellStripe('switches', { drop: true, times: 50, everyAttempt: true })
    try {
      await endSession(foreign, 'paid')
      expect((await look(foreign)).body.state).toBe('open')
      expect((await look('cs_test_invented')).body.state).toBe('open')
      expect((await booksOf(order.ref)).paid).toBe(0)
      await endSession(sessionId, 'paid')
      expect((await look(sessionId)).body.state).toBe('paid')
      expect(await booksOf(order.ref)).toEqual(oncePaid)
    }
    finally {
      await tellStripe('switches/clear')
    }
    expect((await other.customer.get<PaymentStatus>(`/api/orders/${order.ref}/payment?session_id=${sessionId}`)).status).toBe(404)
  })

  it('that comes slowly releases no work until it is there (PAY-32, EV-2, EV-3)', async () => {
    const order = await orderReadyToPay('slow')
    const sessionId = await openDeposit(order)
    await endSession(sessionId, 'asyncPending')
    const state = async () => (await order.customer.get<PaymentStatus>(`/api/orders/${order.ref}/payment`)).body.state
    await expect.poll(state, { timeout: 10_000 }).toBe('processing')
    expect(await booksOf(order.ref)).toMatchObject({ state: 'accepted', jobs: 0, captures: 0 })
    expect((await pay(order)).status).toBe(409)
    await endSession(sessionId, 'asyncSucceeded')
    await untilPaid(order)
  })

  it('that fails slowly is due again, and the customer is told once (PAY-32, EV-3)', async () => {
    const order = await orderReadyToPay('failed')
    const first = await openDeposit(order)
    await endSession(first, 'asyncPending')
    await endSession(first, 'asyncFailed')
    const mail = await waitForMail(order.email, /did not go through/i)
    expect(mail.text).toMatch(/nothing was taken/i)
    expect(await booksOf(order.ref)).toMatchObject({ state: 'accepted', jobs: 0, captures: 0, paid: 0 })
    await endSession(await openDeposit(order), 'paid')
    await untilPaid(order)
    expect((await mailsTo(order.email)).filter(one => /did not go through/i.test(one.subject))).toHaveLength(1)
  })

  it('declined, or waiting for the bank’s second step, stays open on Stripe’s page (PAY-20, EV-5)', async () => {
    const order = await orderReadyToPay('declined')
    const sessionId = await openDeposit(order)
    await endSession(sessionId, 'declined')
    await endSession(sessionId, 'authenticationRequired')
    await new Promise(resolve => setTimeout(resolve, 1_500))
    expect((await order.customer.get<PaymentStatus>(`/api/orders/${order.ref}/payment`)).body.state).toBe('open')
    expect(await booksOf(order.ref)).toMatchObject({ state: 'accepted', captures: 0 })
    await endSession(sessionId, 'authenticated')
    await untilPaid(order)
  })

  it('for an order that was cancelled meanwhile is held as the customer’s credit and shown, never dropped (PAY-18)', async () => {
    const order = await orderReadyToPay('late')
    const sessionId = await openDeposit(order)
    // The customer pays while the order is being cancelled: the webhook is late.
    await tellStripe('switches', { delayMs: 3_000, times: 10 })
    try {
      await endSession(sessionId, 'paid')
      await cancelAcceptedOrder(order.ref)
      await expect.poll(() => booksOf(order.ref), { timeout: 20_000, interval: 200 }).toMatchObject({ state: 'cancelled', jobs: 0, captures: 1, depositMails: 0 })
    }
    finally {
      await tellStripe('switches/clear')
    }
    expect((await booksOf(order.ref)).creditMinor).toBeGreaterThan(0)
    expect(await query(`select 1 from audit_log a join payments p on p.id::text = a.object where a.action = 'payment.credit' and p.stripe_session_id = $1`, [sessionId])).toHaveLength(1)
    expect(await query(`select 1 from order_events e join orders o on o.id = e.order_id where o.number = $1 and e.why like '%held as credit%'`, [Number(order.ref.slice(3))])).toHaveLength(1)
  })

  it('cannot be paid on the page of a cancelled order for long: the page is closed (PAY-18)', async () => {
    const order = await orderReadyToPay('cancelled')
    const sessionId = await openDeposit(order)
    await cancelAcceptedOrder(order.ref)
    await expect.poll(async () => (await stripeSdk().checkout.sessions.retrieve(sessionId)).status, { timeout: 45_000, interval: 1_000 }).toBe('expired')
  })
})

describe('the balance', () => {
  it('is asked for when the springs are finished, paid once by the same ways, and settles the order when it is dispatched', async () => {
    const order = await orderReadyToPay('balance')
    await endSession(await openDeposit(order), 'paid')
    await untilPaid(order)
    const payBalance = () => order.customer.post<{ url: string } & Problem>(`/api/orders/${order.ref}/pay`, { kind: 'balance' })
    expect((await payBalance()).status).toBe(409)

    const supervisor = await signInAsRole('supervisor')
    const job = await makeJob(order.ref, supervisor, await signInAsRole('operator'))
    const view = await orderView(order)
    expect(view).toMatchObject({ state: 'finished', canPay: 'balance', paidMinor: view.depositMinor })
    expect((await waitForMail(order.email, /balance .* is due/i)).text).toContain(formatMoney(view.balanceMinor!, 'eur'))
    const dispatch = async () => {
      const [row] = await query<{ version: number }>(`select j.version from jobs j where j.number = $1`, [Number(job.ref.slice(2))])
      return (await supervisor.post(`/api/loading/jobs/${job.ref}/dispatch`, { version: row!.version })).status
    }
    expect(await dispatch()).toBe(409)

    const clicks = await Promise.all(Array.from({ length: 5 }, payBalance))
    expect(clicks.map(click => click.status)).toEqual([200, 200, 200, 200, 200])
    expect(new Set(clicks.map(click => click.body.url)).size).toBe(1)
    const sessionId = sessionIdOf(clicks[0]!.body.url)
    expect((await stripeSdk().checkout.sessions.retrieve(sessionId)).amount_total).toBe(view.balanceMinor)
    await endSession(sessionId, 'paid')
    await expect.poll(async () => (await orderView(order)).paidMinor, { timeout: 20_000 }).toBe(view.grossMinor)
    expect(await orderView(order)).toMatchObject({ state: 'finished', canPay: null })
    expect((await payBalance()).status).toBe(409)

    expect(await dispatch()).toBe(200)
    expect((await orderView(order)).state).toBe('settled')
    expect(await query(`
      select e.account, sum(e.amount_minor)::int as minor from ledger_entries e join ledger_transactions t on t.id = e.transaction_id join orders o on o.id = t.order_id
      where o.number = $1 group by e.account order by e.account`, [Number(order.ref.slice(3))])).toEqual([
      { account: 'balances-received', minor: -view.balanceMinor! }, { account: 'cash-at-stripe', minor: view.grossMinor }, { account: 'deposits-held', minor: -view.depositMinor! },
    ])
    await waitForMail(order.email, /on their way/i)
    const subjects = (await mailsTo(order.email)).map(mail => mail.subject)
    expect(new Set(subjects).size).toBe(subjects.length)
  })
})

describe('refunds and disputes', () => {
  it('book each refund once by its id, and take a failed one back (EV-6)', async () => {
    const order = await orderReadyToPay('refund')
    const sessionId = await openDeposit(order)
    await endSession(sessionId, 'paid', { card: '4242424242424242' })
    await untilPaid(order)
    const intent = (await stripeSdk().checkout.sessions.retrieve(sessionId)).payment_intent as string
    await stripeSdk().refunds.create({ payment_intent: intent, amount: 100 })
    await stripeSdk().refunds.create({ payment_intent: intent, amount: 250 })
    const refunded = async () => (await query<{ count: number, minor: number }>(`
      select count(*)::int as count, coalesce(sum(e.amount_minor), 0)::int as minor from ledger_entries e join ledger_transactions t on t.id = e.transaction_id join orders o on o.id = t.order_id
      where o.number = $1 and e.account = 'deposits-held' and t.fact like 'refund%'`, [Number(order.ref.slice(3))]))[0]
    await expect.poll(refunded, { timeout: 15_000 }).toEqual({ count: 2, minor: 350 })
    await tellStripe('refunds/next', { outcomes: ['pending'] })
    const refund = await stripeSdk().refunds.create({ payment_intent: intent, amount: 30 })
    await tellStripe(`refunds/${refund.id}/outcome`, { outcome: 'failed' })
    await expect.poll(() => query(`select 1 from audit_log where action = 'refund.failed' and object = $1`, [refund.id]), { timeout: 15_000 }).toHaveLength(1)
    await new Promise(resolve => setTimeout(resolve, 2_000))
    expect(await refunded()).toEqual({ count: 2, minor: 350 })
    expect(await query(`select 1 from audit_log where action = 'refund.failed' and object = $1`, [refund.id])).toHaveLength(1)
  })

  it('move money only by what the bank booked, and mark the order (EV-7)', async () => {
    const order = await orderReadyToPay('dispute')
    const sessionId = await openDeposit(order)
    await endSession(sessionId, 'paid')
    await untilPaid(order)
    const intent = await stripeSdk().paymentIntents.retrieve((await stripeSdk().checkout.sessions.retrieve(sessionId)).payment_intent as string)
    const dispute = await tellStripe<{ id: string }>(`charges/${intent.latest_charge as string}/dispute`)
    const booked = async () => (await query<{ minor: number }>(`
      select coalesce(sum(e.amount_minor), 0)::int as minor from ledger_entries e join ledger_transactions t on t.id = e.transaction_id where e.account = 'cash-at-stripe' and t.fact like $1`, [`dispute:${dispute.id}:%`]))[0]?.minor
    await expect.poll(booked, { timeout: 15_000 }).toBeLessThan(0)
    await tellStripe(`disputes/${dispute.id}/outcome`, { outcome: 'won' })
    const words = () => query<{ why: string }>(`select e.why from order_events e join orders o on o.id = e.order_id where o.number = $1 and e.why like '%disput%' order by e.id`, [Number(order.ref.slice(3))])
    await expect.poll(async () => (await words()).map(row => row.why), { timeout: 15_000 }).toEqual([expect.stringMatching(/is disputed by the bank/), expect.stringMatching(/is won/)])
    await expect.poll(booked, { timeout: 15_000 }).toBe(0)
  })
})

describe('the books', () => {
  it('cannot be changed or made one-sided by the role that runs the app (PAY-8)', async () => {
    const order = await orderReadyToPay('books')
    await endSession(await openDeposit(order), 'paid')
    await untilPaid(order)
    const { default: pg } = await import('pg')
    const app = new pg.Client({ connectionString: inject('databaseUrl') })
    await app.connect()
    try {
      await expect(app.query('update ledger_entries set amount_minor = 1')).rejects.toThrow(/permission denied/)
      await expect(app.query('delete from ledger_transactions')).rejects.toThrow(/permission denied/)
      await app.query('begin')
      const { rows } = await app.query<{ id: string }>(`insert into ledger_transactions (order_id, fact, words) select id, 'test:' || id, 'one-sided' from orders limit 1 returning id`)
      await app.query(`insert into ledger_entries (transaction_id, account, amount_minor, currency) values ($1, 'cash-at-stripe', 5, 'eur')`, [rows[0]!.id])
      await expect(app.query('commit')).rejects.toThrow(/does not balance/)
    }
    finally {
      await app.end()
    }
  })

  it('say of every order what its payments say (PAY-9, REL-19)', async () => {
    expect(await query(`select transaction_id from ledger_entries group by transaction_id, currency having sum(amount_minor) <> 0`)).toEqual([])
    expect(await query(`
      select p.id from payments p where p.state = 'paid' and p.amount_minor <> (select coalesce(sum(e.amount_minor), 0) from ledger_entries e join ledger_transactions t on t.id = e.transaction_id where t.payment_id = p.id and t.fact like 'capture:%' and e.account = 'cash-at-stripe')`)).toEqual([])
    expect(await query(`select order_id from jobs j where not exists (select 1 from payments p where p.order_id = j.order_id and p.kind = 'deposit' and p.state = 'paid')`)).toEqual([])
  })

  it('hold no card number (PAY-21)', async () => {
    for (const table of ['payments', 'stripe_events', 'ledger_transactions', 'outbox', 'audit_log']) {
      expect(await query(`select 1 from ${table} t where t::text ~ '4242424242424242|4000002500003155|4000000000000002'`)).toEqual([])
    }
  })
})
