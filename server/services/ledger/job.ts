import { asc, eq } from 'drizzle-orm'
import type { JobCostView } from '#shared/schemas/ledger'
import { OPERATION_NAMES } from '#shared/schemas/shop'
import { benchRecords, jobs, ledgerEntries, ledgerTransactions, operations, orders, people, priceBooks, quotePrices, quotes, wireProducts } from '../../database/schema'
import { assertRole, type ServiceContext } from '../context'
import { notFound } from '../errors'
import { jobNumberOf } from '../jobs/refs'
import { orderRefOf } from '../orders/reference'
import { getCurrentPriceBook } from '../price-books/get-current'
import { jobKeyColumns, onQuote, onQuotePrice, onWire, readJobCosts } from './job-costs'

/** One job: quoted against recorded, line by line, with the records and the bookings behind. @throws DomainError not-found */
export async function getJobCost(context: ServiceContext, ref: string): Promise<JobCostView> {
  assertRole(context, 'bookkeeper', 'admin')
  const [row] = await context.db.select({
    ...jobKeyColumns, orderId: orders.id, orderNumber: orders.number, customer: orders.firmName, title: orders.title, quantity: jobs.quantity, finishedAt: jobs.finishedAt,
    priceMinor: quotePrices.netMinor, priceBookNumber: priceBooks.number,
  }).from(jobs).innerJoin(orders, eq(orders.id, jobs.orderId)).innerJoin(quotePrices, onQuotePrice).innerJoin(quotes, onQuote).innerJoin(priceBooks, eq(priceBooks.id, quotes.priceBookId)).leftJoin(wireProducts, onWire)
    .where(eq(jobs.number, jobNumberOf(ref)))
  if (!row) throw notFound('job')
  const book = await getCurrentPriceBook(context)
  const [costs, records, entries] = await Promise.all([
    readJobCosts(context.db, book, [row]),
    context.db.select({ at: benchRecords.at, kind: operations.kind, act: benchRecords.act, person: people.name, good: benchRecords.good, scrap: benchRecords.scrap, wireKg: benchRecords.wireKg, note: benchRecords.note })
      .from(benchRecords).innerJoin(operations, eq(operations.id, benchRecords.operationId)).innerJoin(people, eq(people.id, benchRecords.personId)).where(eq(operations.jobId, row.jobId)).orderBy(asc(benchRecords.at)).limit(500),
    context.db.select({ at: ledgerTransactions.at, words: ledgerTransactions.words, account: ledgerEntries.account, amountMinor: ledgerEntries.amountMinor })
      .from(ledgerEntries).innerJoin(ledgerTransactions, eq(ledgerTransactions.id, ledgerEntries.transactionId)).where(eq(ledgerTransactions.orderId, row.orderId)).orderBy(asc(ledgerEntries.id)).limit(200),
  ])
  const { rows, total } = costs.get(row.jobId)!
  return {
    jobRef: ref, orderRef: orderRefOf(row.orderNumber), customer: row.customer, title: row.title, quantity: row.quantity, currency: row.currency, priceBookNumber: row.priceBookNumber, finishedAt: row.finishedAt?.toISOString() ?? null,
    timeZone: context.timeZone, priceMinor: row.priceMinor, quotedCostMinor: total.quotedMinor, comparedQuotedMinor: total.comparedQuotedMinor, actualCostMinor: total.actualMinor, differenceMinor: total.differenceMinor, isComplete: total.isComplete, words: total.words, rows,
    records: records.map(record => ({ at: record.at.toISOString(), operation: OPERATION_NAMES[record.kind], act: record.act, person: record.person, good: record.good, scrap: record.scrap, wireKg: record.wireKg === null ? null : Number(record.wireKg), note: record.note })),
    entries: entries.map(entry => ({ at: entry.at.toISOString(), words: entry.words, account: entry.account, debitMinor: Math.max(0, entry.amountMinor), creditMinor: Math.max(0, -entry.amountMinor) })),
  }
}
