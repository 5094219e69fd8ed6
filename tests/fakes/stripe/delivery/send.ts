import { request } from 'node:http'

/** One delivery as it goes over the wire. */
export interface OutgoingDelivery {
  url: string
  body: string
  signature: string
  /** How long to wait for the answer. */
  answerTimeoutMs: number
  /** The body is sent in two halves with this pause between them. */
  bodyPauseMs: number
}

/** What came back: a status, or why there is none. */
export interface DeliveryAnswer { status: number | null, error: string | null, durationMs: number }

/** Posts an event once on a connection of its own. Never throws: a failure is an answer without a status. */
export function sendDelivery(delivery: OutgoingDelivery): Promise<DeliveryAnswer> {
  const startedAt = performance.now()
  return new Promise((resolve) => {
    const finish = (status: number | null, error: string | null) => {
      clearTimeout(timer)
      resolve({ status, error, durationMs: Math.round(performance.now() - startedAt) })
    }
    const bytes = Buffer.from(delivery.body, 'utf8')
    const outgoing = request(delivery.url, {
      method: 'POST',
      agent: false,
      headers: {
        'content-type': 'application/json; charset=utf-8',
        'content-length': bytes.length,
        'stripe-signature': delivery.signature,
        'user-agent': 'Wirewright-payment-fake/1.0',
        'accept': '*/*; q=0.5, application/xml',
        'connection': 'close',
      },
    }, (incoming) => {
      incoming.resume()
      incoming.once('end', () => finish(incoming.statusCode ?? null, null))
      incoming.once('error', error => finish(null, error.message))
    })
    const timer = setTimeout(() => {
      finish(null, `no answer within ${delivery.answerTimeoutMs} ms`)
      outgoing.destroy()
    }, delivery.answerTimeoutMs)
    outgoing.once('error', error => finish(null, error.message))
    if (delivery.bodyPauseMs > 0) {
      const middle = Math.floor(bytes.length / 2)
      outgoing.write(bytes.subarray(0, middle))
      setTimeout(() => outgoing.end(bytes.subarray(middle)), delivery.bodyPauseMs)
    } else {
      outgoing.end(bytes)
    }
  })
}
