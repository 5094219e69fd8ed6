import { and, eq, isNull } from 'drizzle-orm'
import { people } from '../../database/schema'
import { inTransaction, type ServiceContext } from '../context'
import { takeFromLimit } from '../limits/take'
import { enqueueMail } from '../mail/enqueue'
import type { Deployment } from './start'

const PER_RECIPIENT = { name: 'sign-in-link-recipient', max: 5, windowS: 3600 }
/** Longer than the work takes, so that the time of the answer does not tell which addresses have an account. */
const ANSWER_AFTER_MS = 200

/**
 * Has a sign-in link sent, if the address has an account. The caller cannot tell whether it has; asking again within a minute
 * sends no second mail.
 * @throws DomainError too-many
 */
export async function requestSignInLink(context: Pick<ServiceContext, 'db' | 'now'>, { mode }: Deployment, { email, hasLimits }: { email: string, hasLimits: boolean }): Promise<void> {
  const answerTime = new Promise(resolve => setTimeout(resolve, ANSWER_AFTER_MS))
  if (hasLimits) await takeFromLimit(context.db, PER_RECIPIENT, email)
  await inTransaction(context.db, async (tx) => {
    const [person] = await tx.select({ id: people.id, name: people.name, isDemo: people.isDemo }).from(people).where(and(eq(people.email, email), isNull(people.disabledAt)))
    if (!person || (person.isDemo && mode === 'production')) return
    await enqueueMail(tx, { kind: 'sign-in-link', objectId: person.id, recipient: email, step: context.now.toISOString().slice(0, 16), payload: { name: person.name } })
  })
  await answerTime
}
