import { currencyRow, type Currency } from './currencies'
import { money, MoneyError, type Money } from './money'

/**
 * Reads what a person typed or `formatMoney` wrote: optional minus, optional sign or code of that currency, digits with
 * spaces between thousands, a point before the fraction. Throws MoneyError with words that say what would put it right.
 */
export function parseMoney(text: string, currency: Currency): Money {
  const code = currency.toUpperCase()
  const { exponent, sign } = currencyRow(currency)
  let rest = text.slice(0, 60).replace(/\s/g, '').replace('\u2212', '-')

  const isNegative = rest.startsWith('-')
  if (isNegative) rest = rest.slice(1)
  if (sign !== undefined && rest.startsWith(sign)) rest = rest.slice(sign.length)
  else if (rest.toUpperCase().startsWith(code)) rest = rest.slice(code.length)
  else if (rest.toUpperCase().endsWith(code)) rest = rest.slice(0, -code.length)

  if (rest.includes(',')) throw new MoneyError('text-unreadable', 'Write the amount with a point and no comma, such as 1195.20.')
  const match = /^(\d+)(?:\.(\d+))?$/.exec(rest)
  if (!match) throw new MoneyError('text-unreadable', 'Write the amount in figures, such as 480.00.')

  const whole = match[1] ?? '0'
  const fraction = match[2] ?? ''
  if (fraction.length > exponent && /[1-9]/.test(fraction.slice(exponent))) {
    throw new MoneyError('text-unreadable', exponent === 0 ? `${code} has no decimals.` : `${code} has ${exponent} decimals at most.`)
  }
  const amountMinor = Number(whole + fraction.slice(0, exponent).padEnd(exponent, '0'))
  if (!Number.isSafeInteger(amountMinor)) throw new MoneyError('amount-too-large', 'This amount is too large.')
  return money(isNegative ? -amountMinor : amountMinor, currency)
}
