import { eq } from 'drizzle-orm'
import { groupThousands } from '#shared/money'
import type { AcceptedQuote } from '#shared/schemas/quote'
import { orders } from '../../database/schema'
import type { Transaction } from '../../database/client'
import { inTransaction, type ServiceContext } from '../context'
import { DomainError, invalid } from '../errors'
import { isOwnOrder, requireOwnOrder, type OrderRecord } from '../orders/access'
import { moveOrder } from '../orders/move'
import { shopDayOf } from '../orders/shop-plan'
import { confirmAddress } from '../sessions/confirm-address'
import { mailConfirmAddress } from './confirm-link'
import { findSentRevision, listRungs, type QuoteRecord } from './find-revision'

type Acceptance = { ref: string, key?: string | undefined, quantity: number, version: number }

/**
 * The customer takes one quantity of the sent revision, once: of many at the same time one succeeds. Who is signed in under
 * the order's address goes on to pay; anybody else confirms the address first by a link in an e-mail.
 * @throws DomainError not-found, conflict when it is not open for acceptance, stale, invalid for a quantity that was not quoted, gone when its time is over
 */
export async function acceptQuote(context: ServiceContext, { ref, key, quantity, version }: Acceptance): Promise<AcceptedQuote> {
  const order = await requireOwnOrder(context, ref, key)
  const today = shopDayOf(context)
  return inTransaction(context.db, async (tx) => {
    const quote = await findOpenQuote(tx, order.id)
    if (quote) await assertAcceptable(tx, quote, { quantity, today })
    const moved = await moveOrder(tx, {
      orderId: order.id, from: ['quoted'], to: 'accepted', why: `Accepted revision ${quote?.revision ?? ''}, ${groupThousands(String(quantity))} springs.`,
      personId: context.actor?.personId ?? null, now: context.now, version, set: { acceptedQuantity: quantity, acceptedQuoteId: quote?.id },
    })
    return { state: 'accepted', version: moved.version, next: await findNextStep(tx, context, order) }
  })
}

/** The revision that is open for acceptance, or null. Locks the order first, so that no other is sent in between. */
async function findOpenQuote(tx: Transaction, orderId: string): Promise<QuoteRecord | null> {
  const [locked] = await tx.select({ state: orders.state }).from(orders).where(eq(orders.id, orderId)).for('update')
  return locked?.state === 'quoted' ? findSentRevision(tx, orderId) : null
}

async function assertAcceptable(tx: Transaction, quote: QuoteRecord, { quantity, today }: { quantity: number, today: string }): Promise<void> {
  if (quote.validUntil < today) throw new DomainError('gone', `This quote stood until ${quote.validUntil}. Ask us, and we send it again with today’s price.`)
  const rungs = await listRungs(tx, quote.id)
  if (!rungs.some(rung => rung.quantity === quantity))
    throw invalid('quantity', `This quote has prices for ${rungs.map(rung => groupThousands(String(rung.quantity))).join(', ')} springs. Choose one of them.`)
}

/** Who is signed in as the owner goes on to pay; anybody else is sent the link that confirms the address and signs in. */
async function findNextStep(tx: Transaction, { actor }: ServiceContext, order: OrderRecord): Promise<AcceptedQuote['next']> {
  if (!isOwnOrder(actor, order)) {
    await mailConfirmAddress(tx, order.id)
    return 'confirm-address'
  }
  if (order.personId === null) await confirmAddress(tx, { email: order.contactEmail, orderId: order.id })
  return 'pay'
}
