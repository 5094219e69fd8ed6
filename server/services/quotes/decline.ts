import type { OrderState } from '#shared/schemas/order-states'
import { inTransaction, type ServiceContext } from '../context'
import { enqueueMail } from '../mail/enqueue'
import { requireOwnOrder } from '../orders/access'
import { moveOrder } from '../orders/move'
import { orderRefOf } from '../orders/reference'

type Refusal = { ref: string, key?: string | undefined, version: number, reason: string }

/**
 * The customer does not want it, before or after it was quoted.
 * @throws DomainError not-found, conflict once it was accepted, stale
 */
export async function declineQuote(context: ServiceContext, { ref, key, version, reason }: Refusal): Promise<{ state: OrderState }> {
  const order = await requireOwnOrder(context, ref, key)
  return inTransaction(context.db, async (tx) => {
    await moveOrder(tx, {
      orderId: order.id, from: ['enquiry', 'quoted'], to: 'withdrawn', why: reason === '' ? 'The customer said no, thank you.' : `The customer said no: ${reason}`,
      personId: context.actor?.personId ?? null, now: context.now, version,
    })
    await enqueueMail(tx, {
      kind: 'order-withdrawn', objectId: order.id, recipient: order.contactEmail, orderId: order.id,
      payload: { contactName: order.contactName, orderRef: orderRefOf(order.number), title: order.title, withdrawnBy: 'customer', reason },
    })
    return { state: 'withdrawn' as const }
  })
}
