import Stripe from 'stripe'
import { inject } from 'vitest'

/** Tells the Stripe fake to do something: see its control interface. */
export async function tellStripe<T = Record<string, unknown>>(path: string, body: object = {}): Promise<T> {
  const response = await fetch(`${inject('stripeFakeUrl')}/_fake/${path}`, { method: 'POST', headers: { 'content-type': 'application/json', 'authorization': `Bearer ${inject('stripeSecretKey')}` }, body: JSON.stringify(body) })
  if (!response.ok) throw new Error(`the Stripe fake answered ${path} with ${response.status}: ${await response.text()}`)
  return await response.json() as T
}

/** What the customer, the bank or time does to a session. */
export const endSession = (sessionId: string, outcome: string, more: object = {}) => tellStripe<Stripe.Checkout.Session>(`sessions/${sessionId}/outcome`, { outcome, ...more })

/** The unmodified SDK against the fake. */
export function stripeSdk(): Stripe {
  const { hostname, port } = new URL(inject('stripeFakeUrl'))
  return new Stripe(inject('stripeSecretKey'), { host: hostname, port, protocol: 'http', telemetry: false })
}

/** The sessions that were opened for an order, newest first. */
export async function sessionsOf(orderRef: string): Promise<Stripe.Checkout.Session[]> {
  const found: Stripe.Checkout.Session[] = []
  for await (const session of stripeSdk().checkout.sessions.list({ limit: 100 })) {
    if (session.metadata?.order_ref === orderRef) found.push(session)
  }
  return found
}

export type SignedEvent = { id: string, payload: string, signature: string }

/** An event as Stripe would sign it. */
export function signEvent(event: { id?: string, type: string, object: object, livemode?: boolean }, options: { stampOffsetS?: number, secret?: string } = {}): SignedEvent {
  const id = event.id ?? `evt_test${Math.random().toString(36).slice(2)}${Date.now()}`
  const payload = JSON.stringify({ id, object: 'event', api_version: '2026-10-28.endive', created: Math.floor(Date.now() / 1000), livemode: event.livemode ?? false, pending_webhooks: 1, request: null, type: event.type, data: { object: event.object } })
  return { id, payload, signature: signPayload(payload, options) }
}

/** The signature header of a payload. */
export const signPayload = (payload: string, { stampOffsetS = 0, secret = inject('stripeWebhookSecret') }: { stampOffsetS?: number, secret?: string } = {}): string =>
  Stripe.webhooks.generateTestHeaderString({ payload, secret, timestamp: Math.floor(Date.now() / 1000) + stampOffsetS })

/** Delivers a payload to the webhook. */
export async function deliver(payload: string, signature?: string, baseUrl = inject('baseUrl')): Promise<{ status: number, text: string }> {
  const response = await fetch(`${baseUrl}/api/webhooks/stripe`, { method: 'POST', body: payload, headers: { 'content-type': 'application/json', ...(signature === undefined ? {} : { 'stripe-signature': signature }) } })
  return { status: response.status, text: await response.text() }
}
