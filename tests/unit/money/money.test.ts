import { readdirSync, readFileSync } from 'node:fs'
import { fileURLToPath } from 'node:url'
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  addMoney, assertChargeable, CURRENCY_CODES, currencyRow, formatMoney, formatMoneyDifference, formatUnitPrice, minimumChargeMinor, money,
  MoneyError, parseMoney, percentOfMinor, splitDeposit, sumMinor, toChargeAmount, toCurrency,
} from '#shared/money'
import { Decimal, minorToDecimal, roundToMinor } from '#shared/money/decimal'

function codeOf(act: () => unknown): string | undefined {
  try {
    act()
  } catch (error) {
    if (error instanceof MoneyError) return error.code
    throw error
  }
  return undefined
}

const anyCurrency = fc.constantFrom(...CURRENCY_CODES)
const anyAmount = anyCurrency.chain((currency) =>
  fc.integer({ min: 0, max: 99_999 }).map((steps) => ({ currency, amountMinor: steps * currencyRow(currency).stepMinor })))

describe('the currency table', () => {
  it('sends the sixteen whole currencies of Stripe unmultiplied', () => {
    // Stripe docs "Supported currencies": zero-decimal currencies.
    const whole = 'bif clp djf gnf jpy kmf krw mga pyg rwf ugx vnd vuv xaf xof xpf'.split(' ')
    expect(CURRENCY_CODES.filter((code) => currencyRow(code).exponent === 0).sort()).toEqual(whole)
    expect(toChargeAmount(500, 'jpy')).toEqual({ amount: 500, currency: 'jpy' })
  })

  it('keeps the last of three digits at 0 and ISK in whole kronur', () => {
    const thousandths = 'bhd jod kwd omr tnd'.split(' ')
    expect(CURRENCY_CODES.filter((code) => currencyRow(code).exponent === 3).sort()).toEqual(thousandths)
    expect(roundToMinor(new Decimal('5.124'), 'kwd')).toBe(5120)
    expect(roundToMinor(new Decimal('5.125'), 'kwd')).toBe(5130)
    expect(codeOf(() => toChargeAmount(5124, 'kwd'))).toBe('amount-off-step')
    expect(codeOf(() => toChargeAmount(1050, 'isk'))).toBe('amount-off-step')
    expect(toChargeAmount(1000, 'isk').amount).toBe(1000)
  })

  it('reads codes in either case and refuses unknown ones, names of the prototype too', () => {
    expect(toCurrency(' EUR ')).toBe('eur')
    for (const text of ['', 'euro', 'toString', '__proto__']) expect(codeOf(() => toCurrency(text))).toBe('currency-unknown')
  })
})

describe('writing and reading amounts', () => {
  it('writes amounts as the pages show them', () => {
    expect(formatMoney(48_000, 'eur')).toBe('€480.00')
    expect(formatMoney(119_520, 'eur')).toBe('€1\u202F195.20')
    expect(formatMoney(-900, 'eur')).toBe('\u2212€9.00')
    expect(formatMoney(5, 'eur')).toBe('€0.05')
    expect(formatMoney(500, 'jpy')).toBe('¥500')
    expect(formatMoney(5120, 'kwd')).toBe('KWD\u202F5.120')
    expect(formatMoney(1000, 'isk')).toBe('ISK\u202F10')
    expect(formatMoney(123_456_789_00, 'gbp')).toBe('£123\u202F456\u202F789.00')
    expect(formatMoneyDifference(8680, 'eur')).toBe('+€86.80')
    expect(formatMoneyDifference(0, 'eur')).toBe('€0.00')
  })

  it('writes unit prices with every digit they have', () => {
    expect(formatUnitPrice('0.960', 'eur')).toBe('€0.960')
    expect(formatUnitPrice('1234.500', 'eur')).toBe('€1\u202F234.500')
    expect(() => formatUnitPrice('1e3', 'eur')).toThrow(RangeError)
  })

  it('reads back every amount it writes', () => {
    fc.assert(fc.property(anyAmount, fc.boolean(), ({ currency, amountMinor }, isNegative) => {
      const signed = isNegative && amountMinor !== 0 ? -amountMinor : amountMinor
      expect(parseMoney(formatMoney(signed, currency), currency)).toEqual({ amountMinor: signed, currency })
    }))
  })

  it('refuses what is no amount of the currency', () => {
    for (const text of ['', ' ', 'abc', '1.2.3', '1,50', '£5.00', '1e5', 'NaN', '--5', '5.', '.5', '0x10', '12.345']) {
      expect(codeOf(() => parseMoney(text, 'eur')), text).toBe('text-unreadable')
    }
    expect(codeOf(() => parseMoney('9'.repeat(40), 'eur'))).toBe('amount-too-large')
    expect(codeOf(() => parseMoney('10.50', 'isk'))).toBe('amount-off-step')
    expect(parseMoney('12.300', 'eur').amountMinor).toBe(1230)
    expect(parseMoney('12.5 EUR', 'eur').amountMinor).toBe(1250)
  })

  it('refuses fractions of a minor unit and mixed currencies', () => {
    for (const amount of [0.5, Number.NaN, Number.POSITIVE_INFINITY, 2 ** 53]) {
      expect(codeOf(() => money(amount, 'eur'))).toBe('amount-not-whole')
      expect(codeOf(() => sumMinor([1, amount]))).toBe('amount-not-whole')
    }
    expect(codeOf(() => addMoney(money(1, 'eur'), money(1, 'usd')))).toBe('currency-differs')
    expect(addMoney(money(1, 'eur'), money(2, 'eur')).amountMinor).toBe(3)
  })
})

describe('rounding', () => {
  it('rounds half up once', () => {
    expect(roundToMinor(new Decimal('0.005'), 'eur')).toBe(1)
    expect(roundToMinor(new Decimal('0.0049999999999999999999'), 'eur')).toBe(0)
    expect(roundToMinor(new Decimal('1.005'), 'eur')).toBe(101)
    expect(roundToMinor(new Decimal('-0.001'), 'eur')).toBe(0)
  })

  it('takes the same percentage in whole numbers as decimal arithmetic does', () => {
    fc.assert(fc.property(anyAmount, fc.integer({ min: 0, max: 10_000 }), ({ currency, amountMinor }, hundredths) => {
      const percent = `${Math.floor(hundredths / 100)}.${String(hundredths % 100).padStart(2, '0')}`
      const byDecimal = roundToMinor(minorToDecimal(amountMinor, currency).times(percent).div(100), currency)
      expect(percentOfMinor(amountMinor, percent, currency)).toBe(byDecimal)
    }))
  })

  it('refuses percentages that are none', () => {
    for (const percent of ['-1', '100.01', '101', 'abc', '', '1e1']) {
      expect(codeOf(() => percentOfMinor(100, percent, 'eur')), percent).toBe('percent-out-of-range')
    }
  })
})

describe('deposit and balance', () => {
  it('splits the mocked quote: 40 % of €576.00', () => {
    expect(splitDeposit(57_600, '40', 'eur')).toEqual({ depositMinor: 23_040, balanceMinor: 34_560, isMerged: false, isBelowChargeMinimum: false })
  })

  it('always adds up to the total and offers no part too small for a card', () => {
    fc.assert(fc.property(anyAmount, fc.integer({ min: 0, max: 1000 }), ({ currency, amountMinor }, tenths) => {
      const percent = (tenths / 10).toFixed(1)
      const split = splitDeposit(amountMinor, percent, currency)
      expect(split.depositMinor + split.balanceMinor).toBe(amountMinor)
      for (const partMinor of [split.depositMinor, split.balanceMinor]) {
        expect(partMinor).toBeGreaterThanOrEqual(0)
        expect(partMinor % currencyRow(currency).stepMinor).toBe(0)
        if (partMinor > 0 && !split.isBelowChargeMinimum) expect(partMinor).toBeGreaterThanOrEqual(minimumChargeMinor(currency))
      }
    }), { numRuns: 500 })
  })

  it('merges a part under the least charge into one payment', () => {
    expect(splitDeposit(60, '50', 'eur')).toEqual({ depositMinor: 60, balanceMinor: 0, isMerged: true, isBelowChargeMinimum: false })
    expect(splitDeposit(1000, '4', 'eur')).toMatchObject({ depositMinor: 1000, balanceMinor: 0, isMerged: true })
    expect(splitDeposit(1000, '96', 'eur')).toMatchObject({ depositMinor: 1000, balanceMinor: 0, isMerged: true })
    expect(splitDeposit(1000, '95', 'eur')).toMatchObject({ depositMinor: 950, balanceMinor: 50, isMerged: false })
  })

  it('asks nothing for a free order, and says when the whole is too small to charge', () => {
    expect(splitDeposit(0, '40', 'eur')).toEqual({ depositMinor: 0, balanceMinor: 0, isMerged: false, isBelowChargeMinimum: false })
    expect(splitDeposit(30, '40', 'eur')).toMatchObject({ depositMinor: 30, balanceMinor: 0, isBelowChargeMinimum: true })
    expect(splitDeposit(5000, '0', 'eur')).toMatchObject({ depositMinor: 0, balanceMinor: 5000 })
  })

  it('refuses more than eight digits with words that say the most', () => {
    expect(codeOf(() => assertChargeable(99_999_999, 'usd'))).toBeUndefined()
    expect(codeOf(() => assertChargeable(100_000_000, 'usd'))).toBe('amount-too-large')
    expect(() => assertChargeable(100_000_000, 'usd')).toThrow('$999\u202F999.99')
    expect(codeOf(() => splitDeposit(-1, '40', 'eur'))).toBe('amount-negative')
  })
})

describe('what the browser loads', () => {
  it('is free of the decimal library unless a page asks for it by its own path', () => {
    const folder = fileURLToPath(new URL('../../../shared/money/', import.meta.url))
    const importers = readdirSync(folder).filter((name) => /from '(decimal\.js|\.\/decimal)'/.test(readFileSync(folder + name, 'utf8')))
    expect(importers).toEqual(['decimal.ts'])
  })
})
