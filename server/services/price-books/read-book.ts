import { eq } from 'drizzle-orm'
import { toCurrency } from '#shared/money'
import { priceBookRates, priceBooks } from '../../database/schema'
import type { Queryable } from '../../database/client'
import { RATE_CODES, type PriceBook, type RateCode } from '../../engine/pricing'
import { trimDecimals } from '../decimal-text'

/** A price book as it is stored, with its key. */
export type StoredPriceBook = PriceBook & { id: string }

/**
 * Reads one version with all its rates.
 * @throws Error when it is gone or lacks a rate, which only a change by hand in the database can cause
 */
export async function readBook(db: Queryable, id: string): Promise<StoredPriceBook> {
  const [book] = await db.select().from(priceBooks).where(eq(priceBooks.id, id))
  if (!book) throw new Error(`price book ${id} is gone`)
  if (book.inForceFrom === null) throw new Error(`price book ${book.number} is a draft`)
  const rows = await db.select({ code: priceBookRates.code, value: priceBookRates.value }).from(priceBookRates).where(eq(priceBookRates.priceBookId, id))
  const values = new Map(rows.map(row => [row.code, row.value]))
  const rates = Object.fromEntries(RATE_CODES.map(({ code }) => {
    const value = values.get(code)
    if (value === undefined) throw new Error(`price book ${book.number} has no rate ${code}`)
    return [code, trimDecimals(value)]
  })) as Record<RateCode, string>
  return { id: book.id, number: book.number, currency: toCurrency(book.currency), inForceFrom: book.inForceFrom, rates }
}
