import type { Currency } from './currencies'
import { assertChargeable, minimumChargeMinor } from './charge'
import { percentOfMinor } from './percent'

export interface DepositSplit {
  depositMinor: number
  balanceMinor: number
  /** One part was too small for a card, so the whole is taken in one payment, before wire is cut. */
  isMerged: boolean
  /** The whole is above zero but too small for any card payment. */
  isBelowChargeMinimum: boolean
}

/**
 * Splits a total into deposit and balance: the deposit is rounded half up once, the balance is the rest. A part that is zero
 * asks for no payment. A part under the currency's least charge is merged into the other, and the one payment is then the deposit.
 * `percent` is decimal text, 0 to 100. Throws MoneyError where the total cannot be charged at all for its size.
 */
export function splitDeposit(totalMinor: number, percent: string, currency: Currency): DepositSplit {
  assertChargeable(totalMinor, currency)
  const leastMinor = minimumChargeMinor(currency)
  const depositMinor = percentOfMinor(totalMinor, percent, currency)
  const balanceMinor = totalMinor - depositMinor
  const isBelowChargeMinimum = totalMinor > 0 && totalMinor < leastMinor

  const isTooSmall = (partMinor: number) => partMinor > 0 && partMinor < leastMinor
  if (depositMinor > 0 && balanceMinor > 0 && (isTooSmall(depositMinor) || isTooSmall(balanceMinor))) {
    return { depositMinor: totalMinor, balanceMinor: 0, isMerged: true, isBelowChargeMinimum }
  }
  return { depositMinor, balanceMinor, isMerged: false, isBelowChargeMinimum }
}
