import { sql } from 'drizzle-orm'
import { boolean, check, date, doublePrecision, index, integer, numeric, pgEnum, pgTable, primaryKey, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core'
import { CENTRE_KINDS } from '../../../shared/schemas/shop'
import { PRICE_BOOK_STATES } from '../../../shared/schemas/works'
import { createdAt, id, moment } from './columns'
import { people } from './people'

export const centreKind = pgEnum('centre_kind', CENTRE_KINDS)
export const priceBookState = pgEnum('price_book_state', PRICE_BOOK_STATES)

/** A wire that can be bought: one material at one diameter, with its price and what lies in the rack. */
export const wireProducts = pgTable('wire_products', {
  id: id(),
  material: text('material').notNull(),
  wireDiameterMm: doublePrecision('wire_diameter_mm').notNull(),
  pricePerKg: numeric('price_per_kg', { precision: 12, scale: 4 }).notNull(),
  currency: text('currency').notNull(),
  stockKg: numeric('stock_kg', { precision: 12, scale: 3 }).notNull(),
  smallestPurchaseKg: numeric('smallest_purchase_kg', { precision: 12, scale: 3 }).notNull(),
  leadDays: integer('lead_days').notNull(),
  isActive: boolean('is_active').notNull().default(true),
}, t => [
  uniqueIndex('wire_products_material_diameter').on(t.material, t.wireDiameterMm),
  check('wire_products_positive', sql`${t.wireDiameterMm} > 0 and ${t.pricePerKg} > 0 and ${t.stockKg} >= 0 and ${t.smallestPurchaseKg} > 0 and ${t.leadDays} >= 0`),
])

/** A version of the price book. A draft can be edited; an approved one never is: a change makes the next one. */
export const priceBooks = pgTable('price_books', {
  id: id(),
  number: integer('number').notNull().unique(),
  state: priceBookState('state').notNull().default('approved'),
  version: integer('version').notNull().default(1),
  currency: text('currency').notNull(),
  /** First day in force; null while a draft. */
  inForceFrom: date('in_force_from', { mode: 'string' }),
  /** What it changes and why, in the words of who made it. */
  words: text('words').notNull().default(''),
  createdAt: createdAt(),
  createdBy: uuid('created_by').references(() => people.id),
  approvedAt: moment('approved_at'),
  approvedBy: uuid('approved_by').references(() => people.id),
}, t => [
  index('price_books_in_force').on(t.inForceFrom, t.number).where(sql`${t.state} = 'approved'`),
  check('price_books_approved', sql`${t.state} <> 'approved' or ${t.inForceFrom} is not null`),
])

export const priceBookRates = pgTable('price_book_rates', {
  priceBookId: uuid('price_book_id').notNull().references(() => priceBooks.id, { onDelete: 'cascade' }),
  code: text('code').notNull(),
  value: numeric('value', { precision: 16, scale: 6 }).notNull(),
}, t => [primaryKey({ columns: [t.priceBookId, t.code] })])

/** A version of the gate: the newest one judges. Never edited, a change makes the next one. */
export const gatePolicies = pgTable('gate_policies', {
  id: id(),
  number: integer('number').notNull().unique(),
  words: text('words').notNull().default(''),
  createdAt: createdAt(),
  createdBy: uuid('created_by').references(() => people.id),
})

/** One rule of the gate with its value and what each side is told when it is broken. */
export const gateRules = pgTable('gate_rules', {
  policyId: uuid('policy_id').notNull().references(() => gatePolicies.id, { onDelete: 'cascade' }),
  code: text('code').notNull(),
  isOn: boolean('is_on').notNull(),
  /** Of a rule with a limit; decimal text. */
  value: numeric('value', { precision: 16, scale: 6 }),
  customerText: text('customer_text').notNull(),
  estimatorText: text('estimator_text').notNull(),
}, t => [primaryKey({ columns: [t.policyId, t.code] }), check('gate_rules_texts', sql`length(${t.customerText}) > 0 and length(${t.estimatorText}) > 0`)])

/** A machine or bench that does one operation at a time. */
export const workCentres = pgTable('work_centres', {
  id: id(),
  code: text('code').notNull().unique(),
  name: text('name').notNull(),
  kind: centreKind('kind').notNull(),
  wireFromMm: doublePrecision('wire_from_mm'),
  wireToMm: doublePrecision('wire_to_mm'),
  shiftStartMinute: integer('shift_start_minute').notNull(),
  shiftEndMinute: integer('shift_end_minute').notNull(),
  worksSaturday: boolean('works_saturday').notNull().default(false),
  isActive: boolean('is_active').notNull().default(true),
}, t => [check('work_centres_shift', sql`${t.shiftStartMinute} >= 0 and ${t.shiftEndMinute} <= 1440 and ${t.shiftStartMinute} < ${t.shiftEndMinute}`)])

export const holidays = pgTable('holidays', {
  day: date('day', { mode: 'string' }).primaryKey(),
  name: text('name').notNull(),
})

export const auditLog = pgTable('audit_log', {
  id: id(),
  at: moment('at').notNull().defaultNow(),
  personId: uuid('person_id'),
  action: text('action').notNull(),
  object: text('object').notNull(),
  detail: text('detail').notNull(),
}, t => [index('audit_log_at').on(t.at)])
