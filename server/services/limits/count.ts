import { createHash } from 'node:crypto'
import { and, eq, sql } from 'drizzle-orm'
import type { Database } from '../../database/client'
import { rateCounters } from '../../database/schema'

type Counter = { name: string, windowS: number }
const keyOf = ({ name }: Counter, subject: string) => `${name}:${createHash('sha256').update(subject).digest('base64url')}`
const windowStart = ({ windowS }: Counter) => sql`to_timestamp(floor(extract(epoch from now()) / ${windowS}) * ${windowS})`

/** Adds one to the counter of a subject in the present window. The subject is stored hashed. */
export async function countHit(db: Database, counter: Counter, subject: string): Promise<void> {
  await db.insert(rateCounters).values({ key: keyOf(counter, subject), windowStart: windowStart(counter), hits: 1 })
    .onConflictDoUpdate({ target: [rateCounters.key, rateCounters.windowStart], set: { hits: sql`${rateCounters.hits} + 1` } })
}

/** What the counter of a subject stands at in the present window. */
export async function readHits(db: Database, counter: Counter, subject: string): Promise<number> {
  const [row] = await db.select({ hits: rateCounters.hits }).from(rateCounters)
    .where(and(eq(rateCounters.key, keyOf(counter, subject)), eq(rateCounters.windowStart, windowStart(counter))))
  return row?.hits ?? 0
}

/** Clocks of processes and of the database differ a little: a run counts to the tick that is nearest within this. */
const CLOCK_SLACK_S = 60

/** True for the first of all processes that comes to this run of a task that is due every so many seconds. */
export async function claimRun(db: Database, task: string, everyS: number): Promise<boolean> {
  const tick = sql`to_timestamp(floor((extract(epoch from now()) + ${CLOCK_SLACK_S}) / ${everyS}) * ${everyS})`
  const rows = await db.insert(rateCounters).values({ key: `run:${task}`, windowStart: tick, hits: 1 }).onConflictDoNothing().returning({ key: rateCounters.key })
  return rows.length > 0
}
