import { and, asc, eq, inArray, lte, sql } from 'drizzle-orm'
import Stripe from 'stripe'
import { stripeEvents } from '../../database/schema'
import type { Database } from '../../database/client'
import { log } from '../../utils/log'
import { databaseErrorCode, inTransaction } from '../context'
import type { PaymentDesk } from '../payments/desk'
import { actOnEvent } from './act'
import { eventHintSchema } from './hint'

const BATCH = 5
/** Longer than one event can take: eight seconds a call, three tries. */
const LEASE_S = 90
const MOST_ATTEMPTS = 20

type Claimed = { id: string, payload: unknown, attempts: number }

/** Seconds until the next try: 1, 2, 4 ... up to ten minutes, give or take a quarter. Twenty tries take about two hours. */
export const eventDelayS = (attempts: number, chance: number): number => Math.min(600, 2 ** Math.max(0, attempts - 1)) * (0.75 + chance / 2)

/** Takes due events, several processes side by side: a claimed one is due again only when its lease is over. */
export async function claimEvents(db: Database): Promise<Claimed[]> {
  return inTransaction(db, async (tx) => {
    const due = await tx.select({ id: stripeEvents.id }).from(stripeEvents).where(and(eq(stripeEvents.state, 'waiting'), lte(stripeEvents.runAt, sql`now()`)))
      .orderBy(asc(stripeEvents.runAt), asc(stripeEvents.id)).limit(BATCH).for('update', { skipLocked: true })
    if (due.length === 0) return []
    return tx.update(stripeEvents).set({ runAt: sql`now() + make_interval(secs => ${LEASE_S})`, attempts: sql`${stripeEvents.attempts} + 1` })
      .where(inArray(stripeEvents.id, due.map(row => row.id))).returning({ id: stripeEvents.id, payload: stripeEvents.payload, attempts: stripeEvents.attempts })
  })
}

/** Acts on what is due, one after the other; a failing one is put back and does not stop the rest. Returns how many were taken. */
export async function workOnEvents(db: Database, desk: PaymentDesk, isStopping: () => boolean): Promise<number> {
  const claimed = await claimEvents(db)
  for (const event of claimed) {
    if (isStopping()) await putBack(db, event.id, 0, null)
    else await workOnEvent(db, desk, event)
  }
  return claimed.length
}

async function workOnEvent(db: Database, desk: PaymentDesk, { id, payload, attempts }: Claimed): Promise<void> {
  try {
    const { outcome, words } = await actOnEvent(db, desk, eventHintSchema.parse(payload))
    const state = outcome === 'applied' ? 'done' : outcome === 'not-ours' ? 'ignored' : 'quarantined'
    await db.update(stripeEvents).set({ state, outcome: words, doneAt: sql`now()` }).where(eq(stripeEvents.id, id))
    log.info('stripe-event', { stripeEvent: id, state, words })
  }
  catch (error) {
    // Our own records being away is no fault of the event: it is tried again without counting.
    const isOurs = databaseErrorCode(error) !== undefined && !(error instanceof Stripe.errors.StripeError)
    log.error('stripe-event-failed', error, { stripeEvent: id, attempts })
    if (attempts < MOST_ATTEMPTS || isOurs) {
      await putBack(db, id, eventDelayS(attempts, Math.random()), describe(error))
      return
    }
    await db.update(stripeEvents).set({ state: 'dead', outcome: describe(error), doneAt: sql`now()` }).where(eq(stripeEvents.id, id))
    log.error('stripe-event-dead', error, { stripeEvent: id, attempts })
  }
}

async function putBack(db: Database, id: string, delayS: number, outcome: string | null): Promise<void> {
  await db.update(stripeEvents).set({ runAt: sql`now() + make_interval(secs => ${delayS})`, outcome }).where(and(eq(stripeEvents.id, id), eq(stripeEvents.state, 'waiting')))
}

const describe = (error: unknown) => error instanceof Error ? `${error.name}: ${error.message}`.slice(0, 300) : 'unknown'
