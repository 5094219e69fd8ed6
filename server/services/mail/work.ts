import { and, asc, eq, inArray, isNull, lt, lte, notExists, or, sql } from 'drizzle-orm'
import { alias } from 'drizzle-orm/pg-core'
import { isMailKind, type MailKind } from '../../../emails/payloads'
import type { RenderedMail } from '../../../emails/render'
import type { SendTime } from '../../../emails/parts/message'
import { outbox } from '../../database/schema'
import type { Database } from '../../database/client'
import { MailFailure, type Mailer } from '../../integrations/mailer'
import { log } from '../../utils/log'
import { inTransaction } from '../context'
import { createLink } from '../sessions/links'
import { redactLinks } from './redact'
import { findReasonToSkip } from './still-wanted'

/** What mails are sent with. */
export type MailDesk = {
  mailer: Pick<Mailer, 'send'>
  render: (kind: MailKind, payload: unknown, sendTime: SendTime) => Promise<RenderedMail>
  linkOf: (kind: MailKind) => 'sign-in' | 'confirm-address' | undefined
  origin: string
  timeZone: string
}
export type OutboxRow = typeof outbox.$inferSelect

const BATCH = 10
/** Longer than one mail can take: five seconds to connect, fifteen in silence, and some. */
const LEASE_S = 60
/** Tries go on for two days, so that a weekend without a mail server loses nothing. */
const GIVE_UP_AFTER_H = 50

/** Seconds until the next try: 2, 4, 8 ... up to five minutes, give or take a quarter so that many do not come at once. */
export const mailDelayS = (attempts: number, chance: number): number => Math.min(300, 2 ** Math.min(12, attempts)) * (0.75 + chance / 2)

const isOpen = () => and(isNull(outbox.sentAt), isNull(outbox.deadAt), isNull(outbox.skippedAt))

/**
 * Takes due mails, several processes side by side. Of each recipient only the oldest open one: mails arrive in the order in
 * which things happened.
 */
export async function claimMails(db: Database): Promise<OutboxRow[]> {
  const earlier = alias(outbox, 'earlier')
  return inTransaction(db, async (tx) => {
    const due = await tx.select({ id: outbox.id }).from(outbox).where(and(
      isOpen(), lte(outbox.runAt, sql`now()`), or(isNull(outbox.leasedUntil), lt(outbox.leasedUntil, sql`now()`)),
      notExists(tx.select({ one: sql`1` }).from(earlier).where(and(
        eq(earlier.recipient, outbox.recipient), isNull(earlier.sentAt), isNull(earlier.deadAt), isNull(earlier.skippedAt),
        sql`(${earlier.createdAt}, ${earlier.id}) < (${outbox.createdAt}, ${outbox.id})`,
      ))),
    )).orderBy(asc(outbox.runAt), asc(outbox.id)).limit(BATCH).for('update', { of: outbox, skipLocked: true })
    if (due.length === 0) return []
    const claimed = await tx.update(outbox).set({ leasedUntil: sql`now() + make_interval(secs => ${LEASE_S})`, attempts: sql`${outbox.attempts} + 1` })
      .where(inArray(outbox.id, due.map(row => row.id))).returning()
    // An UPDATE gives its rows in any order; the longest due goes first.
    return claimed.sort((a, b) => a.runAt.getTime() - b.runAt.getTime() || (a.id < b.id ? -1 : 1))
  })
}

/** Sends what is due. The claim is committed before any mail goes out; a mail that fails does not stop the rest. Returns how many went out or ended. */
export async function workOnMails(db: Database, desk: MailDesk, isStopping: () => boolean): Promise<number> {
  const claimed = await claimMails(db)
  let ended = 0
  let isReachable = true
  for (const row of claimed) {
    // A stop, or a server that does not answer, gives the others back untouched.
    if (isStopping() || !isReachable) {
      await giveBack(db, row)
      continue
    }
    // Those before may have taken long: one whose lease ran out meanwhile is another process's by now.
    if (!(await keepLease(db, row))) continue
    const result = await workOnMail(db, desk, row)
    if (result === 'unreachable') isReachable = false
    if (result === 'ended') ended += 1
  }
  return ended
}

/** Begins the lease of a claimed mail anew, just before it goes out. False where somebody else has claimed it since: each claim counts a try. */
async function keepLease(db: Database, row: OutboxRow): Promise<boolean> {
  const kept = await db.update(outbox).set({ leasedUntil: sql`now() + make_interval(secs => ${LEASE_S})` })
    .where(and(eq(outbox.id, row.id), eq(outbox.attempts, row.attempts), isOpen())).returning({ id: outbox.id })
  return kept.length > 0
}

async function workOnMail(db: Database, desk: MailDesk, row: OutboxRow): Promise<'ended' | 'delayed' | 'unreachable'> {
  try {
    if (!isMailKind(row.kind)) throw new MailFailure('refused', 'a kind that is not known')
    const reason = await findReasonToSkip(db, row.kind, row)
    if (reason !== null) {
      await db.update(outbox).set({ skippedAt: sql`now()`, leasedUntil: null, lastError: reason, payload: redactLinks(row.payload) }).where(eq(outbox.id, row.id))
      log.info('mail-skipped', { mail: row.id, kind: row.kind, reason })
      return 'ended'
    }
    const purpose = desk.linkOf(row.kind)
    const linkUrl = purpose ? await createLink(db, { purpose, email: row.recipient, orderId: row.orderId, origin: desk.origin }) : ''
    const rendered = await desk.render(row.kind, row.payload, { linkUrl, timeZone: desk.timeZone })
    await desk.mailer.send({ id: row.id, recipient: row.recipient, ...rendered })
    await db.update(outbox).set({ sentAt: sql`now()`, leasedUntil: null, lastError: null, payload: redactLinks(row.payload) }).where(eq(outbox.id, row.id))
    log.info('mail-sent', { mail: row.id, kind: row.kind, attempts: row.attempts })
    return 'ended'
  }
  catch (error) {
    return recordFailure(db, row, error)
  }
}

async function recordFailure(db: Database, row: OutboxRow, error: unknown): Promise<'ended' | 'delayed' | 'unreachable'> {
  const kind = error instanceof MailFailure ? error.kind : 'delayed'
  const lastError = (error instanceof Error ? error.message : 'unknown').slice(0, 300)
  const isOver = kind === 'refused' || Date.now() - row.createdAt.getTime() > GIVE_UP_AFTER_H * 3_600_000
  if (isOver) {
    await db.update(outbox).set({ deadAt: sql`now()`, leasedUntil: null, lastError }).where(eq(outbox.id, row.id))
    log.error('mail-dead', error, { mail: row.id, kind: row.kind, attempts: row.attempts })
    return 'ended'
  }
  await db.update(outbox).set({ runAt: sql`now() + make_interval(secs => ${mailDelayS(row.attempts, Math.random())})`, leasedUntil: null, lastError }).where(eq(outbox.id, row.id))
  log.warn('mail-delayed', { mail: row.id, kind: row.kind, attempts: row.attempts, why: lastError })
  return kind === 'unreachable' ? 'unreachable' : 'delayed'
}

async function giveBack(db: Database, row: OutboxRow): Promise<void> {
  await db.update(outbox).set({ leasedUntil: null, attempts: sql`${outbox.attempts} - 1`, runAt: sql`now() + make_interval(secs => 1)` }).where(eq(outbox.id, row.id))
}
