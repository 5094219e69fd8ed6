import { and, desc, eq } from 'drizzle-orm'
import type { PaymentKind, PaymentStatus } from '#shared/schemas/payment'
import type { OrderState } from '#shared/schemas/order-states'
import { payments } from '../../database/schema'
import type { Queryable } from '../../database/client'

/** The newest attempt of a payment, as its customer may see it. */
export async function findPaymentStatus(db: Queryable, orderId: string, kind: PaymentKind): Promise<PaymentStatus> {
  const [payment] = await db.select({ state: payments.state, amountMinor: payments.amountMinor, currency: payments.currency }).from(payments)
    .where(and(eq(payments.orderId, orderId), eq(payments.kind, kind))).orderBy(desc(payments.attempt)).limit(1)
  return payment ? { kind, ...payment } : { kind, state: 'none', amountMinor: null, currency: null }
}

const BALANCE_STATES: readonly OrderState[] = ['finished', 'dispatched', 'settled']
/** Which payment an order is at. */
export const paymentKindOf = (state: OrderState): PaymentKind => BALANCE_STATES.includes(state) ? 'balance' : 'deposit'
