import { and, eq, isNotNull, sql } from 'drizzle-orm'
import { companies, emailTokens, people, sessions } from '../../database/schema'
import { recordAudit } from '../audit/record'
import { inTransaction, type ServiceContext } from '../context'
import { DomainError, invalid } from '../errors'
import { isCommonPassword } from './common-passwords'
import { endAllSessions } from './own-sessions'
import { hashPassword, isPassword } from './passwords'
import { startSession, type Deployment, type StartedSession } from './start'

/** A link that was used proves the address, so whoever forgot the password may set a new one in that session for this long. */
const LINK_PROVES_MINUTES = 15

/**
 * Sets a new password and ends every session, this one too: the answer is a new one for the browser that asked.
 * @throws DomainError invalid beside the field when the old password is missing or wrong, or the new one is easily guessed
 */
export async function changePassword(context: Pick<ServiceContext, 'db' | 'actor'>, deployment: Deployment, input: { oldPassword?: string, newPassword: string }): Promise<StartedSession> {
  const { db, actor } = context
  if (!actor) throw new DomainError('unauthenticated', 'Sign in first.')
  const [person] = await db.select({ passwordHash: people.passwordHash, name: people.name, email: people.email, companyName: companies.name })
    .from(people).leftJoin(companies, eq(companies.id, people.companyId)).where(eq(people.id, actor.personId))
  if (!person) throw new DomainError('unauthenticated', 'Sign in first.')

  if (person.passwordHash !== null && !(await beganWithLink(context.db, actor.sessionId, person.email))) {
    if (input.oldPassword === undefined) throw invalid('oldPassword', 'Give the present password too, or sign in with a link first if it is forgotten.')
    if (!(await isPassword(person.passwordHash, input.oldPassword))) throw invalid('oldPassword', 'This is not the present password.')
  }
  if (isCommonPassword(input.newPassword, person)) throw invalid('newPassword', 'This one is guessed early: it is a common word, a run of keys, or made of your own or our name. Three unrelated words do well.')

  const passwordHash = await hashPassword(input.newPassword)
  return inTransaction(db, async (tx) => {
    await tx.update(people).set({ passwordHash }).where(eq(people.id, actor.personId))
    const ended = await endAllSessions(tx, actor.personId)
    await recordAudit(tx, { personId: actor.personId, action: 'password.change', object: actor.personId, detail: `${ended} sessions ended.` })
    return startSession(tx, actor.personId, deployment)
  })
}

/** True for a session that began a short while ago by using a link: both are stamped by one transaction's clock. */
async function beganWithLink(db: ServiceContext['db'], sessionId: string, email: string): Promise<boolean> {
  const rows = await db.select({ id: sessions.id }).from(sessions)
    .innerJoin(emailTokens, and(eq(emailTokens.email, email), isNotNull(emailTokens.usedAt), eq(emailTokens.usedAt, sessions.createdAt)))
    .where(and(eq(sessions.id, sessionId), sql`${sessions.createdAt} > now() - make_interval(mins => ${LINK_PROVES_MINUTES})`))
  return rows.length > 0
}
