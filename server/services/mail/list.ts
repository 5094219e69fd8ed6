import { and, eq, gt, isNotNull, isNull, sql } from 'drizzle-orm'
import type { MailState, OutboxRowView, OutboxView } from '#shared/schemas/mail'
import { MAIL_KINDS } from '../../../emails/payloads'
import { orders, outbox } from '../../database/schema'
import { assertRole, type ServiceContext } from '../context'
import { decodeMomentCursor, encodeCursor } from '../cursor'
import { orderRefOf } from '../orders/reference'

const isOpen = () => and(isNull(outbox.sentAt), isNull(outbox.deadAt), isNull(outbox.skippedAt))
const stateFilter = { waiting: isOpen, sent: () => isNotNull(outbox.sentAt), skipped: () => isNotNull(outbox.skippedAt), dead: () => isNotNull(outbox.deadAt), all: () => undefined } as const
const stateOf = (row: typeof outbox.$inferSelect): MailState => row.sentAt ? 'sent' : row.skippedAt ? 'skipped' : row.deadAt ? 'dead' : 'waiting'

/** `aoife@byrne.example` as `a…@byrne.example`: enough to tell people apart, too little to write to. */
export const maskAddress = (address: string): string => address.replace(/^(.)[^@]*/, '$1…')

/** The outbox, newest first, with how much waits and how much is dead. Read by key. */
export async function listOutbox(context: Pick<ServiceContext, 'db' | 'actor'>, { cursor, limit, state }: { cursor?: string, limit: number, state: MailState | 'all' }): Promise<OutboxView> {
  assertRole(context, 'admin')
  const after = cursor === undefined ? undefined : decodeMomentCursor(cursor)
  const micros = sql<string>`(extract(epoch from ${outbox.createdAt}) * 1000000)::bigint::text`
  const rows = await context.db.select({ row: outbox, number: orders.number, micros }).from(outbox).leftJoin(orders, eq(orders.id, outbox.orderId))
    .where(and(stateFilter[state](), after ? sql`(${outbox.createdAt}, ${outbox.id}) < (to_timestamp(0) + ${after.at}::bigint * interval '1 microsecond', ${after.id}::uuid)` : undefined))
    .orderBy(sql`${outbox.createdAt} desc, ${outbox.id} desc`).limit(limit + 1)
  const [counts] = await context.db.select({
    waiting: sql<number>`count(*) filter (where ${isOpen()})::int`, dead: sql<number>`count(*) filter (where ${outbox.deadAt} is not null)::int`,
    oldestWaitingAt: sql<Date | null>`min(${outbox.createdAt}) filter (where ${isOpen()})`.mapWith(outbox.createdAt),
  }).from(outbox).where(and(isNull(outbox.sentAt), isNull(outbox.skippedAt), gt(outbox.createdAt, sql`now() - interval '90 days'`)))

  const shown = rows.slice(0, limit)
  const last = rows.length > limit ? shown.at(-1) : undefined
  return {
    rows: shown.map(({ row, number }) => toView(row, number)), nextCursor: last ? encodeCursor(last.micros, last.row.id) : null,
    waiting: counts?.waiting ?? 0, dead: counts?.dead ?? 0, oldestWaitingAt: counts?.oldestWaitingAt?.toISOString() ?? null, previews: MAIL_KINDS,
  }
}

function toView(row: typeof outbox.$inferSelect, number: number | null): OutboxRowView {
  const state = stateOf(row)
  return {
    id: row.id, kind: row.kind, recipientMasked: maskAddress(row.recipient), orderRef: number === null ? null : orderRefOf(number), state, attempts: row.attempts,
    createdAt: row.createdAt.toISOString(), nextTryAt: state === 'waiting' ? row.runAt.toISOString() : null, sentAt: row.sentAt?.toISOString() ?? null, deadAt: row.deadAt?.toISOString() ?? null, lastError: row.lastError,
  }
}
