import { invalidRequest, resourceMissing } from '../errors'
import type { Fake } from '../fake'
import type { FormTable } from '../form-decoding'
import { listPage, matchesCreated } from '../lists'
import type { ListPage } from '../lists'
import { bool, createdFilter, expandParam, list, listParams, parseParams, text } from '../params'
import type { WireEvent } from '../state'

const KEPT_S = 30 * 24 * 60 * 60

function isFit(type: string, wanted: string): boolean {
  return wanted.endsWith('*') ? type.startsWith(wanted.slice(0, -1)) : type === wanted
}

/** GET /v1/events: the last 30 days, filtered by type, time and whether every delivery succeeded (PAY-40). */
export function listEvents(fake: Fake, form: FormTable): ListPage<WireEvent> {
  const read = parseParams(form, { ...listParams, created: createdFilter(), delivery_success: bool(), type: text(), types: list(text(), 20) })
  if (read.type !== undefined && read.types !== undefined) {
    throw invalidRequest('You may only specify one of these parameters: type, types.', { code: 'parameters_exclusive', param: 'type' })
  }
  const oldestS = fake.clock.nowS() - KEPT_S
  const wanted = read.types ?? (read.type === undefined ? [] : [read.type])
  const matching = Object.values(fake.state.events).filter(event => event.created >= oldestS
    && matchesCreated(event.created, read.created)
    && (wanted.length === 0 || wanted.some(type => isFit(event.type, type)))
    && (read.delivery_success === undefined || (event.pending_webhooks === 0) === read.delivery_success))
  return listPage(matching, '/v1/events', read)
}

/** GET /v1/events/:id */
export function retrieveEvent(fake: Fake, id: string, form: FormTable): WireEvent {
  parseParams(form, expandParam)
  const event = fake.state.events[id]
  if (!event || event.created < fake.clock.nowS() - KEPT_S) throw resourceMissing('event', id)
  return event
}
