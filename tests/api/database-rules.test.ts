import pg from 'pg'
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest'
import { query } from './support/database'
import { newAddress, placeEnquiry } from './support/orders'
import { paidJob } from './support/paid-job'
import { signInAsRole, Visitor } from './support/visitor'

/** What the database refuses by itself, tried as the role that the application has. */
let app: pg.Client
let orderId: string
let quoteId: string
let jobOrderId: string
beforeAll(async () => {
  app = new pg.Client({ connectionString: inject('databaseUrl') })
  await app.connect()
})
afterAll(() => app.end())

/** Runs statements in one transaction and gives the error that PostgreSQL answers with, at the latest at commit. */
async function refusal(...statements: string[]): Promise<string> {
  try {
    await app.query('begin')
    for (const statement of statements) await app.query(statement)
    await app.query('commit')
    return 'nothing was refused'
  }
  catch (error) {
    await app.query('rollback')
    return error instanceof Error ? error.message : String(error)
  }
}

describe('the database itself', () => {
  it('has an order with a sent quote, and one with a job, to try things on', async () => {
    const { ref } = await placeEnquiry(new Visitor(), newAddress('rules'))
    const { order } = await paidJob('rules-job', await signInAsRole('supervisor'))
    const rows = await query<{ id: string, quote: string, number: string }>(`select o.id, q.id as quote, o.number::text from orders o join quotes q on q.order_id = o.id where o.number = any($1)`, [[Number(ref.slice(3)), Number(order.ref.slice(3))]])
    const plain = rows.find(row => row.number === ref.slice(3))!
    orderId = plain.id
    quoteId = plain.quote
    jobOrderId = rows.find(row => row.number === order.ref.slice(3))!.id
    expect(jobOrderId).not.toBe(orderId)
  })

  it.each([['order_events', 'why'], ['ledger_transactions', 'words'], ['ledger_entries', 'account'], ['bench_records', 'note'], ['wire_receipts', 'note'], ['audit_log', 'detail']])('lets nobody change or take away a row of %s (PAY-8, S-61)', async (table, column) => {
    expect(await refusal(`update ${table} set ${column} = ${column}`)).toMatch(/permission denied|append-only/)
    expect(await refusal(`delete from ${table}`)).toMatch(/permission denied|append-only/)
  })
  it('does not even let the owner change a booked entry', async () => {
    await expect(query(`update ledger_entries set amount_minor = amount_minor + 1`)).rejects.toThrow(/append-only/)
  })
  it('refuses a booking that does not balance, at commit (PAY-8)', async () => {
    expect(await refusal(
      `insert into ledger_transactions (order_id, fact, words) values ('${orderId}', 'test:one-sided', 'One side only')`,
      `insert into ledger_entries (transaction_id, account, amount_minor, currency) select id, 'cash-at-stripe', 100, 'eur' from ledger_transactions where fact = 'test:one-sided'`,
    )).toMatch(/does not balance/)
  })
  it('refuses one fact booked twice (PAY-29)', async () => {
    const [{ fact } = { fact: '' }] = await query<{ fact: string }>(`select fact from ledger_transactions limit 1`)
    expect(await refusal(`insert into ledger_transactions (order_id, fact, words) values ('${orderId}', '${fact}', 'Again')`)).toMatch(/ledger_transactions_fact_unique/)
  })
  it('refuses a job without a paid deposit, and a second job', async () => {
    const price = `(select p.id from quote_prices p where p.quote_id = '${quoteId}' limit 1)`
    expect(await refusal(`insert into jobs (order_id, quote_price_id, quantity) values ('${orderId}', ${price}, 100)`)).toMatch(/has no paid deposit/)
    expect(await refusal(`insert into jobs (order_id, quote_price_id, quantity) values ('${jobOrderId}', ${price}, 100)`)).toMatch(/jobs_order_id_unique/)
  })
  it('refuses a state without its event, and an event without its state (S-13)', async () => {
    expect(await refusal(`update orders set state = 'withdrawn' where id = '${orderId}'`)).toMatch(/its last event says quoted/)
    expect(await refusal(`insert into order_events (order_id, from_state, to_state, why) values ('${orderId}', 'quoted', 'withdrawn', 'No state')`)).toMatch(/its last event says withdrawn/)
  })
  it('refuses any change to a sent quote (REL-20)', async () => {
    expect(await refusal(`update quotes set note_to_customer = 'Changed' where id = '${quoteId}'`)).toMatch(/was sent/)
    expect(await refusal(`update quote_prices set net_minor = net_minor where quote_id = '${quoteId}'`)).toMatch(/was sent/)
    expect(await refusal(`update quote_lines set amount_minor = 1 where quote_price_id in (select id from quote_prices where quote_id = '${quoteId}')`)).toMatch(/was sent/)
    expect(await refusal(`delete from quotes where id = '${quoteId}'`)).toMatch(/was sent/)
  })
  it('refuses lines that do not add up to their price', async () => {
    const [{ id } = { id: '' }] = await query<{ id: string }>(`select id from price_books limit 1`)
    expect(await refusal(
      `insert into quotes (id, order_id, revision, price_book_id, currency, deposit_percent, tax_percent, valid_until) values ('00000000-0000-4000-8000-00000000abcd', '${orderId}', 'Z', '${id}', 'eur', 40, 20, '2030-01-01')`,
      `insert into quote_prices (quote_id, quantity, cost_minor, net_minor, tax_minor, gross_minor, deposit_minor, wire_planned_kg, planned_minutes, unit_price) values ('00000000-0000-4000-8000-00000000abcd', 7, 1, 100, 20, 120, 48, 1, '{}', '14.286')`,
    )).toMatch(/add up to 0, not 100/)
  })
  it('refuses to unpay a payment, and two open ones for one order (PAY-17, PAY-30)', async () => {
    expect(await refusal(`update payments set state = 'expired', paid_at = null where order_id = '${jobOrderId}' and state = 'paid'`)).toMatch(/is paid/)
    const attempt = (number: number) => `insert into payments (order_id, kind, attempt, amount_minor, currency, idempotency_key, expires_at) values ('${orderId}', 'deposit', ${number}, 100, 'eur', 'test-${number}', now() + interval '1 hour')`
    expect(await refusal(attempt(1), attempt(2))).toMatch(/payments_one_open/)
  })
  it('lets the application’s role make and change no table (S-52)', async () => {
    expect(await refusal('create table own (id int)')).toMatch(/permission denied/)
    expect(await refusal('alter table orders add column own int')).toMatch(/must be owner/)
    expect(await refusal('drop table orders')).toMatch(/must be owner/)
  })
})
