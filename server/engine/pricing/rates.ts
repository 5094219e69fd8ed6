import { RATE_CODES, type RateCode } from './rate-codes'
import { PriceError } from './errors'
import type { PriceBook } from './types'

/** Every rate as a plain number: for hours, kilograms and comparisons, never for money that is shown or booked. */
export type NumberRates = Record<RateCode, number>

const DECIMAL_TEXT = /^-?\d{1,12}(?:\.\d{1,12})?$/
const BELOW_ZERO_ALLOWED: ReadonlySet<RateCode> = new Set(['gate.temperature-min-c', 'gate.temperature-max-c'])

/** Rates something is divided by, or that make no sense at zero. */
function mustBeAboveZero(code: RateCode): boolean {
  return /^(coiling\.(feed|cap|efficiency|setup-factor)|grinding\.pieces-per-hour|furnace\.batch-kg)/.test(code)
}

/** Percentages that make no sense above a limit; a margin of the whole price would divide by nothing. */
const GREATEST: Partial<Record<RateCode, number>> = {
  'policy.margin-percent': 95,
  'policy.margin-floor-percent': 95,
  'policy.deposit-percent': 100,
  'coiling.efficiency-percent': 100,
}

/** Decimal text of one rate. Throws PriceError `rate-missing` or `rate-unreadable`. */
export function rateText(book: PriceBook, code: RateCode): string {
  const text = Object.hasOwn(book.rates, code) ? book.rates[code] : undefined
  if (text === undefined) throw new PriceError('rate-missing', `Price book ${book.number} has no rate for ${code}.`, code)
  if (!DECIMAL_TEXT.test(text)) throw new PriceError('rate-unreadable', `The rate for ${code} in price book ${book.number} is no number.`, code)
  const value = Number(text)
  if ((value < 0 && !BELOW_ZERO_ALLOWED.has(code)) || (value === 0 && mustBeAboveZero(code))) {
    throw new PriceError('rate-unreadable', `The rate for ${code} in price book ${book.number} must be above zero.`, code)
  }
  const greatest = GREATEST[code]
  if (greatest !== undefined && value > greatest) {
    throw new PriceError('rate-unreadable', `The rate for ${code} in price book ${book.number} must be ${greatest} at most.`, code)
  }
  return text
}

/** Checks the whole book and reads it as plain numbers. Throws PriceError at the first rate that is missing or wrong. */
export function readNumberRates(book: PriceBook): NumberRates {
  return Object.fromEntries(RATE_CODES.map(({ code }) => [code, Number(rateText(book, code))])) as NumberRates
}
