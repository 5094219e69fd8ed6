import { invalidRequest, FakeApiError } from './errors'

/** Currencies charged in whole units (PAY-2). */
const ZERO_DECIMAL = new Set('bif clp djf gnf jpy kmf krw mga pyg rwf ugx vnd vuv xaf xof xpf'.split(' '))
/** Currencies in thousandths whose last digit must be 0 (PAY-3). */
const THREE_DECIMAL = new Set('bhd jod kwd omr tnd'.split(' '))
/** Currencies sent in hundredths that must be whole units (PAY-3). */
const HUNDREDTHS_ALWAYS_ZERO = new Set(['isk'])

/** Smallest charge in minor units. EUR and USD: PAY-4; the others from memory of the service's table. */
const MINIMUM_CHARGE_MINOR: Record<string, number> = {
  eur: 50, usd: 50, gbp: 30, chf: 50, cad: 50, aud: 50, nzd: 50, sgd: 50, sek: 300, nok: 300, dkk: 250, jpy: 50, pln: 200, czk: 1500,
}

const MAXIMUM_CHARGE_MINOR = 99_999_999
const CODES = new Set(Intl.supportedValuesOf('currency').map(code => code.toLowerCase()))

/** Lowercase code of a known currency; refuses an unknown one with 400. */
export function readCurrency(code: string, param: string): string {
  const lower = code.toLowerCase()
  if (!CODES.has(lower)) throw invalidRequest(`Invalid currency: ${lower}`, { param })
  return lower
}

/** Number of decimals that the service's wire amount has for a currency. */
export function wireExponent(currency: string): 0 | 2 | 3 {
  if (ZERO_DECIMAL.has(currency)) return 0
  return THREE_DECIMAL.has(currency) ? 3 : 2
}

/** Refuses a total that the service would not charge: too small, above eight digits, or a digit that must be 0. */
export function assertChargeable(amountMinor: number, currency: string): void {
  const minimum = MINIMUM_CHARGE_MINOR[currency] ?? 1
  if (amountMinor < minimum) {
    throw new FakeApiError(400, {
      type: 'invalid_request_error',
      code: 'amount_too_small',
      message: `The Checkout Session's total amount must be at least ${formatAmount(minimum, currency)}.`,
      param: 'line_items',
    })
  }
  if (amountMinor > MAXIMUM_CHARGE_MINOR) {
    throw invalidRequest(`The total amount must be no more than ${formatAmount(MAXIMUM_CHARGE_MINOR, currency)}.`, { code: 'amount_too_large', param: 'line_items' })
  }
  if (THREE_DECIMAL.has(currency) && amountMinor % 10 !== 0) {
    throw invalidRequest(`Amounts in ${currency} must end in 0.`, { code: 'invalid_charge_amount', param: 'line_items' })
  }
  if (HUNDREDTHS_ALWAYS_ZERO.has(currency) && amountMinor % 100 !== 0) {
    throw invalidRequest(`Amounts in ${currency} must end in 00.`, { code: 'invalid_charge_amount', param: 'line_items' })
  }
}

/** The amount as people read it, in British English, exact at any size. */
export function formatAmount(amountMinor: number, currency: string): string {
  const exponent = wireExponent(currency)
  const digits = String(amountMinor).padStart(exponent + 1, '0')
  const whole = digits.slice(0, digits.length - exponent).replace(/\B(?=(\d{3})+$)/g, ',')
  const fraction = exponent === 0 ? '' : `.${digits.slice(-exponent)}`
  return `${currency.toUpperCase()} ${whole}${fraction}`
}

/**
 * Line total in minor units: unit price (up to 12 decimals of a minor unit) times quantity, rounded half up once.
 * Exact in integers of 10⁻¹² minor units.
 */
export function lineTotalMinor(unitAmountDecimal: string, quantity: number): number {
  const [whole = '0', fraction = ''] = unitAmountDecimal.split('.')
  const scaled = BigInt(whole + fraction.padEnd(12, '0'))
  const scale = 10n ** 12n
  return Number((scaled * BigInt(quantity) + scale / 2n) / scale)
}
