import { and, eq, isNull, sql } from 'drizzle-orm'
import type { Actor } from '../../services/context'
import type { Database } from '../client'
import { outbox, people, personRoles } from '../schema'
import { DEMO_ORDERS } from './demo-orders'
import { playOrder } from './play-order'

/**
 * Plays the invented orders of the demonstration shop. Their e-mails are marked as skipped: nobody waits for news of the past.
 * Call it once, on a shop that has its people, prices, wire and machines.
 */
export async function seedHistory(db: Database, { origin, timeZone, now }: { origin: string, timeZone: string, now: Date }): Promise<void> {
  const actorOf = async (email: string): Promise<Actor> => {
    const [person] = await db.select().from(people).where(eq(people.email, email))
    if (!person) throw new Error(`the demo person ${email} is not there`)
    const roles = await db.select({ role: personRoles.role }).from(personRoles).where(eq(personRoles.personId, person.id))
    return { personId: person.id, name: person.name, email: person.email, companyId: person.companyId, roles: roles.map(row => row.role), sessionId: '' }
  }
  const [supervisor, operator] = [await actorOf('supervisor@oxmere.example'), await actorOf('operator@oxmere.example')]
  for (const demo of DEMO_ORDERS) await playOrder({ db, origin, timeZone }, { customer: await actorOf(demo.customer), supervisor, operator }, demo, now)
  await db.update(outbox).set({ skippedAt: sql`now()` }).where(and(isNull(outbox.sentAt), isNull(outbox.skippedAt)))
}
