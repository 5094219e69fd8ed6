import { eq } from 'drizzle-orm'
import { people } from '../../database/schema'
import { recordAudit } from '../audit/record'
import { assertRole, inTransaction, type ServiceContext } from '../context'
import { notFound } from '../errors'
import { endAllSessions } from '../sessions/own-sessions'

/**
 * Signs somebody out everywhere, at once.
 * @throws DomainError not-found
 */
export async function endSessionsOfPerson(context: Pick<ServiceContext, 'db' | 'actor'>, personId: string): Promise<{ ended: number }> {
  const actor = assertRole(context, 'admin')
  return inTransaction(context.db, async (tx) => {
    const [person] = await tx.select({ id: people.id }).from(people).where(eq(people.id, personId)).for('update')
    if (!person) throw notFound('person')
    const ended = await endAllSessions(tx, personId)
    await recordAudit(tx, { personId: actor.personId, action: 'session.end-all', object: personId, detail: `${ended} sessions ended by an administrator.` })
    return { ended }
  })
}
