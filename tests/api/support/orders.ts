import { randomUUID } from 'node:crypto'
import type { RequirementInput } from '#shared/schemas/enquiry'
import type { AcceptedQuote, EnquiryOutcome, OrderStatusView, QuoteView } from '#shared/schemas/quote'
import type { OpenedPayment } from '#shared/schemas/payment'
import { linkTokenIn, waitForMail } from './mailbox'
import { Visitor } from './visitor'

const usual = { couldHurt: 'no' as const, quantities: [100, 500] }
/** A usual requirement: quoted at once. */
export const usualRequirement = {
  ...usual, kind: 'compression', need: { knows: 'two-loads', first: { forceN: 60, lengthMm: 50 }, second: { forceN: 150, lengthMm: 35 } }, boreMm: 25, rodMm: 17,
} satisfies RequirementInput
/** The same of the other kinds. */
export const usualExtension = {
  ...usual, kind: 'extension', need: { knows: 'two-loads', first: { forceN: 20, lengthMm: 60 }, second: { forceN: 60, lengthMm: 90 } }, boreMm: 20,
} satisfies RequirementInput
export const usualTorsion = {
  ...usual, kind: 'torsion', need: { knows: 'two-moments', first: { momentNmm: 300, angleDeg: 20 }, second: { momentNmm: 900, angleDeg: 110 } }, firstLegMm: 25, secondLegMm: 25, rodMm: 8,
} satisfies RequirementInput

/** An address of its own for each test, so that mails and limits do not mix. */
export const newAddress = (name: string): string => `${name}.${randomUUID().slice(0, 8)}@tarnbeck.example`

/** Sends the order form. */
export async function placeEnquiry(visitor: Visitor, email: string, title = 'Bottle filler', requirement: RequirementInput = usualRequirement): Promise<EnquiryOutcome> {
  const contact = { name: 'Ilse Varrow', firm: 'Tarnbeck', email, countryCode: 'IE', title }
  const { status, body } = await visitor.post<EnquiryOutcome>('/api/enquiries', { requirement, contact }, { 'idempotency-key': randomUUID() })
  if (status !== 201) throw new Error(`the enquiry was answered ${status}: ${JSON.stringify(body)}`)
  return body
}

export type AcceptedOrder = { ref: string, key: string, email: string, customer: Visitor }

/** A customer with an accepted order who has not confirmed the address yet. */
export async function acceptOrder(email: string, baseUrl?: string, requirement?: RequirementInput): Promise<AcceptedOrder & { accepted: AcceptedQuote }> {
  const customer = new Visitor(baseUrl)
  const { ref, key } = await placeEnquiry(customer, email, undefined, requirement)
  const quote = await customer.get<QuoteView>(`/api/quotes/${ref}?key=${key}`)
  const { status, body } = await customer.post<AcceptedQuote>(`/api/quotes/${ref}/accept`, { quantity: 500, version: quote.body.version, key })
  if (status !== 200) throw new Error(`the acceptance was answered ${status}: ${JSON.stringify(body)}`)
  return { ref, key, email, customer, accepted: body }
}

/** A customer who has confirmed the address by the link in the mail, and is signed in. */
export async function orderReadyToPay(name: string, baseUrl?: string, requirement?: RequirementInput): Promise<AcceptedOrder> {
  const order = await acceptOrder(newAddress(name), baseUrl, requirement)
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
