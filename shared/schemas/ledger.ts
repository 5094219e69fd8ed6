/** One line of a job's cost: what was quoted and what was recorded. Amounts in minor units; null where nothing was recorded. */
export type CostRow = { code: string, label: string, quotedBasis: string, actualBasis: string, quotedMinor: number, actualMinor: number | null, differenceMinor: number | null }
export type JobCostView = {
  jobRef: string, orderRef: string, customer: string, title: string, quantity: number, currency: string, priceBookNumber: number, finishedAt: string | null,
  priceMinor: number, quotedCostMinor: number, actualCostMinor: number, differenceMinor: number, isComplete: boolean, rows: CostRow[],
  records: { at: string, operation: string, act: string, person: string, good: number, scrap: number, wireKg: number | null, note: string }[],
  entries: { at: string, words: string, account: string, debitMinor: number, creditMinor: number }[],
}
export type LedgerJobRow = { jobRef: string, orderRef: string, customer: string, title: string, quantity: number, state: string, finishedAt: string | null, currency: string, priceMinor: number, quotedCostMinor: number, actualCostMinor: number | null, differenceMinor: number | null }
export type LedgerView = { currency: string, cashInMinor: number, depositsHeldMinor: number, balanceDueMinor: number, jobs: LedgerJobRow[], nextCursor: string | null }
