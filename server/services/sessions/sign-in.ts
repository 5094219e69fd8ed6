import { eq } from 'drizzle-orm'
import { people } from '../../database/schema'
import { recordAudit } from '../audit/record'
import { inTransaction, type ServiceContext } from '../context'
import { DomainError } from '../errors'
import { countHit, readHits } from '../limits/count'
import { takeFromLimit } from '../limits/take'
import { isPassword } from './passwords'
import { startSession, type Deployment, type StartedSession } from './start'

export type SignIn = { email: string, password: string, /** Where the request comes from. */ address: string, hasLimits: boolean }

const WINDOW_S = 900
/** Whoever guesses is stopped by address; the owner, who comes from another one, is not. */
const PER_ADDRESS = { name: 'sign-in-address', max: 60, windowS: WINDOW_S }
const PER_ADDRESS_AND_ACCOUNT = { name: 'sign-in-pair', max: 10, windowS: WINDOW_S }
/** Guesses from many addresses at one account only make its answers slower: a lock would shut out the owner. */
const FAILURES = { name: 'sign-in-failures', windowS: WINDOW_S }
const FREE_FAILURES = 20
const LONGEST_DELAY_MS = 2_000

const wait = (ms: number) => new Promise(resolve => setTimeout(resolve, ms))

/** How long an answer about an account is held back after so many failures, in milliseconds. */
export const delayAfter = (failures: number): number => Math.min(LONGEST_DELAY_MS, Math.max(0, failures - FREE_FAILURES) * 100)

/**
 * Signs a person in by address and password, with a session that is new.
 * @throws DomainError unauthenticated, in the same words and time for an unknown address and a wrong password; too-many
 */
export async function signIn(context: Pick<ServiceContext, 'db'>, deployment: Deployment, { email, password, address, hasLimits }: SignIn): Promise<StartedSession> {
  const { db } = context
  if (hasLimits) {
    await takeFromLimit(db, PER_ADDRESS, address)
    await takeFromLimit(db, PER_ADDRESS_AND_ACCOUNT, `${address} ${email}`)
    const delayMs = delayAfter(await readHits(db, FAILURES, email))
    if (delayMs > 0) await wait(delayMs)
  }
  const [person] = await db.select({ id: people.id, passwordHash: people.passwordHash, isDemo: people.isDemo, disabledAt: people.disabledAt }).from(people).where(eq(people.email, email))
  const isRight = await isPassword(person?.passwordHash ?? null, password)
  const mayEnter = person !== undefined && person.disabledAt === null && !(person.isDemo && deployment.mode === 'production')
  if (!isRight || !mayEnter) {
    await countHit(db, FAILURES, email)
    throw new DomainError('unauthenticated', 'That address and password do not go together. Try again, or have a sign-in link sent.', [{ path: 'password', message: 'The address or the password is wrong.' }])
  }
  return inTransaction(db, async (tx) => {
    const session = await startSession(tx, person.id, deployment)
    await recordAudit(tx, { personId: person.id, action: 'session.start', object: person.id, detail: 'Signed in with a password.' })
    return session
  })
}
