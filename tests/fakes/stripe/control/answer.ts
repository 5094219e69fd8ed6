import type { IncomingMessage } from 'node:http'
import { assertAuthorised } from '../api'
import { API_VERSION, assertWebhookUrl } from '../config'
import { FakeApiError, invalidRequest, refusedByState, resourceMissing, unrecognizedUrl } from '../errors'
import type { Fake } from '../fake'
import { jsonAnswer } from '../http'
import type { HttpAnswer } from '../http'
import { closeDispute, openDispute } from '../resources/disputes'
import { settleRefund } from '../resources/refunds'
import { matchRoute } from '../router'
import type { Route } from '../router'
import { overwriteObject, readFailure, readSwitch, sendInventedEvent } from './bodies'
import { readJsonBody } from './json-body'
import { applySessionOutcome } from './outcomes'

type ControlHandler = (fake: Fake, call: { id: string, body: string, query: URLSearchParams }) => object

const REFUND_OUTCOMES = ['succeeded', 'pending', 'failed'] as const

function listDeliveries(fake: Fake, query: URLSearchParams): object {
  const [state, type] = [query.get('state'), query.get('type')]
  const records = Object.values(fake.state.deliveries)
  return { deliveries: records.filter(record => (state === null || record.state === state) && (type === null || record.eventType === type)) }
}

function planRefunds(fake: Fake, body: string): object {
  const reader = readJsonBody(body)
  const outcomes = reader.texts('outcomes') ?? []
  reader.done()
  fake.state.nextRefundOutcomes = outcomes.map((given) => {
    const known = REFUND_OUTCOMES.find(outcome => outcome === given)
    if (!known) throw invalidRequest(`outcomes must be of ${REFUND_OUTCOMES.join(', ')}.`, { param: 'outcomes' })
    return known
  })
  return { outcomes: fake.state.nextRefundOutcomes }
}

function endRefund(fake: Fake, id: string, body: string): object {
  const reader = readJsonBody(body)
  const outcome = reader.required('outcome', ['succeeded', 'failed'] as const)
  reader.done()
  if (!settleRefund(fake, id, outcome)) throw refusedByState('There is no such refund, or it has ended.')
  return fake.state.refunds[id] ?? {}
}

function dispute(fake: Fake, id: string, body: string): object {
  const reader = readJsonBody(body)
  const settings = { amountMinor: reader.number('amountMinor'), reason: reader.text('reason') }
  reader.done()
  const opened = openDispute(fake, id, settings)
  if (!opened) throw refusedByState('There is no such charge, or it cannot be disputed.')
  return opened
}

function endDispute(fake: Fake, id: string, body: string): object {
  const reader = readJsonBody(body)
  const outcome = reader.required('outcome', ['won', 'lost'] as const)
  reader.done()
  const closed = closeDispute(fake, id, outcome)
  if (!closed) throw refusedByState('There is no such dispute, or it is closed.')
  return closed
}

function setClock(fake: Fake, body: string): object {
  const reader = readJsonBody(body)
  fake.state.clockOffsetS = reader.number('offsetS') ?? 0
  reader.done()
  fake.scheduler.sweep()
  return { offsetS: fake.state.clockOffsetS, nowS: fake.clock.nowS() }
}

function setWebhook(fake: Fake, body: string): object {
  const reader = readJsonBody(body)
  const url = reader.text('url')
  const secrets = reader.texts('secrets')
  const retryGapsMs = reader.numbers('retryGapsMs')
  const isOff = reader.flag('isOff') ?? false
  reader.done()
  if (url !== undefined) {
    try {
      assertWebhookUrl(url)
    } catch (error) {
      throw invalidRequest(error instanceof Error ? error.message : 'Not a webhook address.', { param: 'url' })
    }
    fake.options.webhookUrl = url
  }
  if (secrets && secrets.length > 0) fake.options.webhookSecrets = secrets
  if (retryGapsMs) fake.options.retryGapsMs = retryGapsMs
  if (isOff) fake.options.webhookUrl = null
  return { url: fake.options.webhookUrl, secrets: fake.options.webhookSecrets.length, retryGapsMs: fake.options.retryGapsMs }
}

function redeliver(fake: Fake, id: string): object {
  const event = fake.state.events[id]
  if (!event) throw resourceMissing('event', id)
  fake.deliveries.redeliver(event)
  return event
}

function findDelivery(fake: Fake, id: string): object {
  const record = fake.state.deliveries[id]
  if (!record) throw resourceMissing('delivery', id)
  return record
}

const ROUTES: readonly Route<ControlHandler>[] = [
  { method: 'GET', path: '/_fake/deliveries', handler: (fake, { query }) => listDeliveries(fake, query) },
  { method: 'GET', path: '/_fake/deliveries/:id', handler: (fake, { id }) => findDelivery(fake, id) },
  { method: 'GET', path: '/_fake/requests', handler: fake => ({ requests: fake.requestLog }) },
  { method: 'GET', path: '/_fake/switches', handler: fake => ({ switches: fake.deliveries.listSwitches() }) },
  { method: 'POST', path: '/_fake/switches', handler: (fake, { body }) => {
    const bend = readSwitch(body)
    fake.deliveries.addSwitch(bend)
    return bend
  } },
  { method: 'POST', path: '/_fake/switches/clear', handler: (fake) => {
    fake.deliveries.clearSwitches()
    return { switches: [] }
  } },
  { method: 'GET', path: '/_fake/failures', handler: fake => ({ failures: fake.failures.list() }) },
  { method: 'POST', path: '/_fake/failures', handler: (fake, { body }) => {
    const failure = readFailure(body)
    fake.failures.add(failure)
    return failure
  } },
  { method: 'POST', path: '/_fake/failures/clear', handler: (fake) => {
    fake.failures.clear()
    return { failures: [] }
  } },
  { method: 'POST', path: '/_fake/sessions/:id/outcome', handler: (fake, { id, body }) => applySessionOutcome(fake, id, body) },
  { method: 'POST', path: '/_fake/refunds/next', handler: (fake, { body }) => planRefunds(fake, body) },
  { method: 'POST', path: '/_fake/refunds/:id/outcome', handler: (fake, { id, body }) => endRefund(fake, id, body) },
  { method: 'POST', path: '/_fake/charges/:id/dispute', handler: (fake, { id, body }) => dispute(fake, id, body) },
  { method: 'POST', path: '/_fake/disputes/:id/outcome', handler: (fake, { id, body }) => endDispute(fake, id, body) },
  { method: 'POST', path: '/_fake/events', handler: (fake, { body }) => sendInventedEvent(fake, body) },
  { method: 'POST', path: '/_fake/events/:id/redeliver', handler: (fake, { id }) => redeliver(fake, id) },
  { method: 'POST', path: '/_fake/objects/:id', handler: (fake, { id, body }) => overwriteObject(fake, id, body) },
  { method: 'POST', path: '/_fake/clock', handler: (fake, { body }) => setClock(fake, body) },
  { method: 'POST', path: '/_fake/webhook', handler: (fake, { body }) => setWebhook(fake, body) },
  { method: 'POST', path: '/_fake/reset', handler: (fake) => {
    fake.reset()
    return { isReset: true }
  } },
]

/** Answers a request under /_fake/: everything needs the secret key but the health check, which tells nothing. */
export function answerControl(fake: Fake, request: IncomingMessage, address: URL, body: string): HttpAnswer {
  const method = request.method ?? 'GET'
  if (method === 'GET' && address.pathname === '/_fake/health') return jsonAnswer(200, { status: 'ok', apiVersion: API_VERSION })
  try {
    assertAuthorised(fake, request)
    const route = matchRoute(ROUTES, method, address.pathname)
    if (!route) throw unrecognizedUrl(method, address.pathname)
    const answer = route.handler(fake, { id: route.parts.id ?? '', body, query: address.searchParams })
    if (method === 'POST') fake.persist()
    return jsonAnswer(200, answer)
  } catch (error) {
    if (error instanceof FakeApiError) return jsonAnswer(error.status, { error: error.body })
    throw error
  }
}
