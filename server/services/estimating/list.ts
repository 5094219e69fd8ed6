import { and, asc, desc, eq, inArray, or, sql, type SQL } from 'drizzle-orm'
import type { z } from 'zod'
import type { EstimatingList, estimatingQuerySchema } from '#shared/schemas/quote'
import { orders, people } from '../../database/schema'
import { assertRole, type ServiceContext } from '../context'
import { decodeMomentCursor, encodeCursor } from '../cursor'
import { orderRefOf } from '../orders/reference'
import { getCurrentPriceBook } from '../price-books/get-current'

type Query = z.output<typeof estimatingQuerySchema>

const createdMicros = sql<string>`(extract(epoch from ${orders.createdAt}) * 1000000)::bigint::text`
/** What the working revision is worth before tax at its dearest quantity. */
const worthMinor = sql<string | null>`(select max(qp.net_minor) from quote_prices qp where qp.quote_id = (
  select q.id from quotes q where q.order_id = ${orders.id} order by case q.state when 'draft' then 0 when 'sent' then 1 else 2 end, q.created_at desc limit 1))`

/** Enquiries and quotes, a page at a time: those that wait oldest first, the others newest first. */
export async function listEstimating(context: ServiceContext, query: Query): Promise<EstimatingList> {
  assertRole(context, 'estimator', 'admin')
  const { db } = context
  const oldestFirst = query.state === 'waiting'
  const [rows, waiting, book] = await Promise.all([
    db.select({
      id: orders.id, number: orders.number, title: orders.title, firm: orders.firmName, contactName: orders.contactName, createdAt: orders.createdAt, micros: createdMicros,
      answerBy: orders.answerBy, state: orders.state, reasons: orders.gateReasons, worthMinor, assignedTo: people.name,
    }).from(orders).leftJoin(people, eq(people.id, orders.assignedTo))
      .where(and(stateFilter(query.state), textFilter(query.q), query.cursor ? afterCursor(query.cursor, oldestFirst) : undefined))
      .orderBy(...oldestFirst ? [asc(orders.createdAt), asc(orders.id)] : [desc(orders.createdAt), desc(orders.id)]).limit(query.limit + 1),
    db.select({ count: sql<number>`count(*)::int` }).from(orders).where(eq(orders.state, 'enquiry')),
    getCurrentPriceBook(context),
  ])
  const last = rows[query.limit - 1]
  return {
    rows: rows.slice(0, query.limit).map(row => ({
      ref: orderRefOf(row.number), title: row.title, firm: row.firm, contactName: row.contactName, createdAt: row.createdAt.toISOString(), answerBy: row.answerBy?.toISOString() ?? null,
      state: row.state, reasons: row.reasons.map(({ code, estimatorText }) => ({ code, text: estimatorText })), worthMinor: row.worthMinor === null ? null : Number(row.worthMinor),
      currency: book.currency, assignedTo: row.assignedTo,
    })),
    nextCursor: rows.length > query.limit && last ? encodeCursor(last.micros, last.id) : null,
    waiting: waiting[0]?.count ?? 0,
  }
}

function stateFilter(state: Query['state']): SQL | undefined {
  if (state === 'all') return undefined
  return state === 'waiting' ? eq(orders.state, 'enquiry') : inArray(orders.state, ['quoted', 'accepted'])
}

/** Text anywhere in reference, title, firm or name; its own wildcards are taken as they are written. */
function textFilter(q: string): SQL | undefined {
  if (q === '') return undefined
  const pattern = `%${q.replace(/[\\%_]/g, '\\$&')}%`
  return or(
    sql`${orders.title} ilike ${pattern}`, sql`${orders.firmName} ilike ${pattern}`, sql`${orders.contactName} ilike ${pattern}`, sql`('OX-' || ${orders.number}) ilike ${pattern}`,
  )
}

function afterCursor(cursor: string, oldestFirst: boolean): SQL {
  const { at, id } = decodeMomentCursor(cursor)
  const place = sql`(to_timestamp(0) + ${at}::bigint * interval '1 microsecond', ${id}::uuid)`
  return oldestFirst ? sql`(${orders.createdAt}, ${orders.id}) > ${place}` : sql`(${orders.createdAt}, ${orders.id}) < ${place}`
}
