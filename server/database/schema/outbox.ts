import { sql } from 'drizzle-orm'
import { index, integer, jsonb, pgTable, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core'
import { createdAt, id, moment } from './columns'
import { orders } from './orders'

/** An e-mail to be sent, written in the transaction of its cause; unique by kind, object, recipient and step. */
export const outbox = pgTable('outbox', {
  id: id(),
  kind: text('kind').notNull(),
  objectId: text('object_id').notNull(),
  recipient: text('recipient').notNull(),
  step: text('step').notNull().default(''),
  orderId: uuid('order_id').references(() => orders.id),
  payload: jsonb('payload').$type<unknown>().notNull(),
  createdAt: createdAt(),
  runAt: moment('run_at').notNull().defaultNow(),
  leasedUntil: moment('leased_until'),
  attempts: integer('attempts').notNull().default(0),
  sentAt: moment('sent_at'),
  skippedAt: moment('skipped_at'),
  deadAt: moment('dead_at'),
  lastError: text('last_error'),
}, t => [
  uniqueIndex('outbox_once').on(t.kind, t.objectId, t.recipient, t.step),
  index('outbox_due').on(t.runAt, t.id).where(sql`${t.sentAt} is null and ${t.deadAt} is null and ${t.skippedAt} is null`),
  index('outbox_order').on(t.orderId, t.createdAt),
])
