import { sql } from 'drizzle-orm'
import { boolean, check, date, doublePrecision, index, integer, numeric, pgEnum, pgTable, primaryKey, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core'
import { CENTRE_KINDS } from '../../../shared/schemas/shop'
import { createdAt, id, moment } from './columns'

export const centreKind = pgEnum('centre_kind', CENTRE_KINDS)

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

/** A version of the price book. A version that quotes have used is never edited: a change makes the next one. */
export const priceBooks = pgTable('price_books', {
  id: id(),
  number: integer('number').notNull().unique(),
  currency: text('currency').notNull(),
  inForceFrom: date('in_force_from', { mode: 'string' }).notNull(),
  createdAt: createdAt(),
})

export const priceBookRates = pgTable('price_book_rates', {
  priceBookId: uuid('price_book_id').notNull().references(() => priceBooks.id, { onDelete: 'cascade' }),
  code: text('code').notNull(),
  value: numeric('value', { precision: 16, scale: 6 }).notNull(),
}, t => [primaryKey({ columns: [t.priceBookId, t.code] })])

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
