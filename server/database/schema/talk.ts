import { sql } from 'drizzle-orm'
import { boolean, check, index, pgTable, primaryKey, text, uuid } from 'drizzle-orm/pg-core'
import { createdAt, id, moment } from './columns'
import { orders } from './orders'
import { people } from './people'

/** A line from one colleague to the others about an enquiry; the customer never sees it. Append-only. */
export const orderNotes = pgTable('order_notes', {
  id: id(),
  orderId: uuid('order_id').notNull().references(() => orders.id),
  personId: uuid('person_id').notNull().references(() => people.id),
  createdAt: createdAt(),
  text: text('text').notNull(),
}, t => [index('order_notes_order').on(t.orderId, t.createdAt, t.id), check('order_notes_text', sql`length(${t.text}) between 1 and 4000`)])

/** A question or an answer between the shop and the customer of an order. Append-only. */
export const orderMessages = pgTable('order_messages', {
  id: id(),
  orderId: uuid('order_id').notNull().references(() => orders.id),
  fromCustomer: boolean('from_customer').notNull(),
  /** Who of the shop wrote it; null for the customer, who may have no account. */
  personId: uuid('person_id').references(() => people.id),
  createdAt: createdAt(),
  text: text('text').notNull(),
}, t => [
  index('order_messages_order').on(t.orderId, t.createdAt, t.id),
  check('order_messages_text', sql`length(${t.text}) between 1 and 4000`),
  check('order_messages_author', sql`${t.fromCustomer} or ${t.personId} is not null`),
])

/** Who of the shop has an enquiry open just now, so that two know of each other. */
export const orderViewers = pgTable('order_viewers', {
  orderId: uuid('order_id').notNull().references(() => orders.id, { onDelete: 'cascade' }),
  personId: uuid('person_id').notNull().references(() => people.id, { onDelete: 'cascade' }),
  seenAt: moment('seen_at').notNull(),
}, t => [primaryKey({ columns: [t.orderId, t.personId] }), index('order_viewers_seen').on(t.seenAt)])
