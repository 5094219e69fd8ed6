import { eq } from 'drizzle-orm'
import { splitDeposit } from '#shared/money'
import { quoteLines, quotePrices } from '../../database/schema'
import type { Transaction } from '../../database/client'
import type { OverriddenPrice } from '../../engine/pricing'
import type { QuoteRecord } from '../quotes/find-revision'
import { lineColumns } from '../quotes/write-rungs'
import type { StoredRung } from './computed-price'
import { trimDecimals } from '../decimal-text'

/** Who changes something, and when. */
export type Change = { personId: string, now: Date }

/**
 * Writes a rung with an estimator's changes over what is stored. The computed amount of each line stays; a change that stood
 * before keeps who made it and when.
 */
export async function writeOverridden(tx: Transaction, { rung, lines }: StoredRung, { priced, quote, change }: { priced: OverriddenPrice, quote: QuoteRecord, change: Change }): Promise<void> {
  const { depositMinor } = splitDeposit(priced.grossMinor, trimDecimals(quote.depositPercent), priced.currency)
  await tx.update(quotePrices).set({
    unitPrice: priced.unitPrice, costMinor: priced.costMinor, netMinor: priced.netMinor, taxMinor: priced.taxMinor, grossMinor: priced.grossMinor, depositMinor,
  }).where(eq(quotePrices.id, rung.id))
  for (const line of priced.lines) {
    const before = lines.find(stored => stored.code === line.code)
    if (!before) throw new Error(`rung ${rung.id} has no line ${line.code}`)
    // The margin's amount follows the cost, so there the percentage tells whether it is the same change.
    const isSame = line.code === 'margin' ? Number(before.rate) === Number(line.rate) : before.amountMinor === line.amountMinor
    const stood = before.overrideReason === line.overrideReason && isSame
    const author = line.overrideReason === null
      ? { overriddenBy: null, overriddenAt: null }
      : stood ? { overriddenBy: before.overriddenBy, overriddenAt: before.overriddenAt } : { overriddenBy: change.personId, overriddenAt: change.now }
    await tx.update(quoteLines).set(lineColumns({ ...line, ...author })).where(eq(quoteLines.id, before.id))
  }
}
