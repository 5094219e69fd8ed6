import { asc, desc, eq, inArray } from 'drizzle-orm'
import type { PriceBookList } from '#shared/schemas/works'
import { priceBookRates, priceBooks } from '../../database/schema'
import { RATE_CODES } from '../../engine/pricing'
import { assertRole, type ServiceContext } from '../context'
import { getCurrentPriceBook } from './get-current'
import { trimDecimals } from '../decimal-text'

const DEFINITIONS = new Map<string, (typeof RATE_CODES)[number]>(RATE_CODES.map(rate => [rate.code, rate]))
const POSITION = new Map<string, number>(RATE_CODES.map(({ code }, index) => [code, index]))
const MOST_BOOKS = 50

/** The newest versions of the price book with their rates, the one in force marked. Only an administrator sees them. */
export async function listPriceBooks(context: ServiceContext): Promise<PriceBookList> {
  assertRole(context, 'admin')
  const books = await context.db.select().from(priceBooks).where(eq(priceBooks.state, 'approved')).orderBy(desc(priceBooks.number)).limit(MOST_BOOKS)
  if (books.length === 0) return { books: [] }
  const current = await getCurrentPriceBook(context)
  const rates = await context.db.select().from(priceBookRates).where(inArray(priceBookRates.priceBookId, books.map(book => book.id))).orderBy(asc(priceBookRates.code))
  return {
    books: books.map(book => ({
      number: book.number, currency: book.currency, inForceFrom: book.inForceFrom ?? '', isInForce: book.id === current.id,
      rates: rates.filter(rate => rate.priceBookId === book.id)
        .sort((a, b) => (POSITION.get(a.code) ?? 0) - (POSITION.get(b.code) ?? 0))
        .map(({ code, value }) => ({ code, label: DEFINITIONS.get(code)?.label ?? code, unit: DEFINITIONS.get(code)?.unit ?? '', group: DEFINITIONS.get(code)?.group ?? 'policy', value: trimDecimals(value) })),
    })),
  }
}
