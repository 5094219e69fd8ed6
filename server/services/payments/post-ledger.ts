import type { Transaction } from '../../database/client'
import { ledgerEntries, ledgerTransactions } from '../../database/schema'

export type Posting = {
  orderId: string, paymentId: string | null
  /** When it happened; now, by the database's clock, unless it is given. */
  at?: Date
  /** Names the fact; a second posting of it does nothing. */
  fact: string
  words: string, currency: string
  /** Debits are positive, credits negative; they sum to nought, which the database checks at commit. */
  entries: readonly { account: string, amountMinor: number }[]
}

/** Books a fact once. True when this call booked it. */
export async function postLedger(tx: Transaction, { entries, currency, ...fact }: Posting): Promise<boolean> {
  const [transaction] = await tx.insert(ledgerTransactions).values(fact).onConflictDoNothing().returning({ id: ledgerTransactions.id })
  if (!transaction) return false
  await tx.insert(ledgerEntries).values(entries.map(entry => ({ ...entry, currency, transactionId: transaction.id })))
  return true
}
