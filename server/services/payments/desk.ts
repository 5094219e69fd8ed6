import type Stripe from 'stripe'

/** What payments are handled with: Stripe, whether it is the live one, and the address of our own pages. */
export type PaymentDesk = { stripe: Stripe, livemode: boolean, origin: string }
