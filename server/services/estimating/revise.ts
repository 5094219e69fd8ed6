import { eq } from 'drizzle-orm'
import type { EstimatingView } from '#shared/schemas/quote'
import { orders, quotes } from '../../database/schema'
import type { Transaction } from '../../database/client'
import { assertRole, inTransaction, type ServiceContext } from '../context'
import { trimDecimals } from '../decimal-text'
import { conflict, notFound } from '../errors'
import { findOrder } from '../orders/access'
import { moveOrder } from '../orders/move'
import { answerByOf, readShopPlan } from '../orders/shop-plan'
import { findWorkingRevision, type QuoteRecord } from '../quotes/find-revision'
import { writeRungs, type NewLine } from '../quotes/write-rungs'
import { getEstimatingView } from './get-view'
import { readStoredRungs } from './open-draft'

/**
 * Makes the next revision as a draft that starts as a copy of the sent one, changes and reasons included. The order is an
 * enquiry again until it is sent, so that nobody accepts what is being changed.
 * @throws DomainError not-found, conflict unless a quote is out and not accepted, stale
 */
export async function reviseQuote(context: ServiceContext, { ref, version }: { ref: string, version: number }): Promise<EstimatingView> {
  const actor = assertRole(context, 'estimator', 'admin')
  const order = await findOrder(context.db, ref)
  if (!order) throw notFound('enquiry')
  const plan = await readShopPlan(context.db)
  await inTransaction(context.db, async (tx) => {
    await tx.select({ id: orders.id }).from(orders).where(eq(orders.id, order.id)).for('update')
    const sent = await findWorkingRevision(tx, order.id)
    if (!sent || sent.state === 'draft') throw conflict('There is a draft already. Change that one.')
    const revision = nextRevision(sent.revision)
    await moveOrder(tx, {
      orderId: order.id, from: ['quoted'], to: 'enquiry', why: `Revision ${revision} is being made.`, personId: actor.personId, now: context.now, version,
      set: { answerBy: answerByOf(plan, context), assignedTo: actor.personId },
    })
    await copyRevision(tx, sent, { revision, createdBy: actor.personId })
  })
  return getEstimatingView(context, { ref })
}

async function copyRevision(tx: Transaction, sent: QuoteRecord, { revision, createdBy }: { revision: string, createdBy: string }): Promise<void> {
  const [draft] = await tx.insert(quotes).values({
    orderId: sent.orderId, revision, priceBookId: sent.priceBookId, wireProductId: sent.wireProductId, design: sent.design, marginPercentOverride: sent.marginPercentOverride,
    marginReason: sent.marginReason, currency: sent.currency, depositPercent: sent.depositPercent, taxPercent: sent.taxPercent, noteToCustomer: sent.noteToCustomer,
    validUntil: sent.validUntil, createdBy,
  }).returning({ id: quotes.id })
  const rungs = await readStoredRungs(tx, sent.id)
  await writeRungs(tx, draft!.id, rungs.map(({ rung, lines }) => ({ ...rung, lines: lines.map(line => ({ ...line, rate: trimDecimals(line.rate) }) as NewLine) })))
}

/** A is followed by B, Z by AA. */
export function nextRevision(revision: string): string {
  const last = revision.at(-1) ?? ''
  const before = revision.slice(0, -1)
  if (last === '') return 'A'
  return last === 'Z' ? `${nextRevision(before)}A` : before + String.fromCharCode(last.charCodeAt(0) + 1)
}
