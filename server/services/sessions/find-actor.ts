import { and, eq, gt, isNull, sql } from 'drizzle-orm'
import type { Database } from '../../database/client'
import { people, personRoles, sessions } from '../../database/schema'
import type { Role } from '#shared/schemas/roles'
import type { Actor } from '../context'
import { hashSecret } from './token'

/** The person behind a session cookie, or null when the session is unknown, revoked, idle too long or at its end. */
export async function findActor(db: Database, secret: string | undefined, now: Date): Promise<Actor | null> {
  if (!secret || secret.length !== 43) return null
  const tokenHash = hashSecret(secret)
  const [row] = await db.select({
    sessionId: sessions.id, lastSeenAt: sessions.lastSeenAt, personId: people.id, name: people.name, email: people.email, companyId: people.companyId,
    roles: sql<Role[]>`coalesce((select array_agg(${personRoles.role}::text) from ${personRoles} where ${personRoles.personId} = ${people.id}), '{}')`,
  }).from(sessions).innerJoin(people, eq(people.id, sessions.personId)).where(and(
    eq(sessions.tokenHash, tokenHash), isNull(sessions.revokedAt), isNull(people.disabledAt), gt(sessions.expiresAt, sql`now()`),
    gt(sessions.lastSeenAt, sql`now() - make_interval(mins => ${sessions.idleMinutes})`),
  ))
  if (!row) return null
  // One write a minute is enough to know who is idle.
  if (now.getTime() - row.lastSeenAt.getTime() > 60_000)
    await db.update(sessions).set({ lastSeenAt: sql`now()` }).where(eq(sessions.tokenHash, tokenHash))
  return { personId: row.personId, name: row.name, email: row.email, companyId: row.companyId, sessionId: row.sessionId, roles: row.roles }
}
