import { invalidRequest } from '../errors'
import { emitInvented } from '../fake'
import type { Fake } from '../fake'
import type { PlannedFailure } from '../failures'
import type { DeliverySwitch } from '../delivery/switches'
import { readJsonBody } from './json-body'

function atLeast(name: string, value: number | undefined, least: number, usual: number): number {
  const read = value ?? usual
  if (read < least) throw invalidRequest(`${name} must be at least ${least}.`, { param: name })
  return read
}

/** Reads a switch for coming deliveries. */
export function readSwitch(body: string): DeliverySwitch {
  const reader = readJsonBody(body)
  const bend: DeliverySwitch = {
    times: atLeast('times', reader.number('times'), 1, 1),
    types: reader.texts('types') ?? [],
    extraCopies: atLeast('extraCopies', reader.number('extraCopies'), 0, 0),
    reorder: atLeast('reorder', reader.number('reorder'), 0, 0),
    delayMs: atLeast('delayMs', reader.number('delayMs'), 0, 0),
    drop: reader.flag('drop') ?? false,
    badSignature: reader.flag('badSignature') ?? false,
    clockOffsetS: reader.number('clockOffsetS') ?? 0,
    bodyPauseMs: atLeast('bodyPauseMs', reader.number('bodyPauseMs'), 0, 0),
    answerTimeoutMs: reader.number('answerTimeoutMs') ?? null,
    everyAttempt: reader.flag('everyAttempt') ?? false,
  }
  reader.done()
  return bend
}

/** Reads a failure for coming API requests. */
export function readFailure(body: string): PlannedFailure {
  const reader = readJsonBody(body)
  const kind = reader.oneOf('kind', ['answer', 'reset', 'lostAnswer', 'hang', 'slow'] as const) ?? 'answer'
  const status = reader.number('status') ?? 500
  if (status < 400 || status > 599) throw invalidRequest('status must lie between 400 and 599.', { param: 'status' })
  const errorFields = Object.entries(reader.object('error') ?? {})
  if (errorFields.some(([, value]) => typeof value !== 'string')) throw invalidRequest('error must hold texts.', { param: 'error' })
  const failure: PlannedFailure = {
    kind,
    status,
    error: Object.fromEntries(errorFields.map(([name, value]) => [name, String(value)])),
    isExecuted: reader.flag('isExecuted') ?? false,
    // FK-5: a 500 and a declined card were executed and are kept; 429 and the other refusals were not.
    isStored: reader.flag('isStored') ?? (status === 500 || status === 402),
    delayMs: atLeast('delayMs', reader.number('delayMs'), 0, 0),
    times: atLeast('times', reader.number('times'), 1, 1),
    method: reader.text('method') ?? null,
    pathPrefix: reader.text('pathPrefix') ?? null,
  }
  reader.done()
  return failure
}

/** The stored object with this id, of any kind. */
export function findObject(fake: Fake, id: string): object | undefined {
  const { state } = fake
  return [state.sessions, state.paymentIntents, state.charges, state.refunds, state.disputes, state.customers]
    .map(table => (Object.hasOwn(table, id) ? table[id] : undefined)).find(found => found !== undefined)
}

/** POST /_fake/objects/:id: overwrites fields of a stored object, to make it disagree with what was asked for. */
export function overwriteObject(fake: Fake, id: string, body: string): object {
  const reader = readJsonBody(body)
  const fields = reader.object('set')
  reader.done()
  const found = findObject(fake, id)
  if (!found || !fields) throw invalidRequest(found ? 'set must be an object.' : `No object ${id}.`, { param: found ? 'set' : 'id' })
  return Object.assign(found, fields)
}

/** POST /_fake/events: sends an event of any type about a stored or an invented object, thin ones too. */
export function sendInventedEvent(fake: Fake, body: string): object {
  const reader = readJsonBody(body)
  const type = reader.text('type')
  const objectId = reader.text('objectId')
  const given = reader.object('object')
  const isLive = reader.flag('livemode') ?? false
  const apiVersion = reader.text('apiVersion')
  const isThin = reader.flag('isThin') ?? false
  const id = reader.text('id')
  reader.done()
  const object = given ?? (objectId === undefined ? undefined : findObject(fake, objectId))
  if (type === undefined || !object) throw invalidRequest('An event needs a type, and an object or the objectId of a stored one.')
  return emitInvented(fake, { type, object, isLive, apiVersion, isThin, id })
}
