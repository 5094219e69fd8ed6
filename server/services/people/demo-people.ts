import { eq } from 'drizzle-orm'
import { people } from '../../database/schema'
import type { Database } from '../../database/client'

/** True while accounts of the demonstration, whose passwords are printed at its start, stand in the database. */
export async function hasDemoPeople(db: Database): Promise<boolean> {
  const rows = await db.select({ id: people.id }).from(people).where(eq(people.isDemo, true)).limit(1)
  return rows.length > 0
}
