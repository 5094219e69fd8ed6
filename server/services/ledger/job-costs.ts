import { asc, eq, inArray } from 'drizzle-orm'
import { toCurrency } from '#shared/money'
import { compareJobCost, type JobActuals, type JobCostComparison } from '../../engine/costing'
import { operations, quoteLines, quotePrices, quotes, wireProducts, jobs } from '../../database/schema'
import type { Queryable } from '../../database/client'
import type { StoredPriceBook } from '../price-books/read-book'

type JobKey = { jobId: string, quotePriceId: string, currency: string, wirePricePerKg: string | null }

/** Compares the quoted with the recorded cost of several jobs at once: two queries, whatever their number. */
export async function readJobCosts(db: Queryable, book: StoredPriceBook, keys: readonly JobKey[]): Promise<Map<string, JobCostComparison>> {
  if (keys.length === 0) return new Map()
  const [lines, steps] = await Promise.all([
    db.select().from(quoteLines).where(inArray(quoteLines.quotePriceId, keys.map(key => key.quotePriceId))).orderBy(asc(quoteLines.position)),
    db.select().from(operations).where(inArray(operations.jobId, keys.map(key => key.jobId))).orderBy(asc(operations.position)),
  ])
  return new Map(keys.map((key) => {
    const quoted = lines.filter(line => line.quotePriceId === key.quotePriceId)
    return [key.jobId, compareJobCost(quoted, actualsOf(steps.filter(step => step.jobId === key.jobId), key, book), toCurrency(key.currency))]
  }))
}

function actualsOf(steps: readonly (typeof operations.$inferSelect)[], key: JobKey, book: StoredPriceBook): JobActuals {
  const minutes: JobActuals['minutes'] = {}
  for (const step of steps) {
    if (step.actualSetUpMinutes === null && step.actualRunMinutes === null) continue
    minutes[step.kind] = { setUpMinutes: numberOrNull(step.actualSetUpMinutes), runMinutes: numberOrNull(step.actualRunMinutes) }
  }
  const wire = steps.find(step => step.wireUsedKg !== null)
  return {
    minutes, wireKg: wire ? Number(wire.wireUsedKg) : null, wirePricePerKg: key.wirePricePerKg ?? '0',
    hourlyRates: {
      'coiling': book.rates['hourly.coiling'], 'stress-relief': book.rates['hourly.stress-relief'], 'end-grinding': book.rates['hourly.end-grinding'],
      'inspection': book.rates['hourly.inspection'], 'packing': book.rates['hourly.packing'],
    },
  }
}

const numberOrNull = (text: string | null) => text === null ? null : Number(text)

/** Columns that name a job's quote and its wire's price now; join `jobCostJoins` in this order. */
export const jobKeyColumns = { jobId: jobs.id, quotePriceId: jobs.quotePriceId, currency: quotes.currency, wirePricePerKg: wireProducts.pricePerKg }
export const onQuotePrice = eq(quotePrices.id, jobs.quotePriceId)
export const onQuote = eq(quotes.id, quotePrices.quoteId)
export const onWire = eq(wireProducts.id, quotes.wireProductId)
