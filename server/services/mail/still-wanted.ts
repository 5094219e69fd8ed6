import { and, eq, gt } from 'drizzle-orm'
import type { OrderState } from '#shared/schemas/order-states'
import type { MailKind } from '../../../emails/payloads'
import type { Database } from '../../database/client'
import { emailTokens, orders, outbox, payments } from '../../database/schema'

type Row = Pick<typeof outbox.$inferSelect, 'orderId' | 'objectId' | 'recipient' | 'createdAt' | 'payload'>

/** A sign-in link that could not be sent for this long is no longer waited for. */
const SIGN_IN_WANTED_MINUTES = 60
const ENDED: readonly OrderState[] = ['withdrawn', 'expired', 'cancelled']

/**
 * Looks at the cause again just before a mail goes out: nobody is asked for what they have done, or told of what is over.
 * @returns why it is not wanted any more, or null to send it
 */
export async function findReasonToSkip(db: Database, kind: MailKind, row: Row): Promise<string | null> {
  if (kind === 'sign-in-link') return Date.now() - row.createdAt.getTime() > SIGN_IN_WANTED_MINUTES * 60_000 ? 'asked for too long ago' : null
  if (row.orderId === null) return null
  const [order] = await db.select({ state: orders.state }).from(orders).where(eq(orders.id, row.orderId))
  if (!order) return 'the order is gone'
  const isEnded = ENDED.includes(order.state)
  switch (kind) {
    case 'quote-ready': case 'quote-revised':
      return isEnded ? 'the order has ended' : order.state === 'enquiry' ? 'the quote was taken back' : null
    case 'enquiry-waits': case 'staff-enquiry-waits':
      return order.state === 'enquiry' ? null : 'it was answered meanwhile'
    case 'confirm-address':
      return isEnded ? 'the order has ended' : await isConfirmedSince(db, row.orderId, row.createdAt) ? 'the address was confirmed meanwhile' : null
    case 'payment-failed':
      return isEnded ? 'the order has ended' : await isPaid(db, row.orderId, kindOfPayment(row.payload)) ? 'it is paid meanwhile' : null
    case 'job-finished':
      return asksForBalance(row.payload) && await isPaid(db, row.orderId, 'balance') ? 'the balance is paid' : null
    case 'job-planned': case 'job-date-changed': case 'job-in-work':
      return isEnded ? 'the order has ended' : null
    default:
      return null
  }
}

/** True where a link of this order was used after the mail was written. One confirmed earlier says nothing: the link also signs in. */
async function isConfirmedSince(db: Database, orderId: string, since: Date): Promise<boolean> {
  const rows = await db.select({ usedAt: emailTokens.usedAt }).from(emailTokens)
    .where(and(eq(emailTokens.orderId, orderId), eq(emailTokens.purpose, 'confirm-address'), gt(emailTokens.usedAt, since))).limit(1)
  return rows.length > 0
}

async function isPaid(db: Database, orderId: string, kind: 'deposit' | 'balance'): Promise<boolean> {
  const rows = await db.select({ id: payments.id }).from(payments).where(and(eq(payments.orderId, orderId), eq(payments.kind, kind), eq(payments.state, 'paid')))
  return rows.length > 0
}

const kindOfPayment = (payload: unknown) => (Object(payload) as { paymentKind?: unknown }).paymentKind === 'balance' ? 'balance' : 'deposit'
const asksForBalance = (payload: unknown) => Number((Object(payload) as { balanceMinor?: unknown }).balanceMinor) > 0
