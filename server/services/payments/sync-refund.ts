import type Stripe from 'stripe'
import { and, eq } from 'drizzle-orm'
import { formatMoney, toCurrency } from '#shared/money/index'
import { auditLog, ledgerEntries, ledgerTransactions, orders, payments } from '../../database/schema'
import type { Database, Transaction } from '../../database/client'
import { log } from '../../utils/log'
import { recordAudit } from '../audit/record'
import { inTransaction } from '../context'
import { ACCOUNTS } from './accounts'
import type { PaymentRow } from './attempts'
import type { PaymentDesk } from './desk'
import { postLedger } from './post-ledger'
import type { SyncOutcome } from './sync'

/** Brings the books to what Stripe says of a refund now: booked once when it succeeds, and taken back when it fails after that. */
export async function syncRefund(db: Database, desk: PaymentDesk, refundId: string): Promise<SyncOutcome> {
  const refund = await desk.stripe.refunds.retrieve(refundId)
  return inTransaction(db, tx => applyRefund(tx, refund))
}

/** The same for every refund of a charge. Its cumulative amount is not looked at, so nothing is added twice. */
export async function syncRefundsOfCharge(db: Database, desk: PaymentDesk, chargeId: string): Promise<SyncOutcome> {
  let last: SyncOutcome = { outcome: 'not-ours', words: 'no refund of ours' }
  for await (const refund of desk.stripe.refunds.list({ charge: chargeId, limit: 100 })) last = await inTransaction(db, tx => applyRefund(tx, refund))
  return last
}

async function applyRefund(tx: Transaction, refund: Stripe.Refund): Promise<SyncOutcome> {
  const payment = await lockPaymentOfIntent(tx, refund.payment_intent)
  if (!payment) return { outcome: 'not-ours', words: 'no payment of ours' }
  if (refund.currency !== payment.currency || refund.amount > payment.amountMinor) {
    log.error('refund-quarantined', new Error('a refund that does not fit its payment'), { payment: payment.id, refund: refund.id })
    return { outcome: 'quarantined', words: `refund of ${refund.amount} ${refund.currency}` }
  }
  const account = await accountOfCapture(tx, payment)
  const posting = { orderId: payment.orderId, paymentId: payment.id, currency: payment.currency }
  const out = [{ account, amountMinor: refund.amount }, { account: ACCOUNTS.cash, amountMinor: -refund.amount }]
  if (refund.status === 'succeeded') {
    const isNew = await postLedger(tx, { ...posting, fact: `refund:${refund.id}`, words: 'Refunded', entries: out })
    return { outcome: 'applied', words: isNew ? 'refund booked' : 'booked already' }
  }
  if (refund.status !== 'failed' && refund.status !== 'canceled') return { outcome: 'applied', words: `refund is ${refund.status ?? 'without a state'}` }

  const [booked] = await tx.select({ id: ledgerTransactions.id }).from(ledgerTransactions).where(eq(ledgerTransactions.fact, `refund:${refund.id}`))
  const isReversed = booked ? await postLedger(tx, { ...posting, fact: `refund-failed:${refund.id}`, words: 'Refund failed, taken back', entries: out.map(entry => ({ ...entry, amountMinor: -entry.amountMinor })) }) : false
  await alertOnce(tx, payment, refund)
  return { outcome: 'applied', words: isReversed ? 'refund taken back' : 'refund failed' }
}

/** Several events tell of one failure; staff are alerted by the first. The order's row is locked by the caller. */
async function alertOnce(tx: Transaction, payment: PaymentRow, refund: Stripe.Refund): Promise<void> {
  const [known] = await tx.select({ id: auditLog.id }).from(auditLog).where(and(eq(auditLog.action, 'refund.failed'), eq(auditLog.object, refund.id))).limit(1)
  if (known) return
  await recordAudit(tx, { personId: null, action: 'refund.failed', object: refund.id, detail: `${formatMoney(refund.amount, toCurrency(payment.currency))} of payment ${payment.id} did not reach the customer.` })
  log.error('refund-failed', new Error(refund.failure_reason ?? 'no reason given'), { payment: payment.id, refund: refund.id })
}

/** The payment of an intent with its order, locked in the one order of locks; null when it is not ours. */
export async function lockPaymentOfIntent(tx: Transaction, intent: string | { id: string } | null): Promise<PaymentRow | null> {
  const intentId = typeof intent === 'string' ? intent : intent?.id
  if (!intentId) return null
  const [known] = await tx.select({ id: payments.id, orderId: payments.orderId }).from(payments).where(eq(payments.stripePaymentIntentId, intentId))
  if (!known) return null
  await tx.select({ id: orders.id }).from(orders).where(eq(orders.id, known.orderId)).for('update')
  const [payment] = await tx.select().from(payments).where(eq(payments.id, known.id)).for('update')
  return payment ?? null
}

/** The account that the capture of a payment was credited to: what goes back leaves the same one. */
export async function accountOfCapture(tx: Transaction, payment: PaymentRow): Promise<string> {
  const [row] = await tx.select({ account: ledgerEntries.account }).from(ledgerEntries).innerJoin(ledgerTransactions, eq(ledgerTransactions.id, ledgerEntries.transactionId))
    .where(eq(ledgerTransactions.fact, `capture:${payment.stripePaymentIntentId}`)).orderBy(ledgerEntries.amountMinor).limit(1)
  return row?.account ?? ACCOUNTS.credit
}
