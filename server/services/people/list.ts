import { and, asc, eq, gt, or, sql } from 'drizzle-orm'
import type { PeopleView } from '#shared/schemas/auth'
import type { Role } from '#shared/schemas/roles'
import { companies, people, personRoles, sessions } from '../../database/schema'
import { assertRole, type ServiceContext } from '../context'
import { invalid } from '../errors'

const CURSOR = /^([^\s@\p{Cc}]+@[^\s@\p{Cc}]+) ([0-9a-f]{8}-(?:[0-9a-f]{4}-){3}[0-9a-f]{12})$/u

/**
 * Everybody who can sign in, by address, with the number of sessions that are live. Read by key.
 * @throws DomainError invalid for a cursor that this list did not give
 */
export async function listPeople(context: Pick<ServiceContext, 'db' | 'actor'>, { cursor, limit }: { cursor?: string, limit: number }): Promise<PeopleView> {
  assertRole(context, 'admin')
  const after = cursor === undefined ? undefined : CURSOR.exec(Buffer.from(cursor, 'base64url').toString('utf8'))
  if (after === null) throw invalid('cursor', 'This is not a place in the list. Start from its beginning.')

  const live = sql`from ${sessions} where ${sessions.personId} = ${people.id} and ${sessions.revokedAt} is null and ${sessions.expiresAt} > now() and ${sessions.lastSeenAt} > now() - make_interval(mins => ${sessions.idleMinutes})`
  const rows = await context.db.select({
    id: people.id, name: people.name, email: people.email, companyName: companies.name, isDemo: people.isDemo, disabledAt: people.disabledAt, emailConfirmedAt: people.emailConfirmedAt,
    hasPassword: sql<boolean>`${people.passwordHash} is not null`,
    roles: sql<Role[]>`coalesce((select array_agg(${personRoles.role}::text order by ${personRoles.role}) from ${personRoles} where ${personRoles.personId} = ${people.id}), '{}')`,
    liveSessions: sql<number>`(select count(*)::int ${live})`,
    lastSeenAt: sql<Date | null>`(select max(${sessions.lastSeenAt}) ${live})`.mapWith(people.createdAt),
  }).from(people).leftJoin(companies, eq(companies.id, people.companyId))
    .where(after ? or(gt(people.email, after[1]!), and(eq(people.email, after[1]!), gt(people.id, after[2]!))) : undefined)
    .orderBy(asc(people.email), asc(people.id)).limit(limit + 1)

  const shown = rows.slice(0, limit)
  const last = rows.length > limit ? shown.at(-1) : undefined
  return {
    rows: shown.map(({ disabledAt, emailConfirmedAt, lastSeenAt, ...row }) => ({
      ...row, isDisabled: disabledAt !== null, emailConfirmedAt: emailConfirmedAt?.toISOString() ?? null, lastSeenAt: lastSeenAt?.toISOString() ?? null,
    })),
    nextCursor: last ? Buffer.from(`${last.email} ${last.id}`).toString('base64url') : null,
  }
}
