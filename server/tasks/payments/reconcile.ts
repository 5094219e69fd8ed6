import { reconcilePayments } from '../../services/payments/reconcile'

/** Reads unfinished payments back from Stripe, in case a webhook was lost. */
export default defineTask({
  meta: { name: 'payments:reconcile', description: 'Reads unfinished payments back from Stripe' },
  async run() {
    const result = await reconcilePayments(useDatabase(), usePaymentDesk(), { olderThanMinutes: 3 })
    log.info('payments-reconciled', result)
    return { result }
  },
})
