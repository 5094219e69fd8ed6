import { currencyRow, isCurrency, type Currency } from './currencies'

/** An amount of money: a safe integer of minor units beside its currency. */
export interface Money {
  amountMinor: number
  currency: Currency
}

export type MoneyErrorCode =
  | 'currency-unknown'
  | 'currency-differs'
  | 'amount-not-whole'
  | 'amount-off-step'
  | 'amount-too-large'
  | 'amount-negative'
  | 'text-unreadable'
  | 'percent-out-of-range'

/** A refusal of the money module; `message` can be shown to a person. */
export class MoneyError extends Error {
  constructor(readonly code: MoneyErrorCode, message: string) {
    super(message)
    this.name = 'MoneyError'
  }
}

/** Reads an ISO code in either case. Throws MoneyError `currency-unknown`. */
export function toCurrency(text: string): Currency {
  const code = text.trim().toLowerCase()
  if (!isCurrency(code)) throw new MoneyError('currency-unknown', `We cannot take payment in “${text.slice(0, 12)}”.`)
  return code
}

/** Refuses anything but a safe integer. Throws MoneyError `amount-not-whole`. */
export function assertMinor(amountMinor: number): void {
  if (!Number.isSafeInteger(amountMinor)) {
    throw new MoneyError('amount-not-whole', 'An amount must be a whole number of minor units.')
  }
}

/** Checks and builds an amount. Throws MoneyError where it is not whole, or off the step the currency is charged in. */
export function money(amountMinor: number, currency: Currency): Money {
  assertMinor(amountMinor)
  const { stepMinor } = currencyRow(currency)
  if (amountMinor % stepMinor !== 0) {
    throw new MoneyError('amount-off-step', `Amounts in ${currency.toUpperCase()} must be a multiple of ${stepMinor} minor units.`)
  }
  return { amountMinor: amountMinor === 0 ? 0 : amountMinor, currency }
}

/** Sum of minor units. Throws MoneyError where a part or the sum is no safe integer. */
export function sumMinor(amountsMinor: readonly number[]): number {
  let total = 0
  for (const amountMinor of amountsMinor) {
    assertMinor(amountMinor)
    total += amountMinor
    assertMinor(total)
  }
  return total
}

/** Sum of amounts of one currency. Throws MoneyError `currency-differs`. */
export function addMoney(first: Money, ...others: Money[]): Money {
  for (const other of others) {
    if (other.currency !== first.currency) {
      throw new MoneyError('currency-differs', `${first.currency.toUpperCase()} and ${other.currency.toUpperCase()} cannot be added.`)
    }
  }
  return { amountMinor: sumMinor([first.amountMinor, ...others.map((other) => other.amountMinor)]), currency: first.currency }
}
