export type DomainErrorCode = 'not-found' | 'forbidden' | 'conflict' | 'invalid' | 'stale' | 'too-many' | 'unavailable' | 'unauthenticated' | 'gone'

/** A refusal of the business, in words that a person may read. Routes turn its code into an HTTP status. */
export class DomainError extends Error {
  constructor(
    readonly code: DomainErrorCode,
    message: string,
    readonly fields: readonly { path: string, message: string }[] = [],
    readonly retryAfterS?: number,
  ) {
    super(message)
    this.name = 'DomainError'
  }
}

export const notFound = (what: string) => new DomainError('not-found', `There is no such ${what}, or it is not yours to see.`)
export const conflict = (message: string) => new DomainError('conflict', message)
export const stale = (what: string) => new DomainError('stale', `Somebody else has changed this ${what} meanwhile. Load it again; what you typed is kept.`)
export const invalid = (path: string, message: string) => new DomainError('invalid', message, [{ path, message }])
