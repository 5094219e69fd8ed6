import { and, eq, sql } from 'drizzle-orm'
import { toCurrency } from '#shared/money'
import { orders, outbox, quotePrices, quotes } from '../../database/schema'
import type { Transaction } from '../../database/client'
import { inTransaction, type ServiceContext } from '../context'
import { conflict } from '../errors'
import { enqueueMail } from '../mail/enqueue'
import { requireOwnOrder } from '../orders/access'
import { orderRefOf } from '../orders/reference'

/** Links that one order may be sent. More would make us a tool against the address. */
const MOST_LINKS = 5

/** Writes the e-mail with the link that confirms the address of an accepted order. Each call after the first is a step of its own. */
export async function mailConfirmAddress(tx: Transaction, orderId: string): Promise<void> {
  const [row] = await tx.select({
    number: orders.number, title: orders.title, contactName: orders.contactName, contactEmail: orders.contactEmail, quantity: quotePrices.quantity,
    grossMinor: quotePrices.grossMinor, depositMinor: quotePrices.depositMinor, currency: quotes.currency,
  }).from(orders).innerJoin(quotes, eq(quotes.id, orders.acceptedQuoteId))
    .innerJoin(quotePrices, and(eq(quotePrices.quoteId, quotes.id), eq(quotePrices.quantity, orders.acceptedQuantity))).where(eq(orders.id, orderId))
  if (!row) throw new Error(`order ${orderId} has no accepted rung`)
  const [sent] = await tx.select({ count: sql<number>`count(*)::int` }).from(outbox).where(and(eq(outbox.orderId, orderId), eq(outbox.kind, 'confirm-address')))
  const before = sent?.count ?? 0
  if (before >= MOST_LINKS) throw conflict(`We have sent this link ${MOST_LINKS} times. Look among unwanted mail, or write to us.`)
  await enqueueMail(tx, {
    kind: 'confirm-address', objectId: orderId, recipient: row.contactEmail, orderId, step: before === 0 ? '' : String(before + 1),
    payload: {
      contactName: row.contactName, orderRef: orderRefOf(row.number), title: row.title, quantity: row.quantity,
      grossMinor: row.grossMinor, depositMinor: row.depositMinor, currency: toCurrency(row.currency),
    },
  })
}

/**
 * Sends the confirmation link of an accepted order again.
 * @throws DomainError not-found, conflict when there is nothing to confirm
 */
export async function sendConfirmLink(context: ServiceContext, { ref, key }: { ref: string, key?: string | undefined }): Promise<{ sent: true }> {
  const order = await requireOwnOrder(context, ref, key)
  return inTransaction(context.db, async (tx) => {
    const [locked] = await tx.select({ state: orders.state }).from(orders).where(eq(orders.id, order.id)).for('update')
    if (locked?.state !== 'accepted') throw conflict('There is no address to confirm for this order now.')
    await mailConfirmAddress(tx, order.id)
    return { sent: true as const }
  })
}
