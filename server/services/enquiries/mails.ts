import { and, eq, isNull } from 'drizzle-orm'
import type { GateReason } from '#shared/schemas/quote'
import { people, personRoles } from '../../database/schema'
import type { Transaction } from '../../database/client'
import { enqueueMail } from '../mail/enqueue'
import type { OrderRecord } from '../orders/access'
import { orderRefOf } from '../orders/reference'

/** Tells the customer that a person answers and by when, and each estimator that somebody waits. */
export async function mailEnquiryWaits(
  tx: Transaction,
  { order, reasons, answerBy, quoteUrl, origin }: { order: OrderRecord, reasons: readonly GateReason[], answerBy: Date | null, quoteUrl: string, origin: string },
): Promise<void> {
  const orderRef = orderRefOf(order.number)
  const answer = answerBy?.toISOString() ?? null
  await enqueueMail(tx, {
    kind: 'enquiry-waits', objectId: order.id, recipient: order.contactEmail, orderId: order.id,
    payload: { contactName: order.contactName, orderRef, title: order.title, quoteUrl, reasons: reasons.map(reason => reason.customerText), answerBy: answer },
  })
  for (const email of await listEstimators(tx)) {
    await enqueueMail(tx, {
      kind: 'staff-enquiry-waits', objectId: order.id, recipient: email, orderId: order.id,
      payload: { orderRef, title: order.title, firm: order.firmName, reasons: reasons.map(reason => reason.estimatorText), answerBy: answer, estimatingUrl: `${origin}/estimating/${orderRef}` },
    })
  }
}

async function listEstimators(tx: Transaction): Promise<string[]> {
  const rows = await tx.select({ email: people.email }).from(people).innerJoin(personRoles, eq(personRoles.personId, people.id))
    .where(and(eq(personRoles.role, 'estimator'), isNull(people.disabledAt)))
  return rows.map(row => row.email)
}
