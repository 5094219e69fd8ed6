import { createHash } from 'node:crypto'
import { sql } from 'drizzle-orm'
import type { Database } from '../../database/client'
import { rateCounters } from '../../database/schema'
import { DomainError } from '../errors'

/** So many acts in so many seconds. */
export type Limit = { name: string, max: number, windowS: number }

/**
 * Counts one act of a subject (an address or an e-mail) and refuses it past the limit. The subject is stored hashed.
 * @throws DomainError too-many, with the seconds to wait
 */
export async function takeFromLimit(db: Database, limit: Limit, subject: string): Promise<void> {
  const key = `${limit.name}:${createHash('sha256').update(subject).digest('base64url')}`
  const windowStart = sql`to_timestamp(floor(extract(epoch from now()) / ${limit.windowS}) * ${limit.windowS})`
  const [row] = await db.insert(rateCounters).values({ key, windowStart, hits: 1 })
    .onConflictDoUpdate({ target: [rateCounters.key, rateCounters.windowStart], set: { hits: sql`${rateCounters.hits} + 1` } })
    .returning({ hits: rateCounters.hits, windowStart: rateCounters.windowStart })
  if (row && row.hits > limit.max) {
    const retryAfterS = Math.max(1, Math.ceil((row.windowStart.getTime() + limit.windowS * 1000 - Date.now()) / 1000))
    throw new DomainError('too-many', `Too many tries. Wait ${retryAfterS < 90 ? `${retryAfterS} seconds` : `${Math.ceil(retryAfterS / 60)} minutes`} and try again.`, [], retryAfterS)
  }
}
