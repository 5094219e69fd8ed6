import { sql } from 'drizzle-orm'
import { boolean, check, index, integer, pgEnum, pgTable, primaryKey, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core'
import { ROLES } from '../../../shared/schemas/roles'
import { bytes, createdAt, id, moment } from './columns'

export const role = pgEnum('role', ROLES)
export const tokenPurpose = pgEnum('token_purpose', ['confirm-address', 'sign-in', 'reset-password'])

export const companies = pgTable('companies', {
  id: id(),
  name: text('name').notNull(),
  countryCode: text('country_code').notNull(),
  vatNumber: text('vat_number'),
  createdAt: createdAt(),
}, t => [check('companies_country_code', sql`${t.countryCode} ~ '^[A-Z]{2}$'`)])

/** Everybody who can sign in. The e-mail address is stored in lower case and is unique. */
export const people = pgTable('people', {
  id: id(),
  email: text('email').notNull(),
  name: text('name').notNull(),
  companyId: uuid('company_id').references(() => companies.id),
  passwordHash: text('password_hash'),
  emailConfirmedAt: moment('email_confirmed_at'),
  isDemo: boolean('is_demo').notNull().default(false),
  disabledAt: moment('disabled_at'),
  createdAt: createdAt(),
}, t => [
  uniqueIndex('people_email_unique').on(t.email),
  index('people_company').on(t.companyId),
  check('people_email_lower', sql`${t.email} = lower(${t.email})`),
])

export const personRoles = pgTable('person_roles', {
  personId: uuid('person_id').notNull().references(() => people.id, { onDelete: 'cascade' }),
  role: role('role').notNull(),
}, t => [primaryKey({ columns: [t.personId, t.role] })])

/** A signed-in browser. Only the SHA-256 of the cookie's value is kept. */
export const sessions = pgTable('sessions', {
  tokenHash: bytes('token_hash').primaryKey(),
  id: uuid('id').notNull().unique().defaultRandom(),
  personId: uuid('person_id').notNull().references(() => people.id, { onDelete: 'cascade' }),
  createdAt: createdAt(),
  lastSeenAt: moment('last_seen_at').notNull().defaultNow(),
  idleMinutes: integer('idle_minutes').notNull(),
  expiresAt: moment('expires_at').notNull(),
  revokedAt: moment('revoked_at'),
}, t => [index('sessions_person').on(t.personId), index('sessions_expiry').on(t.expiresAt)])

/** A single-use link sent by e-mail. Only the SHA-256 of its secret is kept. */
export const emailTokens = pgTable('email_tokens', {
  tokenHash: bytes('token_hash').primaryKey(),
  purpose: tokenPurpose('purpose').notNull(),
  email: text('email').notNull(),
  orderId: uuid('order_id'),
  createdAt: createdAt(),
  expiresAt: moment('expires_at').notNull(),
  usedAt: moment('used_at'),
}, t => [index('email_tokens_email').on(t.email), index('email_tokens_expiry').on(t.expiresAt)])

/** One counter per limited act and window; kept in PostgreSQL so that all processes share it. */
export const rateCounters = pgTable('rate_counters', {
  key: text('key').notNull(),
  windowStart: moment('window_start').notNull(),
  hits: integer('hits').notNull(),
}, t => [primaryKey({ columns: [t.key, t.windowStart] }), index('rate_counters_window').on(t.windowStart)])

/** Replays the first answer of a request that carries the same client key. */
export const idempotencyKeys = pgTable('idempotency_keys', {
  scope: text('scope').notNull(),
  key: text('key').notNull(),
  fingerprint: bytes('fingerprint').notNull(),
  response: text('response'),
  createdAt: createdAt(),
}, t => [primaryKey({ columns: [t.scope, t.key] }), index('idempotency_keys_created').on(t.createdAt)])
