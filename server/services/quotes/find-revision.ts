import { and, asc, desc, eq, inArray, sql } from 'drizzle-orm'
import { quoteLines, quotePrices, quotes } from '../../database/schema'
import type { Queryable } from '../../database/client'

export type QuoteRecord = typeof quotes.$inferSelect
export type RungRecord = typeof quotePrices.$inferSelect
export type LineRecord = typeof quoteLines.$inferSelect

/** The revision that the customer may accept, or null. */
export async function findSentRevision(db: Queryable, orderId: string): Promise<QuoteRecord | null> {
  const [quote] = await db.select().from(quotes).where(and(eq(quotes.orderId, orderId), eq(quotes.state, 'sent')))
  return quote ?? null
}

/** The revision an estimator works on: the draft, else the sent one, else the newest. */
export async function findWorkingRevision(db: Queryable, orderId: string): Promise<QuoteRecord | null> {
  const [quote] = await db.select().from(quotes).where(eq(quotes.orderId, orderId))
    .orderBy(sql`case ${quotes.state} when 'draft' then 0 when 'sent' then 1 else 2 end`, desc(quotes.createdAt)).limit(1)
  return quote ?? null
}

/** The rungs of a revision, smallest quantity first. */
export function listRungs(db: Queryable, quoteId: string): Promise<RungRecord[]> {
  return db.select().from(quotePrices).where(eq(quotePrices.quoteId, quoteId)).orderBy(asc(quotePrices.quantity))
}

/** The lines of rungs in their order, by the key of the rung. */
export async function listLines(db: Queryable, rungIds: readonly string[]): Promise<Map<string, LineRecord[]>> {
  const byRung = new Map<string, LineRecord[]>(rungIds.map(id => [id, []]))
  if (rungIds.length === 0) return byRung
  const rows = await db.select().from(quoteLines).where(inArray(quoteLines.quotePriceId, [...rungIds])).orderBy(asc(quoteLines.position))
  for (const row of rows) byRung.get(row.quotePriceId)?.push(row)
  return byRung
}
