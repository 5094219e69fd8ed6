import { asc, eq, inArray } from 'drizzle-orm'
import { toCurrency, type Currency } from '#shared/money'
import type { ConflictView, CostLineView, EstimateRung, EstimatingView } from '#shared/schemas/quote'
import { orderEvents, people } from '../../database/schema'
import { isBelowFloor, marginPercentOf } from '../../engine/pricing/totals'
import { rateText } from '../../engine/pricing'
import { listCatalogueWires } from '../catalogue/list-wires'
import { assertRole, type ServiceContext } from '../context'
import { trimDecimals } from '../decimal-text'
import { notFound } from '../errors'
import { findOrder, type OrderRecord } from '../orders/access'
import { orderRefOf } from '../orders/reference'
import { getPriceBook } from '../price-books/get'
import type { StoredPriceBook } from '../price-books/read-book'
import { findWorkingRevision, type QuoteRecord } from '../quotes/find-revision'
import { toLadder } from '../quotes/ladder'
import { describeConflictFor } from '../springs/describe-conflict'
import { findDesign } from '../springs/find-design'
import { workingPointsOf } from '../springs/requirement'
import { customerOf } from './apply'
import type { StoredRung } from './computed-price'
import { readStoredRungs } from './open-draft'

/**
 * An enquiry as an estimator works on it: what was written, why it waits, the design with its checks, and where each euro
 * comes from with the computed amount beside each change. Creates nothing.
 * @throws DomainError forbidden, not-found
 */
export async function getEstimatingView(context: ServiceContext, { ref }: { ref: string }): Promise<EstimatingView> {
  assertRole(context, 'estimator', 'admin')
  const order = await findOrder(context.db, ref)
  if (!order) throw notFound('enquiry')
  const quote = await findWorkingRevision(context.db, order.id)
  const book = quote ? await getPriceBook(context.db, quote.priceBookId) : null
  const rungs = quote ? await readStoredRungs(context.db, quote.id) : []
  const events = await context.db.select().from(orderEvents).where(eq(orderEvents.orderId, order.id)).orderBy(asc(orderEvents.id)).limit(200)
  const names = await readNames(context, [order.assignedTo, ...events.map(event => event.personId), ...rungs.flatMap(({ lines }) => lines.map(line => line.overriddenBy))])
  return {
    ref: orderRefOf(order.number), state: order.state, version: order.version, title: order.title, firm: order.firmName, contactName: order.contactName, contactEmail: order.contactEmail,
    countryCode: order.countryCode, createdAt: order.createdAt.toISOString(), answerBy: order.answerBy?.toISOString() ?? null, neededOn: order.neededOn,
    request: order.request, points: workingPointsOf(order.request.requirement), reasons: order.gateReasons, assignedTo: order.assignedTo ? names.get(order.assignedTo) ?? null : null,
    quote: quote && book ? describeRevision(quote, book, rungs, names) : null,
    conflict: quote && !quote.design && book ? await explainConflict(context, order, book) : null,
    events: events.map(event => ({
      at: event.at.toISOString(), who: event.personId ? names.get(event.personId) ?? '' : whoWithoutSignIn(event, order), from: event.fromState, to: event.toState, why: event.why,
    })),
  }
}

function describeRevision(quote: QuoteRecord, book: StoredPriceBook, rungs: readonly StoredRung[], names: ReadonlyMap<string, string>): NonNullable<EstimatingView['quote']> {
  const floor = rateText(book, 'policy.margin-floor-percent')
  const ladder = toLadder(rungs.map(({ rung }) => rung))
  return {
    revision: quote.revision, state: quote.state, version: quote.version, design: quote.design, currency: quote.currency, priceBookNumber: book.number, priceBookInForceFrom: book.inForceFrom,
    taxPercent: trimDecimals(quote.taxPercent), depositPercent: trimDecimals(quote.depositPercent), computedMarginPercent: rateText(book, 'policy.margin-percent'),
    marginPercentOverride: quote.marginPercentOverride === null ? null : trimDecimals(quote.marginPercentOverride), marginReason: quote.marginReason, marginFloorPercent: floor,
    noteToCustomer: quote.noteToCustomer, validUntil: quote.validUntil, sentAt: quote.sentAt?.toISOString() ?? null,
    ladder: rungs.map((stored, index): EstimateRung => ({ ...ladder[index]!, ...marginOf(stored, { floorPercent: floor, currency: toCurrency(quote.currency) }), costMinor: stored.rung.costMinor, lines: stored.lines.map(line => lineViewOf(line, names)) })),
  }
}

/** The margin of a rung, and whether it is under the floor. */
export function marginOf({ rung, lines }: StoredRung, { floorPercent, currency }: { floorPercent: string, currency: Currency }): { marginPercent: string, belowFloor: boolean } {
  const marginMinor = lines.find(line => line.code === 'margin')?.amountMinor ?? 0
  return { marginPercent: marginPercentOf(marginMinor, rung.netMinor), belowFloor: isBelowFloor({ marginMinor, netMinor: rung.netMinor, floorPercent, currency }) }
}

const lineViewOf = (line: StoredRung['lines'][number], names: ReadonlyMap<string, string>): CostLineView => ({
  code: line.code, label: line.label, basis: line.basis, rateText: line.rateText, computedAmountMinor: line.computedAmountMinor, amountMinor: line.amountMinor,
  overrideReason: line.overrideReason, overriddenBy: line.overriddenBy ? names.get(line.overriddenBy) ?? null : null, overriddenAt: line.overriddenAt?.toISOString() ?? null,
})

/** Without a sign-in either the customer acted through the link, or the shop itself quoted. */
const whoWithoutSignIn = (event: typeof orderEvents.$inferSelect, order: OrderRecord): string =>
  event.fromState === null || event.toState === 'accepted' || event.toState === 'withdrawn' ? order.contactName : 'Wirewright'

async function explainConflict(context: ServiceContext, order: OrderRecord, book: StoredPriceBook): Promise<ConflictView | null> {
  const { requirement } = order.request
  const { best, result } = await findDesign(requirement, { wires: await listCatalogueWires(context.db), book })
  return best ? null : describeConflictFor(requirement, result, { customer: customerOf(order), book })
}

async function readNames({ db }: ServiceContext, ids: readonly (string | null)[]): Promise<Map<string, string>> {
  const wanted = [...new Set(ids.filter(id => id !== null))]
  if (wanted.length === 0) return new Map()
  const rows = await db.select({ id: people.id, name: people.name }).from(people).where(inArray(people.id, wanted))
  return new Map(rows.map(row => [row.id, row.name]))
}
