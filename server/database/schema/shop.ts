import { sql } from 'drizzle-orm'
import { boolean, check, date, index, integer, bigint, numeric, pgEnum, pgTable, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core'
import { BENCH_ACTS, JOB_STATES, OPERATION_KINDS, OPERATION_STATES } from '../../../shared/schemas/shop'
import { createdAt, id, moment, span } from './columns'
import { orders, quotePrices } from './orders'
import { people } from './people'
import { wireProducts, workCentres } from './catalogue'

export const jobState = pgEnum('job_state', JOB_STATES)
export const operationKind = pgEnum('operation_kind', OPERATION_KINDS)
export const operationState = pgEnum('operation_state', OPERATION_STATES)
export const benchAct = pgEnum('bench_act', BENCH_ACTS)

/** A paid order in the shop. */
export const jobs = pgTable('jobs', {
  id: id(),
  number: bigint('number', { mode: 'number' }).generatedAlwaysAsIdentity({ startWith: 1201 }).unique(),
  orderId: uuid('order_id').notNull().unique().references(() => orders.id),
  quotePriceId: uuid('quote_price_id').notNull().references(() => quotePrices.id),
  quantity: integer('quantity').notNull(),
  state: jobState('state').notNull().default('to-plan'),
  version: integer('version').notNull().default(1),
  promisedOn: date('promised_on', { mode: 'string' }),
  /** The day of leaving that the customer was last told. */
  toldOn: date('told_on', { mode: 'string' }),
  waitsForWire: boolean('waits_for_wire').notNull().default(false),
  createdAt: createdAt(),
  finishedAt: moment('finished_at'),
}, t => [index('jobs_state_created').on(t.state, t.createdAt)])

/** Wire set aside for a job. */
export const wireReservations = pgTable('wire_reservations', {
  id: id(),
  jobId: uuid('job_id').notNull().unique().references(() => jobs.id),
  wireProductId: uuid('wire_product_id').notNull().references(() => wireProducts.id),
  massKg: numeric('mass_kg', { precision: 12, scale: 4 }).notNull(),
  usedKg: numeric('used_kg', { precision: 12, scale: 4 }),
  createdAt: createdAt(),
}, t => [index('wire_reservations_product').on(t.wireProductId), check('wire_reservations_positive', sql`${t.massKg} > 0`)])

/**
 * One step of a job's routing. planned_span is set together with its work centre; an exclusion constraint in the
 * migration refuses two operations on one work centre at once.
 */
export const operations = pgTable('operations', {
  id: id(),
  jobId: uuid('job_id').notNull().references(() => jobs.id),
  position: integer('position').notNull(),
  kind: operationKind('kind').notNull(),
  state: operationState('state').notNull().default('waiting'),
  version: integer('version').notNull().default(1),
  setUpMinutes: numeric('set_up_minutes', { precision: 10, scale: 2 }).notNull(),
  runMinutes: numeric('run_minutes', { precision: 10, scale: 2 }).notNull(),
  workCentreId: uuid('work_centre_id').references(() => workCentres.id),
  plannedSpan: span('planned_span'),
  startedAt: moment('started_at'),
  finishedAt: moment('finished_at'),
  goodCount: integer('good_count'),
  scrapCount: integer('scrap_count'),
  actualSetUpMinutes: numeric('actual_set_up_minutes', { precision: 10, scale: 2 }),
  actualRunMinutes: numeric('actual_run_minutes', { precision: 10, scale: 2 }),
  wireUsedKg: numeric('wire_used_kg', { precision: 12, scale: 4 }),
}, t => [
  uniqueIndex('operations_position').on(t.jobId, t.position),
  index('operations_centre').on(t.workCentreId, t.state),
  check('operations_planned', sql`(${t.workCentreId} is null) = (${t.plannedSpan} is null)`),
  check('operations_finished', sql`${t.state} <> 'finished' or (${t.finishedAt} is not null and ${t.goodCount} >= 0 and ${t.scrapCount} >= 0)`),
])

/** Append-only: what an operator did at a work centre. The id is made on the device, so that a resend counts once. */
export const benchRecords = pgTable('bench_records', {
  id: uuid('id').primaryKey(),
  operationId: uuid('operation_id').notNull().references(() => operations.id),
  act: benchAct('act').notNull(),
  at: moment('at').notNull().defaultNow(),
  personId: uuid('person_id').notNull().references(() => people.id),
  good: integer('good').notNull().default(0),
  scrap: integer('scrap').notNull().default(0),
  wireKg: numeric('wire_kg', { precision: 12, scale: 4 }),
  note: text('note').notNull().default(''),
}, t => [index('bench_records_operation').on(t.operationId, t.at)])

/** Append-only: wire that came into the rack. The id is made by the sender, so that a resend counts once. */
export const wireReceipts = pgTable('wire_receipts', {
  id: uuid('id').primaryKey(),
  wireProductId: uuid('wire_product_id').notNull().references(() => wireProducts.id),
  massKg: numeric('mass_kg', { precision: 12, scale: 3 }).notNull(),
  at: moment('at').notNull().defaultNow(),
  personId: uuid('person_id').notNull().references(() => people.id),
  note: text('note').notNull().default(''),
}, t => [index('wire_receipts_product').on(t.wireProductId, t.at), check('wire_receipts_positive', sql`${t.massKg} > 0`)])
