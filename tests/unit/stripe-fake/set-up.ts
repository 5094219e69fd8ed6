import { createServer } from 'node:http'
import type { IncomingHttpHeaders } from 'node:http'
import type { AddressInfo } from 'node:net'
import Stripe from 'stripe'
import { createStripeFakeControl } from '../../fakes/stripe/control-client'
import type { StripeFakeControl } from '../../fakes/stripe/control-client'
import { startStripeFake } from '../../fakes/stripe/index'
import type { RunningStripeFake, StripeFakeOptions } from '../../fakes/stripe/index'

/** One request that reached the webhook address. */
export interface ReceivedHook { body: string, signature: string, headers: IncomingHttpHeaders, atMs: number }

/** A webhook address under the test's control. */
export interface HookReceiver {
  url: string
  received: ReceivedHook[]
  /** Status for the coming requests; 0 breaks the connection. */
  answerWith: (status: number, delayMs?: number) => void
  /** Waits until so many requests have come. */
  waitFor: (count: number, withinMs?: number) => Promise<ReceivedHook[]>
  close: () => Promise<void>
}

export const HOOK_SECRET = 'whsec_unit_test'

/** Listens on a free port and keeps what arrives. */
export async function startReceiver(): Promise<HookReceiver> {
  const received: ReceivedHook[] = []
  let [status, delayMs] = [200, 0]
  const server = createServer((request, response) => {
    const chunks: Buffer[] = []
    request.on('data', (chunk: Buffer) => chunks.push(chunk))
    request.on('end', () => {
      received.push({
        body: Buffer.concat(chunks).toString('utf8'),
        signature: String(request.headers['stripe-signature']),
        headers: request.headers,
        atMs: Date.now(),
      })
      if (status === 0) request.socket.destroy()
      else setTimeout(() => response.writeHead(status).end(), delayMs)
    })
  })
  await new Promise<void>(resolve => server.listen(0, '127.0.0.1', resolve))
  const { port } = server.address() as AddressInfo
  return {
    url: `http://127.0.0.1:${port}/hook`,
    received,
    answerWith(nextStatus, nextDelayMs = 0) {
      status = nextStatus
      delayMs = nextDelayMs
    },
    async waitFor(count, withinMs = 4000) {
      const deadline = Date.now() + withinMs
      while (received.length < count) {
        if (Date.now() > deadline) throw new Error(`Only ${received.length} of ${count} requests came`)
        await new Promise(resolve => setTimeout(resolve, 10))
      }
      return received
    },
    close: () => new Promise((resolve) => {
      server.close(() => resolve())
      server.closeAllConnections()
    }),
  }
}

/** A fake with the real SDK pointed at it. */
export interface Bench { running: RunningStripeFake, stripe: Stripe, control: StripeFakeControl, receiver: HookReceiver, close: () => Promise<void> }

/** The real SDK against a fake on this machine. */
export function createSdk(running: Pick<RunningStripeFake, 'host' | 'port' | 'secretKey'>, key = running.secretKey): Stripe {
  return new Stripe(key, { host: running.host, port: running.port, protocol: 'http', telemetry: false, maxNetworkRetries: 0, timeout: 5000 })
}

/** Starts a receiver, a fake that delivers to it, the SDK and the control client. */
export async function startBench(options: StripeFakeOptions = {}): Promise<Bench> {
  const receiver = await startReceiver()
  const running = await startStripeFake({
    webhookUrl: receiver.url, webhookSecrets: [HOOK_SECRET], retryGapsMs: [40, 80, 160], settleAfterMs: 100, answerTimeoutMs: 1000, ...options,
  })
  return {
    running,
    receiver,
    stripe: createSdk(running),
    control: createStripeFakeControl(running),
    async close() {
      await running.close()
      await receiver.close()
    },
  }
}

/** Parameters of a plain session, 1234.50 EUR, to be overridden. */
export function sessionParams(overrides: Partial<Stripe.Checkout.SessionCreateParams> = {}): Stripe.Checkout.SessionCreateParams {
  return {
    mode: 'payment',
    success_url: 'http://127.0.0.1:3999/paid?session={CHECKOUT_SESSION_ID}',
    cancel_url: 'http://127.0.0.1:3999/quote',
    customer_email: 'buyer@example.com',
    client_reference_id: 'order-17-deposit-1',
    line_items: [{ quantity: 1, price_data: { currency: 'eur', unit_amount: 123_450, product_data: { name: 'Deposit on order 17' } } }],
    metadata: { order: '17', attempt: '1', kind: 'deposit' },
    payment_intent_data: { metadata: { order: '17', attempt: '1', kind: 'deposit' }, description: 'Order 17' },
    ...overrides,
  }
}

/** The error that a call rejects with; fails the test when it does not reject. */
export async function refusalOf(call: Promise<unknown>): Promise<Stripe.errors.StripeError> {
  try {
    await call
  } catch (error) {
    if (error instanceof Stripe.errors.StripeError) return error
    throw error
  }
  throw new Error('The call was not refused')
}

/** A raw request with form encoding, past the SDK. */
export async function postForm(running: RunningStripeFake, path: string, form: string, headers: Record<string, string> = {}): Promise<{ status: number, headers: Headers, body: unknown }> {
  const response = await fetch(`${running.url}${path}`, {
    method: 'POST',
    headers: { 'authorization': `Bearer ${running.secretKey}`, 'content-type': 'application/x-www-form-urlencoded', ...headers },
    body: form,
  })
  return { status: response.status, headers: response.headers, body: await response.json() }
}
