import { and, desc, eq, lte, sql } from 'drizzle-orm'
import { priceBooks } from '../../database/schema'
import type { ServiceContext } from '../context'
import { DomainError } from '../errors'
import { rememberFor } from '../remember'
import { getPriceBook } from './get'
import type { StoredPriceBook } from './read-book'

const zones = new Map<string, ReturnType<typeof readerFor>>()

const readerFor = (timeZone: string) => rememberFor(5_000, async (db) => {
  const today = sql`(now() at time zone ${timeZone})::date`
  const [row] = await db.select({ id: priceBooks.id }).from(priceBooks).where(and(eq(priceBooks.state, 'approved'), lte(priceBooks.inForceFrom, today)))
    .orderBy(desc(priceBooks.inForceFrom), desc(priceBooks.number)).limit(1)
  return row?.id ?? null
})

/**
 * The price book in force today in the shop's zone: the newest that has begun. A new one counts within five seconds.
 * @throws DomainError unavailable when the shop has none yet
 */
export async function getCurrentPriceBook(context: Pick<ServiceContext, 'db' | 'timeZone'>): Promise<StoredPriceBook> {
  const read = zones.get(context.timeZone) ?? readerFor(context.timeZone)
  zones.set(context.timeZone, read)
  const id = await read(context.db)
  if (!id) throw new DomainError('unavailable', 'We have no prices in force just now. Try again later.')
  return getPriceBook(context.db, id)
}
