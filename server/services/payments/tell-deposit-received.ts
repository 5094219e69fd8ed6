import type { Transaction } from '../../database/client'
import { enqueueMail } from '../mail/enqueue'
import { orderRefOf } from '../orders/reference'
import { findAcceptedSums } from './amount-due'
import type { Capture } from './book-capture'
import type { PaymentDesk } from './desk'

/** Tells the customer that the deposit came and what is left to pay. */
export async function tellDepositReceived(tx: Transaction, { origin }: PaymentDesk, { order, payment }: Pick<Capture, 'order' | 'payment'>): Promise<void> {
  const sums = await findAcceptedSums(tx, order.id)
  if (!sums) throw new Error(`order ${order.id} has a deposit and no accepted quote`)
  const orderRef = orderRefOf(order.number)
  await enqueueMail(tx, {
    kind: 'deposit-received', objectId: order.id, recipient: order.contactEmail, orderId: order.id,
    payload: {
      contactName: order.contactName, orderRef, title: order.title, quantity: sums.quantity, amountMinor: payment.amountMinor, balanceMinor: sums.grossMinor - payment.amountMinor,
      currency: payment.currency, orderUrl: `${origin}/account/orders/${orderRef}`,
    },
  })
}
