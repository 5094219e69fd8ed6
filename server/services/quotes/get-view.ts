import { eq } from 'drizzle-orm'
import type { QuoteView } from '#shared/schemas/quote'
import { people } from '../../database/schema'
import type { ServiceContext } from '../context'
import { addDays, toLocalTime } from '../../engine/planning'
import { readNumberRates } from '../../engine/pricing'
import { isOwnOrder, requireReadableOrder, type OrderRecord } from '../orders/access'
import { maskEmail } from '../orders/mask-email'
import { findPaymentStatus, paymentKindOf } from '../orders/payment-status'
import { orderRefOf } from '../orders/reference'
import { getCurrentPriceBook } from '../price-books/get-current'
import { getPriceBook } from '../price-books/get'
import { workingPointsOf } from '../springs/requirement'
import { findSentRevision, listRungs, type QuoteRecord } from './find-revision'
import { toLadder } from './ladder'
import { usageNotesOf } from './notes'
import { trimDecimals } from '../decimal-text'

/**
 * The quote as its customer reads it, by the link's key or signed in. While a person has to answer there is no spring and no
 * price in it, whatever the draft holds. Cost, margin and the estimator's sentences never leave by here.
 * @throws DomainError not-found for anyone else
 */
export async function getQuoteView(context: ServiceContext, { ref, key }: { ref: string, key?: string | undefined }): Promise<QuoteView> {
  const order = await requireReadableOrder(context, ref, key)
  const quote = order.state === 'enquiry' ? null : await findSentRevision(context.db, order.id)
  const { requirement } = order.request
  return {
    ref: orderRefOf(order.number), state: order.state, version: order.version, title: order.title, firm: order.firmName, contactName: order.contactName, couldHurt: order.couldHurt,
    ...await (quote ? describeSent(context, quote, order) : describeWaiting(context)),
    points: workingPointsOf(requirement), acceptedQuantity: order.acceptedQuantity, addressConfirmed: order.personId !== null,
    isSignedIn: isOwnOrder(context.actor, order), maskedEmail: maskEmail(order.contactEmail),
    answerBy: order.state === 'enquiry' ? order.answerBy?.toISOString() ?? null : null,
    reasons: order.state === 'enquiry' ? order.gateReasons.map(reason => reason.customerText) : [],
    payment: await findPaymentStatus(context.db, order.id, paymentKindOf(order.state)), request: requirement,
  }
}

type QuotePart = Pick<QuoteView, 'revision' | 'design' | 'currency' | 'taxPercent' | 'depositPercent' | 'validUntil' | 'depositBy' | 'sentAt' | 'checkedBy' | 'priceBookNumber' | 'noteToCustomer' | 'notes' | 'ladder'>

async function describeSent(context: ServiceContext, quote: QuoteRecord, order: OrderRecord): Promise<QuotePart> {
  const [book, rungs, checker] = await Promise.all([
    getPriceBook(context.db, quote.priceBookId),
    listRungs(context.db, quote.id),
    quote.sentBy ? context.db.select({ name: people.name }).from(people).where(eq(people.id, quote.sentBy)) : [],
  ])
  const sentOn = quote.sentAt ? toLocalTime(quote.sentAt.getTime(), context.timeZone).day : null
  return {
    revision: quote.revision, design: quote.design, currency: quote.currency, taxPercent: trimDecimals(quote.taxPercent), depositPercent: trimDecimals(quote.depositPercent), validUntil: quote.validUntil,
    depositBy: sentOn && addDays(sentOn, readNumberRates(book)['policy.deposit-hold-days']), sentAt: quote.sentAt?.toISOString() ?? null,
    checkedBy: checker[0]?.name ?? null, priceBookNumber: book.number, noteToCustomer: quote.noteToCustomer,
    notes: quote.design ? usageNotesOf(quote.design, order.request.requirement) : [], ladder: toLadder(rungs),
  }
}

async function describeWaiting(context: ServiceContext): Promise<QuotePart> {
  const { currency } = await getCurrentPriceBook(context)
  return {
    revision: '', design: null, currency, taxPercent: '0', depositPercent: '0', validUntil: null, depositBy: null, sentAt: null, checkedBy: null,
    priceBookNumber: null, noteToCustomer: '', notes: [], ladder: [],
  }
}
