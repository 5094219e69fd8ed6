import { and, eq, isNull, sql } from 'drizzle-orm'
import { outbox } from '../../database/schema'
import { recordAudit } from '../audit/record'
import { assertRole, inTransaction, type ServiceContext } from '../context'
import { conflict, notFound } from '../errors'

/**
 * Has a mail that waits or is dead tried again now. One that was sent stays sent.
 * @throws DomainError not-found, conflict
 */
export async function replayMail(context: Pick<ServiceContext, 'db' | 'actor'>, id: string): Promise<void> {
  const actor = assertRole(context, 'admin')
  await inTransaction(context.db, async (tx) => {
    const [row] = await tx.select({ id: outbox.id, kind: outbox.kind, wasDead: sql<boolean>`${outbox.deadAt} is not null` }).from(outbox).where(eq(outbox.id, id)).for('update')
    if (!row) throw notFound('e-mail')
    // Counted from now on, a dead one has its two days again.
    const again = await tx.update(outbox).set({ runAt: sql`now()`, deadAt: null, ...(row.wasDead ? { attempts: 0, createdAt: sql`now()` } : {}) })
      .where(and(eq(outbox.id, id), isNull(outbox.sentAt), isNull(outbox.skippedAt))).returning({ id: outbox.id })
    if (again.length === 0) throw conflict('This e-mail has gone out, or is no longer wanted. It is not sent again.')
    await recordAudit(tx, { personId: actor.personId, action: 'mail.replay', object: id, detail: `${row.kind} tried again.` })
  })
}
