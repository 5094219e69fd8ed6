import { and, desc, eq, inArray, or, gt, sql } from 'drizzle-orm'
import type { StuckEventsView } from '#shared/schemas/mail'
import { stripeEvents } from '../../database/schema'
import { recordAudit } from '../audit/record'
import { assertRole, inTransaction, type ServiceContext } from '../context'
import { conflict, notFound } from '../errors'

/** Stripe's events that are not at an end: dead, held back, or tried before without success. */
export async function listStuckEvents(context: Pick<ServiceContext, 'db' | 'actor'>): Promise<StuckEventsView> {
  assertRole(context, 'admin')
  const rows = await context.db.select({ id: stripeEvents.id, type: stripeEvents.type, state: stripeEvents.state, attempts: stripeEvents.attempts, receivedAt: stripeEvents.receivedAt, outcome: stripeEvents.outcome })
    .from(stripeEvents).where(or(inArray(stripeEvents.state, ['dead', 'quarantined']), and(eq(stripeEvents.state, 'waiting'), gt(stripeEvents.attempts, 1))))
    .orderBy(desc(stripeEvents.receivedAt)).limit(100)
  return { rows: rows.flatMap(({ state, receivedAt, ...row }) => state === 'done' || state === 'ignored' ? [] : [{ ...row, state, receivedAt: receivedAt.toISOString() }]) }
}

/**
 * Has an event acted on again. Its object is fetched anew, so an old event can do no harm.
 * @throws DomainError not-found, conflict when it came to its end
 */
export async function replayEvent(context: Pick<ServiceContext, 'db' | 'actor'>, id: string): Promise<void> {
  const actor = assertRole(context, 'admin')
  await inTransaction(context.db, async (tx) => {
    const [event] = await tx.select({ state: stripeEvents.state }).from(stripeEvents).where(eq(stripeEvents.id, id)).for('update')
    if (!event) throw notFound('event')
    if (event.state === 'done' || event.state === 'ignored') throw conflict('This event has been dealt with.')
    await tx.update(stripeEvents).set({ state: 'waiting', attempts: 0, runAt: sql`now()`, doneAt: null }).where(eq(stripeEvents.id, id))
    await recordAudit(tx, { personId: actor.personId, action: 'stripe-event.replay', object: id, detail: `It was ${event.state}.` })
  })
}
