import { sql } from 'drizzle-orm'
import { bigint, check, index, pgEnum, pgTable, text, uuid } from 'drizzle-orm/pg-core'
import { FILE_KINDS, FILE_STATES } from '../../../shared/schemas/file'
import { bytes, createdAt, id, moment } from './columns'
import { orders } from './orders'

export const fileKind = pgEnum('file_kind', FILE_KINDS)
export const fileState = pgEnum('file_state', FILE_STATES)

/**
 * A drawing a customer sent. The bytes lie in the file storage under a name of ours; the customer's name for it is data only.
 * Until the order form is sent no order has it, and only who holds the draft's secret (kept as SHA-256) may reach it.
 */
export const files = pgTable('files', {
  id: id(),
  orderId: uuid('order_id').references(() => orders.id),
  draftHash: bytes('draft_hash'),
  name: text('name').notNull(),
  kind: fileKind('kind').notNull(),
  state: fileState('state').notNull().default('receiving'),
  sizeBytes: bigint('size_bytes', { mode: 'number' }).notNull(),
  receivedBytes: bigint('received_bytes', { mode: 'number' }).notNull().default(0),
  sha256: bytes('sha256'),
  storageKey: text('storage_key').notNull().unique(),
  refusal: text('refusal'),
  createdAt: createdAt(),
  checkedAt: moment('checked_at'),
}, t => [
  index('files_order').on(t.orderId, t.createdAt),
  index('files_draft').on(t.draftHash),
  index('files_unattached').on(t.createdAt).where(sql`${t.orderId} is null`),
  check('files_size', sql`${t.sizeBytes} between 1 and 20000000 and ${t.receivedBytes} between 0 and ${t.sizeBytes}`),
  check('files_reachable', sql`${t.orderId} is not null or ${t.draftHash} is not null`),
  check('files_checked', sql`${t.state} <> 'checked' or (${t.checkedAt} is not null and ${t.sha256} is not null and ${t.receivedBytes} = ${t.sizeBytes})`),
])
