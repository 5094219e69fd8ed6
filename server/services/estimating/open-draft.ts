import { and, eq } from 'drizzle-orm'
import { quotes } from '../../database/schema'
import type { Transaction } from '../../database/client'
import { conflict, notFound, stale } from '../errors'
import { findOrder, type OrderRecord } from '../orders/access'
import { findWorkingRevision, listLines, listRungs, type QuoteRecord } from '../quotes/find-revision'
import type { StoredRung } from './computed-price'

/** An order with the draft an estimator changes, its rungs and their lines. */
export type OpenDraft = { order: OrderRecord, quote: QuoteRecord, rungs: StoredRung[] }

/**
 * Takes the draft of an order for a change: its version goes up by one in the same statement that checks it, so of two
 * estimators the second is told.
 * @throws DomainError not-found, conflict when there is no draft, stale when it was changed meanwhile
 */
export async function openDraft(tx: Transaction, { ref, version, set = {} }: { ref: string, version: number, set?: Partial<Pick<QuoteRecord, 'marginPercentOverride' | 'marginReason'>> }): Promise<OpenDraft> {
  const order = await findOrder(tx, ref)
  if (!order) throw notFound('enquiry')
  const working = await findWorkingRevision(tx, order.id)
  if (working?.state !== 'draft') throw conflict(working ? `Revision ${working.revision} was sent and never changes. Make a new revision first.` : 'This enquiry has no draft.')
  const [quote] = await tx.update(quotes).set({ ...set, version: version + 1 })
    .where(and(eq(quotes.id, working.id), eq(quotes.state, 'draft'), eq(quotes.version, version))).returning()
  if (!quote) throw stale('quote')
  return { order, quote, rungs: await readStoredRungs(tx, quote.id) }
}

/** The rungs of a revision with their lines. */
export async function readStoredRungs(db: Parameters<typeof listRungs>[0], quoteId: string): Promise<StoredRung[]> {
  const rungs = await listRungs(db, quoteId)
  const lines = await listLines(db, rungs.map(rung => rung.id))
  return rungs.map(rung => ({ rung, lines: lines.get(rung.id) ?? [] }))
}
