import { claimRun } from '../../services/limits/count'
import { reconcilePayments } from '../../services/payments/reconcile'

const EVERY_S = 300

/** Reads unfinished payments back from Stripe, in case a webhook was lost. Of several processes one does it. */
export default defineTask({
  meta: { name: 'payments:reconcile', description: 'Reads unfinished payments back from Stripe' },
  async run() {
    if (!(await claimRun(useDatabase(), 'payments:reconcile', EVERY_S))) return { result: null }
    const result = await reconcilePayments(useDatabase(), usePaymentDesk(), { olderThanMinutes: 3 })
    log.info('payments-reconciled', result)
    return { result }
  },
})
