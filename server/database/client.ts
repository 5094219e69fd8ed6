import { drizzle } from 'drizzle-orm/node-postgres'
import pg from 'pg'
import * as schema from './schema'

/** Makes a pool whose statements, locks and idle transactions all end in time, so that a stuck one cannot hold the rest. */
export function createPool(connectionString: string, onError: (error: Error) => void): pg.Pool {
  const pool = new pg.Pool({
    connectionString,
    max: 10,
    connectionTimeoutMillis: 3_000,
    idleTimeoutMillis: 30_000,
    statement_timeout: 10_000,
    lock_timeout: 5_000,
    idle_in_transaction_session_timeout: 15_000,
    application_name: 'wirewright',
  })
  pool.on('error', onError)
  pool.on('connect', client => client.on('error', onError))
  return pool
}

export const createDatabase = (pool: pg.Pool) => drizzle({ client: pool, schema })

export type Database = ReturnType<typeof createDatabase>
export type Transaction = Parameters<Parameters<Database['transaction']>[0]>[0]
/** A handle that can run statements: the pool, or a transaction of it. */
export type Queryable = Database | Transaction
