import { eq } from 'drizzle-orm'
import { payments } from '../../database/schema'
import type { Database } from '../../database/client'
import type { PaymentDesk } from '../payments/desk'
import { syncDispute } from '../payments/sync-dispute'
import { syncRefund, syncRefundsOfCharge } from '../payments/sync-refund'
import { syncSession, type SyncOutcome } from '../payments/sync'
import type { EventHint } from './hint'

const NOT_OURS: SyncOutcome = { outcome: 'not-ours', words: 'no attempt of ours' }

/** Does what an event is about: its object is fetched, and our record brought to what Stripe says now. */
export async function actOnEvent(db: Database, desk: PaymentDesk, hint: EventHint): Promise<SyncOutcome> {
  const object = hint.data.object
  if (!object.id) return { outcome: 'quarantined', words: 'the event names no object' }
  if (hint.type.startsWith('checkout.session.')) return syncSession(db, desk, object.id)
  if (hint.type.startsWith('charge.dispute.')) return syncDispute(db, desk, object.id)
  if (hint.type.startsWith('refund.')) return syncRefund(db, desk, object.id)
  if (hint.type === 'charge.refunded') return syncRefundsOfCharge(db, desk, object.id)
  const intentId = hint.type.startsWith('payment_intent.') ? object.id : object.payment_intent
  return intentId ? syncIntent(db, desk, intentId) : NOT_OURS
}

async function syncIntent(db: Database, desk: PaymentDesk, intentId: string): Promise<SyncOutcome> {
  const [known] = await db.select({ sessionId: payments.stripeSessionId }).from(payments).where(eq(payments.stripePaymentIntentId, intentId))
  const sessionId = known?.sessionId ?? (await desk.stripe.checkout.sessions.list({ payment_intent: intentId, limit: 1 })).data[0]?.id
  return sessionId ? syncSession(db, desk, sessionId) : NOT_OURS
}
