import { lt, sql } from 'drizzle-orm'
import { emailTokens, idempotencyKeys, rateCounters, sessions } from '../../database/schema'
import type { Database } from '../../database/client'

const daysAgo = (days: number) => sql`now() - make_interval(days => ${days})`

/** Deletes what nobody can use any more: old counters, links, sessions and client keys. Harmless when it runs twice. */
export async function sweep(db: Database): Promise<Record<'counters' | 'links' | 'sessions' | 'keys', number>> {
  const counters = await db.delete(rateCounters).where(lt(rateCounters.windowStart, daysAgo(2)))
  const links = await db.delete(emailTokens).where(lt(emailTokens.expiresAt, daysAgo(7)))
  const old = await db.delete(sessions).where(lt(sessions.expiresAt, daysAgo(7)))
  const keys = await db.delete(idempotencyKeys).where(lt(idempotencyKeys.createdAt, daysAgo(3)))
  return { counters: counters.rowCount ?? 0, links: links.rowCount ?? 0, sessions: old.rowCount ?? 0, keys: keys.rowCount ?? 0 }
}
