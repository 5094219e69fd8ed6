import { toCurrency } from '#shared/money'
import { roundToMinor, Decimal } from '#shared/money/decimal'
import {
  aqlOf, COST_LINE_CODES, rateText, readNumberRates, resolveTax, samplingPlanFor, type LineOverride, type MarginOverride, type PricedCustomer, type PricedQuantity, type PriceLine,
  type PriceLineCode, type PriceQuantityUnit,
} from '../../engine/pricing'
import { HOME_COUNTRY } from '../orders/home-country'
import type { StoredPriceBook } from '../price-books/read-book'
import type { LineRecord, QuoteRecord, RungRecord } from '../quotes/find-revision'
import { trimDecimals } from '../decimal-text'

export type StoredRung = { rung: RungRecord, lines: readonly LineRecord[] }

const isCostLine = (code: string) => (COST_LINE_CODES as readonly string[]).includes(code)

/** A stored line as the price book alone gave it. The margin's rate is the book's, also where an estimator named another. */
function computedLineOf(line: LineRecord, book: StoredPriceBook): PriceLine {
  return {
    code: line.code as PriceLineCode, label: line.label, basis: line.basis, rateText: line.rateText, quantity: line.quantity, quantityUnit: line.quantityUnit as PriceQuantityUnit,
    rate: line.code === 'margin' ? rateText(book, 'policy.margin-percent') : trimDecimals(line.rate), amountMinor: line.computedAmountMinor,
  }
}

/**
 * A rung as it was computed at first, put together again from what is stored beside an estimator's changes. It is not priced
 * anew: wire in stock and its price may have changed since.
 */
export function computedPriceOf({ rung, lines }: StoredRung, { quote, book, customer }: { quote: QuoteRecord, book: StoredPriceBook, customer: PricedCustomer }): PricedQuantity {
  const computed = lines.map(line => computedLineOf(line, book))
  const netMinor = computed.reduce((sum, line) => sum + line.amountMinor, 0)
  const currency = toCurrency(quote.currency)
  return {
    quantity: rung.quantity, currency, bookNumber: book.number, lines: computed,
    costMinor: computed.filter(line => isCostLine(line.code)).reduce((sum, line) => sum + line.amountMinor, 0),
    netMinor, unitPrice: rung.unitPrice, taxKind: resolveTax({ book, customer, homeCountry: HOME_COUNTRY }).kind, taxPercent: trimDecimals(quote.taxPercent),
    taxMinor: rung.taxMinor, grossMinor: rung.grossMinor, marginPercent: '0.0', marginFloorPercent: rateText(book, 'policy.margin-floor-percent'), isBelowMarginFloor: false,
    minimumOrderMinor: roundToMinor(new Decimal(rateText(book, 'policy.minimum-order')), currency),
    plannedMinutes: rung.plannedMinutes, wirePlannedKg: rung.wirePlannedKg, wireChargedKg: computed.find(line => line.code === 'wire')?.quantity ?? rung.wirePlannedKg,
    sampleSize: samplingPlanFor(rung.quantity, aqlOf(readNumberRates(book))).sampleSize,
  }
}

/** The changes that stand in a rung's lines: those with a reason of their own. The margin is changed for the whole quote. */
export const lineOverridesOf = (lines: readonly LineRecord[]): LineOverride[] => lines.flatMap(line =>
  line.overrideReason !== null && line.code !== 'margin' ? [{ lineCode: line.code as PriceLineCode, amountMinor: line.amountMinor, reason: line.overrideReason }] : [])

/** The margin that stands in place of the book's, if any. */
export const marginOverrideOf = ({ marginPercentOverride, marginReason }: Pick<QuoteRecord, 'marginPercentOverride' | 'marginReason'>): MarginOverride | undefined =>
  marginPercentOverride === null || marginReason === null ? undefined : { percent: trimDecimals(marginPercentOverride), reason: marginReason }
