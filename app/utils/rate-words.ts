import { formatUnitPrice, groupThousands, toCurrency } from '#shared/money'
import type { RateGroup } from '#shared/rate-groups'
import { THIN_SPACE } from '#shared/units/format'

/** What the parts of a price book are called. */
export const RATE_GROUP_WORDS: Readonly<Record<RateGroup, string>> = {
  hourly: 'An hour’s work', coiling: 'Coiling', wire: 'Wire', furnace: 'Stress relief', grinding: 'End grinding', inspection: 'Inspection and papers', packing: 'Packing and dispatch',
  policy: 'Overhead, margin and money', tax: 'Tax', gate: 'What is quoted at once', promise: 'Dates promised',
}

const UNIT_WORDS: Readonly<Record<string, string>> = {
  'hours': 'h', 'minutes': 'min', 'seconds': 's', 'metres per minute': 'm/min', 'pieces per minute': 'a minute', 'pieces per hour': 'an hour', 'pieces': 'springs', 'metres': 'm',
  'kilograms': 'kg', 'percent': '%', 'days': 'days', 'millimetres': 'mm', 'degrees Celsius': '°C', 'joules': 'J',
}
const MONEY_WORDS: Readonly<Record<string, string>> = { 'currency': '', 'per hour': ' an hour', 'per kg': ' a kg' }

/** A rate of the price book as a person reads it: `€54.00 an hour`, `12 %`, `10 000 000`, `yes`. The value is decimal text. */
export function rateText({ value, unit }: { value: string, unit: string }, currency: string): string {
  if (unit === 'yes is 1') return Number(value) === 1 ? 'yes' : 'no'
  const money = MONEY_WORDS[unit]
  if (money !== undefined) return formatUnitPrice(withCents(value), toCurrency(currency)) + money
  const [whole = '', fraction] = value.replace('-', '\u2212').split('.')
  const digits = groupThousands(whole) + (fraction ? `.${fraction}` : '')
  const words = value === '1' && unit === 'days' ? 'day' : UNIT_WORDS[unit]
  return words ? digits + THIN_SPACE + words : digits
}

// Works keeps a rate without idle zeros; money is read with its cents.
function withCents(value: string): string {
  const [whole = '0', fraction = ''] = value.split('.')
  return `${whole}.${fraction.padEnd(2, '0')}`
}
