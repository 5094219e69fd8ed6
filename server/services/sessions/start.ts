import { eq, sql } from 'drizzle-orm'
import type { SessionUser } from '#shared/schemas/auth'
import type { Role } from '#shared/schemas/roles'
import type { Queryable } from '../../database/client'
import { companies, people, personRoles, sessions } from '../../database/schema'
import { DomainError } from '../errors'
import { lifetimeOf } from './lifetimes'
import { createSecret, hashSecret } from './token'

/** A session just begun: the secret goes into the cookie and is kept nowhere. */
export type StartedSession = { secret: string, maxAgeS: number, user: SessionUser }

/** Whether accounts of the demonstration may be used here. */
export type Deployment = { mode: 'production' | 'demo' | 'test' }

/** The person as the browser may know them, with what decides whether they may sign in; null when there is none. */
export async function findUser(db: Queryable, personId: string): Promise<(SessionUser & { isDemo: boolean, isDisabled: boolean }) | null> {
  const [row] = await db.select({
    id: people.id, name: people.name, email: people.email, companyName: companies.name, isDemo: people.isDemo, disabledAt: people.disabledAt,
    roles: sql<Role[]>`coalesce((select array_agg(${personRoles.role}::text order by ${personRoles.role}) from ${personRoles} where ${personRoles.personId} = ${people.id}), '{}')`,
  }).from(people).leftJoin(companies, eq(companies.id, people.companyId)).where(eq(people.id, personId))
  return row ? { id: row.id, name: row.name, email: row.email, companyName: row.companyName, roles: row.roles, isDemo: row.isDemo, isDisabled: row.disabledAt !== null } : null
}

/**
 * Begins a session with a new secret for a person whose identity has been proved.
 * @throws DomainError forbidden for an account that is switched off, or one of the demonstration in production
 */
export async function startSession(tx: Queryable, personId: string, { mode }: Deployment): Promise<StartedSession> {
  const found = await findUser(tx, personId)
  if (!found || found.isDisabled) throw new DomainError('forbidden', 'This account is switched off. Write to us if that is a mistake.')
  if (found.isDemo && mode === 'production') throw new DomainError('forbidden', 'This account belongs to the demonstration and does not work here.')
  const { isDemo: _isDemo, isDisabled: _isDisabled, ...user } = found
  const { absoluteMinutes, idleMinutes } = lifetimeOf(user.roles)
  const secret = createSecret()
  await tx.insert(sessions).values({ tokenHash: hashSecret(secret), personId, idleMinutes, expiresAt: sql`now() + make_interval(mins => ${absoluteMinutes})` })
  return { secret, maxAgeS: absoluteMinutes * 60, user }
}
