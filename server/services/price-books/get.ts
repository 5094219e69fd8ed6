import type { Database } from '../../database/client'
import { readBook, type StoredPriceBook } from './read-book'

const kept = new WeakMap<Database, Map<string, Promise<StoredPriceBook>>>()
const MOST_KEPT = 50

/** One version of the price book by its key. A version in use is never edited, so it is kept by the process. */
export function getPriceBook(db: Database, id: string): Promise<StoredPriceBook> {
  const books = kept.get(db) ?? new Map<string, Promise<StoredPriceBook>>()
  kept.set(db, books)
  const found = books.get(id)
  if (found) return found
  if (books.size >= MOST_KEPT) books.clear()
  const book = readBook(db, id)
  books.set(id, book)
  book.catch(() => books.delete(id))
  return book
}
