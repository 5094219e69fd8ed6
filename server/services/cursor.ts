import { invalid } from './errors'

/** Where a list goes on: the values of the last row in the order of the list, in base64url. */
export const encodeCursor = (...values: readonly string[]): string => Buffer.from(JSON.stringify(values)).toString('base64url')

/**
 * Reads a cursor that a list gave, with as many values as the list is ordered by.
 * @throws DomainError invalid for anything else
 */
export function decodeCursor(cursor: string, length: number): string[] {
  try {
    const values: unknown = JSON.parse(Buffer.from(cursor, 'base64url').toString('utf8'))
    if (Array.isArray(values) && values.length === length && values.every(value => typeof value === 'string')) return values
  }
  catch {
    // Not JSON: the same refusal as for a list of the wrong length.
  }
  throw invalid('cursor', 'This page of the list does not exist. Start at the first one.')
}

const UUID = /^[0-9a-f]{8}-(?:[0-9a-f]{4}-){3}[0-9a-f]{12}$/

/**
 * A cursor of a list that is ordered by moment and id. The moment keeps PostgreSQL's microseconds, which a Date would lose,
 * so that rows of one millisecond are neither skipped nor doubled.
 * @throws DomainError invalid
 */
export function decodeMomentCursor(cursor: string): { at: string, id: string } {
  const [at = '', id = ''] = decodeCursor(cursor, 2)
  // Sixteen digits of microseconds reach to the year 2286; more would be beyond what the database counts in.
  if (!/^\d{1,16}$/.test(at) || !UUID.test(id)) throw invalid('cursor', 'This page of the list does not exist. Start at the first one.')
  return { at, id }
}
