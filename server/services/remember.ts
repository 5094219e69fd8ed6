import type { Database } from '../database/client'

/**
 * Keeps what a slow read gave for some milliseconds, per process and database. Callers that come meanwhile share the one
 * read; a failed read is not kept. Only for what may be a little old, such as prices and stock that are checked again later.
 */
export function rememberFor<Value>(milliseconds: number, read: (db: Database) => Promise<Value>): (db: Database) => Promise<Value> {
  const kept = new WeakMap<Database, { value: Promise<Value>, until: number }>()
  return (db) => {
    const found = kept.get(db)
    if (found && performance.now() < found.until) return found.value
    const value = read(db)
    kept.set(db, { value, until: performance.now() + milliseconds })
    value.catch(() => kept.delete(db))
    return value
  }
}
