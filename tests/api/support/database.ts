import pg from 'pg'
import { inject } from 'vitest'

/** Runs one statement as the role that owns the tables and gives its rows. */
export async function query<Row extends pg.QueryResultRow>(text: string, values: readonly unknown[] = []): Promise<Row[]> {
  const client = new pg.Client({ connectionString: inject('databaseOwnerUrl') })
  await client.connect()
  try {
    return (await client.query<Row>(text, [...values])).rows
  }
  finally {
    await client.end()
  }
}

/** What came of an order's payments, counted in the database. */
export async function booksOf(orderRef: string): Promise<{ state: string, paid: number, captures: number, jobs: number, creditMinor: number, depositMails: number }> {
  const [row] = await query<{ state: string, paid: number, captures: number, jobs: number, creditMinor: number, depositMails: number }>(`
    select o.state::text as state,
      (select count(*)::int from payments p where p.order_id = o.id and p.state = 'paid') as paid,
      (select count(*)::int from ledger_transactions t where t.order_id = o.id and t.fact like 'capture:%') as captures,
      (select count(*)::int from jobs j where j.order_id = o.id) as jobs,
      (select coalesce(-sum(e.amount_minor), 0)::int from ledger_entries e join ledger_transactions t on t.id = e.transaction_id where t.order_id = o.id and e.account = 'customer-credit') as "creditMinor",
      (select count(*)::int from outbox m where m.order_id = o.id and m.kind = 'deposit-received') as "depositMails"
    from orders o where o.number = $1`, [Number(orderRef.slice(3))])
  if (!row) throw new Error(`there is no order ${orderRef}`)
  return row
}

/** Cancels an accepted order, as no route does yet. */
export async function cancelAcceptedOrder(orderRef: string): Promise<void> {
  const rows = await query(`
    with cancelled as (update orders set state = 'cancelled', version = version + 1 where number = $1 and state = 'accepted' returning id)
    insert into order_events (order_id, from_state, to_state, why) select id, 'accepted', 'cancelled', 'Cancelled by a test' from cancelled returning id`, [Number(orderRef.slice(3))])
  if (rows.length !== 1) throw new Error(`${orderRef} was not accepted`)
}
