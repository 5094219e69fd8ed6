import { randomUUID } from 'node:crypto'
import { asc, eq } from 'drizzle-orm'
import Stripe from 'stripe'
import { enquiryRequestSchema } from '../../../shared/schemas/enquiry'
import type { PaymentKind } from '../../../shared/schemas/payment'
import { acceptQuote } from '../../services/quotes/accept'
import { createEnquiry } from '../../services/enquiries/create'
import { recordBench } from '../../services/bench/record'
import { dispatchJob } from '../../services/loading/dispatch'
import { jobRefOf } from '../../services/jobs/refs'
import { placeWholeJob } from '../../services/loading/place-all'
import { bookCapture } from '../../services/payments/book-capture'
import { findAmountDue } from '../../services/payments/amount-due'
import { orderNumberOf } from '../../services/orders/reference'
import { inTransaction, type Actor, type ServiceContext } from '../../services/context'
import { jobs, operations, orders, payments, quotePrices } from '../schema'
import type { Database } from '../client'
import type { DemoOrder, DemoStage } from './demo-orders'

type Cast = { customer: Actor, supervisor: Actor, operator: Actor }
type Stage = { db: Database, origin: string, timeZone: string }

const ORDER: readonly DemoStage[] = ['enquiry', 'quoted', 'deposit-paid', 'planned', 'in-work', 'finished', 'settled']
const HOUR_MS = 3_600_000
const MINUTE_MS = 60_000

/** Plays one invented order through the services that real ones go through, each act at its own time in the past. */
export async function playOrder(stage: Stage, cast: Cast, demo: DemoOrder, now: Date): Promise<void> {
  const reaches = (wanted: DemoStage) => ORDER.indexOf(demo.stage) >= ORDER.indexOf(wanted)
  const start = now.getTime() - demo.hoursAgo * HOUR_MS
  const at = (hours: number, actor: Actor): ServiceContext => ({ ...stage, actor, requestId: 'seed', now: new Date(Math.min(now.getTime(), start + hours * HOUR_MS)) })

  const outcome = await createEnquiry(at(0, cast.customer), { request: enquiryRequestSchema.parse(demo.enquiry), clientKey: randomUUID() })
  if (!reaches('deposit-paid')) return
  if (outcome.outcome !== 'quoted') throw new Error(`the demo order "${demo.enquiry.contact.title}" was not quoted at once: ${outcome.reasons.join(' ')}`)

  const [order] = await stage.db.select().from(orders).where(eq(orders.number, orderNumberOf(outcome.ref)))
  await acceptQuote(at(3, cast.customer), { ref: outcome.ref, quantity: demo.quantity, version: order!.version })
  await pay(stage, order!.id, 'deposit', at(4, cast.customer).now)
  if (!reaches('planned')) return

  const [job] = await stage.db.select().from(jobs).where(eq(jobs.orderId, order!.id))
  const jobRef = jobRefOf(job!.number)
  // A job that is only planned was planned an hour ago, so that its work lies ahead.
  await placeWholeJob(at(reaches('in-work') ? 5 : demo.hoursAgo - 1, cast.supervisor), jobRef, job!.version)
  if (!reaches('in-work')) return

  const isWhole = reaches('finished')
  await work({ stage, cast, demo, jobId: job!.id, startMs: start + 24 * HOUR_MS, until: isWhole ? Infinity : demo.finishedOperations ?? 1 })
  if (!reaches('settled')) return
  await pay(stage, order!.id, 'balance', new Date(start + 200 * HOUR_MS))
  const [done] = await stage.db.select({ version: jobs.version }).from(jobs).where(eq(jobs.id, job!.id))
  await dispatchJob(at(210, cast.supervisor), jobRef, done!.version)
}

/** Books a payment that is invented with its order: no session of Stripe stands behind it. */
async function pay({ db, origin }: Stage, orderId: string, kind: PaymentKind, now: Date): Promise<void> {
  const desk = { stripe: new Stripe('sk_test_demo'), livemode: false, origin }
  await inTransaction(db, async (tx) => {
    const [order] = await tx.select().from(orders).where(eq(orders.id, orderId)).for('update')
    const due = await findAmountDue(tx, orderId, kind)
    if (!order || !due) throw new Error('nothing is due in the demo order')
    const mark = `demo-${order.number}-${kind}`
    const [payment] = await tx.insert(payments).values({
      orderId, kind, attempt: 1, state: 'open', ...due, idempotencyKey: mark, stripeSessionId: `cs_${mark}`, expiresAt: new Date(now.getTime() + HOUR_MS), createdAt: now,
    }).returning()
    await bookCapture(tx, desk, { order, payment: payment!, fact: `capture:${mark}`, sessionId: `cs_${mark}`, paymentIntentId: `pi_${mark}`, now })
  })
}

type Work = { stage: Stage, cast: Cast, demo: DemoOrder, jobId: string, startMs: number, until: number }

/** Works a job's operations one after another, at the demo order's own pace; of the operation at `until` only the set-up and a part of the run. */
async function work({ stage, cast, demo, jobId, startMs, until }: Work): Promise<void> {
  const steps = await stage.db.select().from(operations).where(eq(operations.jobId, jobId)).orderBy(asc(operations.position))
  const [wire] = await stage.db.select({ kg: quotePrices.wirePlannedKg }).from(jobs).innerJoin(quotePrices, eq(quotePrices.id, jobs.quotePriceId)).where(eq(jobs.id, jobId))
  let clockMs = startMs
  const context = (): ServiceContext => ({ ...stage, actor: cast.operator, requestId: 'seed', now: new Date(clockMs) })
  const record = (operationId: string, act: 'start' | 'run' | 'count' | 'finish', counts: { good?: number, scrap?: number, wireKg?: number } = {}) =>
    recordBench(context(), operationId, { id: randomUUID(), act, good: counts.good ?? 0, scrap: counts.scrap ?? 0, wireKg: counts.wireKg, note: '' })

  for (const [index, step] of steps.entries()) {
    await record(step.id, 'start')
    clockMs += Number(step.setUpMinutes) * demo.paceFactor * MINUTE_MS
    await record(step.id, 'run')
    clockMs += Number(step.runMinutes) * demo.paceFactor * MINUTE_MS
    const isCoiling = step.kind === 'coiling'
    const coiled = isCoiling ? Math.ceil(demo.quantity * 1.02) : demo.quantity
    if (index + 1 > until) {
      await record(step.id, 'count', { good: Math.floor(demo.quantity * 0.6), scrap: 1 })
      return
    }
    await record(step.id, 'finish', { good: coiled, scrap: isCoiling ? Math.ceil(demo.quantity * 0.01) : 0, wireKg: isCoiling ? Math.round(Number(wire!.kg) * demo.paceFactor * 100) / 100 : undefined })
    clockMs += 3 * HOUR_MS
  }
}

