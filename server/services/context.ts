import type { Role } from '#shared/schemas/roles'
import type { Database, Queryable, Transaction } from '../database/client'
import { DomainError } from './errors'

/** Who acts. A guest with the link of an order is no actor: the link is passed beside. */
export type Actor = { personId: string, name: string, email: string, roles: readonly Role[], companyId: string | null, sessionId: string }

/** What every service is given: the database, the present moment, who asks, the request's id for the log, where links lead and the shop's zone. */
export type ServiceContext = { db: Database, now: Date, actor: Actor | null, requestId: string, origin: string, timeZone: string }

/** Refuses unless the actor holds one of the roles. Checked here as well as at the route: jobs and pages call services too. */
export function assertRole(context: Pick<ServiceContext, 'actor'>, ...roles: readonly Role[]): Actor {
  const { actor } = context
  if (!actor) throw new DomainError('unauthenticated', 'Sign in first.')
  if (!actor.roles.some(role => roles.includes(role))) throw new DomainError('forbidden', 'Your account does not reach this place.')
  return actor
}

const RETRIED = new Set(['40001', '40P01'])
const codeOf = (error: unknown): string | undefined => {
  const cause = error instanceof Error && error.cause ? error.cause : error
  return typeof cause === 'object' && cause !== null && 'code' in cause && typeof cause.code === 'string' ? cause.code : undefined
}

/** PostgreSQL's error code of a failed statement, or undefined. */
export const databaseErrorCode = codeOf
/** The constraint that a failed statement broke, or undefined. */
export function brokenConstraint(error: unknown): string | undefined {
  const cause = error instanceof Error && error.cause ? error.cause : error
  return typeof cause === 'object' && cause !== null && 'constraint' in cause && typeof cause.constraint === 'string' ? cause.constraint : undefined
}

/** Runs the work in one transaction, again from the start when PostgreSQL reports a deadlock or a serialisation failure. */
export async function inTransaction<T>(db: Database, work: (tx: Transaction) => Promise<T>): Promise<T> {
  for (let attempt = 1; ; attempt += 1) {
    try {
      return await db.transaction(work)
    }
    catch (error) {
      if (attempt >= 4 || !RETRIED.has(codeOf(error) ?? '')) throw error
    }
  }
}

export type { Database, Queryable, Transaction }
