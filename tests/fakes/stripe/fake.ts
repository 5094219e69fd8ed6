import type { Cause } from './cause'
import { createClock } from './clock'
import type { FakeClock } from './clock'
import { API_VERSION } from './config'
import type { ResolvedOptions } from './config'
import { createDeliveryQueue } from './delivery/queue'
import type { DeliveryQueue } from './delivery/queue'
import { createFailurePlan } from './failures'
import type { FailurePlan } from './failures'
import { createId } from './ids'
import { createScheduler } from './scheduler'
import type { Scheduler } from './scheduler'
import { createEmptyState } from './state'
import type { FakeState, WireEvent } from './state'
import { loadState, saveState } from './state-file'

/** One entry of the log of API requests. */
export interface RequestLogEntry {
  at: string
  method: string
  path: string
  form: string
  idempotencyKey: string | null
  apiVersion: string | null
  status: number | null
  requestId: string
  isReplay: boolean
}

/** The running fake: its state and the parts that act on it. */
export interface Fake {
  options: ResolvedOptions
  state: FakeState
  clock: FakeClock
  deliveries: DeliveryQueue
  failures: FailurePlan
  scheduler: Scheduler
  /** Newest last, at most 1000. */
  requestLog: RequestLogEntry[]
  /** Base address once it listens. */
  baseUrl: string
  /** Records a snapshot event and hands it to the delivery queue. */
  emit: (type: string, object: object, cause: Cause, previousAttributes?: object) => WireEvent
  /** Writes the state file now, if there is one. */
  persist: () => void
  /** Writes the state file soon. */
  persistSoon: () => void
  /** Forgets everything, switches and planned failures too; the webhook settings are again those of the start. */
  reset: () => void
}

/** An event as the control interface may invent it. */
export interface InventedEvent { type: string, object: object, isLive: boolean, apiVersion?: string, isThin: boolean, id?: string }

/** Sends an event that need not make sense: any type, live mode, another version, or the thin form that carries no object. */
export function emitInvented(fake: Fake, invented: InventedEvent): object {
  const event = {
    id: invented.id ?? createId('event'),
    object: invented.isThin ? 'v2.core.event' : 'event',
    api_version: invented.apiVersion ?? API_VERSION,
    created: fake.clock.nowS(),
    data: { object: structuredClone(invented.object) },
    livemode: invented.isLive,
    pending_webhooks: 0,
    request: { id: null, idempotency_key: null },
    type: invented.type,
  }
  // A thin event is not a WireEvent; the table only keeps it so that it can be delivered and read back.
  fake.state.events[event.id] = event as WireEvent
  fake.deliveries.add(event as WireEvent)
  return event
}

/** Puts the parts together. Reads the state file; starts no timer and opens no port. */
export function createFake(options: ResolvedOptions): Fake {
  let saveTimer: NodeJS.Timeout | null = null
  const { webhookUrl, webhookSecrets, retryGapsMs } = options
  const fake: Fake = {
    options,
    state: loadState(options.stateFile),
    clock: createClock(() => fake.state.clockOffsetS),
    deliveries: createDeliveryQueue(() => fake),
    failures: createFailurePlan(),
    scheduler: createScheduler(() => fake),
    requestLog: [],
    baseUrl: '',
    emit(type, object, cause, previousAttributes) {
      const event: WireEvent = {
        id: createId('event'),
        object: 'event',
        api_version: API_VERSION,
        created: fake.clock.nowS(),
        data: { object: structuredClone(object), ...(previousAttributes ? { previous_attributes: previousAttributes } : {}) },
        livemode: false,
        pending_webhooks: 0,
        request: { id: cause.requestId, idempotency_key: cause.idempotencyKey },
        type,
      }
      fake.state.events[event.id] = event
      fake.deliveries.add(event)
      return event
    },
    persist() {
      if (saveTimer) clearTimeout(saveTimer)
      saveTimer = null
      if (options.stateFile !== null) saveState(options.stateFile, fake.state)
    },
    persistSoon() {
      if (options.stateFile === null || saveTimer) return
      saveTimer = setTimeout(fake.persist, 50)
    },
    reset() {
      fake.deliveries.forgetAll()
      fake.failures.clear()
      fake.requestLog.length = 0
      Object.assign(fake.state, createEmptyState())
      Object.assign(options, { webhookUrl, webhookSecrets, retryGapsMs })
      fake.persist()
    },
  }
  return fake
}
