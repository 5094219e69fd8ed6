import type { z } from 'zod'
import { formatMoney, groupThousands, toCurrency } from '#shared/money'
import type { EstimatingView, overrideLineBodySchema } from '#shared/schemas/quote'
import { recordAudit } from '../audit/record'
import { assertRole, inTransaction, type ServiceContext } from '../context'
import { conflict, invalid } from '../errors'
import { getPriceBook } from '../price-books/get'
import { repriceRung } from './apply'
import { lineOverridesOf, marginOverrideOf } from './computed-price'
import { getEstimatingView } from './get-view'
import { openDraft } from './open-draft'
import { writeOverridden } from './write-overridden'

/**
 * Puts an estimator's amount in place of a line's computed one at one quantity, or goes back to the computed one. Overhead, risk,
 * margin, price and deposit follow; the computed amounts stay beside.
 * @throws DomainError not-found, conflict without a draft, stale, invalid for an unknown line or quantity
 */
export async function overrideLine(context: ServiceContext, { ref, ...body }: { ref: string } & z.output<typeof overrideLineBodySchema>): Promise<EstimatingView> {
  const actor = assertRole(context, 'estimator', 'admin')
  if (body.code === 'margin') throw invalid('code', 'Change the margin as a percentage of the price, for the whole quote.')
  await inTransaction(context.db, async (tx) => {
    const { order, quote, rungs } = await openDraft(tx, { ref, version: body.version })
    const stored = rungs.find(({ rung }) => rung.quantity === body.quantity)
    if (rungs.length === 0) throw conflict('There is no price yet: no spring was found.')
    if (!stored) throw invalid('quantity', `This quote has prices for ${rungs.map(({ rung }) => groupThousands(String(rung.quantity))).join(', ')} springs.`)
    const line = stored.lines.find(candidate => candidate.code === body.code)
    if (!line) throw invalid('code', 'This price has no such line.')

    const others = lineOverridesOf(stored.lines).filter(override => override.lineCode !== line.code)
    const own = body.amountMinor === null ? [] : [{ lineCode: line.code as (typeof others)[number]['lineCode'], amountMinor: body.amountMinor, reason: body.reason }]
    const book = await getPriceBook(context.db, quote.priceBookId)
    const priced = repriceRung(stored, { quote, book, order }, { lines: [...others, ...own], margin: marginOverrideOf(quote) }, 'amountMinor')
    await writeOverridden(tx, stored, { priced, quote, change: { personId: actor.personId, now: context.now } })

    const money = (amountMinor: number) => formatMoney(amountMinor, toCurrency(quote.currency))
    await recordAudit(tx, {
      personId: actor.personId, action: 'quote.line', object: ref,
      detail: `Revision ${quote.revision}, ${body.quantity} springs, ${line.code}: from ${money(line.amountMinor)} to ${body.amountMinor === null ? `the computed ${money(line.computedAmountMinor)}` : money(body.amountMinor)}. ${body.reason}`,
    })
  })
  return getEstimatingView(context, { ref })
}
