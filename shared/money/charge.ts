import { currencyRow, type Currency } from './currencies'
import { formatMoney } from './format'
import { money, MoneyError } from './money'

/** Eight digits is the most one card payment may have, whatever the currency (Stripe docs "Supported currencies"). */
export const LARGEST_CHARGE_MINOR = 99_999_999

/** Refuses at quoting what could not be paid later. Throws MoneyError `amount-too-large` or `amount-negative`. */
export function assertChargeable(amountMinor: number, currency: Currency): void {
  money(amountMinor, currency)
  if (amountMinor < 0) throw new MoneyError('amount-negative', 'A payment cannot be less than nothing.')
  if (amountMinor > LARGEST_CHARGE_MINOR) {
    throw new MoneyError('amount-too-large', `One order can be paid up to ${formatMoney(largestChargeOf(currency), currency)}. Ask for fewer springs, or for several orders.`)
  }
}

function largestChargeOf(currency: Currency): number {
  return LARGEST_CHARGE_MINOR - (LARGEST_CHARGE_MINOR % currencyRow(currency).stepMinor)
}

/**
 * The amount and code as Stripe takes them. `amountMinor` is kept with the wire's exponent, so this checks and never rounds:
 * the price was rounded when it was made. Throws MoneyError.
 */
export function toChargeAmount(amountMinor: number, currency: Currency): { amount: number, currency: Currency } {
  assertChargeable(amountMinor, currency)
  return { amount: amountMinor, currency }
}

/** Least amount one card payment may have. */
export function minimumChargeMinor(currency: Currency): number {
  return currencyRow(currency).minimumChargeMinor
}
