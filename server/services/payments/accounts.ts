/** The accounts of the books. A debit is positive, a credit negative. */
export const ACCOUNTS = {
  /** What Stripe holds for us: every capture is debited here. */
  cash: 'cash-at-stripe',
  /** Deposits for work that is not yet dispatched: what we owe in springs. */
  deposits: 'deposits-held',
  /** Balances received for finished springs. */
  balances: 'balances-received',
  /** Money that came for an order that could not take it: owed to the customer until staff decide. */
  credit: 'customer-credit',
} as const
