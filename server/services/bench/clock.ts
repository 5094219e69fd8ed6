import type { BenchAct } from '#shared/schemas/shop'

export type ClockRecord = { act: BenchAct, at: Date }
/** Minutes clocked, and what the clock runs on now. */
export type Clocked = { setUpMinutes: number, runMinutes: number, runningSince: Date | null, phase: 'set-up' | 'run' }

/**
 * Adds up an operation's records: set-up runs from `start` to `run`, the run from there to `finish`; pauses do not count.
 * A finish without a `run` counts all as set-up. Records in the order of their times; `until` closes what is still open.
 */
export function readClock(records: readonly ClockRecord[], until: Date): Clocked {
  const sums = { 'set-up': 0, 'run': 0 }
  let phase: Clocked['phase'] = 'set-up'
  let openedAt: Date | null = null
  const close = (at: Date) => {
    if (openedAt) sums[phase] += Math.max(0, at.getTime() - openedAt.getTime()) / 60_000
    openedAt = null
  }
  for (const { act, at } of records) {
    if (act === 'start' || act === 'resume') openedAt = at
    else if (act === 'run') {
      close(at)
      phase = 'run'
      openedAt = at
    }
    else if (act === 'pause' || act === 'finish') close(at)
  }
  const runningSince = openedAt
  close(until)
  return { setUpMinutes: sums['set-up'], runMinutes: sums.run, runningSince, phase }
}
