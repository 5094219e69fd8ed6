import type { Transaction } from '../../database/client'
import { enqueueMail } from '../mail/enqueue'
import { orderRefOf } from '../orders/reference'
import type { Capture } from './book-capture'
import type { PaymentDesk } from './desk'

/** Tells the customer that a slow payment failed after they had left the page. */
export async function tellFailed(tx: Transaction, { origin }: PaymentDesk, { order, payment }: Pick<Capture, 'order' | 'payment'>): Promise<void> {
  const orderRef = orderRefOf(order.number)
  await enqueueMail(tx, {
    kind: 'payment-failed', objectId: payment.id, recipient: order.contactEmail, orderId: order.id,
    payload: {
      contactName: order.contactName, orderRef, title: order.title, paymentKind: payment.kind, amountMinor: payment.amountMinor, currency: payment.currency,
      orderUrl: `${origin}/account/orders/${orderRef}`,
    },
  })
}
