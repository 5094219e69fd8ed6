import { and, eq, ne } from 'drizzle-orm'
import { formatMoney, toCurrency } from '#shared/money/index'
import { ledgerTransactions, orderEvents, orders, payments } from '../../database/schema'
import type { Transaction } from '../../database/client'
import { log } from '../../utils/log'
import { recordAudit } from '../audit/record'
import { createJob } from '../jobs/create'
import { moveOrder } from '../orders/move'
import { ACCOUNTS } from './accounts'
import { PAYABLE_IN } from './amount-due'
import type { PaymentRow } from './attempts'
import type { PaymentDesk } from './desk'
import { postLedger } from './post-ledger'
import { settleIfPaid } from './settle-order'
import { tellDepositReceived } from './tell-deposit-received'

export type Capture = {
  /** Both rows locked by the caller, the order first. */
  order: typeof orders.$inferSelect, payment: PaymentRow
  fact: string, sessionId: string, paymentIntentId: string | null
  /** When the money came; now, unless it is booked later. */
  now?: Date
}

/**
 * Books a capture: payment, ledger, order, job with its routing and wire, and the e-mail, all in the caller's transaction. Booking
 * the same fact again changes nothing. Money for an order that cannot take it any more is held as the customer's credit, and shown.
 * @returns what was done, for the record
 */
export async function bookCapture(tx: Transaction, desk: PaymentDesk, capture: Capture): Promise<string> {
  const { order, payment, fact } = capture
  const [booked] = await tx.select({ id: ledgerTransactions.id }).from(ledgerTransactions).where(eq(ledgerTransactions.fact, fact))
  if (booked) return 'booked already'

  const now = capture.now ?? new Date()
  const isFirst = await markPaid(tx, capture, now)
  const isWanted = isFirst && PAYABLE_IN[payment.kind].includes(order.state)
  const account = !isWanted ? ACCOUNTS.credit : payment.kind === 'deposit' ? ACCOUNTS.deposits : ACCOUNTS.balances
  const words = `${payment.kind === 'deposit' ? 'Deposit' : 'Balance'} received by card${isWanted ? '' : ', held as credit'}`
  const isNew = await postLedger(tx, {
    orderId: order.id, paymentId: payment.id, fact, words, at: now, currency: payment.currency,
    entries: [{ account: ACCOUNTS.cash, amountMinor: payment.amountMinor }, { account, amountMinor: -payment.amountMinor }],
  })
  if (!isNew) throw new Error(`${fact} was booked beside the lock of its order`)

  if (!isWanted) {
    await holdAsCredit(tx, capture, now)
    return 'held as credit'
  }
  if (payment.kind === 'balance') {
    await settleIfPaid(tx, { orderId: order.id, now })
    return 'balance booked'
  }
  await moveOrder(tx, { orderId: order.id, from: ['accepted'], to: 'deposit-paid', why: 'Deposit received', personId: null, now })
  const { jobRef } = await createJob(tx, { orderId: order.id, now })
  await tellDepositReceived(tx, desk, { order, payment })
  return `deposit booked, ${jobRef} made`
}

/** Marks the attempt as paid. False when another attempt of the kind was paid before: this money came twice. */
async function markPaid(tx: Transaction, { order, payment, sessionId, paymentIntentId }: Capture, now: Date): Promise<boolean> {
  const [other] = await tx.select({ id: payments.id }).from(payments)
    .where(and(eq(payments.orderId, order.id), eq(payments.kind, payment.kind), eq(payments.state, 'paid'), ne(payments.id, payment.id)))
  await tx.update(payments).set({ stripeSessionId: sessionId, stripePaymentIntentId: paymentIntentId, ...(other ? {} : { state: 'paid' as const, paidAt: now }) }).where(eq(payments.id, payment.id))
  return !other
}

/** Staff see it in the order's history and in the audit trail; whoever watches the log is alarmed. */
async function holdAsCredit(tx: Transaction, { order, payment, fact }: Capture, now: Date): Promise<void> {
  const amount = formatMoney(payment.amountMinor, toCurrency(payment.currency))
  await tx.insert(orderEvents).values({ orderId: order.id, at: now, personId: null, fromState: order.state, toState: order.state, why: `${amount} arrived when no ${payment.kind} was due. It is held as credit.` })
  await recordAudit(tx, { personId: null, action: 'payment.credit', object: payment.id, detail: `${fact}: ${amount} held as credit, the order was ${order.state}.` })
  log.error('payment-held-as-credit', new Error(`the order was ${order.state}`), { payment: payment.id })
}
