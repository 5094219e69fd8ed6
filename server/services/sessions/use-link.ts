import { and, eq, gt, isNull, sql } from 'drizzle-orm'
import { emailTokens, people } from '../../database/schema'
import { recordAudit } from '../audit/record'
import { inTransaction, type ServiceContext } from '../context'
import { DomainError } from '../errors'
import { orderRefOf } from '../orders/reference'
import { confirmAddress } from './confirm-address'
import { startSession, type Deployment, type StartedSession } from './start'
import { hashSecret } from './token'

const USED_UP = 'This link has been used already, or its time is over. Ask for a new one; the newest always works.'

/**
 * Uses up a link and signs its holder in. A link that confirms an address also makes the account, where there is none, and puts
 * the order under it.
 * @throws DomainError gone when the link is unknown, used or out of date
 */
export async function useLink(context: Pick<ServiceContext, 'db' | 'now'>, deployment: Deployment, secret: string): Promise<StartedSession & { orderRef: string | null }> {
  return inTransaction(context.db, async (tx) => {
    const [link] = await tx.update(emailTokens).set({ usedAt: sql`now()` })
      .where(and(eq(emailTokens.tokenHash, hashSecret(secret)), isNull(emailTokens.usedAt), gt(emailTokens.expiresAt, sql`now()`)))
      .returning({ purpose: emailTokens.purpose, email: emailTokens.email, orderId: emailTokens.orderId })
    if (!link) throw new DomainError('gone', USED_UP)

    const confirmed = link.purpose === 'confirm-address' ? await confirmAddress(tx, { email: link.email, orderId: link.orderId }) : null
    const personId = confirmed?.personId ?? await findPersonId(tx, link.email)
    const session = await startSession(tx, personId, deployment)
    await recordAudit(tx, { personId, action: 'session.start', object: personId, detail: `Signed in with a link (${link.purpose}).` })
    return { ...session, orderRef: confirmed?.orderNumber ? orderRefOf(confirmed.orderNumber) : null }
  })
}

async function findPersonId(tx: Parameters<typeof confirmAddress>[0], email: string): Promise<string> {
  // The link came by e-mail, so whoever uses it reads that address.
  const [person] = await tx.update(people).set({ emailConfirmedAt: sql`coalesce(${people.emailConfirmedAt}, now())` }).where(eq(people.email, email)).returning({ id: people.id })
  if (!person) throw new DomainError('gone', USED_UP)
  return person.id
}
