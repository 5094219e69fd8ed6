import type pg from 'pg'
import { createDatabase, createPool, type Database } from '../database/client'

let pool: pg.Pool | undefined
let database: Database | undefined

/** The pool of this process, opened at first use. */
export function usePool(): pg.Pool {
  pool ??= createPool(useSettings().databaseUrl, error => log.error('database-connection', error))
  return pool
}

/** The database of this process. */
export function useDatabase(): Database {
  database ??= createDatabase(usePool())
  return database
}

/** Closes the pool at the end of the process. */
export async function closeDatabase(): Promise<void> {
  const closing = pool
  pool = undefined
  database = undefined
  await closing?.end()
}
