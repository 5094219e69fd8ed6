import { createStripe } from '../integrations/stripe'
import type { PaymentDesk } from '../services/payments/desk'

let desk: PaymentDesk | undefined

/** What payments of this process are handled with. */
export function usePaymentDesk(): PaymentDesk {
  const { stripe, origin } = useSettings()
  desk ??= { stripe: createStripe(stripe), livemode: stripe.livemode, origin }
  return desk
}
