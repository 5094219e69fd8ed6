import { assertChargeable, currencyRow, minorToText, percentOfMinor, sumMinor, unitPriceDigits, type Currency } from '#shared/money'
import { Decimal, minorToDecimal, roundToMinor } from '#shared/money/decimal'
import { PriceError } from './errors'
import { percentText } from './words'
import type { PolicyLineCode, PriceLine } from './types'

/** How the price before tax is found from cost, overhead and risk. */
export type MarginRule =
  | { kind: 'percent', percent: string, minimumOrderMinor: number }
  | { kind: 'amount', percent: string, amountMinor: number }

/** A percentage of cost as a line. */
export function buildShareLine(code: PolicyLineCode, label: string, costMinor: number, percent: string, currency: Currency): PriceLine {
  return {
    code,
    label,
    basis: 'of cost',
    rateText: percentText(percent),
    quantity: minorToText(costMinor, currency),
    quantityUnit: '%',
    rate: percent,
    amountMinor: roundToMinor(minorToDecimal(costMinor, currency).times(percent).div(100), currency),
  }
}

/**
 * Price before tax. The price of one spring is rounded up to its shown digits (more digits where one step would be over 1 % of
 * it), and the whole is that price times the quantity, rounded once: so a customer can multiply and gets the total.
 */
export function priceBeforeTax(
  { baseMinor, quantity, currency, rule }: { baseMinor: number, quantity: number, currency: Currency, rule: MarginRule },
): { netMinor: number, unitPrice: string, isRaisedToMinimum: boolean } {
  if (rule.kind === 'amount') {
    const netMinor = sumMinor([baseMinor, rule.amountMinor])
    if (netMinor < 0) throw new PriceError('price-negative', 'The price would be less than nothing. Raise the margin.', 'margin')
    const exact = minorToDecimal(netMinor, currency).div(quantity)
    return { netMinor, unitPrice: exact.toFixed(digitsFor(exact, currency), Decimal.ROUND_HALF_UP), isRaisedToMinimum: false }
  }
  const share = new Decimal(1).minus(new Decimal(rule.percent).div(100))
  if (share.lte(0)) throw new PriceError('override-unreadable', 'The margin must be under 100 % of the price.', 'margin')
  const byMargin = minorToDecimal(baseMinor, currency).div(share)
  const smallest = minorToDecimal(rule.minimumOrderMinor, currency)
  const isRaisedToMinimum = smallest.gt(byMargin)
  const exact = Decimal.max(byMargin, smallest).div(quantity)
  const unit = exact.toDecimalPlaces(digitsFor(exact, currency), Decimal.ROUND_UP)
  return { netMinor: roundToMinor(unit.times(quantity), currency), unitPrice: unit.toFixed(digitsFor(exact, currency)), isRaisedToMinimum }
}

function digitsFor(unitPrice: Decimal, currency: Currency): number {
  let digits = unitPriceDigits(currency)
  while (digits < 6 && unitPrice.gt(0) && unitPrice.times(new Decimal(10).pow(digits)).lt(100)) digits += 1
  return digits
}

/** Margin as a percentage of the price, one decimal; 0.0 for a price of nothing. */
export function marginPercentOf(marginMinor: number, netMinor: number): string {
  return netMinor === 0 ? '0.0' : new Decimal(marginMinor).times(100).div(netMinor).toFixed(1)
}

/** True where the margin is under the floor by the least payable step or more; less than that is the rounding of the price itself. */
export function isBelowFloor(
  { marginMinor, netMinor, floorPercent, currency }: { marginMinor: number, netMinor: number, floorPercent: string, currency: Currency },
): boolean {
  return new Decimal(netMinor).times(floorPercent).div(100).minus(marginMinor).gte(currencyRow(currency).stepMinor)
}

/** Tax rounded half up once and the price with it. Throws MoneyError where one card payment could not carry it. */
export function addTax(netMinor: number, taxPercent: string, currency: Currency): { taxMinor: number, grossMinor: number } {
  const taxMinor = percentOfMinor(netMinor, taxPercent, currency)
  const grossMinor = sumMinor([netMinor, taxMinor])
  assertChargeable(grossMinor, currency)
  return { taxMinor, grossMinor }
}
