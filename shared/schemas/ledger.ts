/** One line of a job's cost: what was quoted and what was recorded. Amounts in minor units; null where nothing was recorded. */
export type CostRow = { code: string, label: string, quotedBasis: string, actualBasis: string, quotedMinor: number, actualMinor: number | null, differenceMinor: number | null }

/** A job's cost. `comparedQuotedMinor` is the quoted cost of those lines that have a record: what `actualCostMinor` is compared with. */
export type JobCostView = {
  jobRef: string, orderRef: string, customer: string, title: string, quantity: number, currency: string, priceBookNumber: number, finishedAt: string | null, timeZone: string,
  priceMinor: number, quotedCostMinor: number, comparedQuotedMinor: number, actualCostMinor: number, differenceMinor: number, isComplete: boolean, words: string, rows: CostRow[],
  records: { at: string, operation: string, act: string, person: string, good: number, scrap: number, wireKg: number | null, note: string }[],
  entries: { at: string, words: string, account: string, debitMinor: number, creditMinor: number }[],
}
export type LedgerJobRow = {
  jobRef: string, orderRef: string, customer: string, title: string, quantity: number, state: string, finishedAt: string | null, currency: string,
  priceMinor: number, quotedCostMinor: number, actualCostMinor: number | null, differenceMinor: number | null, isComplete: boolean,
}
/** Sums over the books, and one page of jobs, newest first. */
export type LedgerView = { currency: string, timeZone: string, cashInMinor: number, depositsHeldMinor: number, balanceDueMinor: number, jobs: LedgerJobRow[], nextCursor: string | null }
