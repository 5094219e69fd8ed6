import { and, eq } from 'drizzle-orm'
import { quotes } from '../../database/schema'
import type { Transaction } from '../../database/client'
import { stale } from '../errors'
import type { QuoteRecord } from './find-revision'

/**
 * Sends a draft: from here on it never changes. The revision sent before is superseded by it.
 * @param sending.personId who sends it; null where the gate held and nobody had to look
 * @throws DomainError stale when somebody changed or sent it meanwhile
 */
export async function markSent(
  tx: Transaction,
  { quote, personId, now, set = {} }: { quote: Pick<QuoteRecord, 'id' | 'orderId' | 'version'>, personId: string | null, now: Date, set?: Partial<Pick<QuoteRecord, 'noteToCustomer' | 'validUntil'>> },
): Promise<QuoteRecord> {
  await tx.update(quotes).set({ state: 'superseded' }).where(and(eq(quotes.orderId, quote.orderId), eq(quotes.state, 'sent')))
  const [sent] = await tx.update(quotes).set({ ...set, state: 'sent', sentAt: now, sentBy: personId, version: quote.version + 1 })
    .where(and(eq(quotes.id, quote.id), eq(quotes.version, quote.version), eq(quotes.state, 'draft'))).returning()
  if (!sent) throw stale('quote')
  return sent
}
