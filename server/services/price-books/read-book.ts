import { eq } from 'drizzle-orm'
import { toCurrency } from '#shared/money'
import { priceBookRates, priceBooks } from '../../database/schema'
import type { Queryable } from '../../database/client'
import { RATE_CODES, type PriceBook, type RateCode } from '../../engine/pricing'

/** A price book as it is stored, with its key. */
export type StoredPriceBook = PriceBook & { id: string }

/**
 * Reads one version with all its rates.
 * @throws Error when it is gone or lacks a rate, which only a change by hand in the database can cause
 */
export async function readBook(db: Queryable, id: string): Promise<StoredPriceBook> {
  const [book] = await db.select().from(priceBooks).where(eq(priceBooks.id, id))
  if (!book) throw new Error(`price book ${id} is gone`)
  const rows = await db.select({ code: priceBookRates.code, value: priceBookRates.value }).from(priceBookRates).where(eq(priceBookRates.priceBookId, id))
  const values = new Map(rows.map(row => [row.code, row.value]))
  const rates = Object.fromEntries(RATE_CODES.map(({ code }) => {
    const value = values.get(code)
    if (value === undefined) throw new Error(`price book ${book.number} has no rate ${code}`)
    return [code, withoutIdleZeros(value)]
  })) as Record<RateCode, string>
  return { id: book.id, number: book.number, currency: toCurrency(book.currency), inForceFrom: book.inForceFrom, rates }
}

/** numeric(16,6) gives six decimals; what a person wrote had fewer: 54.000000 is 54.00, 12.000000 is 12, 0.150000 is 0.15. */
function withoutIdleZeros(value: string): string {
  const [whole = '0', fraction = ''] = value.split('.')
  const kept = fraction.replace(/0+$/, '')
  return kept === '' ? whole : `${whole}.${kept}`
}
