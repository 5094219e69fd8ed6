import { randomUUID } from 'node:crypto'
import type { AcceptedQuote, EnquiryOutcome, OrderStatusView, QuoteView } from '#shared/schemas/quote'
import type { OpenedPayment } from '#shared/schemas/payment'
import { linkTokenIn, waitForMail } from './mailbox'
import { Visitor } from './visitor'

/** A usual requirement: quoted at once. */
export const usualRequirement = {
  kind: 'compression', need: { knows: 'two-loads', first: { forceN: 60, lengthMm: 50 }, second: { forceN: 150, lengthMm: 35 } }, boreMm: 25, rodMm: 17, couldHurt: 'no', quantities: [100, 500],
} as const

/** An address of its own for each test, so that mails and limits do not mix. */
export const newAddress = (name: string): string => `${name}.${randomUUID().slice(0, 8)}@tarnbeck.example`

/** Sends the order form. */
export async function placeEnquiry(visitor: Visitor, email: string, title = 'Bottle filler'): Promise<EnquiryOutcome> {
  const contact = { name: 'Ilse Varrow', firm: 'Tarnbeck', email, countryCode: 'IE', title }
  const { status, body } = await visitor.post<EnquiryOutcome>('/api/enquiries', { requirement: usualRequirement, contact }, { 'idempotency-key': randomUUID() })
  if (status !== 201) throw new Error(`the enquiry was answered ${status}: ${JSON.stringify(body)}`)
  return body
}

export type AcceptedOrder = { ref: string, key: string, email: string, customer: Visitor }

/** A customer with an accepted order who has not confirmed the address yet. */
export async function acceptOrder(email: string, baseUrl?: string): Promise<AcceptedOrder & { accepted: AcceptedQuote }> {
  const customer = new Visitor(baseUrl)
  const { ref, key } = await placeEnquiry(customer, email)
  const quote = await customer.get<QuoteView>(`/api/quotes/${ref}?key=${key}`)
  const { status, body } = await customer.post<AcceptedQuote>(`/api/quotes/${ref}/accept`, { quantity: 500, version: quote.body.version, key })
  if (status !== 200) throw new Error(`the acceptance was answered ${status}: ${JSON.stringify(body)}`)
  return { ref, key, email, customer, accepted: body }
}

/** A customer who has confirmed the address by the link in the mail, and is signed in. */
export async function orderReadyToPay(name: string, baseUrl?: string): Promise<AcceptedOrder> {
  const order = await acceptOrder(newAddress(name), baseUrl)
  const token = linkTokenIn(await waitForMail(order.email, /confirm your address/i))
  const { status, body } = await order.customer.post('/api/auth/use-link', { token })
  if (status !== 200) throw new Error(`the link was answered ${status}: ${JSON.stringify(body)}`)
  return order
}

/** Clicks on pay, and gives the id of Stripe's session. */
export async function openDeposit(order: AcceptedOrder): Promise<string> {
  const { status, body } = await order.customer.post<OpenedPayment>(`/api/orders/${order.ref}/pay`, { kind: 'deposit' })
  if (status !== 200) throw new Error(`paying was answered ${status}: ${JSON.stringify(body)}`)
  return sessionIdOf(body.url)
}

/** Stripe's session behind a pay page. */
export function sessionIdOf(url: string): string {
  const id = /(cs_[A-Za-z0-9_]+)/.exec(url)?.[1]
  if (!id) throw new Error(`no session in ${url}`)
  return id
}

/** The order as its customer sees it. */
export const orderView = async (order: AcceptedOrder): Promise<OrderStatusView> => (await order.customer.get<OrderStatusView>(`/api/orders/${order.ref}`)).body
