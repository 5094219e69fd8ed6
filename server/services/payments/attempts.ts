import { and, desc, eq, inArray, sql } from 'drizzle-orm'
import type { PaymentKind } from '#shared/schemas/payment'
import type { Transaction } from '../../database/client'
import { orders, payments } from '../../database/schema'
import { minimumChargeMinor, toChargeAmount } from '#shared/money/index'
import { conflict, notFound } from '../errors'
import { findAmountDue, PAYABLE_IN, type AmountDue } from './amount-due'

export type PaymentRow = typeof payments.$inferSelect
export const UNFINISHED = ['opening', 'open', 'processing'] as const

/** Stripe takes 30 minutes to 24 hours; the hour less leaves room to send an attempt again after a crash. */
const SESSION_HOURS = 23
/** A session that ends sooner than this is not worth sending anybody to. */
const LEAST_LEFT_MS = 5 * 60_000

/** What to do about a customer who wants to pay: an attempt to open, one whose page is there, or one to close first. */
export type NextStep =
  | { do: 'open', payment: PaymentRow, isNew: boolean }
  | { do: 'reuse', url: string }
  | { do: 'close', payment: PaymentRow }

/**
 * Decides, with the order locked, which attempt a customer who wants to pay is sent to, and writes a new one where there is none.
 * @throws DomainError conflict when nothing of this kind is to be paid now
 */
export async function takeAttempt(tx: Transaction, orderId: string, kind: PaymentKind, now: Date): Promise<NextStep> {
  const [order] = await tx.select({ state: orders.state }).from(orders).where(eq(orders.id, orderId)).for('update')
  if (!order) throw notFound('order')
  const attempts = await tx.select().from(payments).where(and(eq(payments.orderId, orderId), eq(payments.kind, kind))).orderBy(desc(payments.attempt)).for('update')
  if (attempts.some(one => one.state === 'paid')) throw conflict(`The ${kind} is paid already. Nothing more is asked for.`)
  if (attempts.some(one => one.state === 'processing')) throw conflict('Your payment is on its way and not yet confirmed. There is no need to pay again.')
  if (!PAYABLE_IN[kind].includes(order.state)) throw conflict(kind === 'deposit' ? 'This order takes no deposit just now.' : 'The balance is asked for when the springs are finished.')

  const due = await requireAmountDue(tx, orderId, kind)
  const live = attempts.find(one => one.state === 'opening' || one.state === 'open')
  if (live) {
    const fits = live.amountMinor === due.amountMinor && live.currency === due.currency && live.expiresAt.getTime() - now.getTime() > LEAST_LEFT_MS
    if (!fits) return { do: 'close', payment: live }
    return live.state === 'open' && live.url ? { do: 'reuse', url: live.url } : { do: 'open', payment: live, isNew: false }
  }
  const attempt = (attempts[0]?.attempt ?? 0) + 1
  const [payment] = await tx.insert(payments).values({
    orderId, kind, attempt, ...due, idempotencyKey: `order-${orderId}-${kind}-${attempt}`, expiresAt: sql`date_trunc('second', now()) + make_interval(hours => ${SESSION_HOURS})`,
  }).returning()
  return { do: 'open', payment: payment!, isNew: true }
}

async function requireAmountDue(tx: Transaction, orderId: string, kind: PaymentKind): Promise<AmountDue> {
  const due = await findAmountDue(tx, orderId, kind)
  if (!due || due.amountMinor === 0) throw conflict('Nothing is to be paid now.')
  if (due.amountMinor < minimumChargeMinor(due.currency)) throw conflict('This sum is too small for a card. Write to us and we settle it another way.')
  return toDue(toChargeAmount(due.amountMinor, due.currency))
}
const toDue = ({ amount, currency }: ReturnType<typeof toChargeAmount>): AmountDue => ({ amountMinor: amount, currency })

/** Keeps the page of an attempt, unless another process or the webhook was quicker. */
export async function storeSession(tx: Pick<Transaction, 'update'>, paymentId: string, session: { id: string, url: string | null }): Promise<void> {
  await tx.update(payments).set({ state: 'open', stripeSessionId: session.id, url: session.url }).where(and(eq(payments.id, paymentId), eq(payments.state, 'opening')))
}

/** The attempts of an order that may still bring money. */
export const isUnfinished = () => inArray(payments.state, [...UNFINISHED])
