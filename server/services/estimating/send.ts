import { eq } from 'drizzle-orm'
import type { z } from 'zod'
import { formatMoney, groupThousands, minimumChargeMinor, toCurrency } from '#shared/money'
import type { EstimatingView, sendQuoteBodySchema } from '#shared/schemas/quote'
import { orders } from '../../database/schema'
import { addDays } from '../../engine/planning'
import { rateText, readNumberRates } from '../../engine/pricing'
import { listCatalogueWires } from '../catalogue/list-wires'
import { assertRole, inTransaction, type Actor, type ServiceContext } from '../context'
import { conflict, DomainError, invalid, notFound } from '../errors'
import { createOrderAccess, findOrder, quoteUrlOf } from '../orders/access'
import { moveOrder } from '../orders/move'
import { readShopPlan, shopDayOf } from '../orders/shop-plan'
import { getPriceBook } from '../price-books/get'
import type { StoredPriceBook } from '../price-books/read-book'
import type { QuoteRecord } from '../quotes/find-revision'
import { mailQuote } from '../quotes/mails'
import { markSent } from '../quotes/mark-sent'
import type { StoredRung } from './computed-price'
import { getEstimatingView, marginOf } from './get-view'
import { openDraft } from './open-draft'
import { refreshDates } from './refresh-dates'

/**
 * Sends the draft to the customer, with a link of its own. From here on it never changes; the revision before it is superseded.
 * @throws DomainError not-found, conflict without a draft or a spring, stale, forbidden under the margin floor unless an administrator sends it
 */
export async function sendQuote(context: ServiceContext, { ref, version, noteToCustomer }: { ref: string } & z.output<typeof sendQuoteBodySchema>): Promise<EstimatingView> {
  const actor = assertRole(context, 'estimator', 'admin')
  const known = await findOrder(context.db, ref)
  if (!known) throw notFound('enquiry')
  const [wires, plan] = await Promise.all([listCatalogueWires(context.db), readShopPlan(context.db)])

  await inTransaction(context.db, async (tx) => {
    // The order is locked before its quote everywhere, so that accepting and sending cannot lock each other out.
    await tx.select({ id: orders.id }).from(orders).where(eq(orders.id, known.id)).for('update')
    const { order, quote, rungs } = await openDraft(tx, { ref, version })
    const book = await getPriceBook(context.db, quote.priceBookId)
    assertSendable(quote, rungs, book, actor)

    const dated = await refreshDates(tx, rungs, { quote, book, wire: wires.find(wire => wire.id === quote.wireProductId), plan, clock: context })
    const validUntil = addDays(shopDayOf(context), readNumberRates(book)['policy.quote-validity-days'])
    const sent = await markSent(tx, { quote, personId: actor.personId, now: context.now, set: { noteToCustomer, validUntil } })
    await moveOrder(tx, { orderId: order.id, from: ['enquiry', 'expired'], to: 'quoted', why: `Quoted, revision ${quote.revision}.`, personId: actor.personId, now: context.now })
    const key = await createOrderAccess(tx, order.id)
    await mailQuote(tx, quote.revision === 'A' ? 'quote-ready' : 'quote-revised', { order, quote: sent, rungs: dated.map(({ rung }) => rung), quoteUrl: quoteUrlOf(context.origin, ref, key) })
  })
  return getEstimatingView(context, { ref })
}

function assertSendable(quote: QuoteRecord, rungs: readonly StoredRung[], book: StoredPriceBook, actor: Actor): void {
  if (!quote.design || rungs.length === 0) throw conflict('There is no spring to quote yet. Agree on a change with the customer, or withdraw the enquiry with a reason.')
  const currency = toCurrency(quote.currency)
  const cheap = rungs.find(({ rung }) => rung.grossMinor < minimumChargeMinor(currency))
  if (cheap) throw invalid('version', `${springs(cheap)} would cost ${formatMoney(cheap.rung.grossMinor, currency)}, less than a card payment may be (${formatMoney(minimumChargeMinor(currency), currency)}).`)
  const floor = { floorPercent: rateText(book, 'policy.margin-floor-percent'), currency }
  const below = rungs.find(stored => marginOf(stored, floor).belowFloor)
  if (below && !actor.roles.includes('admin'))
    throw new DomainError('forbidden', `The margin of ${springs(below)} is ${marginOf(below, floor).marginPercent} %, under the floor of ${floor.floorPercent} %. An administrator has to send this quote.`)
}

const springs = ({ rung }: StoredRung) => rung.quantity === 1 ? '1 spring' : `${groupThousands(String(rung.quantity))} springs`
