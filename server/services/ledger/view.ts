import { desc, eq, lt, sql } from 'drizzle-orm'
import type { LedgerView } from '#shared/schemas/ledger'
import { jobs, ledgerEntries, orders, quotePrices, quotes, wireProducts } from '../../database/schema'
import { assertRole, type ServiceContext } from '../context'
import { decodeCursor, encodeCursor } from '../cursor'
import { invalid } from '../errors'
import { jobRefOf } from '../jobs/refs'
import { orderRefOf } from '../orders/reference'
import { ACCOUNTS } from '../payments/accounts'
import { getCurrentPriceBook } from '../price-books/get-current'
import { jobKeyColumns, onQuote, onQuotePrice, onWire, readJobCosts } from './job-costs'

/** Money in and owed, and the jobs, newest first, each with its quoted and recorded cost. */
export async function getLedger(context: ServiceContext, page: { cursor?: string, limit: number }): Promise<LedgerView> {
  assertRole(context, 'bookkeeper', 'admin')
  const before = page.cursor ? Number(decodeCursor(page.cursor, 1)[0]) : null
  if (before !== null && !Number.isSafeInteger(before)) throw invalid('cursor', 'This page of the list does not exist. Start at the first one.')
  const book = await getCurrentPriceBook(context)
  const rows = await context.db.select({
    ...jobKeyColumns, number: jobs.number, orderNumber: orders.number, customer: orders.firmName, title: orders.title, quantity: jobs.quantity, state: jobs.state, finishedAt: jobs.finishedAt, priceMinor: quotePrices.netMinor, costMinor: quotePrices.costMinor,
  }).from(jobs).innerJoin(orders, eq(orders.id, jobs.orderId)).innerJoin(quotePrices, onQuotePrice).innerJoin(quotes, onQuote).leftJoin(wireProducts, onWire)
    .where(before === null ? undefined : lt(jobs.number, before)).orderBy(desc(jobs.number)).limit(page.limit + 1)
  const shown = rows.slice(0, page.limit)
  const [costs, sums, due] = await Promise.all([readJobCosts(context.db, book, shown), readBalances(context), readBalanceDue(context)])
  return {
    currency: book.currency, cashInMinor: sums.get(ACCOUNTS.cash) ?? 0, depositsHeldMinor: -(sums.get(ACCOUNTS.deposits) ?? 0), balanceDueMinor: due, timeZone: context.timeZone,
    jobs: shown.map((row) => {
      const total = costs.get(row.jobId)!.total
      const isRecorded = total.actualMinor > 0
      return {
        jobRef: jobRefOf(row.number), orderRef: orderRefOf(row.orderNumber), customer: row.customer, title: row.title, quantity: row.quantity, state: row.state, finishedAt: row.finishedAt?.toISOString() ?? null, currency: row.currency, priceMinor: row.priceMinor,
        quotedCostMinor: total.quotedMinor, actualCostMinor: isRecorded ? total.actualMinor : null, differenceMinor: isRecorded ? total.differenceMinor : null, isComplete: total.isComplete,
      }
    }),
    nextCursor: rows.length > page.limit ? encodeCursor(String(shown.at(-1)!.number)) : null,
  }
}

/** A balance is only ever a sum of entries. */
async function readBalances({ db }: ServiceContext): Promise<Map<string, number>> {
  const rows = await db.select({ account: ledgerEntries.account, minor: sql<string>`sum(${ledgerEntries.amountMinor})` }).from(ledgerEntries).groupBy(ledgerEntries.account)
  return new Map(rows.map(row => [row.account, Number(row.minor)]))
}

async function readBalanceDue({ db }: ServiceContext): Promise<number> {
  const [row] = await db.select({
    minor: sql<string>`coalesce(sum(${quotePrices.grossMinor} - coalesce((select sum(p.amount_minor) from payments p where p.order_id = ${jobs.orderId} and p.state = 'paid'), 0)), 0)`,
  }).from(jobs).innerJoin(quotePrices, onQuotePrice).where(eq(jobs.state, 'finished'))
  return Number(row?.minor ?? 0)
}
