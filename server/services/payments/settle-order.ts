import { eq } from 'drizzle-orm'
import { orders } from '../../database/schema'
import type { Transaction } from '../../database/client'
import { moveOrder } from '../orders/move'
import { findAmountDue } from './amount-due'

/**
 * Settles an order that is dispatched and wholly paid; anything else stays as it is. Called when the balance comes and when the
 * springs leave, whichever is later.
 */
export async function settleIfPaid(tx: Transaction, { orderId, now }: { orderId: string, now: Date }): Promise<boolean> {
  const [order] = await tx.select({ state: orders.state }).from(orders).where(eq(orders.id, orderId)).for('update')
  if (order?.state !== 'dispatched') return false
  const due = await findAmountDue(tx, orderId, 'balance')
  if (!due || due.amountMinor > 0) return false
  await moveOrder(tx, { orderId, from: ['dispatched'], to: 'settled', why: 'Dispatched and paid in full', personId: null, now })
  return true
}
