import type { Database } from '../../database/client'
import { stripeEvents } from '../../database/schema'
import { log } from '../../utils/log'
import { eventHintSchema } from './hint'

/** The types that are acted on. All others are stored as ignored. */
export const ACTED_ON = new Set([
  'checkout.session.completed', 'checkout.session.async_payment_succeeded', 'checkout.session.async_payment_failed', 'checkout.session.expired',
  'payment_intent.succeeded', 'payment_intent.payment_failed', 'charge.failed',
  'charge.refunded', 'refund.created', 'refund.updated', 'refund.failed',
  'charge.dispute.created', 'charge.dispute.updated', 'charge.dispute.funds_withdrawn', 'charge.dispute.funds_reinstated', 'charge.dispute.closed',
])

/**
 * Stores an event before anything is done about it. The same one again changes nothing.
 * @returns what was done with it; `refused` for a body that is no event
 */
export async function storeEvent(db: Database, event: unknown, livemode: boolean): Promise<'waiting' | 'known' | 'ignored' | 'refused'> {
  const parsed = eventHintSchema.safeParse(event)
  if (!parsed.success) return 'refused'
  const hint = parsed.data
  const outcome = hint.livemode !== livemode ? `livemode is ${hint.livemode}` : ACTED_ON.has(hint.type) ? null : 'a type that is not acted on'
  if (hint.livemode !== livemode) log.error('stripe-event-livemode', new Error('an event of the other mode'), { stripeEvent: hint.id })
  const rows = await db.insert(stripeEvents).values({
    id: hint.id, type: hint.type, payload: hint, ...(outcome === null ? {} : { state: 'ignored' as const, outcome, doneAt: new Date() }),
  }).onConflictDoNothing().returning({ id: stripeEvents.id })
  if (rows.length === 0) return 'known'
  return outcome === null ? 'waiting' : 'ignored'
}
