import type Stripe from 'stripe'
import { resourceMissing } from '../errors'
import type { Fake } from '../fake'
import type { FormTable } from '../form-decoding'
import { createId } from '../ids'
import { expandParam, parseParams } from '../params'

/** Books a movement of the balance and returns its id. Money in is positive. The fake takes no fee. */
export function createBalanceTransaction(
  fake: Fake, entry: { amountMinor: number, currency: string, sourceId: string, type: string, category: string },
): Stripe.BalanceTransaction {
  const createdS = fake.clock.nowS()
  const transaction: Stripe.BalanceTransaction = {
    id: createId('balanceTransaction'),
    object: 'balance_transaction',
    amount: entry.amountMinor,
    available_on: createdS + 2 * 24 * 60 * 60,
    balance_type: 'payments',
    created: createdS,
    currency: entry.currency,
    description: null,
    exchange_rate: null,
    fee: 0,
    fee_details: [],
    net: entry.amountMinor,
    reporting_category: entry.category,
    source: entry.sourceId,
    status: 'pending',
    type: entry.type as Stripe.BalanceTransaction.Type,
  }
  fake.state.balanceTransactions[transaction.id] = transaction
  return transaction
}

/** GET /v1/balance_transactions/:id */
export function retrieveBalanceTransaction(fake: Fake, id: string, form: FormTable): Stripe.BalanceTransaction {
  parseParams(form, expandParam)
  const transaction = fake.state.balanceTransactions[id]
  if (!transaction) throw resourceMissing('balance_transaction', id)
  return transaction
}
