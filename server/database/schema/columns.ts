import { bigint, customType, timestamp, uuid } from 'drizzle-orm/pg-core'

/** A random primary key made by PostgreSQL. */
export const id = () => uuid('id').primaryKey().defaultRandom()

/** A moment, with its zone, read as a Date. */
export const moment = (name: string) => timestamp(name, { withTimezone: true, mode: 'date' })

/** The moment the row was written, by the database's clock. */
export const createdAt = () => moment('created_at').notNull().defaultNow()

/** An amount in minor units of the currency beside it. Safe as a number: amounts stay under nine digits. */
export const amountMinor = (name: string) => bigint(name, { mode: 'number' })

/** Raw bytes, such as the SHA-256 of a token. */
export const bytes = customType<{ data: Buffer }>({ dataType: () => 'bytea' })

/** A half-open span of time [from, to), as PostgreSQL writes it. */
export const span = customType<{ data: string }>({ dataType: () => 'tstzrange' })
