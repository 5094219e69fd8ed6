import type { z } from 'zod'
import type { EstimatingView, overrideMarginBodySchema } from '#shared/schemas/quote'
import { recordAudit } from '../audit/record'
import { assertRole, inTransaction, type ServiceContext } from '../context'
import { trimDecimals } from '../decimal-text'
import { getPriceBook } from '../price-books/get'
import { repriceRung } from './apply'
import { lineOverridesOf, marginOverrideOf } from './computed-price'
import { getEstimatingView } from './get-view'
import { openDraft } from './open-draft'
import { writeOverridden } from './write-overridden'

/**
 * Puts an estimator's margin, percent of price, in place of the book's for every quantity of the quote, or goes back to the
 * book's. A margin under the floor may be tried here; sending it needs an administrator.
 * @throws DomainError not-found, conflict without a draft, stale, invalid when a price could not be paid
 */
export async function overrideMargin(context: ServiceContext, { ref, version, marginPercent, reason }: { ref: string } & z.output<typeof overrideMarginBodySchema>): Promise<EstimatingView> {
  const actor = assertRole(context, 'estimator', 'admin')
  // Three decimals, as the column holds, so that what is shown later is what was priced.
  const marginPercentOverride = marginPercent === null ? null : trimDecimals(marginPercent.toFixed(3))
  await inTransaction(context.db, async (tx) => {
    const { order, quote, rungs } = await openDraft(tx, { ref, version, set: { marginPercentOverride, marginReason: marginPercent === null ? null : reason } })
    const book = await getPriceBook(context.db, quote.priceBookId)
    for (const stored of rungs) {
      const priced = repriceRung(stored, { quote, book, order }, { lines: lineOverridesOf(stored.lines), margin: marginOverrideOf(quote) }, 'marginPercent')
      await writeOverridden(tx, stored, { priced, quote, change: { personId: actor.personId, now: context.now } })
    }
    await recordAudit(tx, {
      personId: actor.personId, action: 'quote.margin', object: ref,
      detail: `Revision ${quote.revision}: margin ${marginPercentOverride === null ? 'back to the price book’s' : `${marginPercentOverride} %`}. ${reason}`,
    })
  })
  return getEstimatingView(context, { ref })
}
