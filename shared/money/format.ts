import { currencyRow, type Currency } from './currencies'
import { assertMinor } from './money'

const NARROW_NO_BREAK_SPACE = '\u202F'
const MINUS = '\u2212'

/** Groups digits by threes with a narrow no-break space, as every number of the product is written. */
export function groupThousands(digits: string): string {
  return digits.replace(/\B(?=(\d{3})+$)/g, NARROW_NO_BREAK_SPACE)
}

function withSign(digits: string, isNegative: boolean, currency: Currency): string {
  const sign = currencyRow(currency).sign ?? currency.toUpperCase() + NARROW_NO_BREAK_SPACE
  return (isNegative ? MINUS : '') + sign + digits
}

/** Minor units as plain decimal text with a point and no sign of the currency: 48000 eur is `480.00`. */
export function minorToText(amountMinor: number, currency: Currency): string {
  assertMinor(amountMinor)
  const { exponent } = currencyRow(currency)
  const digits = String(Math.abs(amountMinor)).padStart(exponent + 1, '0')
  const text = exponent === 0 ? digits : `${digits.slice(0, -exponent)}.${digits.slice(-exponent)}`
  return amountMinor < 0 ? `-${text}` : text
}

/** An amount as a person reads it: `€480.00`, `€1 195.20`, `CHF 12.50`, `¥500`, `−€9.00`. The same everywhere, without Intl. */
export function formatMoney(amountMinor: number, currency: Currency): string {
  const { exponent, shownDigits } = currencyRow(currency)
  const [whole = '0', fraction = ''] = minorToText(Math.abs(amountMinor), currency).split('.')
  // ISK is kept in hundredths that are always 00, so only those may be left away.
  const shown = shownDigits < exponent && Number(fraction) === 0 ? '' : fraction
  return withSign(groupThousands(whole) + (shown === '' ? '' : `.${shown}`), amountMinor < 0, currency)
}

/** The amount as in `formatMoney`, with a plus before what is above zero: differences of a job's cost. */
export function formatMoneyDifference(amountMinor: number, currency: Currency): string {
  return (amountMinor > 0 ? '+' : '') + formatMoney(amountMinor, currency)
}

/** A price for one spring from its decimal text, every digit kept: `0.960` eur is `€0.960`. Throws RangeError on other text. */
export function formatUnitPrice(unitPrice: string, currency: Currency): string {
  const match = /^(-?)(\d+)(\.\d+)?$/.exec(unitPrice)
  if (!match) throw new RangeError('A unit price must be plain decimal text.')
  return withSign(groupThousands(match[2] ?? '0') + (match[3] ?? ''), match[1] === '-', currency)
}

/** Digits a unit price keeps after the decimal mark: one more than the currency shows, so three in euro. */
export function unitPriceDigits(currency: Currency): number {
  return currencyRow(currency).shownDigits + 1
}
