import { and, eq, sql } from 'drizzle-orm'
import { isCurrency, type Currency } from '#shared/money/index'
import type { PaymentKind } from '#shared/schemas/payment'
import type { OrderState } from '#shared/schemas/order-states'
import type { Queryable } from '../../database/client'
import { ledgerEntries, ledgerTransactions, orders, quotePrices, quotes } from '../../database/schema'
import { ACCOUNTS } from './accounts'

/** In which states an order takes a payment of each kind. */
export const PAYABLE_IN: Readonly<Record<PaymentKind, readonly OrderState[]>> = { deposit: ['accepted'], balance: ['finished', 'dispatched'] }

export type AmountDue = { amountMinor: number, currency: Currency }

/** What customers paid for an order: captures less refunds and lost disputes, from the books, without what is held as credit. */
export async function paidMinor(db: Queryable, orderId: string): Promise<number> {
  const [row] = await db.select({ paid: sql<string>`coalesce(-sum(${ledgerEntries.amountMinor}), 0)` }).from(ledgerEntries)
    .innerJoin(ledgerTransactions, eq(ledgerTransactions.id, ledgerEntries.transactionId))
    .where(and(eq(ledgerTransactions.orderId, orderId), sql`${ledgerEntries.account} in (${ACCOUNTS.deposits}, ${ACCOUNTS.balances})`))
  return Number(row?.paid ?? 0)
}

/** The accepted rung's sums, or null when nothing is accepted. */
export async function findAcceptedSums(db: Queryable, orderId: string): Promise<{ depositMinor: number, grossMinor: number, quantity: number, currency: Currency } | null> {
  const [rung] = await db.select({ depositMinor: quotePrices.depositMinor, grossMinor: quotePrices.grossMinor, quantity: quotePrices.quantity, currency: quotes.currency }).from(orders)
    .innerJoin(quotes, eq(quotes.id, orders.acceptedQuoteId))
    .innerJoin(quotePrices, and(eq(quotePrices.quoteId, quotes.id), eq(quotePrices.quantity, orders.acceptedQuantity)))
    .where(eq(orders.id, orderId))
  if (!rung) return null
  if (!isCurrency(rung.currency)) throw new Error(`order ${orderId} is priced in ${rung.currency}, which cannot be charged`)
  return { ...rung, currency: rung.currency }
}

/** What a payment of this kind has to bring, from the accepted quote and the books alone; nought when nothing is due. */
export async function findAmountDue(db: Queryable, orderId: string, kind: PaymentKind): Promise<AmountDue | null> {
  const sums = await findAcceptedSums(db, orderId)
  if (!sums) return null
  if (kind === 'deposit') return { amountMinor: sums.depositMinor, currency: sums.currency }
  return { amountMinor: Math.max(0, sums.grossMinor - await paidMinor(db, orderId)), currency: sums.currency }
}
