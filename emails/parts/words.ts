import { formatMoney, formatUnitPrice, groupThousands, type Currency } from '../../shared/money/index'

const dayFormat = new Intl.DateTimeFormat('en-GB', { weekday: 'long', day: 'numeric', month: 'long', year: 'numeric', timeZone: 'UTC' })

/** A calendar day in words that cannot be mistaken: Monday 14 December 2026. */
export const dayWords = (day: string): string => dayFormat.format(new Date(`${day}T00:00:00Z`)).replace(',', '')

/** A moment in the shop's zone: Friday 11 December 2026, 17:00. */
export function momentWords(moment: string, timeZone: string): string {
  const at = new Date(moment)
  const day = new Intl.DateTimeFormat('en-GB', { weekday: 'long', day: 'numeric', month: 'long', year: 'numeric', timeZone }).format(at).replace(',', '')
  return `${day}, ${new Intl.DateTimeFormat('en-GB', { hour: '2-digit', minute: '2-digit', timeZone }).format(at)}`
}

export const moneyWords = (amountMinor: number, currency: Currency): string => formatMoney(amountMinor, currency)

/** A number of springs: 1 spring, 2 500 springs. */
export const springsWords = (quantity: number): string => quantity === 1 ? '1 spring' : `${groupThousands(String(quantity))} springs`

/** The rungs of a quote as a mail shows them. */
export const ladderRows = (ladder: readonly { quantity: number, unitPrice: string, grossMinor: number }[], currency: Currency) =>
  ladder.map(rung => ({ quantity: groupThousands(String(rung.quantity)), unitPrice: formatUnitPrice(rung.unitPrice, currency), gross: formatMoney(rung.grossMinor, currency) }))
