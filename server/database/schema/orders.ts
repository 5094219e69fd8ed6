import { sql } from 'drizzle-orm'
import { bigint, boolean, check, date, index, integer, jsonb, numeric, pgEnum, pgTable, text, uniqueIndex, uuid, type AnyPgColumn } from 'drizzle-orm/pg-core'
import { ORDER_STATES, QUOTE_STATES } from '../../../shared/schemas/order-states'
import type { EnquiryRequest } from '../../../shared/schemas/enquiry'
import type { GateReason, StoredDesign } from '../../../shared/schemas/quote'
import type { PlannedMinutes } from '../../engine/pricing/types'
import { amountMinor, bytes, createdAt, id, moment } from './columns'
import { priceBooks, wireProducts } from './catalogue'
import { companies, people } from './people'

export const orderState = pgEnum('order_state', ORDER_STATES)
export const quoteState = pgEnum('quote_state', QUOTE_STATES)

/** One order from the first enquiry to the last payment. Its state changes only together with a row in order_events. */
export const orders = pgTable('orders', {
  id: id(),
  number: bigint('number', { mode: 'number' }).generatedAlwaysAsIdentity({ startWith: 2401 }).unique(),
  state: orderState('state').notNull().default('enquiry'),
  version: integer('version').notNull().default(1),
  companyId: uuid('company_id').references(() => companies.id),
  personId: uuid('person_id').references(() => people.id),
  contactName: text('contact_name').notNull(),
  contactEmail: text('contact_email').notNull(),
  firmName: text('firm_name').notNull(),
  countryCode: text('country_code').notNull(),
  vatNumber: text('vat_number'),
  title: text('title').notNull(),
  /** What the customer wrote, as it was written and parsed; never changed afterwards. */
  request: jsonb('request').$type<EnquiryRequest>().notNull(),
  gateReasons: jsonb('gate_reasons').$type<GateReason[]>().notNull(),
  couldHurt: boolean('could_hurt').notNull(),
  neededOn: date('needed_on', { mode: 'string' }),
  answerBy: moment('answer_by'),
  assignedTo: uuid('assigned_to').references(() => people.id),
  /** The enquiry of several springs this one is a line of, and its place there. */
  parentId: uuid('parent_id').references((): AnyPgColumn => orders.id),
  position: integer('position'),
  acceptedQuantity: integer('accepted_quantity'),
  acceptedQuoteId: uuid('accepted_quote_id'),
  createdAt: createdAt(),
  updatedAt: moment('updated_at').notNull().defaultNow(),
}, t => [
  index('orders_state_created').on(t.state, t.createdAt, t.id),
  index('orders_company').on(t.companyId, t.createdAt),
  index('orders_contact_email').on(t.contactEmail),
  index('orders_person').on(t.personId),
  uniqueIndex('orders_line').on(t.parentId, t.position),
  check('orders_line_placed', sql`(${t.parentId} is null) = (${t.position} is null) and ${t.parentId} is distinct from ${t.id}`),
  check('orders_email_lower', sql`${t.contactEmail} = lower(${t.contactEmail})`),
  check('orders_accepted', sql`${t.state} in ('enquiry', 'quoted', 'withdrawn', 'expired', 'cancelled') or (${t.acceptedQuantity} is not null and ${t.acceptedQuoteId} is not null)`),
])

/** A link that opens one order without signing in. Only the SHA-256 of its secret is kept; each e-mail may carry a secret of its own. */
export const orderAccess = pgTable('order_access', {
  tokenHash: bytes('token_hash').primaryKey(),
  orderId: uuid('order_id').notNull().references(() => orders.id),
  createdAt: createdAt(),
  expiresAt: moment('expires_at').notNull(),
  revokedAt: moment('revoked_at'),
}, t => [index('order_access_order').on(t.orderId)])

/** Append-only: each move of an order, who made it and why. */
export const orderEvents = pgTable('order_events', {
  id: bigint('id', { mode: 'number' }).generatedAlwaysAsIdentity().primaryKey(),
  orderId: uuid('order_id').notNull().references(() => orders.id),
  at: moment('at').notNull().defaultNow(),
  personId: uuid('person_id').references(() => people.id),
  fromState: orderState('from_state'),
  toState: orderState('to_state').notNull(),
  why: text('why').notNull(),
}, t => [index('order_events_order').on(t.orderId, t.id)])

/** A revision of the quote. Once sent it never changes. */
export const quotes = pgTable('quotes', {
  id: id(),
  orderId: uuid('order_id').notNull().references(() => orders.id),
  revision: text('revision').notNull(),
  state: quoteState('state').notNull().default('draft'),
  version: integer('version').notNull().default(1),
  priceBookId: uuid('price_book_id').notNull().references(() => priceBooks.id),
  wireProductId: uuid('wire_product_id').references(() => wireProducts.id),
  /** Null while no spring that passes is known. */
  design: jsonb('design').$type<StoredDesign>(),
  /** The spring that was found, where an estimator chose another in its place; with the reason and who. */
  computedDesign: jsonb('computed_design').$type<StoredDesign>(),
  designReason: text('design_reason'),
  designChangedBy: uuid('design_changed_by').references(() => people.id),
  /** The revision whose prices this one brings up to date. */
  renewsQuoteId: uuid('renews_quote_id').references((): AnyPgColumn => quotes.id),
  /** Below the floor margin an administrator is asked, with the reason, and approves this very draft. */
  approvalAskedAt: moment('approval_asked_at'),
  approvalAskedBy: uuid('approval_asked_by').references(() => people.id),
  approvalReason: text('approval_reason'),
  approvedAt: moment('approved_at'),
  approvedBy: uuid('approved_by').references(() => people.id),
  marginPercentOverride: numeric('margin_percent_override', { precision: 7, scale: 3 }),
  marginReason: text('margin_reason'),
  currency: text('currency').notNull(),
  depositPercent: numeric('deposit_percent', { precision: 7, scale: 3 }).notNull(),
  taxPercent: numeric('tax_percent', { precision: 7, scale: 3 }).notNull(),
  noteToCustomer: text('note_to_customer').notNull().default(''),
  validUntil: date('valid_until', { mode: 'string' }).notNull(),
  createdBy: uuid('created_by').references(() => people.id),
  createdAt: createdAt(),
  sentAt: moment('sent_at'),
  sentBy: uuid('sent_by').references(() => people.id),
}, t => [
  uniqueIndex('quotes_order_revision').on(t.orderId, t.revision),
  uniqueIndex('quotes_one_draft').on(t.orderId).where(sql`${t.state} = 'draft'`),
  uniqueIndex('quotes_one_sent').on(t.orderId).where(sql`${t.state} = 'sent'`),
  check('quotes_design_changed', sql`(${t.designReason} is null and ${t.designChangedBy} is null) or (length(${t.designReason}) > 0 and ${t.designChangedBy} is not null and ${t.design} is not null)`),
  check('quotes_approval', sql`(${t.approvalAskedAt} is null) = (${t.approvalReason} is null) and (${t.approvedAt} is null) = (${t.approvedBy} is null)`),
  check('quotes_sent_complete', sql`${t.state} = 'draft' or (${t.sentAt} is not null and ${t.design} is not null)`),
])

/** One rung of the price ladder. */
export const quotePrices = pgTable('quote_prices', {
  id: id(),
  quoteId: uuid('quote_id').notNull().references(() => quotes.id, { onDelete: 'cascade' }),
  quantity: integer('quantity').notNull(),
  /** Price of one spring before tax, as shown; its digits are kept. */
  unitPrice: numeric('unit_price').notNull(),
  costMinor: amountMinor('cost_minor').notNull(),
  netMinor: amountMinor('net_minor').notNull(),
  taxMinor: amountMinor('tax_minor').notNull(),
  grossMinor: amountMinor('gross_minor').notNull(),
  depositMinor: amountMinor('deposit_minor').notNull(),
  wirePlannedKg: numeric('wire_planned_kg', { precision: 12, scale: 4 }).notNull(),
  /** Planned minutes of each operation, from which the job's routing is made. */
  plannedMinutes: jsonb('planned_minutes').$type<PlannedMinutes>().notNull(),
  dispatchOn: date('dispatch_on', { mode: 'string' }),
  /** The day the plan gave, where an estimator named another in its place; with the reason and who. */
  computedDispatchOn: date('computed_dispatch_on', { mode: 'string' }),
  dispatchReason: text('dispatch_reason'),
  dispatchChangedBy: uuid('dispatch_changed_by').references(() => people.id),
}, t => [
  uniqueIndex('quote_prices_quantity').on(t.quoteId, t.quantity),
  check('quote_prices_dispatch_changed', sql`(${t.dispatchReason} is null and ${t.dispatchChangedBy} is null) or (length(${t.dispatchReason}) > 0 and ${t.dispatchChangedBy} is not null and ${t.dispatchOn} is not null)`),
  check('quote_prices_add_up', sql`${t.netMinor} + ${t.taxMinor} = ${t.grossMinor} and ${t.depositMinor} between 0 and ${t.grossMinor} and ${t.quantity} > 0 and ${t.netMinor} >= 0`),
])

/** Where each euro of a rung comes from. The computed amount stays beside an estimator's. */
export const quoteLines = pgTable('quote_lines', {
  id: id(),
  quotePriceId: uuid('quote_price_id').notNull().references(() => quotePrices.id, { onDelete: 'cascade' }),
  position: integer('position').notNull(),
  code: text('code').notNull(),
  label: text('label').notNull(),
  basis: text('basis').notNull(),
  rateText: text('rate_text').notNull(),
  quantity: numeric('quantity', { precision: 16, scale: 6 }).notNull(),
  quantityUnit: text('quantity_unit').notNull(),
  rate: numeric('rate', { precision: 16, scale: 6 }).notNull(),
  computedAmountMinor: amountMinor('computed_amount_minor').notNull(),
  amountMinor: amountMinor('amount_minor').notNull(),
  overrideReason: text('override_reason'),
  overriddenBy: uuid('overridden_by').references(() => people.id),
  overriddenAt: moment('overridden_at'),
}, t => [
  uniqueIndex('quote_lines_code').on(t.quotePriceId, t.code),
  check('quote_lines_override', sql`(${t.overrideReason} is null and ${t.overriddenBy} is null) or (length(${t.overrideReason}) > 0 and ${t.overriddenBy} is not null and ${t.overriddenAt} is not null)`),
])
