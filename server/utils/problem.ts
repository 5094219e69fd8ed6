import type { H3Event } from 'h3'
import { DomainError, type DomainErrorCode } from '../services/errors'
import { databaseErrorCode } from '../services/context'
import type { Problem } from '#shared/schemas/problem'

const STATUS: Readonly<Record<DomainErrorCode, number>> = {
  'not-found': 404, 'forbidden': 403, 'conflict': 409, 'invalid': 422, 'stale': 412, 'too-many': 429, 'unavailable': 503, 'unauthenticated': 401, 'gone': 410,
}
const TITLES: Readonly<Record<number, string>> = {
  400: 'This could not be read', 401: 'Sign in first', 403: 'Not allowed', 404: 'Not found', 405: 'Not that way', 409: 'This does not go together with what is there', 410: 'No longer valid', 412: 'Changed meanwhile',
  413: 'Too large', 415: 'Not this type of content', 422: 'Some values are wrong', 428: 'The version is missing', 429: 'Too many requests', 500: 'Something went wrong here', 503: 'Not available at the moment',
}

/** A refusal that is about HTTP itself: type, size, origin, method. */
export class HttpProblem extends Error {
  constructor(readonly status: number, message: string, readonly fields: readonly { path: string, message: string }[] = []) {
    super(message)
  }
}

// Connection lost or refused, shutdown, too many connections, timeouts, lock not available: PostgreSQL appendix A and Node's socket errors.
const UNAVAILABLE = /^(08...|57P0[123]|53...|55P03|57014|ECONNREFUSED|ECONNRESET|EPIPE|ETIMEDOUT)$/

const isUnavailable = (error: unknown) => UNAVAILABLE.test(databaseErrorCode(error) ?? '')
  || (error instanceof Error && /timeout exceeded when trying to connect|Connection terminated|Client has encountered a connection error/.test(`${error.message} ${error.cause instanceof Error ? error.cause.message : ''}`))

/** Turns whatever was thrown into problem details; an unknown error is logged and answered with a neutral text. */
export function toProblem(error: unknown, requestId: string): Problem & { retryAfterS?: number } {
  if (error instanceof DomainError)
    return make(STATUS[error.code], error.message, requestId, error.fields, error.retryAfterS)
  if (error instanceof HttpProblem) return make(error.status, error.message, requestId, error.fields)
  if (isUnavailable(error)) {
    log.error('unavailable', error, { requestId })
    return make(503, 'We cannot reach our records just now. Nothing was lost; try again in a moment.', requestId, [], 2)
  }
  log.error('unexpected', error, { requestId })
  return make(500, 'This is our fault, and it is recorded. Try again; if it stays, tell us the number below.', requestId)
}

function make(status: number, detail: string, requestId: string, errors: readonly { path: string, message: string }[] = [], retryAfterS?: number) {
  return { type: 'about:blank', title: TITLES[status] ?? 'Refused', status, detail, requestId, ...(errors.length > 0 ? { errors: [...errors] } : {}), ...(retryAfterS ? { retryAfterS } : {}) }
}

/** Answers with problem details (RFC 9457). */
export function sendProblem(event: H3Event, { retryAfterS, ...problem }: Problem & { retryAfterS?: number }): string {
  setResponseStatus(event, problem.status)
  setResponseHeader(event, 'content-type', 'application/problem+json; charset=utf-8')
  setResponseHeader(event, 'cache-control', 'no-store')
  if (retryAfterS) setResponseHeader(event, 'retry-after', retryAfterS)
  return JSON.stringify(problem)
}
