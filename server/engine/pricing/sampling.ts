import { PriceError } from './errors'

/** Acceptance quality limits of the table, in percent. */
export const AQL_PERCENTS = [0.65, 1, 1.5, 2.5, 4, 6.5] as const
export type AqlPercent = (typeof AQL_PERCENTS)[number]

type Cell = number | 'down' | 'up'
interface PlanRow { lotUpTo: number, letter: string, sampleSize: number, acceptance: readonly Cell[] }

const plan = (lotUpTo: number, letter: string, sampleSize: number, ...acceptance: Cell[]): PlanRow => ({ lotUpTo, letter, sampleSize, acceptance })

/** ISO 2859-1, general inspection level II, single sampling, normal inspection; columns as AQL_PERCENTS. */
const PLANS: readonly PlanRow[] = [
  plan(8, 'A', 2, 'down', 'down', 'down', 'down', 'down', 0),
  plan(15, 'B', 3, 'down', 'down', 'down', 'down', 0, 'up'),
  plan(25, 'C', 5, 'down', 'down', 'down', 0, 'up', 'down'),
  plan(50, 'D', 8, 'down', 'down', 0, 'up', 'down', 1),
  plan(90, 'E', 13, 'down', 0, 'up', 'down', 1, 2),
  plan(150, 'F', 20, 0, 'up', 'down', 1, 2, 3),
  plan(280, 'G', 32, 'up', 'down', 1, 2, 3, 5),
  plan(500, 'H', 50, 'down', 1, 2, 3, 5, 7),
  plan(1200, 'J', 80, 1, 2, 3, 5, 7, 10),
  plan(3200, 'K', 125, 2, 3, 5, 7, 10, 14),
  plan(10_000, 'L', 200, 3, 5, 7, 10, 14, 21),
  plan(35_000, 'M', 315, 5, 7, 10, 14, 21, 'up'),
  plan(150_000, 'N', 500, 7, 10, 14, 21, 'up', 'up'),
  plan(500_000, 'P', 800, 10, 14, 21, 'up', 'up', 'up'),
  plan(Number.MAX_SAFE_INTEGER, 'Q', 1250, 14, 21, 'up', 'up', 'up', 'up'),
]

export interface SamplingPlan {
  letter: string
  /** Springs to measure, never more than the lot. */
  sampleSize: number
  /** The lot passes with this many outside the limits, or fewer. */
  acceptanceNumber: number
  isWholeLot: boolean
}

/** True where the number is an acceptance quality limit of the table. */
export function isAqlPercent(value: number): value is AqlPercent {
  return AQL_PERCENTS.some((aql) => aql === value)
}

/**
 * Sample for a lot by ISO 2859-1 level II. An arrow in the table means the plan of the next row that way, with its sample size;
 * a sample as large as the lot means every spring. Throws PriceError `lot-out-of-range`.
 */
export function samplingPlanFor(lotSize: number, aqlPercent: AqlPercent): SamplingPlan {
  if (!Number.isSafeInteger(lotSize) || lotSize < 1) throw new PriceError('lot-out-of-range', 'A lot is a whole number of springs, one or more.', 'lotSize')
  const column = AQL_PERCENTS.indexOf(aqlPercent)
  let index = PLANS.findIndex((row) => lotSize <= row.lotUpTo)
  for (;;) {
    const row = PLANS[index]
    const cell = row?.acceptance[column]
    if (!row || cell === undefined) throw new PriceError('lot-out-of-range', 'No sampling plan covers this lot.', 'lotSize')
    if (typeof cell === 'number') {
      const isWholeLot = row.sampleSize >= lotSize
      return { letter: row.letter, sampleSize: isWholeLot ? lotSize : row.sampleSize, acceptanceNumber: isWholeLot ? 0 : cell, isWholeLot }
    }
    index += cell === 'down' ? 1 : -1
  }
}
