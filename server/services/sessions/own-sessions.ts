import { and, desc, eq, gt, isNull, ne, sql } from 'drizzle-orm'
import type { SessionRow } from '#shared/schemas/auth'
import type { Queryable } from '../../database/client'
import { sessions } from '../../database/schema'
import { recordAudit } from '../audit/record'
import { inTransaction, type Actor, type ServiceContext } from '../context'
import { DomainError, notFound } from '../errors'
import { hashSecret } from './token'

const isLive = () => and(isNull(sessions.revokedAt), gt(sessions.expiresAt, sql`now()`), gt(sessions.lastSeenAt, sql`now() - make_interval(mins => ${sessions.idleMinutes})`))

function requireActor({ actor }: Pick<ServiceContext, 'actor'>): Actor {
  if (!actor) throw new DomainError('unauthenticated', 'Sign in first.')
  return actor
}

/** The places where the person is signed in now, newest first. */
export async function listOwnSessions(context: Pick<ServiceContext, 'db' | 'actor'>): Promise<SessionRow[]> {
  const actor = requireActor(context)
  const rows = await context.db.select({ id: sessions.id, createdAt: sessions.createdAt, lastSeenAt: sessions.lastSeenAt, expiresAt: sessions.expiresAt })
    .from(sessions).where(and(eq(sessions.personId, actor.personId), isLive())).orderBy(desc(sessions.lastSeenAt)).limit(100)
  return rows.map(row => ({
    id: row.id, startedAt: row.createdAt.toISOString(), lastSeenAt: row.lastSeenAt.toISOString(), expiresAt: row.expiresAt.toISOString(), isThisOne: row.id === actor.sessionId,
  }))
}

/**
 * Ends one session of the person's own.
 * @throws DomainError not-found for an unknown one or somebody else's
 */
export async function endOwnSession(context: Pick<ServiceContext, 'db' | 'actor'>, sessionId: string): Promise<void> {
  const actor = requireActor(context)
  await inTransaction(context.db, async (tx) => {
    const ended = await tx.update(sessions).set({ revokedAt: sql`now()` })
      .where(and(eq(sessions.id, sessionId), eq(sessions.personId, actor.personId), isNull(sessions.revokedAt))).returning({ id: sessions.id })
    if (ended.length === 0) throw notFound('session')
    await recordAudit(tx, { personId: actor.personId, action: 'session.end', object: sessionId, detail: 'Ended by its owner.' })
  })
}

/** Ends all sessions of the person but the one that asks. */
export async function endOtherSessions(context: Pick<ServiceContext, 'db' | 'actor'>): Promise<{ ended: number }> {
  const actor = requireActor(context)
  return inTransaction(context.db, async (tx) => {
    const ended = await tx.update(sessions).set({ revokedAt: sql`now()` })
      .where(and(eq(sessions.personId, actor.personId), ne(sessions.id, actor.sessionId), isNull(sessions.revokedAt))).returning({ id: sessions.id })
    await recordAudit(tx, { personId: actor.personId, action: 'session.end-others', object: actor.personId, detail: `${ended.length} other sessions ended.` })
    return { ended: ended.length }
  })
}

/** Ends every session of a person, in the caller's transaction. */
export async function endAllSessions(tx: Queryable, personId: string): Promise<number> {
  const ended = await tx.update(sessions).set({ revokedAt: sql`now()` }).where(and(eq(sessions.personId, personId), isNull(sessions.revokedAt))).returning({ id: sessions.id })
  return ended.length
}

/** Signs out: the session of this secret is over, whoever still holds the cookie. */
export async function signOut(db: Queryable, secret: string): Promise<void> {
  await db.update(sessions).set({ revokedAt: sql`now()` }).where(and(eq(sessions.tokenHash, hashSecret(secret)), isNull(sessions.revokedAt)))
}
