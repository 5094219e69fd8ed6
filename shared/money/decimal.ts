import { Decimal as DecimalBase } from 'decimal.js'
import { currencyRow, type Currency } from './currencies'
import { minorToText } from './format'
import { assertMinor } from './money'

/** Decimal arithmetic of prices: 40 digits, half up. Kept out of `index.ts` so that pages that only show money do not load it. */
export const Decimal = DecimalBase.clone({ precision: 40, rounding: DecimalBase.ROUND_HALF_UP })
export type Decimal = InstanceType<typeof Decimal>

/** Rounds an amount in major units half up (away from zero below zero) to the step the currency is charged in, once. */
export function roundToMinor(amount: Decimal, currency: Currency): number {
  const { exponent, stepMinor } = currencyRow(currency)
  const amountMinor = amount.times(new Decimal(10).pow(exponent)).div(stepMinor).round().times(stepMinor).toNumber()
  assertMinor(amountMinor)
  return amountMinor === 0 ? 0 : amountMinor
}

/** Minor units as a decimal in major units. */
export function minorToDecimal(amountMinor: number, currency: Currency): Decimal {
  return new Decimal(minorToText(amountMinor, currency))
}
