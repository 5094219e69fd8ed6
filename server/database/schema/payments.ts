import { sql } from 'drizzle-orm'
import { bigint, check, index, integer, jsonb, pgEnum, pgTable, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core'
import { PAYMENT_KINDS, PAYMENT_STATES } from '../../../shared/schemas/payment'
import { amountMinor, createdAt, id, moment } from './columns'
import { orders } from './orders'

export const paymentKind = pgEnum('payment_kind', PAYMENT_KINDS)
export const paymentState = pgEnum('payment_state', PAYMENT_STATES)
export const stripeEventState = pgEnum('stripe_event_state', ['waiting', 'done', 'ignored', 'quarantined', 'dead'])

/** One attempt to be paid. It is committed before Stripe is called, so that a crash leaves something to reconcile. */
export const payments = pgTable('payments', {
  id: id(),
  orderId: uuid('order_id').notNull().references(() => orders.id),
  kind: paymentKind('kind').notNull(),
  attempt: integer('attempt').notNull(),
  state: paymentState('state').notNull().default('opening'),
  amountMinor: amountMinor('amount_minor').notNull(),
  currency: text('currency').notNull(),
  idempotencyKey: text('idempotency_key').notNull().unique(),
  stripeSessionId: text('stripe_session_id').unique(),
  stripePaymentIntentId: text('stripe_payment_intent_id').unique(),
  url: text('url'),
  expiresAt: moment('expires_at').notNull(),
  paidAt: moment('paid_at'),
  createdAt: createdAt(),
}, t => [
  uniqueIndex('payments_attempt').on(t.orderId, t.kind, t.attempt),
  uniqueIndex('payments_one_open').on(t.orderId, t.kind).where(sql`${t.state} in ('opening', 'open', 'processing')`),
  uniqueIndex('payments_one_paid').on(t.orderId, t.kind).where(sql`${t.state} = 'paid'`),
  index('payments_unfinished').on(t.createdAt).where(sql`${t.state} in ('opening', 'open', 'processing')`),
  check('payments_paid', sql`(${t.state} = 'paid') = (${t.paidAt} is not null)`),
  check('payments_amount', sql`${t.amountMinor} > 0`),
])

/** Stripe's events as they arrived, stored before they are acted on. */
export const stripeEvents = pgTable('stripe_events', {
  id: text('id').primaryKey(),
  type: text('type').notNull(),
  payload: jsonb('payload').$type<unknown>().notNull(),
  state: stripeEventState('state').notNull().default('waiting'),
  outcome: text('outcome'),
  attempts: integer('attempts').notNull().default(0),
  runAt: moment('run_at').notNull().defaultNow(),
  receivedAt: moment('received_at').notNull().defaultNow(),
  doneAt: moment('done_at'),
}, t => [index('stripe_events_waiting').on(t.runAt, t.id).where(sql`${t.state} = 'waiting'`)])

/** Append-only double entry: the entries of a transaction sum to nought per currency, checked at commit. */
export const ledgerTransactions = pgTable('ledger_transactions', {
  id: bigint('id', { mode: 'number' }).generatedAlwaysAsIdentity().primaryKey(),
  at: moment('at').notNull().defaultNow(),
  orderId: uuid('order_id').notNull().references(() => orders.id),
  paymentId: uuid('payment_id').references(() => payments.id),
  /** The fact that was booked, such as capture:pi_123; unique, so that no fact is booked twice. */
  fact: text('fact').notNull().unique(),
  words: text('words').notNull(),
}, t => [index('ledger_transactions_order').on(t.orderId)])

export const ledgerEntries = pgTable('ledger_entries', {
  id: bigint('id', { mode: 'number' }).generatedAlwaysAsIdentity().primaryKey(),
  transactionId: bigint('transaction_id', { mode: 'number' }).notNull().references(() => ledgerTransactions.id),
  account: text('account').notNull(),
  /** Positive is debit, negative is credit. */
  amountMinor: amountMinor('amount_minor').notNull(),
  currency: text('currency').notNull(),
}, t => [index('ledger_entries_transaction').on(t.transactionId), index('ledger_entries_account').on(t.account)])
