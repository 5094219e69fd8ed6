import { and, desc, eq, isNull, or, sql, type SQL } from 'drizzle-orm'
import type { OrderRow } from '#shared/schemas/quote'
import { jobs, orders, quotePrices, quotes } from '../../database/schema'
import type { Actor, ServiceContext } from '../context'
import { decodeMomentCursor, encodeCursor } from '../cursor'
import { DomainError } from '../errors'
import { orderRefOf } from './reference'

export type OrderList = { rows: OrderRow[], nextCursor: string | null }

/** Moment of a row in whole microseconds, as a cursor carries it. */
const createdMicros = sql<string>`(extract(epoch from ${orders.createdAt}) * 1000000)::bigint::text`

/** The signed-in customer's orders, newest first, a page at a time: those of the company, or one's own. */
export async function listOwnOrders({ db, actor }: Pick<ServiceContext, 'db' | 'actor'>, { cursor, limit }: { cursor?: string | undefined, limit: number }): Promise<OrderList> {
  if (!actor) throw new DomainError('unauthenticated', 'Sign in first.')
  const after = cursor ? decodeMomentCursor(cursor) : null
  const rows = await db.select({
    id: orders.id, number: orders.number, title: orders.title, state: orders.state, quantity: orders.acceptedQuantity, createdAt: orders.createdAt, micros: createdMicros,
    grossMinor: quotePrices.grossMinor, currency: quotes.currency, dispatchOn: sql<string | null>`coalesce(${jobs.promisedOn}, ${quotePrices.dispatchOn})`,
  }).from(orders)
    .leftJoin(quotes, eq(quotes.id, orders.acceptedQuoteId))
    .leftJoin(quotePrices, and(eq(quotePrices.quoteId, quotes.id), eq(quotePrices.quantity, orders.acceptedQuantity)))
    .leftJoin(jobs, eq(jobs.orderId, orders.id))
    .where(and(ownedBy(actor), after ? sql`(${orders.createdAt}, ${orders.id}) < (to_timestamp(0) + ${after.at}::bigint * interval '1 microsecond', ${after.id}::uuid)` : undefined))
    .orderBy(desc(orders.createdAt), desc(orders.id)).limit(limit + 1)
  const last = rows[limit - 1]
  return {
    rows: rows.slice(0, limit).map(row => ({
      ref: orderRefOf(row.number), title: row.title, state: row.state, quantity: row.quantity, createdAt: row.createdAt.toISOString(),
      grossMinor: row.grossMinor, currency: row.currency ?? 'eur', dispatchOn: row.dispatchOn,
    })),
    nextCursor: rows.length > limit && last ? encodeCursor(last.micros, last.id) : null,
  }
}

/** The same rule as `isOwnOrder`, for a list. */
function ownedBy(actor: Actor): SQL | undefined {
  return or(
    actor.companyId === null ? undefined : eq(orders.companyId, actor.companyId),
    and(isNull(orders.companyId), eq(orders.personId, actor.personId)),
    and(isNull(orders.companyId), isNull(orders.personId), eq(orders.contactEmail, actor.email)),
  )
}
