import type { SessionUser } from '#shared/schemas/auth'
import type { ServiceContext } from '../context'
import { DomainError } from '../errors'
import { findUser } from './start'

/**
 * Who is signed in, as the browser may know them.
 * @throws DomainError unauthenticated
 */
export async function requireSessionUser({ db, actor }: Pick<ServiceContext, 'db' | 'actor'>): Promise<SessionUser> {
  const found = actor ? await findUser(db, actor.personId) : null
  if (!found) throw new DomainError('unauthenticated', 'Sign in first.')
  return { id: found.id, name: found.name, email: found.email, roles: found.roles, companyName: found.companyName }
}
