import { and, eq } from 'drizzle-orm'
import type { EstimatingView } from '#shared/schemas/quote'
import { orders } from '../../database/schema'
import { recordAudit } from '../audit/record'
import { assertRole, inTransaction, type ServiceContext } from '../context'
import { conflict, notFound, stale } from '../errors'
import { findOrder } from '../orders/access'
import { getEstimatingView } from './get-view'

/**
 * Takes a waiting enquiry on, also from a colleague.
 * @throws DomainError not-found, conflict when nobody has to answer it, stale
 */
export async function assignToMe(context: ServiceContext, { ref, version }: { ref: string, version: number }): Promise<EstimatingView> {
  const actor = assertRole(context, 'estimator', 'admin')
  const order = await findOrder(context.db, ref)
  if (!order) throw notFound('enquiry')
  await inTransaction(context.db, async (tx) => {
    const [now] = await tx.select({ state: orders.state }).from(orders).where(eq(orders.id, order.id)).for('update')
    if (now?.state !== 'enquiry') throw conflict('This enquiry does not wait for anybody.')
    const taken = await tx.update(orders).set({ assignedTo: actor.personId, version: version + 1, updatedAt: context.now })
      .where(and(eq(orders.id, order.id), eq(orders.version, version))).returning({ id: orders.id })
    if (taken.length === 0) throw stale('enquiry')
    await recordAudit(tx, { personId: actor.personId, action: 'enquiry.assign', object: ref, detail: `Taken on by ${actor.name}.` })
  })
  return getEstimatingView(context, { ref })
}
