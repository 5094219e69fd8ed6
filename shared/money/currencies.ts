/**
 * One row for each currency an amount can be in. `exponent` is the exponent of `amountMinor` in our books and on the
 * wire to Stripe alike, so that nothing is multiplied on the way. It is not always the ISO 4217 exponent:
 * MGA (ISO 2) is sent whole, ISK (ISO 0) is sent in hundredths. Source: Stripe docs "Supported currencies".
 */
interface CurrencyRow {
  /** Digits of `amountMinor` after the decimal mark. */
  exponent: 0 | 2 | 3
  /** Amounts are whole multiples of this many minor units: 10 for three-decimal currencies, 100 for ISK. */
  stepMinor: 1 | 10 | 100
  /** Digits shown after the decimal mark. */
  shownDigits: 0 | 2 | 3
  /** Sign before the amount; where absent the ISO code is written. */
  sign?: string
  /** Least amount one card payment may have, in minor units. EUR and USD: Stripe docs; the others from memory of the same table. */
  minimumChargeMinor: number
}

const whole = (minimumChargeMinor: number): CurrencyRow => ({ exponent: 0, stepMinor: 1, shownDigits: 0, minimumChargeMinor })
const hundredths = (minimumChargeMinor: number): CurrencyRow => ({ exponent: 2, stepMinor: 1, shownDigits: 2, minimumChargeMinor })
// The last of the three digits is always 0 on the wire, so it is so in the price too.
const thousandths = (minimumChargeMinor: number): CurrencyRow => ({ exponent: 3, stepMinor: 10, shownDigits: 3, minimumChargeMinor })

/**
 * Where Stripe names no minimum of its own, it takes the equal of 0.50 USD at the day's rate (from memory). The table holds a
 * rounded-up equal of that, so that a part payment too small for the card is never offered.
 */
const CURRENCIES = {
  eur: { ...hundredths(50), sign: '€' },
  usd: { ...hundredths(50), sign: '$' },
  gbp: { ...hundredths(30), sign: '£' },
  jpy: { ...whole(50), sign: '¥' },
  chf: hundredths(50),
  sek: hundredths(300),
  nok: hundredths(300),
  dkk: hundredths(250),
  pln: hundredths(200),
  czk: hundredths(1500),
  huf: hundredths(17_500),
  ron: hundredths(200),
  cad: hundredths(50),
  aud: hundredths(50),
  nzd: hundredths(50),
  isk: { exponent: 2, stepMinor: 100, shownDigits: 0, minimumChargeMinor: 10_000 },
  bif: whole(2_000),
  clp: whole(600),
  djf: whole(100),
  gnf: whole(6_000),
  kmf: whole(300),
  krw: whole(1_000),
  mga: whole(3_000),
  pyg: whole(5_000),
  rwf: whole(1_000),
  ugx: whole(2_500),
  vnd: whole(15_000),
  vuv: whole(100),
  xaf: whole(400),
  xof: whole(400),
  xpf: whole(80),
  bhd: thousandths(250),
  jod: thousandths(500),
  kwd: thousandths(250),
  omr: thousandths(250),
  tnd: thousandths(2_000),
} as const satisfies Record<string, CurrencyRow>

/** Lower-case ISO 4217 code of a currency we can charge in. */
export type Currency = keyof typeof CURRENCIES

/** Every currency of the table. */
export const CURRENCY_CODES = Object.keys(CURRENCIES) as Currency[]

/** True where the text is a lower-case code of the table. */
export function isCurrency(text: string): text is Currency {
  return Object.hasOwn(CURRENCIES, text)
}

/** The table's row of a currency. */
export function currencyRow(currency: Currency): CurrencyRow {
  return CURRENCIES[currency]
}
