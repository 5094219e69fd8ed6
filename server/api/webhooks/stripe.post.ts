import { storeEvent } from '../../services/stripe-events/store'
import { verifyEvent } from '../../services/stripe-events/verify'

const MOST_BYTES = 1024 * 1024

/**
 * Stripe's events. The one route without a session and without the check of the origin: the signature stands for both. It only
 * stores; the worker acts.
 */
export default defineEventHandler(async (event) => {
  const { requestId } = event.context
  setResponseHeader(event, 'cache-control', 'no-store')
  try {
    const settings = useSettings()
    const raw = await readLimitedBody(event, MOST_BYTES)
    const verified = await verifyEvent(raw, getRequestHeader(event, 'stripe-signature'), settings.stripe.webhookSecrets, Math.floor(Date.now() / 1000))
    if (verified.is !== 'event') {
      log.warn('webhook-refused', { requestId, why: verified.is })
      throw new HttpProblem(400, verified.is === 'forged' ? 'The signature does not fit.' : 'Snapshot events are taken here, no thin notifications.')
    }
    const stored = await storeEvent(useDatabase(), verified.event, settings.stripe.livemode)
    if (stored === 'refused') throw new HttpProblem(400, 'This is no event.')
    if (stored === 'waiting') stripeEventWorker.wake()
    return { received: true }
  }
  catch (error) {
    return sendProblem(event, toProblem(error, requestId))
  }
})
