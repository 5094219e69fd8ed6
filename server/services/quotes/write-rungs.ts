import { quoteLines, quotePrices } from '../../database/schema'
import type { Transaction } from '../../database/client'
import type { PlannedMinutes, PriceLine } from '../../engine/pricing'
import type { RungAmounts } from './ladder'

export type NewLine = PriceLine & { computedAmountMinor: number, overrideReason?: string | null, overriddenBy?: string | null, overriddenAt?: Date | null }
/** One rung to be stored with where each euro of it comes from. */
export type NewRung = RungAmounts & { costMinor: number, wirePlannedKg: string, plannedMinutes: PlannedMinutes, lines: readonly NewLine[] }

/** Stores the rungs of a revision with their lines; the database checks at commit that each adds up. */
export async function writeRungs(tx: Transaction, quoteId: string, rungs: readonly NewRung[]): Promise<void> {
  for (const { lines, ...amounts } of rungs) {
    const [price] = await tx.insert(quotePrices).values({
      quoteId, quantity: amounts.quantity, unitPrice: amounts.unitPrice, costMinor: amounts.costMinor, netMinor: amounts.netMinor, taxMinor: amounts.taxMinor,
      grossMinor: amounts.grossMinor, depositMinor: amounts.depositMinor, dispatchOn: amounts.dispatchOn, wirePlannedKg: amounts.wirePlannedKg, plannedMinutes: amounts.plannedMinutes,
    }).returning({ id: quotePrices.id })
    await tx.insert(quoteLines).values(lines.map((line, index) => ({ quotePriceId: price!.id, position: index + 1, ...lineColumns(line) })))
  }
}

/** What a line holds beside its key and place. */
export const lineColumns = (line: NewLine) => ({
  code: line.code, label: line.label, basis: line.basis, rateText: line.rateText, quantity: line.quantity, quantityUnit: line.quantityUnit, rate: line.rate,
  computedAmountMinor: line.computedAmountMinor, amountMinor: line.amountMinor,
  overrideReason: line.overrideReason ?? null, overriddenBy: line.overriddenBy ?? null, overriddenAt: line.overriddenAt ?? null,
})
