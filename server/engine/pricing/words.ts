import { formatUnitPrice, groupThousands, unitPriceDigits, type Currency } from '#shared/money'
import { Decimal } from '#shared/money/decimal'

const THIN = '\u202F'

/** A count with its noun: `1 batch`, `2 000 springs`. */
export function countText(count: number, one: string, many: string): string {
  return `${groupThousands(String(count))} ${count === 1 ? one : many}`
}

/** A figure of fixed digits with its unit behind a thin space. */
export function figureText(text: string, digits: number, unit: string): string {
  const [whole = '0', fraction] = new Decimal(text).toFixed(digits).split('.')
  return groupThousands(whole) + (fraction === undefined ? '' : `.${fraction}`) + THIN + unit
}

/** Money of a rate: the currency's own digits, more only where the rate has them. */
export function rateMoneyText(rate: string, currency: Currency): string {
  const shown = Math.max(unitPriceDigits(currency) - 1, new Decimal(rate).decimalPlaces())
  return formatUnitPrice(new Decimal(rate).toFixed(shown), currency)
}

/** A percentage without idle zeros: `12 %`. */
export function percentText(percent: string): string {
  return `${new Decimal(percent).toFixed()}${THIN}%`
}

/** Short name of a material code, as the trade says it: `EN10270-1-SH` is `SH`, `ASTM-A228` is `A228`. */
export function shortMaterialName(material: string): string {
  return material.replace(/^(?:EN10270-\d-|ASTM-)/, '')
}

