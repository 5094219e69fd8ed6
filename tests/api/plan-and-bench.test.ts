import { randomUUID } from 'node:crypto'
import { beforeAll, describe, expect, inject, it } from 'vitest'
import type { JobCostView, LedgerView } from '#shared/schemas/ledger'
import type { Problem } from '#shared/schemas/problem'
import type { BenchView, JobView, LoadingView, OperationView } from '#shared/schemas/shop'
import type { PriceBookList } from '#shared/schemas/works'
import { query } from './support/database'
import { mailsTo } from './support/mailbox'
import { acceptOrder, newAddress, orderView, sessionIdOf } from './support/orders'
import { jobOf, paidJob } from './support/paid-job'
import { endSession } from './support/stripe'
import { signInAsRole, type Visitor } from './support/visitor'

let supervisor: Visitor
let operator: Visitor
let bookkeeper: Visitor
let loading: LoadingView
beforeAll(async () => {
  [supervisor, operator, bookkeeper] = [await signInAsRole('supervisor'), await signInAsRole('operator'), await signInAsRole('bookkeeper')]
  loading = (await supervisor.get<LoadingView>('/api/loading')).body
})

/** A Monday far ahead, another for each test, so that tests do not take each other's time. */
let weeks = 8
function freeMonday(): string {
  weeks += 1
  const day = new Date(Date.now() + weeks * 7 * 86_400_000)
  day.setUTCDate(day.getUTCDate() + (8 - day.getUTCDay()) % 7)
  return day.toISOString().slice(0, 10)
}
const centre = (kind: string, wireMm = 2) => loading.centres.find(one => one.kind === kind && (one.wireFromMm === null || (one.wireFromMm <= wireMm && wireMm <= one.wireToMm!)))!
const operation = (job: JobView, kind: string): OperationView => job.operations.find(one => one.kind === kind)!
const place = (step: OperationView, centreId: string, startsAt: string, version = step.version) => supervisor.post<JobView & Problem>(`/api/loading/operations/${step.id}/place`, { centreId, startsAt, version })
// 10:30 in the shop's zone, Europe/Dublin, is inside every shift in summer and winter alike.
const at = (day: string, time = '10:30') => `${day}T${time}:00Z`

describe('planning', () => {
  it('shows a job only when its deposit is paid', async () => {
    const unpaid = await acceptOrder(newAddress('unpaid'))
    const { order } = await paidJob('paid', supervisor)
    const refs = (await supervisor.get<LoadingView>('/api/loading')).body.jobs.map(job => job.orderRef)
    expect(refs).toContain(order.ref)
    expect(refs).not.toContain(unpaid.ref)
  })

  it('refuses a wrong work centre, closed hours, a time that has passed and work before its turn, each in words', async () => {
    const { job } = await paidJob('rules', supervisor)
    const day = freeMonday()
    const coiling = operation(job, 'coiling')
    const refused = async (answer: Promise<{ status: number, body: Problem }>) => {
      const { status, body } = await answer
      return [status, body.errors?.[0]?.message ?? body.detail] as const
    }
    expect(await refused(place(coiling, centre('packing').id, at(day)))).toEqual([422, 'Coiling is not done at this work centre.'])
    expect((await refused(place(coiling, centre('coiling', 12).id, at(day))))[1]).toMatch(/takes wire of .* mm/)
    expect((await refused(place(coiling, centre('coiling').id, at(day, '03:00'))))[1]).toMatch(/closed then. It opens Mon/)
    expect((await refused(place(coiling, centre('coiling').id, '2026-01-05T10:30:00Z')))[1]).toBe('This time has passed.')
    const placed = await place(coiling, centre('coiling').id, at(day))
    expect(placed.status).toBe(200)
    expect((await refused(place(operation(placed.body, 'stress-relief'), centre('stress-relief').id, at(day, '10:35'))))[1]).toMatch(/Coiling of this job is done only Mon/)
    expect((await place(coiling, centre('coiling').id, at(day))).status).toBe(412)
  })

  it('names the other job and the first free time when a work centre is taken', async () => {
    const first = await paidJob('first', supervisor)
    const second = await paidJob('second', supervisor)
    const day = freeMonday()
    expect((await place(operation(first.job, 'coiling'), centre('coiling').id, at(day))).status).toBe(200)
    const clash = await place(operation(second.job, 'coiling'), centre('coiling').id, at(day, '10:35'))
    expect(clash.status).toBe(409)
    expect(clash.body.detail).toMatch(new RegExp(`^${first.job.ref} has this work centre at that time. It is free for this operation from Mon`))
  })

  it('gives one place to one of many jobs at once: the database refuses the rest (S-16)', async () => {
    const rivals: JobView[] = []
    for (let count = 0; count < 6; count += 1) rivals.push((await paidJob(`rival${count}`, supervisor)).job)
    const day = freeMonday()
    const answers = await Promise.all(rivals.map(job => place(operation(job, 'coiling'), centre('coiling').id, at(day))))
    expect(answers.map(answer => answer.status).sort()).toEqual([200, 409, 409, 409, 409, 409])
    const [row] = await query<{ id: string }>(`select id from operations where work_centre_id = $1 and planned_span @> $2::timestamptz`, [centre('coiling').id, at(day)])
    const loser = rivals.find(job => operation(job, 'coiling').id !== row!.id)!
    await expect(query(`update operations set work_centre_id = $1, planned_span = tstzrange($2::timestamptz, $2::timestamptz + interval '1 hour') where id = $3`, [centre('coiling').id, at(day), operation(loser, 'coiling').id])).rejects.toThrow(/operations_one_at_a_time/)
  })

  it('tells the customer the day once, and a changed day once', async () => {
    const { order, job } = await paidJob('dated', supervisor)
    const placed = await supervisor.post<JobView>(`/api/loading/jobs/${job.ref}/place-all`, { version: job.version })
    expect(placed.body.operations.every(step => step.state === 'planned')).toBe(true)
    expect((await orderView(order)).state).toBe('planned')
    const packing = operation(placed.body, 'packing')
    const out = await supervisor.post<JobView>(`/api/loading/operations/${packing.id}/unplace`, { version: packing.version })
    expect([out.status, out.body.state, (await orderView(order)).state]).toEqual([200, 'to-plan', 'deposit-paid'])
    const later = await place(operation(out.body, 'packing'), centre('packing').id, at(freeMonday()))
    expect([later.status, later.body.state]).toEqual([200, 'planned'])
    await expect.poll(async () => (await query(`select kind from outbox where order_id = (select id from orders where number = $1) and kind in ('job-planned', 'job-date-changed') order by kind`, [Number(order.ref.slice(3))])).map(row => row.kind)).toEqual(['job-date-changed', 'job-planned'])
    await expect.poll(async () => (await mailsTo(order.email)).length, { timeout: 20_000 }).toBeGreaterThanOrEqual(4)
  })
})

describe('at the Bench', () => {
  const record = (who: Visitor, step: { id: string }, act: string, more: object = {}) => who.post<BenchView & Problem>(`/api/bench/operations/${step.id}/records`, { id: randomUUID(), act, ...more })
  async function plannedJob(name: string) {
    const { order, job } = await paidJob(name, supervisor)
    const { body } = await supervisor.post<JobView>(`/api/loading/jobs/${job.ref}/place-all`, { version: job.version })
    return { order, job: body }
  }

  it('an operation is started, run, counted and finished in this order, after the one before', async () => {
    const { job } = await plannedJob('acts')
    const [coiling, relief] = [operation(job, 'coiling'), operation(job, 'stress-relief')]
    expect((await record(operator, relief, 'start')).body.detail).toMatch(/Coiling of this job is not finished yet/)
    expect((await record(operator, coiling, 'finish', { good: 500, wireKg: 5 })).status).toBe(409)
    expect((await record(operator, coiling, 'start')).status).toBe(200)
    expect((await record(operator, coiling, 'count', { good: -1 })).status).toBe(422)
    expect((await record(operator, coiling, 'pause')).status).toBe(200)
    expect((await record(operator, coiling, 'resume')).status).toBe(200)
    expect((await record(operator, coiling, 'run')).status).toBe(200)
    expect((await record(operator, coiling, 'finish', { good: 500 })).body.errors?.[0]).toMatchObject({ path: 'wireKg' })
    expect((await record(operator, coiling, 'finish', { good: 500, wireKg: 90_000 })).body.errors?.[0]).toMatchObject({ path: 'wireKg' })
    expect((await record(operator, coiling, 'finish', { good: 500, wireKg: job.wireKg })).status).toBe(200)
    expect((await record(operator, relief, 'start')).status).toBe(200)
    expect((await record(operator, relief, 'finish', { good: 501 })).body.errors?.[0]).toMatchObject({ path: 'good' })
    expect((await record(operator, relief, 'finish', { good: 500 })).status).toBe(200)
  })

  it('one record sent twenty times at once counts once (REL-21)', async () => {
    const { job } = await plannedJob('once')
    const coiling = operation(job, 'coiling')
    await record(operator, coiling, 'start')
    const id = randomUUID()
    const answers = await Promise.all(Array.from({ length: 20 }, () => operator.post<BenchView>(`/api/bench/operations/${coiling.id}/records`, { id, act: 'count', good: 7 })))
    expect(answers.every(answer => answer.status === 200)).toBe(true)
    expect(await query(`select sum(good)::int as good from bench_records where operation_id = $1`, [coiling.id])).toEqual([{ good: 7 }])
    await record(operator, coiling, 'finish', { good: 493, wireKg: job.wireKg })
  })

  it('the last finish finishes the job; cost is compared line by line; it leaves only when the balance is paid', async () => {
    const { order, job } = await plannedJob('whole')
    // Minutes as an operator corrects them, and the kilograms off the scale.
    const told: Record<string, { setUpMinutes: number, runMinutes: number }> = {
      'coiling': { setUpMinutes: 100, runMinutes: 30 }, 'stress-relief': { setUpMinutes: 0, runMinutes: 90 }, 'end-grinding': { setUpMinutes: 20, runMinutes: 40 }, 'inspection': { setUpMinutes: 10, runMinutes: 55 }, 'packing': { setUpMinutes: 0, runMinutes: 18 },
    }
    const wireKg = Math.round(job.wireKg * 1.1 * 100) / 100
    for (const step of job.operations) {
      await record(operator, step, 'start')
      await record(operator, step, 'run')
      const done = await record(operator, step, 'finish', { good: 500, ...told[step.kind], ...(step.kind === 'coiling' ? { wireKg } : {}) })
      expect(done.status, step.kind).toBe(200)
    }
    const view = await orderView(order)
    expect([view.state, view.canPay]).toEqual(['finished', 'balance'])

    const cost = (await bookkeeper.get<JobCostView>(`/api/ledger/jobs/${job.ref}`)).body
    const admin = await signInAsRole('admin')
    const book = (await admin.get<PriceBookList>('/api/works/price-books')).body.books.find(one => one.isInForce)!
    const rate = (code: string) => Number(book.rates.find(one => one.code === code)!.value)
    const [{ perKg } = { perKg: '0' }] = await query<{ perKg: string }>(`select w.price_per_kg as "perKg" from jobs j join quote_prices p on p.id = j.quote_price_id join quotes q on q.id = p.quote_id join wire_products w on w.id = q.wire_product_id where j.number = $1`, [Number(job.ref.slice(2))])
    const expected: Record<string, number> = {
      'wire': wireKg * Number(perKg), 'coiling-set-up': 100 / 60 * rate('hourly.coiling'), 'coiling-run': 30 / 60 * rate('hourly.coiling'), 'stress-relief': 90 / 60 * rate('hourly.stress-relief'),
      'end-grinding': 60 / 60 * rate('hourly.end-grinding'), 'inspection': 65 / 60 * rate('hourly.inspection'), 'packing': 18 / 60 * rate('hourly.packing'),
    }
    for (const row of cost.rows) {
      expect(row.actualMinor, row.code).toBe(Math.round(expected[row.code]! * 100 + 1e-6))
      expect(row.differenceMinor).toBe(row.actualMinor! - row.quotedMinor)
    }
    expect(cost.rows.reduce((sum, row) => sum + row.actualMinor!, 0)).toBe(cost.actualCostMinor)
    expect(cost.entries.reduce((sum, entry) => sum + entry.debitMinor - entry.creditMinor, 0)).toBe(0)

    const early = await supervisor.post<Problem>(`/api/loading/jobs/${job.ref}/dispatch`, { version: (await query<{ version: number }>(`select version from jobs where number = $1`, [Number(job.ref.slice(2))]))[0]!.version })
    expect([early.status, early.body.detail]).toEqual([409, expect.stringMatching(/^The balance of €/)])
    const { body } = await order.customer.post<{ url: string }>(`/api/orders/${order.ref}/pay`, { kind: 'balance' })
    await endSession(sessionIdOf(body.url), 'paid')
    await expect.poll(async () => (await orderView(order)).canPay, { timeout: 20_000 }).toBeNull()
    const [{ version } = { version: 0 }] = await query<{ version: number }>(`select version from jobs where number = $1`, [Number(job.ref.slice(2))])
    expect((await supervisor.post(`/api/loading/jobs/${job.ref}/dispatch`, { version })).status).toBe(200)
    expect((await orderView(order)).state).toBe('settled')
    const kinds = (await query<{ kind: string }>(`select kind from outbox where order_id = (select id from orders where number = $1)`, [Number(order.ref.slice(3))])).map(row => row.kind)
    for (const kind of ['quote-ready', 'confirm-address', 'deposit-received', 'job-planned', 'job-in-work', 'job-finished', 'job-dispatched']) expect(kinds.filter(one => one === kind), kind).toHaveLength(1)
  })

  it('lists jobs in the Ledger by key, without skipping or doubling, and sums that are sums of entries', async () => {
    const refs: string[] = []
    let view: LedgerView | undefined
    do {
      view = (await bookkeeper.get<LedgerView>(`/api/ledger?limit=3${view?.nextCursor ? `&cursor=${view.nextCursor}` : ''}`)).body
      refs.push(...view.jobs.map(job => job.jobRef))
    } while (view.nextCursor)
    const [{ count } = { count: 0 }] = await query<{ count: number }>(`select count(*)::int as count from jobs`)
    expect([new Set(refs).size, refs.length]).toEqual([count, count])
    const [{ cash } = { cash: '0' }] = await query<{ cash: string }>(`select sum(amount_minor) as cash from ledger_entries where account = 'cash-at-stripe'`)
    expect(view.cashInMinor).toBe(Number(cash))
  })

  it('wire that is received covers the job that waited for it, once', async () => {
    const { job } = await paidJob('short', supervisor)
    await query(`update jobs set waits_for_wire = true where number = $1`, [Number(job.ref.slice(2))])
    const [{ id, stock } = { id: '', stock: '' }] = await query<{ id: string, stock: string }>(`select w.id, w.stock_kg as stock from wire_reservations r join wire_products w on w.id = r.wire_product_id join jobs j on j.id = r.job_id where j.number = $1`, [Number(job.ref.slice(2))])
    const receipt = { id: randomUUID(), massKg: 50, note: 'Delivery 17' }
    const answers = await Promise.all(Array.from({ length: 5 }, () => supervisor.post<{ stockKg: string, jobsCovered: string[] }>(`/api/works/wire/${id}/receive`, receipt)))
    expect(answers.every(answer => answer.status === 200)).toBe(true)
    expect(answers.flatMap(answer => answer.body.jobsCovered)).toContain(job.ref)
    expect(await query(`select stock_kg as stock from wire_products where id = $1`, [id])).toEqual([{ stock: (Number(stock) + 50).toFixed(3) }])
    expect((await jobOf(job.orderRef, supervisor)).waitsForWire).toBe(false)
    expect((await fetch(`${inject('baseUrl')}/api/works/wire/${id}/receive`, { method: 'POST', body: '{}', headers: { 'content-type': 'application/json' } })).status).toBe(401)
  })
})
