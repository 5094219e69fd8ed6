import { formatMoney, formatUnitPrice, groupThousands, toCurrency } from '#shared/money'

/** Prices and counts in one currency as a person reads them. */
export function usePrices(currency: () => string) {
  return {
    amount: (minor: number) => formatMoney(minor, toCurrency(currency())),
    each: (unitPrice: string) => formatUnitPrice(unitPrice, toCurrency(currency())),
    count: (quantity: number) => groupThousands(String(quantity)),
  }
}
