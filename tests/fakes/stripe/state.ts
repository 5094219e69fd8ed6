import type Stripe from 'stripe'

/** The wire form of a price: decimals are text there, while the SDK's type says what it turns them into. */
export type WirePrice = Omit<Stripe.Price, 'unit_amount_decimal'> & { unit_amount_decimal: string | null }
/** The wire form of a line item. */
export type WireLineItem = Omit<Stripe.LineItem, 'price'> & { price: WirePrice }

/** The wire form of a snapshot event. */
export interface WireEvent {
  id: string
  object: 'event'
  api_version: string | null
  created: number
  data: { object: object, previous_attributes?: object }
  livemode: boolean
  pending_webhooks: number
  request: { id: string | null, idempotency_key: string | null } | null
  type: string
}

/** One try to hand an event to the webhook address. */
export interface DeliveryAttempt {
  /** Real time, ISO 8601. */
  at: string
  /** Status of the answer; null when there was none. */
  status: number | null
  /** Why it failed, if it did. */
  error: string | null
  durationMs: number
  /** Which switches bent this attempt, in words. */
  bentBy: string[]
}

/** What became of one event's hand-over. */
export interface DeliveryRecord {
  eventId: string
  eventType: string
  url: string
  /** `dropped`: a switch lost it on purpose. `failed`: every retry was used up. */
  state: 'pending' | 'delivered' | 'failed' | 'dropped'
  attempts: DeliveryAttempt[]
  /** Rounds of attempts without success; copies sent together are one round. */
  failedRounds: number
  /** Real time in milliseconds of the next try; null when none is planned. */
  nextAttemptAtMs: number | null
}

/** What was asked of a session beyond what the session itself shows. */
export interface SessionSetup {
  description: string | null
  paymentMetadata: Record<string, string>
  receiptEmail: string | null
  statementDescriptor: string | null
  statementDescriptorSuffix: string | null
  setupFutureUsage: string | null
  transferGroup: string | null
  /** Number of the next payment attempt: the pay page sends it back so that a double click counts once. */
  nextAttemptNumber: number
  /** Test card whose second step is being waited for. */
  cardAwaitingAuthentication: string | null
  /** Test card that paid. */
  cardUsed: string | null
}

/** A change that time brings: a bank debit that settles, a refund that goes through. */
export interface ScheduledChange {
  kind: 'settlePayment' | 'settleRefund' | 'openDispute' | 'bookCharge'
  objectId: string
  outcome: 'succeeded' | 'failed'
  /** Real time in milliseconds. */
  dueAtMs: number
}

/** An answer kept under an idempotency key (FK-5). */
export interface StoredAnswer {
  fingerprint: string
  /** Fake time in seconds. */
  storedAtS: number
  status: number
  body: string
  requestId: string
}

/** Everything the fake knows. Tables keep the order of creation. */
export interface FakeState {
  format: 1
  clockOffsetS: number
  sessions: Record<string, Stripe.Checkout.Session>
  setups: Record<string, SessionSetup>
  lineItems: Record<string, WireLineItem[]>
  products: Record<string, Stripe.Product>
  paymentIntents: Record<string, Stripe.PaymentIntent>
  paymentMethods: Record<string, Stripe.PaymentMethod>
  charges: Record<string, Stripe.Charge>
  refunds: Record<string, Stripe.Refund>
  disputes: Record<string, Stripe.Dispute>
  customers: Record<string, Stripe.Customer>
  balanceTransactions: Record<string, Stripe.BalanceTransaction>
  events: Record<string, WireEvent>
  deliveries: Record<string, DeliveryRecord>
  scheduled: ScheduledChange[]
  answers: Record<string, StoredAnswer>
  /** How the next refunds go, in order; empty means at once. */
  nextRefundOutcomes: ('succeeded' | 'pending' | 'failed')[]
}

/** A state in which nothing has happened. */
export function createEmptyState(): FakeState {
  return {
    format: 1,
    clockOffsetS: 0,
    sessions: {},
    setups: {},
    lineItems: {},
    products: {},
    paymentIntents: {},
    paymentMethods: {},
    charges: {},
    refunds: {},
    disputes: {},
    customers: {},
    balanceTransactions: {},
    events: {},
    deliveries: {},
    scheduled: [],
    answers: {},
    nextRefundOutcomes: [],
  }
}
