import { and, eq } from 'drizzle-orm'
import Stripe from 'stripe'
import { toCurrency } from '#shared/money/index'
import type { OpenedPayment, PaymentKind } from '#shared/schemas/payment'
import { buildSessionParams } from '../../integrations/stripe'
import { log } from '../../utils/log'
import { payments } from '../../database/schema'
import type { Database } from '../../database/client'
import { inTransaction, type ServiceContext } from '../context'
import { conflict, DomainError, notFound } from '../errors'
import { isOwnOrder, findOrder, type OrderRecord } from '../orders/access'
import { orderRefOf } from '../orders/reference'
import { storeSession, takeAttempt, type PaymentRow } from './attempts'
import { closeSession } from './close'
import type { PaymentDesk } from './desk'
import { findSession } from './sync'

const OTHER_CLICK_MS = 6_000
const wait = (ms: number) => new Promise(resolve => setTimeout(resolve, ms))
const unanswered = () => new DomainError('unavailable', 'The payment page does not answer just now. Nothing was taken. Try again in a minute.', [], 30)

/**
 * Opens Stripe's page for the deposit or the balance of an order, or gives the page that is open already. The attempt is
 * committed before Stripe is called, outside any transaction, so that a crash in between leaves something to reconcile.
 * @throws DomainError unauthenticated, not-found, conflict when nothing is to be paid, unavailable when Stripe does not answer
 */
export async function openPayment(context: Pick<ServiceContext, 'db' | 'actor' | 'now'>, desk: PaymentDesk, { ref, kind }: { ref: string, kind: PaymentKind }): Promise<OpenedPayment> {
  const { db, actor, now } = context
  if (!actor) throw new DomainError('unauthenticated', 'Sign in first.')
  const order = await findOrder(db, ref)
  if (!order || !isOwnOrder(actor, order)) throw notFound('order')

  for (let round = 0; round < 4; round += 1) {
    const next = await inTransaction(db, tx => takeAttempt(tx, order.id, kind, now))
    if (next.do === 'reuse') return { url: next.url }
    if (next.do === 'close') {
      await closeSession(db, desk, next.payment)
      continue
    }
    const url = await openSession(db, desk, order, next.payment, next.isNew)
    if (url) return { url }
  }
  throw conflict('The state of this payment is changing. Load the page again.')
}

/** Opens the session of an attempt. Null when the attempt came to its end meanwhile. */
async function openSession(db: Database, desk: PaymentDesk, order: Pick<OrderRecord, 'id' | 'number'>, payment: PaymentRow, isNew: boolean): Promise<string | null> {
  // A second click waits for what the first one gets; only when that one seems to have died it asks with the same key itself.
  const until = performance.now() + (isNew ? 0 : OTHER_CLICK_MS)
  while (performance.now() < until) {
    const url = await findOpenUrl(db, payment.id)
    if (url !== 'opening') return url
    await wait(100)
  }
  await createSession(db, desk, order, payment)
  const url = await findOpenUrl(db, payment.id)
  return url === 'opening' ? null : url
}

async function findOpenUrl(db: Database, paymentId: string): Promise<string | null | 'opening'> {
  const [row] = await db.select({ state: payments.state, url: payments.url }).from(payments).where(eq(payments.id, paymentId))
  if (row?.state === 'opening') return 'opening'
  return row?.state === 'open' ? row.url : null
}

/**
 * Asks Stripe for the session of an attempt, with the attempt's own key, and stores the answer. Safe to repeat.
 * @throws DomainError unavailable when Stripe gives no answer that can be used; the attempt stays as it is
 */
export async function createSession(db: Database, desk: PaymentDesk, order: Pick<OrderRecord, 'id' | 'number'>, payment: PaymentRow): Promise<void> {
  const orderRef = orderRefOf(order.number)
  const params = buildSessionParams({
    paymentId: payment.id, orderId: order.id, orderRef, kind: payment.kind, attempt: payment.attempt, amountMinor: payment.amountMinor, currency: toCurrency(payment.currency),
    expiresAt: payment.expiresAt, what: `${payment.kind === 'deposit' ? 'Deposit' : 'Balance'} for order ${orderRef}`, returnUrl: `${desk.origin}/account/orders/${orderRef}`,
  })
  try {
    await storeSession(db, payment.id, await desk.stripe.checkout.sessions.create(params, { idempotencyKey: payment.idempotencyKey }))
  }
  catch (error) {
    if (!(error instanceof Stripe.errors.StripeError)) throw error
    await recover(db, desk, payment, error)
  }
}

/**
 * After an answer that says nothing, asks Stripe whether it made the session all the same. An error that is replayed for the key
 * would be so for a day: if there is no session behind it, the attempt is closed, and paying goes on with the next one.
 * @throws DomainError unavailable while nothing is known
 */
async function recover(db: Database, desk: PaymentDesk, payment: PaymentRow, error: InstanceType<typeof Stripe.errors.StripeError>): Promise<void> {
  // The same key with other parameters is a defect of ours, and so are parameters that Stripe refuses: never a new key by itself.
  if (error instanceof Stripe.errors.StripeIdempotencyError || error instanceof Stripe.errors.StripeInvalidRequestError) {
    log.error('payment-open-refused', error, { payment: payment.id })
    throw unanswered()
  }
  log.warn('payment-open-unanswered', { payment: payment.id, type: error.type, code: error.code ?? null })
  const isAnswer = (error.statusCode ?? 0) >= 500
  const sessionId = isAnswer ? await findSession(desk, payment).catch(refuseQuietly) : undefined
  if (sessionId) await storeSession(db, payment.id, await desk.stripe.checkout.sessions.retrieve(sessionId).catch(refuse))
  else if (sessionId === null && error.headers?.['idempotent-replayed'] === 'true') await db.update(payments).set({ state: 'expired' }).where(and(eq(payments.id, payment.id), eq(payments.state, 'opening')))
  else throw unanswered()
}

function refuse(error: unknown): never {
  throw error instanceof Stripe.errors.StripeError ? unanswered() : error
}
const refuseQuietly = (error: unknown): undefined => error instanceof Stripe.errors.StripeError ? undefined : refuse(error)
