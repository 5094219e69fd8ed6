import type { MailInput } from '../../../emails/payloads'
import { toCurrency } from '#shared/money'
import type { Transaction } from '../../database/client'
import { enqueueMail } from '../mail/enqueue'
import type { OrderRecord } from '../orders/access'
import { orderRefOf } from '../orders/reference'
import { springWordsOf } from '../springs/stored-design'
import type { QuoteRecord } from './find-revision'
import type { RungAmounts } from './ladder'

type QuoteMail = { order: OrderRecord, quote: QuoteRecord, rungs: readonly RungAmounts[], quoteUrl: string }

/** Tells the customer that the quote is there, or that a new revision takes the place of the last. */
export async function mailQuote(tx: Transaction, kind: 'quote-ready' | 'quote-revised', mail: QuoteMail): Promise<void> {
  await enqueueMail(tx, { kind, objectId: mail.quote.id, recipient: mail.order.contactEmail, orderId: mail.order.id, payload: quotePayload(mail) })
}

function quotePayload({ order, quote, rungs, quoteUrl }: QuoteMail): MailInput<'quote-ready'> {
  if (!quote.design) throw new Error(`quote ${quote.id} was sent without a spring`)
  return {
    contactName: order.contactName, orderRef: orderRefOf(order.number), title: order.title, quoteUrl, revision: quote.revision, validUntil: quote.validUntil,
    currency: toCurrency(quote.currency), springWords: springWordsOf(quote.design), noteToCustomer: quote.noteToCustomer,
    ladder: [...rungs].sort((a, b) => a.quantity - b.quantity).map(({ quantity, unitPrice, grossMinor }) => ({ quantity, unitPrice, grossMinor })),
  }
}
