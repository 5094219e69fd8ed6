import { quotes } from '../../database/schema'
import type { Transaction } from '../../database/client'
import { addDays } from '../../engine/planning'
import { rateText, readNumberRates, resolveTax, type PricedCustomer } from '../../engine/pricing'
import { HOME_COUNTRY } from '../orders/home-country'
import { rungAmountsOf } from '../orders/rung-amounts'
import { shopDayOf } from '../orders/shop-plan'
import type { WorkedOut } from '../orders/work-out'
import type { QuoteRecord } from './find-revision'
import { writeRungs } from './write-rungs'

/** Stores revision A of an order as a draft: the spring that was found and its prices, or neither where nothing fits. */
export async function writeFirstRevision(
  tx: Transaction,
  { orderId, worked, customer, clock }: { orderId: string, worked: WorkedOut, customer: PricedCustomer, clock: { now: Date, timeZone: string } },
): Promise<QuoteRecord> {
  const { book, wire, design, rungs } = worked
  const [quote] = await tx.insert(quotes).values({
    orderId, revision: 'A', priceBookId: book.id, wireProductId: wire?.id ?? null, design, currency: book.currency,
    depositPercent: rateText(book, 'policy.deposit-percent'), taxPercent: resolveTax({ book, customer, homeCountry: HOME_COUNTRY }).percent,
    validUntil: validUntilOf(worked, clock),
  }).returning()
  await writeRungs(tx, quote!.id, rungs.map(rung => ({
    ...rungAmountsOf(rung), costMinor: rung.costMinor, wirePlannedKg: rung.wirePlannedKg, plannedMinutes: rung.plannedMinutes,
    lines: rung.lines.map(line => ({ ...line, computedAmountMinor: line.amountMinor })),
  })))
  return quote!
}

/** The last day a quote of today stands. */
export const validUntilOf = ({ book }: Pick<WorkedOut, 'book'>, clock: { now: Date, timeZone: string }): string =>
  addDays(shopDayOf(clock), readNumberRates(book)['policy.quote-validity-days'])
