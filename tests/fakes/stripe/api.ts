import { timingSafeEqual } from 'node:crypto'
import type { IncomingMessage } from 'node:http'
import { API_ROUTES } from './api-routes'
import { API_VERSION } from './config'
import { FakeApiError, invalidRequest, unrecognizedUrl } from './errors'
import { expandAnswer } from './expand'
import type { Fake, RequestLogEntry } from './fake'
import type { PlannedFailure } from './failures'
import { canonicalForm, decodeForm } from './form-decoding'
import type { FormTable } from './form-decoding'
import { jsonAnswer, pause } from './http'
import type { HttpAnswer } from './http'
import { beginIdempotent, endIdempotent, fingerprintOf } from './idempotency'
import { createId } from './ids'
import { matchRoute } from './router'

/** The connection is to be broken instead of answered. */
export const BROKEN_CONNECTION = 'broken connection'

/** Refuses a request without the right secret key (401). */
export function assertAuthorised(fake: Fake, request: IncomingMessage): void {
  const given = /^Bearer (.+)$/.exec(request.headers.authorization ?? '')?.[1]
  if (given === undefined) {
    throw new FakeApiError(401, { type: 'invalid_request_error', message: 'You did not provide an API key. Send it as Authorization: Bearer <key>.' })
  }
  const [wanted, offered] = [Buffer.from(fake.options.secretKey), Buffer.from(given)]
  if (wanted.length !== offered.length || !timingSafeEqual(wanted, offered)) {
    throw new FakeApiError(401, { type: 'invalid_request_error', message: `Invalid API Key provided: ${given.slice(0, 8)}${'*'.repeat(8)}` })
  }
}

function assertVersion(request: IncomingMessage): void {
  const version = request.headers['stripe-version']
  if (version !== undefined && version !== API_VERSION) {
    throw invalidRequest(`Invalid Stripe API version: ${String(version)}. This fake models ${API_VERSION} only.`)
  }
}

function errorAnswer(error: FakeApiError, requestId: string): HttpAnswer {
  const body = { error: { ...error.body, request_log_url: `https://dashboard.stripe.com/test/logs/${requestId}` } }
  return jsonAnswer(error.status, body, error.retryHint === null ? {} : { 'stripe-should-retry': String(error.retryHint) })
}

function plannedError(failure: PlannedFailure): FakeApiError {
  const usual: Record<number, { type: FakeApiError['body']['type'], code?: string, decline_code?: string, message: string }> = {
    400: { type: 'invalid_request_error', message: 'A refused request, as planned.' },
    401: { type: 'invalid_request_error', message: 'An expired key, as planned.' },
    402: { type: 'card_error', code: 'card_declined', decline_code: 'generic_decline', message: 'Your card was declined.' },
    403: { type: 'invalid_request_error', message: 'A forbidden request, as planned.' },
    404: { type: 'invalid_request_error', code: 'resource_missing', message: 'A missing object, as planned.' },
    409: { type: 'invalid_request_error', code: 'idempotency_key_in_use', message: 'Another request with this idempotency key is still being carried out.' },
    429: { type: 'invalid_request_error', code: 'rate_limit', message: 'Too many requests, as planned.' },
  }
  const body = { ...(usual[failure.status] ?? { type: 'api_error', message: 'An error at the payment service, as planned.' }), ...failure.error }
  return new FakeApiError(failure.status, body as FakeApiError['body'], { storable: failure.isStored })
}

interface ApiCall { method: string, path: string, form: FormTable, requestId: string, idempotencyKey: string | null }

/** Carries out one call and answers it, refusals included. A failure that is not ours to name is a 500. */
function execute(fake: Fake, call: ApiCall): { answer: HttpAnswer, isStorable: boolean } {
  let hasRun = false
  try {
    const route = matchRoute(API_ROUTES, call.method, call.path)
    if (!route) throw unrecognizedUrl(call.method, call.path)
    const cause = { requestId: call.requestId, idempotencyKey: call.idempotencyKey }
    const result = route.handler(fake, { id: route.parts.id ?? '', form: call.form, cause })
    hasRun = true
    const expand = call.form.expand
    const paths = typeof expand === 'object' ? Object.values(expand).filter(path => typeof path === 'string') : []
    return { answer: jsonAnswer(200, expandAnswer(fake, result, paths)), isStorable: true }
  } catch (error) {
    if (error instanceof FakeApiError) return { answer: errorAnswer(error, call.requestId), isStorable: hasRun || error.storable }
    fake.options.log(`defect in the payment fake: ${error instanceof Error ? error.stack : String(error)}`)
    const defect = new FakeApiError(500, { type: 'api_error', message: 'A defect in the payment fake; see its log.' })
    return { answer: errorAnswer(defect, call.requestId), isStorable: true }
  }
}

/** Carries out one call as a planned failure says; `storable` answers are kept under the idempotency key. */
async function executePlanned(fake: Fake, call: ApiCall, failure: PlannedFailure | undefined): Promise<{ answer: HttpAnswer | typeof BROKEN_CONNECTION, stored: HttpAnswer | null }> {
  if (!failure) {
    const { answer, isStorable } = execute(fake, call)
    return { answer, stored: isStorable ? answer : null }
  }
  if (failure.kind === 'reset') return { answer: BROKEN_CONNECTION, stored: null }
  if (failure.kind === 'hang') {
    await pause(failure.delayMs)
    return { answer: BROKEN_CONNECTION, stored: null }
  }
  if (failure.kind === 'answer') {
    if (failure.isExecuted) execute(fake, call)
    const answer = errorAnswer(plannedError(failure), call.requestId)
    if (failure.delayMs > 0) await pause(failure.delayMs)
    return { answer, stored: failure.isStored ? answer : null }
  }
  const { answer, isStorable } = execute(fake, call)
  if (failure.delayMs > 0) await pause(failure.delayMs)
  return { answer: failure.kind === 'lostAnswer' ? BROKEN_CONNECTION : answer, stored: isStorable ? answer : null }
}

/** Answers one request under /v1/: key, version, form, idempotency, planned failures, then the work itself. */
export async function answerApi(fake: Fake, request: IncomingMessage, address: URL, body: string): Promise<HttpAnswer | typeof BROKEN_CONNECTION> {
  const method = request.method ?? 'GET'
  const keyHeader = request.headers['idempotency-key']
  const idempotencyKey = method === 'POST' && typeof keyHeader === 'string' && keyHeader !== '' ? keyHeader : null
  const requestId = createId('request')
  const headers: Record<string, string> = { 'request-id': requestId, 'stripe-version': API_VERSION }
  if (idempotencyKey) headers['idempotency-key'] = idempotencyKey
  const logged: RequestLogEntry = {
    at: new Date().toISOString(), method, path: address.pathname, form: method === 'GET' ? address.search.slice(1) : body, idempotencyKey,
    apiVersion: request.headers['stripe-version']?.toString() ?? null, status: null, requestId, isReplay: false,
  }
  fake.requestLog.push(logged)
  if (fake.requestLog.length > 1000) fake.requestLog.shift()
  const finish = (answer: HttpAnswer, extra: Record<string, string> = {}): HttpAnswer => {
    logged.status = answer.status
    return { ...answer, headers: { ...answer.headers, ...headers, ...extra } }
  }
  try {
    assertAuthorised(fake, request)
    assertVersion(request)
    const form = decodeForm(logged.form)
    const call: ApiCall = { method, path: address.pathname, form, requestId, idempotencyKey }
    if (idempotencyKey === null) {
      const { answer } = await executePlanned(fake, call, fake.failures.take(method, address.pathname))
      if (method === 'POST') fake.persist()
      return answer === BROKEN_CONNECTION ? answer : finish(answer)
    }
    const fingerprint = fingerprintOf(method, address.pathname, canonicalForm(form))
    const replayed = beginIdempotent(fake, idempotencyKey, fingerprint)
    if (replayed) {
      logged.isReplay = true
      const again = { ...jsonAnswer(replayed.status, {}), body: replayed.body }
      return finish(again, { 'idempotent-replayed': 'true', 'original-request': replayed.requestId })
    }
    let stored: HttpAnswer | null = null
    try {
      const outcome = await executePlanned(fake, call, fake.failures.take(method, address.pathname))
      stored = outcome.stored
      return outcome.answer === BROKEN_CONNECTION ? outcome.answer : finish(outcome.answer)
    } finally {
      endIdempotent(fake, idempotencyKey, stored ? { fingerprint, status: stored.status, body: stored.body, requestId } : null)
      fake.persist()
    }
  } catch (error) {
    if (error instanceof FakeApiError) return finish(errorAnswer(error, requestId))
    throw error
  }
}
