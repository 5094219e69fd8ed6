import type { Fake } from '../fake'
import type { DeliveryRecord, WireEvent } from '../state'
import { sendDelivery } from './send'
import { signatureHeader } from './signature'
import { describeSwitch, NEUTRAL_SWITCH } from './switches'
import type { DeliverySwitch } from './switches'

const REORDER_PATIENCE_MS = 3000

/** Hands events to the webhook address: in order at first, retried with growing gaps, bent by switches. */
export interface DeliveryQueue {
  /** Plans the delivery of a new event. */
  add: (event: WireEvent) => void
  /** Delivers a recorded event again, once, whatever became of it. */
  redeliver: (event: WireEvent) => void
  addSwitch: (bend: DeliverySwitch) => void
  listSwitches: () => readonly DeliverySwitch[]
  clearSwitches: () => void
  /** Takes up what a stopped process had left pending. */
  resume: () => void
  /** Drops every plan (for a reset); running attempts end without a trace. */
  forgetAll: () => void
  /** Stops for good. */
  stop: () => void
}

/** A queue over the state of the fake that `getFake` answers. */
export function createDeliveryQueue(getFake: () => Fake): DeliveryQueue {
  const switches: DeliverySwitch[] = []
  const timers = new Set<NodeJS.Timeout>()
  const held: { event: WireEvent, bend: DeliverySwitch }[] = []
  let generation = 0
  let firstAttempts: Promise<void> = Promise.resolve()

  function later(delayMs: number, act: () => void): void {
    const timer = setTimeout(() => {
      timers.delete(timer)
      act()
    }, Math.max(0, delayMs))
    timers.add(timer)
  }

  function takeSwitch(type: string): DeliverySwitch {
    const index = switches.findIndex(bend => bend.types.length === 0 || bend.types.includes(type))
    const bend = switches[index]
    if (!bend) return NEUTRAL_SWITCH
    if (--bend.times <= 0) switches.splice(index, 1)
    return bend
  }

  async function attempt(event: WireEvent, bend: DeliverySwitch): Promise<void> {
    const fake = getFake()
    const startedIn = generation
    const record = fake.state.deliveries[event.id]
    if (!record) return
    record.nextAttemptAtMs = null
    const bends = bend.everyAttempt || record.attempts.length === 0 ? bend : NEUTRAL_SWITCH
    const body = JSON.stringify(event, null, 2)
    const timestampS = Math.floor(Date.now() / 1000) + bends.clockOffsetS
    const delivery = {
      url: record.url,
      body,
      signature: signatureHeader(body, fake.options.webhookSecrets, timestampS, bends.badSignature),
      answerTimeoutMs: bends.answerTimeoutMs ?? fake.options.answerTimeoutMs,
      bodyPauseMs: bends.bodyPauseMs,
    }
    const at = new Date().toISOString()
    const answers = await Promise.all(Array.from({ length: 1 + bends.extraCopies }, () => sendDelivery(delivery)))
    if (startedIn !== generation) return
    record.attempts.push(...answers.map(answer => ({ at, ...answer, bentBy: describeSwitch(bends) })))
    const isDelivered = answers.some(answer => answer.status !== null && answer.status >= 200 && answer.status < 300)
    settle(event, record, isDelivered, bend)
  }

  function settle(event: WireEvent, record: DeliveryRecord, isDelivered: boolean, bend: DeliverySwitch): void {
    const fake = getFake()
    if (isDelivered) {
      record.state = 'delivered'
      event.pending_webhooks = 0
    } else if (record.state !== 'delivered') {
      const gapMs = fake.options.retryGapsMs[record.failedRounds]
      record.failedRounds += 1
      if (gapMs === undefined) {
        record.state = 'failed'
        fake.options.log(`delivery of ${event.type} given up after ${record.failedRounds} rounds`)
      } else {
        record.nextAttemptAtMs = Date.now() + gapMs
        later(gapMs, () => void attempt(event, bend))
      }
    }
    fake.persistSoon()
  }

  /** First attempts go one after the other, so that events arrive in the order in which they happened. */
  function queueFirst(event: WireEvent, bend: DeliverySwitch): void {
    firstAttempts = firstAttempts.then(() => attempt(event, bend))
  }

  function releaseHeld(): void {
    for (const { event, bend } of held.splice(0).reverse()) queueFirst(event, bend)
  }

  return {
    add(event) {
      const { state, options } = getFake()
      if (options.webhookUrl === null) return
      const bend = takeSwitch(event.type)
      event.pending_webhooks = 1
      state.deliveries[event.id] = {
        eventId: event.id,
        eventType: event.type,
        url: options.webhookUrl,
        state: bend.drop ? 'dropped' : 'pending',
        attempts: [],
        failedRounds: 0,
        nextAttemptAtMs: null,
      }
      if (bend.drop) return
      if (bend.reorder > 1) {
        held.push({ event, bend })
        if (held.length >= bend.reorder) releaseHeld()
        else later(REORDER_PATIENCE_MS, releaseHeld)
      } else if (bend.delayMs > 0) {
        later(bend.delayMs, () => void attempt(event, bend))
      } else {
        queueFirst(event, bend)
      }
    },
    redeliver(event) {
      const { state, options } = getFake()
      if (options.webhookUrl === null) return
      const record = state.deliveries[event.id] ??= {
        eventId: event.id, eventType: event.type, url: options.webhookUrl, state: 'pending', attempts: [], failedRounds: 0, nextAttemptAtMs: null,
      }
      record.url = options.webhookUrl
      if (record.state !== 'delivered') record.state = 'pending'
      void attempt(event, { ...takeSwitch(event.type), everyAttempt: true })
    },
    addSwitch: bend => void switches.push(bend),
    listSwitches: () => switches,
    clearSwitches: () => void switches.splice(0),
    resume() {
      const { state } = getFake()
      for (const record of Object.values(state.deliveries)) {
        const event = state.events[record.eventId]
        if (record.state === 'pending' && event) later((record.nextAttemptAtMs ?? 0) - Date.now(), () => queueFirst(event, NEUTRAL_SWITCH))
      }
    },
    forgetAll() {
      generation += 1
      for (const timer of timers) clearTimeout(timer)
      timers.clear()
      held.splice(0)
      switches.splice(0)
    },
    stop() {
      generation += 1
      for (const timer of timers) clearTimeout(timer)
      timers.clear()
    },
  }
}
