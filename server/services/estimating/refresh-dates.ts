import { eq } from 'drizzle-orm'
import { quotePrices } from '../../database/schema'
import type { Transaction } from '../../database/client'
import type { CatalogueWire } from '../catalogue/list-wires'
import { promiseDispatch } from '../orders/promise'
import type { ShopPlan } from '../orders/shop-plan'
import type { StoredPriceBook } from '../price-books/read-book'
import type { QuoteRecord } from '../quotes/find-revision'
import { pricedDesignOf } from '../springs/stored-design'
import type { StoredRung } from './computed-price'

/** Finds the dates of a draft again with the plan of today: days may have passed since the enquiry. */
export async function refreshDates(
  tx: Transaction,
  rungs: readonly StoredRung[],
  { quote, book, wire, plan, clock }: { quote: QuoteRecord, book: StoredPriceBook, wire: CatalogueWire | undefined, plan: ShopPlan, clock: { now: Date, timeZone: string } },
): Promise<StoredRung[]> {
  const { design } = quote
  if (!design) return [...rungs]
  const priced = pricedDesignOf(design)
  const refreshed: StoredRung[] = []
  for (const { rung, lines } of rungs) {
    // A wire that is no longer offered has no date; the estimator sees that before the customer does.
    const dispatchOn = wire ? promiseDispatch({ design: priced, wire, priced: rung, book, plan, clock }) : null
    await tx.update(quotePrices).set({ dispatchOn }).where(eq(quotePrices.id, rung.id))
    refreshed.push({ rung: { ...rung, dispatchOn }, lines })
  }
  return refreshed
}
