import type { Fake } from './fake'
import { expireDueSessions } from './flow/expiry'
import { bookCharge, settlePayment } from './flow/settlement'
import { openDispute } from './resources/disputes'
import { settleRefund } from './resources/refunds'
import type { ScheduledChange } from './state'

const SWEEP_MS = 250

/** Brings about what time brings: settlements, slow refunds, expiry of sessions. */
export interface Scheduler {
  /** Plans a change after so many milliseconds of real time; it survives a restart. */
  plan: (kind: ScheduledChange['kind'], objectId: string, outcome: ScheduledChange['outcome'], afterMs: number) => void
  /** Forgets planned changes of one object, because they came about by hand. */
  cancel: (objectId: string) => void
  /** Does what is due now. */
  sweep: () => void
  start: () => void
  stop: () => void
}

/** A scheduler over the state of the fake that `getFake` answers. */
export function createScheduler(getFake: () => Fake): Scheduler {
  let timer: NodeJS.Timeout | null = null

  function apply(fake: Fake, change: ScheduledChange): void {
    if (change.kind === 'settlePayment') settlePayment(fake, change.objectId, change.outcome)
    else if (change.kind === 'settleRefund') settleRefund(fake, change.objectId, change.outcome)
    else if (change.kind === 'bookCharge') bookCharge(fake, change.objectId)
    else openDispute(fake, change.objectId, {})
  }

  function sweep(): void {
    const fake = getFake()
    const nowMs = Date.now()
    const due = fake.state.scheduled.filter(change => change.dueAtMs <= nowMs)
    fake.state.scheduled = fake.state.scheduled.filter(change => change.dueAtMs > nowMs)
    for (const change of due) apply(fake, change)
    const expired = expireDueSessions(fake)
    if (due.length > 0 || expired > 0) fake.persist()
  }

  return {
    plan(kind, objectId, outcome, afterMs) {
      getFake().state.scheduled.push({ kind, objectId, outcome, dueAtMs: Date.now() + afterMs })
    },
    cancel(objectId) {
      const { state } = getFake()
      state.scheduled = state.scheduled.filter(change => change.objectId !== objectId)
    },
    sweep,
    start() {
      timer = setInterval(sweep, SWEEP_MS)
    },
    stop() {
      if (timer) clearInterval(timer)
      timer = null
    },
  }
}
