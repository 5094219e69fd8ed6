import { currencyRow, type Currency } from './currencies'
import { assertMinor, MoneyError } from './money'

/**
 * Percentage of an amount, rounded half up once to the currency's step, in whole-number arithmetic so that the browser needs no
 * decimal library. `percent` is decimal text from 0 to 100. Throws MoneyError `percent-out-of-range` or `amount-negative`.
 */
export function percentOfMinor(amountMinor: number, percent: string, currency: Currency): number {
  assertMinor(amountMinor)
  if (amountMinor < 0) throw new MoneyError('amount-negative', 'A share is taken of an amount of zero or more.')
  const match = /^(\d{1,3})(?:\.(\d{1,9}))?$/.exec(percent)
  if (!match) throw new MoneyError('percent-out-of-range', 'A percentage must lie between 0 and 100.')
  const fraction = match[2] ?? ''
  const scale = 10n ** BigInt(fraction.length)
  const scaledPercent = BigInt((match[1] ?? '0') + fraction)
  if (scaledPercent > 100n * scale) throw new MoneyError('percent-out-of-range', 'A percentage must lie between 0 and 100.')

  const step = BigInt(currencyRow(currency).stepMinor)
  const divisor = 100n * scale * step
  const product = BigInt(amountMinor) * scaledPercent
  return Number(((2n * product + divisor) / (2n * divisor)) * step)
}
