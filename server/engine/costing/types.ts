import type { Currency } from '#shared/money'
import type { OperationKind } from '../pricing'

/** A cost line as it was quoted: the amount in force, with any override. Overhead, risk and margin are no cost and are left aside. */
export interface QuotedCostLine {
  code: string
  label: string
  basis: string
  amountMinor: number
}

/** Minutes recorded for one operation; null where that part was not recorded. Times shorter than a minute are fractions. */
export interface RecordedMinutes {
  setUpMinutes: number | null
  runMinutes: number | null
}

/** Only what was recorded. What is absent or null was not. */
export interface JobActuals {
  minutes: Partial<Record<OperationKind, RecordedMinutes>>
  /** Wire issued less wire returned, kg. */
  wireKg: number | null
  /** Price of that wire, decimal text. */
  wirePricePerKg: string
  /** Rate of each centre kind now, decimal text. */
  hourlyRates: Record<OperationKind, string>
  /** Suppliers' invoices, carriage and the like, by the code of the line they belong to. */
  other?: readonly OtherCost[]
}

export interface OtherCost {
  lineCode: string
  /** Used where the quote has no such line. */
  label: string
  amountMinor: number
}

/** One line, quoted against recorded. `actualMinor` and `differenceMinor` are null where nothing was recorded. */
export interface JobCostRow {
  code: string
  label: string
  quotedBasis: string
  actualBasis: string
  quotedMinor: number
  actualMinor: number | null
  differenceMinor: number | null
}

export interface JobCostTotal {
  /** All quoted lines. */
  quotedMinor: number
  /** Quoted lines that have a record: what the actual cost is compared with. */
  comparedQuotedMinor: number
  /** What was recorded. */
  actualMinor: number
  /** `actualMinor - comparedQuotedMinor`, the sum of the rows' differences. */
  differenceMinor: number
  /** Every quoted line has a record. */
  isComplete: boolean
  /** Labels of quoted lines without a record. */
  notRecorded: string[]
  words: string
}

export interface JobCostComparison {
  currency: Currency
  rows: JobCostRow[]
  total: JobCostTotal
}
