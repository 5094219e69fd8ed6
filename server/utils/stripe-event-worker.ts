import { closeUnwantedPayments } from '../services/payments/reconcile'
import { workOnEvents } from '../services/stripe-events/work'

const CLOSE_EVERY_MS = 15_000
let lastCloseMs = Number.NEGATIVE_INFINITY

/** Acts on stored events of Stripe, and closes pay pages that nobody should pay on any more. */
export const stripeEventWorker = createWorker({
  name: 'stripe-events',
  everyMs: 1_000,
  async takeWork(isStopping) {
    const taken = await workOnEvents(useDatabase(), usePaymentDesk(), isStopping)
    if (performance.now() - lastCloseMs > CLOSE_EVERY_MS && !isStopping()) {
      lastCloseMs = performance.now()
      await closeUnwantedPayments(useDatabase(), usePaymentDesk())
    }
    return taken
  },
})
