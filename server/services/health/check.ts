import { sql } from 'drizzle-orm'
import type { Database } from '../../database/client'

/** How many migrations this build knows; written into the bundle at build time. */
type Expected = { migrations: number }

/**
 * Ready means: the database answers and carries every migration of this build.
 * @throws Error when it does not
 */
export async function checkReady(db: Database, expected: Expected): Promise<void> {
  const result = await db.execute<{ count: string }>(sql`select count(*) as count from drizzle.__drizzle_migrations`)
  const applied = Number(result.rows[0]?.count ?? 0)
  if (applied < expected.migrations) throw new Error(`${expected.migrations - applied} migrations are pending`)
}
