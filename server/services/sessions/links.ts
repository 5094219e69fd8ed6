import { sql } from 'drizzle-orm'
import type { Queryable } from '../../database/client'
import { emailTokens } from '../../database/schema'
import { createSecret, hashSecret } from './token'

export type LinkPurpose = (typeof emailTokens.$inferSelect)['purpose']

const LIFETIME_MINUTES: Readonly<Record<LinkPurpose, number>> = { 'sign-in': 10, 'reset-password': 10, 'confirm-address': 24 * 60 }

/** How long a link of this purpose works, as a reader is told. */
export const linkLifetimeWords: Readonly<Record<LinkPurpose, string>> = { 'sign-in': 'ten minutes', 'reset-password': 'ten minutes', 'confirm-address': '24 hours' }

/**
 * Makes a single-use link for the holder of an address. Called when the mail is sent, so that its time begins then and its
 * secret is stored nowhere but in the mail.
 * @returns the whole address, on the configured origin
 */
export async function createLink(db: Queryable, link: { purpose: LinkPurpose, email: string, orderId?: string | null, origin: string }): Promise<string> {
  const secret = createSecret()
  await db.insert(emailTokens).values({
    tokenHash: hashSecret(secret), purpose: link.purpose, email: link.email, orderId: link.orderId ?? null, expiresAt: sql`now() + make_interval(mins => ${LIFETIME_MINUTES[link.purpose]})`,
  })
  return `${link.origin}/link/${secret}`
}
