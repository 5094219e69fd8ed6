import type Stripe from 'stripe'
import { and, eq } from 'drizzle-orm'
import { formatMoney, toCurrency } from '#shared/money/index'
import { orderEvents, orders } from '../../database/schema'
import type { Database, Transaction } from '../../database/client'
import { log } from '../../utils/log'
import { recordAudit } from '../audit/record'
import { inTransaction } from '../context'
import { ACCOUNTS } from './accounts'
import type { PaymentRow } from './attempts'
import type { PaymentDesk } from './desk'
import { postLedger } from './post-ledger'
import { accountOfCapture, lockPaymentOfIntent } from './sync-refund'
import type { SyncOutcome } from './sync'

/** Brings our record to what Stripe says of a dispute now. Money moves only by the balance transactions that Stripe itself booked. */
export async function syncDispute(db: Database, desk: PaymentDesk, disputeId: string): Promise<SyncOutcome> {
  const dispute = await desk.stripe.disputes.retrieve(disputeId)
  return inTransaction(db, tx => applyDispute(tx, dispute))
}

async function applyDispute(tx: Transaction, dispute: Stripe.Dispute): Promise<SyncOutcome> {
  const payment = await lockPaymentOfIntent(tx, dispute.payment_intent)
  if (!payment) return { outcome: 'not-ours', words: 'no payment of ours' }
  const amount = formatMoney(dispute.amount, toCurrency(payment.currency))
  await flagOnce(tx, payment, `dispute.created:${dispute.id}`, `The payment of ${amount} is disputed by the bank.`)

  const account = await accountOfCapture(tx, payment)
  // One booking of Stripe's with a minus is money taken away, one with a plus is money given back; each has an id of its own.
  for (const booking of dispute.balance_transactions) {
    if (booking.currency !== payment.currency) return { outcome: 'quarantined', words: `booked in ${booking.currency}` }
    await postLedger(tx, {
      orderId: payment.orderId, paymentId: payment.id, currency: payment.currency, fact: `dispute:${dispute.id}:${booking.id}`,
      words: booking.amount < 0 ? 'Disputed, taken by the bank' : 'Dispute won, given back',
      entries: [{ account, amountMinor: -booking.amount }, { account: ACCOUNTS.cash, amountMinor: booking.amount }],
    })
  }
  if (dispute.status === 'won' || dispute.status === 'lost') await flagOnce(tx, payment, `dispute.${dispute.status}:${dispute.id}`, `The dispute about ${amount} is ${dispute.status}.`)
  return { outcome: 'applied', words: `dispute is ${dispute.status}` }
}

/** Writes a step of a dispute into the order's history and the audit trail, once. The order's row is locked by the caller. */
async function flagOnce(tx: Transaction, payment: PaymentRow, action: string, words: string): Promise<void> {
  const [known] = await tx.select({ id: orderEvents.id }).from(orderEvents).where(and(eq(orderEvents.orderId, payment.orderId), eq(orderEvents.why, words))).limit(1)
  if (known) return
  const [order] = await tx.select({ state: orders.state }).from(orders).where(eq(orders.id, payment.orderId))
  if (!order) throw new Error(`payment ${payment.id} has no order`)
  await recordAudit(tx, { personId: null, action, object: payment.id, detail: words })
  await tx.insert(orderEvents).values({ orderId: payment.orderId, personId: null, fromState: order.state, toState: order.state, why: words })
  log.error('dispute', new Error(action), { payment: payment.id })
}
