import type Stripe from 'stripe'
import type { SessionOutcome } from './control/outcomes'
import type { DeliverySwitch } from './delivery/switches'
import type { RequestLogEntry } from './fake'
import type { PlannedFailure } from './failures'
import type { DeliveryRecord, WireEvent } from './state'

/** The control interface of a fake in another process, for API and browser tests. */
export interface StripeFakeControl {
  /** Plays the customer, the bank or time on a session. */
  setOutcome: (sessionId: string, outcome: SessionOutcome, settings?: { email?: string, name?: string, card?: string }) => Promise<Stripe.Checkout.Session>
  /** Bends coming deliveries. */
  addSwitch: (bend: Partial<DeliverySwitch>) => Promise<DeliverySwitch>
  clearSwitches: () => Promise<void>
  /** Plans a failure of coming API requests. */
  addFailure: (failure: Partial<PlannedFailure>) => Promise<PlannedFailure>
  clearFailures: () => Promise<void>
  listDeliveries: (filter?: { state?: DeliveryRecord['state'], type?: string }) => Promise<DeliveryRecord[]>
  getDelivery: (eventId: string) => Promise<DeliveryRecord>
  /** Waits until no delivery is pending; rejects after the time given. */
  waitForDeliveries: (withinMs?: number) => Promise<DeliveryRecord[]>
  listRequests: () => Promise<RequestLogEntry[]>
  /** How the next refunds go, in order. */
  planRefunds: (outcomes: ('succeeded' | 'pending' | 'failed')[]) => Promise<void>
  endRefund: (refundId: string, outcome: 'succeeded' | 'failed') => Promise<Stripe.Refund>
  openDispute: (chargeId: string, settings?: { amountMinor?: number, reason?: string }) => Promise<Stripe.Dispute>
  endDispute: (disputeId: string, outcome: 'won' | 'lost') => Promise<Stripe.Dispute>
  /** Sends an event of any type about a stored or an invented object. */
  sendEvent: (event: { type: string, object?: object, objectId?: string, id?: string, livemode?: boolean, apiVersion?: string, isThin?: boolean }) => Promise<WireEvent>
  redeliver: (eventId: string) => Promise<void>
  /** Makes a stored object disagree with what was asked for. */
  overwriteObject: (id: string, set: Record<string, unknown>) => Promise<void>
  /** Moves the fake's clock to so many seconds ahead of real time. */
  setClockOffset: (offsetS: number) => Promise<void>
  setWebhook: (settings: { url?: string, secrets?: string[], retryGapsMs?: number[], isOff?: boolean }) => Promise<void>
  /** Forgets everything. */
  reset: () => Promise<void>
}

/** A client for the control interface at `url`. Each call rejects with the fake's own words when it is refused. */
export function createStripeFakeControl(fake: { url: string, secretKey: string }): StripeFakeControl {
  async function call<T>(method: 'GET' | 'POST', path: string, body?: object): Promise<T> {
    const response = await fetch(`${fake.url}/_fake${path}`, {
      method,
      headers: { 'authorization': `Bearer ${fake.secretKey}`, 'content-type': 'application/json' },
      body: body === undefined ? undefined : JSON.stringify(body),
    })
    const answer: unknown = await response.json()
    if (!response.ok) throw new Error(`${method} ${path}: ${response.status} ${JSON.stringify(answer)}`)
    // The fake and this client are one program: the route's answer is the type that the method states.
    return answer as T
  }
  const listDeliveries: StripeFakeControl['listDeliveries'] = async (filter = {}) =>
    (await call<{ deliveries: DeliveryRecord[] }>('GET', `/deliveries?${new URLSearchParams(filter).toString()}`)).deliveries
  return {
    setOutcome: (id, outcome, settings = {}) => call('POST', `/sessions/${id}/outcome`, { outcome, ...settings }),
    addSwitch: bend => call('POST', '/switches', bend),
    clearSwitches: () => call('POST', '/switches/clear'),
    addFailure: failure => call('POST', '/failures', failure),
    clearFailures: () => call('POST', '/failures/clear'),
    listDeliveries,
    getDelivery: id => call('GET', `/deliveries/${id}`),
    async waitForDeliveries(withinMs = 5000) {
      const deadline = Date.now() + withinMs
      for (;;) {
        const records = await listDeliveries()
        const pending = records.filter(record => record.state === 'pending')
        if (pending.length === 0) return records
        if (Date.now() > deadline) throw new Error(`Still pending: ${pending.map(record => record.eventType).join(', ')}`)
        await new Promise(resolve => setTimeout(resolve, 20))
      }
    },
    listRequests: async () => (await call<{ requests: RequestLogEntry[] }>('GET', '/requests')).requests,
    planRefunds: outcomes => call('POST', '/refunds/next', { outcomes }),
    endRefund: (id, outcome) => call('POST', `/refunds/${id}/outcome`, { outcome }),
    openDispute: (id, settings = {}) => call('POST', `/charges/${id}/dispute`, settings),
    endDispute: (id, outcome) => call('POST', `/disputes/${id}/outcome`, { outcome }),
    sendEvent: event => call('POST', '/events', event),
    redeliver: id => call('POST', `/events/${id}/redeliver`),
    overwriteObject: (id, set) => call('POST', `/objects/${id}`, { set }),
    setClockOffset: offsetS => call('POST', '/clock', { offsetS }),
    setWebhook: settings => call('POST', '/webhook', settings),
    reset: () => call('POST', '/reset'),
  }
}
