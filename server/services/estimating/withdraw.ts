import type { z } from 'zod'
import type { EstimatingView, withdrawBodySchema } from '#shared/schemas/quote'
import { assertRole, inTransaction, type ServiceContext } from '../context'
import { notFound } from '../errors'
import { enqueueMail } from '../mail/enqueue'
import { findOrder } from '../orders/access'
import { moveOrder } from '../orders/move'
import { getEstimatingView } from './get-view'

/**
 * Declines an enquiry, or takes a quote back before it is accepted. The customer is told the reason.
 * @throws DomainError not-found, conflict once it was accepted, stale
 */
export async function withdrawEnquiry(context: ServiceContext, { ref, version, reason }: { ref: string } & z.output<typeof withdrawBodySchema>): Promise<EstimatingView> {
  const actor = assertRole(context, 'estimator', 'admin')
  const order = await findOrder(context.db, ref)
  if (!order) throw notFound('enquiry')
  await inTransaction(context.db, async (tx) => {
    await moveOrder(tx, { orderId: order.id, from: ['enquiry', 'quoted'], to: 'withdrawn', why: reason, personId: actor.personId, now: context.now, version })
    await enqueueMail(tx, {
      kind: 'order-withdrawn', objectId: order.id, recipient: order.contactEmail, orderId: order.id,
      payload: { contactName: order.contactName, orderRef: ref, title: order.title, withdrawnBy: 'works', reason },
    })
  })
  return getEstimatingView(context, { ref })
}
