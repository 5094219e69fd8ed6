/** The error object inside `{ error: … }`, as the payment service's SDK reads it. */
export interface StripeErrorBody {
  type: 'api_error' | 'card_error' | 'idempotency_error' | 'invalid_request_error'
  message: string
  code?: string
  param?: string
  decline_code?: string
  doc_url?: string
  request_log_url?: string
}

/** A refusal with its HTTP status; `storable` says whether an idempotency key keeps it (FK-5). */
export class FakeApiError extends Error {
  readonly status: number
  readonly body: StripeErrorBody
  readonly storable: boolean
  readonly retryHint: boolean | null

  constructor(status: number, body: StripeErrorBody, settings: { storable?: boolean, retryHint?: boolean } = {}) {
    super(body.message)
    this.status = status
    this.body = body.code
      ? { ...body, doc_url: `https://stripe.com/docs/error-codes/${body.code.replaceAll('_', '-')}` }
      : body
    this.storable = settings.storable ?? false
    this.retryHint = settings.retryHint ?? null
  }
}

/** A 400 about the request itself. Raised before execution, so it is never stored under an idempotency key. */
export function invalidRequest(message: string, details: { code?: string, param?: string } = {}): FakeApiError {
  return new FakeApiError(400, { type: 'invalid_request_error', message, ...details })
}

/** A 400 raised by the state of an object during execution: it is stored under the idempotency key. */
export function refusedByState(message: string, details: { code?: string, param?: string } = {}): FakeApiError {
  return new FakeApiError(400, { type: 'invalid_request_error', message, ...details }, { storable: true })
}

/** 400 for a parameter that the pinned version does not have. */
export function unknownParameter(path: string): FakeApiError {
  return invalidRequest(`Received unknown parameter: ${path}`, { code: 'parameter_unknown', param: path })
}

/** 400 for a parameter that must be there. */
export function missingParameter(path: string): FakeApiError {
  return invalidRequest(`Missing required param: ${path}.`, { code: 'parameter_missing', param: path })
}

/** 404 for an object that is not in the store; `noun` is the object's name in the message. */
export function resourceMissing(noun: string, id: string, param = 'id'): FakeApiError {
  return new FakeApiError(404, {
    type: 'invalid_request_error',
    code: 'resource_missing',
    message: `No such ${noun}: '${id}'`,
    param,
  })
}

/** 404 for a path or method that the fake does not serve. */
export function unrecognizedUrl(method: string, path: string): FakeApiError {
  return new FakeApiError(404, {
    type: 'invalid_request_error',
    message: `Unrecognized request URL (${method}: ${path}). This fake serves only the resources that Wirewright uses.`,
  })
}
