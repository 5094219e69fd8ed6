import { MoneyError } from '#shared/money'
import { applyOverrides, PriceError, type LineOverride, type MarginOverride, type OverriddenPrice, type PricedCustomer } from '../../engine/pricing'
import { invalid } from '../errors'
import type { OrderRecord } from '../orders/access'
import type { StoredPriceBook } from '../price-books/read-book'
import type { QuoteRecord } from '../quotes/find-revision'
import { computedPriceOf, type StoredRung } from './computed-price'

/** Tax follows from where the order goes, as it was given in the form. */
export const customerOf = (order: Pick<OrderRecord, 'countryCode' | 'vatNumber'>): PricedCustomer => ({ country: order.countryCode, vatNumberGiven: order.vatNumber !== null })

export type Basis = { quote: QuoteRecord, book: StoredPriceBook, order: OrderRecord }

/**
 * Works a rung out again with an estimator's changes.
 * @param path the field that is at fault when the change cannot be
 * @throws DomainError invalid, in the pricing engine's words
 */
export function repriceRung(stored: StoredRung, { quote, book, order }: Basis, changes: { lines: readonly LineOverride[], margin: MarginOverride | undefined }, path: string): OverriddenPrice {
  try {
    return applyOverrides(computedPriceOf(stored, { quote, book, customer: customerOf(order) }), changes.lines, changes.margin)
  }
  catch (error) {
    if (error instanceof MoneyError) throw invalid(path, error.message)
    if (error instanceof PriceError) throw invalid(error.code === 'line-unknown' ? 'code' : error.code === 'reason-missing' ? 'reason' : path, error.message)
    throw error
  }
}
