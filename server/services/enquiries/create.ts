import type { EnquiryRequest } from '#shared/schemas/enquiry'
import type { EnquiryOutcome } from '#shared/schemas/quote'
import { orders } from '../../database/schema'
import type { Transaction } from '../../database/client'
import type { PricedCustomer } from '../../engine/pricing'
import { inTransaction, type ServiceContext } from '../context'
import { answerOnce, findFirstAnswer, type RepeatableRequest } from '../idempotency/replay'
import { createOrderAccess, quoteUrlOf } from '../orders/access'
import { moveOrder, recordOrderStart } from '../orders/move'
import { orderRefOf } from '../orders/reference'
import { rungAmountsOf } from '../orders/rung-amounts'
import { answerByOf } from '../orders/shop-plan'
import { workOut, type WorkedOut } from '../orders/work-out'
import { mailQuote } from '../quotes/mails'
import { markSent } from '../quotes/mark-sent'
import { writeFirstRevision } from '../quotes/write-first-revision'
import { mailEnquiryWaits } from './mails'

const OUTCOME_SCOPE = 'enquiry'

/**
 * Takes an order form. A usual enquiry is quoted in the same transaction; an unusual one waits for a person with the
 * reasons and whatever could be worked out. `clientKey` makes a repeated request give the first outcome again.
 * @throws DomainError invalid when the client key came with other values before, conflict while the first is at work
 */
export async function createEnquiry(context: ServiceContext, { request, clientKey }: { request: EnquiryRequest, clientKey: string }): Promise<EnquiryOutcome> {
  const repeatable: RepeatableRequest = { scope: OUTCOME_SCOPE, clientKey, payload: request }
  const first = await findFirstAnswer(context.db, repeatable)
  if (first !== null) return JSON.parse(first) as EnquiryOutcome

  const worked = await workOut(context, request.requirement, customerOf(request))
  const answer = await inTransaction(context.db, tx => answerOnce(tx, repeatable, async () => JSON.stringify(await storeEnquiry(tx, context, request, worked))))
  return JSON.parse(answer) as EnquiryOutcome
}

const customerOf = ({ contact }: EnquiryRequest): PricedCustomer => ({ country: contact.countryCode, vatNumberGiven: contact.vatNumber !== undefined })

async function storeEnquiry(tx: Transaction, context: ServiceContext, request: EnquiryRequest, worked: WorkedOut): Promise<EnquiryOutcome> {
  const isQuotedAtOnce = worked.reasons.length === 0
  const answerBy = isQuotedAtOnce ? null : answerByOf(worked.plan, context)
  const order = await insertOrder(tx, context, request, worked, answerBy)
  const ref = orderRefOf(order.number)
  await recordOrderStart(tx, { orderId: order.id, why: 'The order form was sent.', personId: order.personId, now: context.now })
  const key = await createOrderAccess(tx, order.id)
  const quoteUrl = quoteUrlOf(context.origin, ref, key)
  const quote = await writeFirstRevision(tx, { orderId: order.id, worked, customer: customerOf(request), clock: context })

  if (isQuotedAtOnce) {
    const sent = await markSent(tx, { quote, personId: null, now: context.now })
    await moveOrder(tx, { orderId: order.id, from: ['enquiry'], to: 'quoted', why: `Quoted at once, revision ${quote.revision}.`, personId: null, now: context.now })
    await mailQuote(tx, 'quote-ready', { order, quote: sent, rungs: worked.rungs.map(rungAmountsOf), quoteUrl })
  }
  else {
    await mailEnquiryWaits(tx, { order, reasons: worked.reasons, answerBy, quoteUrl, origin: context.origin })
  }
  return {
    ref, key, quoteUrl, outcome: isQuotedAtOnce ? 'quoted' : 'waiting',
    reasons: worked.reasons.map(reason => reason.customerText), answerBy: answerBy?.toISOString() ?? null,
  }
}

async function insertOrder(tx: Transaction, { actor, now }: ServiceContext, request: EnquiryRequest, worked: WorkedOut, answerBy: Date | null) {
  const { contact, requirement } = request
  // A signed-in customer who gives the own address need not confirm it again.
  const owner = actor && actor.email === contact.email && actor.roles.includes('customer') ? actor : null
  const [order] = await tx.insert(orders).values({
    companyId: owner?.companyId ?? null, personId: owner?.personId ?? null,
    contactName: contact.name, contactEmail: contact.email, firmName: contact.firm, countryCode: contact.countryCode, vatNumber: contact.vatNumber ?? null, title: contact.title,
    request, gateReasons: worked.reasons, couldHurt: requirement.couldHurt !== 'no', neededOn: requirement.neededOn ?? null, answerBy, createdAt: now,
  }).returning()
  return order!
}
